package org.toprung.core.drive;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.toprung.core.quantity.Length.micrometres;
import static org.toprung.core.quantity.Length.nanometres;
import static org.toprung.core.quantity.Power.milliwatts;

import java.util.List;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.constraints.DoubleRange;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.function.Executable;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;
import org.toprung.angular.Polarization;
import org.toprung.angular.PolarizationVector;
import org.toprung.angular.Rotation;
import org.toprung.angular.SphericalComponents;
import org.toprung.core.quantity.Intensity;
import org.toprung.core.quantity.Length;
import org.toprung.core.quantity.Power;

class BeamTest {
  private static final Length NM_500 = nanometres(500);
  private static final Length ZERO = micrometres(0);

  private static Beam round() {
    return Beam.gaussian(milliwatts(1), micrometres(10)).along(0, 0, 1);
  }

  private static Beam oval() {
    return Beam.elliptical(milliwatts(1), micrometres(8), micrometres(20), 1, 1, 0).along(0, 0, 1);
  }

  /** Handbook: 1 W/m² has E0 = 27.45 V/m (√(2·376.730 Ω)). */
  @Test
  void hasTheFieldOfItsPeakIntensity() {
    double metres = Math.sqrt(2 / Math.PI);
    Beam beam = Beam.gaussian(Power.ofWatts(1), Length.ofMetres(metres));
    assertEquals(Math.sqrt(2 * 376.730313), beam.peakFieldVoltsPerMetre(), 1e-5);
    Beam flat = Beam.flatTop(Intensity.ofWattsPerSquareMetre(1));
    assertEquals(Math.sqrt(2 * 376.730313), flat.peakFieldVoltsPerMetre(), 1e-5);
  }

  /** Exact: three orthogonal unit vectors, whatever the direction. */
  @Property(tries = 100, seed = "71")
  void hasTwoDirectionsAcross(
      @ForAll @DoubleRange(min = -1, max = 1) double x,
      @ForAll @DoubleRange(min = -1, max = 1) double y) {
    for (double z : new double[] {0.3, -1e-3}) {
      double[] k = round().along(x, y, z).direction();
      List<double[]> across = round().along(x, y, z).across();
      double[][] all = {k, across.get(0), across.get(1)};
      for (int i = 0; i < 3; i++) {
        for (int j = 0; j < 3; j++) {
          double dot = all[i][0] * all[j][0] + all[i][1] * all[j][1] + all[i][2] * all[j][2];
          assertEquals(i == j ? 1 : 0, dot, 1e-14);
        }
      }
    }
  }

  /** Exact: the field goes with the square root of the power, whatever the profile. */
  @Test
  void brightensByTheSquareRootInField() {
    for (Beam beam : List.of(round(), oval(), Beam.flatTop(Intensity.ofWattsPerSquareMetre(3)))) {
      Beam brighter = beam.brightened(4);
      double field = beam.peakFieldVoltsPerMetre();
      assertEquals(2 * field, brighter.peakFieldVoltsPerMetre(), 1e-14 * field);
      assertEquals(beam.profile().waists(), brighter.profile().waists());
    }
    for (double factor : new double[] {0, -1, Double.NaN, Double.POSITIVE_INFINITY}) {
      assertThrows(IllegalArgumentException.class, () -> round().brightened(factor));
    }
  }

  /** Definition of the waist: 1/e² in intensity, 1/e in field, across the beam. */
  @Test
  void fallsToOneOverEInFieldAtTheWaist() {
    Beam beam = Beam.gaussian(milliwatts(1), micrometres(10)).along(3, 0, 4);
    assertEquals(1 / Math.E, beam.fieldFactorAt(0, 10e-6, 0, NM_500), 1e-12);
    assertEquals(1 / Math.E, beam.fieldFactorAt(8e-6, 0, -6e-6, NM_500), 1e-12);
  }

  /** Definition of the Rayleigh range πw²/λ: half the intensity on the axis, √2 of the waist. */
  @Test
  void losesHalfItsIntensityAtTheRayleighRange() {
    double range = Math.PI * 1e-10 / 500e-9;
    assertEquals(Math.sqrt(0.5), round().fieldFactorAt(0, 0, range, NM_500), 1e-12);
    assertEquals(Math.sqrt(0.5), round().fieldFactorAt(0, 0, -range, NM_500), 1e-12);
    double atWider = round().fieldFactorAt(Math.sqrt(2) * 10e-6, 0, range, NM_500);
    assertEquals(Math.sqrt(0.5) / Math.E, atWider, 1e-12);
    // common practice: 3.14 mm² over half a micrometre, so 1 um along the beam does not count
    assertEquals(1, round().fieldFactorAt(0, 0, 1e-6, NM_500), 2e-6);
  }

  /** Exact: the power through any plane across the beam is that of the beam. */
  @ParameterizedTest
  @ValueSource(doubles = {0, 150e-6, -700e-6})
  void carriesItsPowerThroughEveryPlane(double along) {
    for (Beam beam : List.of(round(), oval())) {
      double step = 2e-6;
      double sum = 0;
      for (int i = -80; i <= 80; i++) {
        for (int j = -80; j <= 80; j++) {
          double factor = beam.fieldFactorAt(i * step, j * step, along, NM_500);
          sum += factor * factor * step * step;
        }
      }
      double watts = sum * beam.profile().peakIntensity().wattsPerSquareMetre();
      assertEquals(1e-3, watts, 1e-9);
    }
  }

  /** Definition: 1/e in field at each waist along its own axis; the axis may have any length. */
  @Test
  void hasEachWaistAlongItsOwnAxis() {
    double r = Math.sqrt(0.5);
    assertEquals(1 / Math.E, oval().fieldFactorAt(8e-6 * r, 8e-6 * r, 0, NM_500), 1e-12);
    assertEquals(1 / Math.E, oval().fieldFactorAt(20e-6 * r, -20e-6 * r, 0, NM_500), 1e-12);
    double i0 = 2 * 1e-3 / (Math.PI * 8e-6 * 20e-6);
    assertEquals(i0, oval().profile().peakIntensity().wattsPerSquareMetre(), 1e-9 * i0);
    assertEquals(List.of(micrometres(8), micrometres(20)), oval().profile().waists());
  }

  /** Closed form: each direction across an elliptical beam has a Rayleigh range of its own. */
  @Test
  void spreadsEachWaistOverItsOwnRayleighRange() {
    double range = Math.PI * 64e-12 / 500e-9;
    double second = Math.PI * 400e-12 / 500e-9;
    double expected = Math.pow(2, -0.25) * Math.pow(1 + range * range / (second * second), -0.25);
    assertEquals(expected, oval().fieldFactorAt(0, 0, range, NM_500), 1e-12);
  }

  @Property(tries = 100, seed = "41")
  void isRoundWhereBothWaistsAreTheSame(
      @ForAll @DoubleRange(min = -30, max = 30) double x,
      @ForAll @DoubleRange(min = -30, max = 30) double y,
      @ForAll @DoubleRange(min = -2000, max = 2000) double z) {
    Beam same =
        Beam.elliptical(milliwatts(1), micrometres(10), micrometres(10), 2, 1, 0).along(0, 0, 1);
    double expected = round().fieldFactorAt(1e-6 * x, 1e-6 * y, 1e-6 * z, NM_500);
    assertEquals(
        expected, same.fieldFactorAt(1e-6 * x, 1e-6 * y, 1e-6 * z, NM_500), 1e-12 * expected);
    assertEquals(
        round().peakFieldVoltsPerMetre(),
        same.peakFieldVoltsPerMetre(),
        1e-12 * same.peakFieldVoltsPerMetre());
  }

  @Test
  void isTheSameEverywhereInAFlatTop() {
    Beam flat = Beam.flatTop(Intensity.wattsPerSquareCentimetre(2)).along(0, 1, 0);
    assertEquals(1, flat.fieldFactorAt(1, -2, 3, NM_500));
    assertEquals(flat.peakFieldVoltsPerMetre(), flat.fieldVoltsPerMetre(NM_500));
    assertTrue(flat.profile().power().isEmpty());
    assertEquals(List.of(), flat.profile().waists());
    assertThrows(IllegalStateException.class, flat::power);
    assertThrows(IllegalStateException.class, flat::waist);
    assertThrows(IllegalStateException.class, () -> oval().waist());
  }

  /** The field at a place does not depend on where the coordinates begin. */
  @Property(tries = 100, seed = "42")
  void countsTheFocusFromTheAtom(
      @ForAll @DoubleRange(min = -15, max = 15) double fx,
      @ForAll @DoubleRange(min = -15, max = 15) double fy,
      @ForAll @DoubleRange(min = -900, max = 900) double fz,
      @ForAll @DoubleRange(min = -5, max = 5) double x,
      @ForAll @DoubleRange(min = -50, max = 50) double z) {
    Beam off = oval().focusedAt(micrometres(fx), micrometres(fy), micrometres(fz));
    double[] f = off.focusMetres();
    double atAtom = oval().fieldFactorAt(-f[0], -f[1], -f[2], NM_500);
    double peak = oval().peakFieldVoltsPerMetre();
    assertEquals(atAtom * peak, off.fieldVoltsPerMetre(NM_500), 1e-12 * peak * atAtom);
    assertEquals(1, off.fieldFactorAt(0, 0, 0, NM_500));
    double displaced = oval().fieldFactorAt(1e-6 * x - f[0], -f[1], 1e-6 * z - f[2], NM_500);
    double factor = off.fieldFactorAt(1e-6 * x, 0, 1e-6 * z, NM_500);
    assertEquals(displaced / atAtom, factor, 1e-10 * factor);
  }

  @Test
  void isBrighterTowardsTheFocus() {
    Beam off = round().focusedAt(micrometres(10), ZERO, ZERO);
    assertEquals(Math.E, off.fieldFactorAt(10e-6, 0, 0, NM_500), 1e-12);
  }

  /** Definition of σ±: the impurity of circular light is the other handedness, all of it. */
  @Property(tries = 50, seed = "43")
  void putsTheImpurityOfCircularLightIntoTheOtherHandedness(
      @ForAll @DoubleRange(min = 0, max = 0.5) double fraction,
      @ForAll @DoubleRange(min = -400, max = 400) double phase) {
    for (double z : new double[] {1, -1}) {
      Beam beam = round().polarized(Polarization.SIGMA_PLUS).along(0, 0, z).impure(fraction, phase);
      SphericalComponents a = beam.polarizationVector().componentsAbout(0, 0, 1);
      assertEquals(1 - fraction, a.power(1), 1e-14);
      assertEquals(fraction, a.power(-1), 1e-14);
      assertEquals(0, a.power(0), 1e-30);
      assertEquals(fraction, beam.impurity());
      assertEquals(phase, beam.impurityPhaseDegrees());
    }
  }

  /** Exact: a rotated plane by arcsin √f in phase, an ellipse of that ellipticity at ±90°. */
  @Property(tries = 50, seed = "44")
  void turnsLinearLightOrMakesItElliptical(
      @ForAll @DoubleRange(min = 0, max = 0.5) double fraction,
      @ForAll @DoubleRange(min = 0, max = 180) double angle,
      @ForAll @DoubleRange(min = -1, max = 1) double kz) {
    Beam clean = round().polarized(Polarization.linearDegrees(angle)).along(0.3, 0.5, kz);
    double degrees = Math.toDegrees(Math.asin(Math.sqrt(fraction)));
    same(clean.polarized(Polarization.linearDegrees(angle + degrees)), clean.impure(fraction));
    for (int sign : new int[] {1, -1}) {
      same(
          clean.polarized(Polarization.ellipticalDegrees(angle, sign * degrees)),
          clean.impure(fraction, sign * 90));
    }
  }

  private static void same(Beam expected, Beam actual) {
    assertEquals(1, actual.polarizationVector().purity(expected.polarizationVector()), 1e-14);
  }

  /** Definition of purity; and light stays transverse. */
  @Property(tries = 50, seed = "45")
  void keepsTheRestOfTheLightAsWanted(
      @ForAll @DoubleRange(min = 0, max = 0.5) double fraction,
      @ForAll @DoubleRange(min = -180, max = 180) double phase,
      @ForAll @DoubleRange(min = -45, max = 45) double ellipticity) {
    Beam clean =
        round().polarized(Polarization.ellipticalDegrees(20, ellipticity)).along(0.3, -0.5, 0.2);
    PolarizationVector mixed = clean.impure(fraction, phase).polarizationVector();
    assertEquals(1 - fraction, mixed.purity(clean.polarizationVector()), 1e-14);
    double[] k = clean.direction();
    assertEquals(0, k[0] * mixed.xRe() + k[1] * mixed.yRe() + k[2] * mixed.zRe(), 1e-15);
    assertEquals(0, k[0] * mixed.xIm() + k[1] * mixed.yIm() + k[2] * mixed.zIm(), 1e-15);
  }

  /** A rotation of the whole beam is a rotation of what it does. */
  @Property(tries = 50, seed = "46")
  void turnsAsAWhole(
      @ForAll @DoubleRange(min = -3, max = 3) double alpha,
      @ForAll @DoubleRange(min = 0, max = 3) double beta,
      @ForAll @DoubleRange(min = -3, max = 3) double gamma) {
    Rotation r = Rotation.ofEulerRadians(alpha, beta, gamma);
    Beam beam =
        Beam.elliptical(milliwatts(1), micrometres(8), micrometres(20), 0, 1, 0)
            .polarized(Polarization.ellipticalDegrees(30, 10))
            .impure(0.1, 70)
            .along(1, 0, 0.5)
            .focusedAt(micrometres(3), micrometres(-2), micrometres(40));
    Beam turned = beam.rotatedBy(r);
    double[] p = r.appliedTo(2e-6, 5e-6, -30e-6);
    double expected = beam.fieldFactorAt(2e-6, 5e-6, -30e-6, NM_500);
    assertEquals(expected, turned.fieldFactorAt(p[0], p[1], p[2], NM_500), 1e-10 * expected);
    double[] k = beam.direction();
    assertArrayEquals(r.appliedTo(k[0], k[1], k[2]), turned.direction(), 1e-14);
    PolarizationVector e = beam.polarizationVector().rotatedBy(r);
    assertEquals(1, turned.polarizationVector().purity(e), 1e-13);
  }

  @Test
  void refusesWhatNoBeamCanBe() {
    refused("power", () -> Beam.gaussian(milliwatts(0), micrometres(1)));
    refused("waist", () -> Beam.gaussian(milliwatts(1), micrometres(-1)));
    refused(
        "power", () -> Beam.elliptical(milliwatts(-1), micrometres(1), micrometres(1), 1, 0, 0));
    refused("waist", () -> Beam.elliptical(milliwatts(1), ZERO, micrometres(1), 1, 0, 0));
    refused(
        "-2 um", () -> Beam.elliptical(milliwatts(1), micrometres(1), micrometres(-2), 1, 0, 0));
    for (double bad : new double[] {0, Double.NaN, Double.POSITIVE_INFINITY}) {
      refused(
          "waist axis",
          () -> Beam.elliptical(milliwatts(1), micrometres(1), micrometres(1), 0, bad, 0));
    }
    refused("across the beam", () -> oval().along(1, 1, 0));
    refused("across the beam", () -> oval().along(1e-3, 0, 1));
    refused("intensity", () -> Beam.flatTop(Intensity.ofWattsPerSquareMetre(0)));
    refused("intensity", () -> Beam.flatTop(Intensity.ofWattsPerSquareMetre(-1)));
  }

  @ParameterizedTest
  @ValueSource(doubles = {-1e-9, 0.51, 1, Double.NaN, Double.POSITIVE_INFINITY})
  void refusesImpuritiesThatAreNone(double bad) {
    refused(String.valueOf(bad), () -> round().impure(bad));
  }

  @Test
  void refusesPhasesPlacesAndWavelengthsThatAreNone() {
    refused("phase", () -> round().impure(0.1, Double.NaN));
    refused("phase", () -> round().impure(0.1, Double.NEGATIVE_INFINITY));
    refused("NaN", () -> round().fieldFactorAt(0, Double.NaN, 0, NM_500));
    refused("Infinity", () -> round().fieldFactorAt(0, Double.POSITIVE_INFINITY, 0, NM_500));
    refused("wavelength", () -> round().fieldFactorAt(0, 0, 0, ZERO));
    refused("wavelength", () -> round().fieldVoltsPerMetre(nanometres(-1)));
    Beam far = round().focusedAt(micrometres(1000), ZERO, ZERO);
    refused("no finite multiple", () -> far.fieldFactorAt(1000e-6, 0, 0, NM_500));
    assertEquals(0, far.fieldVoltsPerMetre(NM_500));
  }

  private static void refused(String part, Executable action) {
    String message = assertThrows(IllegalArgumentException.class, action).getMessage();
    assertTrue(message.contains(part), message);
  }
}
