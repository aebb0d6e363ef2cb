package org.toprung.core.linear;

import java.util.Arrays;

/**
 * A dense complex matrix with separate, row-major real and imaginary parts.
 *
 * <p>Mutable and meant to be reused: operations that produce a matrix write into {@code this},
 * which must not be one of the operands. Not thread-safe.
 */
public final class ComplexMatrix {
  private final int rows;
  private final int columns;
  private final double[] re;
  private final double[] im;

  private ComplexMatrix(int rows, int columns) {
    this.rows = rows;
    this.columns = columns;
    this.re = new double[rows * columns];
    this.im = new double[rows * columns];
  }

  /**
   * A zero matrix.
   *
   * @param rows number of rows, at least 1
   * @param columns number of columns, at least 1
   * @return a new matrix of zeros
   */
  public static ComplexMatrix zeros(int rows, int columns) {
    if (rows < 1 || columns < 1) {
      throw new IllegalArgumentException(
          "a matrix needs at least one row and one column, not " + rows + " x " + columns);
    }
    return new ComplexMatrix(rows, columns);
  }

  /**
   * The unit matrix.
   *
   * @param n number of rows and columns
   * @return a new unit matrix
   */
  public static ComplexMatrix identity(int n) {
    ComplexMatrix m = zeros(n, n);
    for (int i = 0; i < n; i++) {
      m.re[i * n + i] = 1;
    }
    return m;
  }

  /**
   * The number of rows.
   *
   * @return the number of rows
   */
  public int rows() {
    return rows;
  }

  /**
   * The number of columns.
   *
   * @return the number of columns
   */
  public int columns() {
    return columns;
  }

  /**
   * Real part of an element.
   *
   * @param row row index
   * @param column column index
   * @return the real part
   */
  public double re(int row, int column) {
    return re[row * columns + column];
  }

  /**
   * Imaginary part of an element.
   *
   * @param row row index
   * @param column column index
   * @return the imaginary part
   */
  public double im(int row, int column) {
    return im[row * columns + column];
  }

  /**
   * Sets an element.
   *
   * @param row row index
   * @param column column index
   * @param real new real part
   * @param imaginary new imaginary part
   */
  public void set(int row, int column, double real, double imaginary) {
    re[row * columns + column] = real;
    im[row * columns + column] = imaginary;
  }

  /**
   * Adds to an element.
   *
   * @param row row index
   * @param column column index
   * @param real real part to add
   * @param imaginary imaginary part to add
   */
  public void add(int row, int column, double real, double imaginary) {
    re[row * columns + column] += real;
    im[row * columns + column] += imaginary;
  }

  /** Sets every element to zero. */
  public void clear() {
    Arrays.fill(re, 0);
    Arrays.fill(im, 0);
  }

  /**
   * Copies another matrix of the same shape into this one.
   *
   * @param other matrix to copy
   */
  public void copyFrom(ComplexMatrix other) {
    requireShape(other.rows, other.columns);
    System.arraycopy(other.re, 0, re, 0, re.length);
    System.arraycopy(other.im, 0, im, 0, im.length);
  }

  /**
   * Adds a real multiple of another matrix of the same shape.
   *
   * @param factor real factor
   * @param other matrix to add
   */
  public void addScaled(double factor, ComplexMatrix other) {
    requireShape(other.rows, other.columns);
    for (int i = 0; i < re.length; i++) {
      re[i] += factor * other.re[i];
      im[i] += factor * other.im[i];
    }
  }

  /**
   * Multiplies every element by a complex number.
   *
   * @param real real part of the factor
   * @param imaginary imaginary part of the factor
   */
  public void scale(double real, double imaginary) {
    for (int i = 0; i < re.length; i++) {
      double a = re[i];
      double b = im[i];
      re[i] = a * real - b * imaginary;
      im[i] = a * imaginary + b * real;
    }
  }

  /**
   * Sets this matrix to the product of two others.
   *
   * @param a left factor, not this matrix
   * @param b right factor, not this matrix
   */
  public void setProduct(ComplexMatrix a, ComplexMatrix b) {
    if (a.columns != b.rows) {
      throw new IllegalArgumentException(
          "cannot multiply a matrix of " + a.columns + " columns by one of " + b.rows + " rows");
    }
    requireShape(a.rows, b.columns);
    for (int i = 0; i < rows; i++) {
      int out = i * columns;
      Arrays.fill(re, out, out + columns, 0);
      Arrays.fill(im, out, out + columns, 0);
      for (int k = 0; k < a.columns; k++) {
        double ar = a.re[i * a.columns + k];
        double ai = a.im[i * a.columns + k];
        if (ar == 0 && ai == 0) {
          continue;
        }
        int in = k * columns;
        for (int j = 0; j < columns; j++) {
          double br = b.re[in + j];
          double bi = b.im[in + j];
          re[out + j] += ar * br - ai * bi;
          im[out + j] += ar * bi + ai * br;
        }
      }
    }
  }

  /**
   * The conjugate transpose.
   *
   * @return a new matrix
   */
  public ComplexMatrix adjoint() {
    ComplexMatrix m = zeros(columns, rows);
    for (int i = 0; i < rows; i++) {
      for (int j = 0; j < columns; j++) {
        m.re[j * rows + i] = re[i * columns + j];
        m.im[j * rows + i] = -im[i * columns + j];
      }
    }
    return m;
  }

  /**
   * A product as a new matrix.
   *
   * @param right right factor
   * @return this matrix times {@code right}
   */
  public ComplexMatrix times(ComplexMatrix right) {
    ComplexMatrix m = zeros(rows, right.columns);
    m.setProduct(this, right);
    return m;
  }

  /**
   * Multiplies a complex vector: {@code out = this · v}.
   *
   * @param vRe real parts of the vector
   * @param vIm imaginary parts of the vector
   * @param outRe real parts of the result, not the same array as {@code vRe}
   * @param outIm imaginary parts of the result, not the same array as {@code vIm}
   */
  public void multiply(double[] vRe, double[] vIm, double[] outRe, double[] outIm) {
    for (int i = 0; i < rows; i++) {
      double sr = 0;
      double si = 0;
      int row = i * columns;
      for (int j = 0; j < columns; j++) {
        double ar = re[row + j];
        double ai = im[row + j];
        sr += ar * vRe[j] - ai * vIm[j];
        si += ar * vIm[j] + ai * vRe[j];
      }
      outRe[i] = sr;
      outIm[i] = si;
    }
  }

  /**
   * The largest sum of moduli over a row: an upper bound of the spectral radius.
   *
   * @return the infinity norm
   */
  public double norm() {
    double max = 0;
    for (int i = 0; i < rows; i++) {
      double sum = 0;
      for (int j = 0; j < columns; j++) {
        sum += Math.hypot(re[i * columns + j], im[i * columns + j]);
      }
      max = Math.max(max, sum);
    }
    return max;
  }

  private void requireShape(int r, int c) {
    if (rows != r || columns != c) {
      throw new IllegalArgumentException(
          "expected a " + r + " x " + c + " matrix, this one is " + rows + " x " + columns);
    }
  }
}
