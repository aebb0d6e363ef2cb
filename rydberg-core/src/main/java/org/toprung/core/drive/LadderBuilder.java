package org.toprung.core.drive;

import java.util.ArrayDeque;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.Deque;
import java.util.HashMap;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Set;
import java.util.TreeSet;
import java.util.stream.Collectors;
import java.util.stream.IntStream;
import org.toprung.angular.HalfInteger;
import org.toprung.angular.SphericalComponents;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.atom.Sublevel;
import org.toprung.core.quantity.Estimate;
import org.toprung.core.quantity.Frequency;
import org.toprung.core.quantity.Length;
import org.toprung.core.quantity.PhysicalConstants;
import org.toprung.core.structure.DipoleElement;
import org.toprung.core.structure.DipoleElements;
import org.toprung.core.structure.FarLightShift;
import org.toprung.core.structure.Lifetimes;
import org.toprung.core.structure.QuadrupoleElements;
import org.toprung.core.structure.ReducedElement;

/**
 * Turns the description of a drive into its {@link Ladder}: every sublevel that the light can reach
 * from the start, its energy in the rotating frame and its couplings.
 *
 * <p>The fine-structure partner of a named intermediate level (P½ for P3/2 and the reverse) is kept
 * sublevel by sublevel where the lasers are less than {@value #NEAR_FACTOR} times farther from it
 * than from the named level, and eliminated otherwise.
 */
final class LadderBuilder {
  private static final double NEAR_FACTOR = 30;
  private static final double NEGLIGIBLE = 1e-12; // of the largest coupling of a step
  private static final double DIPOLE_UNIT = // e a0/h, Hz/(V/m)
      PhysicalConstants.ATOMIC_DIPOLE / PhysicalConstants.PLANCK;

  private final DriveSetup setup;
  private final Species species;
  private final int steps;
  private final DipoleElements dipoles;
  private final double[] field; // V/m by step
  private final SphericalComponents[] light;
  private final LightTensor[] tensor;
  private final double[] laser; // Hz by step
  private final double[] detuning; // Hz by rung, of the lasers up to it from the named level
  private final double startEnergy; // Hz from the centre of gravity of the ground level
  private final List<ProductState> states = new ArrayList<>();
  private final List<Integer> rungs = new ArrayList<>();
  private final List<Double> energies = new ArrayList<>(); // Hz, rotating frame
  private final List<Set<Level>> levels = new ArrayList<>(); // by rung
  private int[] keptStates; // state by index in the ladder, once built
  private final Map<String, Estimate> knownFarShifts = new HashMap<>();
  private double farShiftRelativeUncertainty;
  private double startTrapShift; // Hz
  private double targetTrapShift; // Hz

  /** One way from a lower to an upper sublevel through a sublevel that is not kept. */
  record PartnerPath(ProductState middle, double productRe, double productIm, double awayHertz) {}

  LadderBuilder(DriveSetup setup) {
    this.setup = setup;
    this.species = setup.species();
    this.steps = setup.steps();
    this.dipoles = DipoleElements.of(species);
    this.field = new double[steps];
    this.light = new SphericalComponents[steps];
    this.tensor = new LightTensor[steps];
    for (int k = 0; k < steps; k++) {
      light[k] = setup.beam(k).polarizationVector().componentsAbout(0, 0, 1);
      tensor[k] =
          setup.isQuadrupole(k)
              ? LightTensor.quadrupole(light[k], setup.beam(k).direction())
              : LightTensor.dipole(light[k]);
      element(k); // refuses a forbidden step by name before any sum is attempted
    }
    List<ProductState> ground = ProductState.hyperfine(species, named(0), setup.field());
    this.startEnergy =
        ground.stream().filter(this::isStart).findFirst().orElseThrow().energyHertz();
    this.detuning = new double[steps + 1];
    for (int r = 1; r < steps; r++) {
      detuning[r] = detuning[r - 1] + setup.detuning(r - 1).hertz();
    }
    this.laser = lasers();
    for (int k = 0; k < steps; k++) {
      field[k] = fieldAtAtom(k);
    }
    addRung(0, Set.of(named(0)), -startEnergy);
    for (int r = 1; r < steps; r++) {
      int rung = r;
      Set<Level> kept = new TreeSet<>(Comparator.comparing(Level::toString));
      fineStructure(named(r)).stream().filter(l -> isNear(l, rung)).forEach(kept::add);
      addRung(r, kept, -detuning[r]);
    }
    Set<Level> target = new TreeSet<>(Comparator.comparing(Level::toString));
    fineStructure(named(steps)).stream().filter(this::canBeReached).forEach(target::add);
    addRung(steps, target, -fieldShift());
    setup.trap().ifPresent(this::shiftByTrap);
  }

  /**
   * Moves every level by the trap light; the start stays at zero, the lasers at their frequencies.
   */
  private void shiftByTrap(DriveSetup.Trap trap) {
    double field = trap.beam().fieldVoltsPerMetre(wavelength(trap.laser().hertz()));
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
        wavelength(trap.laser().hertz()),
        Frequency.ofHertz(startTrapShift),
        Frequency.ofHertz(targetTrapShift));
  }

  private double[] lasers() {
    double[] frequencies = new double[steps];
    double left = transition(named(0), named(steps)) - startEnergy + fieldShift();
    for (int k = 0; k < steps - 1; k++) {
      frequencies[k] = transition(named(k), named(k + 1)) + setup.detuning(k).hertz();
      if (k == 0) {
        frequencies[0] -= startEnergy;
      }
      left -= frequencies[k];
    }
    frequencies[steps - 1] = left;
    for (int k = 0; k < steps; k++) {
      if (!(frequencies[k] > 0)) {
        throw new IllegalArgumentException(
            String.format(
                Locale.ROOT,
                "step %d from %s to %s does not climb: at %s its laser would need %.6g THz, not a"
                    + " positive frequency",
                k + 1,
                named(k),
                named(k + 1),
                detunings(),
                frequencies[k] * 1e-12));
      }
    }
    return frequencies;
  }

  private static Length wavelength(double laserHertz) {
    return Length.ofMetres(PhysicalConstants.SPEED_OF_LIGHT / laserHertz);
  }

  private double fieldAtAtom(int step) {
    Beam beam = setup.beam(step);
    double atAtom = beam.fieldVoltsPerMetre(wavelength(laser[step]));
    if (!(atAtom > NEGLIGIBLE * beam.peakFieldVoltsPerMetre())) {
      double[] f = beam.focusMetres();
      throw new IllegalArgumentException(
          String.format(
              Locale.ROOT,
              "beam %d misses the atom: focused at (%.6g, %.6g, %.6g) um from it, it has %.2g of its"
                  + " peak field there (allowed: more than %.0e)",
              step + 1,
              f[0] * 1e6,
              f[1] * 1e6,
              f[2] * 1e6,
              atAtom / beam.peakFieldVoltsPerMetre(),
              NEGLIGIBLE));
    }
    return atAtom;
  }

  private String detunings() {
    List<String> given = new ArrayList<>();
    for (int k = 0; k < steps - 1; k++) {
      given.add(setup.detuning(k).toString());
    }
    return given.isEmpty() ? "no detuning" : "a detuning of " + String.join(" and ", given);
  }

  private void addRung(int rung, Set<Level> rungLevels, double offset) {
    levels.add(rungLevels);
    for (Level level : rungLevels) {
      double base = transition(named(rung), level) + offset;
      List<ProductState> sublevels =
          rung < steps
              ? ProductState.hyperfine(species, level, setup.field())
              : ProductState.uncoupled(species, level, setup.field());
      for (ProductState s : sublevels) {
        states.add(s);
        rungs.add(rung);
        energies.add(base + s.energyHertz() + (rung < steps ? 0 : stark(level, s.doubledMj()[0])));
      }
    }
  }

  /** The level named for a rung. */
  private Level named(int rung) {
    return rung == 0 ? species.groundLevel() : setup.level(rung - 1);
  }

  private boolean isStart(ProductState s) {
    return s.doubledF() == setup.start().doubledF() && s.doubledM() == setup.start().doubledM();
  }

  private boolean isWanted(int state) {
    ProductState s = states.get(state);
    return rungs.get(state) == steps
        && s.level().equals(named(steps))
        && s.doubledMj()[0] == setup.target().doubledM();
  }

  private double transition(Level from, Level to) {
    return species.energyHertz(to).value() - species.energyHertz(from).value();
  }

  /** Electronic Zeeman shift and Stark shift of the wanted target, Hz. */
  private double fieldShift() {
    double zeeman =
        0.5
            * setup.target().doubledM()
            * species.gJ(named(steps))
            * PhysicalConstants.BOHR_MAGNETON_HERTZ_PER_TESLA
            * setup.field().tesla();
    return zeeman + stark(named(steps), setup.target().doubledM());
  }

  private double stark(Level level, int doubledMj) {
    return setup.electric().shiftHertz(species, level, doubledMj);
  }

  /** The named level itself, or a partner that the lasers are not much farther from. */
  private boolean isNear(Level level, int rung) {
    return level.equals(named(rung)) || isNear(transition(named(rung), level), detuning[rung]);
  }

  /** Whether lasers at a detuning from a level are near its partner at a distance from it, Hz. */
  static boolean isNear(double partnerHertz, double detuningHertz) {
    return Math.abs(detuningHertz - partnerHertz) < NEAR_FACTOR * Math.abs(detuningHertz);
  }

  private static List<Level> fineStructure(Level level) {
    if (level.l() == 0) {
      return List.of(level);
    }
    return List.of(
        Level.of(level.n(), level.l(), 2 * level.l() - 1),
        Level.of(level.n(), level.l(), 2 * level.l() + 1));
  }

  private boolean canBeReached(Level upper) {
    int most = 2 * tensor[steps - 1].rank();
    return upper.equals(named(steps))
        || levels.get(steps - 1).stream()
            .anyMatch(l -> Math.abs(l.doubledJ() - upper.doubledJ()) <= most);
  }

  /** The reduced element of a step between named levels. */
  ReducedElement element(int step) {
    return setup.isQuadrupole(step)
        ? QuadrupoleElements.of(species).reduced(named(step + 1), named(step))
        : dipoles.reduced(named(step + 1), named(step));
  }

  /** The reduced element between two levels. */
  DipoleElement element(Level upper, Level lower) {
    return dipoles.reduced(upper, lower);
  }

  double laserHertz(int step) {
    return laser[step];
  }

  double farShiftRelativeUncertainty() {
    return farShiftRelativeUncertainty;
  }

  boolean isNamed(Ladder.State state) {
    return state.level().equals(named(state.rung()));
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
      throw new IllegalArgumentException(whyUnreachable());
    }
    double[][] far = farShifts(kept, start, wanted.get(0));
    Ladder ladder = assemble(all, kept, far, start, wanted, 0);
    Elimination elimination = Elimination.of(ladder);
    double reference = 0;
    double strongest = 0;
    for (int w : ladder.wanted()) {
      if (elimination.rabiHertz(w) > strongest) {
        strongest = elimination.rabiHertz(w);
        reference = ladder.states().get(w).energyHertz() - (targetTrapShift - startTrapShift);
      }
    }
    double scale = 1;
    for (Ladder.Coupling c : all) {
      scale = Math.max(scale, c.rabiHertz());
    }
    if (!(strongest > NEGLIGIBLE * scale)) {
      throw new IllegalArgumentException(
          "the paths from "
              + setup.start()
              + " to "
              + setup.target()
              + " through the sublevels of "
              + through()
              + " cancel");
    }
    return assemble(all, kept, far, start, wanted, reference);
  }

  private int indexOfStart() {
    for (int i = 0; i < states.size(); i++) {
      if (rungs.get(i) == 0 && isStart(states.get(i))) {
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
          double[] rabi = rabi(states.get(l), states.get(u), step);
          Ladder.Coupling c = new Ladder.Coupling(l, u, rabi[0], rabi[1]);
          largest = Math.max(largest, c.rabiHertz());
          couplings.add(c);
        }
      }
    }
    double floor = NEGLIGIBLE * largest;
    couplings.removeIf(c -> !(c.rabiHertz() > floor));
    return couplings;
  }

  /** Complex Rabi frequency over 2π, Hz; zero where J forbids. */
  private double[] rabi(ProductState lower, ProductState upper, int step) {
    int change = Math.abs(lower.level().doubledJ() - upper.level().doubledJ());
    if (change > 2 * tensor[step].rank()) {
      return new double[2];
    }
    double[] angular = ProductState.angular(lower, upper, tensor[step]);
    if (angular[0] == 0 && angular[1] == 0) {
      return angular;
    }
    double scale = field[step] * transitionHertz(upper.level(), lower.level(), step);
    return new double[] {scale * angular[0], scale * angular[1]};
  }

  /**
   * What multiplies field and angular factor: (e/h)⟨‖r‖⟩ for a dipole, (e k/2h)⟨‖r²C²‖⟩ for a
   * quadrupole, Hz/(V/m).
   */
  private double transitionHertz(Level upper, Level lower, int step) {
    if (!setup.isQuadrupole(step)) {
      return DIPOLE_UNIT * dipoles.reduced(upper, lower).valueA0();
    }
    double waveNumber = 2 * Math.PI * laser[step] / PhysicalConstants.SPEED_OF_LIGHT;
    return DIPOLE_UNIT
        * 0.5
        * waveNumber
        * PhysicalConstants.BOHR_RADIUS
        * QuadrupoleElements.of(species).reduced(upper, lower).valueA0Squared();
  }

  /** Couplings across one rung, through the partner level that is not kept there. */
  private List<Ladder.Coupling> couplingsAcross(int rung, Map<Integer, Integer> kept) {
    List<Ladder.Coupling> couplings = new ArrayList<>();
    for (Level level : fineStructure(named(rung))) {
      if (levels.get(rung).contains(level)) {
        continue;
      }
      double base = transition(named(rung), level) - detuning[rung];
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
      double[] low = rabi(states.get(lower), m, rung - 1);
      double[] up = rabi(m, states.get(upper), rung);
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
    for (Level level : fineStructure(named(rung))) {
      if (!levels.get(rung).contains(level)) {
        double base = transition(named(rung), level) - detuning[rung];
        List<ProductState> middle = ProductState.uncoupled(species, level, setup.field());
        paths.addAll(paths(keptStates[lower], keptStates[upper], rung, middle, base));
      }
    }
    return paths;
  }

  /** Distances of the fine-structure partners of a named level from it, Hz. */
  double[] partnerHertz(int rung) {
    return fineStructure(named(rung)).stream()
        .filter(level -> !level.equals(named(rung)))
        .mapToDouble(level -> transition(named(rung), level))
        .toArray();
  }

  /** The sublevel behind a state of the built ladder. */
  ProductState product(int index) {
    return states.get(keptStates[index]);
  }

  double detuningHertz(int rung) {
    return detuning[rung];
  }

  double fieldVoltsPerMetre(int step) {
    return field[step];
  }

  SphericalComponents light(int step) {
    return light[step];
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
      far[entry.getValue()] = farShiftHertz(s, rung);
      if (entry.getKey() == start || entry.getKey() == wanted) {
        for (int k = 0; k < steps; k++) {
          for (int c = 0; c < s.amplitude().length; c++) {
            double weight = s.amplitude()[c] * s.amplitude()[c] * field[k] * field[k];
            Estimate e = farShift(s.level(), s.doubledMj()[c], rung, k);
            size += weight * Math.abs(e.value());
            uncertainty += weight * e.uncertainty();
          }
        }
      }
    }
    farShiftRelativeUncertainty = size > 0 ? uncertainty / size : 0;
    return far;
  }

  /** Shift of a state of the first or last rung by levels outside the ladder, Hz by step. */
  private double[] farShiftHertz(ProductState s, int rung) {
    double[] shift = new double[steps];
    for (int k = 0; k < steps; k++) {
      for (int c = 0; c < s.amplitude().length; c++) {
        double weight = s.amplitude()[c] * s.amplitude()[c] * field[k] * field[k];
        shift[k] += weight * farShift(s.level(), s.doubledMj()[c], rung, k).value();
      }
    }
    return shift;
  }

  private Estimate farShift(Level level, int doubledMj, int rung, int step) {
    return knownFarShifts.computeIfAbsent(
        level + " " + doubledMj + " " + step,
        key ->
            FarLightShift.of(species)
                .hertzPerFieldSquared(
                    level, doubledMj, laser[step], light[step], inLadder(rung, step)));
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
    double[] shift = farShiftHertz(states.get(index), 0);
    double scattering = 0;
    Lifetimes lifetimes = Lifetimes.of(species);
    for (int u = 0; u < states.size(); u++) {
      if (rungs.get(u) != 1) {
        continue;
      }
      double[] rabi = rabi(states.get(index), states.get(u), 0);
      double square = rabi[0] * rabi[0] + rabi[1] * rabi[1];
      if (square == 0) {
        continue;
      }
      double away = energies.get(index) - energies.get(u);
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

  /** The named intermediate levels, for messages. */
  private String through() {
    List<String> names = new ArrayList<>();
    for (int r = 1; r < steps; r++) {
      names.add(named(r).toString());
    }
    return names.isEmpty() ? "no level" : String.join(" and ", names);
  }

  private String whyUnreachable() {
    StringBuilder given =
        new StringBuilder("no light path from ")
            .append(setup.start())
            .append(" to ")
            .append(setup.target());
    if (steps > 1) {
      given.append(" through ").append(through());
    }
    Set<Integer> changes = new TreeSet<>(Set.of(0));
    for (int k = 0; k < steps; k++) {
      List<Integer> photons = photons(k);
      given.append(k == 0 ? ": beam " : ", beam ").append(k + 1).append(" changes m by ");
      given.append(
          photons.stream().map(q -> q > 0 ? "+" + q : "" + q).collect(Collectors.joining(" or ")));
      Set<Integer> sums = new TreeSet<>();
      changes.forEach(sum -> photons.forEach(q -> sums.add(sum + q)));
      changes = sums;
    }
    int tI = species.doubledNuclearSpin();
    int missing = setup.start().doubledM() - setup.target().doubledM();
    if (changes.stream().noneMatch(sum -> Math.abs(missing + 2 * sum) <= tI)) {
      return given
          + ", and the nuclear spin cannot make up the rest (projection sum rule: mF + changes = mJ"
          + " + mI with |mI| at most "
          + HalfInteger.ofHalves(tI)
          + ")";
    }
    return given
        + (steps == 1
            ? ", and the start has no electron projection from which that leads there (projection rule)"
            : ", and no sublevel in between links these two (projection rule: |m| may not exceed J on"
                + " any rung)");
  }

  private List<Integer> photons(int step) {
    int rank = tensor[step].rank();
    return IntStream.rangeClosed(-rank, rank)
        .filter(q -> tensor[step].power(q) > NEGLIGIBLE)
        .boxed()
        .toList();
  }
}
