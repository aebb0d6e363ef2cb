package org.toprung.core.quantity;

/** An intensity of light, power per area. Immutable. */
public final class Intensity extends ScalarQuantity<Intensity> {
  private Intensity(double wattsPerSquareMetre) {
    super(Dimension.INTENSITY, wattsPerSquareMetre, "W/m2");
  }

  /**
   * The quantity of the given size.
   *
   * @param wattsPerSquareMetre size in W/m2
   * @return the quantity
   * @throws IllegalArgumentException if the value is not finite
   */
  public static Intensity ofWattsPerSquareMetre(double wattsPerSquareMetre) {
    return new Intensity(wattsPerSquareMetre);
  }

  /**
   * A number of W/mm2.
   *
   * @param value size in W/mm2
   * @return the quantity
   * @throws IllegalArgumentException if the value is not finite
   */
  public static Intensity wattsPerSquareMillimetre(double value) {
    return new Intensity(Dimension.INTENSITY.toSi(value, "W/mm2"));
  }

  /**
   * A number of W/cm2.
   *
   * @param value size in W/cm2
   * @return the quantity
   * @throws IllegalArgumentException if the value is not finite
   */
  public static Intensity wattsPerSquareCentimetre(double value) {
    return new Intensity(Dimension.INTENSITY.toSi(value, "W/cm2"));
  }

  /**
   * A number of mW/cm2.
   *
   * @param value size in mW/cm2
   * @return the quantity
   * @throws IllegalArgumentException if the value is not finite
   */
  public static Intensity milliwattsPerSquareCentimetre(double value) {
    return new Intensity(Dimension.INTENSITY.toSi(value, "mW/cm2"));
  }

  /**
   * Reads a number followed by a unit, for example "4 W/cm2".
   *
   * @param text number and unit; units: kW/cm2, W/mm2, W/cm2, mW/mm2, mW/cm2, W/m2
   * @return the quantity
   * @throws IllegalArgumentException if the text is not a number and one of the units, or the value
   *     is not finite
   */
  public static Intensity parse(String text) {
    return new Intensity(Dimension.INTENSITY.parse(text));
  }

  /**
   * The size in the SI unit.
   *
   * @return size in W/m2
   */
  public double wattsPerSquareMetre() {
    return si;
  }
}
