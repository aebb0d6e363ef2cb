package org.toprung.budget.dynamics;

import org.toprung.core.linear.ComplexMatrix;
import org.toprung.core.linear.MatrixExponential;

/**
 * exp(−2πi (H/h) t) ψ for a constant, not necessarily Hermitian H.
 *
 * <p>Taylor series on the vector, in substeps whose exponent is at most {@value #SUBSTEP}, the mean
 * of the diagonal taken out first; where that takes more than {@value #MOST_SUBSTEPS} substeps,
 * scaling and squaring of the matrix. Both are good to rounding.
 *
 * <p>Holds workspace: one instance per thread.
 */
final class Propagation {
  private static final double SUBSTEP = 3.0;
  private static final int MOST_SUBSTEPS = 40;
  private static final double NEGLIGIBLE = 1e-30; // squared norm of the last term

  private final int n;
  private final double[] termRe;
  private final double[] termIm;
  private final double[] nextRe;
  private final double[] nextIm;
  private MatrixExponential exponential;
  private ComplexMatrix matrix;

  Propagation(int n) {
    this.n = n;
    this.termRe = new double[n];
    this.termIm = new double[n];
    this.nextRe = new double[n];
    this.nextIm = new double[n];
  }

  /**
   * Advances a state.
   *
   * @param hRe real parts of H/h, Hz
   * @param hIm imaginary parts, Hz
   * @param seconds time
   * @param re state, overwritten
   * @param im state, overwritten
   */
  void advance(double[] hRe, double[] hIm, double seconds, double[] re, double[] im) {
    double middle = middle(hRe);
    double norm = 0;
    for (int i = 0; i < n; i++) {
      double sum = 0;
      for (int j = 0; j < n; j++) {
        double r = hRe[i * n + j] - (i == j ? middle : 0);
        sum += Math.abs(r) + Math.abs(hIm[i * n + j]);
      }
      norm = Math.max(norm, sum);
    }
    double exponent = 2 * Math.PI * norm * seconds;
    if (!(exponent < Double.POSITIVE_INFINITY)) {
      throw new ArithmeticException("cannot propagate with a Hamiltonian of norm " + norm + " Hz");
    }
    int substeps = Math.max(1, (int) Math.min(1e9, Math.ceil(exponent / SUBSTEP)));
    if (substeps > MOST_SUBSTEPS) {
      squared(hRe, hIm, middle, seconds, re, im);
    } else {
      for (int s = 0; s < substeps; s++) {
        taylor(hRe, hIm, middle, 2 * Math.PI * seconds / substeps, re, im);
      }
    }
    rotate(-2 * Math.PI * middle * seconds, re, im);
  }

  /** The propagator itself. */
  static void propagator(
      MatrixExponential exponential,
      int n,
      double[] hRe,
      double[] hIm,
      double seconds,
      ComplexMatrix out) {
    double middle = middle(hRe, n);
    fill(out, n, hRe, hIm, middle, seconds);
    exponential.compute(out, out);
    double phase = -2 * Math.PI * middle * seconds;
    out.scale(Math.cos(phase), Math.sin(phase));
  }

  private double middle(double[] hRe) {
    return middle(hRe, n);
  }

  private static double middle(double[] hRe, int n) {
    double low = Double.POSITIVE_INFINITY;
    double high = Double.NEGATIVE_INFINITY;
    for (int i = 0; i < n; i++) {
      low = Math.min(low, hRe[i * n + i]);
      high = Math.max(high, hRe[i * n + i]);
    }
    return 0.5 * (low + high);
  }

  private static void fill(
      ComplexMatrix m, int n, double[] hRe, double[] hIm, double middle, double seconds) {
    double turn = 2 * Math.PI * seconds;
    for (int i = 0; i < n; i++) {
      for (int j = 0; j < n; j++) {
        // −i (a + ib) = b − ia
        double real = hRe[i * n + j] - (i == j ? middle : 0);
        m.set(i, j, turn * hIm[i * n + j], -turn * real);
      }
    }
  }

  private void squared(
      double[] hRe, double[] hIm, double middle, double seconds, double[] re, double[] im) {
    if (exponential == null) {
      exponential = MatrixExponential.ofSize(n);
      matrix = ComplexMatrix.zeros(n, n);
    }
    fill(matrix, n, hRe, hIm, middle, seconds);
    exponential.compute(matrix, matrix);
    matrix.multiply(re, im, nextRe, nextIm);
    System.arraycopy(nextRe, 0, re, 0, n);
    System.arraycopy(nextIm, 0, im, 0, n);
  }

  private void taylor(
      double[] hRe, double[] hIm, double middle, double turn, double[] re, double[] im) {
    System.arraycopy(re, 0, termRe, 0, n);
    System.arraycopy(im, 0, termIm, 0, n);
    double scale = 0;
    for (int i = 0; i < n; i++) {
      scale += re[i] * re[i] + im[i] * im[i];
    }
    for (int order = 1; order < 60; order++) {
      double square = 0;
      double factor = turn / order;
      for (int i = 0; i < n; i++) {
        double sumRe = -middle * termRe[i];
        double sumIm = -middle * termIm[i];
        int row = i * n;
        for (int j = 0; j < n; j++) {
          double a = hRe[row + j];
          double b = hIm[row + j];
          sumRe += a * termRe[j] - b * termIm[j];
          sumIm += a * termIm[j] + b * termRe[j];
        }
        // times −i
        nextRe[i] = factor * sumIm;
        nextIm[i] = -factor * sumRe;
        square += nextRe[i] * nextRe[i] + nextIm[i] * nextIm[i];
      }
      for (int i = 0; i < n; i++) {
        termRe[i] = nextRe[i];
        termIm[i] = nextIm[i];
        re[i] += nextRe[i];
        im[i] += nextIm[i];
      }
      if (square <= NEGLIGIBLE * scale) {
        return;
      }
    }
  }

  private void rotate(double phase, double[] re, double[] im) {
    double cos = Math.cos(phase);
    double sin = Math.sin(phase);
    for (int i = 0; i < n; i++) {
      double r = re[i];
      re[i] = r * cos - im[i] * sin;
      im[i] = r * sin + im[i] * cos;
    }
  }
}
