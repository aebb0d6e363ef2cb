package org.toprung.budget.cause;

import java.util.ArrayList;
import java.util.List;
import org.toprung.budget.bench.Disturbance;
import org.toprung.budget.bench.Spread;

/**
 * Residual electric field, random in direction: a Stark shift −½αE² of the target whose mean, which
 * nobody calibrated, counts as well as its spread.
 */
final class StrayElectricField extends Halvable {
  private static final int AROUND = 8;
  // Abramowitz and Stegun, table 25.4, n = 5
  private static final double[] COSINE = {
    0, 0.5384693101056831, -0.5384693101056831, 0.9061798459386640, -0.9061798459386640
  };
  private static final double[] WEIGHT = {
    0.5688888888888889,
    0.4786286704993665,
    0.4786286704993665,
    0.2369268850561891,
    0.2369268850561891
  };

  private final Spread length; // V/m

  StrayElectricField(Spread length) {
    super(
        "Electric field",
        "the residual electric field",
        "exact response of the pulse over an isotropic field; static polarizability by sum over"
            + " states",
        new Disturbance(Disturbance.Kind.ELECTRIC_FIELD, Disturbance.COMMON));
    this.length = length;
  }

  @Override
  double error(PulseModel model, double scale) {
    Spread scaled = length.scaled(scale);
    Points shifts = scaled.isGaussian() ? gaussian(model, scaled.rms()) : sampled(model, scaled);
    return shifts.average(hertz -> model.reaction().detuned(-hertz[0])) - model.baseline();
  }

  private static Points gaussian(PulseModel model, double rms) {
    double e = rms / Math.sqrt(3);
    return Points.of(3, x -> new double[] {model.starkShiftHertz(e * x[0], e * x[1], e * x[2])});
  }

  /**
   * Every sample in all directions, by the product rule of Gauss and the trapezoid, five by eight
   * points: exact to degree 7 in the direction cosines.
   */
  private static Points sampled(PulseModel model, Spread lengths) {
    double[] samples = lengths.samples();
    List<double[]> shifts = new ArrayList<>();
    List<Double> weights = new ArrayList<>();
    for (double e : samples) {
      for (int i = 0; i < COSINE.length; i++) {
        double across = e * Math.sqrt(1 - COSINE[i] * COSINE[i]);
        for (int k = 0; k < AROUND; k++) {
          double angle = 2 * Math.PI * k / AROUND;
          double x = across * Math.cos(angle);
          double y = across * Math.sin(angle);
          shifts.add(new double[] {model.starkShiftHertz(x, y, e * COSINE[i])});
          weights.add(WEIGHT[i] / (2 * AROUND * samples.length));
        }
      }
    }
    return Points.merged(shifts, weights);
  }
}
