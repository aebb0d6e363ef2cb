package org.toprung.core.radial;

import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;

/**
 * Dipole integrals with WKB waves in the Coulomb potential, l(l+1) replaced by (l+½)² and carried
 * through the turning points by Airy functions (Langer, Phys. Rev. 51, 669 (1937)).
 *
 * <p>From the outer turning point P = √(2/ν³) (ζ/p²)^¼ Ai(−ζ), ⅔ζ^{3/2} = S = ∫_r^{r_2} p dr, which
 * is √(2/(πν³p)) cos(S − π/4) far from it; from the inner one the combination of Ai and Bi that is
 * the same in between, of which only Ai is kept in the forbidden region, since Bi there belongs to
 * the core. Both are used on their side of r = ν². In closed form, r = ν²(1 + e cos η), S = ν(η − e
 * sin η) − (l+½)φ, φ the angle from the aphelion.
 *
 * <p>Good to a few per mille between Rydberg levels. From the ground level it can be wrong by a
 * factor of two or more, although it scales rightly with n*^(−3/2).
 *
 * <p>Immutable and thread-safe.
 */
public final class WkbMethod implements RadialMethod {
  private static final double[] NODE = {
    0.1834346424956498, 0.5255324099163290, 0.7966664774136267, 0.9602898564975363
  };
  private static final double[] WEIGHT = {
    0.3626837833783620, 0.3137066458778873, 0.2223810344533745, 0.1012285362903763
  };

  /** Width of a panel in √r: less than a radian of the phase of both waves. */
  private static final double WIDTH = 0.25;

  private static final double TAIL = 14;

  private final Species species;

  private WkbMethod(Species species) {
    this.species = species;
  }

  /**
   * The method for an atom.
   *
   * @param species the atom
   * @return the method
   */
  public static WkbMethod of(Species species) {
    return new WkbMethod(species);
  }

  @Override
  public String description() {
    return "WKB with Langer's replacement";
  }

  /**
   * {@inheritDoc}
   *
   * @throws IllegalArgumentException if a level belongs to the core, or the effective n of a level
   *     is not above l + 1/2
   */
  @Override
  public RadialIntegral dipole(Level a, Level b) {
    Orbit one = orbit(a);
    Orbit two = orbit(b);
    double sign = (a.n() - a.l() + b.n() - b.l()) % 2 == 0 ? 1 : -1;
    return new RadialIntegral(sign * integral(one, two), 0, 0, false);
  }

  private Orbit orbit(Level level) {
    double nu = species.effectiveN(level);
    double angular = level.l() + 0.5;
    if (!(nu > angular)) {
      throw new IllegalArgumentException(
          "WKB needs an effective n above l + 1/2; " + level + " has " + nu);
    }
    return new Orbit(nu, angular);
  }

  private static double integral(Orbit one, Orbit two) {
    int panels = (int) Math.ceil(Math.sqrt(Math.min(one.end(), two.end())) / WIDTH);
    double sum = 0;
    for (int panel = 0; panel < panels; panel++) {
      double middle = (panel + 0.5) * WIDTH;
      for (int i = 0; i < NODE.length; i++) {
        for (int side = -1; side <= 1; side += 2) {
          double x = middle + side * WIDTH / 2 * NODE[i];
          double r = x * x;
          sum += WEIGHT[i] * 2 * x * r * one.wave(r) * two.wave(r);
        }
      }
    }
    return sum * WIDTH / 2;
  }

  private static final class Orbit {
    private final double nu;
    private final double angular;
    private final double e;

    Orbit(double nu, double angular) {
      this.nu = nu;
      this.angular = angular;
      this.e = Math.sqrt(1 - angular * angular / (nu * nu));
    }

    /** Radius where the wave has decayed. */
    double end() {
      return nu * nu * (1 + e) + TAIL * Math.pow(nu, 4.0 / 3) + TAIL;
    }

    double wave(double r) {
      double squared = 2 / r - 1 / (nu * nu) - angular * angular / (r * r);
      double cosine = (r / (nu * nu) - 1) / e;
      double size = Math.sqrt(2 / (nu * nu * nu * Math.sqrt(Math.abs(squared))));
      if (cosine > 0) {
        double s = action(cosine, angularRatio(-1), -1);
        double zeta = Math.cbrt(2.25 * s * s);
        double argument = cosine > 1 ? zeta : -zeta;
        return size * Math.sqrt(Math.sqrt(zeta)) * AiryFunctions.of(argument).ai();
      }
      double s = action(-cosine, angularRatio(1), 1);
      double zeta = Math.cbrt(2.25 * s * s);
      double shift = Math.PI * (nu - angular - 0.5);
      double factor = size * Math.sqrt(Math.sqrt(zeta));
      if (cosine < -1) {
        return factor * Math.cos(shift) * AiryFunctions.of(zeta).ai();
      }
      AiryFunctions airy = AiryFunctions.of(-zeta);
      return factor * (Math.cos(shift) * airy.ai() - Math.sin(shift) * airy.bi());
    }

    /** √((1±e)/(1∓e)): tan of half the true over tan of half the eccentric anomaly. */
    private double angularRatio(int sign) {
      return Math.sqrt((1 + sign * e) / (1 - sign * e));
    }

    /** Modulus of ∫p dr from the outer (sign −1) or inner (+1) turning point, cos η given. */
    private double action(double cosine, double ratio, int sign) {
      if (cosine <= 1) {
        double eta = Math.acos(cosine);
        double angle = 2 * Math.atan(ratio * Math.tan(eta / 2));
        return nu * (eta + sign * e * Math.sin(eta)) - angular * angle;
      }
      double eta = Math.log(cosine + Math.sqrt(cosine * cosine - 1));
      double tangent = ratio * Math.tanh(eta / 2);
      double angle = Math.log1p(2 * tangent / (1 - tangent));
      return Math.abs(nu * (eta + sign * e * Math.sinh(eta)) - angular * angle);
    }
  }
}
