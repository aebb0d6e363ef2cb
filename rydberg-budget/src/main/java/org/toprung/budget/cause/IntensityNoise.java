package org.toprung.budget.cause;

/**
 * Shot-to-shot noise of one beam's intensity: the Rabi frequency follows its square root, the light
 * shift of start and target follows it in proportion, both in the same shot.
 */
final class IntensityNoise extends Disturbance {
  private final int step;
  private final double relative;

  IntensityNoise(int step, double relative) {
    super(
        "Intensity noise, step " + (step + 1),
        "the rms intensity noise of step " + (step + 1),
        "exact square-pulse response, Rabi frequency and light shift jointly");
    this.step = step;
    this.relative = relative;
  }

  @Override
  double error(PulseModel model, double scale) {
    double shift = model.resonanceShiftHertz(step);
    return NormalAverage.of(
            x -> {
              double intensity = Math.max(0, 1 + scale * relative * x);
              return model.twoLevelError(
                  Math.sqrt(intensity), model.offsetHertz() - (intensity - 1) * shift);
            })
        - model.baseline();
  }
}
