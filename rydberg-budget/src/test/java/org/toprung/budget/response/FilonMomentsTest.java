package org.toprung.budget.response;

import static org.junit.jupiter.api.Assertions.assertEquals;

import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class FilonMomentsTest {

  /** Validation: closed integrals of the polynomial u², in a basis that reproduces it exactly. */
  @ParameterizedTest
  @ValueSource(doubles = {0.3, 2, 2.999, 3.001, 7, 40, 1e4})
  void integratesPolynomialsTimesWaves(double theta) {
    FilonMoments m = new FilonMoments();
    m.compute(theta);
    double re = 0;
    double im = 0;
    for (int a = 0; a < FilonMoments.NODES; a++) {
      double square = a * a / 16.0;
      re += square * m.re[a];
      im += square * m.im[a];
    }
    double c = Math.cos(theta);
    double s = Math.sin(theta);
    double t = theta;
    assertEquals(s / t + 2 * c / (t * t) - 2 * s / (t * t * t), re, 3e-13 / Math.min(1, t * t));
    assertEquals(
        -c / t + 2 * s / (t * t) + 2 * (c - 1) / (t * t * t), im, 3e-13 / Math.min(1, t * t * t));
  }

  /** Validation: ∫∫ cos θ(u−v) over v < u is (1 − cos θ)/θ². */
  @ParameterizedTest
  @ValueSource(doubles = {0.3, 2, 2.999, 3.001, 7, 40})
  void integratesInOrder(double theta) {
    FilonMoments m = new FilonMoments();
    m.compute(theta);
    double sum = 0;
    for (double x : m.ordered) {
      sum += x;
    }
    assertEquals((1 - Math.cos(theta)) / (theta * theta), sum, 1e-14);
  }

  /** Exact: both orders together are the product of the single integrals. */
  @ParameterizedTest
  @ValueSource(doubles = {0, 0.3, 2.999, 3.001, 40})
  void bothOrdersMakeTheProduct(double theta) {
    FilonMoments m = new FilonMoments();
    m.compute(theta);
    for (int a = 0; a < FilonMoments.NODES; a++) {
      for (int b = 0; b < FilonMoments.NODES; b++) {
        double both = m.ordered[a * FilonMoments.NODES + b] + m.ordered[b * FilonMoments.NODES + a];
        assertEquals(m.re[a] * m.re[b] + m.im[a] * m.im[b], both, 2e-13);
      }
    }
  }
}
