package org.toprung.angular;

import java.util.List;

/**
 * Matrix elements of tensor operators between coupled states, as factors of simpler ones.
 *
 * <p>T<sup>k</sup> is a tensor operator of any rank k ≥ 0 that acts on one part of a coupled
 * system: on L in J = L + S, on J in F = J + I. Coupling is in that order, |(j1 j2) j m⟩ = Σ ⟨j1 m1
 * j2 m2|j m⟩ |j1 m1⟩|j2 m2⟩. Reduced elements are in the 3j convention of the package:
 *
 * <p>⟨j m|T<sup>k</sup><sub>q</sub>|j′ m′⟩ = (−1)<sup>j−m</sup> (j k j′; −m q m′)
 * ⟨j‖T<sup>k</sup>‖j′⟩ (reference 1, (5.4.1); reference 2, 13.1.1 (2) with an additional
 * (−1)<sup>2k</sup> = 1).
 *
 * <p>Factors are exactly 0 if a selection rule is broken; {@link Wigner#threeJViolation} and {@link
 * Wigner#sixJViolation} say which one.
 *
 * <ol>
 *   <li>A. R. Edmonds, Angular Momentum in Quantum Mechanics (Princeton, 1957), (5.4.1), (7.1.7),
 *       (7.1.8)
 *   <li>D. A. Varshalovich, A. N. Moskalev, V. K. Khersonskii, Quantum Theory of Angular Momentum
 *       (World Scientific, 1988), chapter 13, doi:10.1142/0270
 * </ol>
 */
public final class Recoupling {

  private Recoupling() {}

  /**
   * A term of an uncoupled state.
   *
   * @param m1 projection of the first angular momentum
   * @param m2 projection of the second angular momentum
   * @param amplitude ⟨j1 m1 j2 m2|j m⟩
   */
  public record UncoupledTerm(HalfInteger m1, HalfInteger m2, double amplitude) {}

  /**
   * Wigner-Eckart factor ⟨j m|T<sup>k</sup><sub>q</sub>|j′ m′⟩ / ⟨j‖T<sup>k</sup>‖j′⟩ =
   * (−1)<sup>j−m</sup> (j k j′; −m q m′).
   *
   * @param j angular momentum of the bra
   * @param m projection of the bra
   * @param k rank
   * @param q component, from −k to k
   * @param jPrime angular momentum of the ket
   * @param mPrime projection of the ket
   * @return the factor; 0 unless m = q + m′ and the triangle (j k j′) closes
   * @throws IllegalArgumentException if an angular momentum or the rank is negative or above the
   *     supported range
   */
  public static double wignerEckart(
      HalfInteger j, HalfInteger m, int k, int q, HalfInteger jPrime, HalfInteger mPrime) {
    double threeJ =
        Wigner.threeJDoubled(
            j.doubled(),
            doubledRank(k),
            jPrime.doubled(),
            m.negate().doubled(),
            HalfInteger.of(q).doubled(),
            mPrime.doubled());
    return signed(threeJ, j.doubled() - m.doubled());
  }

  /**
   * Reduced element of an operator on the first part of a coupled system, ⟨(j1 j2)
   * j‖T<sup>k</sup>(1)‖(j1′ j2) j′⟩ / ⟨j1‖T<sup>k</sup>‖j1′⟩ = (−1)<sup>j1+j2+j′+k</sup>
   * √((2j+1)(2j′+1)) {j1 j j2; j′ j1′ k}: Edmonds (7.1.7). From L to J it is called with (L, S, J,
   * L′, J′), from J to F with (J, I, F, J′, F′).
   *
   * @param j1 first angular momentum of the bra
   * @param j2 second angular momentum, untouched
   * @param j total angular momentum of the bra
   * @param j1Prime first angular momentum of the ket
   * @param jPrime total angular momentum of the ket
   * @param k rank
   * @return the factor; 0 if one of the triangles (j1 j2 j), (j1′ j2 j′), (j1 k j1′), (j k j′) does
   *     not close
   * @throws IllegalArgumentException if an angular momentum or the rank is negative or above the
   *     supported range
   */
  public static double firstPart(
      HalfInteger j1,
      HalfInteger j2,
      HalfInteger j,
      HalfInteger j1Prime,
      HalfInteger jPrime,
      int k) {
    int t1 = j1.doubled();
    int t2 = j2.doubled();
    int t = j.doubled();
    int tPrime = jPrime.doubled();
    double sixJ = Wigner.sixJDoubled(t1, t, t2, tPrime, j1Prime.doubled(), doubledRank(k));
    return signed(sixJ * root(t, tPrime), t1 + t2 + tPrime + 2 * k);
  }

  /**
   * Reduced element of an operator on the second part of a coupled system, ⟨(j1 j2)
   * j‖T<sup>k</sup>(2)‖(j1 j2′) j′⟩ / ⟨j2‖T<sup>k</sup>‖j2′⟩ = (−1)<sup>j1+j2′+j+k</sup>
   * √((2j+1)(2j′+1)) {j2 j j1; j′ j2′ k}: Edmonds (7.1.8).
   *
   * @param j1 first angular momentum, untouched
   * @param j2 second angular momentum of the bra
   * @param j total angular momentum of the bra
   * @param j2Prime second angular momentum of the ket
   * @param jPrime total angular momentum of the ket
   * @param k rank
   * @return the factor; 0 if one of the triangles does not close
   * @throws IllegalArgumentException if an angular momentum or the rank is negative or above the
   *     supported range
   */
  public static double secondPart(
      HalfInteger j1,
      HalfInteger j2,
      HalfInteger j,
      HalfInteger j2Prime,
      HalfInteger jPrime,
      int k) {
    int t1 = j1.doubled();
    int t = j.doubled();
    int tPrime = jPrime.doubled();
    double sixJ =
        Wigner.sixJDoubled(j2.doubled(), t, t1, tPrime, j2Prime.doubled(), doubledRank(k));
    return signed(sixJ * root(t, tPrime), t1 + j2Prime.doubled() + t + 2 * k);
  }

  /**
   * Reduced element of the first part from that of the coupled system: the way back of {@link
   * #firstPart}, from F to J or from J to L.
   *
   * @param coupled ⟨(j1 j2) j‖T<sup>k</sup>(1)‖(j1′ j2) j′⟩
   * @param j1 first angular momentum of the bra
   * @param j2 second angular momentum, untouched
   * @param j total angular momentum of the bra
   * @param j1Prime first angular momentum of the ket
   * @param jPrime total angular momentum of the ket
   * @param k rank
   * @return ⟨j1‖T<sup>k</sup>‖j1′⟩
   * @throws IllegalArgumentException if an angular momentum or the rank is out of range, or if the
   *     factor is 0, so that the coupled element says nothing about the other
   */
  public static double firstPartFromCoupled(
      double coupled,
      HalfInteger j1,
      HalfInteger j2,
      HalfInteger j,
      HalfInteger j1Prime,
      HalfInteger jPrime,
      int k) {
    double factor = firstPart(j1, j2, j, j1Prime, jPrime, k);
    if (factor == 0) {
      throw new IllegalArgumentException(
          "the coupled element <("
              + j1
              + " "
              + j2
              + ") "
              + j
              + "||T^"
              + k
              + "||("
              + j1Prime
              + " "
              + j2
              + ") "
              + jPrime
              + "> vanishes and cannot be undone: "
              + Wigner.sixJViolation(j1, j, j2, jPrime, j1Prime, HalfInteger.of(k))
                  .map(SelectionRule.Violation::message)
                  .orElse("its 6j symbol is zero"));
    }
    return coupled / factor;
  }

  /**
   * Element between two hyperfine states, ⟨(J I) F m<sub>F</sub>|T<sup>k</sup><sub>q</sub>|(J′ I)
   * F′ m<sub>F</sub>′⟩ / ⟨J‖T<sup>k</sup>‖J′⟩, for an operator on the electrons.
   *
   * @param j electronic angular momentum J of the bra
   * @param i nuclear spin I
   * @param f total F of the bra
   * @param mF projection of the bra
   * @param k rank
   * @param q component, from −k to k
   * @param jPrime electronic angular momentum J′ of the ket
   * @param fPrime total F′ of the ket
   * @param mFPrime projection of the ket
   * @return {@link #wignerEckart} times {@link #firstPart}
   * @throws IllegalArgumentException if an angular momentum or the rank is negative or above the
   *     supported range
   */
  public static double hyperfineElement(
      HalfInteger j,
      HalfInteger i,
      HalfInteger f,
      HalfInteger mF,
      int k,
      int q,
      HalfInteger jPrime,
      HalfInteger fPrime,
      HalfInteger mFPrime) {
    return wignerEckart(f, mF, k, q, fPrime, mFPrime) * firstPart(j, i, f, jPrime, fPrime, k) + 0.0;
  }

  /**
   * Element from a hyperfine state to an uncoupled one, ⟨J′ m<sub>J</sub>′; I
   * m<sub>I</sub>|T<sup>k</sup><sub>q</sub>|(J I) F m<sub>F</sub>⟩ / ⟨J′‖T<sup>k</sup>‖J⟩, for an
   * operator on the electrons: the nuclear spin is a spectator, so that m<sub>J</sub> =
   * m<sub>F</sub> − m<sub>I</sub> in the ket, and the element is ⟨J′
   * m<sub>J</sub>′|T<sup>k</sup><sub>q</sub>|J m<sub>J</sub>⟩ ⟨J m<sub>J</sub> I m<sub>I</sub>|F
   * m<sub>F</sub>⟩.
   *
   * @param jPrime electronic angular momentum J′ of the bra
   * @param mJPrime its projection
   * @param mI projection of the nuclear spin
   * @param k rank
   * @param q component, from −k to k
   * @param j electronic angular momentum J of the ket
   * @param i nuclear spin I
   * @param f total F of the ket
   * @param mF its projection
   * @return the factor; 0 unless m<sub>J</sub>′ + m<sub>I</sub> = m<sub>F</sub> + q and the
   *     triangles close
   * @throws IllegalArgumentException if an angular momentum or the rank is negative or above the
   *     supported range
   */
  public static double hyperfineToFine(
      HalfInteger jPrime,
      HalfInteger mJPrime,
      HalfInteger mI,
      int k,
      int q,
      HalfInteger j,
      HalfInteger i,
      HalfInteger f,
      HalfInteger mF) {
    HalfInteger mJ = mF.minus(mI);
    return wignerEckart(jPrime, mJPrime, k, q, j, mJ) * Wigner.clebschGordan(j, mJ, i, mI, f, mF)
        + 0.0;
  }

  /**
   * Expands a coupled state: |(j1 j2) j m⟩ = Σ ⟨j1 m1 j2 m2|j m⟩ |j1 m1⟩|j2 m2⟩; for a hyperfine
   * state with j1 = J, j2 = I.
   *
   * @param j1 first angular momentum
   * @param j2 second angular momentum
   * @param j total angular momentum
   * @param m its projection
   * @return the terms with m1 + m2 = m, m1 ascending, also those whose amplitude vanishes by
   *     accident; their squares add up to 1
   * @throws IllegalArgumentException if the three angular momenta form no triangle, or if m is no
   *     projection of j, or if one is negative or above the supported range
   */
  public static List<UncoupledTerm> uncouple(
      HalfInteger j1, HalfInteger j2, HalfInteger j, HalfInteger m) {
    if (!HalfInteger.isTriangle(j1, j2, j) || !m.isProjectionOf(j)) {
      throw new IllegalArgumentException(
          "no coupled state |("
              + j1
              + " "
              + j2
              + ") "
              + j
              + " "
              + m
              + ">: the angular momenta"
              + " must form a triangle and |m| <= j with j - m an integer");
    }
    return j1.projections()
        .filter(m1 -> m.minus(m1).isProjectionOf(j2))
        .map(
            m1 ->
                new UncoupledTerm(
                    m1, m.minus(m1), Wigner.clebschGordan(j1, m1, j2, m.minus(m1), j, m)))
        .toList();
  }

  /**
   * Relative strength of a hyperfine line: the part of the line strength from level F that goes to
   * F′, S = (2F′+1)(2J+1) {J J′ k; F′ F I}². The strengths from one F add up to 1 over F′
   * (orthogonality of 6j symbols, Edmonds (6.2.9)).
   *
   * @param j electronic angular momentum J of the lower level
   * @param f total F of the lower level
   * @param jPrime electronic angular momentum J′ of the upper level
   * @param fPrime total F′ of the upper level
   * @param i nuclear spin I
   * @param k rank; 1 for an electric dipole line
   * @return the relative strength, from 0 to 1
   * @throws IllegalArgumentException if an angular momentum or the rank is negative or above the
   *     supported range
   */
  public static double relativeStrength(
      HalfInteger j, HalfInteger f, HalfInteger jPrime, HalfInteger fPrime, HalfInteger i, int k) {
    double sixJ =
        Wigner.sixJDoubled(
            j.doubled(),
            jPrime.doubled(),
            doubledRank(k),
            fPrime.doubled(),
            f.doubled(),
            i.doubled());
    return (fPrime.doubled() + 1.0) * (j.doubled() + 1.0) * sixJ * sixJ;
  }

  private static int doubledRank(int k) {
    if (!(k >= 0)) {
      throw new IllegalArgumentException("the rank of a tensor operator cannot be negative: " + k);
    }
    return HalfInteger.of(k).doubled();
  }

  private static double root(int t, int tPrime) {
    return Math.sqrt((t + 1.0) * (tPrime + 1.0));
  }

  /** The value times (−1)^(doubledExponent/2); zero stays +0. */
  private static double signed(double value, int doubledExponent) {
    return (doubledExponent & 2) == 0 || value == 0 ? value : -value;
  }
}
