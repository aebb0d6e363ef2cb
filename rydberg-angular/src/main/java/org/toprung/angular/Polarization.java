package org.toprung.angular;

import java.util.Arrays;
import java.util.Locale;
import java.util.regex.Matcher;
import java.util.regex.Pattern;

/**
 * A polarization as a person writes it: σ±, π, linear at an angle, elliptical, or a vector. It
 * becomes a {@link PolarizationVector} once the direction of the beam is known.
 *
 * <p>σ± and π refer to the quantization axis, which is the lab z axis (the direction of the
 * magnetic field). σ± is e<sub>±1</sub> about +z, whichever way the beam runs along z, and so
 * drives Δm = ±1 in absorption; a beam along any other direction cannot be purely σ±. π is linear
 * along z, and needs a beam perpendicular to z: light is transverse.
 *
 * <p>Angles of linear and elliptical light are measured in the plane transverse to the beam
 * direction k, from u, the projection of lab z onto that plane (lab x when k is along ±z), towards
 * v = k × u: right-handed about k. A linear polarization at angle ψ is cos ψ u + sin ψ v. An
 * elliptical one with its major axis at ψ and ellipticity χ is cos χ (cos ψ u + sin ψ v) + i sin χ
 * (−sin ψ u + cos ψ v); with the time factor e<sup>−iωt</sup>, χ &gt; 0 turns right-handed about k
 * (positive helicity), and χ = 45° is circular.
 */
public final class Polarization {

  /** σ+ about the lab z axis: drives Δm = +1 in absorption; for beams along ±z. */
  public static final Polarization SIGMA_PLUS = new Polarization(Kind.SIGMA_PLUS);

  /** σ− about the lab z axis: drives Δm = −1 in absorption; for beams along ±z. */
  public static final Polarization SIGMA_MINUS = new Polarization(Kind.SIGMA_MINUS);

  /** π: linear along the lab z axis, drives Δm = 0; for beams perpendicular to z. */
  public static final Polarization PI = new Polarization(Kind.PI);

  /** Largest |cosine| or |sine| that still counts as a right angle or as parallel. */
  private static final double ALIGNMENT_TOLERANCE = 1e-6;

  private static final String NUMBER = "([+-]?(?:\\d+\\.?\\d*|\\.\\d+)(?:e[+-]?\\d+)?)";
  private static final String ANGLE = "\\s+" + NUMBER + "\\s*(?:deg|°)";
  private static final String COMPLEX = "\\s*\\(\\s*" + NUMBER + "\\s*,\\s*" + NUMBER + "\\s*\\)";
  private static final Pattern LINEAR = Pattern.compile("linear" + ANGLE);
  private static final Pattern ELLIPTICAL = Pattern.compile("elliptical" + ANGLE + ANGLE);
  private static final Pattern VECTOR = Pattern.compile("vector" + COMPLEX + COMPLEX + COMPLEX);

  private enum Kind {
    SIGMA_PLUS,
    SIGMA_MINUS,
    PI,
    LINEAR,
    ELLIPTICAL,
    VECTOR
  }

  private final Kind kind;

  /** Angles in degrees, or the six parts of the vector. */
  private final double[] numbers;

  private Polarization(Kind kind, double... numbers) {
    this.kind = kind;
    this.numbers = numbers;
  }

  /**
   * Linear polarization at an angle in the plane transverse to the beam.
   *
   * @param degrees angle in degrees from the projection of lab z onto that plane (lab x for a beam
   *     along ±z), right-handed about the beam direction; any finite number
   * @return the polarization
   * @throws IllegalArgumentException if the angle is not finite
   */
  public static Polarization linearDegrees(double degrees) {
    requireFinite("angle of the linear polarization", degrees);
    return new Polarization(Kind.LINEAR, degrees + 0.0);
  }

  /**
   * Elliptical polarization from the angle of its major axis and its ellipticity.
   *
   * @param orientationDegrees angle ψ of the major axis in degrees, as for {@link #linearDegrees};
   *     any finite number
   * @param ellipticityDegrees ellipticity χ in degrees, from −45 to 45: tan χ is the ratio of the
   *     minor to the major axis, positive for positive helicity, 0 is linear, ±45 circular
   * @return the polarization
   * @throws IllegalArgumentException if the orientation is not finite or the ellipticity out of
   *     range
   */
  public static Polarization ellipticalDegrees(
      double orientationDegrees, double ellipticityDegrees) {
    requireFinite("orientation of the elliptical polarization", orientationDegrees);
    if (!(ellipticityDegrees >= -45 && ellipticityDegrees <= 45)) {
      throw new IllegalArgumentException(
          "ellipticity must be from -45 to 45 degrees: " + ellipticityDegrees);
    }
    return new Polarization(Kind.ELLIPTICAL, orientationDegrees + 0.0, ellipticityDegrees + 0.0);
  }

  /**
   * Polarization as a complex vector in the lab frame, which must be transverse to the beam it is
   * used for.
   *
   * @param xRe real part of the x component
   * @param xIm imaginary part of the x component
   * @param yRe real part of the y component
   * @param yIm imaginary part of the y component
   * @param zRe real part of the z component
   * @param zIm imaginary part of the z component
   * @return the polarization; the vector is normalized
   * @throws IllegalArgumentException if a component is not finite or all are zero
   */
  public static Polarization ofVector(
      double xRe, double xIm, double yRe, double yIm, double zRe, double zIm) {
    return ofVector(PolarizationVector.of(xRe, xIm, yRe, yIm, zRe, zIm));
  }

  /**
   * Polarization along a given vector, which must be transverse to the beam it is used for.
   *
   * @param vector the vector in the lab frame
   * @return the polarization
   */
  public static Polarization ofVector(PolarizationVector vector) {
    return new Polarization(
        Kind.VECTOR,
        vector.xRe(),
        vector.xIm(),
        vector.yRe(),
        vector.yIm(),
        vector.zRe(),
        vector.zIm());
  }

  /**
   * Parses a polarization.
   *
   * @param text {@code "sigma+"}, {@code "sigma-"}, {@code "pi"}, {@code "linear 30 deg"}, {@code
   *     "elliptical 30 deg 20 deg"} (orientation, ellipticity) or {@code "vector (1, 0) (0, 1) (0,
   *     0)"} (real and imaginary parts of x, y, z); Greek letters and the degree sign are
   *     understood, case does not matter
   * @return the polarization
   * @throws IllegalArgumentException if the text is {@code null}, has another form, or holds a
   *     number out of range
   */
  public static Polarization parse(String text) {
    if (text == null) {
      throw unknown("null");
    }
    String s =
        text.strip()
            .toLowerCase(Locale.ROOT)
            .replace('−', '-')
            .replace("σ", "sigma")
            .replace("π", "pi");
    switch (s) {
      case "sigma+":
        return SIGMA_PLUS;
      case "sigma-":
        return SIGMA_MINUS;
      case "pi":
        return PI;
      default:
        break;
    }
    Matcher linear = LINEAR.matcher(s);
    if (linear.matches()) {
      return linearDegrees(number(linear, 1));
    }
    Matcher elliptical = ELLIPTICAL.matcher(s);
    if (elliptical.matches()) {
      return ellipticalDegrees(number(elliptical, 1), number(elliptical, 2));
    }
    Matcher vector = VECTOR.matcher(s);
    if (vector.matches()) {
      return ofVector(
          number(vector, 1),
          number(vector, 2),
          number(vector, 3),
          number(vector, 4),
          number(vector, 5),
          number(vector, 6));
    }
    throw unknown('"' + text + '"');
  }

  private static double number(Matcher matcher, int group) {
    return Double.parseDouble(matcher.group(group));
  }

  private static IllegalArgumentException unknown(String given) {
    return new IllegalArgumentException(
        "unknown polarization "
            + given
            + " (allowed: sigma+, sigma-, pi, linear 30 deg, elliptical 30 deg 20 deg, "
            + "vector (1, 0) (0, 1) (0, 0))");
  }

  private static void requireFinite(String name, double degrees) {
    if (!Double.isFinite(degrees)) {
      throw new IllegalArgumentException(name + " must be finite, in degrees: " + degrees);
    }
  }

  /**
   * Returns the polarization vector of a beam of the given direction.
   *
   * @param kx x component of the beam direction
   * @param ky y component of the beam direction
   * @param kz z component of the beam direction; the length of (kx, ky, kz) does not matter
   * @return the unit complex vector, in the lab frame
   * @throws IllegalArgumentException if the direction is not finite or zero, or if a beam of that
   *     direction cannot have this polarization; the message says why
   */
  public PolarizationVector resolvedFor(double kx, double ky, double kz) {
    Direction k = Direction.of("beam direction", kx, ky, kz);
    return switch (kind) {
      case SIGMA_PLUS, SIGMA_MINUS -> sigma(k);
      case PI -> pi(k);
      case LINEAR -> inPlane(k, numbers[0], 0);
      case ELLIPTICAL -> inPlane(k, numbers[0], numbers[1]);
      case VECTOR -> transverse(k);
    };
  }

  private PolarizationVector sigma(Direction k) {
    if (!(k.transverse() <= ALIGNMENT_TOLERANCE)) {
      throw new IllegalArgumentException(
          this
              + " needs a beam along the quantization axis (lab ±z): a beam along "
              + text(k)
              + " has other components about that axis whatever its polarization; give a linear"
              + " angle, an elliptical polarization or a vector");
    }
    return PolarizationVector.of(kind == Kind.SIGMA_PLUS ? -1 : 1, 0, 0, -1, 0, 0);
  }

  private PolarizationVector pi(Direction k) {
    if (!(Math.abs(k.z()) <= ALIGNMENT_TOLERANCE)) {
      String reason =
          k.transverse() <= ALIGNMENT_TOLERANCE
              ? "a beam along the axis cannot be pi polarized, light is transverse: "
              : "only then is the axis transverse to the beam: ";
      throw new IllegalArgumentException(
          "pi needs a beam perpendicular to the quantization axis (lab z); "
              + reason
              + "the beam runs along "
              + text(k)
              + "; give a linear angle or a vector (linear 0 deg is as close to the axis as this beam"
              + " allows)");
    }
    return inPlane(k, 0, 0);
  }

  private static PolarizationVector inPlane(
      Direction k, double orientationDegrees, double ellipticityDegrees) {
    double ux;
    double uy;
    double uz;
    double s = k.transverse();
    if (s <= ALIGNMENT_TOLERANCE) {
      Direction u = Direction.of("reference", 1 - k.x() * k.x(), -k.x() * k.y(), -k.x() * k.z());
      ux = u.x();
      uy = u.y();
      uz = u.z();
    } else {
      ux = -k.z() * k.x() / s;
      uy = -k.z() * k.y() / s;
      uz = s;
    }
    double vx = k.y() * uz - k.z() * uy;
    double vy = k.z() * ux - k.x() * uz;
    double vz = k.x() * uy - k.y() * ux;
    double psi = Math.toRadians(orientationDegrees % 360);
    double chi = Math.toRadians(ellipticityDegrees);
    double reU = Math.cos(chi) * Math.cos(psi);
    double reV = Math.cos(chi) * Math.sin(psi);
    double imU = -Math.sin(chi) * Math.sin(psi);
    double imV = Math.sin(chi) * Math.cos(psi);
    return PolarizationVector.of(
        reU * ux + reV * vx,
        imU * ux + imV * vx,
        reU * uy + reV * vy,
        imU * uy + imV * vy,
        reU * uz + reV * vz,
        imU * uz + imV * vz);
  }

  private PolarizationVector transverse(Direction k) {
    double re = k.x() * numbers[0] + k.y() * numbers[2] + k.z() * numbers[4];
    double im = k.x() * numbers[1] + k.y() * numbers[3] + k.z() * numbers[5];
    if (!(Math.hypot(re, im) <= ALIGNMENT_TOLERANCE)) {
      throw new IllegalArgumentException(
          this
              + " is not transverse to a beam along "
              + text(k)
              + ": its component along the beam is "
              + Math.hypot(re, im)
              + " (allowed: 0, within "
              + ALIGNMENT_TOLERANCE
              + "); give a vector perpendicular to the beam, or a linear angle");
    }
    return PolarizationVector.of(
        numbers[0], numbers[1], numbers[2], numbers[3], numbers[4], numbers[5]);
  }

  private static String text(Direction k) {
    return String.format(Locale.ROOT, "(%.6g, %.6g, %.6g)", k.x(), k.y(), k.z());
  }

  @Override
  public boolean equals(Object other) {
    return other instanceof Polarization p && p.kind == kind && Arrays.equals(p.numbers, numbers);
  }

  @Override
  public int hashCode() {
    return 31 * kind.hashCode() + Arrays.hashCode(numbers);
  }

  /**
   * Returns the polarization in a form that {@link #parse} turns back into an equal one.
   *
   * @return the polarization as text, such as {@code "sigma+"} or {@code "linear 30.0 deg"}
   */
  @Override
  public String toString() {
    return switch (kind) {
      case SIGMA_PLUS -> "sigma+";
      case SIGMA_MINUS -> "sigma-";
      case PI -> "pi";
      case LINEAR -> "linear " + numbers[0] + " deg";
      case ELLIPTICAL -> "elliptical " + numbers[0] + " deg " + numbers[1] + " deg";
      case VECTOR ->
          "vector "
              + PolarizationVector.of(
                  numbers[0], numbers[1], numbers[2], numbers[3], numbers[4], numbers[5]);
    };
  }
}
