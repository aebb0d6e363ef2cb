package org.toprung.core.drive;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertInstanceOf;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.toprung.core.quantity.Frequency.gigahertz;
import static org.toprung.core.quantity.Frequency.megahertz;
import static org.toprung.core.quantity.Length.micrometres;
import static org.toprung.core.quantity.Length.nanometres;
import static org.toprung.core.quantity.MagneticField.gauss;
import static org.toprung.core.quantity.Power.milliwatts;

import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.constraints.DoubleRange;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.function.Executable;
import org.toprung.angular.Polarization;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.atom.Sublevel;
import org.toprung.core.quantity.Length;

class DopplerFreeTest {
  private static final double[] Z = {0, 0, 1};
  private static final double[] X = {1, 0, 0};

  private static DopplerFree.Triangle triangle(double a, double b, double c) {
    return assertInstanceOf(
        DopplerFree.Triangle.class, DopplerFree.of(nanometres(a), nanometres(b), nanometres(c)));
  }

  /** Exact: three equal wave vectors cancel in a star of 120°. */
  @Test
  void putsEqualWavelengthsAt120Degrees() {
    DopplerFree.Triangle star = triangle(780, 780, 780);
    assertEquals(120, star.angleDegrees(0, 1), 1e-12);
    assertEquals(120, star.angleDegrees(2, 0), 1e-12);
    double[][] d = star.directions(Z, X);
    double h = Math.sqrt(3) / 2;
    assertArrayEquals(X, d[0], 1e-15);
    assertArrayEquals(new double[] {-0.5, h, 0}, d[1], 1e-15);
    assertArrayEquals(new double[] {-0.5, -h, 0}, d[2], 1e-15);
  }

  /** Exact: wave numbers 3, 4, 5 have a right angle between the shorter two. */
  @Test
  void putsThePythagoreanTriangleAtARightAngle() {
    DopplerFree.Triangle t = triangle(1000 / 3.0, 1000 / 4.0, 1000 / 5.0);
    assertEquals(90, t.angleDegrees(0, 1), 1e-12);
    assertEquals(180 - Math.toDegrees(Math.atan2(4, 3)), t.angleDegrees(0, 2), 1e-12);
  }

  /** Exact: in the flat triangle the two long wavelengths run together against the short one. */
  @Test
  void laysFlatTrianglesOnALine() {
    DopplerFree.Triangle flat = new DopplerFree.Triangle(1, 2, 3);
    assertEquals(0, flat.angleDegrees(0, 1), 1e-6);
    assertEquals(180, flat.angleDegrees(0, 2), 1e-6);
    assertEquals(180, flat.angleDegrees(1, 2), 1e-6);
  }

  /** Whatever the wavelengths: either the wave vectors cancel or the triangle inequality fails. */
  @Property(tries = 300, seed = "51")
  void cancelsOrSaysWhichWaveNumberIsTooLarge(
      @ForAll @DoubleRange(min = 250, max = 2000) double a,
      @ForAll @DoubleRange(min = 250, max = 2000) double b,
      @ForAll @DoubleRange(min = 250, max = 2000) double c,
      @ForAll @DoubleRange(min = -1, max = 1) double tilt) {
    double[] k = {2e9 * Math.PI / a, 2e9 * Math.PI / b, 2e9 * Math.PI / c};
    double largest = Math.max(k[0], Math.max(k[1], k[2]));
    double excess = 2 * largest - (k[0] + k[1] + k[2]);
    DopplerFree solved = DopplerFree.of(nanometres(a), nanometres(b), nanometres(c));
    if (solved instanceof DopplerFree.Impossible impossible) {
      assertTrue(excess > 0);
      assertEquals(largest, k[impossible.beam()]);
      assertEquals(excess, impossible.leastResidualPerMetre(), 1e-8 * largest);
      return;
    }
    assertTrue(excess <= 1e-9 * largest);
    DopplerFree.Triangle t = (DopplerFree.Triangle) solved;
    assertEquals(360, t.angleDegrees(0, 1) + t.angleDegrees(1, 2) + t.angleDegrees(2, 0), 1e-9);
    double[] normal = {tilt, 0.2, 0.5};
    double[][] d = t.directions(normal, new double[] {0.5, 0, -tilt});
    double[][] vectors = new double[3][3];
    for (int i = 0; i < 3; i++) {
      double across = 0;
      for (int axis = 0; axis < 3; axis++) {
        vectors[i][axis] = k[i] * d[i][axis];
        across += normal[axis] * d[i][axis];
      }
      assertEquals(0, across, 1e-14);
    }
    assertEquals(0, DopplerFree.residualPerMetre(vectors), 1e-7 * largest);
  }

  /**
   * Common practice: for Rb 5S-5P-6S-nP at 795 or 780, 1324 to 1367 and 740 to 750 nm the triangle
   * exists; the 420 nm of a second resonance line is too short for any two infrared partners beyond
   * 840 nm.
   */
  @Test
  void tellsWhichWaveNumberExceedsTheOthers() {
    assertTrue(triangle(780.24, 1366.9, 741).angleDegrees(0, 1) > 90);
    DopplerFree.Impossible blue =
        assertInstanceOf(
            DopplerFree.Impossible.class,
            DopplerFree.of(nanometres(420), nanometres(1300), nanometres(1100)));
    assertEquals(0, blue.beam());
    assertEquals(2 * Math.PI / 420e-9, blue.perMetre(), 1);
    assertTrue(blue.toString().contains("wave number of beam 1"), blue.toString());
    double[] back = {-2 * Math.PI / 1300e-9 - 2 * Math.PI / 1100e-9, 0, 0};
    assertEquals(
        blue.leastResidualPerMetre(),
        DopplerFree.residualPerMetre(new double[] {2 * Math.PI / 420e-9, 0, 0}, back),
        1);
  }

  private static Beam beam(double[] direction) {
    Beam beam =
        Beam.gaussian(milliwatts(1), micrometres(50)).polarized(Polarization.linearDegrees(30));
    return beam.along(direction[0], direction[1], direction[2]);
  }

  /** The three-photon drive itself: no Doppler shift in any direction, and no recoil. */
  @Test
  void makesAThreePhotonDriveFreeOfDopplerShiftAndRecoil() {
    double[][] d = {X, X, X};
    Drive along = threePhotons(d);
    Length[] w = along.steps().stream().map(Drive.Step::wavelength).toArray(Length[]::new);
    DopplerFree.Triangle t =
        assertInstanceOf(DopplerFree.Triangle.class, DopplerFree.of(w[0], w[1], w[2]));
    Drive star = threePhotons(t.directions(new double[] {0, 1, 1}, X));
    double total = along.dopplerShift(1, 0, 0).hertz();
    assertEquals(0, star.dopplerShift(1, 2, 3).hertz(), 1e-9 * Math.abs(total));
    assertEquals(0, DopplerFree.residualPerMetre(star.waveVectorPerMetre()), 1);
    assertTrue(along.recoilShift().hertz() > 10e3);
    assertEquals(0, star.recoilShift().hertz(), 1e-9);
  }

  private static Drive threePhotons(double[][] d) {
    return Drive.of(Species.RUBIDIUM_87)
        .from(Sublevel.hyperfine("5S1/2", 2, 2))
        .step(Level.parse("5P3/2"), beam(d[0]))
        .step(Level.parse("6S1/2"), beam(d[1]))
        .step(Sublevel.fine("50P3/2", 1.5), beam(d[2]))
        .detuned(gigahertz(2), megahertz(-500))
        .in(gauss(5))
        .resolve();
  }

  @Test
  void refusesWhatIsNoGeometry() {
    refused("beam 2", () -> DopplerFree.of(nanometres(780), nanometres(0), nanometres(780)));
    refused("beam 3", () -> DopplerFree.of(nanometres(780), nanometres(780), nanometres(-1)));
    refused("sum of the others", () -> new DopplerFree.Triangle(1, 2, 3.1));
    refused("positive", () -> new DopplerFree.Triangle(1, 0, 1));
    refused("NaN", () -> new DopplerFree.Triangle(1, Double.NaN, 1));
    DopplerFree.Triangle star = triangle(780, 780, 780);
    refused("allowed: 0, 1 and 2", () -> star.angleDegrees(0, 3));
    refused("allowed: 0, 1 and 2", () -> star.angleDegrees(-1, 0));
    refused("two different", () -> star.angleDegrees(1, 1));
    refused("in the plane", () -> star.directions(Z, Z));
    refused("normal", () -> star.directions(new double[] {0, Double.NaN, 1}, X));
    refused("first beam", () -> star.directions(Z, new double[3]));
    refused("3 components", () -> star.directions(Z, new double[] {1, 0}));
    refused("3 components", () -> DopplerFree.residualPerMetre(new double[2]));
    refused("finite", () -> DopplerFree.residualPerMetre(new double[] {Double.NaN, 0, 0}));
  }

  private static void refused(String part, Executable action) {
    String message = assertThrows(IllegalArgumentException.class, action).getMessage();
    assertTrue(message.contains(part), message);
  }
}
