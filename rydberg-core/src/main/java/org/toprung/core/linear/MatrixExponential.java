package org.toprung.core.linear;

/**
 * The exponential of a complex square matrix by scaling and squaring.
 *
 * <p>exp(A) = (exp(A/2^s))^(2^s) with s chosen so that ‖A/2^s‖ ≤ ½; the inner exponential is the
 * Taylor polynomial of degree 12 in the blocked form of Paterson and Stockmeyer, whose truncation
 * error is below ½¹³/13! ≈ 2e-14 relative. Squaring doubles rounding errors, so that the result is
 * good to about 2^s · 1e-16 for the unitary and lossy propagators this is used for.
 *
 * <p>References: Moler and Van Loan, SIAM Review 45, 3 (2003); Paterson and Stockmeyer, SIAM J.
 * Comput. 2, 60 (1973).
 *
 * <p>Holds its workspace: reuse one instance per thread. Not thread-safe.
 */
public final class MatrixExponential {
  private static final double LARGEST_SCALED_NORM = 0.5;
  private static final double[] TAYLOR = new double[13];

  static {
    TAYLOR[0] = 1;
    for (int k = 1; k < TAYLOR.length; k++) {
      TAYLOR[k] = TAYLOR[k - 1] / k;
    }
  }

  private final int n;
  private final ComplexMatrix first;
  private final ComplexMatrix second;
  private final ComplexMatrix third;
  private final ComplexMatrix work;
  private final ComplexMatrix sum;

  private MatrixExponential(int n) {
    this.n = n;
    this.first = ComplexMatrix.zeros(n, n);
    this.second = ComplexMatrix.zeros(n, n);
    this.third = ComplexMatrix.zeros(n, n);
    this.work = ComplexMatrix.zeros(n, n);
    this.sum = ComplexMatrix.zeros(n, n);
  }

  /**
   * A workspace for matrices of one size.
   *
   * @param n number of rows and columns
   * @return a new workspace
   */
  public static MatrixExponential ofSize(int n) {
    return new MatrixExponential(n);
  }

  /**
   * Computes {@code out = exp(a)}.
   *
   * @param a matrix of this workspace's size; left unchanged
   * @param out receives the exponential; may be the same object as {@code a}
   * @throws ArithmeticException if the matrix holds a NaN or an infinity
   */
  public void compute(ComplexMatrix a, ComplexMatrix out) {
    double norm = a.norm();
    if (!(norm < Double.POSITIVE_INFINITY)) {
      throw new ArithmeticException("cannot exponentiate a matrix of norm " + norm);
    }
    int squarings = Math.max(0, Math.getExponent(norm / LARGEST_SCALED_NORM) + 1);
    first.copyFrom(a);
    first.scale(Math.scalb(1.0, -squarings), 0);
    second.setProduct(first, first);
    third.setProduct(second, first);
    // blocks of three powers, Horner in third; the innermost block needs no product
    sum.clear();
    sum.addScaled(TAYLOR[12], third);
    addBlock(9);
    for (int block = 6; block >= 0; block -= 3) {
      work.setProduct(third, sum);
      sum.copyFrom(work);
      addBlock(block);
    }
    for (int s = 0; s < squarings; s++) {
      work.setProduct(sum, sum);
      sum.copyFrom(work);
    }
    out.copyFrom(sum);
  }

  private void addBlock(int block) {
    addDiagonal(sum, TAYLOR[block]);
    sum.addScaled(TAYLOR[block + 1], first);
    sum.addScaled(TAYLOR[block + 2], second);
  }

  private void addDiagonal(ComplexMatrix m, double value) {
    for (int i = 0; i < n; i++) {
      m.add(i, i, value, 0);
    }
  }
}
