package org.toprung.budget;

import static org.toprung.core.quantity.Frequency.gigahertz;
import static org.toprung.core.quantity.Frequency.hertz;
import static org.toprung.core.quantity.Frequency.kilohertz;
import static org.toprung.core.quantity.Length.micrometres;
import static org.toprung.core.quantity.MagneticField.gauss;
import static org.toprung.core.quantity.MagneticField.milligauss;
import static org.toprung.core.quantity.Power.milliwatts;
import static org.toprung.core.quantity.Temperature.kelvin;
import static org.toprung.core.quantity.Temperature.microkelvin;

import org.toprung.angular.Polarization;
import org.toprung.budget.bench.Bench;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.atom.Sublevel;
import org.toprung.core.drive.Beam;
import org.toprung.core.drive.Drive;
import org.toprung.core.drive.DriveSetup;
import org.toprung.core.quantity.ElectricField;

/** Drives and benches that several tests share. */
public final class TestDrives {
  private TestDrives() {}

  public static DriveSetup rubidium() {
    return Drive.of(Species.RUBIDIUM_87)
        .from(Sublevel.hyperfine("5S1/2", 2, 2))
        .step(
            Level.parse("6P3/2"),
            Beam.gaussian(milliwatts(2), micrometres(20))
                .polarized(Polarization.SIGMA_PLUS)
                .along(0, 0, 1))
        .step(
            Sublevel.fine("68S1/2", 0.5),
            Beam.gaussian(milliwatts(150), micrometres(25))
                .polarized(Polarization.SIGMA_MINUS)
                .along(0, 0, -1))
        .detuned(gigahertz(1.2))
        .in(gauss(4));
  }

  public static DriveSetup caesium() {
    return Drive.of(Species.CAESIUM_133)
        .from(Sublevel.hyperfine("6S1/2", 4, 4))
        .step(
            Level.parse("7P3/2"),
            Beam.gaussian(milliwatts(1.5), micrometres(18))
                .polarized(Polarization.SIGMA_PLUS)
                .along(0, 0, 1))
        .step(
            Sublevel.fine("60S1/2", 0.5),
            Beam.gaussian(milliwatts(200), micrometres(20))
                .polarized(Polarization.SIGMA_MINUS)
                .along(0, 0, -1))
        .detuned(gigahertz(-1.5))
        .in(gauss(5));
  }

  /** Both beams across the field, with polarizations that reach more than one Rydberg sublevel. */
  public static DriveSetup impureRubidium() {
    return Drive.of(Species.RUBIDIUM_87)
        .from(Sublevel.hyperfine("5S1/2", 2, 0))
        .step(
            Level.parse("6P3/2"),
            Beam.gaussian(milliwatts(4), micrometres(20)).polarized(Polarization.PI).along(1, 0, 0))
        .step(
            Sublevel.fine("65S1/2", 0.5),
            Beam.gaussian(milliwatts(200), micrometres(20))
                .polarized(Polarization.linearDegrees(5))
                .along(-1, 0, 0))
        .detuned(gigahertz(2))
        .in(gauss(12));
  }

  public static Bench bench() {
    return Bench.unknown()
        .withTemperature(microkelvin(10))
        .withTrapFrequencies(kilohertz(80), kilohertz(80), kilohertz(15))
        .withEnvironment(kelvin(300))
        .withMagneticNoise(milligauss(2))
        .withElectricField(ElectricField.ofVoltsPerMetre(0.5))
        .withLinewidths(hertz(500), hertz(500))
        .withDrifts(kilohertz(2), kilohertz(2))
        .withIntensityNoise(0.005, 0.005);
  }
}
