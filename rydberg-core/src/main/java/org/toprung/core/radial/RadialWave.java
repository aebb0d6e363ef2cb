package org.toprung.core.radial;

/** A normalized wave on the grid x = ih, see {@link NumerovSolver}. */
final class RadialWave {
  private static final double CORE_REACH = 100;

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

  /** ∫ P_a r P_b dr = 2∫ x⁴ y_a y_b dx. */
  double dipole(RadialWave other) {
    int from = Math.max(first, other.first);
    int to = Math.min(y.length, other.y.length);
    double sum = 0;
    for (int i = from; i < to; i++) {
      double x2 = (double) i * i;
      sum += x2 * x2 * (y[i] * other.y[i]);
    }
    return 2 * Math.pow(step, 5) * sum;
  }

  /**
   * ∫ P_a r (r² + r_c²)^−3/2 P_b dr = 2∫ x⁴ (x⁴ + r_c²)^−3/2 y_a y_b dx, up to 100 a0: further out
   * the operator is below 2e-5 of r.
   */
  double corePolarization(RadialWave other, double rc) {
    int from = Math.max(first, other.first);
    int outermost = (int) (Math.sqrt(CORE_REACH) / step);
    int to = Math.min(outermost, Math.min(y.length, other.y.length));
    double sum = 0;
    for (int i = from; i < to; i++) {
      double x2 = i * step * i * step;
      double square = x2 * x2;
      double distance = square + rc * rc;
      sum += square / (distance * Math.sqrt(distance)) * (y[i] * other.y[i]);
    }
    return 2 * step * sum;
  }

  /** ∫ P_a r^k P_b dr = 2∫ x^(2k+2) y_a y_b dx. */
  double power(RadialWave other, int k) {
    int from = Math.max(first, other.first);
    int to = Math.min(y.length, other.y.length);
    double sum = 0;
    for (int i = from; i < to; i++) {
      sum += Math.pow(i * step, 2 * k + 2) * (y[i] * other.y[i]);
    }
    return 2 * step * sum;
  }

  /** The wave P = √x y on its grid, stretched by a factor. */
  Wavefunction table(double lengthScale) {
    double[] radii = new double[y.length - first];
    double[] values = new double[radii.length];
    for (int i = 0; i < radii.length; i++) {
      double x = (first + i) * step;
      radii[i] = lengthScale * x * x;
      values[i] = Math.sqrt(x / lengthScale) * y[first + i];
    }
    return new Wavefunction(radii, values);
  }
}
