package org.toprung.budget.bench;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Arrays;
import java.util.Random;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.constraints.DoubleRange;
import net.jqwik.api.constraints.IntRange;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class SpreadTest {

  /** Moments of the normal distribution: (2k − 1)!! σ^2k; exact for the rule to degree 41. */
  @Property(seed = "21", tries = 60)
  void hasTheMomentsOfTheNormalDistribution(
      @ForAll @DoubleRange(min = 0.1, max = 10) double rms,
      @ForAll @IntRange(min = 0, max = 20) int half) {
    double expected = 1;
    for (int k = 1; k <= half; k++) {
      expected *= (2 * k - 1) * rms * rms;
    }
    Spread spread = Spread.gaussian(rms);
    assertEquals(expected, spread.average(x -> Math.pow(x, 2 * half)), 1e-11 * expected);
    double scale = Math.pow(rms, 2 * half + 1) * (expected / Math.pow(rms, 2 * half) + 1);
    assertEquals(0, spread.average(x -> Math.pow(x, 2 * half + 1)), 1e-10 * scale * (half + 1));
  }

  /** ⟨cos x⟩ = exp(−σ²/2), the characteristic function of the normal distribution. */
  @Property(seed = "22", tries = 40)
  void averagesACosineLikeTheCharacteristicFunction(
      @ForAll @DoubleRange(min = 0, max = 1.5) double rms) {
    assertEquals(Math.exp(-0.5 * rms * rms), Spread.gaussian(rms).average(Math::cos), 1e-12);
  }

  @Property(seed = "23", tries = 60)
  void scalesItsDeviations(
      @ForAll @DoubleRange(min = -9, max = 9) double one,
      @ForAll @DoubleRange(min = -9, max = 9) double two,
      @ForAll @DoubleRange(min = -3, max = 3) double factor) {
    double[] values = {one, two, 0.5};
    Spread samples = Spread.of(values);
    double square = Arrays.stream(values).map(x -> x * x).average().orElseThrow();
    assertEquals(Math.sqrt(square), samples.rms(), 1e-13 * (1 + samples.rms()));
    assertEquals(Math.abs(factor) * samples.rms(), samples.scaled(factor).rms(), 1e-12);
    assertEquals(
        samples.average(x -> Math.sin(factor * x)),
        samples.scaled(factor).average(Math::sin),
        1e-13);
    Spread gaussian = Spread.gaussian(samples.rms());
    assertEquals(Math.abs(factor) * gaussian.rms(), gaussian.scaled(factor).rms(), 1e-12);
  }

  @Test
  void averagesOverEverySample() {
    Spread spread = Spread.of(1, 2, 6);
    assertFalse(spread.isGaussian());
    assertEquals(3, spread.average(x -> x), 1e-15);
    assertEquals(Math.sqrt(41.0 / 3), spread.rms(), 1e-15);
    assertArrayEquals(new double[] {1, 2, 6}, spread.samples());
    assertTrue(Spread.gaussian(2).isGaussian());
    assertEquals(0, Spread.gaussian(2).samples().length);
  }

  /** 40 000 draws: the mean within 4 σ/√n, the variance within 4 √2 σ²/√n. */
  @Test
  void drawsFromItsDistribution() {
    int n = 40_000;
    Random random = new Random(5);
    for (Spread spread : new Spread[] {Spread.gaussian(3), Spread.of(-3, 3, 3, -3)}) {
      double sum = 0;
      double square = 0;
      for (int i = 0; i < n; i++) {
        double x = spread.draw(random);
        sum += x;
        square += x * x;
      }
      assertEquals(0, sum / n, 4 * 3 / Math.sqrt(n));
      assertEquals(9, square / n, 4 * Math.sqrt(2) * 9 / Math.sqrt(n));
    }
    Spread skewed = Spread.of(0, 0, 0, 8);
    long eights = 0;
    for (int i = 0; i < n; i++) {
      eights += skewed.draw(random) == 8 ? 1 : 0;
    }
    assertEquals(0.25, eights / (double) n, 4 * Math.sqrt(0.25 * 0.75 / n));
  }

  @Test
  void keepsItsSamplesToItself() {
    double[] values = {1, 2};
    Spread spread = Spread.of(values);
    values[0] = 100;
    spread.samples()[1] = 100;
    assertArrayEquals(new double[] {1, 2}, spread.samples());
  }

  @Test
  void knowsTheSizeOfHugeAndTinySamples() {
    assertEquals(1e200, Spread.of(1e200, -1e200).rms(), 1e186);
    assertEquals(1e-200, Spread.of(1e-200, -1e-200).rms(), 1e-214);
    assertEquals(0, Spread.of(0, 0).rms());
  }

  @ParameterizedTest
  @ValueSource(doubles = {Double.NaN, Double.POSITIVE_INFINITY, Double.NEGATIVE_INFINITY})
  void refusesWhatIsNotFinite(double value) {
    assertThrows(IllegalArgumentException.class, () -> Spread.gaussian(value));
    assertThrows(IllegalArgumentException.class, () -> Spread.of(1, value));
    assertThrows(IllegalArgumentException.class, () -> Spread.of(1).scaled(value));
    assertThrows(IllegalArgumentException.class, () -> Spread.gaussian(1).scaled(value));
  }

  @Test
  void refusesNoSamples() {
    assertThrows(IllegalArgumentException.class, Spread::of);
  }
}
