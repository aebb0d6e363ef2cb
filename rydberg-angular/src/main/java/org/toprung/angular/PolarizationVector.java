package org.toprung.angular;

import java.util.Locale;

/**
 * A unit complex polarization vector ε in the lab frame; the field is proportional to Re(ε
 * e<sup>−iωt</sup>).
 */
public final class PolarizationVector {

  private final double xRe;
  private final double xIm;
  private final double yRe;
  private final double yIm;
  private final double zRe;
  private final double zIm;

  private PolarizationVector(
      double xRe, double xIm, double yRe, double yIm, double zRe, double zIm) {
    this.xRe = xRe;
    this.xIm = xIm;
    this.yRe = yRe;
    this.yIm = yIm;
    this.zRe = zRe;
    this.zIm = zIm;
  }

  /**
   * Returns the unit vector along the given complex lab-frame vector; the phase is kept.
   *
   * @param xRe real part of the x component
   * @param xIm imaginary part of the x component
   * @param yRe real part of the y component
   * @param yIm imaginary part of the y component
   * @param zRe real part of the z component
   * @param zIm imaginary part of the z component
   * @return the normalized vector
   * @throws IllegalArgumentException if a component is not finite or all are zero
   */
  public static PolarizationVector of(
      double xRe, double xIm, double yRe, double yIm, double zRe, double zIm) {
    double largest =
        Math.max(
            Math.max(
                Math.max(Math.abs(xRe), Math.abs(xIm)), Math.max(Math.abs(yRe), Math.abs(yIm))),
            Math.max(Math.abs(zRe), Math.abs(zIm)));
    if (!(largest > 0 && largest < Double.POSITIVE_INFINITY)) {
      throw new IllegalArgumentException(
          "polarization vector must be finite and not zero: " + text(xRe, xIm, yRe, yIm, zRe, zIm));
    }
    // A power of two, so that scaling against overflow does not touch the digits.
    int exponent = Math.getExponent(largest);
    double sx = Math.scalb(xRe, -exponent);
    double tx = Math.scalb(xIm, -exponent);
    double sy = Math.scalb(yRe, -exponent);
    double ty = Math.scalb(yIm, -exponent);
    double sz = Math.scalb(zRe, -exponent);
    double tz = Math.scalb(zIm, -exponent);
    double norm = Math.sqrt(sx * sx + tx * tx + sy * sy + ty * ty + sz * sz + tz * tz);
    if (exponent <= 0 && Math.abs(Math.scalb(norm, exponent) - 1) < 4e-16) {
      // Already of unit length: kept bit by bit, so that text and back is the identity.
      return new PolarizationVector(xRe, xIm, yRe, yIm, zRe, zIm);
    }
    return new PolarizationVector(sx / norm, tx / norm, sy / norm, ty / norm, sz / norm, tz / norm);
  }

  /**
   * Returns the real part of the x component.
   *
   * @return Re ε<sub>x</sub>
   */
  public double xRe() {
    return xRe;
  }

  /**
   * Returns the imaginary part of the x component.
   *
   * @return Im ε<sub>x</sub>
   */
  public double xIm() {
    return xIm;
  }

  /**
   * Returns the real part of the y component.
   *
   * @return Re ε<sub>y</sub>
   */
  public double yRe() {
    return yRe;
  }

  /**
   * Returns the imaginary part of the y component.
   *
   * @return Im ε<sub>y</sub>
   */
  public double yIm() {
    return yIm;
  }

  /**
   * Returns the real part of the z component.
   *
   * @return Re ε<sub>z</sub>
   */
  public double zRe() {
    return zRe;
  }

  /**
   * Returns the imaginary part of the z component.
   *
   * @return Im ε<sub>z</sub>
   */
  public double zIm() {
    return zIm;
  }

  /**
   * Returns the spherical components about an axis.
   *
   * <p>The axis, at polar angle θ and azimuth φ in the lab, becomes z′ of a frame whose x′ axis
   * points to increasing θ: x′ = (cos θ cos φ, cos θ sin φ, −sin θ), y′ = (−sin φ, cos φ, 0); that
   * is the lab frame turned by Rz(φ)Ry(θ). For an axis along ±z, φ = 0, so that +z gives the lab
   * frame itself. Turning x′ about the axis by an angle χ would only multiply a<sub>q</sub> by
   * e<sup>−iqχ</sup>: powers do not depend on the choice.
   *
   * @param ax x component of the axis
   * @param ay y component of the axis
   * @param az z component of the axis; the length of (ax, ay, az) does not matter
   * @return the components a<sub>q</sub> = e<sub>q</sub>′*·ε
   * @throws IllegalArgumentException if the axis is not finite or zero
   */
  public SphericalComponents componentsAbout(double ax, double ay, double az) {
    Direction axis = Direction.of("axis", ax, ay, az);
    double sinTheta = axis.transverse();
    double cosTheta = axis.z();
    double cosPhi = sinTheta == 0 ? 1 : axis.x() / sinTheta;
    double sinPhi = sinTheta == 0 ? 0 : axis.y() / sinTheta;
    return SphericalComponents.ofCartesian(
        cosTheta * (cosPhi * xRe + sinPhi * yRe) - sinTheta * zRe,
        cosTheta * (cosPhi * xIm + sinPhi * yIm) - sinTheta * zIm,
        cosPhi * yRe - sinPhi * xRe,
        cosPhi * yIm - sinPhi * xIm,
        sinTheta * (cosPhi * xRe + sinPhi * yRe) + cosTheta * zRe,
        sinTheta * (cosPhi * xIm + sinPhi * yIm) + cosTheta * zIm);
  }

  /**
   * Returns the unit vector with the given spherical components about an axis: the inverse of
   * {@link #componentsAbout}, apart from the norm.
   *
   * @param components the components a<sub>q</sub>
   * @param ax x component of the axis
   * @param ay y component of the axis
   * @param az z component of the axis; the length of (ax, ay, az) does not matter
   * @return Σ a<sub>q</sub> e<sub>q</sub>′, normalized
   * @throws IllegalArgumentException if the axis is not finite or zero, or if all components are
   *     zero
   */
  public static PolarizationVector ofComponentsAbout(
      SphericalComponents components, double ax, double ay, double az) {
    Direction axis = Direction.of("axis", ax, ay, az);
    double r = Math.sqrt(0.5);
    double xRe = r * (components.re(-1) - components.re(1));
    double xIm = r * (components.im(-1) - components.im(1));
    // y′ component: −i (a₊₁ + a₋₁)/√2
    double yRe = r * (components.im(1) + components.im(-1));
    double yIm = -r * (components.re(1) + components.re(-1));
    double zRe = components.re(0);
    double zIm = components.im(0);
    double sinTheta = axis.transverse();
    double cosTheta = axis.z();
    double cosPhi = sinTheta == 0 ? 1 : axis.x() / sinTheta;
    double sinPhi = sinTheta == 0 ? 0 : axis.y() / sinTheta;
    double outRe = cosTheta * xRe + sinTheta * zRe;
    double outIm = cosTheta * xIm + sinTheta * zIm;
    return of(
        cosPhi * outRe - sinPhi * yRe,
        cosPhi * outIm - sinPhi * yIm,
        sinPhi * outRe + cosPhi * yRe,
        sinPhi * outIm + cosPhi * yIm,
        cosTheta * zRe - sinTheta * xRe,
        cosTheta * zIm - sinTheta * xIm);
  }

  /**
   * Returns the rotated vector.
   *
   * @param rotation active rotation in the lab frame
   * @return Rε
   */
  public PolarizationVector rotatedBy(Rotation rotation) {
    return ofComponentsAbout(componentsAbout(0, 0, 1).rotatedBy(rotation), 0, 0, 1);
  }

  /**
   * Returns the purity with respect to a wanted polarization: the part of the intensity that a
   * perfect polarizer for the wanted one would pass.
   *
   * @param wanted the wanted polarization
   * @return |ε<sub>wanted</sub>*·ε|², from 0 to 1
   */
  public double purity(PolarizationVector wanted) {
    double re =
        wanted.xRe * xRe
            + wanted.xIm * xIm
            + wanted.yRe * yRe
            + wanted.yIm * yIm
            + wanted.zRe * zRe
            + wanted.zIm * zIm;
    double im =
        wanted.xRe * xIm
            - wanted.xIm * xRe
            + wanted.yRe * yIm
            - wanted.yIm * yRe
            + wanted.zRe * zIm
            - wanted.zIm * zRe;
    return Math.min(1, re * re + im * im);
  }

  private static String text(
      double xRe, double xIm, double yRe, double yIm, double zRe, double zIm) {
    return String.format(Locale.ROOT, "(%s, %s) (%s, %s) (%s, %s)", xRe, xIm, yRe, yIm, zRe, zIm);
  }

  /**
   * Returns the components as text.
   *
   * @return {@code (re, im)} of x, y and z, digit for digit
   */
  @Override
  public String toString() {
    return text(xRe, xIm, yRe, yIm, zRe, zIm);
  }
}
