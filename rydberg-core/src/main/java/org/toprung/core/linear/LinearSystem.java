package org.toprung.core.linear;

/**
 * A complex square system of equations, factored once and solved for several right-hand sides.
 *
 * <p>Gaussian elimination with partial pivoting (Golub and Van Loan, Matrix Computations, section
 * 3.4). Immutable after construction; {@link #solve} works on its arguments alone, so that one
 * instance can serve several threads.
 */
public final class LinearSystem {
  private final int n;
  private final double[] re;
  private final double[] im;
  private final int[] row;

  private LinearSystem(ComplexMatrix a) {
    this.n = a.rows();
    this.re = new double[n * n];
    this.im = new double[n * n];
    this.row = new int[n];
    for (int i = 0; i < n; i++) {
      row[i] = i;
      for (int j = 0; j < n; j++) {
        re[i * n + j] = a.re(i, j);
        im[i * n + j] = a.im(i, j);
      }
    }
    for (int k = 0; k < n; k++) {
      pivot(k);
      for (int i = k + 1; i < n; i++) {
        eliminate(i, k);
      }
    }
  }

  /**
   * Factors a matrix.
   *
   * @param a a square matrix
   * @return the factored system
   * @throws IllegalArgumentException if the matrix is not square
   * @throws ArithmeticException if it is singular or holds a NaN
   */
  public static LinearSystem of(ComplexMatrix a) {
    if (a.rows() != a.columns()) {
      throw new IllegalArgumentException(
          "a linear system needs a square matrix, not " + a.rows() + " x " + a.columns());
    }
    return new LinearSystem(a);
  }

  private void pivot(int k) {
    int best = k;
    double largest = 0;
    for (int i = k; i < n; i++) {
      double size = Math.hypot(re[row[i] * n + k], im[row[i] * n + k]);
      if (size > largest) {
        largest = size;
        best = i;
      }
    }
    if (!(largest > 0)) {
      throw new ArithmeticException("the matrix is singular in column " + k);
    }
    int swap = row[k];
    row[k] = row[best];
    row[best] = swap;
  }

  private void eliminate(int i, int k) {
    int pivot = row[k] * n;
    int target = row[i] * n;
    double dRe = re[pivot + k];
    double dIm = im[pivot + k];
    double square = dRe * dRe + dIm * dIm;
    double fRe = (re[target + k] * dRe + im[target + k] * dIm) / square;
    double fIm = (im[target + k] * dRe - re[target + k] * dIm) / square;
    re[target + k] = fRe;
    im[target + k] = fIm;
    if (fRe == 0 && fIm == 0) {
      return;
    }
    for (int j = k + 1; j < n; j++) {
      re[target + j] -= fRe * re[pivot + j] - fIm * im[pivot + j];
      im[target + j] -= fRe * im[pivot + j] + fIm * re[pivot + j];
    }
  }

  /**
   * Solves for one right-hand side.
   *
   * @param vRe real parts of the right-hand side; receives the solution
   * @param vIm imaginary parts of the right-hand side; receives the solution
   */
  public void solve(double[] vRe, double[] vIm) {
    double[] xRe = new double[n];
    double[] xIm = new double[n];
    for (int i = 0; i < n; i++) {
      double sRe = vRe[row[i]];
      double sIm = vIm[row[i]];
      int r = row[i] * n;
      for (int j = 0; j < i; j++) {
        sRe -= re[r + j] * xRe[j] - im[r + j] * xIm[j];
        sIm -= re[r + j] * xIm[j] + im[r + j] * xRe[j];
      }
      xRe[i] = sRe;
      xIm[i] = sIm;
    }
    for (int i = n - 1; i >= 0; i--) {
      int r = row[i] * n;
      double sRe = xRe[i];
      double sIm = xIm[i];
      for (int j = i + 1; j < n; j++) {
        sRe -= re[r + j] * xRe[j] - im[r + j] * xIm[j];
        sIm -= re[r + j] * xIm[j] + im[r + j] * xRe[j];
      }
      double dRe = re[r + i];
      double dIm = im[r + i];
      double square = dRe * dRe + dIm * dIm;
      xRe[i] = (sRe * dRe + sIm * dIm) / square;
      xIm[i] = (sIm * dRe - sRe * dIm) / square;
    }
    System.arraycopy(xRe, 0, vRe, 0, n);
    System.arraycopy(xIm, 0, vIm, 0, n);
  }
}
