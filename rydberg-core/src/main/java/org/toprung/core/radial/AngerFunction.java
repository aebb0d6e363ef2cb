package org.toprung.core.radial;

/**
 * The Anger function J_s(z) = (1/π)∫_0^π cos(sθ − z sin θ) dθ and its derivative (DLMF 11.10.1), by
 * Gauss-Legendre quadrature on panels that each hold at most one radian of phase; relative error
 * 1e-13 of the largest value of the integrand.
 */
final class AngerFunction {
  private static final double[] NODE = {
    0.1834346424956498, 0.5255324099163290, 0.7966664774136267, 0.9602898564975363
  };
  private static final double[] WEIGHT = {
    0.3626837833783620, 0.3137066458778873, 0.2223810344533745, 0.1012285362903763
  };

  private final double value;
  private final double derivative;

  private AngerFunction(double value, double derivative) {
    this.value = value;
    this.derivative = derivative;
  }

  /** The function of order s at z. */
  static AngerFunction of(double s, double z) {
    int panels = 2 + (int) Math.ceil(Math.PI * (Math.abs(s) + Math.abs(z)));
    double half = Math.PI / (2 * panels);
    double value = 0;
    double derivative = 0;
    for (int panel = 0; panel < panels; panel++) {
      double middle = (2 * panel + 1) * half;
      for (int i = 0; i < NODE.length; i++) {
        for (int side = -1; side <= 1; side += 2) {
          double theta = middle + side * half * NODE[i];
          double sine = Math.sin(theta);
          double phase = s * theta - z * sine;
          value += WEIGHT[i] * Math.cos(phase);
          derivative += WEIGHT[i] * sine * Math.sin(phase);
        }
      }
    }
    return new AngerFunction(value * half / Math.PI, derivative * half / Math.PI);
  }

  /** J_s(z). */
  double value() {
    return value;
  }

  /** dJ_s/dz. */
  double derivative() {
    return derivative;
  }
}
