package org.toprung.core.radial;

import org.toprung.core.atom.Level;

/**
 * A way to compute radial integrals. Implementations are immutable to the outside and thread-safe.
 * All use the same sign convention: wavefunctions are positive near r = 0.
 */
public interface RadialMethod {
  /**
   * What the method is, for reports.
   *
   * @return a short description
   */
  String description();

  /**
   * The dipole integral between two levels. It does not check selection rules: those belong to the
   * angular part.
   *
   * @param a one level
   * @param b the other level
   * @return the integral, symmetric in a and b
   * @throws IllegalArgumentException if the method cannot describe one of the levels
   */
  RadialIntegral dipole(Level a, Level b);
}
