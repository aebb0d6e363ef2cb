package org.toprung.angular;

import java.util.Locale;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import java.util.stream.IntStream;
import java.util.stream.Stream;

/**
 * An exact integer or half-integer: an angular momentum quantum number or a projection.
 *
 * <p>The number is kept as its double, so arithmetic is exact. Values span the whole range of an
 * {@code int} divided by two; results outside it are refused with an {@link ArithmeticException}.
 */
public final class HalfInteger implements Comparable<HalfInteger> {

  /** The number 0. */
  public static final HalfInteger ZERO = new HalfInteger(0);

  /** The number 1/2. */
  public static final HalfInteger HALF = new HalfInteger(1);

  /** The number 1. */
  public static final HalfInteger ONE = new HalfInteger(2);

  private static final Pattern FRACTION = Pattern.compile("([+-]?\\d{1,10})\\s*/\\s*([12])");
  private static final Pattern DECIMAL = Pattern.compile("([+-]?)(\\d{1,10})(?:\\.(0*|50*))?");

  private final int doubled;

  private HalfInteger(int doubled) {
    this.doubled = doubled;
  }

  /**
   * Returns an integer as a half-integer.
   *
   * @param value the integer, from −2<sup>30</sup> to 2<sup>30</sup>−1
   * @return the number {@code value}
   * @throws IllegalArgumentException if twice the value does not fit an {@code int}
   */
  public static HalfInteger of(int value) {
    return ofHalves(value, 2L * value);
  }

  /**
   * Returns the number given as a count of halves.
   *
   * @param doubled twice the number, any {@code int}
   * @return the number {@code doubled}/2
   */
  public static HalfInteger ofHalves(int doubled) {
    return switch (doubled) {
      case 0 -> ZERO;
      case 1 -> HALF;
      case 2 -> ONE;
      default -> new HalfInteger(doubled);
    };
  }

  /**
   * Returns a half-integer from a {@code double} that must hold one exactly.
   *
   * @param value the number, such as {@code 1.5}
   * @return the same number
   * @throws IllegalArgumentException if the value is not an exact multiple of 1/2, is not finite,
   *     or is out of range
   */
  public static HalfInteger of(double value) {
    double twice = 2 * value;
    if (!(twice >= Integer.MIN_VALUE && twice <= Integer.MAX_VALUE)) {
      throw new IllegalArgumentException(
          "half-integer out of range: " + value + " (allowed: ±" + Integer.MAX_VALUE / 2.0 + ")");
    }
    if (twice != Math.rint(twice)) {
      throw notHalfInteger(Double.toString(value));
    }
    return ofHalves((int) twice);
  }

  /**
   * Parses a half-integer.
   *
   * @param text an integer ({@code "2"}), a decimal that ends in .0 or .5 ({@code "1.5"}) or a
   *     fraction over 1 or 2 ({@code "3/2"}), with an optional sign; white space around it is
   *     ignored
   * @return the number
   * @throws IllegalArgumentException if the text is {@code null}, has another form, or is out of
   *     range
   */
  public static HalfInteger parse(String text) {
    if (text == null) {
      throw notHalfInteger("null");
    }
    String s = text.strip().replace('−', '-');
    Matcher fraction = FRACTION.matcher(s);
    if (fraction.matches()) {
      long numerator = Long.parseLong(fraction.group(1));
      return ofHalves(text, fraction.group(2).equals("2") ? numerator : 2 * numerator);
    }
    Matcher decimal = DECIMAL.matcher(s);
    if (decimal.matches()) {
      String decimals = decimal.group(3);
      long twice = 2 * Long.parseLong(decimal.group(2));
      if (decimals != null && decimals.startsWith("5")) {
        twice++;
      }
      return ofHalves(text, decimal.group(1).equals("-") ? -twice : twice);
    }
    throw notHalfInteger('"' + text + '"');
  }

  private static HalfInteger ofHalves(Object given, long doubled) {
    if (doubled != (int) doubled) {
      throw new IllegalArgumentException(
          "half-integer out of range: " + given + " (allowed: ±" + Integer.MAX_VALUE / 2.0 + ")");
    }
    return ofHalves((int) doubled);
  }

  private static IllegalArgumentException notHalfInteger(String given) {
    return new IllegalArgumentException(
        String.format(
            Locale.ROOT, "not an integer or half-integer: %s (allowed: 2, 1.5, 3/2, ...)", given));
  }

  /**
   * Returns twice the number.
   *
   * @return the number of halves
   */
  public int doubled() {
    return doubled;
  }

  /**
   * Returns the number as a {@code double}, exactly.
   *
   * @return the number
   */
  public double doubleValue() {
    return doubled / 2.0;
  }

  /**
   * Returns the number as an {@code int}.
   *
   * @return the number
   * @throws ArithmeticException if it is not an integer
   */
  public int intValueExact() {
    if (!isInteger()) {
      throw new ArithmeticException(this + " is not an integer");
    }
    return doubled / 2;
  }

  /**
   * Tells whether this is an integer.
   *
   * @return {@code false} for an odd number of halves
   */
  public boolean isInteger() {
    return (doubled & 1) == 0;
  }

  /**
   * Tells whether this and another number are both integers or both odd multiples of 1/2, that is,
   * whether they differ by an integer.
   *
   * @param other the other number
   * @return whether the difference is an integer
   */
  public boolean hasParityOf(HalfInteger other) {
    return ((doubled ^ other.doubled) & 1) == 0;
  }

  /**
   * Tells whether this number can be a projection of an angular momentum: −j ≤ m ≤ j with j − m an
   * integer.
   *
   * @param j the angular momentum
   * @return whether this number is one of −j, −j+1, ..., j
   */
  public boolean isProjectionOf(HalfInteger j) {
    return hasParityOf(j) && Math.abs((long) doubled) <= j.doubled;
  }

  /**
   * Tells whether three angular momenta can be coupled: |a − b| ≤ c ≤ a + b with a + b + c an
   * integer.
   *
   * @param a first angular momentum
   * @param b second angular momentum
   * @param c third angular momentum
   * @return whether the three obey the triangle rule; {@code false} if one of them is negative
   */
  public static boolean isTriangle(HalfInteger a, HalfInteger b, HalfInteger c) {
    long ta = a.doubled;
    long tb = b.doubled;
    long tc = c.doubled;
    return ((ta + tb + tc) & 1) == 0 && tc <= ta + tb && ta <= tb + tc && tb <= ta + tc;
  }

  /**
   * Returns the projections of this angular momentum in ascending order: −j, −j+1, ..., j.
   *
   * @return the 2j+1 projections
   * @throws IllegalArgumentException if this number is negative
   */
  public Stream<HalfInteger> projections() {
    if (!(doubled >= 0)) {
      throw new IllegalArgumentException("a negative angular momentum has no projections: " + this);
    }
    return IntStream.rangeClosed(0, doubled).mapToObj(i -> ofHalves(2 * i - doubled));
  }

  /**
   * Returns the values to which two angular momenta can couple, in ascending order: |a − b|, |a −
   * b| + 1, ..., a + b.
   *
   * @param a first angular momentum
   * @param b second angular momentum
   * @return the allowed totals
   * @throws IllegalArgumentException if one of them is negative
   */
  public static Stream<HalfInteger> couplings(HalfInteger a, HalfInteger b) {
    if (!(a.doubled >= 0 && b.doubled >= 0)) {
      throw new IllegalArgumentException("angular momenta cannot be negative: " + a + ", " + b);
    }
    int lowest = Math.abs(a.doubled - b.doubled);
    return IntStream.rangeClosed(0, Math.min(a.doubled, b.doubled))
        .mapToObj(i -> ofHalves(a + " and " + b, lowest + 2L * i));
  }

  /**
   * Returns the sum.
   *
   * @param other the number to add
   * @return this + other
   * @throws ArithmeticException if the result is out of range
   */
  public HalfInteger plus(HalfInteger other) {
    return ofHalves(Math.addExact(doubled, other.doubled));
  }

  /**
   * Returns the difference.
   *
   * @param other the number to subtract
   * @return this − other
   * @throws ArithmeticException if the result is out of range
   */
  public HalfInteger minus(HalfInteger other) {
    return ofHalves(Math.subtractExact(doubled, other.doubled));
  }

  /**
   * Returns an integer multiple.
   *
   * @param factor the factor
   * @return factor · this
   * @throws ArithmeticException if the result is out of range
   */
  public HalfInteger times(int factor) {
    return ofHalves(Math.multiplyExact(doubled, factor));
  }

  /**
   * Returns the number with its sign changed.
   *
   * @return −this
   * @throws ArithmeticException if the result is out of range
   */
  public HalfInteger negate() {
    return ofHalves(Math.negateExact(doubled));
  }

  /**
   * Returns the absolute value.
   *
   * @return |this|
   * @throws ArithmeticException if the result is out of range
   */
  public HalfInteger abs() {
    return doubled < 0 ? negate() : this;
  }

  /**
   * Returns the sign.
   *
   * @return −1, 0 or 1
   */
  public int signum() {
    return Integer.signum(doubled);
  }

  /**
   * Returns the multiplicity 2j+1 of this angular momentum.
   *
   * @return the number of projections
   * @throws IllegalArgumentException if this number is negative
   * @throws ArithmeticException if the result is out of range
   */
  public int multiplicity() {
    if (!(doubled >= 0)) {
      throw new IllegalArgumentException("a negative angular momentum has no projections: " + this);
    }
    return Math.incrementExact(doubled);
  }

  @Override
  public int compareTo(HalfInteger other) {
    return Integer.compare(doubled, other.doubled);
  }

  @Override
  public boolean equals(Object other) {
    return other instanceof HalfInteger h && h.doubled == doubled;
  }

  @Override
  public int hashCode() {
    return Integer.hashCode(doubled);
  }

  /**
   * Returns {@code "2"} for an integer and {@code "3/2"} for a half-integer; {@link #parse} accepts
   * both.
   *
   * @return the number as text
   */
  @Override
  public String toString() {
    return isInteger() ? Integer.toString(doubled / 2) : doubled + "/2";
  }
}
