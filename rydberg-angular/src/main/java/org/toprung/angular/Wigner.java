package org.toprung.angular;

import java.math.BigInteger;
import java.util.Locale;
import java.util.Optional;

/**
 * Wigner 3j, 6j and 9j symbols, Clebsch-Gordan and Racah W coefficients, as {@code double} and in
 * exact form.
 *
 * <p><b>Forms.</b> Methods named {@code ...Doubled} take twice the quantum numbers, for callers in
 * loops; the others take {@link HalfInteger}. {@code exact...} methods return ±√(p/q) with big
 * integers. {@code ...Violation} methods say which selection rule makes a symbol vanish; in all
 * other methods a symbol that breaks a selection rule is exactly 0.
 *
 * <p><b>Conventions.</b> Condon-Shortley phases; the 3j, 6j and 9j symbols are those of the
 * references below. ⟨j1 m1 j2 m2|j m⟩ = (−1)<sup>j1−j2+m</sup> √(2j+1) (j1 j2 j; m1 m2 −m); W(abcd;
 * ef) = (−1)<sup>a+b+c+d</sup> {a b e; d c f}.
 *
 * <p><b>Range.</b> Angular momenta from 0 to 2000 for {@code double} values; exact forms are
 * bounded by the same limit. Values below 10<sup>−308</sup>, which occur for angular momenta above
 * 500, lose digits and may become zero.
 *
 * <p><b>Accuracy.</b> Racah's sums are evaluated in integers, so that their cancellation costs
 * nothing: 3j, 6j and Clebsch-Gordan values are within 10<sup>−14</sup> relative of exact over the
 * whole range, and exactly zero where the symbol vanishes. 9j values are within 10<sup>−11</sup>
 * relative: a sum of products of 6j symbols, repeated exactly (and much more slowly) where it
 * cancels.
 *
 * <p><b>Speed.</b> No call allocates, apart from those for exact forms and for 9j symbols that
 * cancel. The number of operations of a 3j or 6j symbol grows with the square of the number of
 * terms in its sum, which is at most 1 + 2·(the smallest angular momentum).
 *
 * <ol>
 *   <li>D. A. Varshalovich, A. N. Moskalev, V. K. Khersonskii, Quantum Theory of Angular Momentum
 *       (World Scientific, 1988), chapters 8 to 10, doi:10.1142/0270
 *   <li>A. R. Edmonds, Angular Momentum in Quantum Mechanics (Princeton, 1957), chapters 3 and 6
 *   <li>D. M. Brink, G. R. Satchler, Angular Momentum, 3rd ed. (Oxford, 1993)
 *   <li>G. Racah, Theory of complex spectra II, Phys. Rev. 62, 438 (1942),
 *       doi:10.1103/PhysRev.62.438
 *   <li>H. T. Johansson, C. Forssén, Fast and accurate evaluation of Wigner 3j, 6j, and 9j symbols
 *       using prime factorization and multiword integer arithmetic, SIAM J. Sci. Comput. 38, A376
 *       (2016), doi:10.1137/15M1021908: integer sums. Here their factors are taken from successive
 *       term ratios, not from prime factors.
 * </ol>
 */
public final class Wigner {

  /** Twice the largest angular momentum that is accepted. */
  public static final int MAX_DOUBLED_J = 4000;

  /**
   * A 9j sum is accepted in floating point if it keeps this part of the sum of the moduli of its
   * terms: each term carries a few units of 1e-16.
   */
  private static final double CANCELLATION_LIMIT = 1e-4;

  /** Below this the moduli of the terms of a 9j sum may have lost digits. */
  private static final double UNDERFLOW_LIMIT = 1e-280;

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
   * @return the symbol; exactly 0 if a selection rule is broken
   * @throws IllegalArgumentException if an angular momentum is negative or above the supported
   *     range
   */
  public static double threeJDoubled(int tj1, int tj2, int tj3, int tm1, int tm2, int tm3) {
    requireRange(tj1, tj2, tj3);
    return threeJAllowed(tj1, tj2, tj3, tm1, tm2, tm3)
        ? RacahSum.threeJ(tj1, tj2, tj3, tm1, tm2, tm3)
        : 0;
  }

  /**
   * Returns the 3j symbol (j1 j2 j3; m1 m2 m3).
   *
   * @param j1 angular momentum j1
   * @param j2 angular momentum j2
   * @param j3 angular momentum j3
   * @param m1 projection m1
   * @param m2 projection m2
   * @param m3 projection m3
   * @return the symbol; exactly 0 if a selection rule is broken
   * @throws IllegalArgumentException if an angular momentum is negative or above the supported
   *     range
   */
  public static double threeJ(
      HalfInteger j1,
      HalfInteger j2,
      HalfInteger j3,
      HalfInteger m1,
      HalfInteger m2,
      HalfInteger m3) {
    return threeJDoubled(
        j1.doubled(), j2.doubled(), j3.doubled(), m1.doubled(), m2.doubled(), m3.doubled());
  }

  /**
   * Returns the 3j symbol (j1 j2 j3; m1 m2 m3) in exact form.
   *
   * @param tj1 2·j1
   * @param tj2 2·j2
   * @param tj3 2·j3
   * @param tm1 2·m1
   * @param tm2 2·m2
   * @param tm3 2·m3
   * @return the symbol; zero if a selection rule is broken
   * @throws IllegalArgumentException if an angular momentum is negative or above the supported
   *     range
   */
  public static SignedRoot exactThreeJDoubled(
      int tj1, int tj2, int tj3, int tm1, int tm2, int tm3) {
    requireRange(tj1, tj2, tj3);
    return threeJAllowed(tj1, tj2, tj3, tm1, tm2, tm3)
        ? ExactWigner.threeJ(tj1, tj2, tj3, tm1, tm2, tm3)
        : SignedRoot.ZERO;
  }

  /**
   * Returns the 3j symbol (j1 j2 j3; m1 m2 m3) in exact form.
   *
   * @param j1 angular momentum j1
   * @param j2 angular momentum j2
   * @param j3 angular momentum j3
   * @param m1 projection m1
   * @param m2 projection m2
   * @param m3 projection m3
   * @return the symbol; zero if a selection rule is broken
   * @throws IllegalArgumentException if an angular momentum is negative or above the supported
   *     range
   */
  public static SignedRoot exactThreeJ(
      HalfInteger j1,
      HalfInteger j2,
      HalfInteger j3,
      HalfInteger m1,
      HalfInteger m2,
      HalfInteger m3) {
    return exactThreeJDoubled(
        j1.doubled(), j2.doubled(), j3.doubled(), m1.doubled(), m2.doubled(), m3.doubled());
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
   * @return the symbol; exactly 0 if a selection rule is broken
   * @throws IllegalArgumentException if an angular momentum is negative or above the supported
   *     range
   */
  public static double sixJDoubled(int tj1, int tj2, int tj3, int tj4, int tj5, int tj6) {
    requireRange(tj1, tj2, tj3);
    requireRange(tj4, tj5, tj6);
    return sixJAllowed(tj1, tj2, tj3, tj4, tj5, tj6)
        ? RacahSum.sixJ(tj1, tj2, tj3, tj4, tj5, tj6)
        : 0;
  }

  /**
   * Returns the 6j symbol {j1 j2 j3; j4 j5 j6}.
   *
   * @param j1 angular momentum j1
   * @param j2 angular momentum j2
   * @param j3 angular momentum j3
   * @param j4 angular momentum j4
   * @param j5 angular momentum j5
   * @param j6 angular momentum j6
   * @return the symbol; exactly 0 if a selection rule is broken
   * @throws IllegalArgumentException if an angular momentum is negative or above the supported
   *     range
   */
  public static double sixJ(
      HalfInteger j1,
      HalfInteger j2,
      HalfInteger j3,
      HalfInteger j4,
      HalfInteger j5,
      HalfInteger j6) {
    return sixJDoubled(
        j1.doubled(), j2.doubled(), j3.doubled(), j4.doubled(), j5.doubled(), j6.doubled());
  }

  /**
   * Returns the 6j symbol {j1 j2 j3; j4 j5 j6} in exact form.
   *
   * @param tj1 2·j1
   * @param tj2 2·j2
   * @param tj3 2·j3
   * @param tj4 2·j4
   * @param tj5 2·j5
   * @param tj6 2·j6
   * @return the symbol; zero if a selection rule is broken
   * @throws IllegalArgumentException if an angular momentum is negative or above the supported
   *     range
   */
  public static SignedRoot exactSixJDoubled(int tj1, int tj2, int tj3, int tj4, int tj5, int tj6) {
    requireRange(tj1, tj2, tj3);
    requireRange(tj4, tj5, tj6);
    return sixJAllowed(tj1, tj2, tj3, tj4, tj5, tj6)
        ? ExactWigner.sixJ(tj1, tj2, tj3, tj4, tj5, tj6)
        : SignedRoot.ZERO;
  }

  /**
   * Returns the 6j symbol {j1 j2 j3; j4 j5 j6} in exact form.
   *
   * @param j1 angular momentum j1
   * @param j2 angular momentum j2
   * @param j3 angular momentum j3
   * @param j4 angular momentum j4
   * @param j5 angular momentum j5
   * @param j6 angular momentum j6
   * @return the symbol; zero if a selection rule is broken
   * @throws IllegalArgumentException if an angular momentum is negative or above the supported
   *     range
   */
  public static SignedRoot exactSixJ(
      HalfInteger j1,
      HalfInteger j2,
      HalfInteger j3,
      HalfInteger j4,
      HalfInteger j5,
      HalfInteger j6) {
    return exactSixJDoubled(
        j1.doubled(), j2.doubled(), j3.doubled(), j4.doubled(), j5.doubled(), j6.doubled());
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
   * @return the symbol; exactly 0 if a selection rule is broken
   * @throws IllegalArgumentException if an angular momentum is negative or above the supported
   *     range
   */
  public static double nineJDoubled(
      int tj1, int tj2, int tj3, int tj4, int tj5, int tj6, int tj7, int tj8, int tj9) {
    requireRange(tj1, tj2, tj3);
    requireRange(tj4, tj5, tj6);
    requireRange(tj7, tj8, tj9);
    if (!nineJAllowed(tj1, tj2, tj3, tj4, tj5, tj6, tj7, tj8, tj9)) {
      return 0;
    }
    // Σ (−1)^(2x) (2x+1) {j1 j2 j3; j6 j9 x} {j4 j5 j6; j2 x j8} {j7 j8 j9; x j1 j4}, Varshalovich
    // et
    // al. 10.2.4 (20). The three triangles that hold x set its range; all of one parity.
    int first = Math.max(Math.abs(tj1 - tj9), Math.max(Math.abs(tj2 - tj6), Math.abs(tj4 - tj8)));
    int last = Math.min(tj1 + tj9, Math.min(tj2 + tj6, tj4 + tj8));
    double sum = 0;
    double moduli = 0;
    for (int tx = first; tx <= last; tx += 2) {
      double term =
          (tx + 1.0)
              * RacahSum.sixJ(tj1, tj2, tj3, tj6, tj9, tx)
              * RacahSum.sixJ(tj4, tj5, tj6, tj2, tx, tj8)
              * RacahSum.sixJ(tj7, tj8, tj9, tx, tj1, tj4);
      sum += term;
      moduli += Math.abs(term);
    }
    if (moduli > UNDERFLOW_LIMIT && Math.abs(sum) >= CANCELLATION_LIMIT * moduli) {
      return (first & 1) == 0 ? sum : -sum;
    }
    return ExactWigner.nineJ(tj1, tj2, tj3, tj4, tj5, tj6, tj7, tj8, tj9).doubleValue();
  }

  /**
   * Returns the 9j symbol {j1 j2 j3; j4 j5 j6; j7 j8 j9}.
   *
   * @param j1 angular momentum j1
   * @param j2 angular momentum j2
   * @param j3 angular momentum j3
   * @param j4 angular momentum j4
   * @param j5 angular momentum j5
   * @param j6 angular momentum j6
   * @param j7 angular momentum j7
   * @param j8 angular momentum j8
   * @param j9 angular momentum j9
   * @return the symbol; exactly 0 if a selection rule is broken
   * @throws IllegalArgumentException if an angular momentum is negative or above the supported
   *     range
   */
  public static double nineJ(
      HalfInteger j1,
      HalfInteger j2,
      HalfInteger j3,
      HalfInteger j4,
      HalfInteger j5,
      HalfInteger j6,
      HalfInteger j7,
      HalfInteger j8,
      HalfInteger j9) {
    return nineJDoubled(
        j1.doubled(),
        j2.doubled(),
        j3.doubled(),
        j4.doubled(),
        j5.doubled(),
        j6.doubled(),
        j7.doubled(),
        j8.doubled(),
        j9.doubled());
  }

  /**
   * Returns the 9j symbol {j1 j2 j3; j4 j5 j6; j7 j8 j9} in exact form.
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
   * @return the symbol; zero if a selection rule is broken
   * @throws IllegalArgumentException if an angular momentum is negative or above the supported
   *     range
   */
  public static SignedRoot exactNineJDoubled(
      int tj1, int tj2, int tj3, int tj4, int tj5, int tj6, int tj7, int tj8, int tj9) {
    requireRange(tj1, tj2, tj3);
    requireRange(tj4, tj5, tj6);
    requireRange(tj7, tj8, tj9);
    return nineJAllowed(tj1, tj2, tj3, tj4, tj5, tj6, tj7, tj8, tj9)
        ? ExactWigner.nineJ(tj1, tj2, tj3, tj4, tj5, tj6, tj7, tj8, tj9)
        : SignedRoot.ZERO;
  }

  /**
   * Returns the 9j symbol {j1 j2 j3; j4 j5 j6; j7 j8 j9} in exact form.
   *
   * @param j1 angular momentum j1
   * @param j2 angular momentum j2
   * @param j3 angular momentum j3
   * @param j4 angular momentum j4
   * @param j5 angular momentum j5
   * @param j6 angular momentum j6
   * @param j7 angular momentum j7
   * @param j8 angular momentum j8
   * @param j9 angular momentum j9
   * @return the symbol; zero if a selection rule is broken
   * @throws IllegalArgumentException if an angular momentum is negative or above the supported
   *     range
   */
  public static SignedRoot exactNineJ(
      HalfInteger j1,
      HalfInteger j2,
      HalfInteger j3,
      HalfInteger j4,
      HalfInteger j5,
      HalfInteger j6,
      HalfInteger j7,
      HalfInteger j8,
      HalfInteger j9) {
    return exactNineJDoubled(
        j1.doubled(),
        j2.doubled(),
        j3.doubled(),
        j4.doubled(),
        j5.doubled(),
        j6.doubled(),
        j7.doubled(),
        j8.doubled(),
        j9.doubled());
  }

  /**
   * Returns the Clebsch-Gordan coefficient ⟨j1 m1 j2 m2|j m⟩.
   *
   * @param tj1 2·j1
   * @param tm1 2·m1
   * @param tj2 2·j2
   * @param tm2 2·m2
   * @param tj 2·j
   * @param tm 2·m
   * @return the coefficient; exactly 0 if a selection rule is broken
   * @throws IllegalArgumentException if an angular momentum is negative or above the supported
   *     range
   */
  public static double clebschGordanDoubled(int tj1, int tm1, int tj2, int tm2, int tj, int tm) {
    double threeJ = threeJDoubled(tj1, tj2, tj, tm1, tm2, -tm);
    if (threeJ == 0) {
      return 0;
    }
    double coefficient = Math.sqrt(tj + 1.0) * threeJ;
    return ((tj1 - tj2 + tm) / 2 & 1) == 0 ? coefficient : -coefficient;
  }

  /**
   * Returns the Clebsch-Gordan coefficient ⟨j1 m1 j2 m2|j m⟩.
   *
   * @param j1 angular momentum j1
   * @param m1 projection m1
   * @param j2 angular momentum j2
   * @param m2 projection m2
   * @param j angular momentum j
   * @param m projection m
   * @return the coefficient; exactly 0 if a selection rule is broken
   * @throws IllegalArgumentException if an angular momentum is negative or above the supported
   *     range
   */
  public static double clebschGordan(
      HalfInteger j1,
      HalfInteger m1,
      HalfInteger j2,
      HalfInteger m2,
      HalfInteger j,
      HalfInteger m) {
    return clebschGordanDoubled(
        j1.doubled(), m1.doubled(), j2.doubled(), m2.doubled(), j.doubled(), m.doubled());
  }

  /**
   * Returns the Clebsch-Gordan coefficient ⟨j1 m1 j2 m2|j m⟩ in exact form.
   *
   * @param tj1 2·j1
   * @param tm1 2·m1
   * @param tj2 2·j2
   * @param tm2 2·m2
   * @param tj 2·j
   * @param tm 2·m
   * @return the coefficient; zero if a selection rule is broken
   * @throws IllegalArgumentException if an angular momentum is negative or above the supported
   *     range
   */
  public static SignedRoot exactClebschGordanDoubled(
      int tj1, int tm1, int tj2, int tm2, int tj, int tm) {
    SignedRoot threeJ = exactThreeJDoubled(tj1, tj2, tj, tm1, tm2, -tm);
    SignedRoot coefficient =
        threeJ.times(SignedRoot.of(1, BigInteger.valueOf(tj + 1L), BigInteger.ONE));
    return ((tj1 - tj2 + tm) / 2 & 1) == 0 ? coefficient : coefficient.negate();
  }

  /**
   * Returns the Clebsch-Gordan coefficient ⟨j1 m1 j2 m2|j m⟩ in exact form.
   *
   * @param j1 angular momentum j1
   * @param m1 projection m1
   * @param j2 angular momentum j2
   * @param m2 projection m2
   * @param j angular momentum j
   * @param m projection m
   * @return the coefficient; zero if a selection rule is broken
   * @throws IllegalArgumentException if an angular momentum is negative or above the supported
   *     range
   */
  public static SignedRoot exactClebschGordan(
      HalfInteger j1,
      HalfInteger m1,
      HalfInteger j2,
      HalfInteger m2,
      HalfInteger j,
      HalfInteger m) {
    return exactClebschGordanDoubled(
        j1.doubled(), m1.doubled(), j2.doubled(), m2.doubled(), j.doubled(), m.doubled());
  }

  /**
   * Returns the Racah coefficient W(j1 j2 j3 j4; j5 j6) = (−1)<sup>j1+j2+j3+j4</sup> {j1 j2 j5; j4
   * j3 j6}.
   *
   * @param tj1 2·j1
   * @param tj2 2·j2
   * @param tj3 2·j3
   * @param tj4 2·j4
   * @param tj5 2·j5
   * @param tj6 2·j6
   * @return the coefficient; exactly 0 if a selection rule is broken
   * @throws IllegalArgumentException if an angular momentum is negative or above the supported
   *     range
   */
  public static double racahWDoubled(int tj1, int tj2, int tj3, int tj4, int tj5, int tj6) {
    double sixJ = sixJDoubled(tj1, tj2, tj5, tj4, tj3, tj6);
    return ((tj1 + tj2 + tj3 + tj4) / 2 & 1) == 0 || sixJ == 0 ? sixJ : -sixJ;
  }

  /**
   * Returns the Racah coefficient W(j1 j2 j3 j4; j5 j6) = (−1)<sup>j1+j2+j3+j4</sup> {j1 j2 j5; j4
   * j3 j6}.
   *
   * @param j1 angular momentum j1
   * @param j2 angular momentum j2
   * @param j3 angular momentum j3
   * @param j4 angular momentum j4
   * @param j5 angular momentum j5
   * @param j6 angular momentum j6
   * @return the coefficient; exactly 0 if a selection rule is broken
   * @throws IllegalArgumentException if an angular momentum is negative or above the supported
   *     range
   */
  public static double racahW(
      HalfInteger j1,
      HalfInteger j2,
      HalfInteger j3,
      HalfInteger j4,
      HalfInteger j5,
      HalfInteger j6) {
    return racahWDoubled(
        j1.doubled(), j2.doubled(), j3.doubled(), j4.doubled(), j5.doubled(), j6.doubled());
  }

  /**
   * Says which selection rule makes the 3j symbol (j1 j2 j3; m1 m2 m3) vanish.
   *
   * @param j1 angular momentum j1
   * @param j2 angular momentum j2
   * @param j3 angular momentum j3
   * @param m1 projection m1
   * @param m2 projection m2
   * @param m3 projection m3
   * @return the first broken rule, empty if none is (the value may still be zero by symmetry or by
   *     accident)
   * @throws IllegalArgumentException if an angular momentum is negative or above the supported
   *     range
   */
  public static Optional<SelectionRule.Violation> threeJViolation(
      HalfInteger j1,
      HalfInteger j2,
      HalfInteger j3,
      HalfInteger m1,
      HalfInteger m2,
      HalfInteger m3) {
    requireRange(j1.doubled(), j2.doubled(), j3.doubled());
    Optional<SelectionRule.Violation> violation =
        projectionViolation("j1", j1, "m1", m1)
            .or(() -> projectionViolation("j2", j2, "m2", m2))
            .or(() -> projectionViolation("j3", j3, "m3", m3))
            .or(() -> triangleViolation("j1", j1, "j2", j2, "j3", j3));
    if (violation.isEmpty() && m1.doubled() + m2.doubled() + m3.doubled() != 0) {
      return violation(
          SelectionRule.PROJECTION_SUM,
          "m1 + m2 + m3 must be 0: " + m1 + " + " + m2 + " + " + m3 + " = " + m1.plus(m2).plus(m3));
    }
    return violation;
  }

  /**
   * Says which selection rule makes the 6j symbol {j1 j2 j3; j4 j5 j6} vanish.
   *
   * @param j1 angular momentum j1
   * @param j2 angular momentum j2
   * @param j3 angular momentum j3
   * @param j4 angular momentum j4
   * @param j5 angular momentum j5
   * @param j6 angular momentum j6
   * @return the first broken rule, empty if none is (the value may still be zero by symmetry or by
   *     accident)
   * @throws IllegalArgumentException if an angular momentum is negative or above the supported
   *     range
   */
  public static Optional<SelectionRule.Violation> sixJViolation(
      HalfInteger j1,
      HalfInteger j2,
      HalfInteger j3,
      HalfInteger j4,
      HalfInteger j5,
      HalfInteger j6) {
    requireRange(j1.doubled(), j2.doubled(), j3.doubled());
    requireRange(j4.doubled(), j5.doubled(), j6.doubled());
    return triangleViolation("j1", j1, "j2", j2, "j3", j3)
        .or(() -> triangleViolation("j1", j1, "j5", j5, "j6", j6))
        .or(() -> triangleViolation("j4", j4, "j2", j2, "j6", j6))
        .or(() -> triangleViolation("j4", j4, "j5", j5, "j3", j3));
  }

  /**
   * Says which selection rule makes the 9j symbol {j1 j2 j3; j4 j5 j6; j7 j8 j9} vanish.
   *
   * @param j1 angular momentum j1
   * @param j2 angular momentum j2
   * @param j3 angular momentum j3
   * @param j4 angular momentum j4
   * @param j5 angular momentum j5
   * @param j6 angular momentum j6
   * @param j7 angular momentum j7
   * @param j8 angular momentum j8
   * @param j9 angular momentum j9
   * @return the first broken rule, empty if none is (the value may still be zero by symmetry or by
   *     accident)
   * @throws IllegalArgumentException if an angular momentum is negative or above the supported
   *     range
   */
  public static Optional<SelectionRule.Violation> nineJViolation(
      HalfInteger j1,
      HalfInteger j2,
      HalfInteger j3,
      HalfInteger j4,
      HalfInteger j5,
      HalfInteger j6,
      HalfInteger j7,
      HalfInteger j8,
      HalfInteger j9) {
    requireRange(j1.doubled(), j2.doubled(), j3.doubled());
    requireRange(j4.doubled(), j5.doubled(), j6.doubled());
    requireRange(j7.doubled(), j8.doubled(), j9.doubled());
    return triangleViolation("j1", j1, "j2", j2, "j3", j3)
        .or(() -> triangleViolation("j4", j4, "j5", j5, "j6", j6))
        .or(() -> triangleViolation("j7", j7, "j8", j8, "j9", j9))
        .or(() -> triangleViolation("j1", j1, "j4", j4, "j7", j7))
        .or(() -> triangleViolation("j2", j2, "j5", j5, "j8", j8))
        .or(() -> triangleViolation("j3", j3, "j6", j6, "j9", j9));
  }

  /**
   * Says which selection rule makes the Clebsch-Gordan coefficient ⟨j1 m1 j2 m2|j m⟩ vanish.
   *
   * @param j1 angular momentum j1
   * @param m1 projection m1
   * @param j2 angular momentum j2
   * @param m2 projection m2
   * @param j angular momentum j
   * @param m projection m
   * @return the first broken rule, empty if none is (the value may still be zero by symmetry or by
   *     accident)
   * @throws IllegalArgumentException if an angular momentum is negative or above the supported
   *     range
   */
  public static Optional<SelectionRule.Violation> clebschGordanViolation(
      HalfInteger j1,
      HalfInteger m1,
      HalfInteger j2,
      HalfInteger m2,
      HalfInteger j,
      HalfInteger m) {
    requireRange(j1.doubled(), j2.doubled(), j.doubled());
    Optional<SelectionRule.Violation> violation =
        projectionViolation("j1", j1, "m1", m1)
            .or(() -> projectionViolation("j2", j2, "m2", m2))
            .or(() -> projectionViolation("j", j, "m", m))
            .or(() -> triangleViolation("j1", j1, "j2", j2, "j", j));
    if (violation.isEmpty() && m1.doubled() + m2.doubled() != m.doubled()) {
      return violation(
          SelectionRule.PROJECTION_SUM,
          "m1 + m2 must be m: " + m1 + " + " + m2 + " = " + m1.plus(m2) + ", m = " + m);
    }
    return violation;
  }

  private static boolean threeJAllowed(int tj1, int tj2, int tj3, int tm1, int tm2, int tm3) {
    return tm1 + tm2 + tm3 == 0
        && isTriangle(tj1, tj2, tj3)
        && isProjection(tj1, tm1)
        && isProjection(tj2, tm2)
        && isProjection(tj3, tm3);
  }

  private static boolean sixJAllowed(int tj1, int tj2, int tj3, int tj4, int tj5, int tj6) {
    return isTriangle(tj1, tj2, tj3)
        && isTriangle(tj1, tj5, tj6)
        && isTriangle(tj4, tj2, tj6)
        && isTriangle(tj4, tj5, tj3);
  }

  private static boolean nineJAllowed(
      int tj1, int tj2, int tj3, int tj4, int tj5, int tj6, int tj7, int tj8, int tj9) {
    return isTriangle(tj1, tj2, tj3)
        && isTriangle(tj4, tj5, tj6)
        && isTriangle(tj7, tj8, tj9)
        && isTriangle(tj1, tj4, tj7)
        && isTriangle(tj2, tj5, tj8)
        && isTriangle(tj3, tj6, tj9);
  }

  static boolean isTriangle(int ta, int tb, int tc) {
    return ((ta + tb + tc) & 1) == 0 && tc <= ta + tb && ta <= tb + tc && tb <= ta + tc;
  }

  static boolean isProjection(int tj, int tm) {
    return ((tj ^ tm) & 1) == 0 && -tj <= tm && tm <= tj;
  }

  private static Optional<SelectionRule.Violation> triangleViolation(
      String nameA, HalfInteger a, String nameB, HalfInteger b, String nameC, HalfInteger c) {
    String given = nameA + " = " + a + ", " + nameB + " = " + b + ", " + nameC + " = " + c;
    if (!a.plus(b).plus(c).isInteger()) {
      return violation(
          SelectionRule.INTEGER_PERIMETER, "angular momenta must add up to an integer: " + given);
    }
    if (!HalfInteger.isTriangle(a, b, c)) {
      return violation(
          SelectionRule.TRIANGLE,
          String.format(
              Locale.ROOT,
              "angular momenta must form a triangle, |%1$s - %2$s| <= %3$s <= %1$s + %2$s: %4$s",
              nameA,
              nameB,
              nameC,
              given));
    }
    return Optional.empty();
  }

  private static Optional<SelectionRule.Violation> projectionViolation(
      String nameJ, HalfInteger j, String nameM, HalfInteger m) {
    String given = nameJ + " = " + j + ", " + nameM + " = " + m;
    if (!j.hasParityOf(m)) {
      return violation(
          SelectionRule.PROJECTION_PARITY, nameJ + " - " + nameM + " must be an integer: " + given);
    }
    if (!m.isProjectionOf(j)) {
      return violation(
          SelectionRule.PROJECTION_RANGE,
          "|" + nameM + "| must not exceed " + nameJ + ": " + given);
    }
    return Optional.empty();
  }

  private static Optional<SelectionRule.Violation> violation(SelectionRule rule, String message) {
    return Optional.of(new SelectionRule.Violation(rule, message));
  }

  /** Refuses an angular momentum out of range; unsigned comparison catches negative ones too. */
  static void requireRange(int tj1, int tj2, int tj3) {
    if (Integer.compareUnsigned(tj1, MAX_DOUBLED_J) > 0
        || Integer.compareUnsigned(tj2, MAX_DOUBLED_J) > 0
        || Integer.compareUnsigned(tj3, MAX_DOUBLED_J) > 0) {
      throw outOfRange(tj1, tj2, tj3);
    }
  }

  private static IllegalArgumentException outOfRange(int... tjs) {
    for (int tj : tjs) {
      if (tj < 0) {
        return new IllegalArgumentException(
            "an angular momentum cannot be negative: " + HalfInteger.ofHalves(tj));
      }
    }
    return new IllegalArgumentException(
        String.format(
            Locale.ROOT,
            "angular momentum above the supported %d: one of %s, %s, %s",
            MAX_DOUBLED_J / 2,
            HalfInteger.ofHalves(tjs[0]),
            HalfInteger.ofHalves(tjs[1]),
            HalfInteger.ofHalves(tjs[2])));
  }
}
