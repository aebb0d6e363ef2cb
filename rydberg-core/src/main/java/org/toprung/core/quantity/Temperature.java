package org.toprung.core.quantity;

import java.util.Locale;

/**
 * An absolute temperature. Immutable.
 *
 * <p>Never below absolute zero.
 */
public final class Temperature extends ScalarQuantity<Temperature> {
  private Temperature(double kelvin) {
    super(Dimension.TEMPERATURE, kelvin, "K");
    if (!(kelvin >= 0)) {
      throw new IllegalArgumentException(
          String.format(Locale.ROOT, "temperature must not be below 0 K, given %s K", kelvin));
    }
  }

  /**
   * The quantity of the given size.
   *
   * @param kelvin size in K
   * @return the quantity
   * @throws IllegalArgumentException if the value is not finite or is negative
   */
  public static Temperature ofKelvin(double kelvin) {
    return new Temperature(kelvin);
  }

  /**
   * A number of K.
   *
   * @param value size in K
   * @return the quantity
   * @throws IllegalArgumentException if the value is not finite or is negative
   */
  public static Temperature kelvin(double value) {
    return new Temperature(Dimension.TEMPERATURE.toSi(value, "K"));
  }

  /**
   * A number of mK.
   *
   * @param value size in mK
   * @return the quantity
   * @throws IllegalArgumentException if the value is not finite or is negative
   */
  public static Temperature millikelvin(double value) {
    return new Temperature(Dimension.TEMPERATURE.toSi(value, "mK"));
  }

  /**
   * A number of uK.
   *
   * @param value size in uK
   * @return the quantity
   * @throws IllegalArgumentException if the value is not finite or is negative
   */
  public static Temperature microkelvin(double value) {
    return new Temperature(Dimension.TEMPERATURE.toSi(value, "uK"));
  }

  /**
   * A number of nK.
   *
   * @param value size in nK
   * @return the quantity
   * @throws IllegalArgumentException if the value is not finite or is negative
   */
  public static Temperature nanokelvin(double value) {
    return new Temperature(Dimension.TEMPERATURE.toSi(value, "nK"));
  }

  /**
   * Reads a number followed by a unit, for example "4 nK".
   *
   * @param text number and unit; units: K, mK, uK, nK (a leading u may be written µ)
   * @return the quantity
   * @throws IllegalArgumentException if the text is not a number and one of the units, or the value
   *     is not finite or is negative
   */
  public static Temperature parse(String text) {
    return new Temperature(Dimension.TEMPERATURE.parse(text));
  }

  /**
   * The size in the SI unit.
   *
   * @return size in K
   */
  public double kelvin() {
    return si;
  }
}
