package org.toprung.budget.dynamics;

import org.toprung.core.linear.ComplexMatrix;
import org.toprung.core.linear.MatrixExponential;

/**
 * The propagator exp(−2πi (H/h) t) of a constant Hamiltonian, up to a phase common to all states:
 * the middle of the diagonal is taken as zero, which keeps the exponent small.
 */
final class Evolution {
  private Evolution() {}

  static ComplexMatrix propagator(
      MatrixExponential exponential, int n, double[] re, double[] im, double seconds) {
    ComplexMatrix m = ComplexMatrix.zeros(n, n);
    fill(m, n, re, im, seconds);
    exponential.compute(m, m);
    return m;
  }

  static void fill(ComplexMatrix m, int n, double[] re, double[] im, double seconds) {
    double phase = 2 * Math.PI * seconds;
    double low = Double.POSITIVE_INFINITY;
    double high = Double.NEGATIVE_INFINITY;
    for (int i = 0; i < n; i++) {
      low = Math.min(low, re[i * n + i]);
      high = Math.max(high, re[i * n + i]);
    }
    double middle = 0.5 * (low + high);
    for (int i = 0; i < n; i++) {
      for (int j = 0; j < n; j++) {
        double real = re[i * n + j] - (i == j ? middle : 0);
        // −i (a + ib) = b − ia
        m.set(i, j, phase * im[i * n + j], -phase * real);
      }
    }
  }
}
