package org.toprung.core.structure;

/**
 * A reduced element of a multipole operator between two levels, of which a step of a drive asks
 * only size, trust and origin.
 */
public sealed interface ReducedElement permits DipoleElement, QuadrupoleElement {
  /**
   * Size of the element.
   *
   * @return the modulus, in {@link #unit()}
   */
  double modulus();

  /**
   * Relative standard uncertainty.
   *
   * @return the uncertainty over the modulus
   */
  double relativeUncertainty();

  /**
   * Unit of the modulus.
   *
   * @return "e a0" for a dipole, "e a0^2" for a quadrupole
   */
  String unit();

  /**
   * Where the modulus comes from.
   *
   * @return the origin
   */
  DipoleElement.Origin origin();

  /**
   * The publication of a measured modulus, or the method of a computed one.
   *
   * @return the source
   */
  String source();
}
