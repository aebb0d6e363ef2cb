package org.toprung.core.drive;

import java.util.Locale;
import org.toprung.angular.PolarizationVector;

/**
 * Light of the wrong polarization in a beam: √(1−f) ε + √f e<sup>iφ</sup> ε⊥, with ε⊥ = k × ε* the
 * polarization across the beam that is orthogonal to the wanted one.
 *
 * @param fraction f, the part of the intensity in the orthogonal polarization, 0 to 0.5
 * @param phaseDegrees φ, any finite angle, degrees
 */
record Impurity(double fraction, double phaseDegrees) {
  static final Impurity NONE = new Impurity(0, 0);

  private static final double LARGEST = 0.5;

  Impurity {
    if (!(fraction >= 0 && fraction <= LARGEST)) {
      throw new IllegalArgumentException(
          String.format(
              Locale.ROOT,
              "polarization impurity %s must be from 0 to %s: more is mostly the other polarization",
              fraction,
              LARGEST));
    }
    if (!(Math.abs(phaseDegrees) < Double.POSITIVE_INFINITY)) {
      throw new IllegalArgumentException(
          "phase of the polarization impurity must be finite, in degrees: " + phaseDegrees);
    }
  }

  PolarizationVector mixedInto(PolarizationVector e, double[] k) {
    if (fraction == 0) {
      return e;
    }
    double wanted = Math.sqrt(1 - fraction);
    double phase = Math.toRadians(phaseDegrees % 360);
    double c = Math.sqrt(fraction) * Math.cos(phase);
    double s = Math.sqrt(fraction) * Math.sin(phase);
    double[] re = cross(k, e.xRe(), e.yRe(), e.zRe());
    double[] im = cross(k, -e.xIm(), -e.yIm(), -e.zIm());
    return PolarizationVector.of(
        wanted * e.xRe() + c * re[0] - s * im[0],
        wanted * e.xIm() + c * im[0] + s * re[0],
        wanted * e.yRe() + c * re[1] - s * im[1],
        wanted * e.yIm() + c * im[1] + s * re[1],
        wanted * e.zRe() + c * re[2] - s * im[2],
        wanted * e.zIm() + c * im[2] + s * re[2]);
  }

  private static double[] cross(double[] k, double x, double y, double z) {
    return new double[] {k[1] * z - k[2] * y, k[2] * x - k[0] * z, k[0] * y - k[1] * x};
  }
}
