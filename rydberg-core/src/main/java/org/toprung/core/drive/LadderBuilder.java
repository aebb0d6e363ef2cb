package org.toprung.core.drive;

import java.util.ArrayDeque;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.Deque;
import java.util.HashMap;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.TreeSet;
import org.toprung.angular.SphericalComponents;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.atom.Sublevel;
import org.toprung.core.quantity.Estimate;
import org.toprung.core.quantity.Frequency;
import org.toprung.core.structure.FarLightShift;
import org.toprung.core.structure.Lifetimes;

/**
 * Turns the description of a drive into its {@link Ladder}: every sublevel that the light can reach
 * from the start, its energy in the rotating frame and its couplings.
 *
 * <p>The fine-structure partner of a named intermediate level (P½ for P3/2 and the reverse) is kept
 * sublevel by sublevel where the lasers are less than 30 times farther from it than from the named
 * level, and eliminated otherwise.
 */
final class LadderBuilder {
  private final DriveSetup setup;
  private final Species species;
  private final int steps;
  private final RotatingFrame frame;
  private final StepLight light;
  private final FarShifts farShifts;
  private final List<ProductState> states = new ArrayList<>();
  private final List<Integer> rungs = new ArrayList<>();
  private final List<Double> energies = new ArrayList<>(); // Hz, rotating frame
  private final List<Set<Level>> levels = new ArrayList<>(); // by rung
  private int[] keptStates; // state by index in the ladder, once built
  private double farShiftRelativeUncertainty;
  private double startTrapShift; // Hz
  private double targetTrapShift; // Hz

  /** One way from a lower to an upper sublevel through a sublevel that is not kept. */
  record PartnerPath(ProductState middle, double productRe, double productIm, double awayHertz) {}

  LadderBuilder(DriveSetup setup) {
    this.setup = setup;
    this.species = setup.species();
    this.steps = setup.steps();
    for (int k = 0; k < steps; k++) {
      StepLight.element(setup, k); // refuses a forbidden step by name before anything is computed
    }
    this.frame = new RotatingFrame(setup);
    this.light = new StepLight(setup, frame);
    this.farShifts = new FarShifts(setup, frame, light, this::inLadder);
    addRung(0, Set.of(setup.named(0)), -frame.startEnergyHertz());
    for (int r = 1; r < steps; r++) {
      int rung = r;
      Set<Level> kept = new TreeSet<>(Comparator.comparing(Level::toString));
      RotatingFrame.fineStructure(setup.named(r)).stream()
          .filter(l -> frame.isNear(l, rung))
          .forEach(kept::add);
      addRung(r, kept, -frame.detuningHertz(r));
    }
    Set<Level> target = new TreeSet<>(Comparator.comparing(Level::toString));
    RotatingFrame.fineStructure(setup.named(steps)).stream()
        .filter(this::canBeReached)
        .forEach(target::add);
    addRung(steps, target, -frame.fieldShift());
    setup.trap().ifPresent(this::shiftByTrap);
  }

  /**
   * Moves every level by the trap light; the start stays at zero, the lasers at their frequencies.
   */
  private void shiftByTrap(DriveSetup.Trap trap) {
    double field = trap.beam().fieldVoltsPerMetre(RotatingFrame.wavelength(trap.laser().hertz()));
    SphericalComponents polarization = trap.beam().polarizationVector().componentsAbout(0, 0, 1);
    FarLightShift shifts = FarLightShift.of(species);
    Map<String, Double> known = new HashMap<>();
    double[] moved = new double[states.size()];
    for (int i = 0; i < moved.length; i++) {
      ProductState s = states.get(i);
      for (int c = 0; c < s.amplitude().length; c++) {
        int tMj = s.doubledMj()[c];
        double perSquare =
            known.computeIfAbsent(
                s.level() + " " + tMj,
                key ->
                    shifts
                        .hertzPerFieldSquared(
                            s.level(), tMj, trap.laser().hertz(), polarization, Set.of())
                        .value());
        moved[i] += s.amplitude()[c] * s.amplitude()[c] * perSquare * field * field;
      }
      if (isWanted(i)) {
        targetTrapShift = moved[i];
      }
    }
    startTrapShift = moved[indexOfStart()];
    for (int i = 0; i < moved.length; i++) {
      energies.set(i, energies.get(i) + moved[i] - startTrapShift);
    }
  }

  /** By how much more the trap moves the target than the start, Hz. */
  double trapShiftHertz() {
    return targetTrapShift - startTrapShift;
  }

  Drive.TrapLight trapLight(DriveSetup.Trap trap) {
    return new Drive.TrapLight(
        trap.beam(),
        RotatingFrame.wavelength(trap.laser().hertz()),
        Frequency.ofHertz(startTrapShift),
        Frequency.ofHertz(targetTrapShift));
  }

  private void addRung(int rung, Set<Level> rungLevels, double offset) {
    levels.add(rungLevels);
    for (Level level : rungLevels) {
      double base = frame.transition(setup.named(rung), level) + offset;
      List<ProductState> sublevels =
          rung < steps
              ? ProductState.hyperfine(species, level, setup.field())
              : ProductState.uncoupled(species, level, setup.field());
      for (ProductState s : sublevels) {
        states.add(s);
        rungs.add(rung);
        energies.add(
            base + s.energyHertz() + (rung < steps ? 0 : frame.stark(level, s.doubledMj()[0])));
      }
    }
  }

  private boolean isStart(ProductState s) {
    return s.doubledF() == setup.start().doubledF() && s.doubledM() == setup.start().doubledM();
  }

  private boolean isWanted(int state) {
    ProductState s = states.get(state);
    return rungs.get(state) == steps
        && s.level().equals(setup.named(steps))
        && s.doubledMj()[0] == setup.target().doubledM();
  }

  private boolean canBeReached(Level upper) {
    int most = 2 * light.rank(steps - 1);
    return upper.equals(setup.named(steps))
        || levels.get(steps - 1).stream()
            .anyMatch(l -> Math.abs(l.doubledJ() - upper.doubledJ()) <= most);
  }

  RotatingFrame frame() {
    return frame;
  }

  StepLight light() {
    return light;
  }

  double farShiftRelativeUncertainty() {
    return farShiftRelativeUncertainty;
  }

  boolean isNamed(Ladder.State state) {
    return state.level().equals(setup.named(state.rung()));
  }

  Ladder build() {
    List<Ladder.Coupling> all = new ArrayList<>();
    for (int k = 0; k < steps; k++) {
      all.addAll(stepCouplings(k));
    }
    int start = indexOfStart();
    Map<Integer, Integer> kept = reachable(all, start);
    this.keptStates = kept.keySet().stream().mapToInt(Integer::intValue).toArray();
    for (int r = 1; r < steps; r++) {
      all.addAll(couplingsAcross(r, kept));
    }
    List<Integer> wanted = kept.keySet().stream().filter(this::isWanted).toList();
    if (wanted.isEmpty()) {
      throw new Unreachable(setup, light).noPath();
    }
    double[][] far = farShifts(kept, start, wanted.get(0));
    Ladder ladder = assemble(all, kept, far, start, wanted, 0);
    Elimination elimination = Elimination.of(ladder);
    int strongest = elimination.strongestWanted();
    double reference =
        ladder.states().get(strongest).energyHertz() - (targetTrapShift - startTrapShift);
    if (elimination.cancels(strongest)) {
      throw new Unreachable(setup, light).cancelled();
    }
    return assemble(all, kept, far, start, wanted, reference);
  }

  private int indexOfStart() {
    for (int i = 0; i < states.size(); i++) {
      if (rungs.get(i) == 0 && frame.isStart(states.get(i))) {
        return i;
      }
    }
    throw new IllegalStateException("no state " + setup.start());
  }

  private List<Ladder.Coupling> stepCouplings(int step) {
    List<Ladder.Coupling> couplings = new ArrayList<>();
    double largest = 0;
    for (int l = 0; l < states.size(); l++) {
      for (int u = 0; u < states.size(); u++) {
        if (rungs.get(l) == step && rungs.get(u) == step + 1) {
          double[] rabi = light.rabi(states.get(l), states.get(u), step);
          Ladder.Coupling c = new Ladder.Coupling(l, u, rabi[0], rabi[1]);
          largest = Math.max(largest, c.rabiHertz());
          couplings.add(c);
        }
      }
    }
    double floor = StepLight.NEGLIGIBLE * largest;
    couplings.removeIf(c -> !(c.rabiHertz() > floor));
    return couplings;
  }

  /** Couplings across one rung, through the partner level that is not kept there. */
  private List<Ladder.Coupling> couplingsAcross(int rung, Map<Integer, Integer> kept) {
    List<Ladder.Coupling> couplings = new ArrayList<>();
    for (Level level : RotatingFrame.fineStructure(setup.named(rung))) {
      if (levels.get(rung).contains(level)) {
        continue;
      }
      double base = frame.transition(setup.named(rung), level) - frame.detuningHertz(rung);
      List<ProductState> middle = ProductState.uncoupled(species, level, setup.field());
      for (int l : kept.keySet()) {
        for (int u : kept.keySet()) {
          if (rungs.get(l) == rung - 1 && rungs.get(u) == rung + 1) {
            Ladder.Coupling c = across(l, u, rung, middle, base);
            if (c.rabiHertz() > 0) {
              couplings.add(c);
            }
          }
        }
      }
    }
    return couplings;
  }

  private Ladder.Coupling across(
      int lower, int upper, int rung, List<ProductState> middle, double base) {
    double re = 0;
    double im = 0;
    for (PartnerPath path : paths(lower, upper, rung, middle, base)) {
      re += path.productRe() / (2 * path.awayHertz());
      im += path.productIm() / (2 * path.awayHertz());
    }
    return new Ladder.Coupling(lower, upper, re, im);
  }

  private List<PartnerPath> paths(
      int lower, int upper, int rung, List<ProductState> middle, double base) {
    List<PartnerPath> paths = new ArrayList<>();
    for (ProductState m : middle) {
      double[] low = light.rabi(states.get(lower), m, rung - 1);
      double[] up = light.rabi(m, states.get(upper), rung);
      double re = up[0] * low[0] - up[1] * low[1];
      double im = up[0] * low[1] + up[1] * low[0];
      if (re != 0 || im != 0) {
        paths.add(new PartnerPath(m, re, im, energies.get(lower) - base - m.energyHertz()));
      }
    }
    return paths;
  }

  /** The ways across a rung that the ladder holds as one coupling; indices of the built ladder. */
  List<PartnerPath> partnerPaths(int lower, int upper, int rung) {
    List<PartnerPath> paths = new ArrayList<>();
    for (Level level : RotatingFrame.fineStructure(setup.named(rung))) {
      if (!levels.get(rung).contains(level)) {
        double base = frame.transition(setup.named(rung), level) - frame.detuningHertz(rung);
        List<ProductState> middle = ProductState.uncoupled(species, level, setup.field());
        paths.addAll(paths(keptStates[lower], keptStates[upper], rung, middle, base));
      }
    }
    return paths;
  }

  /** Distances of the fine-structure partners of a named level from it, Hz. */
  double[] partnerHertz(int rung) {
    return RotatingFrame.fineStructure(setup.named(rung)).stream()
        .filter(level -> !level.equals(setup.named(rung)))
        .mapToDouble(level -> frame.transition(setup.named(rung), level))
        .toArray();
  }

  /** The sublevel behind a state of the built ladder. */
  ProductState product(int index) {
    return states.get(keptStates[index]);
  }

  /** Old index to new index of every state the light connects with the start. */
  private static Map<Integer, Integer> reachable(List<Ladder.Coupling> couplings, int start) {
    Map<Integer, List<Integer>> neighbours = new HashMap<>();
    for (Ladder.Coupling c : couplings) {
      neighbours.computeIfAbsent(c.lower(), k -> new ArrayList<>()).add(c.upper());
      neighbours.computeIfAbsent(c.upper(), k -> new ArrayList<>()).add(c.lower());
    }
    Set<Integer> found = new TreeSet<>(Set.of(start));
    Deque<Integer> open = new ArrayDeque<>(found);
    while (!open.isEmpty()) {
      for (int next : neighbours.getOrDefault(open.remove(), List.of())) {
        if (found.add(next)) {
          open.add(next);
        }
      }
    }
    Map<Integer, Integer> index = new LinkedHashMap<>();
    found.forEach(i -> index.put(i, index.size()));
    return index;
  }

  private double[][] farShifts(Map<Integer, Integer> kept, int start, int wanted) {
    double[][] far = new double[kept.size()][steps];
    double size = 0;
    double uncertainty = 0;
    for (Map.Entry<Integer, Integer> entry : kept.entrySet()) {
      ProductState s = states.get(entry.getKey());
      int rung = rungs.get(entry.getKey());
      if (rung > 0 && rung < steps) {
        continue;
      }
      far[entry.getValue()] = farShifts.hertz(s, rung);
      if (entry.getKey() == start || entry.getKey() == wanted) {
        for (int k = 0; k < steps; k++) {
          Estimate e = farShifts.of(s, rung, k);
          size += Math.abs(e.value());
          uncertainty += e.uncertainty();
        }
      }
    }
    farShiftRelativeUncertainty = size > 0 ? uncertainty / size : 0;
    return far;
  }

  /** The levels whose resonant coupling to a rung by a beam the ladder itself holds. */
  Set<Level> inLadder(int rung, int step) {
    if (rung == 0 && step == 0) {
      return levels.get(1);
    }
    if (rung == steps && step == steps - 1) {
      return levels.get(steps - 1);
    }
    return Set.of();
  }

  /** What the beams do to a ground sublevel that need not be the start. */
  GroundLight groundLight(Sublevel sublevel) {
    int index = -1;
    for (int i = 0; i < states.size(); i++) {
      ProductState s = states.get(i);
      if (rungs.get(i) == 0
          && s.doubledF() == sublevel.doubledF()
          && s.doubledM() == sublevel.doubledM()) {
        index = i;
      }
    }
    double[] shift = farShifts.hertz(states.get(index), 0);
    // as in Elimination, counted from where levels outside the ladder have moved the sublevel
    double energy = energies.get(index) + Arrays.stream(shift).sum();
    double scattering = 0;
    Lifetimes lifetimes = Lifetimes.of(species);
    for (int u = 0; u < states.size(); u++) {
      if (rungs.get(u) != 1) {
        continue;
      }
      double[] rabi = light.rabi(states.get(index), states.get(u), 0);
      double square = rabi[0] * rabi[0] + rabi[1] * rabi[1];
      if (square == 0) {
        continue;
      }
      double away = energy - energies.get(u);
      double rate =
          steps == 1 ? 0 : lifetimes.spontaneousRatePerSecond(states.get(u).level()).value();
      double width = rate / (2 * Math.PI);
      double denominator = 4 * away * away + width * width;
      shift[0] += square * away / denominator;
      scattering += rate * square / denominator;
    }
    return new GroundLight(
        sublevel, Arrays.stream(shift).mapToObj(Frequency::ofHertz).toList(), scattering);
  }

  private Ladder assemble(
      List<Ladder.Coupling> couplings,
      Map<Integer, Integer> kept,
      double[][] far,
      int start,
      List<Integer> wanted,
      double targetReference) {
    List<Ladder.State> list = new ArrayList<>();
    Lifetimes lifetimes = Lifetimes.of(species);
    for (int i : kept.keySet()) {
      ProductState s = states.get(i);
      int rung = rungs.get(i);
      boolean middle = rung > 0 && rung < steps;
      list.add(
          new Ladder.State(
              s.label(),
              s.level(),
              rung,
              energies.get(i) - (rung == steps ? targetReference : 0),
              middle ? lifetimes.spontaneousRatePerSecond(s.level()).value() : 0,
              s.hertzPerTesla()));
    }
    List<Ladder.Coupling> renumbered =
        couplings.stream()
            .filter(c -> kept.containsKey(c.lower()) && kept.containsKey(c.upper()))
            .map(
                c ->
                    new Ladder.Coupling(
                        kept.get(c.lower()), kept.get(c.upper()), c.rabiReHertz(), c.rabiImHertz()))
            .toList();
    int[] wantedIndex = wanted.stream().mapToInt(kept::get).toArray();
    return new Ladder(steps, list, renumbered, far, kept.get(start), wantedIndex);
  }
}
