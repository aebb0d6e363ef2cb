package org.toprung.angular;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.BufferedReader;
import java.io.IOException;
import java.io.InputStreamReader;
import java.math.BigDecimal;
import java.nio.charset.StandardCharsets;
import java.util.Arrays;
import java.util.List;
import java.util.SplittableRandom;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

/** Accuracy of the {@code double} forms. */
class LargeArgumentTest {

  /** Measured: 1.4e-15 over the whole module's tests. */
  private static final double RELATIVE = 4e-15;

  record Row(String kind, int[] args, BigDecimal value) {
    @Override
    public String toString() {
      return kind + Arrays.toString(args);
    }
  }

  static List<Row> rows() throws IOException {
    try (BufferedReader reader =
        new BufferedReader(
            new InputStreamReader(
                LargeArgumentTest.class.getResourceAsStream("wigner_large.csv"),
                StandardCharsets.UTF_8))) {
      List<Row> rows =
          reader
              .lines()
              .filter(line -> !line.startsWith("#") && !line.startsWith("kind"))
              .map(line -> line.split(","))
              .map(
                  f ->
                      new Row(
                          f[0],
                          Arrays.stream(f[1].split(" ")).mapToInt(Integer::parseInt).toArray(),
                          new BigDecimal(f[2])))
              .toList();
      assertEquals(270, rows.size());
      return rows;
    }
  }

  /** Validation: SymPy, see the header of the resource and the script beside it. */
  @ParameterizedTest
  @MethodSource("rows")
  void valueAgreesWithThirtyDigits(Row row) {
    int[] a = row.args();
    double value =
        switch (row.kind()) {
          case "3j" -> Wigner.threeJDoubled(a[0], a[1], a[2], a[3], a[4], a[5]);
          case "6j" -> Wigner.sixJDoubled(a[0], a[1], a[2], a[3], a[4], a[5]);
          default -> Wigner.nineJDoubled(a[0], a[1], a[2], a[3], a[4], a[5], a[6], a[7], a[8]);
        };
    // A 9j symbol may lose three digits to cancellation.
    double tolerance = row.kind().equals("9j") ? 1e-12 : RELATIVE;
    assertRelative(row.value(), value, tolerance, row);
  }

  private static void assertRelative(
      BigDecimal expected, double value, double tolerance, Object o) {
    if (expected.signum() == 0) {
      assertEquals(0, value, 0.0, o::toString);
    } else {
      double error =
          new BigDecimal(value).subtract(expected).abs().doubleValue()
              / expected.abs().doubleValue();
      assertTrue(error <= tolerance, () -> o + ": relative error " + error + ", value " + value);
    }
  }

  @Test
  void threeJAgreesWithItsExactFormUpTo500() {
    SplittableRandom random = new SplittableRandom(3);
    double worst = 0;
    for (int i = 0; i < 4000; i++) {
      int[] a = RandomArguments.threeJ(random, i < 3900 ? 400 : 1000);
      double exact = Wigner.exactThreeJDoubled(a[0], a[1], a[2], a[3], a[4], a[5]).doubleValue();
      double value = Wigner.threeJDoubled(a[0], a[1], a[2], a[3], a[4], a[5]);
      worst = Math.max(worst, exact == 0 ? Math.abs(value) : Math.abs(value / exact - 1));
    }
    assertTrue(worst <= RELATIVE, "worst relative error " + worst);
  }

  @Test
  void sixJAgreesWithItsExactFormUpTo500() {
    SplittableRandom random = new SplittableRandom(6);
    double worst = 0;
    for (int i = 0; i < 3000; i++) {
      int[] a = RandomArguments.sixJ(random, i < 2950 ? 400 : 1000);
      double exact = Wigner.exactSixJDoubled(a[0], a[1], a[2], a[3], a[4], a[5]).doubleValue();
      double value = Wigner.sixJDoubled(a[0], a[1], a[2], a[3], a[4], a[5]);
      worst = Math.max(worst, exact == 0 ? Math.abs(value) : Math.abs(value / exact - 1));
    }
    assertTrue(worst <= RELATIVE, "worst relative error " + worst);
  }

  @Test
  void nineJAgreesWithItsExactFormUpTo100() {
    SplittableRandom random = new SplittableRandom(9);
    double worst = 0;
    for (int i = 0; i < 400; i++) {
      int[] a = RandomArguments.nineJ(random, i < 300 ? 20 : i < 395 ? 60 : 200);
      double exact =
          Wigner.exactNineJDoubled(a[0], a[1], a[2], a[3], a[4], a[5], a[6], a[7], a[8])
              .doubleValue();
      double value = Wigner.nineJDoubled(a[0], a[1], a[2], a[3], a[4], a[5], a[6], a[7], a[8]);
      worst = Math.max(worst, exact == 0 ? Math.abs(value) : Math.abs(value / exact - 1));
    }
    assertTrue(worst <= 1e-12, "worst relative error " + worst);
  }

  @Test
  void familiesAgreeWithSingleSymbols() {
    SplittableRandom random = new SplittableRandom(33);
    double[] family = new double[2001];
    double worst = 0;
    for (int i = 0; i < 600; i++) {
      int[] a = RandomArguments.threeJ(random, i < 300 ? 40 : i < 590 ? 400 : 1000);
      int count = ThreeJFamily.overJ1Doubled(a[1], a[2], a[4], a[5], family);
      int lowest = ThreeJFamily.lowestJ1Doubled(a[1], a[2], a[4], a[5]);
      assertEquals((a[1] + a[2] - lowest) / 2 + 1, count);
      for (int k = 0; k < count; k++) {
        double single = Wigner.threeJDoubled(lowest + 2 * k, a[1], a[2], a[3], a[4], a[5]);
        worst = Math.max(worst, relative(single, family[k]));
      }
      count = ThreeJFamily.overM2Doubled(a[0], a[1], a[2], a[3], family);
      lowest = ThreeJFamily.lowestM2Doubled(a[1], a[2], a[3]);
      for (int k = 0; k < count; k++) {
        int tm2 = lowest + 2 * k;
        double single = Wigner.threeJDoubled(a[0], a[1], a[2], a[3], tm2, -a[3] - tm2);
        worst = Math.max(worst, relative(single, family[k]));
      }
      assertEquals(0, Wigner.threeJDoubled(a[0], a[1], a[2], a[3], lowest - 2, 2 - a[3] - lowest));
      int end = lowest + 2 * count;
      assertEquals(0, Wigner.threeJDoubled(a[0], a[1], a[2], a[3], end, -a[3] - end));
    }
    assertTrue(worst <= 1e-10, "worst relative error " + worst);
  }

  private static double relative(double expected, double value) {
    return Math.abs(expected) < Double.MIN_NORMAL * 0x1p60
        ? Math.abs(value - expected)
        : Math.abs(value / expected - 1);
  }

  @Test
  void familiesWithZeroProjectionsKeepTheirExactZeros() {
    double[] family = new double[201];
    int count = ThreeJFamily.overJ1Doubled(100, 100, 0, 0, family);
    assertEquals(101, count);
    for (int k = 0; k < count; k++) {
      double single = Wigner.threeJDoubled(2 * k, 100, 100, 0, 0, 0);
      assertEquals(single, family[k], 1e-13 * Math.abs(single));
      assertEquals(k % 2 != 0, single == 0);
    }
  }
}
