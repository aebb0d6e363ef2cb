package org.toprung.core.quantity;

/** A magnetic flux density. Immutable. */
public final class MagneticField extends ScalarQuantity<MagneticField> {
  private MagneticField(double tesla) {
    super(Dimension.MAGNETIC_FIELD, tesla, "T");
  }

  /**
   * The quantity of the given size.
   *
   * @param tesla size in T
   * @return the quantity
   * @throws IllegalArgumentException if the value is not finite
   */
  public static MagneticField ofTesla(double tesla) {
    return new MagneticField(tesla);
  }

  /**
   * A number of T.
   *
   * @param value size in T
   * @return the quantity
   * @throws IllegalArgumentException if the value is not finite
   */
  public static MagneticField tesla(double value) {
    return new MagneticField(Dimension.MAGNETIC_FIELD.toSi(value, "T"));
  }

  /**
   * A number of mT.
   *
   * @param value size in mT
   * @return the quantity
   * @throws IllegalArgumentException if the value is not finite
   */
  public static MagneticField millitesla(double value) {
    return new MagneticField(Dimension.MAGNETIC_FIELD.toSi(value, "mT"));
  }

  /**
   * A number of uT.
   *
   * @param value size in uT
   * @return the quantity
   * @throws IllegalArgumentException if the value is not finite
   */
  public static MagneticField microtesla(double value) {
    return new MagneticField(Dimension.MAGNETIC_FIELD.toSi(value, "uT"));
  }

  /**
   * A number of G.
   *
   * @param value size in G
   * @return the quantity
   * @throws IllegalArgumentException if the value is not finite
   */
  public static MagneticField gauss(double value) {
    return new MagneticField(Dimension.MAGNETIC_FIELD.toSi(value, "G"));
  }

  /**
   * A number of mG.
   *
   * @param value size in mG
   * @return the quantity
   * @throws IllegalArgumentException if the value is not finite
   */
  public static MagneticField milligauss(double value) {
    return new MagneticField(Dimension.MAGNETIC_FIELD.toSi(value, "mG"));
  }

  /**
   * Reads a number followed by a unit, for example "4 mG".
   *
   * @param text number and unit; units: T, mT, uT, G, mG (a leading u may be written µ)
   * @return the quantity
   * @throws IllegalArgumentException if the text is not a number and one of the units, or the value
   *     is not finite
   */
  public static MagneticField parse(String text) {
    return new MagneticField(Dimension.MAGNETIC_FIELD.parse(text));
  }

  /**
   * The size in the SI unit.
   *
   * @return size in T
   */
  public double tesla() {
    return si;
  }
}
