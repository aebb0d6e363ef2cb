package org.toprung.angular;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.math.BigInteger;
import java.math.MathContext;
import java.util.SplittableRandom;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.constraints.DoubleRange;
import net.jqwik.api.constraints.IntRange;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

class RotationTest {

  private static HalfInteger h(int doubled) {
    return HalfInteger.ofHalves(doubled);
  }

  /** Validation: explicit half-angle forms, Varshalovich et al. tables 4.3 to 4.6. */
  @Property(seed = "401", tries = 100)
  void smallDIsTheExplicitHalfAngleForm(@ForAll @DoubleRange(min = -7, max = 7) double b) {
    double c = Math.cos(b / 2);
    double s = Math.sin(b / 2);
    double e = 1e-15;
    assertEquals(c, Rotation.smallDDoubled(1, 1, 1, b), e);
    assertEquals(-s, Rotation.smallDDoubled(1, 1, -1, b), e);
    assertEquals(s, Rotation.smallDDoubled(1, -1, 1, b), e);
    assertEquals(c, Rotation.smallDDoubled(1, -1, -1, b), e);
    assertEquals(c * c, Rotation.smallDDoubled(2, 2, 2, b), e);
    assertEquals(-Math.sqrt(2) * c * s, Rotation.smallDDoubled(2, 2, 0, b), e);
    assertEquals(s * s, Rotation.smallDDoubled(2, 2, -2, b), e);
    assertEquals(Math.sqrt(2) * c * s, Rotation.smallDDoubled(2, 0, 2, b), e);
    assertEquals(Math.cos(b), Rotation.smallDDoubled(2, 0, 0, b), e);
    assertEquals(c * (3 * c * c - 2), Rotation.smallDDoubled(3, 1, 1, b), 2e-15);
    assertEquals(s * (3 * s * s - 2), Rotation.smallDDoubled(3, 1, -1, b), 2e-15);
    assertEquals(-Math.sqrt(3) * c * c * s, Rotation.smallDDoubled(3, 3, 1, b), e);
    assertEquals(Math.sqrt(3) * c * s * s, Rotation.smallDDoubled(3, 3, -1, b), e);
    assertEquals(-s * s * s, Rotation.smallDDoubled(3, 3, -3, b), e);
    assertEquals(
        (3 * Math.cos(b) * Math.cos(b) - 1) / 2, Rotation.smallDDoubled(4, 0, 0, b), 2e-15);
  }

  /** Validation: Wigner's sum, Varshalovich et al. 4.3.1 (2), with 250 digits. */
  @ParameterizedTest
  @CsvSource({
    "20, 4, -6, 0.3",
    "41, 1, 3, 2.9",
    "120, 0, 0, 1.2",
    "120, 20, 100, 0.9",
    "200, 0, 2, 3.1",
    "200, -40, 10, 1.5707",
    "201, 31, -1, 0.001",
    "400, 100, 100, 1.0",
    "400, -398, 396, 2.5",
    "1000, 0, 0, 1.0",
    "1000, 200, -300, 1.7",
    "1000, 600, 0, 0.4"
  })
  void smallDIsWignersSum(int tj, int tmPrime, int tm, double beta) {
    double expected = wignerSum(tj, tmPrime, tm, beta);
    double value = Rotation.smallDDoubled(tj, tmPrime, tm, beta);
    assertEquals(expected, value, 1e-12);
    assertTrue(expected != 0);
  }

  /** Far out in the tail only a relative comparison says anything. */
  @Test
  void smallDKeepsRelativeAccuracyInItsTails() {
    double expected = wignerSum(1000, 900, -700, 0.7);
    assertTrue(Math.abs(expected) < 1e-150 && expected != 0);
    assertEquals(
        expected, Rotation.smallDDoubled(1000, 900, -700, 0.7), 1e-11 * Math.abs(expected));
    // Polynomials above 2^500, which have to be scaled on the way.
    double scaled = wignerSum(1000, 300, -300, 0.05);
    assertTrue(scaled != 0);
    assertEquals(scaled, Rotation.smallDDoubled(1000, 300, -300, 0.05), 1e-11 * Math.abs(scaled));
    double steep = wignerSum(1000, 1000, -1000, 1.2);
    assertEquals(steep, Rotation.smallDDoubled(1000, 1000, -1000, 1.2), 1e-11 * Math.abs(steep));
  }

  private static double wignerSum(int tj, int tmPrime, int tm, double beta) {
    MathContext digits = new MathContext(250);
    BigDecimal c = new BigDecimal(Math.cos(beta / 2));
    BigDecimal s = BigDecimal.ONE.subtract(c.multiply(c)).sqrt(digits);
    if (Math.sin(beta / 2) < 0.5) {
      s = new BigDecimal(Math.sin(beta / 2));
      c = BigDecimal.ONE.subtract(s.multiply(s)).sqrt(digits);
    }
    int jpm = (tj + tm) / 2;
    int jmm = (tj - tm) / 2;
    int jpmp = (tj + tmPrime) / 2;
    int jmmp = (tj - tmPrime) / 2;
    int shift = (tmPrime - tm) / 2;
    BigDecimal sum = BigDecimal.ZERO;
    for (int k = Math.max(0, -shift); k <= Math.min(jpm, jmmp); k++) {
      BigDecimal term =
          new BigDecimal(binomial(jpm, k).multiply(binomial(jmm, jmmp - k)))
              .multiply(c.pow(tj - shift - 2 * k, digits))
              .multiply(s.pow(shift + 2 * k, digits));
      sum = (k + shift & 1) == 0 ? sum.add(term) : sum.subtract(term);
    }
    BigDecimal ratio =
        new BigDecimal(Factorials.exact(jpmp).multiply(Factorials.exact(jmmp)))
            .divide(new BigDecimal(Factorials.exact(jpm).multiply(Factorials.exact(jmm))), digits);
    return sum.multiply(ratio.sqrt(digits)).doubleValue();
  }

  private static BigInteger binomial(int n, int k) {
    return Factorials.exact(n).divide(Factorials.exact(k).multiply(Factorials.exact(n - k)));
  }

  @Property(seed = "402", tries = 60)
  void smallDIsOrthogonal(
      @ForAll @IntRange(min = 0, max = 200) int tj,
      @ForAll long seed,
      @ForAll @DoubleRange(min = -10, max = 10) double beta) {
    SplittableRandom random = new SplittableRandom(seed);
    int tm = RandomArguments.projection(random, tj);
    int other = RandomArguments.projection(random, tj);
    double sum = 0;
    for (int t = -tj; t <= tj; t += 2) {
      sum += Rotation.smallDDoubled(tj, t, tm, beta) * Rotation.smallDDoubled(tj, t, other, beta);
    }
    assertEquals(tm == other ? 1 : 0, sum, 1e-12);
  }

  /** Varshalovich et al. 4.4 (1) to (3). */
  @Property(seed = "403", tries = 200)
  void smallDSymmetries(
      @ForAll @IntRange(min = 0, max = 200) int tj,
      @ForAll long seed,
      @ForAll @DoubleRange(min = 0, max = 3.14) double beta) {
    SplittableRandom random = new SplittableRandom(seed);
    int a = RandomArguments.projection(random, tj);
    int b = RandomArguments.projection(random, tj);
    double d = Rotation.smallDDoubled(tj, a, b, beta);
    int sign = ((a - b) / 2 & 1) == 0 ? 1 : -1;
    assertEquals(sign * d, Rotation.smallDDoubled(tj, b, a, beta), 1e-13);
    assertEquals(d, Rotation.smallDDoubled(tj, -b, -a, beta), 1e-13);
    assertEquals(sign * d, Rotation.smallDDoubled(tj, a, b, -beta), 1e-13);
    int back = ((tj - b) / 2 & 1) == 0 ? 1 : -1;
    assertEquals(back * d, Rotation.smallDDoubled(tj, -a, b, Math.PI - beta), 1e-12);
  }

  @Property(seed = "404", tries = 100)
  void elementsComposeLikeRotations(
      @ForAll @IntRange(min = 0, max = 200) int tj, @ForAll long seed) {
    SplittableRandom random = new SplittableRandom(seed);
    Rotation first = random(random);
    Rotation second = random(random);
    int a = RandomArguments.projection(random, tj);
    int b = RandomArguments.projection(random, tj);
    double re = 0;
    double im = 0;
    for (int t = -tj; t <= tj; t += 2) {
      Amplitude x = second.element(h(tj), h(a), h(t));
      Amplitude y = first.element(h(tj), h(t), h(b));
      re += x.re() * y.re() - x.im() * y.im();
      im += x.re() * y.im() + x.im() * y.re();
    }
    Amplitude product = second.after(first).element(h(tj), h(a), h(b));
    assertEquals(re, product.re(), 2e-12);
    assertEquals(im, product.im(), 2e-12);
  }

  private static Rotation random(SplittableRandom random) {
    return Rotation.ofEulerRadians(
        random.nextDouble(-10, 10), random.nextDouble(-10, 10), random.nextDouble(-10, 10));
  }

  @Property(seed = "405", tries = 100)
  void theInverseHasTheAdjointElements(
      @ForAll @IntRange(min = 0, max = 60) int tj, @ForAll long seed) {
    SplittableRandom random = new SplittableRandom(seed);
    Rotation r = random(random);
    int a = RandomArguments.projection(random, tj);
    int b = RandomArguments.projection(random, tj);
    Amplitude x = r.element(h(tj), h(a), h(b));
    Amplitude y = r.inverse().element(h(tj), h(b), h(a));
    assertEquals(x.re(), y.re(), 1e-13);
    assertEquals(x.im(), -y.im(), 1e-13);
    assertEquals(x.re() * x.re() + x.im() * x.im(), y.squaredModulus(), 1e-13);
    Amplitude one = r.inverse().after(r).element(h(tj), h(a), h(a));
    assertEquals(1, one.re(), 1e-12);
  }

  @Property(seed = "406", tries = 200)
  void eulerAnglesGiveTheRotationBack(@ForAll long seed) {
    Rotation r = random(new SplittableRandom(seed));
    Rotation back = Rotation.ofEulerRadians(r.alphaRadians(), r.betaRadians(), r.gammaRadians());
    assertTrue(r.betaRadians() >= 0 && r.betaRadians() <= Math.PI);
    for (int a = -1; a <= 1; a += 2) {
      for (int b = -1; b <= 1; b += 2) {
        Amplitude x = r.element(HalfInteger.HALF, h(a), h(b));
        Amplitude y = back.element(HalfInteger.HALF, h(a), h(b));
        assertEquals(x.re(), y.re(), 1e-15);
        assertEquals(x.im(), y.im(), 1e-15);
      }
    }
  }

  /** D = e^(−im′α) d(β) e^(−imγ), the definition. */
  @Property(seed = "407", tries = 200)
  void elementIsSmallDWithItsTwoPhases(
      @ForAll @DoubleRange(min = -4, max = 4) double alpha,
      @ForAll @DoubleRange(min = 0, max = 3.14) double beta,
      @ForAll @DoubleRange(min = -4, max = 4) double gamma,
      @ForAll @IntRange(min = 0, max = 9) int tj,
      @ForAll long seed) {
    SplittableRandom random = new SplittableRandom(seed);
    int a = RandomArguments.projection(random, tj);
    int b = RandomArguments.projection(random, tj);
    double d = Rotation.smallD(h(tj), h(a), h(b), beta);
    double angle = a / 2.0 * alpha + b / 2.0 * gamma;
    Amplitude x = Rotation.ofEulerRadians(alpha, beta, gamma).element(h(tj), h(a), h(b));
    assertEquals(d * Math.cos(angle), x.re(), 1e-13);
    assertEquals(-d * Math.sin(angle), x.im(), 1e-13);
  }

  @Test
  void aFullTurnChangesTheSignOfHalfIntegerStatesOnly() {
    Rotation turn = Rotation.aboutAxisRadians(1, 2, -3, 2 * Math.PI);
    assertEquals(-1, turn.element(h(3), h(1), h(1)).re(), 1e-15);
    assertEquals(1, turn.element(h(4), h(2), h(2)).re(), 1e-15);
    assertEquals(1, Rotation.IDENTITY.element(h(3), h(1), h(1)).re());
    assertEquals(0, Rotation.IDENTITY.element(h(3), h(1), h(-1)).re(), 0.0);
    assertEquals(0, Rotation.IDENTITY.alphaRadians());
    assertEquals(0, Rotation.IDENTITY.gammaRadians());
  }

  @Test
  void turnsAboutLabAxesAreTheEulerTurns() {
    Rotation aboutZ = Rotation.aboutAxisRadians(0, 0, 5, 0.7);
    assertEquals(0.7, aboutZ.alphaRadians() + aboutZ.gammaRadians(), 1e-15);
    assertEquals(0, aboutZ.betaRadians(), 1e-15);
    Rotation aboutY = Rotation.aboutAxisRadians(0, 1e-300, 0, 0.7);
    assertEquals(0.7, aboutY.betaRadians(), 1e-15);
    assertEquals(0, aboutY.alphaRadians(), 1e-15);
    // About x: Rz(−π/2) Ry(θ) Rz(π/2)
    Rotation aboutX = Rotation.aboutAxisRadians(2, 0, 0, 0.7);
    assertEquals(0.7, aboutX.betaRadians(), 1e-15);
    assertEquals(-Math.PI / 2, aboutX.alphaRadians(), 1e-15);
    assertEquals(Math.PI / 2, aboutX.gammaRadians(), 1e-15);
  }

  @Test
  void aDirectionIsWhereTheZAxisGoes() {
    Rotation r = Rotation.ofDirection(1, 1, Math.sqrt(2));
    assertEquals(Math.PI / 4, r.alphaRadians(), 1e-15);
    assertEquals(Math.PI / 4, r.betaRadians(), 1e-15);
    assertEquals(0, r.gammaRadians(), 1e-15);
    Rotation down = Rotation.ofDirection(0, 0, -3);
    assertEquals(Math.PI, down.betaRadians(), 1e-15);
    assertEquals(0, Rotation.ofDirection(0, 0, 2).betaRadians());
  }

  @ParameterizedTest
  @ValueSource(doubles = {Double.NaN, Double.POSITIVE_INFINITY, Double.NEGATIVE_INFINITY})
  void anglesAndDirectionsThatAreNotFiniteAreRefused(double bad) {
    IllegalArgumentException e =
        assertThrows(IllegalArgumentException.class, () -> Rotation.ofEulerRadians(bad, 0, 0));
    assertTrue(e.getMessage().contains(String.valueOf(bad)));
    assertThrows(IllegalArgumentException.class, () -> Rotation.ofEulerRadians(0, bad, 0));
    assertThrows(IllegalArgumentException.class, () -> Rotation.ofEulerRadians(0, 0, bad));
    assertThrows(IllegalArgumentException.class, () -> Rotation.aboutAxisRadians(0, 0, 1, bad));
    assertThrows(IllegalArgumentException.class, () -> Rotation.aboutAxisRadians(bad, 0, 1, 1));
    assertThrows(IllegalArgumentException.class, () -> Rotation.ofDirection(0, bad, 1));
    assertThrows(IllegalArgumentException.class, () -> Rotation.ofDirection(0, 1, bad));
    assertThrows(IllegalArgumentException.class, () -> Rotation.smallDDoubled(2, 0, 0, bad));
  }

  @Test
  void impossibleStatesAndAxesAreRefused() {
    assertThrows(IllegalArgumentException.class, () -> Rotation.ofDirection(0, 0, 0));
    IllegalArgumentException e =
        assertThrows(IllegalArgumentException.class, () -> Rotation.smallDDoubled(2, 4, 0, 1));
    assertTrue(e.getMessage().contains("2 is no projection of j = 1"), e.getMessage());
    assertThrows(IllegalArgumentException.class, () -> Rotation.smallDDoubled(2, 0, 1, 1));
    assertThrows(IllegalArgumentException.class, () -> Rotation.smallDDoubled(-2, 0, 0, 1));
    assertThrows(
        IllegalArgumentException.class,
        () -> Rotation.smallDDoubled(Wigner.MAX_DOUBLED_J + 2, 0, 0, 1));
    assertThrows(IllegalArgumentException.class, () -> Rotation.IDENTITY.element(h(2), h(1), h(0)));
  }

  /** A real vector is a polarization of real components, and turns like one. */
  @Property(seed = "408", tries = 100)
  void realVectorsTurnLikePolarizations(
      @ForAll @DoubleRange(min = -3, max = 3) double alpha,
      @ForAll @DoubleRange(min = 0, max = 3) double beta,
      @ForAll @DoubleRange(min = -3, max = 3) double gamma,
      @ForAll @DoubleRange(min = -1, max = 1) double x) {
    Rotation r = Rotation.ofEulerRadians(alpha, beta, gamma);
    double norm = Math.sqrt(x * x + 0.41);
    PolarizationVector e = PolarizationVector.of(x, 0, 0.4, 0, 0.5, 0).rotatedBy(r);
    double[] v = r.appliedTo(x, 0.4, 0.5);
    assertEquals(e.xRe() * norm, v[0], 1e-14);
    assertEquals(e.yRe() * norm, v[1], 1e-14);
    assertEquals(e.zRe() * norm, v[2], 1e-14);
  }
}
