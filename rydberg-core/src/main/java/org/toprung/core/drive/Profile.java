package org.toprung.core.drive;

import java.util.List;
import java.util.Locale;
import java.util.Optional;
import org.toprung.core.quantity.Intensity;
import org.toprung.core.quantity.Length;
import org.toprung.core.quantity.Power;

/**
 * How the light of a beam is spread in space: its peak intensity and how the field falls off around
 * the focus.
 *
 * <p>Only the amplitude of the field counts. Its phase is taken as that of a plane wave along the
 * beam: Gouy phase and curvature of the wavefronts are left out, which change the local wave vector
 * by at most 1/z<sub>R</sub> along the beam and (2π/λ)ρ/2z<sub>R</sub> across it, with the Rayleigh
 * range z<sub>R</sub> = πw²/λ.
 *
 * <p>Immutable.
 */
public sealed interface Profile {

  /**
   * Intensity at the brightest point.
   *
   * @return the peak intensity
   */
  Intensity peakIntensity();

  /**
   * Power of the beam.
   *
   * @return the power, or nothing where only the intensity is known
   */
  Optional<Power> power();

  /**
   * The 1/e² intensity radii in the focus.
   *
   * @return one waist of a round beam, two of an elliptical one, none where the beam is flat
   */
  List<Length> waists();

  /**
   * Natural logarithm of the field at a point over that at the brightest point.
   *
   * @param x position along lab x, from the focus, m
   * @param y position along lab y, from the focus, m
   * @param z position along lab z, from the focus, m
   * @param direction unit vector the light travels along, three components; not kept or changed
   * @param wavelengthMetres wavelength, m, positive
   * @return the logarithm, at most 0
   */
  double logFieldRatio(double x, double y, double z, double[] direction, double wavelengthMetres);

  /**
   * The same shape at another intensity.
   *
   * @param factor factor on intensity and power, positive
   * @return the profile
   * @throws IllegalArgumentException if the factor is not positive and finite
   */
  Profile brightened(double factor);

  /**
   * A round Gaussian beam: peak intensity I0 = 2P/(πw²); the field is w/w(ζ)·exp(−ρ²/w(ζ)²) of its
   * peak at the distance ρ from the axis and ζ along it from the focus, with w(ζ) = w√(1 + (ζ/zR)²)
   * and zR = πw²/λ. Paraxial: w must be long against λ/π. Reference: Siegman, Lasers (1986),
   * chapter 17.
   *
   * @param beamPower the power at the atoms, positive
   * @param waist 1/e² intensity radius in the focus, positive
   */
  record Gaussian(Power beamPower, Length waist) implements Profile {
    /**
     * Refuses what is not positive.
     *
     * @param beamPower the power at the atoms
     * @param waist 1/e² intensity radius in the focus
     * @throws IllegalArgumentException if one is not positive
     */
    public Gaussian {
      requirePositive(beamPower);
      requirePositive(waist);
    }

    @Override
    public Intensity peakIntensity() {
      return peak(beamPower, waist, waist);
    }

    @Override
    public Optional<Power> power() {
      return Optional.of(beamPower);
    }

    @Override
    public List<Length> waists() {
      return List.of(waist);
    }

    @Override
    public Profile brightened(double factor) {
      return new Gaussian(Power.ofWatts(factor * beamPower.watts()), waist);
    }

    @Override
    public double logFieldRatio(
        double x, double y, double z, double[] direction, double wavelengthMetres) {
      double along = direction[0] * x + direction[1] * y + direction[2] * z;
      double a = direction[1] * z - direction[2] * y;
      double b = direction[2] * x - direction[0] * z;
      double c = direction[0] * y - direction[1] * x;
      double acrossSquared = a * a + b * b + c * c;
      return 2 * logOneAxis(along, 0.5 * acrossSquared, waist.metres(), wavelengthMetres);
    }

    @Override
    public String toString() {
      return beamPower + " in a waist of " + waist;
    }
  }

  /**
   * An elliptical Gaussian beam with both waists in the same plane: peak intensity I0 = 2P/(πw1w2).
   * In each direction across the beam the field falls off as for a {@link Gaussian} of that waist,
   * with a Rayleigh range of its own: √(w1/w1(ζ)) √(w2/w2(ζ)) exp(−u²/w1(ζ)² − v²/w2(ζ)²).
   *
   * @param beamPower the power at the atoms, positive
   * @param firstWaist 1/e² intensity radius along the axis, positive
   * @param secondWaist 1/e² intensity radius across the axis and the beam, positive
   * @param axisX component along lab x of the axis of the first waist
   * @param axisY component along lab y of the axis of the first waist
   * @param axisZ component along lab z of the axis of the first waist; of any length
   */
  record Elliptical(
      Power beamPower,
      Length firstWaist,
      Length secondWaist,
      double axisX,
      double axisY,
      double axisZ)
      implements Profile {
    private static final double ALIGNMENT_TOLERANCE = 1e-6;

    /**
     * Refuses what is not positive, and brings the axis to unit length.
     *
     * @param beamPower the power at the atoms
     * @param firstWaist 1/e² intensity radius along the axis
     * @param secondWaist 1/e² intensity radius across the axis and the beam
     * @param axisX component along lab x of the axis of the first waist
     * @param axisY component along lab y of the axis of the first waist
     * @param axisZ component along lab z of the axis of the first waist
     * @throws IllegalArgumentException if power or a waist is not positive, or the axis is zero or
     *     not finite
     */
    public Elliptical {
      requirePositive(beamPower);
      requirePositive(firstWaist);
      requirePositive(secondWaist);
      double[] axis = UnitVectors.of("waist axis", axisX, axisY, axisZ);
      axisX = axis[0];
      axisY = axis[1];
      axisZ = axis[2];
    }

    @Override
    public Intensity peakIntensity() {
      return peak(beamPower, firstWaist, secondWaist);
    }

    @Override
    public Optional<Power> power() {
      return Optional.of(beamPower);
    }

    @Override
    public List<Length> waists() {
      return List.of(firstWaist, secondWaist);
    }

    @Override
    public Profile brightened(double factor) {
      return new Elliptical(
          Power.ofWatts(factor * beamPower.watts()), firstWaist, secondWaist, axisX, axisY, axisZ);
    }

    @Override
    public double logFieldRatio(
        double x, double y, double z, double[] direction, double wavelengthMetres) {
      double along = direction[0] * x + direction[1] * y + direction[2] * z;
      double first = axisX * x + axisY * y + axisZ * z;
      double second =
          (direction[1] * axisZ - direction[2] * axisY) * x
              + (direction[2] * axisX - direction[0] * axisZ) * y
              + (direction[0] * axisY - direction[1] * axisX) * z;
      return logOneAxis(along, first * first, firstWaist.metres(), wavelengthMetres)
          + logOneAxis(along, second * second, secondWaist.metres(), wavelengthMetres);
    }

    /** Refuses an axis that does not lie across the beam. */
    void requireAcross(double[] direction) {
      double along = axisX * direction[0] + axisY * direction[1] + axisZ * direction[2];
      if (!(Math.abs(along) <= ALIGNMENT_TOLERANCE)) {
        throw new IllegalArgumentException(
            String.format(
                Locale.ROOT,
                "waist axis [%.6g, %.6g, %.6g] must lie across the beam, which runs along [%.6g,"
                    + " %.6g, %.6g]: the cosine between them is %.3g (allowed: 0, within %.0e)",
                axisX,
                axisY,
                axisZ,
                direction[0],
                direction[1],
                direction[2],
                along,
                ALIGNMENT_TOLERANCE));
      }
    }

    @Override
    public String toString() {
      return beamPower + " in waists of " + firstWaist + " and " + secondWaist;
    }
  }

  /**
   * A beam of the same intensity wherever the atom goes: a flat top, or the middle of a beam so
   * wide that its power and waist do not matter.
   *
   * @param peakIntensity the intensity at the atoms, positive
   */
  record FlatTop(Intensity peakIntensity) implements Profile {
    /**
     * Refuses what is not positive.
     *
     * @param peakIntensity the intensity at the atoms
     * @throws IllegalArgumentException if it is not positive
     */
    public FlatTop {
      if (!(peakIntensity.wattsPerSquareMetre() > 0)) {
        throw new IllegalArgumentException("beam intensity " + peakIntensity + " must be positive");
      }
    }

    @Override
    public Optional<Power> power() {
      return Optional.empty();
    }

    @Override
    public List<Length> waists() {
      return List.of();
    }

    @Override
    public Profile brightened(double factor) {
      return new FlatTop(
          Intensity.ofWattsPerSquareMetre(factor * peakIntensity.wattsPerSquareMetre()));
    }

    @Override
    public double logFieldRatio(
        double x, double y, double z, double[] direction, double wavelengthMetres) {
      return 0;
    }

    @Override
    public String toString() {
      return "flat top of " + peakIntensity;
    }
  }

  private static Intensity peak(Power power, Length first, Length second) {
    return Intensity.ofWattsPerSquareMetre(
        2 * power.watts() / (Math.PI * first.metres() * second.metres()));
  }

  private static void requirePositive(Power power) {
    if (!(power.watts() > 0)) {
      throw new IllegalArgumentException("beam power " + power + " must be positive");
    }
  }

  private static void requirePositive(Length waist) {
    if (!(waist.metres() > 0)) {
      throw new IllegalArgumentException("beam waist " + waist + " must be positive");
    }
  }

  /** Logarithm of √(w/w(ζ)) exp(−u²/w(ζ)²). */
  private static double logOneAxis(
      double along, double offAxisSquared, double waist, double wavelength) {
    double spread = along * wavelength / (Math.PI * waist * waist);
    double growth = spread * spread;
    return -0.25 * Math.log1p(growth) - offAxisSquared / (waist * waist * (1 + growth));
  }
}
