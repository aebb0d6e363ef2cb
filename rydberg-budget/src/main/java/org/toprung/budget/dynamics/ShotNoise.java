package org.toprung.budget.dynamics;

import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import java.util.random.RandomGenerator;
import org.toprung.budget.bench.Bench;
import org.toprung.budget.bench.ThermalMotion;
import org.toprung.core.drive.Drive;
import org.toprung.core.drive.LadderSetting;
import org.toprung.core.quantity.Frequency;
import org.toprung.core.structure.StarkShift;

/**
 * Draws what is different in one shot: velocity and position of the atom, intensities, fields,
 * laser frequencies.
 *
 * <p>Immutable; safe for use by several threads, each with its own generator.
 */
final class ShotNoise {
  private final Drive drive;
  private final LadderSetting nominal;
  private final Optional<ThermalMotion> motion;
  private final double magnetic; // T
  private final double electric; // V/m per component
  private final StarkShift stark;
  private final double[] drift; // Hz
  private final double[] intensity; // relative
  private final double[] linewidth; // Hz

  ShotNoise(Drive drive, LadderSetting nominal, Bench bench) {
    this.drive = drive;
    this.nominal = nominal;
    this.motion =
        bench
            .temperature()
            .map(
                t -> ThermalMotion.of(drive.species().massKilograms(), t, bench.trapFrequencies()));
    this.magnetic = bench.magneticNoise().map(b -> b.tesla()).orElse(0.0);
    this.electric = bench.electricField().map(e -> e.voltsPerMetre()).orElse(0.0) / Math.sqrt(3);
    double[] e = drive.electricFieldVoltsPerMetre();
    this.stark = StarkShift.of(drive.species(), drive.target()).about(e[0], e[1], e[2]);
    int steps = drive.steps().size();
    this.drift = hertz(bench.drifts(), steps);
    this.linewidth = hertz(bench.linewidths(), steps);
    this.intensity =
        bench
            .intensityNoise()
            .map(list -> list.stream().mapToDouble(Double::doubleValue).toArray())
            .orElse(new double[steps]);
  }

  private static double[] hertz(Optional<List<Frequency>> values, int steps) {
    return values
        .map(list -> list.stream().mapToDouble(Frequency::hertz).toArray())
        .orElse(new double[steps]);
  }

  double linewidthHertz(int step) {
    return linewidth[step];
  }

  boolean isWhite() {
    return Arrays.stream(linewidth).anyMatch(w -> w > 0);
  }

  LadderSetting draw(RandomGenerator random) {
    double[] velocity = new double[3];
    double[] position = new double[3];
    if (motion.isPresent()) {
      for (int a = 0; a < 3; a++) {
        velocity[a] = motion.get().velocityMetresPerSecond(a) * random.nextGaussian();
        if (motion.get().isTrapped()) {
          position[a] = motion.get().positionMetres(a) * random.nextGaussian();
        }
      }
    }
    LadderSetting setting = nominal.withMagneticOffset(magnetic * random.nextGaussian());
    for (int k = 0; k < drive.steps().size(); k++) {
      double[] wave = drive.waveVectorPerMetre(k);
      double doppler = 0;
      for (int a = 0; a < 3; a++) {
        doppler -= wave[a] * velocity[a] / (2 * Math.PI);
      }
      double relative = Math.max(0, 1 + intensity[k] * random.nextGaussian());
      double offset = nominal.laserOffsetHertz(k) + drift[k] * random.nextGaussian() + doppler;
      setting =
          setting
              .withLaserOffset(k, offset)
              .withFieldFactor(
                  k,
                  Math.sqrt(relative)
                      * drive.steps().get(k).fieldFactorAt(position[0], position[1], position[2]));
    }
    return setting.withTargetShift(
        stark.hertz(
            electric * random.nextGaussian(),
            electric * random.nextGaussian(),
            electric * random.nextGaussian()));
  }
}
