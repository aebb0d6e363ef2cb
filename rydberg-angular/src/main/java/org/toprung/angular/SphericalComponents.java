package org.toprung.angular;

import java.util.Locale;

/**
 * The spherical components a<sub>q</sub>, q = −1, 0, 1, of a complex vector ε about some axis: ε =
 * Σ a<sub>q</sub> e<sub>q</sub>, a<sub>q</sub> = e<sub>q</sub>*·ε, with e<sub>±1</sub> = ∓(x ±
 * iy)/√2 and e<sub>0</sub> = z.
 *
 * <p>For light, d·ε = Σ a<sub>q</sub> d<sub>q</sub>, with d<sub>q</sub> the spherical components of
 * the dipole operator: a<sub>+1</sub> drives Δm = +1 in absorption. (Varshalovich, Moskalev and
 * Khersonskii, Quantum Theory of Angular Momentum (1988), 1.1.3 and 1.2.2.)
 */
public final class SphericalComponents {

  private final double minusRe;
  private final double minusIm;
  private final double zeroRe;
  private final double zeroIm;
  private final double plusRe;
  private final double plusIm;

  private SphericalComponents(
      double minusRe, double minusIm, double zeroRe, double zeroIm, double plusRe, double plusIm) {
    this.minusRe = minusRe;
    this.minusIm = minusIm;
    this.zeroRe = zeroRe;
    this.zeroIm = zeroIm;
    this.plusRe = plusRe;
    this.plusIm = plusIm;
  }

  /** Components of a vector given by its Cartesian components in the frame of the axis. */
  static SphericalComponents ofCartesian(
      double xRe, double xIm, double yRe, double yIm, double zRe, double zIm) {
    double r = Math.sqrt(0.5);
    // a₊₁ = −(x − iy)/√2, a₋₁ = (x + iy)/√2
    return new SphericalComponents(
        r * (xRe - yIm), r * (xIm + yRe), zRe, zIm, -r * (xRe + yIm), -r * (xIm - yRe));
  }

  /**
   * Returns the real part of a component.
   *
   * @param q −1, 0 or 1
   * @return Re a<sub>q</sub>
   * @throws IllegalArgumentException if q is none of −1, 0, 1
   */
  public double re(int q) {
    return switch (q) {
      case -1 -> minusRe;
      case 0 -> zeroRe;
      case 1 -> plusRe;
      default -> throw noSuchComponent(q);
    };
  }

  /**
   * Returns the imaginary part of a component.
   *
   * @param q −1, 0 or 1
   * @return Im a<sub>q</sub>
   * @throws IllegalArgumentException if q is none of −1, 0, 1
   */
  public double im(int q) {
    return switch (q) {
      case -1 -> minusIm;
      case 0 -> zeroIm;
      case 1 -> plusIm;
      default -> throw noSuchComponent(q);
    };
  }

  /**
   * Returns the part of the intensity in a component.
   *
   * @param q −1, 0 or 1
   * @return |a<sub>q</sub>|²; the three add up to the squared norm of the vector
   * @throws IllegalArgumentException if q is none of −1, 0, 1
   */
  public double power(int q) {
    double re = re(q);
    double im = im(q);
    return re * re + im * im;
  }

  private static IllegalArgumentException noSuchComponent(int q) {
    return new IllegalArgumentException("no spherical component q = " + q + " (allowed: -1, 0, 1)");
  }

  /**
   * Returns the three components as text.
   *
   * @return a text for people
   */
  @Override
  public String toString() {
    return String.format(
        Locale.ROOT,
        "a(-1) = %.6g%+.6gi, a(0) = %.6g%+.6gi, a(+1) = %.6g%+.6gi",
        minusRe,
        minusIm,
        zeroRe,
        zeroIm,
        plusRe,
        plusIm);
  }
}
