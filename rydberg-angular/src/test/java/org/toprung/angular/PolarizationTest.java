package org.toprung.angular;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertSame;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.SplittableRandom;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.constraints.DoubleRange;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.NullSource;
import org.junit.jupiter.params.provider.ValueSource;

class PolarizationTest {

  private static final double R = Math.sqrt(0.5);

  private static void assertVector(
      PolarizationVector v,
      double xRe,
      double xIm,
      double yRe,
      double yIm,
      double zRe,
      double zIm) {
    assertEquals(xRe, v.xRe(), 1e-15, v::toString);
    assertEquals(xIm, v.xIm(), 1e-15, v::toString);
    assertEquals(yRe, v.yRe(), 1e-15, v::toString);
    assertEquals(yIm, v.yIm(), 1e-15, v::toString);
    assertEquals(zRe, v.zRe(), 1e-15, v::toString);
    assertEquals(zIm, v.zIm(), 1e-15, v::toString);
  }

  private static double norm(PolarizationVector v) {
    return v.xRe() * v.xRe()
        + v.xIm() * v.xIm()
        + v.yRe() * v.yRe()
        + v.yIm() * v.yIm()
        + v.zRe() * v.zRe()
        + v.zIm() * v.zIm();
  }

  private static IllegalArgumentException refused(Runnable call) {
    return assertThrows(IllegalArgumentException.class, call::run);
  }

  @ParameterizedTest
  @ValueSource(doubles = {1, -1, 25, -1e-300, 1e300})
  void sigmaAlongTheAxisIsOneComponentWhicheverWayTheBeamRuns(double kz) {
    PolarizationVector vector = Polarization.SIGMA_PLUS.resolvedFor(0, 0, kz);
    assertVector(vector, -R, 0, 0, -R, 0, 0);
    SphericalComponents plus = vector.componentsAbout(0, 0, 1);
    assertEquals(1, plus.re(1), 3e-16);
    assertEquals(0, plus.im(1), 1e-30);
    assertEquals(1, plus.power(1), 5e-16);
    assertEquals(0, plus.power(0) + plus.power(-1), 1e-30);
    assertEquals(1, plus.purity(1), 1e-15);
    SphericalComponents minus =
        Polarization.SIGMA_MINUS.resolvedFor(0, 0, kz).componentsAbout(0, 0, 1);
    assertEquals(1, minus.re(-1), 3e-16);
    assertEquals(0, minus.im(-1), 1e-30);
    assertEquals(0, minus.power(0) + minus.power(1), 1e-30);
  }

  @Test
  void piIsTheZeroComponentForABeamAcrossTheAxis() {
    SphericalComponents pi = Polarization.PI.resolvedFor(3, 4, 0).componentsAbout(0, 0, 2);
    assertEquals(1, pi.re(0), 2e-16);
    assertEquals(0, pi.im(0), 0.0);
    assertEquals(0, pi.power(1) + pi.power(-1), 1e-30);
  }

  @Test
  void aBeamAlongTheAxisCannotBePiPolarized() {
    String message = refused(() -> Polarization.PI.resolvedFor(0, 0, -1)).getMessage();
    assertTrue(message.contains("a beam along the axis cannot be pi polarized"), message);
    assertTrue(message.contains("the beam runs along (0"), message);
    String slanted = refused(() -> Polarization.PI.resolvedFor(1, 0, 1)).getMessage();
    assertTrue(slanted.contains("only then is the axis transverse"), slanted);
    assertTrue(slanted.contains("(0.707107, 0"), slanted);
  }

  @Test
  void aBeamAcrossTheAxisCannotBeSigmaPolarized() {
    String message = refused(() -> Polarization.SIGMA_PLUS.resolvedFor(1, 0, 0)).getMessage();
    assertTrue(message.contains("sigma+ needs a beam along"), message);
    refused(() -> Polarization.SIGMA_MINUS.resolvedFor(0, 0.1, 1));
  }

  @Test
  void alignmentIsGenerousByAMillionthAndNoMore() {
    assertEquals(1, norm(Polarization.SIGMA_PLUS.resolvedFor(0.9e-6, 0, 1)), 1e-15);
    refused(() -> Polarization.SIGMA_PLUS.resolvedFor(1.1e-6, 0, 1));
    assertEquals(1, norm(Polarization.PI.resolvedFor(1, 0, -0.9e-6)), 1e-15);
    refused(() -> Polarization.PI.resolvedFor(1, 0, -1.1e-6));
    Polarization x = Polarization.ofVector(1, 0, 0, 0, 0, 0);
    assertVector(x.resolvedFor(0.9e-6, 1, 0), 1, 0, 0, 0, 0, 0);
    refused(() -> x.resolvedFor(1.1e-6, 1, 0));
  }

  @Test
  void linearAnglesStartAtTheProjectionOfZAndTurnRightHandedAboutTheBeam() {
    // Beam along x: u = z, v = x × z = −y.
    assertVector(Polarization.linearDegrees(0).resolvedFor(2, 0, 0), 0, 0, 0, 0, 1, 0);
    assertVector(Polarization.linearDegrees(90).resolvedFor(2, 0, 0), 0, 0, -1, 0, 0, 0);
    // Beam along y: u = z, v = y × z = x.
    assertVector(Polarization.linearDegrees(90).resolvedFor(0, 1, 0), 1, 0, 0, 0, 0, 0);
    // Beam along ±z: u = x, v = ±y.
    assertVector(Polarization.linearDegrees(0).resolvedFor(0, 0, 1), 1, 0, 0, 0, 0, 0);
    assertVector(Polarization.linearDegrees(90).resolvedFor(0, 0, 1), 0, 0, 1, 0, 0, 0);
    assertVector(Polarization.linearDegrees(0).resolvedFor(0, 0, -1), 1, 0, 0, 0, 0, 0);
    assertVector(Polarization.linearDegrees(90).resolvedFor(0, 0, -1), 0, 0, -1, 0, 0, 0);
    // Beam at 45° in the xz plane: u = (−1, 0, 1)/√2.
    assertVector(Polarization.linearDegrees(360).resolvedFor(1, 0, 1), -R, 0, 0, 0, R, 0);
    assertVector(
        Polarization.linearDegrees(30).resolvedFor(0, 0, 1), Math.sqrt(0.75), 0, 0.5, 0, 0, 0);
  }

  @Test
  void positiveEllipticityIsPositiveHelicity() {
    // Along +z positive helicity is σ+, along −z it is σ−, up to a phase.
    Polarization right = Polarization.ellipticalDegrees(0, 45);
    assertEquals(1, right.resolvedFor(0, 0, 1).componentsAbout(0, 0, 1).power(1), 1e-15);
    assertEquals(1, right.resolvedFor(0, 0, -1).componentsAbout(0, 0, 1).power(-1), 1e-15);
    assertEquals(
        1,
        Polarization.ellipticalDegrees(17, -45)
            .resolvedFor(0, 0, 1)
            .componentsAbout(0, 0, 1)
            .power(-1),
        1e-15);
    assertVector(right.resolvedFor(0, 0, 1), R, 0, 0, R, 0, 0);
    double c = Math.cos(Math.toRadians(10));
    double s = Math.sin(Math.toRadians(10));
    assertVector(Polarization.ellipticalDegrees(90, 10).resolvedFor(0, 0, 1), 0, -s, c, 0, 0, 0);
  }

  @Property(seed = "601", tries = 200)
  void everyBeamGetsAUnitTransverseVector(
      @ForAll long seed,
      @ForAll @DoubleRange(min = -720, max = 720) double orientation,
      @ForAll @DoubleRange(min = -45, max = 45) double ellipticity) {
    SplittableRandom random = new SplittableRandom(seed);
    double[] k = direction(random);
    PolarizationVector v =
        Polarization.ellipticalDegrees(orientation, ellipticity).resolvedFor(k[0], k[1], k[2]);
    assertEquals(1, norm(v), 1e-14);
    assertEquals(0, k[0] * v.xRe() + k[1] * v.yRe() + k[2] * v.zRe(), 1e-14);
    assertEquals(0, k[0] * v.xIm() + k[1] * v.yIm() + k[2] * v.zIm(), 1e-14);
    // Helicity about the beam: (1 ± sin 2χ)/2.
    SphericalComponents a = v.componentsAbout(k[0], k[1], k[2]);
    double sin = Math.sin(Math.toRadians(2 * ellipticity));
    assertEquals((1 + sin) / 2, a.power(1), 1e-14);
    assertEquals((1 - sin) / 2, a.power(-1), 1e-14);
    assertEquals(0, a.power(0), 1e-28);
    PolarizationVector same = Polarization.ofVector(v).resolvedFor(3 * k[0], 3 * k[1], 3 * k[2]);
    assertVector(same, v.xRe(), v.xIm(), v.yRe(), v.yIm(), v.zRe(), v.zIm());
  }

  private static double[] direction(SplittableRandom random) {
    double z = random.nextDouble(-1, 1);
    double phi = random.nextDouble(-Math.PI, Math.PI);
    double s = Math.sqrt(1 - z * z);
    return new double[] {s * Math.cos(phi), s * Math.sin(phi), z};
  }

  private static PolarizationVector vector(SplittableRandom random) {
    return PolarizationVector.of(
        random.nextDouble(-1, 1),
        random.nextDouble(-1, 1),
        random.nextDouble(-1, 1),
        random.nextDouble(-1, 1),
        random.nextDouble(-1, 1),
        random.nextDouble(-1, 1));
  }

  @Property(seed = "602", tries = 200)
  void componentsAboutAnyAxisAndBackIsTheIdentity(@ForAll long seed) {
    SplittableRandom random = new SplittableRandom(seed);
    PolarizationVector v = vector(random);
    double[] axis = direction(random);
    SphericalComponents a = v.componentsAbout(axis[0], axis[1], axis[2]);
    assertEquals(1, a.power(-1) + a.power(0) + a.power(1), 1e-14);
    PolarizationVector back = PolarizationVector.ofComponentsAbout(a, axis[0], axis[1], axis[2]);
    assertVector(back, v.xRe(), v.xIm(), v.yRe(), v.yIm(), v.zRe(), v.zIm());
  }

  /** The definition: a_q = e_q*·ε with e_±1 = ∓(x ± iy)/√2. */
  @Property(seed = "603", tries = 100)
  void componentsAboutZAreThoseOfTheDefinition(@ForAll long seed) {
    PolarizationVector v = vector(new SplittableRandom(seed));
    SphericalComponents a = v.componentsAbout(0, 0, 1);
    assertEquals(-R * (v.xRe() + v.yIm()), a.re(1), 1e-15);
    assertEquals(-R * (v.xIm() - v.yRe()), a.im(1), 1e-15);
    assertEquals(R * (v.xRe() - v.yIm()), a.re(-1), 1e-15);
    assertEquals(R * (v.xIm() + v.yRe()), a.im(-1), 1e-15);
    assertEquals(v.zRe(), a.re(0), 1e-15);
    assertEquals(v.zIm(), a.im(0), 1e-15);
    // About −z the roles of σ+ and σ− are exchanged.
    SphericalComponents b = v.componentsAbout(0, 0, -1);
    assertEquals(a.power(1), b.power(-1), 1e-15);
    assertEquals(a.power(0), b.power(0), 1e-15);
  }

  @Property(seed = "604", tries = 100)
  void rotatingKeepsTheNormAndCommutesWithRotatingTheAxis(@ForAll long seed) {
    SplittableRandom random = new SplittableRandom(seed);
    PolarizationVector v = vector(random);
    double[] axis = direction(random);
    Rotation r =
        Rotation.ofEulerRadians(
            random.nextDouble(-4, 4), random.nextDouble(0, 3), random.nextDouble(-4, 4));
    PolarizationVector turned = v.rotatedBy(r);
    assertEquals(1, norm(turned), 1e-14);
    // A real vector of components rotates the same way: the axis.
    PolarizationVector turnedAxis =
        PolarizationVector.of(axis[0], 0, axis[1], 0, axis[2], 0).rotatedBy(r);
    assertEquals(0, turnedAxis.xIm(), 1e-15);
    SphericalComponents before = v.componentsAbout(axis[0], axis[1], axis[2]);
    SphericalComponents after =
        turned.componentsAbout(turnedAxis.xRe(), turnedAxis.yRe(), turnedAxis.zRe());
    for (int q = -1; q <= 1; q++) {
      assertEquals(before.power(q), after.power(q), 1e-13);
    }
    PolarizationVector back = turned.rotatedBy(r.inverse());
    assertVector(back, v.xRe(), v.xIm(), v.yRe(), v.yIm(), v.zRe(), v.zIm());
  }

  /**
   * R = Rz(φ) Ry(θ) takes the lab frame to the frame in which components about an axis are given.
   */
  @Property(seed = "605", tries = 100)
  void componentsAboutADirectionAreThoseOfTheVectorTurnedBack(@ForAll long seed) {
    SplittableRandom random = new SplittableRandom(seed);
    PolarizationVector v = vector(random);
    double[] axis = direction(random);
    Rotation back = Rotation.ofDirection(axis[0], axis[1], axis[2]).inverse();
    SphericalComponents a = v.componentsAbout(axis[0], axis[1], axis[2]);
    SphericalComponents b = v.componentsAbout(0, 0, 1).rotatedBy(back);
    for (int q = -1; q <= 1; q++) {
      assertEquals(a.re(q), b.re(q), 1e-14);
      assertEquals(a.im(q), b.im(q), 1e-14);
    }
  }

  @Test
  void aQuarterTurnAboutZTakesXToY() {
    PolarizationVector x = PolarizationVector.of(1, 0, 0, 0, 0, 0);
    assertVector(x.rotatedBy(Rotation.ofEulerRadians(Math.PI / 2, 0, 0)), 0, 0, 1, 0, 0, 0);
    assertVector(x.rotatedBy(Rotation.aboutAxisRadians(0, 1, 0, Math.PI / 2)), 0, 0, 0, 0, -1, 0);
    assertVector(
        PolarizationVector.of(0, 0, 1, 0, 0, 0)
            .rotatedBy(Rotation.aboutAxisRadians(1, 0, 0, Math.PI / 2)),
        0,
        0,
        0,
        0,
        1,
        0);
  }

  @Test
  void purityIsTheIntensityInTheWantedPolarization() {
    PolarizationVector sigma = Polarization.SIGMA_PLUS.resolvedFor(0, 0, 1);
    assertEquals(1, sigma.purity(sigma), 1e-15);
    assertEquals(0, sigma.purity(Polarization.SIGMA_MINUS.resolvedFor(0, 0, 1)), 1e-30);
    assertEquals(0.5, sigma.purity(PolarizationVector.of(1, 0, 0, 0, 0, 0)), 1e-15);
    // A global phase does not matter: i(x + iy) = ix − y.
    assertEquals(1, sigma.purity(PolarizationVector.of(0, 1, -1, 0, 0, 0)), 1e-15);
    PolarizationVector z = PolarizationVector.of(0, 0, 0, 0, 3, 4);
    assertEquals(1, z.purity(PolarizationVector.of(0, 0, 0, 0, 1, 0)), 1e-15);
    assertEquals(0.8, SphericalComponents.of(1, 0, 0, 2, -4, -2).purity(1), 1e-15);
    assertEquals(0.16, SphericalComponents.of(1, 0, 0, 2, -4, -2).purity(0), 1e-15);
    refused(() -> SphericalComponents.of(0, 0, 0, 0, 0, 0).purity(0));
  }

  @Test
  void componentsKnowThreeIndicesOnly() {
    SphericalComponents a = SphericalComponents.of(1, 2, 3, 4, 5, 6);
    assertEquals(1, a.re(-1));
    assertEquals(2, a.im(-1));
    assertEquals(3, a.re(0));
    assertEquals(4, a.im(0));
    assertEquals(5, a.re(1));
    assertEquals(6, a.im(1));
    assertEquals(61, a.power(1));
    assertEquals(
        "a(-1) = 1.00000+2.00000i, a(0) = 3.00000+4.00000i, a(+1) = 5.00000+6.00000i",
        a.toString());
    String message = refused(() -> a.re(2)).getMessage();
    assertTrue(message.contains("q = 2"), message);
    refused(() -> a.im(-2));
    refused(() -> a.power(3));
    refused(() -> a.purity(3));
  }

  @ParameterizedTest
  @ValueSource(doubles = {Double.NaN, Double.POSITIVE_INFINITY, Double.NEGATIVE_INFINITY})
  void numbersThatAreNotFiniteAreRefused(double bad) {
    refused(() -> Polarization.linearDegrees(bad));
    refused(() -> Polarization.ellipticalDegrees(bad, 0));
    refused(() -> Polarization.ellipticalDegrees(0, bad));
    refused(() -> PolarizationVector.of(bad, 0, 1, 0, 0, 0));
    refused(() -> PolarizationVector.of(0, bad, 1, 0, 0, 0));
    refused(() -> PolarizationVector.of(0, 0, bad, 0, 1, 0));
    refused(() -> PolarizationVector.of(0, 0, 0, bad, 1, 0));
    refused(() -> PolarizationVector.of(0, 0, 1, 0, bad, 0));
    refused(() -> PolarizationVector.of(0, 0, 1, 0, 0, bad));
    refused(() -> Polarization.linearDegrees(0).resolvedFor(bad, 0, 1));
    refused(() -> Polarization.linearDegrees(0).resolvedFor(0, bad, 1));
    refused(() -> Polarization.linearDegrees(0).resolvedFor(0, 1, bad));
    PolarizationVector x = PolarizationVector.of(1, 0, 0, 0, 0, 0);
    refused(() -> x.componentsAbout(0, 1, bad));
    for (int i = 0; i < 6; i++) {
      double[] a = new double[6];
      a[i] = bad;
      refused(() -> SphericalComponents.of(a[0], a[1], a[2], a[3], a[4], a[5]));
    }
  }

  @Test
  void vanishingVectorsAndAnglesOutOfRangeAreRefused() {
    refused(() -> PolarizationVector.of(0, 0, 0, 0, 0, 0));
    String beam = refused(() -> Polarization.PI.resolvedFor(0, 0, 0)).getMessage();
    assertTrue(beam.contains("beam direction must be finite and not zero"), beam);
    String message = refused(() -> Polarization.ellipticalDegrees(0, 45.001)).getMessage();
    assertTrue(message.contains("45.001"), message);
    refused(() -> Polarization.ellipticalDegrees(0, -45.001));
  }

  @Test
  void vectorsAreNormalizedWhateverTheirScale() {
    assertVector(PolarizationVector.of(3e300, 0, 0, 4e300, 0, 0), 0.6, 0, 0, 0.8, 0, 0);
    assertVector(PolarizationVector.of(0, 3e-300, 0, 0, 0, 4e-300), 0, 0.6, 0, 0, 0, 0.8);
    assertVector(PolarizationVector.of(0, 0, 0, 0, 5e-324, 0), 0, 0, 0, 0, 1, 0);
    assertVector(PolarizationVector.of(0, 0, 1.5, 0, 0, 0), 0, 0, 1, 0, 0, 0);
    assertVector(PolarizationVector.of(0.5, 0, 0, 0, 0, 0), 1, 0, 0, 0, 0, 0);
  }

  @Test
  void aVectorThatIsNotTransverseIsRefusedWithItsComponentAlongTheBeam() {
    Polarization p = Polarization.ofVector(0.6, 0, 0, 0, 0, 0.8);
    String message = refused(() -> p.resolvedFor(0, 0, 1)).getMessage();
    assertTrue(message.contains("is not transverse to a beam along (0"), message);
    assertTrue(message.contains("0.8"), message);
    refused(() -> p.resolvedFor(1, 0, 0));
    assertVector(p.resolvedFor(0, -7, 0), 0.6, 0, 0, 0, 0, 0.8);
    refused(() -> Polarization.ofVector(0, 0, 0.6, 0.8, 0, 0).resolvedFor(0, 1, 0));
  }

  @ParameterizedTest
  @ValueSource(
      strings = {
        "sigma+",
        "sigma-",
        "pi",
        "linear 30.0 deg",
        "linear -1.0E-10 deg",
        "elliptical -12.5 deg 45.0 deg",
        "vector (0.6, 0.0) (0.0, -0.8) (0.0, 0.0)"
      })
  void textAndBackIsTheIdentity(String text) {
    Polarization p = Polarization.parse(text);
    assertEquals(text, p.toString());
    assertEquals(p, Polarization.parse(p.toString()));
    assertEquals(p.hashCode(), Polarization.parse(p.toString()).hashCode());
  }

  @Property(seed = "606", tries = 100)
  void anyVectorSurvivesTextAndBack(@ForAll long seed) {
    Polarization p = Polarization.ofVector(vector(new SplittableRandom(seed)));
    assertEquals(p, Polarization.parse(p.toString()));
  }

  @ParameterizedTest
  @CsvSource({
    "σ+, sigma+",
    "σ−, sigma-",
    "Sigma-, sigma-",
    "π, pi",
    "PI, pi",
    "linear 30°, linear 30.0 deg",
    "' Linear  30 deg ', linear 30.0 deg",
    "linear .5 deg, linear 0.5 deg",
    "linear +2.e1deg, linear 20.0 deg",
    "elliptical 10° -20°, elliptical 10.0 deg -20.0 deg",
    "linear -0 deg, linear 0.0 deg"
  })
  void otherSpellingsAreUnderstood(String text, String canonical) {
    assertEquals(Polarization.parse(canonical), Polarization.parse(text));
    assertEquals(canonical, Polarization.parse(text).toString());
  }

  @ParameterizedTest
  @NullSource
  @ValueSource(
      strings = {
        "",
        "sigma",
        "circular",
        "linear",
        "linear 30",
        "linear x deg",
        "linear 30 rad",
        "elliptical 30 deg",
        "vector (1, 0)",
        "linear NaN deg",
        "vector 1 0 0"
      })
  void otherTextsAreRefusedWithTheAllowedOnes(String text) {
    String message = refused(() -> Polarization.parse(text)).getMessage();
    assertTrue(message.contains("unknown polarization"), message);
    assertTrue(message.contains(String.valueOf(text)), message);
    assertTrue(message.contains("sigma+, sigma-, pi, linear 30 deg"), message);
  }

  @Test
  void equalityLooksAtKindAndNumbers() {
    assertSame(Polarization.PI, Polarization.parse("pi"));
    assertNotEquals(Polarization.SIGMA_PLUS, Polarization.SIGMA_MINUS);
    assertNotEquals(Polarization.linearDegrees(1), Polarization.linearDegrees(2));
    assertNotEquals(Polarization.linearDegrees(1), new Object());
    assertNotEquals(
        Polarization.linearDegrees(1).hashCode(), Polarization.linearDegrees(2).hashCode());
  }
}
