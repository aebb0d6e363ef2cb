package org.toprung.budget;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.toprung.core.quantity.Frequency.hertz;
import static org.toprung.core.quantity.Frequency.kilohertz;
import static org.toprung.core.quantity.Frequency.megahertz;
import static org.toprung.core.quantity.MagneticField.milligauss;
import static org.toprung.core.quantity.Temperature.kelvin;
import static org.toprung.core.quantity.Temperature.microkelvin;

import java.util.Locale;
import java.util.concurrent.ForkJoinPool;
import java.util.concurrent.atomic.AtomicInteger;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.constraints.DoubleRange;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.function.Executable;
import org.toprung.angular.Polarization;
import org.toprung.budget.bench.Bench;
import org.toprung.budget.pulse.Pulse;
import org.toprung.budget.response.ClosedForms;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.atom.Sublevel;
import org.toprung.core.drive.Beam;
import org.toprung.core.drive.Drive;
import org.toprung.core.drive.DriveSetup;
import org.toprung.core.quantity.ElectricField;
import org.toprung.core.quantity.Frequency;
import org.toprung.core.quantity.Intensity;
import org.toprung.core.quantity.Length;
import org.toprung.core.quantity.MagneticField;
import org.toprung.core.quantity.PhysicalConstants;
import org.toprung.core.quantity.Power;
import org.toprung.core.quantity.Temperature;
import org.toprung.core.quantity.Time;
import org.toprung.core.structure.Lifetimes;

class BudgetTest {
  private static final Drive RUBIDIUM = TestDrives.rubidium().resolve();
  private static final Drive CAESIUM = TestDrives.caesium().resolve();

  private static Budget budget(Drive drive, Bench bench) {
    return Budget.of(drive, Pulse.pi()).on(bench).compose();
  }

  private static double error(Budget budget, String cause) {
    return entry(budget, cause).error();
  }

  private static CauseEntry entry(Budget budget, String cause) {
    return budget.causes().stream()
        .filter(c -> c.cause().equals(cause))
        .findFirst()
        .orElseThrow(() -> new AssertionError("no cause " + cause + " in " + budget.causes()));
  }

  /** Closed form: 1 − P = δ²/Ω² for a static detuning of a π pulse. */
  @Test
  void countsASmallDetuningQuadratically() {
    Budget drift = budget(RUBIDIUM, Bench.unknown().withDrifts(kilohertz(20), hertz(0)));
    double ratio = 20e3 / drift.plan().rabi().hertz();
    assertEquals(ratio * ratio, error(drift, "Laser drift, step 1"), 1e-3 * ratio * ratio);
    assertEquals(0, error(drift, "Laser drift, step 2"), 1e-12);
  }

  /** Closed form: Gaussian Doppler spread k√(kT/m) of a free atom. */
  @Test
  void countsTheDopplerShiftOfTheSummedWaveVector() {
    Budget budget = budget(RUBIDIUM, Bench.unknown().withTemperature(microkelvin(20)));
    double k = RUBIDIUM.waveVectorPerMetre()[2];
    double velocity =
        Math.sqrt(PhysicalConstants.BOLTZMANN * 20e-6 / RUBIDIUM.species().massKilograms());
    double spread = k * velocity / (2 * Math.PI);
    double ratio = spread / budget.plan().rabi().hertz();
    assertEquals(ratio * ratio, error(budget, "Doppler shift"), 2e-3 * ratio * ratio);
  }

  /** Closed form: π²Δν/(4Ω), Ω in rad/s, for white noise of Lorentzian width Δν. */
  @Test
  void countsANarrowLaserLineByTheLorentzianFormula() {
    Budget budget = budget(RUBIDIUM, Bench.unknown().withLinewidths(hertz(300), hertz(0)));
    double expected = Math.PI * Math.PI * 300 / (4 * budget.plan().rabi().radiansPerSecond());
    assertEquals(expected, error(budget, "Laser linewidth, step 1"), 1e-3 * expected);
  }

  /**
   * Closed form: relative amplitude error ε gives (πε/2)², a detuning δ gives δ²/Ω², and both add;
   * intensity noise σ has ε = σ/2 and δ = σ times the differential light shift of that beam.
   */
  @Test
  void countsIntensityNoiseOnRabiFrequencyAndLightShiftTogether() {
    double sigma = 0.004;
    Budget budget = budget(RUBIDIUM, Bench.unknown().withIntensityNoise(sigma, 0));
    double shift = RUBIDIUM.targetLightShift(0).hertz() - RUBIDIUM.startLightShift(0).hertz();
    double detuning = sigma * shift / budget.plan().rabi().hertz();
    double amplitude = Math.PI * sigma / 4;
    double expected = detuning * detuning + amplitude * amplitude;
    assertEquals(expected, error(budget, "Intensity noise, step 1"), 0.01 * expected);
  }

  /** Closed form: q = Ω2/Ω1, (πγ/4|Δ|)(q+1/q) (Saffman and Walker 2005). */
  @Test
  void countsIntermediateScatteringByTheTextbookFormula() {
    double q = RUBIDIUM.steps().get(1).rabi().hertz() / RUBIDIUM.steps().get(0).rabi().hertz();
    double gamma = 1 / 118e-9 / (2 * Math.PI);
    double detuning =
        RUBIDIUM.steps().get(0).rabi().hertz()
            * RUBIDIUM.steps().get(1).rabi().hertz()
            / (2 * RUBIDIUM.rabi().hertz());
    double expected = Math.PI * gamma / (4 * detuning) * (q + 1 / q);
    Budget budget = budget(RUBIDIUM, Bench.unknown());
    // first order against 1 − exp(−x), and the plan's Rabi frequency beyond second order
    assertEquals(expected, budget.scatteringPerPulse(), 0.02 * expected);
  }

  /** Closed form: the cold limit keeps half a quantum, m σv² = hf/2. */
  @Test
  void keepsTheZeroPointMotionOfAColdAtom() {
    Frequency trap = kilohertz(100);
    Budget cold =
        budget(
            RUBIDIUM,
            Bench.unknown()
                .withTemperature(Temperature.ofKelvin(1e-9))
                .withTrapFrequencies(trap, trap, trap));
    double velocity =
        Math.sqrt(
            0.5 * PhysicalConstants.PLANCK * trap.hertz() / RUBIDIUM.species().massKilograms());
    double spread = RUBIDIUM.waveVectorPerMetre()[2] * velocity / (2 * Math.PI);
    double ratio = spread / cold.plan().rabi().hertz();
    assertEquals(ratio * ratio, error(cold, "Doppler shift"), 2e-3 * ratio * ratio);
  }

  @Test
  void agreesWithItsSimulationForBothSpecies() {
    for (Drive drive : new Drive[] {RUBIDIUM, CAESIUM}) {
      Budget budget = budget(drive, TestDrives.bench());
      Check check = budget.check(2000, 42);
      assertTrue(budget.total() > 1e-3 && budget.total() < 0.05, "total " + budget.total());
      assertTrue(
          check.agrees(),
          drive
              + ": "
              + budget.total()
              + " against "
              + check.total()
              + " ± "
              + check.standardError());
      // both bounds of the target at once: the sum itself lies within 10 %
      assertEquals(check.total(), budget.total(), 0.1 * check.total());
    }
  }

  @Test
  void agreesWithItsSimulationWhenSeveralSublevelsTakePart() {
    Budget budget = budget(TestDrives.impureRubidium().resolve(), TestDrives.bench());
    assertTrue(error(budget, "Other Rydberg sublevels") > 1e-7);
    Check check = budget.check(300, 5);
    assertTrue(
        check.agrees(),
        budget.total() + " against " + check.total() + " ± " + check.standardError());
  }

  /** Each strong disturbance alone against the simulation, which shares no formula with it. */
  @Test
  void agreesWithTheSimulationForEachDisturbanceAlone() {
    Bench none = Bench.unknown();
    double quiet = budget(RUBIDIUM, none).check(2, 1).total();
    Bench[] alone = {
      none.withTemperature(microkelvin(200)),
      none.withTemperature(microkelvin(20))
          .withTrapFrequencies(kilohertz(7), kilohertz(7), kilohertz(7)),
      none.withElectricField(ElectricField.ofVoltsPerMetre(6)),
      none.withDrifts(kilohertz(200), hertz(0)),
      none.withDrifts(hertz(0), kilohertz(200)),
      none.withIntensityNoise(0.05, 0),
      none.withIntensityNoise(0, 0.05),
      none.withLinewidths(kilohertz(20), hertz(0)),
      none.withLinewidths(hertz(0), kilohertz(20))
    };
    for (Bench bench : alone) {
      Budget budget = budget(RUBIDIUM, bench);
      Check check = budget.check(20_000, 11);
      double simulated = check.total() - quiet;
      double composed = budget.total() - budget(RUBIDIUM, none).total();
      assertTrue(composed > 3e-4, "too weak to test: " + composed);
      assertEquals(
          simulated,
          composed,
          4 * check.standardError() + 0.03 * simulated,
          budget.causes().get(0).cause());
    }
  }

  /** The electron flips against the field: 2.1 MHz/G from F = 1, mF = 1 to mJ = 1/2. */
  @Test
  void agreesWithTheSimulationForMagneticNoise() {
    Drive drive = TestDrives.rubidium().from(Sublevel.hyperfine("5S1/2", 1, 1)).resolve();
    assertEquals(2.1e10, drive.magneticSensitivityHertzPerTesla(), 0.02e10);
    Bench bench = Bench.unknown().withMagneticNoise(milligauss(100));
    Budget budget = budget(drive, bench);
    double spread = 0.1 * 2.1e6 / budget.plan().rabi().hertz();
    double composed = error(budget, "Magnetic field noise");
    assertEquals(spread * spread, composed, 0.05 * composed);
    double quiet = budget(drive, Bench.unknown()).check(2, 1).total();
    Check check = budget.check(3000, 12);
    assertEquals(check.total() - quiet, composed, 4 * check.standardError() + 0.03 * composed);
  }

  private static DriveSetup withLowerBeam(Beam lower) {
    return Drive.of(Species.RUBIDIUM_87)
        .from(Sublevel.hyperfine("5S1/2", 2, 2))
        .step(Level.parse("6P3/2"), lower.polarized(Polarization.SIGMA_PLUS).along(0, 0, 1))
        .step(
            Sublevel.fine("68S1/2", 0.5),
            Beam.flatTop(Intensity.wattsPerSquareMillimetre(153))
                .polarized(Polarization.SIGMA_MINUS)
                .along(0, 0, -1))
        .detuned(Frequency.gigahertz(1.2))
        .in(MagneticField.gauss(4));
  }

  private static Bench moving() {
    return Bench.unknown()
        .withTemperature(microkelvin(20))
        .withTrapFrequencies(kilohertz(20), kilohertz(20), kilohertz(20));
  }

  /**
   * Closed form: off the axis by d the field changes by −2dx/w² to first order in the displacement
   * x, which is a relative amplitude error ε of the pulse, (πε/2)², and twice that of the light
   * shift of the beam, δ²/Ω². The flat top of the other beam adds nothing.
   */
  @Test
  void countsTheSlopeOfABeamThatIsOffTheAtom() {
    Length none = Length.ofMetres(0);
    Beam lower = Beam.gaussian(Power.milliwatts(4), Length.micrometres(50));
    Drive drive = withLowerBeam(lower.focusedAt(Length.micrometres(25), none, none)).resolve();
    Budget budget = budget(drive, moving());
    double velocity =
        Math.sqrt(PhysicalConstants.BOLTZMANN * 20e-6 / drive.species().massKilograms());
    double slope = 2 * 25e-6 / 2500e-12;
    double amplitude = slope * velocity / (2 * Math.PI * 20e3);
    double shift = drive.targetLightShift(0).hertz() - drive.startLightShift(0).hertz();
    double detuning = 2 * amplitude * shift / budget.plan().rabi().hertz();
    double expected = Math.pow(Math.PI * amplitude / 2, 2) + detuning * detuning;
    assertEquals(expected, error(budget, "Position in the beams"), 0.01 * expected);
    Check check = budget.check(6000, 21);
    double quiet = budget(drive, Bench.unknown()).check(2, 1).total();
    double composed = budget.total() - budget(drive, Bench.unknown()).total();
    assertEquals(check.total() - quiet, composed, 4 * check.standardError() + 0.03 * composed);
  }

  /**
   * A spread far wider than the line, so that hardly a shot is on resonance. Closed form without
   * the oscillations of the line: 1 − P = 1 − ∫N(δ)P(δ)dδ, P(δ) = Ω²/(Ω²+δ²) sin²(½π√(1+δ²/Ω²)), by
   * a sum over a fine grid.
   */
  @Test
  void averagesOverSpreadsFarWiderThanTheLine() {
    for (double times : new double[] {0.5, 3, 30}) {
      double rabi = budget(RUBIDIUM, Bench.unknown()).plan().rabi().hertz();
      Bench bench = Bench.unknown().withDrifts(hertz(times * rabi), hertz(0));
      double expected = 0;
      double weights = 0;
      for (double x = -8; x <= 8; x += 1e-4) {
        double square = 1 + times * x * times * x;
        double sine = Math.sin(0.5 * Math.PI * Math.sqrt(square));
        weights += Math.exp(-0.5 * x * x);
        expected += Math.exp(-0.5 * x * x) * (1 - sine * sine / square);
      }
      Budget budget = budget(RUBIDIUM, bench);
      assertEquals(expected / weights, error(budget, "Laser drift, step 1"), 1e-3);
    }
  }

  @Test
  void saysWhichShotIsTooFarOff() {
    Budget budget = budget(RUBIDIUM, Bench.unknown().withDrifts(megahertz(1000), megahertz(1000)));
    String message =
        assertThrows(ArithmeticException.class, () -> budget.check(300, 2)).getMessage();
    assertTrue(message.startsWith("shot "), message);
    assertTrue(message.contains("of seed 2 cannot be simulated"), message);
  }

  /** Two levels no longer: what the pulse leaves is no superposition of start and target. */
  @Test
  void refusesASuperpositionWhereAnIntermediateLevelTakesPart() {
    Drive near = TestDrives.rubidium().detuned(megahertz(5)).resolve();
    refused(() -> Budget.of(near, Pulse.square(0.5 * Math.PI)).on(Bench.unknown()).compose());
    refused(
        () -> Budget.of(near, Pulse.ramsey(Time.ofSeconds(1e-6), 1)).on(Bench.unknown()).compose());
    double total = Budget.of(near, Pulse.pi()).on(Bench.unknown()).compose().total();
    assertTrue(total >= 0 && total <= 1, "" + total);
  }

  /** In flat tops the place of the atom does not matter. */
  @Test
  void countsNoPositionInFlatTops() {
    Drive drive = withLowerBeam(Beam.flatTop(Intensity.wattsPerSquareMillimetre(1))).resolve();
    assertEquals(0, error(budget(drive, moving()), "Position in the beams"), 1e-15);
  }

  /**
   * Closed form: in a static field E0 the stray field e shifts by −αE0e to first order, which
   * counts as δ²/Ω², and more than the stray field alone.
   */
  @Test
  void countsStrayFieldsOnTopOfTheStaticOne() {
    double stray = 0.3;
    ElectricField none = ElectricField.ofVoltsPerMetre(0);
    Drive drive =
        TestDrives.rubidium()
            .inElectricField(none, none, ElectricField.ofVoltsPerMetre(8))
            .resolve();
    Bench bench = Bench.unknown().withElectricField(ElectricField.ofVoltsPerMetre(stray));
    Budget budget = budget(drive, bench);
    double alphaE = -2 * drive.starkShift().hertz() / 8;
    double spread = alphaE * stray / Math.sqrt(3) / budget.plan().rabi().hertz();
    double composed = error(budget, "Electric field");
    assertEquals(spread * spread, composed, 0.02 * composed);
    assertTrue(composed > 30 * error(budget(RUBIDIUM, bench), "Electric field"));
    Check check = budget.check(6000, 22);
    double quiet = budget(drive, Bench.unknown()).check(2, 1).total();
    assertEquals(check.total() - quiet, composed, 4 * check.standardError() + 0.03 * composed);
  }

  @Test
  void addsItsCausesToTheTotal() {
    Budget budget = budget(CAESIUM, TestDrives.bench());
    double sum = budget.causes().stream().mapToDouble(CauseEntry::error).sum();
    assertEquals(sum, budget.total() - budget.overlap(), 1e-15);
    // second order in the total: at most half its square
    assertTrue(budget.overlap() <= 0 && budget.overlap() > -sum * sum, "" + budget.overlap());
    for (int i = 1; i < budget.causes().size(); i++) {
      assertTrue(budget.causes().get(i - 1).error() >= budget.causes().get(i).error());
    }
    for (CauseEntry c : budget.causes()) {
      assertTrue(c.error() >= 0 && c.error() < 1, c.toString());
      assertTrue(c.uncertainty() >= 0 && Double.isFinite(c.uncertainty()), c.toString());
      assertFalse(c.lever().isBlank() || c.source().isBlank());
    }
    assertTrue(budget.uncertainty() > 0);
  }

  /** More of a disturbance is never better for a pulse on resonance. */
  @Property(tries = 20, seed = "17")
  void growsWithEveryDisturbance(@ForAll @DoubleRange(min = 0, max = 1) double scale) {
    Bench weak =
        Bench.unknown()
            .withMagneticNoise(MagneticField.ofTesla(scale * 1e-3))
            .withDrifts(hertz(scale * 1e5), hertz(scale * 1e5))
            .withLinewidths(hertz(scale * 1e4), hertz(scale * 1e4))
            .withIntensityNoise(scale * 0.1, scale * 0.1)
            .withElectricField(ElectricField.ofVoltsPerMetre(scale * 3));
    Bench strong =
        Bench.unknown()
            .withMagneticNoise(MagneticField.ofTesla(1e-3))
            .withDrifts(hertz(1e5), hertz(1e5))
            .withLinewidths(hertz(1e4), hertz(1e4))
            .withIntensityNoise(0.1, 0.1)
            .withElectricField(ElectricField.ofVoltsPerMetre(3));
    Budget less = budget(RUBIDIUM, weak);
    for (CauseEntry c : budget(RUBIDIUM, strong).causes()) {
      assertTrue(error(less, c.cause()) <= c.error() + 1e-12, c.cause());
    }
  }

  /** A lever promises what a bench with half the disturbance then shows. */
  @Test
  void keepsThePromiseOfItsLevers() {
    Budget full = budget(RUBIDIUM, Bench.unknown().withDrifts(kilohertz(100), hertz(0)));
    Budget half = budget(RUBIDIUM, Bench.unknown().withDrifts(kilohertz(50), hertz(0)));
    String promised =
        String.format(Locale.ROOT, "%.2g remains", error(half, "Laser drift, step 1"));
    assertTrue(
        entry(full, "Laser drift, step 1").lever().contains(promised),
        entry(full, "Laser drift, step 1").lever() + " / " + promised);
  }

  @Test
  void listsWhatItHasNoNumberFor() {
    Budget budget = budget(RUBIDIUM, Bench.unknown().withTemperature(microkelvin(5)));
    assertTrue(budget.notAssessed().contains("Position in the beams: no trap frequencies"));
    assertTrue(
        budget.notAssessed().stream().anyMatch(s -> s.startsWith("Rydberg decay, blackbody")));
    assertTrue(budget.notAssessed().stream().noneMatch(s -> s.startsWith("Doppler")));
    assertTrue(budget.causes().stream().noneMatch(c -> c.cause().equals("Electric field")));
  }

  @Test
  void saysThatOnlyTheCheckPlaysMotionDuringThePulse() {
    Bench moving = TestDrives.bench().withMotionDuringPulse();
    assertTrue(
        budget(RUBIDIUM, moving)
            .notAssessed()
            .contains(
                "Motion during the pulse: not composed, the check by simulation alone plays it"));
    assertTrue(
        budget(RUBIDIUM, Bench.unknown().withMotionDuringPulse()).notAssessed().stream()
            .anyMatch(s -> s.startsWith("Motion during the pulse: needs")));
    assertTrue(
        budget(RUBIDIUM, TestDrives.bench()).notAssessed().stream()
            .noneMatch(s -> s.startsWith("Motion")));
  }

  @Test
  void countsAnIntendedOffset() {
    Frequency offset = megahertz(0.3);
    Budget budget = Budget.of(RUBIDIUM, Pulse.pi().offsetBy(offset)).on(Bench.unknown()).compose();
    double ratio = offset.hertz() / budget.plan().rabi().hertz();
    double error = error(budget, "Offset from resonance");
    assertEquals(ratio * ratio, error, 0.05 * error);
    assertTrue(
        budget(RUBIDIUM, Bench.unknown()).causes().stream()
            .noneMatch(c -> c.cause().equals("Offset from resonance")));
  }

  /** The seed decides, not the machine: one thread or many, the same shots give the same sum. */
  @Test
  void repeatsACheckWithTheSameSeedOnAnyNumberOfThreads() throws Exception {
    Budget budget = budget(RUBIDIUM, TestDrives.bench());
    Check common = budget.check(333, 9);
    ForkJoinPool single = new ForkJoinPool(1);
    try {
      Check alone = single.submit(() -> budget.check(333, 9)).get();
      assertEquals(common, alone);
    } finally {
      single.shutdown();
    }
    assertFalse(common.equals(budget.check(333, 10)));
  }

  /** Closed form: a level that is populated half the time of a π pulse loses τ/2T. */
  @Test
  void countsEveryWayOutOfTheRydbergLevel() {
    Budget budget = budget(RUBIDIUM, Bench.unknown().withEnvironment(kelvin(300)));
    double lifetime =
        Lifetimes.of(Species.RUBIDIUM_87)
            .lifetimeSeconds(Level.parse("68S1/2"), kelvin(300))
            .value();
    double expected = budget.plan().duration().seconds() / (2 * lifetime);
    double counted =
        error(budget, "Rydberg decay, spontaneous") + error(budget, "Rydberg decay, blackbody");
    assertEquals(expected, counted, 1e-3 * expected);
  }

  /** Exact: the mean of independent shots scatters from seed to seed by its standard error. */
  @Test
  void statesTheScatterOfItsOwnTotal() {
    Budget budget = budget(RUBIDIUM, Bench.unknown().withLinewidths(kilohertz(20), kilohertz(20)));
    int seeds = 40;
    double sum = 0;
    double squares = 0;
    double stated = 0;
    for (int seed = 0; seed < seeds; seed++) {
      Check check = budget.check(200, seed);
      sum += check.total();
      squares += check.total() * check.total();
      stated += check.standardError() * check.standardError() / seeds;
    }
    double variance = (squares - sum * sum / seeds) / (seeds - 1);
    // 39 degrees of freedom: one standard deviation of the ratio is 0.23
    assertEquals(1, variance / stated, 0.7);
  }

  /** Exact to first order in the couplings to the neighbours. */
  @Test
  void countsTheNeighboursOfAOnePhotonTarget() {
    Drive drive =
        Drive.of(Species.RUBIDIUM_87)
            .from(Sublevel.hyperfine("5S1/2", 2, 2))
            .step(
                Sublevel.fine("60P3/2", 1.5),
                Beam.gaussian(Power.milliwatts(2), Length.micrometres(20))
                    .polarized(Polarization.linearDegrees(45))
                    .along(0, 1, 0))
            .in(MagneticField.gauss(20))
            .resolve();
    Budget budget = budget(drive, Bench.unknown());
    double expected = 0;
    for (Drive.OtherTarget other : drive.otherTargets()) {
      expected +=
          ClosedForms.neighbour(
              budget.plan().rabi().hertz(), other.rabi().hertz(), -other.detuning().hertz());
    }
    assertTrue(expected > 1e-6, "too weak to test: " + expected);
    assertEquals(expected, error(budget, "Other Rydberg sublevels"), 0.05 * expected);
  }

  @Test
  void reportsProgressToTheLastShot() {
    AtomicInteger most = new AtomicInteger();
    budget(RUBIDIUM, TestDrives.bench())
        .checking()
        .shots(120)
        .seed(3)
        .totalOnly()
        .reporting(done -> most.accumulateAndGet(done, Math::max))
        .run();
    assertEquals(120, most.get());
  }

  /** Near resonance the numbers are poor, and said to be, but they are numbers. */
  @Test
  void staysFiniteWhenTheIntermediateLevelIsResonant() {
    Drive drive = TestDrives.rubidium().detuned(megahertz(60)).resolve();
    assertFalse(drive.warnings().isEmpty());
    Budget budget = budget(drive, TestDrives.bench());
    assertTrue(budget.total() > 0 && budget.total() <= 1);
    Check check = budget.check(100, 1);
    assertTrue(check.total() >= 0 && check.total() <= 1);
  }

  @Test
  void saysItselfInALine() {
    Budget budget = budget(RUBIDIUM, TestDrives.bench());
    String line = budget.toString();
    assertTrue(line.startsWith("pi on Rb-87 5S1/2"), line);
    assertTrue(line.contains(String.format(Locale.ROOT, "error %.3g ±", budget.total())), line);
    String bench = budget.bench().toString();
    assertTrue(bench.contains("linewidth, step 2 500.0 Hz"), bench);
    assertTrue(bench.contains("intensity noise, step 1 0.005;"), bench);
  }

  @Test
  void refusesImpossibleValues() {
    Bench bench = Bench.unknown();
    refused(() -> bench.withTemperature(kelvin(0)));
    refused(() -> bench.withEnvironment(kelvin(0)));
    refused(() -> bench.withTrapFrequencies(hertz(1), hertz(0), hertz(1)));
    refused(() -> bench.withMagneticNoise(MagneticField.ofTesla(-1)));
    refused(() -> bench.withElectricField(ElectricField.ofVoltsPerMetre(-1)));
    refused(() -> bench.withLinewidths(hertz(1), hertz(-1)));
    refused(() -> bench.withDrifts(hertz(-1)));
    refused(() -> bench.withIntensityNoise(0.6));
    refused(() -> bench.withIntensityNoise(Double.NaN));
    refused(() -> budget(RUBIDIUM, bench.withDrifts(hertz(1))));
    refused(() -> budget(RUBIDIUM, bench.withIntensityNoise(0.1, 0.1, 0.1)));
    refused(() -> budget(RUBIDIUM, bench).check(1, 1));
    refused(() -> budget(RUBIDIUM, bench).check(Integer.MAX_VALUE, 1));
    refused(() -> Budget.of(RUBIDIUM, Pulse.pi()).on(null));
  }

  private static void refused(Executable action) {
    String message = assertThrows(IllegalArgumentException.class, action).getMessage();
    assertTrue(message.length() > 20, message);
  }
}
