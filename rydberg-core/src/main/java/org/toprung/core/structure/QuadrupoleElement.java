package org.toprung.core.structure;

import org.toprung.core.quantity.Estimate;

/**
 * A reduced element ⟨a‖r²C²‖b⟩ of the electric quadrupole, with its sign and uncertainty. Always
 * computed.
 *
 * @param valueA0Squared the element in a0², with the sign that follows from waves positive near r =
 *     0
 * @param uncertaintyA0Squared one standard deviation in a0²
 * @param source the method
 */
public record QuadrupoleElement(double valueA0Squared, double uncertaintyA0Squared, String source)
    implements ReducedElement {
  /**
   * Checks value and uncertainty.
   *
   * @param valueA0Squared the element in a0²
   * @param uncertaintyA0Squared one standard deviation in a0²
   * @param source the method
   * @throws IllegalArgumentException if one of them is not finite or the uncertainty is negative
   */
  public QuadrupoleElement {
    new Estimate(valueA0Squared, uncertaintyA0Squared);
  }

  @Override
  public double modulus() {
    return Math.abs(valueA0Squared);
  }

  @Override
  public double relativeUncertainty() {
    return uncertaintyA0Squared / Math.abs(valueA0Squared);
  }

  @Override
  public String unit() {
    return "e a0^2";
  }

  @Override
  public DipoleElement.Origin origin() {
    return DipoleElement.Origin.COMPUTED;
  }
}
