package org.toprung.core.drive;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.toprung.angular.Polarization.SIGMA_MINUS;
import static org.toprung.angular.Polarization.SIGMA_PLUS;
import static org.toprung.core.quantity.Frequency.gigahertz;
import static org.toprung.core.quantity.Frequency.hertz;
import static org.toprung.core.quantity.Frequency.kilohertz;
import static org.toprung.core.quantity.Length.micrometres;
import static org.toprung.core.quantity.MagneticField.gauss;
import static org.toprung.core.quantity.Power.milliwatts;

import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.constraints.DoubleRange;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.function.Executable;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.atom.Sublevel;

class CalibrationTest {
  private static final Drive DRIVE =
      Drive.of(Species.RUBIDIUM_87)
          .from(Sublevel.hyperfine("5S1/2", 2, 2))
          .step(
              Level.parse("6P3/2"),
              Beam.gaussian(milliwatts(2), micrometres(20)).polarized(SIGMA_PLUS).along(0, 0, 1))
          .step(
              Sublevel.fine("68S1/2", 0.5),
              Beam.gaussian(milliwatts(150), micrometres(25))
                  .polarized(SIGMA_MINUS)
                  .along(0, 0, -1))
          .detuned(gigahertz(1.2))
          .in(gauss(4))
          .resolve();
  private static final DriveKernel KERNEL = DRIVE.kernel();
  private static final double[] ONES = {1, 1};

  private static KernelResult at(DriveKernel kernel, double detuning, double... watts) {
    KernelResult result = kernel.newResult();
    kernel.evaluate(watts, detuning, ONES, result);
    return result;
  }

  /** Exact: what the kernel predicts for other intensities leads back to them. */
  @Property(tries = 60, seed = "21")
  void findsTheIntensitiesBehindItsOwnPredictions(
      @ForAll @DoubleRange(min = 0.5, max = 1.8) double first,
      @ForAll @DoubleRange(min = 0.5, max = 1.8) double second) {
    KernelResult measured = at(KERNEL.withIntensitiesScaled(first, second), 1.3e9, 0.001, 0.2);
    CalibrationResult found =
        KERNEL
            .calibration()
            .at(1.3e9, 0.001, 0.2)
            .rabi(hertz(measured.rabiHertz()), kilohertz(5))
            .startLightShift(hertz(measured.startLightShiftHertz()), kilohertz(5))
            .targetLightShift(hertz(measured.targetLightShiftHertz()), kilohertz(5))
            .solve();
    assertEquals(first, found.intensities().get(0).ratio(), 1e-9);
    assertEquals(second, found.intensities().get(1).ratio(), 1e-9);
    assertEquals(0, found.chiSquared(), 1e-9);
    assertEquals(1, found.spareMeasurements());
    KernelResult corrected = at(found.kernel(), 1.2e9, 0.002, 0.15);
    KernelResult expected = at(KERNEL.withIntensitiesScaled(first, second), 1.2e9, 0.002, 0.15);
    assertEquals(expected.rabiHertz(), corrected.rabiHertz(), 1e-8 * expected.rabiHertz());
  }

  /** Exact: from Rabi frequency and resonance offset, near what was expected. */
  @Property(tries = 60, seed = "22")
  void findsThemFromRabiFrequencyAndResonance(
      @ForAll @DoubleRange(min = 0.8, max = 1.25) double first,
      @ForAll @DoubleRange(min = 0.8, max = 1.25) double second) {
    KernelResult measured = at(KERNEL.withIntensitiesScaled(first, second), 1.2e9, 0.002, 0.15);
    CalibrationResult found =
        KERNEL
            .calibration()
            .rabi(hertz(measured.rabiHertz()), kilohertz(5))
            .differentialLightShift(hertz(measured.frequencyOffsetHertz()), kilohertz(5))
            .solve();
    assertEquals(first, found.intensities().get(0).ratio(), 1e-8);
    assertEquals(second, found.intensities().get(1).ratio(), 1e-8);
  }

  /** Start shift of the first beam alone. */
  private static double alone(DriveKernel kernel) {
    return at(kernel, 1.2e9, 0.002, 1e-15).startLightShiftHertz();
  }

  /**
   * Closed form: with the start shift s of beam 1 alone, r1 = s/s0 and r2 = (Ω/Ω0)²/r1, so the
   * relative variances are σs² and 4σΩ² + σs², but for the far-off-resonant shift that moves the
   * detuning. Of the elements d1 and d2, r1 d1² and r1 r2 d1² d2² are measured (the far part of the
   * shift is small), so r1 is uncertain by 2u1 and r2 by 2u2.
   */
  @Test
  void propagatesUncertainties() {
    DriveKernel actual = KERNEL.withIntensitiesScaled(0.9, 1.3);
    double rabi = at(actual, 1.2e9, 0.002, 0.15).rabiHertz();
    double shift = alone(actual);
    CalibrationResult found =
        KERNEL
            .calibration()
            .rabi(hertz(rabi), hertz(0.01 * rabi))
            .startLightShift(0, hertz(shift), hertz(0.02 * Math.abs(shift)))
            .solve();
    CalibrationResult.Intensity first = found.intensities().get(0);
    CalibrationResult.Intensity second = found.intensities().get(1);
    assertEquals(0.9, first.ratio(), 1e-9);
    assertEquals(1.3, second.ratio(), 1e-9);
    assertEquals(0.02, first.measurementUncertainty() / first.ratio(), 2e-5);
    // the far-off-resonant shift F2 of the start moves the detuning: Ω ∝ √(r1 r2)/(Δ + F2 r2)
    double far = KERNEL.startFarShiftHertz(1, 1.3 * 0.15, 1.2e9);
    double power = 0.5 - far / 1.125e9;
    double expected = Math.sqrt(0.01 * 0.01 + 0.25 * 0.02 * 0.02) / power;
    assertEquals(expected, second.measurementUncertainty() / second.ratio(), 2e-5);
    double u1 = DRIVE.steps().get(0).relativeUncertainty();
    double u2 = DRIVE.steps().get(1).relativeUncertainty();
    assertEquals(2 * u1, first.elementUncertainty() / first.ratio(), 0.1 * u1);
    assertEquals(2 * u2, second.elementUncertainty() / second.ratio(), 0.1 * u2);
    assertEquals(
        Math.hypot(first.measurementUncertainty(), first.elementUncertainty()),
        first.uncertainty(),
        1e-15);
  }

  /** Closed form: Ω ∝ √I, so r = (Ω/Ω0)² and its uncertainty twice the relative one. */
  @Test
  void calibratesASingleBeam() {
    Drive drive =
        Drive.of(Species.CAESIUM_133)
            .from(Sublevel.hyperfine("6S1/2", 4, 4))
            .step(
                Sublevel.fine("60P3/2", 1.5),
                Beam.gaussian(milliwatts(50), micrometres(15)).polarized(SIGMA_PLUS).along(0, 0, 1))
            .in(gauss(2))
            .resolve();
    double rabi = drive.rabi().hertz();
    CalibrationResult found =
        drive.kernel().calibration().rabi(hertz(0.8 * rabi), hertz(0.008 * rabi)).solve();
    assertEquals(0.64, found.intensities().get(0).ratio(), 1e-9);
    assertEquals(0.64 * 0.02, found.intensities().get(0).measurementUncertainty(), 1e-9);
    double u = drive.relativeUncertainty();
    assertEquals(0.64 * 2 * u, found.intensities().get(0).elementUncertainty(), 1e-9);
  }

  /** Closed form: two equal measurements weigh as their mean, with chi² of their difference. */
  @Test
  void weighsMeasurementsThatDisagree() {
    double rabi = DRIVE.rabi().hertz();
    double shift = alone(KERNEL);
    CalibrationResult found =
        KERNEL
            .calibration()
            .rabi(hertz(1.01 * rabi), hertz(0.01 * rabi))
            .rabi(hertz(0.99 * rabi), hertz(0.01 * rabi))
            .startLightShift(0, hertz(shift), hertz(0.01 * Math.abs(shift)))
            .solve();
    assertEquals(1, found.intensities().get(0).ratio(), 1e-9);
    assertEquals(1, found.intensities().get(1).ratio(), 1e-9);
    assertEquals(2, found.chiSquared(), 1e-9);
  }

  @Test
  void saysWhatIsMissing() {
    double rabi = DRIVE.rabi().hertz();
    Calibration none = KERNEL.calibration();
    Calibration one = none.rabi(hertz(rabi), kilohertz(1));
    refused("missing: a Rabi frequency, or another light shift", none::solve);
    refused("a light shift, since a Rabi frequency alone gives the product", one::solve);
    refused(
        "fix one combination of the two intensities only",
        () -> one.rabi(hertz(rabi), kilohertz(2)).solve());
    Calibration firstBeam =
        none.startLightShift(0, DRIVE.startLightShift(0), kilohertz(1))
            .startLightShift(0, DRIVE.startLightShift(0), kilohertz(2));
    refused("depends on the intensity of beam 2", firstBeam::solve);
  }

  /** A shift of the wrong sign cannot be had with any intensity. */
  @Test
  void saysWhenNothingFits() {
    ArithmeticException e =
        assertThrows(
            ArithmeticException.class,
            () ->
                KERNEL
                    .calibration()
                    .startLightShift(0, hertz(-DRIVE.startLightShift(0).hertz()), kilohertz(1))
                    .startLightShift(1, DRIVE.startLightShift(1), kilohertz(1))
                    .solve());
    assertTrue(e.getMessage().contains("iterations"), e.getMessage());
  }

  @Test
  void refusesMeasurementsThatAreNone() {
    Calibration none = KERNEL.calibration();
    refused("Rabi frequency 0 Hz must be positive", () -> none.rabi(hertz(0), hertz(1)));
    refused("uncertainty 0 Hz", () -> none.rabi(hertz(1), hertz(0)));
    refused("uncertainty -1 Hz", () -> none.startLightShift(hertz(1), hertz(-1)));
    refused("step 2 must be from 0 to 1", () -> none.startLightShift(2, hertz(1), hertz(1)));
    refused("power of beam 1", () -> none.at(1.2e9, 0, 1));
    refused("out of reach", () -> none.at(1e15, 1, 1));
  }

  private static void refused(String part, Executable call) {
    String message = assertThrows(IllegalArgumentException.class, call).getMessage();
    assertTrue(message.contains(part), message);
  }
}
