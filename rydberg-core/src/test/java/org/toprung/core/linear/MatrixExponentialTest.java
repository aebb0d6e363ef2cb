package org.toprung.core.linear;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;

import java.util.SplittableRandom;
import org.apache.commons.math4.legacy.linear.Array2DRowRealMatrix;
import org.apache.commons.math4.legacy.linear.EigenDecomposition;
import org.apache.commons.math4.legacy.linear.RealMatrix;
import org.junit.jupiter.api.Test;

class MatrixExponentialTest {

  /** Exact: exp(−iφ σ_x) = cos φ − i σ_x sin φ. */
  @Test
  void rotatesATwoLevelSystemAsTheClosedFormSays() {
    for (double phi : new double[] {1e-8, 0.3, 1.7, 40, 3000}) {
      ComplexMatrix a = ComplexMatrix.zeros(2, 2);
      a.set(0, 1, 0, -phi);
      a.set(1, 0, 0, -phi);
      ComplexMatrix out = ComplexMatrix.zeros(2, 2);
      MatrixExponential.ofSize(2).compute(a, out);
      double rounding = 1e-14 * Math.max(1, phi);
      assertEquals(Math.cos(phi), out.re(0, 0), rounding);
      assertEquals(0, out.im(0, 0), rounding);
      assertEquals(-Math.sin(phi), out.im(0, 1), rounding);
      assertEquals(0, out.re(1, 0), rounding);
    }
  }

  /** Exact: exp of a nilpotent matrix is a finite polynomial. */
  @Test
  void sumsANilpotentMatrixExactly() {
    ComplexMatrix a = ComplexMatrix.zeros(3, 3);
    a.set(0, 1, 2, 0);
    a.set(1, 2, 0, 3);
    ComplexMatrix out = ComplexMatrix.zeros(3, 3);
    MatrixExponential.ofSize(3).compute(a, out);
    assertEquals(1, out.re(0, 0), 1e-14);
    assertEquals(2, out.re(0, 1), 1e-13);
    assertEquals(3, out.im(1, 2), 1e-13);
    assertEquals(3, out.im(0, 2), 1e-13); // ½ · 2 · 3i
    assertEquals(0, out.re(2, 0), 1e-14);
  }

  /** Validation against the eigenvectors of Commons Math on random real symmetric matrices. */
  @Test
  void agreesWithDiagonalizationOfRandomHermitianMatrices() {
    SplittableRandom random = new SplittableRandom(7);
    for (int n = 1; n <= 9; n++) {
      RealMatrix h = new Array2DRowRealMatrix(n, n);
      ComplexMatrix a = ComplexMatrix.zeros(n, n);
      for (int i = 0; i < n; i++) {
        for (int j = 0; j <= i; j++) {
          double x = 20 * random.nextGaussian();
          h.setEntry(i, j, x);
          h.setEntry(j, i, x);
          a.set(i, j, 0, -x);
          a.set(j, i, 0, -x);
        }
      }
      EigenDecomposition eigen = new EigenDecomposition(h);
      ComplexMatrix out = ComplexMatrix.zeros(n, n);
      MatrixExponential.ofSize(n).compute(a, out);
      for (int i = 0; i < n; i++) {
        for (int j = 0; j < n; j++) {
          double re = 0;
          double im = 0;
          for (int k = 0; k < n; k++) {
            double weight = eigen.getV().getEntry(i, k) * eigen.getV().getEntry(j, k);
            re += weight * Math.cos(eigen.getRealEigenvalue(k));
            im -= weight * Math.sin(eigen.getRealEigenvalue(k));
          }
          assertEquals(re, out.re(i, j), 1e-11);
          assertEquals(im, out.im(i, j), 1e-11);
        }
      }
    }
  }

  @Test
  void mayWriteOverItsArgument() {
    ComplexMatrix a = ComplexMatrix.zeros(1, 1);
    a.set(0, 0, -0.5, 0.25);
    MatrixExponential.ofSize(1).compute(a, a);
    assertEquals(Math.exp(-0.5) * Math.cos(0.25), a.re(0, 0), 1e-15);
    assertEquals(Math.exp(-0.5) * Math.sin(0.25), a.im(0, 0), 1e-15);
  }

  @Test
  void refusesWhatIsNotFinite() {
    for (double bad : new double[] {Double.NaN, Double.POSITIVE_INFINITY}) {
      ComplexMatrix a = ComplexMatrix.zeros(2, 2);
      a.set(1, 0, bad, 0);
      assertThrows(ArithmeticException.class, () -> MatrixExponential.ofSize(2).compute(a, a));
    }
  }

  @Test
  void refusesShapesThatDoNotFit() {
    ComplexMatrix a = ComplexMatrix.zeros(2, 3);
    assertThrows(IllegalArgumentException.class, () -> a.times(a));
    assertThrows(IllegalArgumentException.class, () -> ComplexMatrix.zeros(0, 1));
    assertThrows(IllegalArgumentException.class, () -> a.copyFrom(ComplexMatrix.identity(2)));
  }
}
