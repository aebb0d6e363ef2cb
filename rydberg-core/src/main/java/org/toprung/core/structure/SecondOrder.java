package org.toprung.core.structure;

import org.toprung.angular.Wigner;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.quantity.PhysicalConstants;

/** The pieces of second-order shifts: squared elements between sublevels, and their unit. */
final class SecondOrder {
  /** (e a0/h)² in Hz² per (V/m)² and a0²: turns a0²/Hz into Hz/(V/m)². */
  static final double COUPLING_SQUARED =
      Math.pow(PhysicalConstants.ATOMIC_DIPOLE / PhysicalConstants.PLANCK, 2);

  private static final double GROUND_CONTINUUM_AU = 1;
  private static final double CONTINUUM_SHARE = 0.1;

  private SecondOrder() {}

  /** |⟨b m+q|r_q|a m⟩|² / |⟨b‖r‖a⟩|², by the Wigner-Eckart theorem. */
  static double share(Level a, int doubledM, Level b, int q) {
    int upper = doubledM + 2 * q;
    if (Math.abs(upper) > b.doubledJ()) {
      return 0;
    }
    double symbol = Wigner.threeJDoubled(b.doubledJ(), 2, a.doubledJ(), -upper, 2 * q, doubledM);
    return symbol * symbol;
  }

  /**
   * The uncertainty, in atomic units of polarizability, that stands for the continuum where it is
   * not summed. Its oscillator strength is a part of 1 and its transition energies exceed the
   * binding energy E, so it is a part of 1/E²: a tenth is taken, and 1 for the ground level, from
   * which the principal series takes nearly all the strength.
   */
  static double continuumAu(Species species, Level level) {
    if (level.equals(species.groundLevel())) {
      return GROUND_CONTINUUM_AU;
    }
    double bindingAu = species.energyHertz(level).value() / PhysicalConstants.HARTREE_HERTZ;
    return CONTINUUM_SHARE / (bindingAu * bindingAu);
  }

  /** Refuses projections that do not belong to the level. */
  static void requireProjection(Level level, int doubledM) {
    if (Math.abs(doubledM) > level.doubledJ() || doubledM % 2 == 0) {
      throw new IllegalArgumentException(
          "doubled mJ of "
              + level
              + " must be odd and from "
              + -level.doubledJ()
              + " to "
              + level.doubledJ()
              + ", given "
              + doubledM);
    }
  }
}
