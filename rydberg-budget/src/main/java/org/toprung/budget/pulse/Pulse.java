package org.toprung.budget.pulse;

import org.toprung.core.quantity.Frequency;

/**
 * A square pulse of the whole ladder, both beams together.
 *
 * <p>Its edges are taken to be slow against the intermediate detuning and fast against the
 * effective Rabi period, so that they dress the atom without turning it.
 *
 * <p>Immutable.
 */
public final class Pulse {
  private final double areaRadians;
  private final Frequency offset;

  private Pulse(double areaRadians, Frequency offset) {
    this.areaRadians = areaRadians;
    this.offset = offset;
  }

  /**
   * The π pulse: full transfer on the light-shifted resonance.
   *
   * @return a pulse of area π without offset
   */
  public static Pulse pi() {
    return new Pulse(Math.PI, Frequency.ofHertz(0));
  }

  /**
   * Moves the ladder's laser frequency away from the light-shifted resonance.
   *
   * @param newOffset laser minus light-shifted resonance
   * @return a copy with this offset
   */
  public Pulse offsetBy(Frequency newOffset) {
    return new Pulse(areaRadians, newOffset);
  }

  /**
   * Area Ωt.
   *
   * @return the area, rad
   */
  public double areaRadians() {
    return areaRadians;
  }

  /**
   * Laser minus light-shifted resonance.
   *
   * @return the offset
   */
  public Frequency offset() {
    return offset;
  }
}
