package org.toprung.core.quantity;

/** A length. Immutable. */
public final class Length extends ScalarQuantity<Length> {
  private Length(double metres) {
    super(Dimension.LENGTH, metres, "m");
  }

  /**
   * The quantity of the given size.
   *
   * @param metres size in m
   * @return the quantity
   * @throws IllegalArgumentException if the value is not finite
   */
  public static Length ofMetres(double metres) {
    return new Length(metres);
  }

  /**
   * A number of m.
   *
   * @param value size in m
   * @return the quantity
   * @throws IllegalArgumentException if the value is not finite
   */
  public static Length metres(double value) {
    return new Length(Dimension.LENGTH.toSi(value, "m"));
  }

  /**
   * A number of mm.
   *
   * @param value size in mm
   * @return the quantity
   * @throws IllegalArgumentException if the value is not finite
   */
  public static Length millimetres(double value) {
    return new Length(Dimension.LENGTH.toSi(value, "mm"));
  }

  /**
   * A number of um.
   *
   * @param value size in um
   * @return the quantity
   * @throws IllegalArgumentException if the value is not finite
   */
  public static Length micrometres(double value) {
    return new Length(Dimension.LENGTH.toSi(value, "um"));
  }

  /**
   * A number of nm.
   *
   * @param value size in nm
   * @return the quantity
   * @throws IllegalArgumentException if the value is not finite
   */
  public static Length nanometres(double value) {
    return new Length(Dimension.LENGTH.toSi(value, "nm"));
  }

  /**
   * Reads a number followed by a unit, for example "4 nm".
   *
   * @param text number and unit; units: m, cm, mm, um, nm (a leading u may be written µ)
   * @return the quantity
   * @throws IllegalArgumentException if the text is not a number and one of the units, or the value
   *     is not finite
   */
  public static Length parse(String text) {
    return new Length(Dimension.LENGTH.parse(text));
  }

  /**
   * The size in the SI unit.
   *
   * @return size in m
   */
  public double metres() {
    return si;
  }
}
