package org.toprung.budget.cause;

import org.toprung.budget.bench.Disturbance;
import org.toprung.budget.bench.Spread;

/**
 * Intensity of one beam that differs from shot to shot. The Rabi frequency follows its square root
 * and the light shift by that beam follows it in proportion, both in the same shot.
 */
final class IntensityNoise extends Halvable {
  private final int step;
  private final Spread relative;

  IntensityNoise(int step, Spread relative) {
    super(
        "Intensity noise, step " + (step + 1),
        "the rms intensity noise of step " + (step + 1),
        "response of the pulse to Rabi frequency and light shift jointly, averaged exactly;"
            + " (πσ/4)² + (σ·shift/Ω)² for a weak disturbance of a square π pulse",
        new Disturbance(Disturbance.Kind.INTENSITY, step));
    this.step = step;
    this.relative = relative;
  }

  @Override
  double error(PulseModel model, double scale) {
    return relative
            .scaled(scale)
            .average(x -> model.reaction().brightened(step, Math.max(0, 1 + x)))
        - model.baseline();
  }
}
