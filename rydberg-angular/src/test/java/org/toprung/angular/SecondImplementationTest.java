package org.toprung.angular;

import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.Test;
import org.matheclipse.core.eval.ExprEvaluator;

/**
 * Validation against the ThreeJSymbol, SixJSymbol and ClebschGordan functions of a general
 * computer-algebra library (matheclipse-core 3.0.0) on random arguments.
 */
class SecondImplementationTest {

  private static ExprEvaluator algebra;

  @BeforeAll
  static void startAlgebra() {
    algebra = new ExprEvaluator(false, (short) 100);
  }

  @Test
  void probe() {
    System.err.println(algebra.eval("ThreeJSymbol({6,2},{4,-2},{6,0})"));
    System.err.println(algebra.eval("ThreeJSymbol({3/2,1/2},{1,0},{3/2,-1/2})"));
    System.err.println(algebra.eval("ClebschGordan({3/2,1/2},{1,0},{3/2,1/2})"));
    System.err.println(algebra.eval("SixJSymbol({1,2,3},{2,1,2})"));
    System.err.println(algebra.eval("N(ThreeJSymbol({50,2},{40,-2},{60,0}))"));
  }
}
