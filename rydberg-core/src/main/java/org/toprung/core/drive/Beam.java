package org.toprung.core.drive;

import java.util.Locale;
import org.toprung.angular.Polarization;
import org.toprung.angular.PolarizationVector;
import org.toprung.core.quantity.Length;
import org.toprung.core.quantity.PhysicalConstants;
import org.toprung.core.quantity.Power;

/**
 * A Gaussian laser beam with the atom in its focus.
 *
 * <p>Conventions: waist w is the radius at which the intensity has fallen to 1/e²; the peak
 * intensity is I0 = 2P/(πw²); the field is E(t) = E0 cos ωt with E0 = √(2I0/(cε0)). The beam is
 * described in the lab frame, in which the magnetic field points along z.
 *
 * <p>Immutable: {@link #polarized} and {@link #along} give copies. A step of a {@link Drive}
 * accepts a beam once it has both a polarization and a direction.
 */
public final class Beam {
  private final Power power;
  private final Length waist;
  private final Polarization polarization; // null until given
  private final double[] direction; // unit vector; null until given

  private Beam(Power power, Length waist, Polarization polarization, double[] direction) {
    this.power = power;
    this.waist = waist;
    this.polarization = polarization;
    this.direction = direction;
  }

  /**
   * A Gaussian beam.
   *
   * @param power power at the atoms, positive
   * @param waist 1/e² intensity radius at the focus, positive
   * @return a beam without polarization or direction yet
   * @throws IllegalArgumentException if power or waist is not positive
   */
  public static Beam gaussian(Power power, Length waist) {
    if (!(power.watts() > 0)) {
      throw new IllegalArgumentException("beam power " + power + " must be positive");
    }
    if (!(waist.metres() > 0)) {
      throw new IllegalArgumentException("beam waist " + waist + " must be positive");
    }
    return new Beam(power, waist, null, null);
  }

  /**
   * Sets the polarization.
   *
   * @param newPolarization the polarization, about the magnetic field
   * @return a copy with this polarization
   */
  public Beam polarized(Polarization newPolarization) {
    if (newPolarization == null) {
      throw new IllegalArgumentException("a beam needs a polarization, not null");
    }
    return new Beam(power, waist, newPolarization, direction);
  }

  /**
   * Sets the direction the light travels in.
   *
   * @param x component along lab x
   * @param y component along lab y
   * @param z component along lab z, the magnetic field
   * @return a copy with this direction; only the direction of the vector counts
   * @throws IllegalArgumentException if the vector is zero or not finite
   */
  public Beam along(double x, double y, double z) {
    double scale = Math.max(Math.abs(x), Math.max(Math.abs(y), Math.abs(z)));
    if (!(scale > 0 && scale < Double.POSITIVE_INFINITY) || Double.isNaN(x + y + z)) {
      throw new IllegalArgumentException(
          String.format(
              Locale.ROOT,
              "beam direction [%s, %s, %s] must be a finite vector that is not zero",
              x,
              y,
              z));
    }
    double length = scale * Math.sqrt(square(x / scale) + square(y / scale) + square(z / scale));
    return new Beam(power, waist, polarization, new double[] {x / length, y / length, z / length});
  }

  private static double square(double x) {
    return x * x;
  }

  /**
   * Power at the atoms.
   *
   * @return the power
   */
  public Power power() {
    return power;
  }

  /**
   * Radius at the focus at which the intensity has fallen to 1/e².
   *
   * @return the waist
   */
  public Length waist() {
    return waist;
  }

  /**
   * The polarization as it was described.
   *
   * @return the polarization
   * @throws IllegalStateException if none was given
   */
  public Polarization polarization() {
    if (polarization == null) {
      throw new IllegalStateException("the beam has no polarization: call polarized(...)");
    }
    return polarization;
  }

  /**
   * Unit vector of the direction the light travels in.
   *
   * @return a fresh array of three components in the lab frame
   * @throws IllegalStateException if none was given
   */
  public double[] direction() {
    if (direction == null) {
      throw new IllegalStateException("the beam has no direction: call along(x, y, z)");
    }
    return direction.clone();
  }

  /**
   * The polarization as a unit vector of the lab frame.
   *
   * @return the complex polarization vector
   * @throws IllegalArgumentException if a beam of this direction cannot have this polarization
   * @throws IllegalStateException if polarization or direction is missing
   */
  public PolarizationVector polarizationVector() {
    double[] k = direction();
    return polarization().resolvedFor(k[0], k[1], k[2]);
  }

  /**
   * Peak electric field E0 in the focus.
   *
   * @return the amplitude E0 of E0 cos ωt, V/m
   */
  public double peakFieldVoltsPerMetre() {
    double intensity = 2 * power.watts() / (Math.PI * waist.metres() * waist.metres());
    return Math.sqrt(
        2 * intensity / (PhysicalConstants.SPEED_OF_LIGHT * PhysicalConstants.VACUUM_PERMITTIVITY));
  }

  /**
   * Field of an atom away from the focus over the field in it, in the plane of the waist:
   * exp(−ρ²/w²) at the distance ρ from the beam's axis. The distance along the beam does not count,
   * which holds while it is short against the Rayleigh length πw²/λ.
   *
   * @param x position along lab x, m
   * @param y position along lab y, m
   * @param z position along lab z, m
   * @return a factor from 0 to 1
   */
  public double fieldFactorAt(double x, double y, double z) {
    double[] k = direction();
    double along = k[0] * x + k[1] * y + k[2] * z;
    double squared = Math.max(0, x * x + y * y + z * z - along * along);
    return Math.exp(-squared / (waist.metres() * waist.metres()));
  }

  @Override
  public String toString() {
    return power + " in a waist of " + waist;
  }
}
