package org.toprung.core.drive;

import java.util.List;
import java.util.Locale;
import org.toprung.core.quantity.Length;

/**
 * Three beams in a plane whose wave vectors add up to zero, so that a moving atom sees no Doppler
 * shift of the three-photon resonance and gains no momentum.
 *
 * <p>The wave vectors, placed head to tail, form a triangle with the wave numbers k = 2π/λ as its
 * sides. It exists if no wave number exceeds the sum of the other two (triangle inequality), and it
 * is then unique up to rotation and reflection: a {@link Triangle}. Otherwise the beams are {@link
 * Impossible}.
 *
 * <p>Only first order: the Doppler shift of each single step stays, and with it the change of an
 * intermediate detuning of a moving atom.
 *
 * <p>Immutable.
 */
public sealed interface DopplerFree {

  /**
   * Solves the geometry of three wavelengths.
   *
   * @param first wavelength of the first beam, positive
   * @param second wavelength of the second beam, positive
   * @param third wavelength of the third beam, positive
   * @return a {@link Triangle} or {@link Impossible}
   * @throws IllegalArgumentException if a wavelength is not positive
   */
  static DopplerFree of(Length first, Length second, Length third) {
    double[] k = new double[3];
    for (int i = 0; i < 3; i++) {
      Length wavelength = List.of(first, second, third).get(i);
      if (!(wavelength.metres() > 0)) {
        throw new IllegalArgumentException(
            "wavelength " + wavelength + " of beam " + (i + 1) + " must be positive");
      }
      k[i] = 2 * Math.PI / wavelength.metres();
    }
    for (int i = 0; i < 3; i++) {
      if (k[i] > k[(i + 1) % 3] + k[(i + 2) % 3]) {
        return new Impossible(i, k[i], k[(i + 1) % 3] + k[(i + 2) % 3]);
      }
    }
    return new Triangle(k[0], k[1], k[2]);
  }

  /**
   * What is left of the summed wave vector of given beams.
   *
   * @param waveVectors wave vectors of three components each, 1/m
   * @return |Σk|, 1/m
   * @throws IllegalArgumentException if a vector has another number of components, or one that is
   *     not finite
   */
  static double residualPerMetre(double[]... waveVectors) {
    double[] sum = new double[3];
    for (double[] k : waveVectors) {
      if (k.length != 3) {
        throw new IllegalArgumentException(
            "a wave vector has 3 components, not " + k.length + " of them");
      }
      for (int a = 0; a < 3; a++) {
        sum[a] += k[a];
      }
    }
    double length = Math.hypot(Math.hypot(sum[0], sum[1]), sum[2]);
    if (!(length < Double.POSITIVE_INFINITY)) {
      throw new IllegalArgumentException("wave vectors must be finite; they sum up to " + length);
    }
    return length;
  }

  /**
   * The wave vectors that cancel.
   *
   * @param firstPerMetre wave number of the first beam, 1/m
   * @param secondPerMetre wave number of the second beam, 1/m
   * @param thirdPerMetre wave number of the third beam, 1/m
   */
  record Triangle(double firstPerMetre, double secondPerMetre, double thirdPerMetre)
      implements DopplerFree {
    private static final double ALIGNMENT_TOLERANCE = 1e-6;

    /**
     * Refuses wave numbers that are no sides of a triangle.
     *
     * @param firstPerMetre wave number of the first beam, 1/m
     * @param secondPerMetre wave number of the second beam, 1/m
     * @param thirdPerMetre wave number of the third beam, 1/m
     * @throws IllegalArgumentException if one is not positive and finite, or exceeds the sum of the
     *     others
     */
    public Triangle {
      double largest = Math.max(firstPerMetre, Math.max(secondPerMetre, thirdPerMetre));
      double least = Math.min(firstPerMetre, Math.min(secondPerMetre, thirdPerMetre));
      double middle =
          Math.max(
              Math.min(firstPerMetre, secondPerMetre),
              Math.min(Math.max(firstPerMetre, secondPerMetre), thirdPerMetre));
      if (!(least > 0 && largest < Double.POSITIVE_INFINITY && largest <= least + middle)) {
        throw new IllegalArgumentException(
            String.format(
                Locale.ROOT,
                "wave numbers %s, %s and %s 1/m must be positive, finite, and none larger than the"
                    + " sum of the others",
                firstPerMetre,
                secondPerMetre,
                thirdPerMetre));
      }
    }

    private double number(int beam) {
      return switch (beam) {
        case 0 -> firstPerMetre;
        case 1 -> secondPerMetre;
        case 2 -> thirdPerMetre;
        default -> throw new IllegalArgumentException("no beam " + beam + " (allowed: 0, 1 and 2)");
      };
    }

    /**
     * Angle between the directions of two beams.
     *
     * <p>π less the angle γ of the triangle between the two sides, from cos θ = (c² − a² − b²)/2ab
     * in the half-angle form tan(γ/2) = √((s−a)(s−b)/s(s−c)), which keeps its digits in flat
     * triangles.
     *
     * @param one index of a beam, from 0
     * @param other index of another beam, from 0
     * @return the angle, 0 to 180 degrees; the three angles between neighbours add up to 360
     * @throws IllegalArgumentException if an index is out of range or both are the same
     */
    public double angleDegrees(int one, int other) {
      double a = number(one);
      double b = number(other);
      if (one == other) {
        throw new IllegalArgumentException("beam " + one + " twice (allowed: two different ones)");
      }
      double c = number(3 - one - other);
      double gamma =
          2
              * Math.atan2(
                  Math.sqrt((c + b - a) * (c + a - b)), Math.sqrt((a + b + c) * (a + b - c)));
      return Math.toDegrees(Math.PI - gamma);
    }

    /**
     * Directions of the beams in a plane, the second turned from the first in the right-handed
     * sense about the plane's normal. Reversing the normal gives the mirror image.
     *
     * @param normal normal of the plane, three components of any length
     * @param first direction of the first beam, in the plane, three components of any length
     * @return three unit vectors in the lab frame, one row for each beam
     * @throws IllegalArgumentException if a vector is zero or not finite, or the first beam does
     *     not lie in the plane
     */
    public double[][] directions(double[] normal, double[] first) {
      double[] n = vector("normal of the plane", normal);
      double[] e = vector("direction of the first beam", first);
      double cosine = n[0] * e[0] + n[1] * e[1] + n[2] * e[2];
      if (!(Math.abs(cosine) <= ALIGNMENT_TOLERANCE)) {
        throw new IllegalArgumentException(
            String.format(
                Locale.ROOT,
                "the first beam must lie in the plane: the cosine of its angle to the normal is %.3g"
                    + " (allowed: 0, within %.0e)",
                cosine,
                ALIGNMENT_TOLERANCE));
      }
      double[] v = {
        n[1] * e[2] - n[2] * e[1], n[2] * e[0] - n[0] * e[2], n[0] * e[1] - n[1] * e[0]
      };
      double second = Math.toRadians(angleDegrees(0, 1));
      double third = -Math.toRadians(angleDegrees(0, 2));
      return new double[][] {e, turned(e, v, second), turned(e, v, third)};
    }

    private static double[] vector(String name, double[] v) {
      if (v.length != 3) {
        throw new IllegalArgumentException(
            "the " + name + " has 3 components, not " + v.length + " of them");
      }
      return UnitVectors.of(name, v[0], v[1], v[2]);
    }

    private static double[] turned(double[] e, double[] v, double angle) {
      double c = Math.cos(angle);
      double s = Math.sin(angle);
      return UnitVectors.of(
          "direction", c * e[0] + s * v[0], c * e[1] + s * v[1], c * e[2] + s * v[2]);
    }
  }

  /**
   * One wave number is larger than the other two together: no directions cancel. The least that can
   * be left is their difference, with the two other beams against the one.
   *
   * @param beam index of the beam with the large wave number, from 0
   * @param perMetre its wave number, 1/m
   * @param othersPerMetre sum of the other two wave numbers, 1/m, smaller
   */
  record Impossible(int beam, double perMetre, double othersPerMetre) implements DopplerFree {
    /**
     * The smallest summed wave vector any directions leave.
     *
     * @return least |Σk|, 1/m
     */
    public double leastResidualPerMetre() {
      return perMetre - othersPerMetre;
    }

    /**
     * Says which wave number is too large.
     *
     * @return a sentence for people
     */
    @Override
    public String toString() {
      return String.format(
          Locale.ROOT,
          "impossible: the wave number of beam %d, %.6g 1/um, exceeds the sum of the other two,"
              + " %.6g 1/um (triangle inequality); at best %.6g 1/um is left",
          beam + 1,
          perMetre * 1e-6,
          othersPerMetre * 1e-6,
          leastResidualPerMetre() * 1e-6);
    }
  }
}
