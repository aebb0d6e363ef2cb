package org.toprung.core.quantity;

/** An electric field. Immutable. */
public final class ElectricField extends ScalarQuantity<ElectricField> {
  private ElectricField(double voltsPerMetre) {
    super(Dimension.ELECTRIC_FIELD, voltsPerMetre, "V/m");
  }

  /**
   * The quantity of the given size.
   *
   * @param voltsPerMetre size in V/m
   * @return the quantity
   * @throws IllegalArgumentException if the value is not finite
   */
  public static ElectricField ofVoltsPerMetre(double voltsPerMetre) {
    return new ElectricField(voltsPerMetre);
  }

  /**
   * A number of V/m.
   *
   * @param value size in V/m
   * @return the quantity
   * @throws IllegalArgumentException if the value is not finite
   */
  public static ElectricField voltsPerMetre(double value) {
    return new ElectricField(Dimension.ELECTRIC_FIELD.toSi(value, "V/m"));
  }

  /**
   * A number of V/cm.
   *
   * @param value size in V/cm
   * @return the quantity
   * @throws IllegalArgumentException if the value is not finite
   */
  public static ElectricField voltsPerCentimetre(double value) {
    return new ElectricField(Dimension.ELECTRIC_FIELD.toSi(value, "V/cm"));
  }

  /**
   * A number of mV/cm.
   *
   * @param value size in mV/cm
   * @return the quantity
   * @throws IllegalArgumentException if the value is not finite
   */
  public static ElectricField millivoltsPerCentimetre(double value) {
    return new ElectricField(Dimension.ELECTRIC_FIELD.toSi(value, "mV/cm"));
  }

  /**
   * Reads a number followed by a unit, for example "4 mV/cm".
   *
   * @param text number and unit; units: V/m, V/cm, mV/cm (a leading u may be written µ)
   * @return the quantity
   * @throws IllegalArgumentException if the text is not a number and one of the units, or the value
   *     is not finite
   */
  public static ElectricField parse(String text) {
    return new ElectricField(Dimension.ELECTRIC_FIELD.parse(text));
  }

  /**
   * The size in the SI unit.
   *
   * @return size in V/m
   */
  public double voltsPerMetre() {
    return si;
  }
}
