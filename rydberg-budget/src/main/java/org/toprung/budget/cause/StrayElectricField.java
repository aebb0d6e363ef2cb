package org.toprung.budget.cause;

/**
 * Residual electric field, random in direction: a Stark shift −½αE² of the target whose mean, which
 * nobody calibrated, counts as well as its spread.
 */
final class StrayElectricField extends Disturbance {
  private final double component; // V/m

  StrayElectricField(double rmsVoltsPerMetre) {
    super(
        "Electric field",
        "the residual electric field",
        "exact square-pulse response over an isotropic Gaussian field; static polarizability by sum"
            + " over states");
    this.component = rmsVoltsPerMetre / Math.sqrt(3);
  }

  @Override
  double error(PulseModel model, double scale) {
    double e = scale * component;
    return NormalAverage.of(
            (x, y, z) ->
                model.twoLevelError(
                    1, model.offsetHertz() - model.starkShiftHertz(e * x, e * y, e * z)))
        - model.baseline();
  }
}
