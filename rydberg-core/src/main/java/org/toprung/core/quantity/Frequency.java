package org.toprung.core.quantity;

/**
 * An ordinary frequency (cycles per second). Immutable.
 *
 * <p>Ordinary and angular frequency never mix: both have their own, named way in and out, so no 2π
 * can be lost. Differences of frequencies (detunings) may be negative.
 */
public final class Frequency extends ScalarQuantity<Frequency> {
  private Frequency(double hertz) {
    super(Dimension.FREQUENCY, hertz, "Hz");
  }

  /**
   * The quantity of the given size.
   *
   * @param hertz size in Hz
   * @return the quantity
   * @throws IllegalArgumentException if the value is not finite
   */
  public static Frequency ofHertz(double hertz) {
    return new Frequency(hertz);
  }

  /**
   * The frequency whose angular frequency is given.
   *
   * @param radiansPerSecond angular frequency in rad/s
   * @return the ordinary frequency, that is the angular one divided by 2π
   * @throws IllegalArgumentException if the value is not finite
   */
  public static Frequency ofRadiansPerSecond(double radiansPerSecond) {
    return new Frequency(radiansPerSecond / (2 * Math.PI));
  }

  /**
   * A number of Hz.
   *
   * @param value size in Hz
   * @return the quantity
   * @throws IllegalArgumentException if the value is not finite
   */
  public static Frequency hertz(double value) {
    return new Frequency(Dimension.FREQUENCY.toSi(value, "Hz"));
  }

  /**
   * A number of kHz.
   *
   * @param value size in kHz
   * @return the quantity
   * @throws IllegalArgumentException if the value is not finite
   */
  public static Frequency kilohertz(double value) {
    return new Frequency(Dimension.FREQUENCY.toSi(value, "kHz"));
  }

  /**
   * A number of MHz.
   *
   * @param value size in MHz
   * @return the quantity
   * @throws IllegalArgumentException if the value is not finite
   */
  public static Frequency megahertz(double value) {
    return new Frequency(Dimension.FREQUENCY.toSi(value, "MHz"));
  }

  /**
   * A number of GHz.
   *
   * @param value size in GHz
   * @return the quantity
   * @throws IllegalArgumentException if the value is not finite
   */
  public static Frequency gigahertz(double value) {
    return new Frequency(Dimension.FREQUENCY.toSi(value, "GHz"));
  }

  /**
   * A number of THz.
   *
   * @param value size in THz
   * @return the quantity
   * @throws IllegalArgumentException if the value is not finite
   */
  public static Frequency terahertz(double value) {
    return new Frequency(Dimension.FREQUENCY.toSi(value, "THz"));
  }

  /**
   * Reads a number followed by a unit, for example "4 THz".
   *
   * @param text number and unit; units: Hz, kHz, MHz, GHz, THz (a leading u may be written µ)
   * @return the quantity
   * @throws IllegalArgumentException if the text is not a number and one of the units, or the value
   *     is not finite
   */
  public static Frequency parse(String text) {
    return new Frequency(Dimension.FREQUENCY.parse(text));
  }

  /**
   * The size in the SI unit.
   *
   * @return size in Hz
   */
  public double hertz() {
    return si;
  }

  /**
   * The angular frequency.
   *
   * @return 2π times the ordinary frequency, in rad/s
   */
  public double radiansPerSecond() {
    return 2 * Math.PI * si;
  }
}
