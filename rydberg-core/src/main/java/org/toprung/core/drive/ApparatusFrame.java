package org.toprung.core.drive;

import org.toprung.angular.Rotation;

/**
 * A frame in which the magnetic field does not point along z, for those who describe beams along
 * the axes of their apparatus. It turns them into the lab frame of this package, whose z axis is
 * the field.
 *
 * <p>The lab frame's z axis is the field; its x axis is the apparatus' direction of increasing
 * polar angle at the field. With the field along the apparatus' z both frames are the same.
 * Positions count from the same origin.
 *
 * <p>In the apparatus frame names and angles of a {@link org.toprung.angular.Polarization} refer to
 * the apparatus' z axis, not to the field: "sigma+" is circular about that axis, and only drives Δm
 * = +1 if the field points along it.
 *
 * <p>Immutable and thread-safe.
 */
public final class ApparatusFrame {
  private final Rotation toLab;

  private ApparatusFrame(Rotation toLab) {
    this.toLab = toLab;
  }

  /**
   * The frame in which the magnetic field points in a given direction.
   *
   * @param x component of the field along the apparatus' x, in any unit
   * @param y component of the field along the apparatus' y
   * @param z component of the field along the apparatus' z
   * @return the frame
   * @throws IllegalArgumentException if the vector is zero or not finite
   */
  public static ApparatusFrame withFieldAlong(double x, double y, double z) {
    double[] b = UnitVectors.of("magnetic field direction", x, y, z);
    return new ApparatusFrame(Rotation.ofDirection(b[0], b[1], b[2]).inverse());
  }

  /**
   * A beam in the lab frame.
   *
   * @param beam a beam described in the apparatus frame, with polarization and direction
   * @return the same beam described in the lab frame, its polarization as a vector
   * @throws IllegalArgumentException if a beam of this direction cannot have this polarization
   * @throws IllegalStateException if polarization or direction is missing
   */
  public Beam toLab(Beam beam) {
    return beam.rotatedBy(toLab);
  }

  /**
   * A vector, such as an electric field, in the lab frame.
   *
   * @param x component along the apparatus' x
   * @param y component along the apparatus' y
   * @param z component along the apparatus' z
   * @return a fresh array of the three components in the lab frame, in the same unit
   */
  public double[] toLab(double x, double y, double z) {
    return toLab.appliedTo(x, y, z);
  }

  /**
   * A vector of the lab frame, such as a summed wave vector, in the apparatus frame.
   *
   * @param x component along lab x
   * @param y component along lab y
   * @param z component along lab z
   * @return a fresh array of the three components in the apparatus frame, in the same unit
   */
  public double[] fromLab(double x, double y, double z) {
    return toLab.inverse().appliedTo(x, y, z);
  }
}
