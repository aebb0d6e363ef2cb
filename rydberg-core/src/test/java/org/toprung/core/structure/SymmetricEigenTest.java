package org.toprung.core.structure;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Random;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.constraints.IntRange;
import org.apache.commons.math4.legacy.linear.Array2DRowRealMatrix;
import org.apache.commons.math4.legacy.linear.EigenDecomposition;
import org.junit.jupiter.api.Test;

class SymmetricEigenTest {
  // exact: 2 ± √2 and 2
  @Test
  void aKnownMatrixHasItsKnownEigenvalues() {
    SymmetricEigen eigen = SymmetricEigen.of(new double[][] {{2, 1, 0}, {1, 2, 1}, {0, 1, 2}});
    assertEquals(2 - Math.sqrt(2), eigen.value(0), 1e-15);
    assertEquals(2, eigen.value(1), 1e-15);
    assertEquals(2 + Math.sqrt(2), eigen.value(2), 1e-15);
  }

  // definition A v = λ v, and validation against the eigenvalues of Commons Math
  @Property(seed = "20261232", tries = 50)
  void eigenpairsSatisfyTheirDefinition(
      @ForAll @IntRange(min = 1, max = 9) int n, @ForAll @IntRange(min = 0, max = 999) int seed) {
    Random random = new Random(seed);
    double[][] a = new double[n][n];
    for (int i = 0; i < n; i++) {
      for (int j = i; j < n; j++) {
        a[i][j] = 1e9 * random.nextGaussian();
        a[j][i] = a[i][j];
      }
    }
    SymmetricEigen eigen = SymmetricEigen.of(a);
    double[] reference = new EigenDecomposition(new Array2DRowRealMatrix(a)).getRealEigenvalues();
    java.util.Arrays.sort(reference);
    for (int k = 0; k < n; k++) {
      double[] v = eigen.vector(k);
      assertEquals(reference[k], eigen.value(k), 1e-4);
      for (int i = 0; i < n; i++) {
        double product = 0;
        double overlap = 0;
        for (int j = 0; j < n; j++) {
          product += a[i][j] * v[j];
          overlap += v[j] * eigen.vector(i)[j];
        }
        assertEquals(eigen.value(k) * v[i], product, 1e-5);
        assertEquals(i == k ? 1 : 0, overlap, 1e-13);
      }
      assertTrue(k == 0 || eigen.value(k) >= eigen.value(k - 1));
    }
  }

  @Test
  void matricesThatAreNoneAreRefused() {
    assertThrows(
        IllegalArgumentException.class, () -> SymmetricEigen.of(new double[][] {{1, 2}, {3}}));
    assertThrows(IllegalArgumentException.class, () -> SymmetricEigen.of(new double[0][]));
    assertThrows(
        ArithmeticException.class,
        () -> SymmetricEigen.of(new double[][] {{1, Double.NaN}, {Double.NaN, 1}}));
    assertThrows(ArithmeticException.class, () -> SymmetricEigen.of(new double[][] {{Double.NaN}}));
  }
}
