package org.toprung.budget.dynamics;

import java.util.List;
import java.util.Optional;
import java.util.Set;
import java.util.random.RandomGenerator;
import org.toprung.budget.bench.Bench;
import org.toprung.budget.bench.BenchValue;
import org.toprung.budget.bench.Disturbance;
import org.toprung.budget.bench.Disturbance.Kind;
import org.toprung.budget.bench.Spread;
import org.toprung.budget.bench.ThermalMotion;
import org.toprung.core.drive.Drive;
import org.toprung.core.structure.StarkShift;

/**
 * Draws what is different in one shot and stays so: velocity and position of the atom, pointing,
 * intensities, fields, laser frequencies, the length of the pulse.
 *
 * <p>Immutable; safe for use by several threads, each with its own generator and {@link Shot}.
 */
final class ShotDraw {

  /** One shot; mutable, reused by one thread. */
  static final class Shot {
    final ShotSetting setting;
    final double[] velocity = new double[3]; // m/s
    final double[] position = new double[3]; // m, in the middle of the pulse
    final double[][] pointing; // m, by step
    double lengthFactor;
    int variant;

    Shot(int steps) {
      this.setting = ShotSetting.nominal(steps);
      this.pointing = new double[steps][3];
    }
  }

  private final List<Drive.Step> steps;
  private final double[][] waveVector; // 1/m
  private final double[][][] across; // two directions across each beam
  private final double[] meanField; // over nominal
  private final double rydbergDecay; // 1/s
  private final boolean scatters;
  private final Optional<ThermalMotion> motion;
  private final boolean doppler;
  private final boolean displaced;
  private final boolean moves;
  private final double[] pointing; // m
  private final Spread magnetic; // T; null where there is none
  private final Spread electric; // V/m, length
  private final StarkShift stark;
  private final Spread[] drift; // Hz
  private final Spread[] intensity; // relative
  private final Spread frequencyError; // Hz
  private final Spread lengthError; // relative
  private final double trapHertz; // rms
  private final int variants;

  ShotDraw(
      Drive drive,
      Bench bench,
      Set<Disturbance> active,
      double spontaneousPerSecond,
      double blackbodyPerSecond,
      double[] meanFields,
      int variants) {
    int n = drive.steps().size();
    this.steps = drive.steps();
    this.meanField = meanFields;
    this.waveVector = new double[n][];
    this.across = new double[n][][];
    for (int k = 0; k < n; k++) {
      waveVector[k] = drive.waveVectorPerMetre(k);
      across[k] = steps.get(k).beam().across().toArray(double[][]::new);
    }
    this.scatters = has(active, Kind.SCATTERING);
    this.rydbergDecay =
        (has(active, Kind.SPONTANEOUS_DECAY) ? spontaneousPerSecond : 0)
            + (has(active, Kind.BLACKBODY) ? blackbodyPerSecond : 0);
    this.motion =
        bench
            .temperature()
            .map(
                t -> ThermalMotion.of(drive.species().massKilograms(), t, bench.trapFrequencies()));
    this.doppler = motion.isPresent() && has(active, Kind.DOPPLER);
    this.displaced = has(active, Kind.POSITION);
    this.moves = displaced && motion.isPresent() && bench.movesDuringPulse();
    this.pointing = new double[n];
    this.drift = new Spread[n];
    this.intensity = new Spread[n];
    for (int k = 0; k < n; k++) {
      pointing[k] = displaced ? bench.value(BenchValue.POINTING, k).orElse(0) : 0;
      drift[k] = spread(bench, active, BenchValue.DRIFT, Kind.DRIFT, k);
      intensity[k] = spread(bench, active, BenchValue.INTENSITY_NOISE, Kind.INTENSITY, k);
    }
    this.magnetic = spread(bench, active, BenchValue.MAGNETIC_NOISE, Kind.MAGNETIC_FIELD);
    this.electric = spread(bench, active, BenchValue.ELECTRIC_FIELD, Kind.ELECTRIC_FIELD);
    double[] e = drive.electricFieldVoltsPerMetre();
    this.stark =
        electric == null
            ? null
            : StarkShift.of(drive.species(), drive.target()).about(e[0], e[1], e[2]);
    this.frequencyError = spread(bench, active, BenchValue.FREQUENCY_ERROR, Kind.LASER_FREQUENCY);
    this.lengthError = spread(bench, active, BenchValue.LENGTH_ERROR, Kind.PULSE_LENGTH);
    double trap =
        drive.trap().map(t -> t.targetShift().hertz() - t.startShift().hertz()).orElse(0.0);
    this.trapHertz =
        has(active, Kind.TRAP_INTENSITY)
            ? trap * bench.value(BenchValue.TRAP_INTENSITY_NOISE, 0).orElse(0)
            : 0;
    boolean impure = active.stream().anyMatch(d -> d.kind() == Kind.POLARIZATION);
    this.variants = impure ? variants : 0;
  }

  private static boolean has(Set<Disturbance> active, Kind kind) {
    return active.contains(new Disturbance(kind, Disturbance.COMMON));
  }

  private static Spread spread(
      Bench bench, Set<Disturbance> active, BenchValue value, Kind kind, int step) {
    boolean on = active.contains(new Disturbance(kind, step));
    return on ? bench.spread(value, step).orElse(null) : null;
  }

  private static Spread spread(Bench bench, Set<Disturbance> active, BenchValue value, Kind kind) {
    return has(active, kind) ? bench.spread(value, 0).orElse(null) : null;
  }

  /** Whether intensities change during the pulse because the atom flies through the beams. */
  boolean moves() {
    return moves;
  }

  void draw(RandomGenerator random, Shot shot) {
    ShotSetting setting = shot.setting;
    setting.reset();
    setting.intermediateDecays = scatters;
    setting.rydbergDecayPerSecond = rydbergDecay;
    shot.variant = variants > 0 ? random.nextInt(variants) : 0;
    shot.lengthFactor = lengthError == null ? 1 : Math.max(0, 1 + lengthError.draw(random));
    drawMotion(random, shot);
    for (int k = 0; k < steps.size(); k++) {
      double offset = drift[k] == null ? 0 : drift[k].draw(random);
      if (doppler) {
        for (int a = 0; a < 3; a++) {
          offset -= waveVector[k][a] * shot.velocity[a] / (2 * Math.PI);
        }
      }
      setting.laserOffset[k] = offset;
      double relative = intensity[k] == null ? 1 : Math.max(0, 1 + intensity[k].draw(random));
      setting.fieldFactor[k] = Math.sqrt(relative) * fieldFactor(k, shot, 0);
    }
    int last = steps.size() - 1;
    if (frequencyError != null) {
      setting.laserOffset[last] += frequencyError.draw(random);
    }
    if (magnetic != null) {
      setting.magneticTesla = magnetic.draw(random);
    }
    if (electric != null) {
      setting.targetHertz += starkHertz(random);
    }
    if (trapHertz != 0) {
      setting.targetHertz += trapHertz * random.nextGaussian();
    }
  }

  private void drawMotion(RandomGenerator random, Shot shot) {
    for (int a = 0; a < 3; a++) {
      shot.velocity[a] =
          doppler || moves
              ? motion.orElseThrow().velocityMetresPerSecond(a) * random.nextGaussian()
              : 0;
      shot.position[a] =
          displaced && motion.isPresent() && motion.get().isTrapped()
              ? motion.get().positionMetres(a) * random.nextGaussian()
              : 0;
    }
    for (int k = 0; k < pointing.length; k++) {
      if (pointing[k] == 0) {
        continue;
      }
      double one = pointing[k] * random.nextGaussian();
      double two = pointing[k] * random.nextGaussian();
      for (int a = 0; a < 3; a++) {
        shot.pointing[k][a] = one * across[k][0][a] + two * across[k][1][a];
      }
    }
  }

  /**
   * Field of a beam at the atom, over the calibrated one; time counts from the middle of the pulse.
   */
  private double fieldFactor(int step, Shot shot, double seconds) {
    if (!displaced) {
      return 1;
    }
    double[] at = shot.pointing[step];
    return steps
            .get(step)
            .fieldFactorAt(
                shot.position[0] + shot.velocity[0] * seconds - at[0],
                shot.position[1] + shot.velocity[1] * seconds - at[1],
                shot.position[2] + shot.velocity[2] * seconds - at[2])
        / meanField[step];
  }

  /** Intensity at a time over that in the middle of the pulse, less one. */
  double relativeIntensityChange(int step, Shot shot, double secondsFromMiddle) {
    double ratio = fieldFactor(step, shot, secondsFromMiddle) / fieldFactor(step, shot, 0);
    return ratio * ratio - 1;
  }

  private double starkHertz(RandomGenerator random) {
    if (electric.isGaussian()) {
      double rms = electric.rms() / Math.sqrt(3);
      return stark.hertz(
          rms * random.nextGaussian(), rms * random.nextGaussian(), rms * random.nextGaussian());
    }
    double length = electric.draw(random);
    double x = random.nextGaussian();
    double y = random.nextGaussian();
    double z = random.nextGaussian();
    double scale = length / Math.sqrt(x * x + y * y + z * z);
    return stark.hertz(scale * x, scale * y, scale * z);
  }
}
