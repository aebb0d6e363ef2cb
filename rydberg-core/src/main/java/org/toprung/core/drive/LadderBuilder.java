package org.toprung.core.drive;

import java.util.ArrayDeque;
import java.util.ArrayList;
import java.util.Deque;
import java.util.HashMap;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.TreeSet;
import java.util.stream.Collectors;
import org.toprung.angular.HalfInteger;
import org.toprung.angular.SphericalComponents;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.quantity.Estimate;
import org.toprung.core.quantity.PhysicalConstants;
import org.toprung.core.structure.DipoleElement;
import org.toprung.core.structure.DipoleElements;
import org.toprung.core.structure.FarLightShift;
import org.toprung.core.structure.Lifetimes;

/**
 * Turns the description of a drive into its {@link Ladder}: every sublevel that the light can reach
 * from the start, its energy in the rotating frame and its couplings.
 *
 * <p>The fine-structure partner of the named intermediate level (P½ for P3/2 and the reverse) is
 * kept sublevel by sublevel where the first laser is less than {@value #NEAR_FACTOR} times farther
 * from it than from the named level, and eliminated otherwise.
 */
final class LadderBuilder {
  private static final double NEAR_FACTOR = 30;
  private static final double NEGLIGIBLE = 1e-12; // of the largest coupling of a step
  private static final double DIPOLE_UNIT = // e a0/h, Hz/(V/m)
      PhysicalConstants.ATOMIC_DIPOLE / PhysicalConstants.PLANCK;

  private final DriveSetup setup;
  private final Species species;
  private final Level ground;
  private final Level named;
  private final Level targetLevel;
  private final DipoleElements dipoles;
  private final double[] field = new double[2]; // V/m
  private final SphericalComponents[] light = new SphericalComponents[2];
  private final double[] laser = new double[2]; // Hz
  private final double startEnergy; // Hz from the centre of gravity of the ground level
  private final List<ProductState> states = new ArrayList<>();
  private final List<Integer> rungs = new ArrayList<>();
  private final List<Double> energies = new ArrayList<>(); // Hz, rotating frame
  private final Set<Level> near; // levels of the intermediate rung
  private final Optional<Level> eliminated; // the partner, if far
  private double farShiftRelativeUncertainty;

  LadderBuilder(DriveSetup setup) {
    this.setup = setup;
    this.species = setup.species();
    this.ground = species.groundLevel();
    this.named = setup.intermediate();
    this.targetLevel = setup.target().level();
    this.dipoles = DipoleElements.of(species);
    for (int k = 0; k < 2; k++) {
      field[k] = setup.beam(k).peakFieldVoltsPerMetre();
      light[k] = setup.beam(k).polarizationVector().componentsAbout(0, 0, 1);
    }
    List<ProductState> groundStates = ProductState.hyperfine(species, ground, setup.field());
    this.startEnergy =
        groundStates.stream().filter(this::isStart).findFirst().orElseThrow().energyHertz();
    double detuning = setup.detuning().hertz();
    laser[0] = transition(ground, named) - startEnergy + detuning;
    double startToTarget =
        transition(ground, targetLevel) - startEnergy + zeeman(setup.target().doubledM());
    laser[1] = startToTarget - laser[0];
    if (!(laser[0] > 0 && laser[1] > 0)) {
      throw new IllegalArgumentException(
          "the steps "
              + ground
              + " to "
              + named
              + " to "
              + targetLevel
              + " at a detuning of "
              + setup.detuning()
              + " do not climb: both lasers need a positive frequency");
    }
    Optional<Level> partner = finePartner();
    boolean partnerNear =
        partner.isPresent()
            && Math.abs(detuningFrom(partner.get())) < NEAR_FACTOR * Math.abs(detuning);
    this.near = partnerNear ? Set.of(named, partner.get()) : Set.of(named);
    this.eliminated = partnerNear ? Optional.empty() : partner;
    groundStates.forEach(s -> add(s, 0, s.energyHertz() - startEnergy));
    for (Level level : near) {
      double offset = transition(named, level) - detuning;
      ProductState.hyperfine(species, level, setup.field())
          .forEach(s -> add(s, 1, offset + s.energyHertz()));
    }
    for (Level level : fineStructure(targetLevel)) {
      if (canReach(level)) {
        double offset = transition(targetLevel, level) - zeeman(setup.target().doubledM());
        ProductState.uncoupled(species, level, setup.field())
            .forEach(s -> add(s, 2, offset + s.energyHertz()));
      }
    }
  }

  private void add(ProductState state, int rung, double energy) {
    states.add(state);
    rungs.add(rung);
    energies.add(energy);
  }

  private boolean isStart(ProductState s) {
    return s.doubledF() == setup.start().doubledF() && s.doubledM() == setup.start().doubledM();
  }

  private boolean isWanted(ProductState s) {
    return s.level().equals(targetLevel)
        && s.doubledMj().length == 1
        && s.doubledMj()[0] == setup.target().doubledM();
  }

  private double transition(Level from, Level to) {
    return species.energyHertz(to).value() - species.energyHertz(from).value();
  }

  /** Electronic Zeeman shift of a target sublevel, Hz. */
  private double zeeman(int doubledMj) {
    return 0.5
        * doubledMj
        * species.gJ(targetLevel)
        * PhysicalConstants.BOHR_MAGNETON_HERTZ_PER_TESLA
        * setup.field().tesla();
  }

  private double detuningFrom(Level level) {
    return laser[0] - (transition(ground, level) - startEnergy);
  }

  private Optional<Level> finePartner() {
    return fineStructure(named).stream().filter(l -> !l.equals(named)).findFirst();
  }

  private static List<Level> fineStructure(Level level) {
    if (level.l() == 0) {
      return List.of(level);
    }
    return List.of(
        Level.of(level.n(), level.l(), 2 * level.l() - 1),
        Level.of(level.n(), level.l(), 2 * level.l() + 1));
  }

  private boolean canReach(Level upper) {
    return upper.equals(targetLevel)
        || near.stream().anyMatch(l -> Math.abs(l.doubledJ() - upper.doubledJ()) <= 2);
  }

  /** The reduced element of a step between named levels. */
  DipoleElement element(int step) {
    return step == 0 ? dipoles.reduced(named, ground) : dipoles.reduced(targetLevel, named);
  }

  double laserHertz(int step) {
    return laser[step];
  }

  double farShiftRelativeUncertainty() {
    return farShiftRelativeUncertainty;
  }

  boolean isNamed(Ladder.State state) {
    return state.level().equals(named);
  }

  Ladder build() {
    // refuse forbidden steps by name before any sum is attempted
    element(0);
    element(1);
    List<Ladder.Coupling> all = new ArrayList<>();
    all.addAll(stepCouplings(0));
    all.addAll(stepCouplings(1));
    int start = indexOfStart();
    Map<Integer, Integer> kept = reachable(all, start);
    for (Ladder.Coupling c : directCouplings()) {
      if (kept.containsKey(c.lower()) && kept.containsKey(c.upper())) {
        all.add(c);
      }
    }
    List<Integer> wanted =
        kept.keySet().stream().filter(i -> rungs.get(i) == 2 && isWanted(states.get(i))).toList();
    if (wanted.isEmpty()) {
      throw new IllegalArgumentException(whyUnreachable());
    }
    double[][] far = farShifts(kept, start, wanted.get(0));
    Ladder unreferenced = assemble(all, kept, far, start, wanted, 0);
    double reference = 0;
    double strongest = 0;
    for (int w : unreferenced.wanted()) {
      double rabi = Elimination.of(unreferenced, new int[] {w}).rabiHertz();
      if (rabi > strongest) {
        strongest = rabi;
        reference = unreferenced.states().get(w).energyHertz();
      }
    }
    if (!(strongest > 0)) {
      throw new IllegalArgumentException(
          "the paths from "
              + setup.start()
              + " to "
              + setup.target()
              + " through the sublevels of "
              + named
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
          largest = Math.max(largest, Math.hypot(rabi[0], rabi[1]));
          couplings.add(new Ladder.Coupling(l, u, step, rabi[0], rabi[1]));
        }
      }
    }
    double floor = NEGLIGIBLE * largest;
    couplings.removeIf(c -> !(Math.hypot(c.rabiReHertz(), c.rabiImHertz()) > floor));
    return couplings;
  }

  /** Complex Rabi frequency over 2π, Hz; zero where J forbids. */
  private double[] rabi(ProductState lower, ProductState upper, int step) {
    if (Math.abs(lower.level().doubledJ() - upper.level().doubledJ()) > 2) {
      return new double[2];
    }
    double[] angular = ProductState.angular(lower, upper, light[step]);
    if (angular[0] == 0 && angular[1] == 0) {
      return angular;
    }
    double scale =
        field[step] * DIPOLE_UNIT * dipoles.reduced(upper.level(), lower.level()).valueA0();
    return new double[] {scale * angular[0], scale * angular[1]};
  }

  private List<Ladder.Coupling> directCouplings() {
    List<Ladder.Coupling> couplings = new ArrayList<>();
    if (eliminated.isEmpty()) {
      return couplings;
    }
    List<ProductState> middle = ProductState.uncoupled(species, eliminated.get(), setup.field());
    double fromStart = detuningFrom(eliminated.get());
    for (int l = 0; l < states.size(); l++) {
      for (int u = 0; u < states.size(); u++) {
        if (rungs.get(l) != 0 || rungs.get(u) != 2) {
          continue;
        }
        double re = 0;
        double im = 0;
        for (ProductState m : middle) {
          double[] low = rabi(states.get(l), m, 0);
          double[] up = rabi(m, states.get(u), 1);
          double detuning = fromStart + energies.get(l) - m.energyHertz();
          re += (up[0] * low[0] - up[1] * low[1]) / (2 * detuning);
          im += (up[0] * low[1] + up[1] * low[0]) / (2 * detuning);
        }
        if (re != 0 || im != 0) {
          couplings.add(new Ladder.Coupling(l, u, Ladder.DIRECT, re, im));
        }
      }
    }
    return couplings;
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
    FarLightShift shifts = FarLightShift.of(species);
    Map<String, Estimate> known = new HashMap<>();
    double[][] far = new double[kept.size()][2];
    double size = 0;
    double uncertainty = 0;
    for (Map.Entry<Integer, Integer> entry : kept.entrySet()) {
      ProductState s = states.get(entry.getKey());
      int rung = rungs.get(entry.getKey());
      if (rung == 1) {
        continue;
      }
      for (int k = 0; k < 2; k++) {
        boolean drives = rung == (k == 0 ? 0 : 2);
        double squared = field[k] * field[k];
        for (int c = 0; c < s.amplitude().length; c++) {
          int step = k;
          int tMj = s.doubledMj()[c];
          Estimate e =
              known.computeIfAbsent(
                  s.level() + " " + tMj + " " + k,
                  key ->
                      shifts.hertzPerFieldSquared(
                          s.level(), tMj, laser[step], light[step], drives ? near : Set.of()));
          double weight = s.amplitude()[c] * s.amplitude()[c];
          far[entry.getValue()][k] += weight * e.value() * squared;
          if (entry.getKey() == start || entry.getKey() == wanted) {
            size += weight * Math.abs(e.value()) * squared;
            uncertainty += weight * e.uncertainty() * squared;
          }
        }
      }
    }
    farShiftRelativeUncertainty = size > 0 ? uncertainty / size : 0;
    return far;
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
      list.add(
          new Ladder.State(
              s.label(),
              s.level(),
              rung,
              energies.get(i) - (rung == 2 ? targetReference : 0),
              rung == 1 ? lifetimes.spontaneousRatePerSecond(s.level()).value() : 0,
              s.hertzPerTesla()));
    }
    List<Ladder.Coupling> renumbered =
        couplings.stream()
            .filter(c -> kept.containsKey(c.lower()) && kept.containsKey(c.upper()))
            .map(
                c ->
                    new Ladder.Coupling(
                        kept.get(c.lower()),
                        kept.get(c.upper()),
                        c.step(),
                        c.rabiReHertz(),
                        c.rabiImHertz()))
            .toList();
    int[] wantedIndex = wanted.stream().mapToInt(kept::get).toArray();
    return new Ladder(list, renumbered, far, kept.get(start), wantedIndex);
  }

  private String whyUnreachable() {
    List<Integer> first = photons(0);
    List<Integer> second = photons(1);
    int tM = setup.start().doubledM();
    int tI = species.doubledNuclearSpin();
    int tMj = setup.target().doubledM();
    String given =
        "no light path from "
            + setup.start()
            + " to "
            + setup.target()
            + " through "
            + named
            + ": the first beam changes m by "
            + signed(first)
            + ", the second by "
            + signed(second);
    boolean nuclear =
        first.stream()
            .anyMatch(q -> second.stream().anyMatch(p -> Math.abs(tM + 2 * (q + p) - tMj) <= tI));
    if (!nuclear) {
      return given
          + ", and the nuclear spin cannot make up the rest (projection sum rule: mF + changes = mJ"
          + " + mI with |mI| at most "
          + HalfInteger.ofHalves(tI)
          + ")";
    }
    return given
        + ", and no sublevel of "
        + named
        + " links these two (projection rule: |m| may not exceed J on any rung)";
  }

  private List<Integer> photons(int step) {
    return List.of(-1, 0, 1).stream().filter(q -> light[step].power(q) > NEGLIGIBLE).toList();
  }

  private static String signed(List<Integer> changes) {
    return changes.stream().map(q -> q > 0 ? "+" + q : "" + q).collect(Collectors.joining(" or "));
  }
}
