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

  /**
   * Returns the components given one by one; they need not be normalized.
   *
   * @param minusRe real part of a<sub>−1</sub>
   * @param minusIm imaginary part of a<sub>−1</sub>
   * @param zeroRe real part of a<sub>0</sub>
   * @param zeroIm imaginary part of a<sub>0</sub>
   * @param plusRe real part of a<sub>+1</sub>
   * @param plusIm imaginary part of a<sub>+1</sub>
   * @return the components
   * @throws IllegalArgumentException if one of them is not finite
   */
  public static SphericalComponents of(
      double minusRe, double minusIm, double zeroRe, double zeroIm, double plusRe, double plusIm) {
    SphericalComponents a =
        new SphericalComponents(minusRe, minusIm, zeroRe, zeroIm, plusRe, plusIm);
    if (!(Double.isFinite(minusRe)
        && Double.isFinite(minusIm)
        && Double.isFinite(zeroRe)
        && Double.isFinite(zeroIm)
        && Double.isFinite(plusRe)
        && Double.isFinite(plusIm))) {
      throw new IllegalArgumentException("spherical components must be finite: " + a);
    }
    return a;
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

  /**
   * Returns the purity: the part of the intensity that is in one component.
   *
   * @param q −1, 0 or 1
   * @return |a<sub>q</sub>|² over the sum of all three, from 0 to 1
   * @throws IllegalArgumentException if q is none of −1, 0, 1, or if all components are zero
   */
  public double purity(int q) {
    double wanted = power(q);
    double total = power(-1) + power(0) + power(1);
    if (!(total > 0)) {
      throw new IllegalArgumentException("a vector without components has no purity: " + this);
    }
    return wanted / total;
  }

  /**
   * Returns the components, about the same axis, of the rotated vector: a′<sub>q</sub> = Σ
   * D<sup>1</sup><sub>qq′</sub>(R) a<sub>q′</sub>.
   *
   * @param rotation rotation of the vector, in the frame of the components
   * @return the components of the rotated vector
   */
  public SphericalComponents rotatedBy(Rotation rotation) {
    double[] re = new double[3];
    double[] im = new double[3];
    for (int q = -1; q <= 1; q++) {
      for (int p = -1; p <= 1; p++) {
        Amplitude d = rotation.element(HalfInteger.ONE, HalfInteger.of(q), HalfInteger.of(p));
        re[q + 1] += d.re() * re(p) - d.im() * im(p);
        im[q + 1] += d.re() * im(p) + d.im() * re(p);
      }
    }
    return new SphericalComponents(re[0], im[0], re[1], im[1], re[2], im[2]);
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
