package org.toprung.core.drive;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.toprung.angular.Polarization.PI;
import static org.toprung.angular.Polarization.SIGMA_MINUS;
import static org.toprung.angular.Polarization.SIGMA_PLUS;
import static org.toprung.core.quantity.Frequency.gigahertz;
import static org.toprung.core.quantity.Frequency.megahertz;
import static org.toprung.core.quantity.Length.micrometres;
import static org.toprung.core.quantity.Length.nanometres;
import static org.toprung.core.quantity.MagneticField.gauss;
import static org.toprung.core.quantity.Power.milliwatts;

import java.util.List;
import net.jqwik.api.Assume;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.constraints.DoubleRange;
import net.jqwik.api.constraints.IntRange;
import org.apache.commons.math4.legacy.linear.Array2DRowRealMatrix;
import org.apache.commons.math4.legacy.linear.EigenDecomposition;
import org.junit.jupiter.api.Test;
import org.toprung.angular.Polarization;
import org.toprung.angular.Wigner;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.atom.Sublevel;
import org.toprung.core.quantity.Frequency;
import org.toprung.core.quantity.PhysicalConstants;
import org.toprung.core.structure.DipoleElements;
import org.toprung.core.structure.Lifetimes;
import org.toprung.core.structure.QuadrupoleElements;

/** One, two and three photons, resonant ladders, idle sublevels, scattering and trap light. */
class SchemesTest {
  private static Beam beam(double milliwatts, double micrometres, Polarization polarization) {
    return Beam.gaussian(milliwatts(milliwatts), micrometres(micrometres))
        .polarized(polarization)
        .along(polarization == PI ? 1 : 0, 0, polarization == PI ? 0 : 1);
  }

  private static DriveSetup ultraviolet(Species species, int f, String target, double mJ) {
    return Drive.of(species)
        .from(Sublevel.hyperfine(species.groundLevel(), f, f))
        .step(Sublevel.fine(target, mJ), beam(50, 15, SIGMA_PLUS))
        .in(gauss(5));
  }

  /** By 420 and 1013 nm through 6P3/2, between stretched sublevels. */
  private static DriveSetup blue() {
    return Drive.of(Species.RUBIDIUM_87)
        .from(Sublevel.hyperfine("5S1/2", 2, 2))
        .step(Level.parse("6P3/2"), beam(2, 20, SIGMA_PLUS))
        .step(Sublevel.fine("68S1/2", 0.5), beam(150, 25, SIGMA_MINUS))
        .detuned(gigahertz(1.2))
        .in(gauss(4));
  }

  private static DriveSetup infrared(double first, double second) {
    return Drive.of(Species.RUBIDIUM_87)
        .from(Sublevel.hyperfine("5S1/2", 2, 2))
        .step(Level.parse("5P3/2"), beam(0.005, 100, SIGMA_PLUS))
        .step(Level.parse("6S1/2"), beam(5, 100, SIGMA_MINUS))
        .step(Sublevel.fine("60P3/2", 1.5), beam(500, 50, SIGMA_PLUS))
        .detuned(gigahertz(first), gigahertz(second))
        .in(gauss(5));
  }

  /** Common practice: one-photon wavelengths of Rb and Cs lie near 300 to 320 nm. */
  @Test
  void drivesUltravioletStepsAtTheWavelengthsOfTheTrade() {
    Drive rubidium = ultraviolet(Species.RUBIDIUM_87, 2, "60P3/2", 1.5).resolve();
    assertEquals(297.1e-9, rubidium.steps().get(0).wavelength().metres(), 0.2e-9);
    Drive caesium = ultraviolet(Species.CAESIUM_133, 4, "60P3/2", 1.5).resolve();
    assertEquals(318.8e-9, caesium.steps().get(0).wavelength().metres(), 0.2e-9);
    assertEquals(0, caesium.meanScatteringPerSecond(), 0);
    assertEquals(1, caesium.steps().size());
    assertEquals(
        2 * Math.PI / caesium.steps().get(0).wavelength().metres(),
        caesium.waveVectorPerMetre()[2],
        1);
  }

  /**
   * Exact angular factors: from a stretched ground state the stretched P3/2 takes |⟨‖r‖⟩|²/4
   * (design: the cycling amplitude squared is ¼ of the reduced element squared).
   */
  @Test
  void drivesAOnePhotonLadderWithTheCyclingAmplitude() {
    Drive drive = ultraviolet(Species.CAESIUM_133, 4, "50P3/2", 1.5).resolve();
    double element =
        DipoleElements.of(Species.CAESIUM_133)
            .reduced(Level.parse("50P3/2"), Level.parse("6S1/2"))
            .valueA0();
    double field = drive.steps().get(0).beam().peakFieldVoltsPerMetre();
    double expected =
        field * PhysicalConstants.ATOMIC_DIPOLE / PhysicalConstants.PLANCK * Math.abs(element) / 2;
    assertEquals(expected, drive.rabi().hertz(), 1e-9 * expected);
    assertEquals(expected, drive.steps().get(0).rabi().hertz(), 1e-9 * expected);
  }

  /** Core-corrected elements: the Cs P½ line nearly vanishes against P3/2 (Raimond et al. 1978). */
  @Test
  void findsTheCaesiumOneHalfLineWeak() {
    Drive strong = ultraviolet(Species.CAESIUM_133, 4, "50P3/2", 1.5).resolve();
    Drive weak =
        Drive.of(Species.CAESIUM_133)
            .from(Sublevel.hyperfine("6S1/2", 4, 3))
            .step(Sublevel.fine("50P1/2", 0.5), beam(50, 15, SIGMA_PLUS))
            .in(gauss(5))
            .resolve();
    assertTrue(strong.rabi().hertz() > 10 * weak.rabi().hertz());
    // both fine-structure targets are in the ladder, the unwanted one off resonance
    assertTrue(
        weak.otherTargets().stream().anyMatch(t -> t.sublevel().startsWith("50P3/2")),
        weak.otherTargets().toString());
  }

  /** Closed form far from resonance: Ω1Ω2Ω3/(4Δ1Δ2) for a single path. */
  @Test
  void reducesToTheProductOfThreeStepsFarFromResonance() {
    Drive drive = infrared(3, 20).resolve();
    assertEquals(4, drive.ladder().size());
    List<Ladder.State> states = drive.ladder().states();
    double product = 1;
    for (Drive.Step step : drive.steps()) {
      product *= step.rabi().hertz();
    }
    double expected = product / (4 * states.get(1).energyHertz() * states.get(2).energyHertz());
    assertEquals(Math.abs(expected), drive.rabi().hertz(), 0.01 * drive.rabi().hertz());
    assertEquals(3, drive.steps().size());
    assertEquals(List.of(Level.parse("5P3/2"), Level.parse("6S1/2")), drive.intermediates());
  }

  /** Closed form: a resonant, strong middle step gives Ω1Ω3/Ω2. */
  @Test
  void givesTheDressedRateWhenTheMiddleStepIsResonantAndStrong() {
    DriveSetup near = infrared(0, 0);
    List<Ladder.State> states = near.resolve().ladder().states();
    Drive drive =
        near.detuned(
                Frequency.ofHertz(states.get(1).energyHertz()),
                Frequency.ofHertz(states.get(2).energyHertz() - states.get(1).energyHertz()))
            .resolve();
    assertEquals(0, drive.ladder().states().get(1).energyHertz(), 1);
    assertEquals(0, drive.ladder().states().get(2).energyHertz(), 1);
    double one = drive.steps().get(0).rabi().hertz();
    double two = drive.steps().get(1).rabi().hertz();
    double three = drive.steps().get(2).rabi().hertz();
    assertEquals(one * three / two, drive.rabi().hertz(), 2e-3 * drive.rabi().hertz());
  }

  /**
   * Exact: eigenvalues of the whole three-photon Hamiltonian (Commons Math) against the effective
   * rate, also where the middle step is strong: 1 % while the light mixes at most 0.05 (Ωi/Δ = 0.1)
   * of an intermediate sublevel into start or target.
   */
  @Property(tries = 25, seed = "31")
  void agreesWithFullDiagonalizationForThreePhotons(
      @ForAll @DoubleRange(min = 1, max = 6) double first,
      @ForAll @DoubleRange(min = -4, max = 4) double second) {
    Drive drive = infrared(first, second).resolve();
    // nearer to a dressed intermediate state is the warning's case
    Assume.that(drive.admixture() <= 0.05);
    PulsePlan plan = drive.plan(Math.PI);
    double exact = splitting(drive.ladder(), plan.frequencyOffset().hertz());
    assertEquals(exact, plan.rabi().hertz(), 1e-5 * exact);
    assertEquals(exact, drive.rabi().hertz(), 0.01 * exact);
  }

  /**
   * Exact: eigenvalues of the whole two-photon Hamiltonian with all its hyperfine sublevels, from
   * any start and through either level of the doublet: 1 % for Ωi/Δ ≤ 0.1, with the other target
   * sublevels moved away by the field, since light that mixes those is what no elimination of P
   * levels can know.
   */
  @Property(tries = 40, seed = "41")
  void agreesWithFullDiagonalizationForTwoPhotons(
      @ForAll @IntRange(min = -2, max = 2) int m,
      @ForAll boolean up,
      @ForAll boolean upperLevel,
      @ForAll @DoubleRange(min = 1, max = 6) double gigahertz) {
    Drive drive;
    try {
      drive =
          Drive.of(Species.RUBIDIUM_87)
              .from(Sublevel.hyperfine("5S1/2", 2, m))
              .step(Level.parse(upperLevel ? "6P3/2" : "6P1/2"), beam(3, 25, SIGMA_PLUS))
              .step(Sublevel.fine("60S1/2", 0.5), beam(100, 25, up ? SIGMA_PLUS : SIGMA_MINUS))
              .detuned(gigahertz(gigahertz))
              .in(gauss(150))
              .resolve();
    } catch (IllegalArgumentException unreachable) {
      assertTrue(unreachable.getMessage().contains("rule"), unreachable.getMessage());
      return;
    }
    Assume.that(drive.admixture() <= 0.05);
    PulsePlan plan = drive.plan(Math.PI);
    double exact = splitting(drive.ladder(), plan.frequencyOffset().hertz());
    assertEquals(exact, drive.rabi().hertz(), 0.01 * exact);
  }

  private static double splitting(Ladder ladder, double offset) {
    int n = ladder.size();
    double[] re = new double[n * n];
    double[] im = new double[n * n];
    int last = ladder.steps() - 1;
    ladder.hamiltonianHertz(
        LadderSetting.nominal(ladder.steps()).withLaserOffset(last, offset), re, im);
    Array2DRowRealMatrix h = new Array2DRowRealMatrix(n, n);
    for (int i = 0; i < n; i++) {
      for (int j = 0; j < n; j++) {
        assertEquals(0, im[i * n + j], 0, "circular light about the axis has real amplitudes");
        h.setEntry(i, j, re[i * n + j]);
      }
    }
    EigenDecomposition eigen = new EigenDecomposition(h);
    double[] weight = new double[n];
    int best = 0;
    for (int k = 0; k < n; k++) {
      double s = eigen.getV().getEntry(ladder.start(), k);
      double t = eigen.getV().getEntry(ladder.wanted()[0], k);
      weight[k] = s * s + t * t;
      best = weight[k] > weight[best] ? k : best;
    }
    int second = best == 0 ? 1 : 0;
    for (int k = 0; k < n; k++) {
      if (k != best && weight[k] > weight[second]) {
        second = k;
      }
    }
    return Math.abs(eigen.getRealEigenvalue(best) - eigen.getRealEigenvalue(second));
  }

  /**
   * Published two-photon arithmetic: 60 and 36 MHz at 560 MHz give 1.9 MHz, 237 and 303 MHz at 7.8
   * GHz give 4.6 MHz.
   */
  @Test
  void doesPublishedTwoPhotonArithmetic() {
    assertEquals(1.9, singlePath(60, 36, 560), 0.05);
    assertEquals(4.6, singlePath(237, 303, 7800), 0.05);
  }

  private static double singlePath(double one, double two, double detuning) {
    Ladder ladder =
        new Ladder(
            2,
            List.of(
                new Ladder.State("start", Level.parse("5S1/2"), 0, 0, 0, 0),
                new Ladder.State("middle", Level.parse("5P3/2"), 1, -detuning * 1e6, 4e7, 0),
                new Ladder.State("target", Level.parse("60S1/2"), 2, 0, 0, 0)),
            List.of(
                new Ladder.Coupling(0, 1, one * 1e6, 0), new Ladder.Coupling(1, 2, two * 1e6, 0)),
            new double[3][2],
            0,
            new int[] {2});
    return Elimination.of(ladder).rabiHertz() * 1e-6;
  }

  /** Autler and Townes (1955): a step detuned by δ splits its level by √(Ω2² + δ²). */
  @Property(tries = 20, seed = "37")
  void splitsTheIntermediateLineByTheGeneralizedRabiFrequency(
      @ForAll @DoubleRange(min = -60, max = 60) double delta) {
    DriveSetup setup =
        Drive.of(Species.RUBIDIUM_87)
            .from(Sublevel.hyperfine("5S1/2", 2, 2))
            .step(Level.parse("5P3/2"), beam(0.0001, 200, SIGMA_PLUS))
            .step(Sublevel.fine("60S1/2", 0.5), beam(200, 50, SIGMA_MINUS))
            .in(gauss(3));
    double middle = setup.detuned(megahertz(0)).resolve().ladder().states().get(1).energyHertz();
    // the second laser is off its own step by minus the first one's detuning
    Drive drive = setup.detuned(Frequency.ofHertz(middle + delta * 1e6)).resolve();
    List<Drive.Line> lines = drive.dressedLines();
    assertEquals(2, lines.size());
    double splitting = lines.get(1).position().hertz() - lines.get(0).position().hertz();
    // levels outside the ladder move the target, and with it the detuning of the second step
    int target = drive.ladder().wanted()[0];
    double far = drive.ladder().farShiftHertz(target, 0) + drive.ladder().farShiftHertz(target, 1);
    double expected = Math.hypot(drive.steps().get(1).rabi().hertz(), delta * 1e6 + far);
    assertEquals(expected, splitting, 1e-9 * expected);
    double strength = Math.hypot(lines.get(0).rabi().hertz(), lines.get(1).rabi().hertz());
    assertEquals(drive.steps().get(0).rabi().hertz(), strength, 1e-6 * strength);
    assertEquals(1, lines.get(0).rydbergFraction() + lines.get(1).rydbergFraction(), 1e-6);
  }

  /** A stretched state reaches one Rydberg sublevel, mF = 0 reaches more than one. */
  @Test
  void reachesMoreSublevelsFromAClockState() {
    Drive clock =
        Drive.of(Species.RUBIDIUM_87)
            .from(Sublevel.hyperfine("5S1/2", 2, 0))
            .step(Level.parse("5P3/2"), beam(0.2, 30, SIGMA_PLUS))
            .step(Sublevel.fine("60D5/2", 1.5), beam(100, 30, SIGMA_PLUS))
            .detuned(gigahertz(5))
            .in(gauss(4))
            .resolve();
    assertTrue(clock.otherTargets().size() > 1, clock.otherTargets().toString());
    // common practice: g = 6/5 splits neighbouring mJ of D5/2 by 6.7 MHz in 4 G
    double spacing =
        clock.otherTargets().stream()
            .filter(t -> t.sublevel().startsWith("60D5/2 mJ=5/2"))
            .mapToDouble(t -> Math.abs(t.detuning().hertz()))
            .min()
            .orElseThrow();
    assertEquals(6.7e6, spacing, 0.1e6);
  }

  /** An intermediate P½ leaves D5/2 unreachable by the triangle rule, and the message says so. */
  @Test
  void cannotReachD52ThroughP12() {
    DriveSetup setup =
        Drive.of(Species.RUBIDIUM_87)
            .from(Sublevel.hyperfine("5S1/2", 2, 0))
            .step(Level.parse("5P1/2"), beam(0.2, 30, SIGMA_PLUS))
            .detuned(gigahertz(5))
            .in(gauss(4));
    DriveSetup wide = setup.step(Sublevel.fine("60D5/2", 1.5), beam(100, 30, SIGMA_PLUS));
    assertTrue(
        assertThrows(IllegalArgumentException.class, wide::resolve)
            .getMessage()
            .contains("triangle"));
    Drive narrow = setup.step(Sublevel.fine("60D3/2", 1.5), beam(100, 30, SIGMA_PLUS)).resolve();
    assertTrue(
        narrow.otherTargets().stream().noneMatch(t -> t.sublevel().startsWith("60D5/2")),
        narrow.otherTargets().toString());
  }

  @Test
  void shiftsTheStartAsAGroundSublevelLikeAnyOther() {
    Drive drive = blue().resolve();
    GroundLight start = drive.groundLight(drive.start());
    double shift = drive.startLightShift().hertz();
    assertEquals(shift, start.shift().hertz(), 1e-6 * shift);
    assertEquals(
        drive.startScattering().totalPerSecond(),
        start.scatteringPerSecond(),
        1e-6 * start.scatteringPerSecond());
    assertEquals(
        2 * drive.meanScatteringPerSecond(),
        drive.startScattering().totalPerSecond() + drive.targetScattering().totalPerSecond(),
        1e-9 * drive.meanScatteringPerSecond());
    // the idle clock state is 6.8 GHz farther away: Δ 1.1 → 8 GHz, and its coupling is not
    // stretched
    GroundLight idle = drive.groundLight(Sublevel.hyperfine("5S1/2", 1, 0));
    assertTrue(idle.scatteringPerSecond() < start.scatteringPerSecond() / 30);
    assertThrows(
        IllegalArgumentException.class, () -> drive.groundLight(Sublevel.hyperfine("6P3/2", 3, 0)));
  }

  /** A stretched cycling transition scatters back to where it came from, and nowhere else. */
  @Test
  void scattersBackToTheStartOnACyclingTransition() {
    Drive drive = twoPhoton("5P3/2", 2, 2, SIGMA_PLUS, SIGMA_MINUS, 0.5, gigahertz(2));
    Scattering scattering = drive.startScattering();
    assertEquals(0, scattering.toOtherGround().size(), scattering.toOtherGround().toString());
    // 5P3/2 decays to the ground level alone; lifetime and element are both measured
    assertEquals(
        scattering.totalPerSecond(),
        scattering.toStartPerSecond(),
        0.005 * scattering.totalPerSecond());
    assertEquals(
        scattering.totalPerSecond(),
        scattering.perSecond(Level.parse("5P3/2")).orElseThrow(),
        1e-12 * scattering.totalPerSecond());
  }

  /** 6P3/2 decays to 5S by a share that is measured element against measured lifetime. */
  @Test
  void sendsThePopulationOfAHigherLevelThroughOthers() {
    Drive drive = twoPhoton("6P3/2", 2, 2, SIGMA_PLUS, SIGMA_MINUS, 0.5, gigahertz(1.2));
    Scattering scattering = drive.startScattering();
    double omega =
        2 * Math.PI * PhysicalConstants.SPEED_OF_LIGHT / drive.steps().get(0).wavelength().metres();
    double c = PhysicalConstants.SPEED_OF_LIGHT;
    double element = 0.523 * PhysicalConstants.ATOMIC_DIPOLE;
    // A = ω³|⟨‖d‖⟩|²/(3πε0ħc³(2J+1)), design section 3
    double direct =
        omega
            * omega
            * omega
            * element
            * element
            / (3
                * Math.PI
                * PhysicalConstants.VACUUM_PERMITTIVITY
                * PhysicalConstants.REDUCED_PLANCK
                * c
                * c
                * c
                * 4);
    double all =
        Lifetimes.of(Species.RUBIDIUM_87).spontaneousRatePerSecond(Level.parse("6P3/2")).value();
    assertEquals(
        1 - direct / all,
        scattering.throughOtherLevelsPerSecond() / scattering.totalPerSecond(),
        1e-3);
  }

  /**
   * Cline et al. (1994): far from the doublet, scattering that changes the sublevel is suppressed,
   * because the paths through both fine-structure levels cancel.
   */
  @Test
  void suppressesRamanScatteringFarFromTheDoublet() {
    Drive near = twoPhoton("5P3/2", 1, 0, PI, PI, 0.5, gigahertz(-30));
    Drive far = twoPhoton("5P3/2", 1, 0, PI, PI, 0.5, gigahertz(-60_000));
    assertTrue(leakShare(near) > 0.2, "share " + leakShare(near));
    assertTrue(leakShare(far) < 0.25 * leakShare(near), "share " + leakShare(far));
    assertTrue(far.startScattering().perSecond(Level.parse("5P1/2")).isPresent());
  }

  private static double leakShare(Drive drive) {
    Scattering s = drive.startScattering();
    double others = s.toOtherGround().stream().mapToDouble(b -> b.ratePerSecond()).sum();
    return others / (others + s.toStartPerSecond());
  }

  private static Drive twoPhoton(
      String through,
      int f,
      int m,
      Polarization one,
      Polarization two,
      double mJ,
      Frequency detuning) {
    return Drive.of(Species.RUBIDIUM_87)
        .from(Sublevel.hyperfine("5S1/2", f, m))
        .step(Level.parse(through), beam(0.2, 30, one))
        .step(Sublevel.fine("60S1/2", mJ), beam(100, 30, two))
        .detuned(detuning)
        .in(gauss(3))
        .resolve();
  }

  /**
   * Closed forms: the trap moves the start by −αE0²/4 (687 a.u. at 1064 nm, published) and the
   * Rydberg level by the ponderomotive e²E0²/4mω²; the plan follows the difference.
   */
  @Test
  void followsTheShiftsOfATrapThatStaysOn() {
    DriveSetup setup = blue();
    Drive off = setup.resolve();
    Beam trap = Beam.gaussian(milliwatts(5), micrometres(1)).polarized(PI).along(1, 0, 0);
    Drive on = setup.trappedBy(trap, nanometres(1064)).resolve();
    Drive.TrapLight light = on.trap().orElseThrow();
    double square = Math.pow(trap.peakFieldVoltsPerMetre(), 2);
    double ground = -0.25 * 687 * PhysicalConstants.ATOMIC_POLARIZABILITY_HERTZ * square;
    assertEquals(ground, light.startShift().hertz(), 0.01 * Math.abs(ground));
    double omega = 2 * Math.PI * PhysicalConstants.SPEED_OF_LIGHT / 1064e-9;
    double free =
        PhysicalConstants.ELEMENTARY_CHARGE
            * PhysicalConstants.ELEMENTARY_CHARGE
            * square
            / (4 * PhysicalConstants.ELECTRON_MASS * omega * omega)
            / PhysicalConstants.PLANCK;
    assertEquals(free, light.targetShift().hertz(), 0.05 * free);
    double moved = light.targetShift().hertz() - light.startShift().hertz();
    assertTrue(moved > 1e6, "shift " + moved);
    double offset =
        on.plan(Math.PI).frequencyOffset().hertz() - off.plan(Math.PI).frequencyOffset().hertz();
    // the first laser's detuning changed too, so the light shifts did, by a few per cent of
    // themselves
    assertEquals(moved, offset, 0.05 * moved);
    assertTrue(off.trap().isEmpty());
    assertTrue(on.warnings().isEmpty(), on.warnings().toString());
    assertThrows(IllegalArgumentException.class, () -> setup.trappedBy(trap, nanometres(-1)));
  }

  /** The D2 line lies at 780.241 nm in vacuum. */
  @Test
  void warnsOfATrapNearAResonance() {
    Beam trap = Beam.gaussian(milliwatts(5), micrometres(1)).polarized(PI).along(1, 0, 0);
    List<String> warnings =
        Drive.of(Species.RUBIDIUM_87)
            .from(Sublevel.hyperfine("5S1/2", 2, 2))
            .step(Level.parse("6P3/2"), beam(2, 20, SIGMA_PLUS))
            .step(Sublevel.fine("68S1/2", 0.5), beam(150, 25, SIGMA_MINUS))
            .detuned(gigahertz(1.2))
            .in(gauss(4))
            .trappedBy(trap, nanometres(780.3))
            .resolve()
            .warnings();
    assertTrue(warnings.stream().anyMatch(w -> w.contains("trap light") && w.contains("5S1/2")));
  }

  @Test
  void refusesADriveOfTooManyOrMisplacedSteps() {
    DriveSetup three = infrared(1, 1);
    DriveSetup four = three.step(Sublevel.fine("60S1/2", 0.5), beam(1, 10, SIGMA_PLUS));
    assertThrows(IllegalStateException.class, four::resolve);
    assertThrows(IllegalStateException.class, () -> three.detuned(gigahertz(1)).resolve());
    String message =
        assertThrows(
                IllegalStateException.class,
                () ->
                    ultraviolet(Species.RUBIDIUM_87, 2, "60P3/2", 1.5)
                        .detuned(gigahertz(1))
                        .resolve())
            .getMessage();
    assertTrue(message.contains("0 values"), message);
  }

  private static DriveSetup quadrupole(Species species, double mJ, Beam beam) {
    int tI = species.doubledNuclearSpin();
    return Drive.of(species)
        .from(Sublevel.hyperfine(species.groundLevel(), 0.5 * (tI + 1), 0.5 * (tI + 1)))
        .quadrupoleStep(Sublevel.fine("60D5/2", mJ), beam)
        .in(gauss(5));
  }

  /**
   * Exact: light along z with ε = e₊ has (r·k̂)(r·ε) = z r₊ = r²C²₁/√3, so that it drives Δm = +1
   * with (k/2)⟨‖r²C²‖⟩ (5/2 2 1/2; −3/2 1 1/2)/√3, and nothing else.
   */
  @Test
  void drivesAQuadrupoleWithTheGradientOfTheLight() {
    Species species = Species.RUBIDIUM_87;
    Drive drive = quadrupole(species, 1.5, beam(100, 20, SIGMA_PLUS)).resolve();
    double element =
        QuadrupoleElements.of(species)
            .reduced(Level.parse("60D5/2"), Level.parse("5S1/2"))
            .modulus();
    double k = 2 * Math.PI / drive.steps().get(0).wavelength().metres();
    double expected =
        drive.steps().get(0).beam().peakFieldVoltsPerMetre()
            * PhysicalConstants.ATOMIC_DIPOLE
            / PhysicalConstants.PLANCK
            * 0.5
            * k
            * PhysicalConstants.BOHR_RADIUS
            * element
            * Math.abs(Wigner.threeJDoubled(5, 4, 1, -3, 2, 1))
            / Math.sqrt(3);
    assertEquals(expected, drive.rabi().hertz(), 1e-9 * expected);
    assertTrue(
        drive.otherTargets().stream().allMatch(t -> t.sublevel().startsWith("60D3/2")),
        drive.otherTargets().toString());
    assertEquals("e a0^2", drive.steps().get(0).element().unit());
  }

  /** Light across the field, polarized across both, drives Δm = ±1 by C²±1 and no Δm = 0. */
  @Test
  void choosesQuadrupoleSublevelsByGeometry() {
    Beam along =
        Beam.gaussian(milliwatts(100), micrometres(20))
            .polarized(Polarization.linearDegrees(0))
            .along(1, 0, 0);
    // k = x, ε = z: xz is a mixture of C²±1
    quadrupole(Species.CAESIUM_133, 1.5, along).resolve();
    assertThrows(
        IllegalArgumentException.class,
        () -> quadrupole(Species.CAESIUM_133, 2.5, along).resolve());
    // k = x, ε = y: xy is a mixture of C²±2
    Beam across = along.polarized(Polarization.linearDegrees(90));
    quadrupole(Species.CAESIUM_133, 2.5, across).resolve();
    String message =
        assertThrows(
                IllegalArgumentException.class,
                () -> quadrupole(Species.CAESIUM_133, 1.5, across).resolve())
            .getMessage();
    assertTrue(message.contains("-2 or +2"), message);
  }

  @Test
  void refusesAQuadrupoleThatIsNoneOrNotAlone() {
    Beam beam = beam(1, 10, SIGMA_PLUS);
    DriveSetup start =
        Drive.of(Species.RUBIDIUM_87).from(Sublevel.hyperfine("5S1/2", 2, 2)).in(gauss(1));
    assertThrows(
        IllegalArgumentException.class,
        () -> start.quadrupoleStep(Sublevel.fine("60P3/2", 0.5), beam).resolve());
    assertThrows(
        IllegalStateException.class,
        () ->
            start
                .step(Level.parse("5P3/2"), beam)
                .quadrupoleStep(Sublevel.fine("60D5/2", 0.5), beam));
  }

  /**
   * Sum rule: squared couplings to all sublevels of both fine-structure levels, added over the
   * three polarizations, do not depend on the mF of the start (completeness and Wigner-Eckart).
   */
  @Property(tries = 7, seed = "43")
  void couplesEveryStartEquallyInUnpolarizedLight(@ForAll @IntRange(min = -3, max = 3) int m) {
    double reference = unpolarized(4, 0);
    assertEquals(reference, unpolarized(4, m), 1e-6 * reference);
    assertEquals(reference, unpolarized(3, m), 1e-6 * reference);
  }

  private static double unpolarized(int f, int m) {
    double sum = 0;
    for (Polarization polarization : List.of(SIGMA_MINUS, PI, SIGMA_PLUS)) {
      int q = polarization == PI ? 0 : polarization == SIGMA_PLUS ? 1 : -1;
      Drive drive =
          Drive.of(Species.CAESIUM_133)
              .from(Sublevel.hyperfine("6S1/2", f, m))
              .step(Sublevel.fine("40P3/2", q >= 0 ? 0.5 : -0.5), beam(50, 15, polarization))
              .in(gauss(1))
              .resolve();
      double wanted = drive.rabi().hertz();
      sum += wanted * wanted;
      for (Drive.OtherTarget other : drive.otherTargets()) {
        sum += other.rabi().hertz() * other.rabi().hertz();
      }
    }
    return sum;
  }

  @Test
  void doublesEveryOnePhotonRabiFrequencyAtFourTimesThePower() {
    Drive once = infrared(2, 3).resolve();
    Drive four =
        Drive.of(Species.RUBIDIUM_87)
            .from(Sublevel.hyperfine("5S1/2", 2, 2))
            .step(Level.parse("5P3/2"), beam(0.02, 100, SIGMA_PLUS))
            .step(Level.parse("6S1/2"), beam(20, 100, SIGMA_MINUS))
            .step(Sublevel.fine("60P3/2", 1.5), beam(2000, 50, SIGMA_PLUS))
            .detuned(gigahertz(2), gigahertz(3))
            .in(gauss(5))
            .resolve();
    for (int k = 0; k < 3; k++) {
      double rabi = once.steps().get(k).rabi().hertz();
      assertEquals(2 * rabi, four.steps().get(k).rabi().hertz(), 1e-9 * rabi);
    }
  }

  /** Steps in the wrong order do not climb, or break a rule, and are caught. */
  @Test
  void catchesStepsInTheWrongOrder() {
    DriveSetup start =
        Drive.of(Species.RUBIDIUM_87)
            .from(Sublevel.hyperfine("5S1/2", 2, 2))
            .detuned(gigahertz(1))
            .in(gauss(1));
    Beam up = beam(1, 10, SIGMA_PLUS);
    Beam down = beam(1, 10, SIGMA_MINUS);
    String climbs =
        assertThrows(
                IllegalArgumentException.class,
                () ->
                    start
                        .step(Level.parse("60P3/2"), up)
                        .step(Sublevel.fine("6S1/2", 0.5), down)
                        .resolve())
            .getMessage();
    assertTrue(climbs.contains("does not climb"), climbs);
    assertThrows(
        IllegalArgumentException.class,
        () ->
            start
                .step(Level.parse("60S1/2"), down)
                .step(Sublevel.fine("6P3/2", 1.5), up)
                .resolve());
  }
}
