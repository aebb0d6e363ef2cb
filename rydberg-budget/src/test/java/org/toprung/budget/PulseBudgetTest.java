package org.toprung.budget;

import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.toprung.angular.Polarization.PI;
import static org.toprung.core.quantity.Frequency.hertz;
import static org.toprung.core.quantity.Frequency.kilohertz;
import static org.toprung.core.quantity.Frequency.megahertz;
import static org.toprung.core.quantity.Length.micrometres;
import static org.toprung.core.quantity.Length.nanometres;
import static org.toprung.core.quantity.Power.milliwatts;

import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;
import org.toprung.budget.bench.Bench;
import org.toprung.budget.bench.NoiseDensity;
import org.toprung.budget.pulse.Pulse;
import org.toprung.core.drive.Beam;
import org.toprung.core.drive.Drive;
import org.toprung.core.drive.DriveSetup;
import org.toprung.core.quantity.Frequency;
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
