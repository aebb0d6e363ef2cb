package org.toprung.budget.cause;

import org.toprung.budget.bench.Disturbance;
import org.toprung.budget.bench.Spread;

/**
 * Residual electric field, random in direction: a Stark shift −½αE² of the target whose mean, which
 * nobody calibrated, counts as well as its spread.
 */
final class StrayElectricField extends Halvable {
  private static final NormalAverage SPACE = NormalAverage.ofDimensions(3);

  private final Spread length; // V/m

  StrayElectricField(Spread length) {
    super(
        "Electric field",
        "the residual electric field",
        "exact response of the pulse over an isotropic field; static polarizability by sum over"
            + " states",
        new Disturbance(Disturbance.Kind.ELECTRIC_FIELD, -1));
    this.length = length;
  }

  @Override
  double error(PulseModel model, double scale) {
    if (length.isGaussian()) {
      double e = scale * length.rms() / Math.sqrt(3);
      return SPACE.of(x -> shifted(model, e * x[0], e * x[1], e * x[2])) - model.baseline();
    }
    return length.scaled(scale).average(e -> overDirections(model, e)) - model.baseline();
  }

  /**
   * Mean over the directions of a field of given length by the product rule of Gauss and the
   * trapezoid, five by eight points: exact to degree 7 in the direction cosines.
   */
  private static double overDirections(PulseModel model, double e) {
    double[] cosine = {
      0, 0.5384693101056831, -0.5384693101056831, 0.9061798459386640, -0.9061798459386640
    };
    double[] weight = {
      0.5688888888888889,
      0.4786286704993665,
      0.4786286704993665,
      0.2369268850561891,
      0.2369268850561891
    };
    int around = 8;
    double sum = 0;
    for (int i = 0; i < cosine.length; i++) {
      double across = e * Math.sqrt(1 - cosine[i] * cosine[i]);
      for (int k = 0; k < around; k++) {
        double angle = 2 * Math.PI * k / around;
        sum +=
            weight[i]
                / (2 * around)
                * shifted(model, across * Math.cos(angle), across * Math.sin(angle), e * cosine[i]);
      }
    }
    return sum;
  }

  private static double shifted(PulseModel model, double ex, double ey, double ez) {
    return model.reaction().detuned(-model.starkShiftHertz(ex, ey, ez));
  }
}
