package org.toprung.angular;

/** Wigner 3j, 6j and 9j symbols and Clebsch-Gordan coefficients. */
public final class Wigner {

  private Wigner() {}

  /**
   * Returns the 3j symbol (j1 j2 j3; m1 m2 m3).
   *
   * @param tj1 2·j1
   * @param tj2 2·j2
   * @param tj3 2·j3
   * @param tm1 2·m1
   * @param tm2 2·m2
   * @param tm3 2·m3
   * @return the symbol; 0 if a selection rule is broken
   * @throws IllegalArgumentException if an angular momentum is negative
   */
  public static double threeJDoubled(int tj1, int tj2, int tj3, int tm1, int tm2, int tm3) {
    requireAngularMomenta(tj1, tj2, tj3);
    if (tm1 + tm2 + tm3 != 0
        || !isTriangle(tj1, tj2, tj3)
        || !isProjection(tj1, tm1)
        || !isProjection(tj2, tm2)
        || !isProjection(tj3, tm3)) {
      return 0;
    }
    return ExactWigner.threeJ(tj1, tj2, tj3, tm1, tm2, tm3).doubleValue();
  }

  /**
   * Returns the 6j symbol {j1 j2 j3; j4 j5 j6}.
   *
   * @param tj1 2·j1
   * @param tj2 2·j2
   * @param tj3 2·j3
   * @param tj4 2·j4
   * @param tj5 2·j5
   * @param tj6 2·j6
   * @return the symbol; 0 if a selection rule is broken
   * @throws IllegalArgumentException if an angular momentum is negative
   */
  public static double sixJDoubled(int tj1, int tj2, int tj3, int tj4, int tj5, int tj6) {
    requireAngularMomenta(tj1, tj2, tj3, tj4, tj5, tj6);
    if (!isTriangle(tj1, tj2, tj3)
        || !isTriangle(tj1, tj5, tj6)
        || !isTriangle(tj4, tj2, tj6)
        || !isTriangle(tj4, tj5, tj3)) {
      return 0;
    }
    return ExactWigner.sixJ(tj1, tj2, tj3, tj4, tj5, tj6).doubleValue();
  }

  /**
   * Returns the 9j symbol {j1 j2 j3; j4 j5 j6; j7 j8 j9}.
   *
   * @param tj1 2·j1
   * @param tj2 2·j2
   * @param tj3 2·j3
   * @param tj4 2·j4
   * @param tj5 2·j5
   * @param tj6 2·j6
   * @param tj7 2·j7
   * @param tj8 2·j8
   * @param tj9 2·j9
   * @return the symbol; 0 if a selection rule is broken
   * @throws IllegalArgumentException if an angular momentum is negative
   */
  public static double nineJDoubled(
      int tj1, int tj2, int tj3, int tj4, int tj5, int tj6, int tj7, int tj8, int tj9) {
    requireAngularMomenta(tj1, tj2, tj3, tj4, tj5, tj6, tj7, tj8, tj9);
    if (!isTriangle(tj1, tj2, tj3)
        || !isTriangle(tj4, tj5, tj6)
        || !isTriangle(tj7, tj8, tj9)
        || !isTriangle(tj1, tj4, tj7)
        || !isTriangle(tj2, tj5, tj8)
        || !isTriangle(tj3, tj6, tj9)) {
      return 0;
    }
    return ExactWigner.nineJ(tj1, tj2, tj3, tj4, tj5, tj6, tj7, tj8, tj9).doubleValue();
  }

  /**
   * Returns the Clebsch-Gordan coefficient ⟨j1 m1 j2 m2|j m⟩ = (−1)^(j1−j2+m) √(2j+1) (j1 j2 j; m1
   * m2 −m).
   *
   * @param tj1 2·j1
   * @param tm1 2·m1
   * @param tj2 2·j2
   * @param tm2 2·m2
   * @param tj 2·j
   * @param tm 2·m
   * @return the coefficient; 0 if a selection rule is broken
   * @throws IllegalArgumentException if an angular momentum is negative
   */
  public static double clebschGordanDoubled(int tj1, int tm1, int tj2, int tm2, int tj, int tm) {
    double threeJ = threeJDoubled(tj1, tj2, tj, tm1, tm2, -tm);
    if (threeJ == 0) {
      return 0;
    }
    double cg = Math.sqrt(tj + 1.0) * threeJ;
    return ((tj1 - tj2 + tm) / 2 & 1) == 0 ? cg : -cg;
  }

  private static boolean isTriangle(int ta, int tb, int tc) {
    return (ta + tb + tc & 1) == 0 && tc <= ta + tb && ta <= tb + tc && tb <= ta + tc;
  }

  private static boolean isProjection(int tj, int tm) {
    return (tj + tm & 1) == 0 && -tj <= tm && tm <= tj;
  }

  private static void requireAngularMomenta(int... tjs) {
    for (int tj : tjs) {
      if (!(tj >= 0)) {
        throw new IllegalArgumentException(
            "an angular momentum cannot be negative: " + HalfInteger.ofHalves(tj));
      }
    }
  }
}
