package org.toprung.core.radial;

/** A normalized wave on the grid x = ih, see {@link NumerovSolver}. */
final class RadialWave {
  private final double step;
  private final int first;
  private final double[] y;
  private final int nodes;

  /** Takes over the array. */
  RadialWave(double step, int first, double[] y, int nodes) {
    this.step = step;
    this.first = first;
    this.y = y;
    this.nodes = nodes;
  }

  /** Nodes outside the inner cut. */
  int nodes() {
    return nodes;
  }

  /** Radius of the inner cut in a0. */
  double innerRadius() {
    return first * step * first * step;
  }

  /** ∫ P_a r P_b dr = 2∫ x⁴ y_a y_b dx. */
  double dipole(RadialWave other) {
    int from = Math.max(first, other.first);
    int to = Math.min(y.length, other.y.length);
    double sum = 0;
    for (int i = from; i < to; i++) {
      double x2 = (double) i * i;
      sum += x2 * x2 * y[i] * other.y[i];
    }
    return 2 * Math.pow(step, 5) * sum;
  }

  /**
   * ∫ P_a w(r) P_b dr = 2∫ x² y_a y_b w dx.
   *
   * @param weight w by grid index; zero beyond its end
   */
  double weighted(RadialWave other, double[] weight) {
    int from = Math.max(first, other.first);
    int to = Math.min(weight.length, Math.min(y.length, other.y.length));
    double sum = 0;
    for (int i = from; i < to; i++) {
      sum += (double) i * i * y[i] * other.y[i] * weight[i];
    }
    return 2 * step * step * step * sum;
  }
}
