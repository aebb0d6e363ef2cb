package org.toprung.budget.cause;

import java.util.function.DoubleUnaryOperator;
import org.apache.commons.math4.legacy.analysis.integration.gauss.GaussIntegrator;
import org.apache.commons.math4.legacy.analysis.integration.gauss.GaussIntegratorFactory;

/**
 * Averages over independent standard normal variables by Gauss-Hermite quadrature, exact for
 * polynomials to degree 41 in one variable and 17 in each of three.
 *
 * <p>Immutable and thread-safe.
 */
final class NormalAverage {
  private static final NormalAverage LINE = new NormalAverage(21);
  private static final NormalAverage SPACE = new NormalAverage(9);

  private final double[] points;
  private final double[] weights;

  /** A function of three variables. */
  @FunctionalInterface
  interface SpaceFunction {
    double value(double x, double y, double z);
  }

  private NormalAverage(int order) {
    GaussIntegrator rule = new GaussIntegratorFactory().hermite(order);
    points = new double[order];
    weights = new double[order];
    for (int i = 0; i < order; i++) {
      // the rule has weight exp(−x²), the normal distribution exp(−x²/2)/√2π
      points[i] = Math.sqrt(2) * rule.getPoint(i);
      weights[i] = rule.getWeight(i) / Math.sqrt(Math.PI);
    }
  }

  static double of(DoubleUnaryOperator f) {
    double sum = 0;
    for (int i = 0; i < LINE.points.length; i++) {
      sum += LINE.weights[i] * f.applyAsDouble(LINE.points[i]);
    }
    return sum;
  }

  static double of(SpaceFunction f) {
    double[] x = SPACE.points;
    double[] w = SPACE.weights;
    double sum = 0;
    for (int i = 0; i < x.length; i++) {
      for (int j = 0; j < x.length; j++) {
        for (int k = 0; k < x.length; k++) {
          sum += w[i] * w[j] * w[k] * f.value(x[i], x[j], x[k]);
        }
      }
    }
    return sum;
  }
}
