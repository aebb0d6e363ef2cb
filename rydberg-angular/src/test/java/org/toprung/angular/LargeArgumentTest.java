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

  /** Measured: 8.9e-16 over 60000 random symbols up to j = 500. */
  private static final double RELATIVE = 2e-15;

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
    // A 9j symbol may lose four digits to cancellation.
    double tolerance = row.kind().equals("9j") ? 4e-12 : RELATIVE;
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
    for (int i = 0; i < 1500; i++) {
      int[] a = RandomArguments.threeJ(random, i < 1460 ? 400 : 1000);
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
    for (int i = 0; i < 900; i++) {
      int[] a = RandomArguments.sixJ(random, i < 880 ? 400 : 1000);
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
    for (int i = 0; i < 305; i++) {
      int[] a = RandomArguments.nineJ(random, i < 260 ? 20 : i < 302 ? 60 : 200);
      double exact =
          Wigner.exactNineJDoubled(a[0], a[1], a[2], a[3], a[4], a[5], a[6], a[7], a[8])
              .doubleValue();
      double value = Wigner.nineJDoubled(a[0], a[1], a[2], a[3], a[4], a[5], a[6], a[7], a[8]);
      worst = Math.max(worst, exact == 0 ? Math.abs(value) : Math.abs(value / exact - 1));
    }
    assertTrue(worst <= 4e-12, "worst relative error " + worst);
  }
}
