package org.toprung.budget.dynamics;

import org.toprung.core.linear.ComplexMatrix;
import org.toprung.core.linear.MatrixExponential;

/** The propagator exp(−2πi (H/h) t) of a constant Hamiltonian. */
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
    for (int i = 0; i < n; i++) {
      for (int j = 0; j < n; j++) {
        // −i (a + ib) = b − ia
        m.set(i, j, phase * im[i * n + j], -phase * re[i * n + j]);
      }
    }
  }
}
