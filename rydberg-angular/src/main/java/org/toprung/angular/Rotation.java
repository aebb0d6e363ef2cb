package org.toprung.angular;

/**
 * An active rotation of space, and of spins: an element of SU(2), so that a turn by 2π is told from
 * none and changes the sign of half-integer states.
 *
 * <p>Euler angles in radians: R(α, β, γ) = Rz(α) Ry(β) Rz(γ), a turn by γ about z, then by β about
 * y, then by α about z, all about fixed lab axes, counterclockwise seen against the axis.
 *
 * <p>Matrix elements: D<sup>j</sup><sub>m′m</sub>(R) = ⟨j m′|R|j m⟩ = e<sup>−im′α</sup>
 * d<sup>j</sup><sub>m′m</sub>(β) e<sup>−imγ</sup>, so that D(R1 R2) = D(R1) D(R2), and the rotated
 * state R|j m⟩ = Σ |j m′⟩ D<sup>j</sup><sub>m′m</sub>. The small d is
 *
 * <p>d<sup>j</sup><sub>m′m</sub>(β) = ξ √(s! (s+μ+ν)! / ((s+μ)! (s+ν)!)) sin<sup>μ</sup>(β/2)
 * cos<sup>ν</sup>(β/2) P<sub>s</sub><sup>(μ,ν)</sup>(cos β), with μ = |m′−m|, ν = |m′+m|, s = j −
 * (μ+ν)/2 and ξ = (−1)<sup>m−m′</sup> for m &lt; m′, else 1 (reference 1, 4.3.4 (13)). The Jacobi
 * polynomials come from their upward recurrence, which is stable for −1 ≤ cos β ≤ 1.
 *
 * <p>Accuracy: 10<sup>−12</sup> absolute up to j = 500. Angular momenta up to {@link
 * Wigner#MAX_DOUBLED_J}/2.
 *
 * <ol>
 *   <li>D. A. Varshalovich, A. N. Moskalev, V. K. Khersonskii, Quantum Theory of Angular Momentum
 *       (World Scientific, 1988), chapter 4 and 1.4, doi:10.1142/0270
 *   <li>D. M. Brink, G. R. Satchler, Angular Momentum, 3rd ed. (Oxford, 1993), chapter 2: the same
 *       convention. Edmonds (1957) writes rotations with the opposite sign of the angles.
 * </ol>
 */
public final class Rotation {

  /** No rotation. */
  public static final Rotation IDENTITY = new Rotation(1, 0, 0, 0);

  private static final double LARGE = 0x1p500;

  /** R = w − i (x σx + y σy + z σz). */
  private final double w;

  private final double x;
  private final double y;
  private final double z;

  private Rotation(double w, double x, double y, double z) {
    this.w = w;
    this.x = x;
    this.y = y;
    this.z = z;
  }

  /**
   * Rotation by Euler angles.
   *
   * @param alpha last angle, about z, in radians
   * @param beta middle angle, about y, in radians
   * @param gamma first angle, about z, in radians
   * @return Rz(alpha) Ry(beta) Rz(gamma)
   * @throws IllegalArgumentException if an angle is not finite
   */
  public static Rotation ofEulerRadians(double alpha, double beta, double gamma) {
    if (!(Double.isFinite(alpha) && Double.isFinite(beta) && Double.isFinite(gamma))) {
      throw new IllegalArgumentException(
          "Euler angles must be finite, in radians: " + alpha + ", " + beta + ", " + gamma);
    }
    double c = Math.cos(beta / 2);
    double s = Math.sin(beta / 2);
    double sum = alpha / 2 + gamma / 2;
    double difference = alpha / 2 - gamma / 2;
    return new Rotation(
        c * Math.cos(sum), -s * Math.sin(difference), s * Math.cos(difference), c * Math.sin(sum));
  }

  /**
   * Rotation about an axis.
   *
   * @param ax x component of the axis
   * @param ay y component of the axis
   * @param az z component of the axis; the length of (ax, ay, az) does not matter
   * @param angle angle in radians, counterclockwise seen against the axis
   * @return the rotation
   * @throws IllegalArgumentException if the axis is not finite or zero, or the angle not finite
   */
  public static Rotation aboutAxisRadians(double ax, double ay, double az, double angle) {
    if (!Double.isFinite(angle)) {
      throw new IllegalArgumentException("angle must be finite, in radians: " + angle);
    }
    Direction axis = Direction.of("axis", ax, ay, az);
    double s = Math.sin(angle / 2);
    return new Rotation(Math.cos(angle / 2), s * axis.x(), s * axis.y(), s * axis.z());
  }

  /**
   * The rotation Rz(φ) Ry(θ) that takes the z axis to the direction with polar angle θ and azimuth
   * φ.
   *
   * @param dx x component of the direction
   * @param dy y component of the direction
   * @param dz z component of the direction; the length of (dx, dy, dz) does not matter
   * @return the rotation; φ = 0 for directions along ±z
   * @throws IllegalArgumentException if the direction is not finite or zero
   */
  public static Rotation ofDirection(double dx, double dy, double dz) {
    Direction d = Direction.of("direction", dx, dy, dz);
    double s = d.transverse();
    double phi = s == 0 ? 0 : Math.atan2(d.y(), d.x());
    return ofEulerRadians(phi, Math.atan2(s, d.z()), 0);
  }

  /**
   * Returns the rotation that does another one first and then this one.
   *
   * @param first the rotation to do first
   * @return this · first
   */
  public Rotation after(Rotation first) {
    double pw = w * first.w - x * first.x - y * first.y - z * first.z;
    double px = w * first.x + x * first.w + y * first.z - z * first.y;
    double py = w * first.y - x * first.z + y * first.w + z * first.x;
    double pz = w * first.z + x * first.y - y * first.x + z * first.w;
    // Rounding must not build up over long products.
    double norm = Math.sqrt(pw * pw + px * px + py * py + pz * pz);
    return new Rotation(pw / norm, px / norm, py / norm, pz / norm);
  }

  /**
   * Returns the inverse rotation.
   *
   * @return the rotation that undoes this one
   */
  public Rotation inverse() {
    return new Rotation(w, -x, -y, -z);
  }

  /**
   * Returns a real vector rotated.
   *
   * @param vx x component of the vector
   * @param vy y component of the vector
   * @param vz z component of the vector
   * @return the three components of the rotated vector, a fresh array
   */
  public double[] appliedTo(double vx, double vy, double vz) {
    // v + 2w (u × v) + 2 u × (u × v) with the unit quaternion (w, u)
    double tx = 2 * (y * vz - z * vy);
    double ty = 2 * (z * vx - x * vz);
    double tz = 2 * (x * vy - y * vx);
    return new double[] {
      vx + w * tx + y * tz - z * ty, vy + w * ty + z * tx - x * tz, vz + w * tz + x * ty - y * tx
    };
  }

  /**
   * Returns the middle Euler angle.
   *
   * @return β in radians, from 0 to π
   */
  public double betaRadians() {
    return 2 * Math.atan2(Math.hypot(x, y), Math.hypot(w, z));
  }

  /**
   * Returns the last Euler angle.
   *
   * @return α in radians; for β = 0 or π, where only a sum or difference of α and γ is defined, one
   *     choice of it
   */
  public double alphaRadians() {
    return halfSum() + halfDifference();
  }

  /**
   * Returns the first Euler angle.
   *
   * @return γ in radians
   */
  public double gammaRadians() {
    return halfSum() - halfDifference();
  }

  private double halfSum() {
    return w == 0 && z == 0 ? 0 : Math.atan2(z, w);
  }

  private double halfDifference() {
    return x == 0 && y == 0 ? 0 : Math.atan2(-x, y);
  }

  /**
   * Returns the element D<sup>j</sup><sub>m′m</sub> of this rotation.
   *
   * @param j angular momentum
   * @param mPrime projection m′ of the row
   * @param m projection m of the column
   * @return ⟨j m′|R|j m⟩
   * @throws IllegalArgumentException if j is negative or above the supported range, or if m′ or m
   *     is no projection of j
   */
  public Amplitude element(HalfInteger j, HalfInteger mPrime, HalfInteger m) {
    double d =
        smallD(j.doubled(), mPrime.doubled(), m.doubled(), Math.hypot(w, z), Math.hypot(x, y));
    double angle =
        (mPrime.doubled() + m.doubled()) / 2 * halfSum()
            + (mPrime.doubled() - m.doubled()) / 2 * halfDifference();
    return new Amplitude(d * Math.cos(angle), -d * Math.sin(angle));
  }

  /**
   * Returns the small-d element d<sup>j</sup><sub>m′m</sub>(β) = ⟨j m′|e<sup>−iβJy</sup>|j m⟩.
   *
   * @param j angular momentum
   * @param mPrime projection m′ of the row
   * @param m projection m of the column
   * @param beta angle in radians
   * @return the element
   * @throws IllegalArgumentException if j is negative or above the supported range, if m′ or m is
   *     no projection of j, or if the angle is not finite
   */
  public static double smallD(HalfInteger j, HalfInteger mPrime, HalfInteger m, double beta) {
    return smallDDoubled(j.doubled(), mPrime.doubled(), m.doubled(), beta);
  }

  /**
   * Returns the small-d element d<sup>j</sup><sub>m′m</sub>(β), for callers in loops; nothing is
   * allocated.
   *
   * @param tj 2·j
   * @param tmPrime 2·m′
   * @param tm 2·m
   * @param beta angle in radians
   * @return the element
   * @throws IllegalArgumentException as {@link #smallD}
   */
  public static double smallDDoubled(int tj, int tmPrime, int tm, double beta) {
    if (!Double.isFinite(beta)) {
      throw new IllegalArgumentException("angle must be finite, in radians: " + beta);
    }
    return smallD(tj, tmPrime, tm, Math.cos(beta / 2), Math.sin(beta / 2));
  }

  private static double smallD(int tj, int tmPrime, int tm, double c, double s) {
    Wigner.requireRange(tj, tj, tj);
    requireProjection(tj, tmPrime);
    requireProjection(tj, tm);
    int mu = Math.abs(tmPrime - tm) / 2;
    int nu = Math.abs(tmPrime + tm) / 2;
    int n = (tj - mu - nu) / 2;
    double[] m = Factorials.MANTISSA;
    int[] e = Factorials.EXPONENT;
    double square = m[n] * m[n + mu + nu] / (m[n + mu] * m[n + nu]);
    int squareExponent = e[n] + e[n + mu + nu] - e[n + mu] - e[n + nu];
    double root = Math.sqrt((squareExponent & 1) == 0 ? square : 2 * square);
    int exponent = squareExponent >> 1;
    double sign = tm < tmPrime && (mu & 1) != 0 ? -1 : 1;

    // cos β from the smaller of the two, where it keeps its digits.
    double cosBeta = s * s < 0.5 ? 1 - 2 * s * s : 2 * c * c - 1;
    double previous = 0;
    double p = 1;
    for (int k = 0; k < n; k++) {
      double next;
      if (k == 0) {
        next = (mu - nu + (mu + nu + 2) * cosBeta) / 2;
      } else {
        double q = 2.0 * k + mu + nu;
        next =
            ((q + 1) * (q * (q + 2) * cosBeta + (double) (mu - nu) * (mu + nu)) * p
                    - 2.0 * (k + mu) * (k + nu) * (q + 2) * previous)
                / (2.0 * (k + 1) * (k + mu + nu + 1.0) * q);
      }
      previous = p;
      p = next;
      if (Math.abs(p) > LARGE) {
        p /= LARGE;
        previous /= LARGE;
        exponent += 500;
      }
    }
    double value = sign * root * p;
    for (int i = 0; i < mu + nu && value != 0; i++) {
      value *= i < mu ? s : c;
      if (Math.abs(value) < 1 / LARGE) {
        value *= LARGE;
        exponent -= 500;
      }
    }
    // Adding zero takes the sign off a zero.
    return Math.scalb(value, exponent) + 0.0;
  }

  private static void requireProjection(int tj, int tm) {
    if (!Wigner.isProjection(tj, tm)) {
      throw new IllegalArgumentException(
          HalfInteger.ofHalves(tm)
              + " is no projection of j = "
              + HalfInteger.ofHalves(tj)
              + " (allowed: -j, -j + 1, ..., j)");
    }
  }
}
