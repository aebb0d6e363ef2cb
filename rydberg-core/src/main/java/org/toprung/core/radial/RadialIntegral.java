package org.toprung.core.radial;

/**
 * A radial dipole integral of the valence electron.
 *
 * @param bareA0 ∫ P_a r P_b dr in a0
 * @param coreCorrectionA0 what the polarization of the core adds to it, in a0; 0 for hydrogen
 * @param coreUncertaintyA0 one standard deviation of the core correction in a0
 * @param calibrated whether the core correction is calibrated on a measured element
 */
public record RadialIntegral(
    double bareA0, double coreCorrectionA0, double coreUncertaintyA0, boolean calibrated) {
  /**
   * The integral with the core correction.
   *
   * @return bare value plus correction, in a0
   */
  public double correctedA0() {
    return bareA0 + coreCorrectionA0;
  }
}
