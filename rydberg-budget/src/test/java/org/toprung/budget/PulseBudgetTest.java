package org.toprung.budget;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.toprung.angular.Polarization.PI;
import static org.toprung.core.quantity.Frequency.hertz;
import static org.toprung.core.quantity.Frequency.kilohertz;
import static org.toprung.core.quantity.Frequency.megahertz;
import static org.toprung.core.quantity.Length.micrometres;
import static org.toprung.core.quantity.Length.nanometres;
import static org.toprung.core.quantity.Power.milliwatts;
import static org.toprung.core.quantity.Temperature.kelvin;
import static org.toprung.core.quantity.Temperature.microkelvin;

import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;
import org.toprung.angular.Polarization;
import org.toprung.budget.bench.Bench;
import org.toprung.budget.bench.NoiseDensity;
import org.toprung.budget.pulse.Pulse;
import org.toprung.core.atom.Species;
import org.toprung.core.atom.Sublevel;
import org.toprung.core.drive.Beam;
import org.toprung.core.drive.Drive;
import org.toprung.core.drive.DriveSetup;
import org.toprung.core.quantity.Frequency;
import org.toprung.core.quantity.MagneticField;
import org.toprung.core.quantity.Time;

/** Budgets of all kinds of pulses against the simulation. */
class PulseBudgetTest {
  private static final Drive RUBIDIUM = TestDrives.rubidium().resolve();

  static Stream<Pulse> pulses() {
    Time us = Time.ofSeconds(1e-6);
    return Stream.of(
        Pulse.square(Math.PI / 2),
        Pulse.square(2 * Math.PI),
        Pulse.pi().withEdges(Time.ofSeconds(2e-8), Time.ofSeconds(2e-8)),
        Pulse.gaussian(Math.PI),
        Pulse.blackman(Math.PI),
        Pulse.sineSquared(Math.PI).holdingFrequency(),
        Pulse.sineSquared(Math.PI).shapingStep(1),
        Pulse.ramsey(us, 0),
        Pulse.ramsey(us, 1),
        Pulse.echo(us, 0),
        Pulse.bb1(Math.PI),
        Pulse.corpse(Math.PI),
        Pulse.chirped(Time.ofSeconds(4e-6), megahertz(20)),
        Pulse.chirpedSmoothly(Time.ofSeconds(4e-6), megahertz(20)));
  }

  /** Each cause alone and all together; the simulation shares no formula with the causes. */
  @ParameterizedTest
  @MethodSource("pulses")
  void agreesWithItsSimulation(Pulse pulse) {
    confirmed(Budget.of(RUBIDIUM, pulse).on(TestDrives.bench()).compose(), 400);
  }

  static Stream<Pulse> pulsesOffThePlan() {
    Time time = microseconds(1.35);
    return Stream.of(
        Pulse.square(2 * Math.PI),
        Pulse.gaussian(2 * Math.PI),
        Pulse.square(2 * Math.PI).offsetBy(kilohertz(300)),
        Pulse.chirped(time, megahertz(23.8)),
        Pulse.chirped(time, megahertz(23.8)).offsetBy(megahertz(1.8)),
        Pulse.ramsey(microseconds(0.5), 1).offsetBy(kilohertz(120)));
  }

  /**
   * A stretched pulse stretches detunings, waits and the phase of its start, not only the area; the
   * light of the beams shifts the start as well as the resonance; losses follow the way that the
   * pulse takes at its own offset.
   */
  @ParameterizedTest
  @MethodSource("pulsesOffThePlan")
  void agreesWithItsSimulationOffThePlan(Pulse pulse) {
    Bench bench =
        Bench.unknown()
            .withEnvironment(kelvin(300))
            .withLengthError(0.01)
            .withIntensityNoise(0.02, 0.02);
    Budget budget = Budget.of(RUBIDIUM, pulse).on(bench).compose();
    confirmed(budget, 2000);
    Check check = budget.check(2000, 6);
    for (CauseCheck cause : check.causes()) {
      if (cause.standardError() > 1e-9) {
        assertEquals(
            cause.simulated(),
            cause.composed(),
            5 * cause.standardError() + 0.05 * Math.abs(cause.simulated()),
            cause.cause());
      }
    }
  }

  /** A warm atom in jittering beams: four numbers across two beams, from seven that are drawn. */
  @Test
  void agreesWithItsSimulationForAWarmAtomInJitteringBeams() {
    Bench bench =
        Bench.unknown()
            .withTemperature(microkelvin(20))
            .withTrapFrequencies(kilohertz(3), kilohertz(3), kilohertz(3))
            .withPointing(micrometres(1), micrometres(2));
    Budget budget = Budget.of(RUBIDIUM, Pulse.square(2 * Math.PI)).on(bench).compose();
    CauseCheck place =
        budget.check(20_000, 7).causes().stream()
            .filter(c -> c.cause().equals("Position in the beams"))
            .findFirst()
            .orElseThrow();
    assertEquals(
        place.simulated(),
        place.composed(),
        4 * place.standardError() + 0.01 * place.simulated(),
        place.toString());
  }

  /** Intensity noise in a 2π pulse, tabulated: the phase of the start is in the filter too. */
  @Test
  void agreesWithItsSimulationForIntensityNoiseDuringAReturningPulse() {
    NoiseDensity density =
        NoiseDensity.of(new double[] {1e3, 1e5, 5e6}, new double[] {1e-8, 3e-9, 1e-10});
    Bench bench = Bench.unknown().withIntensityNoiseDensity(0, density);
    Budget budget = Budget.of(RUBIDIUM, Pulse.square(2 * Math.PI)).on(bench).compose();
    CauseCheck noise =
        budget.check(4000, 7).causes().stream()
            .filter(c -> c.cause().startsWith("Intensity noise spectrum"))
            .findFirst()
            .orElseThrow();
    assertEquals(
        noise.simulated(),
        noise.composed(),
        4 * noise.standardError() + 0.02 * noise.simulated(),
        noise.toString());
  }

  /** An undisturbed pulse that misses by more than half is not made better by noise. */
  @Test
  void keepsAnErrorBeyondOneHalf() {
    Pulse held = Pulse.ramsey(microseconds(0.5), 1).holdingFrequency();
    Budget quiet = Budget.of(RUBIDIUM, held).on(Bench.unknown()).compose();
    assertTrue(quiet.total() > 0.6, "not beyond a half: " + quiet.total());
    assertTrue(quiet.check(2, 1).agrees());
    Bench noisy = Bench.unknown().withDrifts(kilohertz(50), hertz(0));
    Budget more = Budget.of(RUBIDIUM, held).on(noisy).compose();
    assertTrue(more.total() >= quiet.total() - 1e-12);
  }

  /** What leaks out of a returning pulse is missing from one of two paths: half the error. */
  @Test
  void countsALeakOfAReturningPulseOnce() {
    Drive drive =
        Drive.of(Species.RUBIDIUM_87)
            .from(Sublevel.hyperfine("5S1/2", 2, 2))
            .step(
                Sublevel.fine("60P3/2", 1.5),
                Beam.gaussian(milliwatts(50), micrometres(20))
                    .polarized(Polarization.linearDegrees(45))
                    .along(0, 1, 0))
            .in(MagneticField.gauss(20))
            .resolve();
    Budget budget = Budget.of(drive, Pulse.square(2 * Math.PI)).on(Bench.unknown()).compose();
    CauseCheck quiet =
        budget.check(2, 1).causes().stream()
            .filter(c -> c.cause().equals("Undisturbed pulse"))
            .findFirst()
            .orElseThrow();
    assertTrue(quiet.simulated() > 1e-4, "too weak to test: " + quiet);
    assertEquals(quiet.simulated(), quiet.composed(), 1e-6, quiet.toString());
  }

  private static void confirmed(Budget budget, int shots) {
    Check check = budget.check(shots, 5);
    assertTrue(
        check.agrees(),
        budget.total() + " against " + check.total() + " ± " + check.standardError());
    assertTrue(check.disagreements().isEmpty(), check.disagreements().toString());
    assertTrue(budget.total() > 1e-3, "too weak to test: " + budget.total());
  }

  private static Time microseconds(double value) {
    return Time.ofSeconds(value * 1e-6);
  }

  /**
   * Every value that a bench can hold, spectra with a servo bump in place of linewidths, samples
   * with a tail in place of a Gaussian.
   */
  private static Bench full() {
    NoiseDensity frequency =
        NoiseDensity.of(
            new double[] {1e3, 1e5, 3e5, 5e5, 8e5, 5e6},
            new double[] {2e4, 2e3, 8e3, 4e4, 5e3, 1e3});
    NoiseDensity intensity =
        NoiseDensity.of(new double[] {1e3, 1e5, 5e6}, new double[] {1e-10, 3e-11, 1e-11});
    Bench bench =
        TestDrives.bench()
            .withLinewidths(hertz(0), hertz(0))
            .withPointing(micrometres(2), micrometres(1))
            .withLengthError(0.01)
            .withFrequencyError(kilohertz(20))
            .withPreparationError(2e-3)
            .withDetectionError(1e-3)
            .withDriftSamples(
                1, kilohertz(-3), kilohertz(1), kilohertz(0), kilohertz(90), kilohertz(-2));
    for (int k = 0; k < 2; k++) {
      bench =
          bench
              .withFrequencyNoiseDensity(k, frequency)
              .withIntensityNoiseDensity(k, intensity.scaled(20));
    }
    return bench;
  }

  static Stream<Pulse> fewPulses() {
    return Stream.of(Pulse.pi(), Pulse.gaussian(Math.PI), Pulse.ramsey(microseconds(0.5), 0));
  }

  @ParameterizedTest
  @MethodSource("fewPulses")
  void agreesWithItsSimulationOnABenchWithEverything(Pulse pulse) {
    Budget budget = Budget.of(RUBIDIUM, pulse).on(full()).compose();
    for (String cause :
        new String[] {
          "Frequency noise spectrum, step 1",
          "Intensity noise spectrum, step 2",
          "Position in the beams",
          "Laser drift, step 2",
          "Miscalibrated length",
          "Miscalibrated frequency",
          "State preparation",
          "State detection"
        }) {
      assertTrue(
          budget.causes().stream().anyMatch(c -> c.cause().equals(cause) && c.error() > 1e-6),
          cause + " in " + budget.causes());
    }
    confirmed(budget, 1500);
  }

  /** Light of the wrong handedness leads to other sublevels and changes the Rabi frequency. */
  @Test
  void agreesWithItsSimulationForImpureLight() {
    Bench bench = Bench.unknown().withPolarizationImpurity(0.02, 0.02);
    Budget budget = Budget.of(RUBIDIUM, Pulse.pi()).on(bench).compose();
    double error =
        budget.causes().stream()
            .filter(c -> c.cause().startsWith("Polarization impurity"))
            .mapToDouble(CauseEntry::error)
            .sum();
    assertTrue(error > 1e-4, "too weak to test: " + budget.causes());
    confirmed(budget, 400);
  }

  private static DriveSetup resonant(double megahertz) {
    return TestDrives.rubidium()
        .withBeam(0, beam -> beam.brightened(0.02))
        .withBeam(1, beam -> beam.brightened(0.2))
        .detuned(Frequency.megahertz(megahertz));
  }

  /** Through a resonant intermediate level: no effective two-level system, the whole ladder. */
  @Test
  void agreesWithItsSimulationForStimulatedRamanPassage() {
    Drive drive = resonant(5).resolve();
    Pulse pulse = Pulse.stirap(microseconds(3), microseconds(1));
    confirmed(Budget.of(drive, pulse).on(TestDrives.bench()).compose(), 100);
  }

  /** A trap that stays on and whose intensity is not the same in every shot. */
  @Test
  void agreesWithItsSimulationForANoisyTrap() {
    Drive drive =
        TestDrives.rubidium()
            .trappedBy(
                Beam.gaussian(milliwatts(3), micrometres(1.2)).polarized(PI).along(1, 0, 0),
                nanometres(852))
            .resolve();
    Bench bench = Bench.unknown().withTrapIntensityNoise(0.01);
    Budget budget = Budget.of(drive, Pulse.pi()).on(bench).compose();
    assertTrue(
        budget.causes().stream()
            .anyMatch(c -> c.cause().equals("Trap intensity noise") && c.error() > 1e-3),
        budget.causes().toString());
    confirmed(budget, 2000);
  }
}
