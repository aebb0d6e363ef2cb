package org.toprung.core.quantity;

/** An optical power. Immutable. */
public final class Power extends ScalarQuantity<Power> {
  private Power(double watts) {
    super(Dimension.POWER, watts, "W");
  }

  /**
   * The quantity of the given size.
   *
   * @param watts size in W
   * @return the quantity
   * @throws IllegalArgumentException if the value is not finite
   */
  public static Power ofWatts(double watts) {
    return new Power(watts);
  }

  /**
   * A number of W.
   *
   * @param value size in W
   * @return the quantity
   * @throws IllegalArgumentException if the value is not finite
   */
  public static Power watts(double value) {
    return new Power(Dimension.POWER.toSi(value, "W"));
  }

  /**
   * A number of mW.
   *
   * @param value size in mW
   * @return the quantity
   * @throws IllegalArgumentException if the value is not finite
   */
  public static Power milliwatts(double value) {
    return new Power(Dimension.POWER.toSi(value, "mW"));
  }

  /**
   * A number of uW.
   *
   * @param value size in uW
   * @return the quantity
   * @throws IllegalArgumentException if the value is not finite
   */
  public static Power microwatts(double value) {
    return new Power(Dimension.POWER.toSi(value, "uW"));
  }

  /**
   * A number of nW.
   *
   * @param value size in nW
   * @return the quantity
   * @throws IllegalArgumentException if the value is not finite
   */
  public static Power nanowatts(double value) {
    return new Power(Dimension.POWER.toSi(value, "nW"));
  }

  /**
   * Reads a number followed by a unit, for example "4 nW".
   *
   * @param text number and unit; units: W, mW, uW, nW (a leading u may be written µ)
   * @return the quantity
   * @throws IllegalArgumentException if the text is not a number and one of the units, or the value
   *     is not finite
   */
  public static Power parse(String text) {
    return new Power(Dimension.POWER.parse(text));
  }

  /**
   * The size in the SI unit.
   *
   * @return size in W
   */
  public double watts() {
    return si;
  }
}
