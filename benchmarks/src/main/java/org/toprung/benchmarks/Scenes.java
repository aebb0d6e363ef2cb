package org.toprung.benchmarks;

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

/** The drive and the bench that the benchmarks share. */
final class Scenes {
  private Scenes() {}

  /** A stretched ladder of three sublevels, or one in which all sublevels take part. */
  static DriveSetup drive(boolean everySublevel) {
    Polarization lower = everySublevel ? Polarization.linearDegrees(25) : Polarization.SIGMA_PLUS;
    Polarization upper = everySublevel ? Polarization.linearDegrees(70) : Polarization.SIGMA_MINUS;
    double across = everySublevel ? 1 : 0;
    return Drive.of(Species.RUBIDIUM_87)
        .from(Sublevel.hyperfine("5S1/2", 2, 2))
        .step(
            Level.parse("6P3/2"),
            Beam.gaussian(milliwatts(2), micrometres(20))
                .polarized(lower)
                .along(across, 0, 1 - across))
        .step(
            Sublevel.fine("68S1/2", 0.5),
            Beam.gaussian(milliwatts(150), micrometres(25))
                .polarized(upper)
                .along(-across, 0, across - 1))
        .detuned(gigahertz(1.2))
        .in(gauss(4));
  }

  /** A stretched ladder of one, two or three photons. */
  static DriveSetup ladder(int photons) {
    if (photons == 2) {
      return drive(false);
    }
    DriveSetup start =
        Drive.of(Species.RUBIDIUM_87).from(Sublevel.hyperfine("5S1/2", 2, 2)).in(gauss(5));
    Beam weak =
        Beam.gaussian(milliwatts(0.05), micrometres(100))
            .polarized(Polarization.SIGMA_PLUS)
            .along(0, 0, 1);
    Beam strong =
        Beam.gaussian(milliwatts(500), micrometres(50))
            .polarized(Polarization.SIGMA_PLUS)
            .along(0, 0, -1);
    if (photons == 1) {
      return start.step(Sublevel.fine("60P3/2", 1.5), strong);
    }
    return start
        .step(Level.parse("5P3/2"), weak)
        .step(Level.parse("6S1/2"), weak.polarized(Polarization.SIGMA_MINUS))
        .step(Sublevel.fine("60P3/2", 1.5), strong)
        .detuned(gigahertz(1), gigahertz(-2));
  }

  static Bench bench() {
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
