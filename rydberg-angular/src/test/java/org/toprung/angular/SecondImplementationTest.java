package org.toprung.angular;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.util.SplittableRandom;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.Test;
import org.matheclipse.core.eval.ExprEvaluator;
import org.matheclipse.core.interfaces.IExpr;

/**
 * Validation: the ThreeJSymbol and ClebschGordan functions of a general computer-algebra library
 * (matheclipse-core 3.0.0) on random arguments. Their exact results are squared, which makes them
 * rational.
 */
class SecondImplementationTest {

  private static ExprEvaluator algebra;

  @BeforeAll
  static void startAlgebra() {
    algebra = new ExprEvaluator(false, (short) 100);
  }

  @Test
  void threeJSymbolsAgree() {
    SplittableRandom random = new SplittableRandom(300);
    for (int i = 0; i < 60; i++) {
      int[] a = RandomArguments.threeJ(random, i < 30 ? 9 : 40);
      assertAgrees(
          String.format(
              "ThreeJSymbol({%d/2,%d/2},{%d/2,%d/2},{%d/2,%d/2})",
              a[0], a[3], a[1], a[4], a[2], a[5]),
          Wigner.exactThreeJDoubled(a[0], a[1], a[2], a[3], a[4], a[5]),
          Wigner.threeJDoubled(a[0], a[1], a[2], a[3], a[4], a[5]));
    }
  }

  @Test
  void clebschGordanCoefficientsAgree() {
    SplittableRandom random = new SplittableRandom(301);
    for (int i = 0; i < 60; i++) {
      int[] a = RandomArguments.threeJ(random, i < 30 ? 9 : 40);
      assertAgrees(
          String.format(
              "ClebschGordan({%d/2,%d/2},{%d/2,%d/2},{%d/2,%d/2})",
              a[0], a[3], a[1], a[4], a[2], -a[5]),
          Wigner.exactClebschGordanDoubled(a[0], a[3], a[1], a[4], a[2], -a[5]),
          Wigner.clebschGordanDoubled(a[0], a[3], a[1], a[4], a[2], -a[5]));
    }
  }

  private static void assertAgrees(String call, SignedRoot exact, double value) {
    IExpr square = algebra.eval("(" + call + ")^2");
    assertEquals(
        exact.squareNumerator() + "/" + exact.squareDenominator(),
        algebra.eval("Numerator(" + square + ")")
            + "/"
            + algebra.eval("Denominator(" + square + ")"),
        call);
    int sign = Integer.parseInt(algebra.eval("Sign(" + call + ")").toString());
    assertEquals(sign, exact.signum(), call);
    assertEquals(sign, Math.signum(value), 0.0, call);
  }
}
