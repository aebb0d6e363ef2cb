package org.toprung.core.radial;

import java.util.Locale;
import org.toprung.core.atom.Datum;
import org.toprung.core.atom.Species;
import org.toprung.core.quantity.PhysicalConstants;

/**
 * Parametric potential of Marinescu, Sadeghpour and Dalgarno, Phys. Rev. A 49, 982 (1994),
 * doi:10.1103/PhysRevA.49.982:
 *
 * <p>V_l(r) = −Z_l(r)/r − α_c/(2r⁴) (1 − e^{−(r/r_c)⁶}), Z_l(r) = 1 + (z−1) e^{−a1 r} − r (a3 + a4
 * r) e^{−a2 r},
 *
 * <p>plus the spin-orbit energy (α²/2)(1/r)(dV/dr) L·S (1 − α²V/2)^{−2}, whose last factor keeps it
 * below the centrifugal energy at the nucleus (Condon and Shortley, The Theory of Atomic Spectra,
 * section 5⁵; Greene and Aymar, Phys. Rev. A 44, 1773 (1991)).
 */
final class ModelPotential implements ValencePotential {
  /** The last l with parameters of its own; higher ones share them. */
  static final int HIGHEST_L = 3;

  private static final String LETTERS = "SPDF";

  /** The slowest screening exponent in use is above 1, so that r² e^{-a r} is below 1e-14 here. */
  private static final double SCREENING_RADIUS = 42;

  /** Beyond this many cutoff radii e^{-(r/rc)⁶} is below 1e-17. */
  private static final double CUTOFF_RADII = 1.85;

  /** e^−40 is below the resolution of a double next to 1. */
  private static final double SURELY_OUTSIDE = 40;

  private final double charge;
  private final double a1;
  private final double a2;
  private final double a3;
  private final double a4;
  private final double rc;
  private final double alpha;
  private final double spinOrbit;

  ModelPotential(Species species, int l, int doubledJ) {
    String letter = letter(l);
    this.charge = parameter(species, Datum.Kind.NUCLEAR_CHARGE, "");
    this.a1 = parameter(species, Datum.Kind.POTENTIAL_A1, letter);
    this.a2 = parameter(species, Datum.Kind.POTENTIAL_A2, letter);
    this.a3 = parameter(species, Datum.Kind.POTENTIAL_A3, letter);
    this.a4 = parameter(species, Datum.Kind.POTENTIAL_A4, letter);
    this.rc = cutoffRadius(species, l);
    this.alpha = species.corePolarizabilityAu().value();
    double j = doubledJ / 2.0;
    double product = (j * (j + 1) - l * (l + 1.0) - 0.75) / 2;
    this.spinOrbit =
        PhysicalConstants.FINE_STRUCTURE * PhysicalConstants.FINE_STRUCTURE / 2 * product;
  }

  private static String letter(int l) {
    int row = Math.min(l, HIGHEST_L);
    return LETTERS.substring(row, row + 1);
  }

  /** The cutoff radius of the core polarization for an l, in a0. */
  static double cutoffRadius(Species species, int l) {
    return parameter(species, Datum.Kind.POTENTIAL_RC, letter(l));
  }

  private static double parameter(Species species, Datum.Kind kind, String letter) {
    return species
        .datum(kind, letter)
        .orElseThrow(
            () ->
                new IllegalArgumentException(
                    String.format(
                        Locale.ROOT,
                        "the catalogue has no %s of %s %s, so there is no potential for it",
                        kind,
                        species,
                        letter)))
        .value();
  }

  @Override
  public double coreRadius() {
    return Math.max(SCREENING_RADIUS, CUTOFF_RADII * rc);
  }

  @Override
  public double energy(double r) {
    double inner = (charge - 1) * Math.exp(-a1 * r);
    double outer = Math.exp(-a2 * r);
    double shell = a3 + a4 * r;
    double z = 1 + inner - r * shell * outer;
    double zSlope = -a1 * inner - (shell + a4 * r) * outer + a2 * r * shell * outer;
    double ratio = r / rc * (r / rc);
    double cut = ratio * ratio * ratio;
    double outside = cut > SURELY_OUTSIDE ? 1 : -Math.expm1(-cut);
    double inside = 1 - outside;
    double r2 = r * r;
    double r4 = r2 * r2;
    double v = -z / r - alpha / (2 * r4) * outside;
    double slope =
        -zSlope / r + z / r2 + 2 * alpha / (r4 * r) * outside - 3 * alpha / (r4 * r) * cut * inside;
    double damping =
        1 - PhysicalConstants.FINE_STRUCTURE * PhysicalConstants.FINE_STRUCTURE / 2 * v;
    return v + spinOrbit * slope / (r * damping * damping);
  }

  @Override
  public double polarizability() {
    return alpha;
  }

  @Override
  public double spinOrbit() {
    return spinOrbit;
  }
}
