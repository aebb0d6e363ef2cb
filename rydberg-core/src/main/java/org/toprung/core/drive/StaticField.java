package org.toprung.core.drive;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import org.toprung.angular.HalfInteger;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.atom.Sublevel;
import org.toprung.core.quantity.MagneticField;
import org.toprung.core.quantity.PhysicalConstants;
import org.toprung.core.structure.StarkShift;
import org.toprung.core.structure.StaticPolarizability;

/**
 * A static electric field in the lab frame, components in V/m, and what it does to Rydberg
 * sublevels. Levels below are so much less polarizable (n⁷) that it leaves them alone.
 */
record StaticField(double x, double y, double z) {
  static final StaticField NONE = new StaticField(0, 0, 0);

  private static final double SMALL = 0.1;

  boolean isZero() {
    return x == 0 && y == 0 && z == 0;
  }

  /** Quadratic shift of a sublevel, Hz. */
  double shiftHertz(Species species, Level level, int doubledMj) {
    if (isZero()) {
      return 0;
    }
    return StarkShift.of(species, Sublevel.fine(level, 0.5 * doubledMj)).hertz(x, y, z);
  }

  /** What makes the quadratic, diagonal shift of the target doubtful. */
  List<String> warnings(Species species, Sublevel target, MagneticField magnetic) {
    List<String> found = new ArrayList<>();
    if (isZero()) {
      return found;
    }
    StarkShift stark = StarkShift.of(species, target);
    double shift = stark.hertz(x, y, z);
    double distance = stark.distanceToOtherParityHertz();
    if (!(Math.abs(shift) <= SMALL * distance)) {
      found.add(
          String.format(
              Locale.ROOT,
              "the electric field shifts %s by %.4g MHz, which is not small against the %.4g MHz to"
                  + " the next level of other parity (ratio %.2g, should be below %.1g): the shift"
                  + " is no longer quadratic (linear Stark regime)",
              target,
              shift * 1e-6,
              distance * 1e-6,
              Math.abs(shift) / distance,
              SMALL));
    }
    for (int step = -2; step <= 2; step++) {
      int other = target.doubledM() + 2 * step;
      if (step != 0 && Math.abs(other) <= target.level().doubledJ()) {
        double mixing = mixing(species, target, other, magnetic);
        if (!(mixing <= SMALL)) {
          found.add(
              String.format(
                  Locale.ROOT,
                  "the electric field across the magnetic one couples %s with mJ=%s by %.2g of their"
                      + " distance (should be below %.1g), so mJ is no good label: a larger magnetic"
                      + " field, or an electric one along it, keeps them apart",
                  target,
                  HalfInteger.ofHalves(other),
                  mixing,
                  SMALL));
        }
      }
    }
    return found;
  }

  /**
   * Coupling of the target with another sublevel of its level over their distance in energy: the
   * tensor part of the shift, −½α₂[3(J·E)² − J(J+1)E²]/(J(2J−1)), changes m by 1 or 2 where the
   * field is not along z.
   */
  private double mixing(Species species, Sublevel target, int doubledM, MagneticField magnetic) {
    Level level = target.level();
    double j = 0.5 * level.doubledJ();
    double m = 0.5 * Math.min(target.doubledM(), doubledM);
    double across = Math.hypot(x, y);
    if (level.doubledJ() == 1 || across == 0) {
      return 0;
    }
    double up = 0.5 * Math.sqrt(j * (j + 1) - m * (m + 1)); // ⟨m+1|Jx|m⟩
    boolean neighbours = Math.abs(target.doubledM() - doubledM) == 2;
    double operator =
        neighbours
            ? z * across * (2 * m + 1) * up
            : across * across * up * 0.5 * Math.sqrt(j * (j + 1) - (m + 1) * (m + 2));
    double alpha2 = StaticPolarizability.of(species).tensorHertzPerFieldSquared(level).value();
    double coupling = Math.abs(1.5 * alpha2 * operator / (j * (2 * j - 1)));
    double zeeman =
        0.5
            * (target.doubledM() - doubledM)
            * species.gJ(level)
            * PhysicalConstants.BOHR_MAGNETON_HERTZ_PER_TESLA
            * magnetic.tesla();
    double distance =
        zeeman
            + shiftHertz(species, level, target.doubledM())
            - shiftHertz(species, level, doubledM);
    return coupling == 0 ? 0 : coupling / Math.abs(distance);
  }
}
