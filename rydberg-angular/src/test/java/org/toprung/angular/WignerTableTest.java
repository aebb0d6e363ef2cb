package org.toprung.angular;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.BufferedReader;
import java.io.IOException;
import java.io.InputStreamReader;
import java.math.BigInteger;
import java.nio.charset.StandardCharsets;
import java.util.Arrays;
import java.util.List;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

/** Validation: every row of a table computed exactly with SymPy 1.14 (header of the resource). */
class WignerTableTest {

  record Row(String kind, int[] args, int sign, BigInteger num, BigInteger den, double value) {
    @Override
    public String toString() {
      return kind + Arrays.toString(args);
    }
  }

  static List<Row> rows() throws IOException {
    try (BufferedReader reader =
        new BufferedReader(
            new InputStreamReader(
                WignerTableTest.class.getResourceAsStream("wigner_exact.csv"),
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
                          Integer.parseInt(f[2]),
                          new BigInteger(f[3]),
                          new BigInteger(f[4]),
                          Double.parseDouble(f[5])))
              .toList();
      assertEquals(265, rows.size());
      return rows;
    }
  }

  @ParameterizedTest
  @MethodSource("rows")
  void doubleValueAgrees(Row row) {
    int[] a = row.args();
    double value =
        switch (row.kind()) {
          case "3j" -> Wigner.threeJDoubled(a[0], a[1], a[2], a[3], a[4], a[5]);
          case "6j" -> Wigner.sixJDoubled(a[0], a[1], a[2], a[3], a[4], a[5]);
          default -> Wigner.nineJDoubled(a[0], a[1], a[2], a[3], a[4], a[5], a[6], a[7], a[8]);
        };
    // The table's own doubles carry about 16 digits.
    assertEquals(row.value(), value, 4e-15 * Math.abs(row.value()));
  }

  @ParameterizedTest
  @MethodSource("rows")
  void exactValueAgrees(Row row) {
    int[] a = row.args();
    SignedRoot value =
        switch (row.kind()) {
          case "3j" -> ExactWigner.threeJ(a[0], a[1], a[2], a[3], a[4], a[5]);
          case "6j" -> ExactWigner.sixJ(a[0], a[1], a[2], a[3], a[4], a[5]);
          default -> ExactWigner.nineJ(a[0], a[1], a[2], a[3], a[4], a[5], a[6], a[7], a[8]);
        };
    assertEquals(SignedRoot.of(row.sign(), row.num(), row.den()), value);
    assertTrue(value.signum() != 0 || row.num().signum() == 0);
  }
}
