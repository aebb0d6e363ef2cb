package org.toprung.angular;

import java.math.BigDecimal;
import java.math.BigInteger;
import java.math.MathContext;

/**
 * An exact number of the form ±√(p/q), with big integers p ≥ 0 and q &gt; 0 in lowest terms.
 *
 * <p>All 3j, 6j and 9j symbols and Clebsch-Gordan coefficients are of this form, which is closed
 * under multiplication.
 */
public final class SignedRoot {

  /** The number 0. */
  public static final SignedRoot ZERO = new SignedRoot(0, BigInteger.ZERO, BigInteger.ONE);

  /** The number 1. */
  public static final SignedRoot ONE = new SignedRoot(1, BigInteger.ONE, BigInteger.ONE);

  private final int sign;
  private final BigInteger numerator;
  private final BigInteger denominator;

  private SignedRoot(int sign, BigInteger numerator, BigInteger denominator) {
    this.sign = sign;
    this.numerator = numerator;
    this.denominator = denominator;
  }

  /**
   * Returns sign·√(numerator/denominator), reduced to lowest terms.
   *
   * @param sign a number whose sign is taken; 0 gives zero
   * @param numerator the numerator p of the square, not negative
   * @param denominator the denominator q of the square, positive
   * @return the number
   * @throws IllegalArgumentException if the numerator is negative or the denominator is not
   *     positive
   */
  public static SignedRoot of(int sign, BigInteger numerator, BigInteger denominator) {
    if (!(numerator.signum() >= 0 && denominator.signum() > 0)) {
      throw new IllegalArgumentException(
          "square is not a non-negative fraction: " + numerator + "/" + denominator);
    }
    if (sign == 0 || numerator.signum() == 0) {
      return ZERO;
    }
    BigInteger gcd = numerator.gcd(denominator);
    return new SignedRoot(Integer.signum(sign), numerator.divide(gcd), denominator.divide(gcd));
  }

  /**
   * Returns the sign.
   *
   * @return −1, 0 or 1
   */
  public int signum() {
    return sign;
  }

  /**
   * Returns the numerator of the square, in lowest terms.
   *
   * @return p ≥ 0
   */
  public BigInteger squareNumerator() {
    return numerator;
  }

  /**
   * Returns the denominator of the square, in lowest terms.
   *
   * @return q &gt; 0
   */
  public BigInteger squareDenominator() {
    return denominator;
  }

  /**
   * Returns the square, p/q.
   *
   * @return this · this, a rational number
   */
  public SignedRoot square() {
    return times(this);
  }

  /**
   * Returns the product.
   *
   * @param other the other factor
   * @return this · other, exactly
   */
  public SignedRoot times(SignedRoot other) {
    return of(
        sign * other.sign,
        numerator.multiply(other.numerator),
        denominator.multiply(other.denominator));
  }

  /**
   * Returns the number with its sign changed.
   *
   * @return −this
   */
  public SignedRoot negate() {
    return sign == 0 ? ZERO : new SignedRoot(-sign, numerator, denominator);
  }

  /**
   * Tells whether the number is rational, that is, whether p and q are both perfect squares.
   *
   * @return whether the root can be drawn
   */
  public boolean isRational() {
    return numerator.sqrtAndRemainder()[1].signum() == 0
        && denominator.sqrtAndRemainder()[1].signum() == 0;
  }

  /**
   * Returns the nearest {@code double}, to within one unit in the last place; zero or a subnormal
   * number if the modulus is below the range of normal numbers, infinite if it is above.
   *
   * @return the number as a {@code double}
   */
  public double doubleValue() {
    BigDecimal square =
        new BigDecimal(numerator).divide(new BigDecimal(denominator), MathContext.DECIMAL128);
    return sign * square.sqrt(MathContext.DECIMAL128).doubleValue();
  }

  @Override
  public boolean equals(Object other) {
    return other instanceof SignedRoot r
        && r.sign == sign
        && r.numerator.equals(numerator)
        && r.denominator.equals(denominator);
  }

  @Override
  public int hashCode() {
    return sign * (31 * numerator.hashCode() + denominator.hashCode());
  }

  /**
   * Returns the number as text: {@code "0"}, {@code "-1/3"} when the root can be drawn, {@code
   * "-sqrt(2/15)"} when it cannot.
   *
   * @return the number as text
   */
  @Override
  public String toString() {
    String text =
        isRational()
            ? fraction(numerator.sqrt(), denominator.sqrt())
            : "sqrt(" + fraction(numerator, denominator) + ")";
    return sign < 0 ? "-" + text : text;
  }

  private static String fraction(BigInteger p, BigInteger q) {
    return q.equals(BigInteger.ONE) ? p.toString() : p + "/" + q;
  }
}
