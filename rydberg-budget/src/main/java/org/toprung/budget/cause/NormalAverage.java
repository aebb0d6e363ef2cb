package org.toprung.budget.cause;

import org.apache.commons.math4.legacy.analysis.integration.gauss.GaussIntegrator;
import org.apache.commons.math4.legacy.analysis.integration.gauss.GaussIntegratorFactory;

/**
 * Points for averages over several independent standard normal variables: a product of
 * Gauss-Hermite rules of n points each, exact to degree 2n − 1: 9 in up to three dimensions, 7 in
 * four, 5 in five, 4 in six, 3 above.
 *
 * <p>Immutable and thread-safe.
 */
final class NormalAverage {
  private final int dimensions;
  private final double[] points;
  private final double[] weights;

  private NormalAverage(int dimensions, int order) {
    this.dimensions = dimensions;
    GaussIntegrator rule = new GaussIntegratorFactory().hermite(order);
    points = new double[order];
    weights = new double[order];
    for (int i = 0; i < order; i++) {
      // the rule has weight exp(−x²), the normal distribution exp(−x²/2)/√2π
      points[i] = Math.sqrt(2) * rule.getPoint(i);
      weights[i] = rule.getWeight(i) / Math.sqrt(Math.PI);
    }
  }

  static NormalAverage ofDimensions(int dimensions) {
    int order = 3;
    if (dimensions <= 3) {
      order = 9;
    } else if (dimensions <= 5) {
      order = dimensions == 4 ? 7 : 5;
    } else if (dimensions == 6) {
      order = 4;
    }
    return new NormalAverage(dimensions, order);
  }

  /** What is done with a point of the rule. */
  @FunctionalInterface
  interface Visitor {
    /** The array is used again for the next point. */
    void visit(double[] point, double weight);
  }

  /** Goes through all points; their weights add up to 1. */
  void forEach(Visitor visitor) {
    nested(visitor, new double[dimensions], 0, 1);
  }

  private void nested(Visitor visitor, double[] x, int dimension, double weight) {
    if (dimension == dimensions) {
      visitor.visit(x, weight);
      return;
    }
    for (int i = 0; i < points.length; i++) {
      x[dimension] = points[i];
      nested(visitor, x, dimension + 1, weight * weights[i]);
    }
  }
}
