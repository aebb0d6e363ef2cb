package org.toprung.core.radial;

import org.toprung.core.atom.Level;

/**
 * A radial method that has wavefunctions, so that integrals over any power of r follow from them.
 * Implementations are immutable to the outside and thread-safe.
 */
public interface WaveMethod extends RadialMethod {
  /** Lowest power of r that {@link #power} takes. */
  int LOWEST_POWER = -3;

  /** Highest power of r that {@link #power} takes. */
  int HIGHEST_POWER = 8;

  /**
   * The integral ∫ P_a r^k P_b dr, without core correction. With a = b it is the expectation value
   * ⟨r^k⟩; with k = 2 the quadrupole integral. Where l_a + l_b + 2 + k = 0 the integrand does not
   * fall off towards the nucleus, and the inner cut of the waves costs a few 1e-5 of it.
   *
   * @param a one level
   * @param b the other level
   * @param k the power, {@value #LOWEST_POWER} to {@value #HIGHEST_POWER}
   * @return the integral in a0^k, symmetric in a and b
   * @throws IllegalArgumentException if the method cannot describe one of the levels, the power is
   *     out of range, or the integral diverges at the nucleus, as that of r⁻³ between two S levels
   */
  double power(Level a, Level b, int k);

  /**
   * The radial wavefunction of a level, for plots and further integrals.
   *
   * @param level the level
   * @return P(r) at the points the method works with
   * @throws IllegalArgumentException if the method cannot describe the level
   */
  Wavefunction wavefunction(Level level);

  /**
   * Refuses powers out of range, and those whose integral diverges: P_a r^k P_b goes as
   * r^(l_a+l_b+2+k) at the nucleus.
   *
   * @param a one level
   * @param b the other level
   * @param k the power
   * @return the power
   * @throws IllegalArgumentException if it is not {@value #LOWEST_POWER} to {@value
   *     #HIGHEST_POWER}, or l_a + l_b + 3 + k is not positive
   */
  static int requirePower(Level a, Level b, int k) {
    if (!(k >= LOWEST_POWER && k <= HIGHEST_POWER)) {
      throw new IllegalArgumentException(
          "power of r must be " + LOWEST_POWER + " to " + HIGHEST_POWER + ", given " + k);
    }
    if (!(a.l() + b.l() + 3 + k > 0)) {
      throw new IllegalArgumentException(
          "the integral of r^" + k + " between " + a + " and " + b + " diverges at the nucleus");
    }
    return k;
  }
}
