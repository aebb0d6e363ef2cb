package org.toprung.core.structure;

import org.toprung.core.quantity.Estimate;

/**
 * A reduced dipole element ⟨a‖r‖b⟩ with its sign, uncertainty and origin.
 *
 * @param valueA0 the element in a0, with the sign that follows from waves positive near r = 0
 * @param uncertaintyA0 one standard deviation in a0
 * @param origin where the modulus comes from
 * @param source the publication of a measured modulus, or the method of a computed one
 * @param reason why this origin was taken and no better one
 */
public record DipoleElement(
    double valueA0, double uncertaintyA0, Origin origin, String source, String reason)
    implements ReducedElement {
  /** Where the modulus of an element comes from. */
  public enum Origin {
    /** Measured. */
    MEASURED,
    /** Computed, with a core correction calibrated on a measured element of the same series. */
    CALIBRATED,
    /** Computed. */
    COMPUTED
  }

  /**
   * Checks value and uncertainty.
   *
   * @param valueA0 the element in a0
   * @param uncertaintyA0 one standard deviation in a0
   * @param origin where the modulus comes from
   * @param source publication or method
   * @param reason why this origin was taken
   * @throws IllegalArgumentException if one of them is not finite or the uncertainty is negative
   */
  public DipoleElement {
    new Estimate(valueA0, uncertaintyA0);
  }

  /**
   * The squared modulus, to which line strengths and rates are proportional.
   *
   * @return |⟨a‖r‖b⟩|² in a0² with its uncertainty
   */
  public Estimate strength() {
    return new Estimate(valueA0 * valueA0, 2 * Math.abs(valueA0) * uncertaintyA0);
  }

  @Override
  public double modulus() {
    return Math.abs(valueA0);
  }

  @Override
  public double relativeUncertainty() {
    return uncertaintyA0 / Math.abs(valueA0);
  }

  @Override
  public String unit() {
    return "e a0";
  }

  /** The element of opposite sign. */
  DipoleElement negate() {
    return new DipoleElement(-valueA0, uncertaintyA0, origin, source, reason);
  }
}
