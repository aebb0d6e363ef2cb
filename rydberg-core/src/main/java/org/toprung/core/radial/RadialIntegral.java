package org.toprung.core.radial;

/**
 * A radial dipole integral of the valence electron.
 *
 * @param bareA0 ∫ P_a r P_b dr in a0
 * @param coreCorrectionA0 what the polarization of the core adds to it, −∫ P_a (α_c/r²) w(r) P_b dr in
 *     a0; 0 for hydrogen
 */
public record RadialIntegral(double bareA0, double coreCorrectionA0) {
  /**
   * The integral with the core correction.
   *
   * @return bare value plus correction, in a0
   */
  public double correctedA0() {
    return bareA0 + coreCorrectionA0;
  }
}
