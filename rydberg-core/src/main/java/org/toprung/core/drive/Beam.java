package org.toprung.core.drive;

import java.util.List;
import java.util.Locale;
import org.toprung.angular.Polarization;
import org.toprung.angular.PolarizationVector;
import org.toprung.angular.Rotation;
import org.toprung.core.quantity.Intensity;
import org.toprung.core.quantity.Length;
import org.toprung.core.quantity.PhysicalConstants;
import org.toprung.core.quantity.Power;

/**
 * A laser beam: its {@link Profile}, where it is focused, the direction it runs in and its
 * polarization.
 *
 * <p>Conventions: waist w is the radius at which the intensity has fallen to 1/e²; the field is
 * E(t) = E0 cos ωt with E0 = √(2I/(cε0)). The beam is described in the lab frame, in which the
 * magnetic field points along z and the nominal position of the atom is the origin. The focus sits
 * on the atom unless {@link #focusedAt} moves it.
 *
 * <p>A travelling wave: light that comes back from a mirror is not covered (package description).
 *
 * <p>Immutable: {@link #polarized}, {@link #along} and the like give copies. A step of a {@link
 * Drive} accepts a beam once it has both a polarization and a direction.
 */
public final class Beam {
  private final Profile profile;
  private final Polarization polarization; // null until given
  private final Impurity impurity;
  private final double[] direction; // unit vector; null until given
  private final double[] focus; // m, from the nominal position of the atom

  private Beam(
      Profile profile,
      Polarization polarization,
      Impurity impurity,
      double[] direction,
      double[] focus) {
    this.profile = profile;
    this.polarization = polarization;
    this.impurity = impurity;
    this.direction = direction;
    this.focus = focus;
  }

  /**
   * A round Gaussian beam.
   *
   * @param power power at the atoms, positive
   * @param waist 1/e² intensity radius at the focus, positive
   * @return a beam without polarization or direction yet
   * @throws IllegalArgumentException if power or waist is not positive
   */
  public static Beam gaussian(Power power, Length waist) {
    return of(new Profile.Gaussian(power, waist));
  }

  /**
   * An elliptical Gaussian beam, both waists in the same plane.
   *
   * @param power power at the atoms, positive
   * @param first 1/e² intensity radius along the axis, positive
   * @param second 1/e² intensity radius in the other direction across the beam, positive
   * @param axisX component along lab x of the axis of the first waist
   * @param axisY component along lab y of the axis of the first waist
   * @param axisZ component along lab z of the axis of the first waist; of any length, across the
   *     direction that {@link #along} gives
   * @return a beam without polarization or direction yet
   * @throws IllegalArgumentException if power or a waist is not positive, or the axis is zero or
   *     not finite
   */
  public static Beam elliptical(
      Power power, Length first, Length second, double axisX, double axisY, double axisZ) {
    return of(new Profile.Elliptical(power, first, second, axisX, axisY, axisZ));
  }

  /**
   * A beam of one intensity wherever the atom goes.
   *
   * @param intensity intensity at the atoms, positive
   * @return a beam without polarization or direction yet
   * @throws IllegalArgumentException if the intensity is not positive
   */
  public static Beam flatTop(Intensity intensity) {
    return of(new Profile.FlatTop(intensity));
  }

  /**
   * Changes intensity and power, and nothing else.
   *
   * @param factor factor on both, positive
   * @return a copy
   * @throws IllegalArgumentException if the factor is not positive and finite
   */
  public Beam brightened(double factor) {
    if (!(factor > 0 && factor < Double.POSITIVE_INFINITY)) {
      throw new IllegalArgumentException(
          "factor " + factor + " on the power of a beam must be positive and finite");
    }
    return new Beam(profile.brightened(factor), polarization, impurity, direction, focus);
  }

  private static Beam of(Profile profile) {
    return new Beam(profile, null, Impurity.NONE, null, new double[3]);
  }

  /**
   * Sets the polarization.
   *
   * @param newPolarization the polarization, about the magnetic field
   * @return a copy with this polarization
   * @throws IllegalArgumentException if it is null
   */
  public Beam polarized(Polarization newPolarization) {
    if (newPolarization == null) {
      throw new IllegalArgumentException("a beam needs a polarization, not null");
    }
    return new Beam(profile, newPolarization, impurity, direction, focus);
  }

  /**
   * Admixes light of the orthogonal polarization, coherently and in phase with the wanted one: as
   * {@link #impure(double, double)} with phase 0.
   *
   * @param fraction part of the intensity in the orthogonal polarization, 0 to 0.5
   * @return a copy with this impurity
   * @throws IllegalArgumentException if the fraction is out of range
   */
  public Beam impure(double fraction) {
    return impure(fraction, 0);
  }

  /**
   * Admixes light of the orthogonal polarization, coherently: √(1−f) ε + √f e<sup>iφ</sup> ε⊥ with
   * ε⊥ = k × ε*, k the unit vector along the beam.
   *
   * <p>In circular light the admixture has the other handedness, and φ turns the ellipse. In linear
   * light it is linear across the wanted one; there φ = 0 turns the plane of polarization by arcsin
   * √f, right-handed about the beam, and φ = ±90° makes the light elliptical, of positive or
   * negative helicity.
   *
   * @param fraction f, part of the intensity in the orthogonal polarization, 0 to 0.5
   * @param phaseDegrees φ, any finite angle, degrees
   * @return a copy with this impurity
   * @throws IllegalArgumentException if the fraction is out of range or the phase not finite
   */
  public Beam impure(double fraction, double phaseDegrees) {
    return new Beam(profile, polarization, new Impurity(fraction, phaseDegrees), direction, focus);
  }

  /**
   * Sets the direction the light travels in.
   *
   * @param x component along lab x
   * @param y component along lab y
   * @param z component along lab z, the magnetic field
   * @return a copy with this direction; only the direction of the vector counts
   * @throws IllegalArgumentException if the vector is zero or not finite, or the axis of an
   *     elliptical beam does not lie across it
   */
  public Beam along(double x, double y, double z) {
    double[] k = UnitVectors.of("beam direction", x, y, z);
    if (profile instanceof Profile.Elliptical ellipse) {
      ellipse.requireAcross(k);
    }
    return new Beam(profile, polarization, impurity, k, focus);
  }

  /**
   * Moves the focus away from the atom.
   *
   * @param x position of the focus along lab x, from the nominal position of the atom
   * @param y position of the focus along lab y, from the nominal position of the atom
   * @param z position of the focus along lab z, from the nominal position of the atom
   * @return a copy focused there
   */
  public Beam focusedAt(Length x, Length y, Length z) {
    return focusedAt(x.metres(), y.metres(), z.metres());
  }

  private Beam focusedAt(double x, double y, double z) {
    return new Beam(profile, polarization, impurity, direction, new double[] {x, y, z});
  }

  /** The beam as an atom sees it whose nominal position is (x, y, z), m. */
  Beam seenFrom(double x, double y, double z) {
    return focusedAt(focus[0] - x, focus[1] - y, focus[2] - z);
  }

  /**
   * Turns the whole beam about the origin: direction, focus, axis of the waists and polarization,
   * which becomes a vector.
   *
   * @param rotation active rotation in the lab frame
   * @return the rotated beam
   * @throws IllegalArgumentException if a beam of this direction cannot have this polarization
   * @throws IllegalStateException if polarization or direction is missing
   */
  public Beam rotatedBy(Rotation rotation) {
    double[] k = rotation.appliedTo(requireDirection()[0], direction[1], direction[2]);
    PolarizationVector turned =
        polarization().resolvedFor(direction[0], direction[1], direction[2]);
    return new Beam(
            turned(profile, rotation),
            Polarization.ofVector(turned.rotatedBy(rotation)),
            impurity,
            null,
            rotation.appliedTo(focus[0], focus[1], focus[2]))
        .along(k[0], k[1], k[2]);
  }

  private static Profile turned(Profile profile, Rotation rotation) {
    if (profile instanceof Profile.Elliptical e) {
      double[] axis = rotation.appliedTo(e.axisX(), e.axisY(), e.axisZ());
      return new Profile.Elliptical(
          e.beamPower(), e.firstWaist(), e.secondWaist(), axis[0], axis[1], axis[2]);
    }
    return profile;
  }

  /**
   * How the light is spread in space.
   *
   * @return the profile
   */
  public Profile profile() {
    return profile;
  }

  /**
   * Power at the atoms.
   *
   * @return the power
   * @throws IllegalStateException if the beam is given by its intensity; {@link #profile()} tells
   */
  public Power power() {
    return profile
        .power()
        .orElseThrow(() -> new IllegalStateException("a " + profile + " has no known power"));
  }

  /**
   * Radius at the focus at which the intensity has fallen to 1/e².
   *
   * @return the waist
   * @throws IllegalStateException if the beam is not a round Gaussian; {@link #profile()} tells
   */
  public Length waist() {
    if (profile instanceof Profile.Gaussian gaussian) {
      return gaussian.waist();
    }
    throw new IllegalStateException("a beam of " + profile + " has no single waist");
  }

  /**
   * Position of the focus from the nominal position of the atom.
   *
   * @return a fresh array of three components in the lab frame, m
   */
  public double[] focusMetres() {
    return focus.clone();
  }

  /**
   * The wanted polarization as it was described, without impurity.
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
   * Part of the intensity in the polarization orthogonal to the wanted one.
   *
   * @return the fraction, 0 to 0.5
   */
  public double impurity() {
    return impurity.fraction();
  }

  /**
   * Phase of the light of the orthogonal polarization.
   *
   * @return the phase as given to {@link #impure(double, double)}, degrees
   */
  public double impurityPhaseDegrees() {
    return impurity.phaseDegrees();
  }

  /**
   * Two unit vectors across the direction of travel and across each other, for displacements of the
   * beam.
   *
   * @return two fresh arrays of three components in the lab frame
   * @throws IllegalStateException if no direction was given
   */
  public List<double[]> across() {
    double[] k = direction();
    int least = 0;
    for (int a = 1; a < 3; a++) {
      least = Math.abs(k[a]) < Math.abs(k[least]) ? a : least;
    }
    // an axis well away from the beam, made orthogonal to it
    double[] first = new double[3];
    double norm = Math.sqrt(1 - k[least] * k[least]);
    for (int a = 0; a < 3; a++) {
      first[a] = ((a == least ? 1 : 0) - k[least] * k[a]) / norm;
    }
    double[] second = new double[3];
    for (int a = 0; a < 3; a++) {
      int b = (a + 1) % 3;
      int c = (a + 2) % 3;
      second[a] = k[b] * first[c] - k[c] * first[b];
    }
    return List.of(first, second);
  }

  /**
   * Unit vector of the direction the light travels in.
   *
   * @return a fresh array of three components in the lab frame
   * @throws IllegalStateException if none was given
   */
  public double[] direction() {
    return requireDirection().clone();
  }

  private double[] requireDirection() {
    if (direction == null) {
      throw new IllegalStateException("the beam has no direction: call along(x, y, z)");
    }
    return direction;
  }

  /**
   * The polarization as a unit vector of the lab frame, impurity included.
   *
   * @return the complex polarization vector
   * @throws IllegalArgumentException if a beam of this direction cannot have this polarization
   * @throws IllegalStateException if polarization or direction is missing
   */
  public PolarizationVector polarizationVector() {
    double[] k = requireDirection();
    return impurity.mixedInto(polarization().resolvedFor(k[0], k[1], k[2]), k);
  }

  /**
   * Electric field E0 at the brightest point, the focus of a Gaussian beam.
   *
   * @return the amplitude E0 of E0 cos ωt, V/m
   */
  public double peakFieldVoltsPerMetre() {
    return Math.sqrt(
        2
            * profile.peakIntensity().wattsPerSquareMetre()
            / (PhysicalConstants.SPEED_OF_LIGHT * PhysicalConstants.VACUUM_PERMITTIVITY));
  }

  /**
   * Electric field E0 at the nominal position of the atom.
   *
   * @param wavelength wavelength of the light, positive
   * @return the amplitude E0 of E0 cos ωt, V/m; at most {@link #peakFieldVoltsPerMetre()}
   * @throws IllegalArgumentException if the wavelength is not positive
   * @throws IllegalStateException if the beam has no direction
   */
  public double fieldVoltsPerMetre(Length wavelength) {
    return peakFieldVoltsPerMetre() * Math.exp(logFieldRatio(0, 0, 0, wavelength));
  }

  /**
   * Field of a displaced atom over that at the nominal position. More than 1 where the displacement
   * leads towards the focus.
   *
   * @param x displacement along lab x, m
   * @param y displacement along lab y, m
   * @param z displacement along lab z, m
   * @param wavelength wavelength of the light, positive
   * @return the factor on the field; its square is that on the intensity
   * @throws IllegalArgumentException if the wavelength is not positive or the displacement not
   *     finite
   * @throws IllegalStateException if the beam has no direction
   */
  public double fieldFactorAt(double x, double y, double z, Length wavelength) {
    double factor =
        Math.exp(logFieldRatio(x, y, z, wavelength) - logFieldRatio(0, 0, 0, wavelength));
    if (!(factor < Double.POSITIVE_INFINITY)) {
      throw new IllegalArgumentException(
          String.format(
              Locale.ROOT,
              "the field %s m, %s m, %s m from an atom whose beam is focused %s m, %s m, %s m away"
                  + " is no finite multiple of the field at the atom",
              x,
              y,
              z,
              focus[0],
              focus[1],
              focus[2]));
    }
    return factor;
  }

  private double logFieldRatio(double x, double y, double z, Length wavelength) {
    if (!(wavelength.metres() > 0)) {
      throw new IllegalArgumentException("wavelength " + wavelength + " must be positive");
    }
    return profile.logFieldRatio(
        x - focus[0], y - focus[1], z - focus[2], requireDirection(), wavelength.metres());
  }

  @Override
  public String toString() {
    return profile.toString();
  }
}
