package org.toprung.budget.bench;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.UncheckedIOException;
import java.nio.file.Files;
import java.nio.file.Path;
import net.jqwik.api.Arbitraries;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.Combinators;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import net.jqwik.api.constraints.DoubleRange;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

class NoiseDensityTest {

  private static NoiseDensity density(double... pairs) {
    double[] f = new double[pairs.length / 2];
    double[] s = new double[pairs.length / 2];
    for (int i = 0; i < f.length; i++) {
      f[i] = pairs[2 * i];
      s[i] = pairs[2 * i + 1];
    }
    return NoiseDensity.of(f, s);
  }

  /** Tables whose entries span decades, some of them zero. */
  @Provide
  Arbitrary<NoiseDensity> tables() {
    Arbitrary<Double> step = Arbitraries.doubles().between(0.05, 2).ofScale(3);
    Arbitrary<Double> value = Arbitraries.doubles().between(-4, 4).ofScale(3);
    return Combinators.combine(
            step.list().ofSize(6), value.list().ofSize(6), Arbitraries.integers().between(0, 11))
        .as(
            (steps, values, zero) -> {
              double[] f = new double[6];
              double[] s = new double[6];
              double log = 0;
              for (int i = 0; i < 6; i++) {
                log += steps.get(i);
                f[i] = Math.pow(10, log);
                s[i] = i == zero ? 0 : Math.pow(10, values.get(i));
              }
              return NoiseDensity.of(f, s);
            });
  }

  /** Simpson's rule in ln f, piece by piece. */
  private static double quadrature(NoiseDensity density, double from, double to) {
    double sum = 0;
    double[] f = density.frequencies();
    int n = 2000;
    for (int i = 0; i + 1 < f.length; i++) {
      double a = Math.log(Math.max(from, f[i]));
      double b = Math.log(Math.min(to, f[i + 1]));
      for (int j = 0; a < b && j <= n; j++) {
        double weight = j == 0 || j == n ? 1 : j % 2 == 1 ? 4 : 2;
        // clamped, as the rounded ends may lie just outside
        double x =
            Math.min(
                density.highestHertz(),
                Math.max(density.lowestHertz(), Math.exp(a + j * (b - a) / n)));
        sum += weight * x * density.at(x) * (b - a) / (3 * n);
      }
    }
    return sum;
  }

  @Property(seed = "31", tries = 60)
  void hasThePowerThatQuadratureFinds(
      @ForAll("tables") NoiseDensity density,
      @ForAll @DoubleRange(min = 0, max = 12) double one,
      @ForAll @DoubleRange(min = 0, max = 12) double other) {
    double from = Math.pow(10, Math.min(one, other));
    double to = Math.pow(10, Math.max(one, other));
    double expected = quadrature(density, from, to);
    assertEquals(expected, density.power(from, to), 1e-7 * expected + 1e-300);
  }

  @Property(seed = "32", tries = 60)
  void addsItsPowerPieceByPiece(
      @ForAll("tables") NoiseDensity density, @ForAll @DoubleRange(min = 0, max = 12) double cut) {
    double at = Math.pow(10, cut);
    double whole = density.rms() * density.rms();
    assertEquals(whole, density.power(0, at) + density.power(at, 1e20), 1e-12 * whole);
  }

  @Property(seed = "33", tries = 60)
  void multipliesItsVariance(
      @ForAll("tables") NoiseDensity density,
      @ForAll @DoubleRange(min = 0, max = 1e6) double factor,
      @ForAll @DoubleRange(min = 0, max = 12) double decade) {
    NoiseDensity scaled = density.scaled(factor);
    double f = Math.pow(10, decade);
    assertEquals(factor * density.at(f), scaled.at(f), 1e-12 * (factor * density.at(f)));
    assertEquals(Math.sqrt(factor) * density.rms(), scaled.rms(), 1e-12 * scaled.rms());
  }

  @Property(seed = "34", tries = 60)
  void isAStraightLineOnLogarithmicAxes(
      @ForAll @DoubleRange(min = -3, max = 3) double slope,
      @ForAll @DoubleRange(min = 0, max = 4) double decade) {
    NoiseDensity density = density(1, 7, 1e4, 7 * Math.pow(1e4, slope));
    double f = Math.pow(10, decade);
    assertEquals(7 * Math.pow(f, slope), density.at(f), 1e-12 * density.at(f));
  }

  @Test
  void isZeroOutsideTheTableAndExactInIt() {
    NoiseDensity density = density(10, 3, 20, 7, 30, 0, 40, 0);
    assertEquals(0, density.at(9.999));
    assertEquals(3, density.at(10));
    assertEquals(7, density.at(20));
    assertEquals(3.5, density.at(25), 1e-14);
    assertEquals(0, density.at(30));
    assertEquals(0, density.at(35));
    assertEquals(0, density.at(41));
    assertEquals(0, density.at(Double.NaN));
    assertEquals(35, density.power(20, 100), 1e-12);
    assertEquals(0, density.power(30, 100));
  }

  /** ∫ c/f df = c ln(b/a), where the power law has no power to integrate. */
  @Test
  void integratesFlickerNoise() {
    assertEquals(5 * Math.log(1e6), density(1, 5, 1e6, 5e-6).power(0, 1e9), 1e-12);
    assertEquals(5 * Math.log(1e3), density(1, 5, 1e6, 5e-6).power(10, 1e4), 1e-12);
    assertEquals(2 * 90, density(10, 2, 100, 2).power(0, 1e9), 1e-12);
  }

  /** With S = f^310/10³⁰⁰ the integral is 10¹¹/311 to all digits. */
  @Test
  void staysFiniteWhereTheTableIsSteep() {
    NoiseDensity density = density(1, 1e-300, 10, 1e10);
    assertEquals(1e-145, density.at(Math.sqrt(10)), 1e-156);
    assertEquals(1e11 / 311, density.power(1, 10), 1e-1);
    NoiseDensity falling = density(1, 1e300, 1e6, 1e-300);
    assertEquals(1, falling.at(1e3), 1e-10);
    assertEquals(1e300 / 99, falling.power(0, 1e7), 1e288);
  }

  @ParameterizedTest
  @ValueSource(
      strings = {
        "1,2\n10,3",
        "# f, S\n1\t2\n\n10   3\n",
        "\uFEFF1;2\r\n10 ; 3\r\n",
        "  1e0 , 2.\n# comment\n+10,.3e1"
      })
  void readsTablesOfTwoColumns(String text) {
    NoiseDensity density = NoiseDensity.parse(text, "noise.csv");
    assertArrayEquals(new double[] {1, 10}, density.frequencies());
    assertEquals(2, density.at(1));
    assertEquals(3, density.at(10));
  }

  @ParameterizedTest
  @CsvSource(
      delimiter = '|',
      textBlock =
          """
          1,2\\n10,3\\n10,4     | line 3 | rising
          1,2\\n# x\\n0.5,3     | line 3 | rising
          1,2\\n10,-3          | line 2 | at least 0
          0,2\\n10,3           | line 1 | positive
          -1,2\\n10,3          | line 1 | positive
          1,2\\n10,1e999       | line 2 | finite
          1e999,2\\n10,3       | line 1 | finite
          f,S\\n1,2            | line 1 | two numbers
          1,2\\n10,NaN         | line 2 | two numbers
          1,2\\n10d,3          | line 2 | two numbers
          1,2\\n0x1p3,3        | line 2 | two numbers
          1,2\\n10,3,4         | line 2 | two numbers
          1,2\\n10             | line 2 | two numbers
          1,2                 | 1 entries | at least 2
          # nothing           | 0 entries | at least 2
          """)
  void refusesTablesThatAreNoDensityAndNamesTheLine(String text, String where, String allowed) {
    String message =
        assertThrows(
                IllegalArgumentException.class,
                () -> NoiseDensity.parse(text.replace("\\n", "\n"), "noise.csv"))
            .getMessage();
    assertTrue(message.startsWith("noise.csv"), message);
    assertTrue(message.contains(where) && message.contains(allowed), message);
  }

  @Test
  void quotesNoLineAtLength() {
    String message =
        assertThrows(
                IllegalArgumentException.class,
                () -> NoiseDensity.parse("x".repeat(10_000), "noise.csv"))
            .getMessage();
    assertTrue(message.length() < 200, message);
  }

  @Test
  void refusesArraysThatAreNoDensity() {
    refused("entry 2", 2, 1, 1, 1);
    refused("entry 2", 1, 1, 2, Double.NaN);
    refused("entry 1", Double.NaN, 1, 2, 1);
    refused("at least 2", 1, 1);
    assertThrows(
        IllegalArgumentException.class,
        () -> NoiseDensity.of(new double[] {1, 2}, new double[] {1}));
  }

  private static void refused(String part, double... pairs) {
    String message =
        assertThrows(IllegalArgumentException.class, () -> density(pairs)).getMessage();
    assertTrue(message.contains(part), message);
  }

  @Test
  void refusesFactorsAndBandsThatMakeNoSense() {
    NoiseDensity density = density(1, 1e10, 2, 1);
    for (double factor : new double[] {-1, Double.NaN, Double.POSITIVE_INFINITY, 1e300}) {
      assertThrows(IllegalArgumentException.class, () -> density.scaled(factor));
    }
    assertThrows(IllegalArgumentException.class, () -> density.power(2, 1));
    assertThrows(IllegalArgumentException.class, () -> density.power(Double.NaN, 1));
  }

  @Test
  void readsFiles(@TempDir Path folder) throws Exception {
    Path file = Files.writeString(folder.resolve("noise.csv"), "1,2\n10,0\n5,1\n");
    String message =
        assertThrows(IllegalArgumentException.class, () -> NoiseDensity.read(file)).getMessage();
    assertTrue(message.startsWith(file + ", line 3"), message);
    assertThrows(
        UncheckedIOException.class, () -> NoiseDensity.read(folder.resolve("missing.csv")));
  }
}
