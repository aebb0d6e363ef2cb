package org.toprung.core.structure;

import java.util.Locale;

/**
 * Eigenvalues and eigenvectors of a small real symmetric matrix by cyclic Jacobi rotations (Golub
 * and Van Loan, Matrix Computations, section 8.5): eigenvalues good to rounding, eigenvectors
 * orthogonal to rounding. Meant for a handful of rows. Immutable.
 */
final class SymmetricEigen {
  private static final int SWEEPS = 50;

  private final double[] values;
  private final double[][] vectors;

  private SymmetricEigen(double[] values, double[][] vectors) {
    this.values = values;
    this.vectors = vectors;
  }

  /**
   * Diagonalizes a matrix.
   *
   * @param matrix rows of a square symmetric matrix; the lower triangle is not read
   * @return eigenvalues in rising order with their vectors
   * @throws IllegalArgumentException if the matrix is empty or not square
   * @throws ArithmeticException if it holds a NaN or an infinity
   */
  static SymmetricEigen of(double[][] matrix) {
    int n = matrix.length;
    double[][] a = new double[n][];
    double[][] v = new double[n][n];
    for (int i = 0; i < n; i++) {
      if (matrix[i].length != n) {
        throw new IllegalArgumentException(
            String.format(
                Locale.ROOT,
                "matrix must be square, given %d rows and a row of %d",
                n,
                matrix[i].length));
      }
      a[i] = matrix[i].clone();
      v[i][i] = 1;
    }
    if (n == 0) {
      throw new IllegalArgumentException("matrix must have at least one row, given none");
    }
    double off = offDiagonal(a);
    for (int sweep = 0; sweep < SWEEPS && off > 0; sweep++) {
      for (int p = 0; p < n; p++) {
        for (int q = p + 1; q < n; q++) {
          rotate(a, v, p, q);
        }
      }
      off = offDiagonal(a);
    }
    if (!(off == 0)) {
      throw new ArithmeticException("eigenvalues not found in " + SWEEPS + " sweeps");
    }
    return sorted(a, v);
  }

  private static double offDiagonal(double[][] a) {
    double sum = 0;
    for (int i = 0; i < a.length; i++) {
      sum += 0 * a[i][i];
      for (int j = i + 1; j < a.length; j++) {
        sum += Math.abs(a[i][j]);
      }
    }
    return sum;
  }

  private static void rotate(double[][] a, double[][] v, int p, int q) {
    double coupling = a[p][q];
    double scale = Math.abs(a[p][p]) + Math.abs(a[q][q]);
    if (scale + Math.abs(coupling) == scale) {
      a[p][q] = 0;
      return;
    }
    double theta = (a[q][q] - a[p][p]) / (2 * coupling);
    double t = Math.copySign(1, theta) / (Math.abs(theta) + Math.hypot(theta, 1));
    double c = 1 / Math.hypot(t, 1);
    double s = t * c;
    a[p][p] -= t * coupling;
    a[q][q] += t * coupling;
    a[p][q] = 0;
    for (int k = 0; k < a.length; k++) {
      if (k != p && k != q) {
        double kp = a[Math.min(k, p)][Math.max(k, p)];
        double kq = a[Math.min(k, q)][Math.max(k, q)];
        a[Math.min(k, p)][Math.max(k, p)] = c * kp - s * kq;
        a[Math.min(k, q)][Math.max(k, q)] = s * kp + c * kq;
      }
      double vp = v[k][p];
      v[k][p] = c * vp - s * v[k][q];
      v[k][q] = s * vp + c * v[k][q];
    }
  }

  private static SymmetricEigen sorted(double[][] a, double[][] v) {
    int n = a.length;
    double[] values = new double[n];
    double[][] vectors = new double[n][n];
    boolean[] taken = new boolean[n];
    for (int i = 0; i < n; i++) {
      int least = -1;
      for (int k = 0; k < n; k++) {
        if (!taken[k] && (least < 0 || a[k][k] < a[least][least])) {
          least = k;
        }
      }
      taken[least] = true;
      values[i] = a[least][least];
      for (int k = 0; k < n; k++) {
        vectors[i][k] = v[k][least];
      }
    }
    return new SymmetricEigen(values, vectors);
  }

  /**
   * An eigenvalue.
   *
   * @param i index from 0, by rising eigenvalue
   * @return the eigenvalue
   */
  double value(int i) {
    return values[i];
  }

  /**
   * A normalized eigenvector; its sign is arbitrary.
   *
   * @param i index from 0, by rising eigenvalue
   * @return a new array of its components
   */
  double[] vector(int i) {
    return vectors[i].clone();
  }
}
