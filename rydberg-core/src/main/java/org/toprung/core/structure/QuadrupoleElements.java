package org.toprung.core.structure;

import java.util.Locale;
import org.toprung.angular.Wigner;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.radial.NumerovMethod;

/**
 * Reduced elements of the electric quadrupole operator r²C²<sub>q</sub> (C Racah's spherical
 * harmonic) between the levels of an atom. Immutable and thread-safe.
 *
 * <p>⟨l‖C²‖l′⟩ = (−1)^l √((2l+1)(2l′+1)) (l 2 l′; 0 0 0), recoupled to ⟨l s j‖C²‖l′ s j′⟩ =
 * (−1)^{l+s+j′+2} √((2j+1)(2j′+1)) {l j s; j′ l′ 2} ⟨l‖C²‖l′⟩ (Edmonds, Angular Momentum in Quantum
 * Mechanics, eqs. 5.4.6 and 7.1.7), times the integral ∫ P_a r² P_b dr of the model potential. The
 * core has no quadrupole correction here; it grows slower with r than the operator, so that it
 * matters less than for the dipole. Uncertainty: 5 % of the value, about twice what the elements of
 * Cs 6S-5D deviate from published many-body ones.
 */
public final class QuadrupoleElements {
  private static final double FLOOR = 0.05;

  private final Species species;
  private final NumerovMethod method;

  private QuadrupoleElements(Species species) {
    this.species = species;
    this.method = NumerovMethod.of(species);
  }

  /**
   * The elements of an atom.
   *
   * @param species the atom
   * @return its elements
   */
  public static QuadrupoleElements of(Species species) {
    return new QuadrupoleElements(species);
  }

  /**
   * A reduced quadrupole element.
   *
   * @param a the level on the left
   * @param b the level on the right
   * @return ⟨a‖r²C²‖b⟩
   * @throws IllegalArgumentException if a level is not one of the species, or the element is
   *     forbidden; the message names the rule
   */
  public QuadrupoleElement reduced(Level a, Level b) {
    species.requireValid(a);
    species.requireValid(b);
    int change = Math.abs(a.l() - b.l());
    if (change != 0 && change != 2 || a.l() + b.l() < 2) {
      throw forbidden(a, b, "l must change by 0 or 2, not 0 to 0 (parity and triangle)");
    }
    if (Math.abs(a.doubledJ() - b.doubledJ()) > 4 || a.doubledJ() + b.doubledJ() < 4) {
      throw forbidden(a, b, "j must change by at most 2, and not 1/2 to 1/2 (triangle)");
    }
    double value = angularFactor(a, b) * method.power(a, b, 2);
    return new QuadrupoleElement(value, FLOOR * Math.abs(value), method.description());
  }

  private static IllegalArgumentException forbidden(Level a, Level b, String rule) {
    return new IllegalArgumentException(
        String.format(
            Locale.ROOT, "the quadrupole element between %s and %s is forbidden: %s", a, b, rule));
  }

  private static double angularFactor(Level a, Level b) {
    int l = a.l();
    int lb = b.l();
    double orbital =
        (l % 2 == 0 ? 1 : -1)
            * Math.sqrt((2 * l + 1.0) * (2 * lb + 1.0))
            * Wigner.threeJDoubled(2 * l, 4, 2 * lb, 0, 0, 0);
    // l + s + j' + 2 with s = 1/2
    int exponent = l + (b.doubledJ() + 5) / 2;
    return (exponent % 2 == 0 ? 1 : -1)
        * Math.sqrt((a.doubledJ() + 1.0) * (b.doubledJ() + 1.0))
        * Wigner.sixJDoubled(2 * l, a.doubledJ(), 1, b.doubledJ(), 2 * lb, 4)
        * orbital;
  }
}
