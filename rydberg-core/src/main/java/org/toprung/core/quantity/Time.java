package org.toprung.core.quantity;

/** A duration. Immutable. */
public final class Time extends ScalarQuantity<Time> {
  private Time(double seconds) {
    super(Dimension.TIME, seconds, "s");
  }

  /**
   * The quantity of the given size.
   *
   * @param seconds size in s
   * @return the quantity
   * @throws IllegalArgumentException if the value is not finite
   */
  public static Time ofSeconds(double seconds) {
    return new Time(seconds);
  }

  /**
   * A number of s.
   *
   * @param value size in s
   * @return the quantity
   * @throws IllegalArgumentException if the value is not finite
   */
  public static Time seconds(double value) {
    return new Time(Dimension.TIME.toSi(value, "s"));
  }

  /**
   * A number of ms.
   *
   * @param value size in ms
   * @return the quantity
   * @throws IllegalArgumentException if the value is not finite
   */
  public static Time milliseconds(double value) {
    return new Time(Dimension.TIME.toSi(value, "ms"));
  }

  /**
   * A number of us.
   *
   * @param value size in us
   * @return the quantity
   * @throws IllegalArgumentException if the value is not finite
   */
  public static Time microseconds(double value) {
    return new Time(Dimension.TIME.toSi(value, "us"));
  }

  /**
   * A number of ns.
   *
   * @param value size in ns
   * @return the quantity
   * @throws IllegalArgumentException if the value is not finite
   */
  public static Time nanoseconds(double value) {
    return new Time(Dimension.TIME.toSi(value, "ns"));
  }

  /**
   * Reads a number followed by a unit, for example "4 ns".
   *
   * @param text number and unit; units: s, ms, us, ns (a leading u may be written µ)
   * @return the quantity
   * @throws IllegalArgumentException if the text is not a number and one of the units, or the value
   *     is not finite
   */
  public static Time parse(String text) {
    return new Time(Dimension.TIME.parse(text));
  }

  /**
   * The size in the SI unit.
   *
   * @return size in s
   */
  public double seconds() {
    return si;
  }
}
