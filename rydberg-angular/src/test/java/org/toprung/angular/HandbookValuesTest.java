package org.toprung.angular;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Arrays;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

/** Validation: special formulas of the handbooks. */
class HandbookValuesTest {

  /** Varshalovich et al. 8.5.1 (1); Edmonds (3.7.9). */
  @ParameterizedTest
  @ValueSource(ints = {0, 1, 2, 7, 60, 401, 1000})
  void threeJWithAZero(int tj) {
    for (int tm = -tj; tm <= tj; tm += 2) {
      double sign = ((tj - tm) / 2 & 1) == 0 ? 1 : -1;
      assertEquals(sign / Math.sqrt(tj + 1.0), Wigner.threeJDoubled(tj, tj, 0, tm, -tm, 0), 1e-15);
    }
  }

  /** Odd perimeter and m = 0: the symbol changes sign under m → −m. Varshalovich et al. 8.5.2. */
  @Test
  void threeJWithoutProjectionsVanishesForAnOddPerimeter() {
    for (int a = 0; a <= 40; a += 2) {
      for (int b = 0; b <= 40; b += 2) {
        for (int c = Math.abs(a - b); c <= a + b; c += 2) {
          double value = Wigner.threeJDoubled(a, b, c, 0, 0, 0);
          assertEquals(((a + b + c) / 2 & 1) != 0, value == 0, a + " " + b + " " + c);
        }
      }
    }
  }

  /** No result is a negative zero, whatever the sign that goes with the vanishing sum. */
  @Test
  void zerosHaveNoSign() {
    double[] family = new double[20];
    for (int a = 0; a <= 8; a += 2) {
      for (int b = 0; b <= 8; b += 2) {
        for (int c = Math.abs(a - b); c <= a + b; c += 2) {
          assertUnsigned(Wigner.threeJDoubled(a, b, c, 0, 0, 0));
          assertUnsigned(Wigner.clebschGordanDoubled(a, 0, b, 0, c, 0));
          assertUnsigned(Wigner.sixJDoubled(a, b, c, 3, 3, 3));
          assertUnsigned(Wigner.nineJDoubled(a, b, c, a, b, c, 2, 2, 2));
          assertUnsigned(Wigner.racahWDoubled(a, b, c, 2, 2, 2));
        }
        int count = ThreeJFamily.overJ1Doubled(a, b, 0, 0, family);
        for (int i = 0; i < count; i++) {
          assertUnsigned(family[i]);
        }
        assertUnsigned(Rotation.smallDDoubled(a + b, a, -b, 0));
        assertUnsigned(
            Recoupling.hyperfineToFine(
                HalfInteger.of(a),
                HalfInteger.of(0),
                HalfInteger.of(0),
                b,
                0,
                HalfInteger.of(2),
                HalfInteger.of(2),
                HalfInteger.of(3),
                HalfInteger.of(0)));
        assertUnsigned(
            Recoupling.hyperfineElement(
                HalfInteger.of(a),
                HalfInteger.of(2),
                HalfInteger.of(3),
                HalfInteger.of(0),
                b,
                0,
                HalfInteger.of(2),
                HalfInteger.of(2),
                HalfInteger.of(0)));
      }
    }
  }

  private static void assertUnsigned(double value) {
    assertEquals(value + 0.0, value);
  }

  /** The same where the sum needs many limbs, all of which must cancel. */
  @ParameterizedTest
  @CsvSource({
    "100, 100, 102",
    "400, 400, 402",
    "1000, 1000, 1002",
    "4000, 4000, 4000",
    "4000, 3000, 2002"
  })
  void largeSumsCancelToAnExactZero(int a, int b, int c) {
    double value = Wigner.threeJDoubled(a, b, c, 0, 0, 0);
    if (((a + b + c) / 2 & 1) != 0) {
      assertEquals(0.0, value);
    } else {
      assertTrue(value != 0);
    }
  }

  /** (1 1 2; 0 0 0) = √(2/15), (2 2 2; 0 0 0) = −√(2/35), (3 2 3; ...): Edmonds table 2. */
  @ParameterizedTest
  @CsvSource({
    "2 2 4 0 0 0, sqrt(2/15)",
    "4 4 4 0 0 0, -sqrt(2/35)",
    "2 2 0 0 0 0, -sqrt(1/3)",
    "1 1 2 1 -1 0, sqrt(1/6)",
    "1 1 2 1 1 -2, -sqrt(1/3)",
    "3 2 1 -3 2 1, 1/2",
    "2 2 2 2 -2 0, sqrt(1/6)",
    "2 2 2 0 0 0, 0"
  })
  void tabulatedThreeJ(String numbers, String expected) {
    int[] a = numbers(numbers);
    assertEquals(
        expected, Wigner.exactThreeJDoubled(a[0], a[1], a[2], a[3], a[4], a[5]).toString());
  }

  /** Two spins one half: the triplet and the singlet. */
  @Test
  void tabulatedClebschGordan() {
    assertEquals("1", Wigner.exactClebschGordanDoubled(1, 1, 1, 1, 2, 2).toString());
    assertEquals("sqrt(1/2)", Wigner.exactClebschGordanDoubled(1, 1, 1, -1, 0, 0).toString());
    assertEquals("-sqrt(1/2)", Wigner.exactClebschGordanDoubled(1, -1, 1, 1, 0, 0).toString());
    assertEquals("-sqrt(1/3)", Wigner.exactClebschGordanDoubled(2, 0, 1, 1, 1, 1).toString());
    assertEquals("sqrt(2/3)", Wigner.exactClebschGordanDoubled(2, 2, 1, -1, 1, 1).toString());
  }

  /** ⟨j1 j1 j2 j2|j1+j2 j1+j2⟩ = 1: the phase convention, Edmonds (3.5.4). */
  @ParameterizedTest
  @CsvSource({"1, 1", "3, 4", "100, 7", "400, 400", "1000, 999"})
  void stretchedStatesAreProducts(int tj1, int tj2) {
    assertEquals(1, Wigner.clebschGordanDoubled(tj1, tj1, tj2, tj2, tj1 + tj2, tj1 + tj2), 2e-15);
    assertEquals(
        1, Wigner.clebschGordanDoubled(tj1, -tj1, tj2, -tj2, tj1 + tj2, -tj1 - tj2), 2e-15);
  }

  /**
   * {a b c; 0 c b} = (−1)^(a+b+c)/√((2b+1)(2c+1)), Varshalovich et al. 9.5.1 (1); Edmonds (6.3.2).
   */
  @ParameterizedTest
  @CsvSource({"2, 2, 2", "1, 2, 3", "4, 3, 5", "100, 90, 50", "401, 400, 399", "1000, 1000, 1000"})
  void sixJWithAZero(int a, int b, int c) {
    double sign = ((a + b + c) / 2 & 1) == 0 ? 1 : -1;
    double expected = sign / Math.sqrt((b + 1.0) * (c + 1.0));
    assertEquals(expected, Wigner.sixJDoubled(a, b, c, 0, c, b), 4e-15 * Math.abs(expected));
  }

  /**
   * {a b c; 1 c b} = (−1)^(s+1) 2X/√(2b(2b+1)(2b+2)2c(2c+1)(2c+2)), X = b(b+1)+c(c+1)−a(a+1):
   * Edmonds table 5.
   */
  @ParameterizedTest
  @CsvSource({"2, 2, 2", "1, 2, 3", "4, 3, 5", "100, 90, 50", "401, 400, 399"})
  void sixJWithAOne(int a, int b, int c) {
    double sign = ((a + b + c) / 2 & 1) == 0 ? -1 : 1;
    double x = (b * (b + 2.0) + c * (c + 2.0) - a * (a + 2.0)) / 4;
    double expected =
        sign * 2 * x / Math.sqrt(b * (b + 1.0) * (b + 2.0) * c * (c + 1.0) * (c + 2.0));
    assertEquals(expected, Wigner.sixJDoubled(a, b, c, 2, c, b), 4e-15 * Math.abs(expected));
  }

  /**
   * Zeros that no selection rule explains are exact: {5 5 3; 3 3 3} and {2 2 2; 3/2 3/2 3/2},
   * common knowledge.
   */
  @Test
  void accidentalZerosAreExact() {
    assertEquals(0, Wigner.sixJDoubled(4, 4, 4, 3, 3, 3), 0.0);
    assertEquals(0, Wigner.exactSixJDoubled(4, 4, 4, 3, 3, 3).signum());
    assertTrue(
        Wigner.sixJViolation(
                HalfInteger.of(2),
                HalfInteger.of(2),
                HalfInteger.of(2),
                HalfInteger.of(1.5),
                HalfInteger.of(1.5),
                HalfInteger.of(1.5))
            .isEmpty());
    // (3 3 2; 2 -2 0) = 0: m² = j(j+1)/3 with j = 3, m = 2.
    assertEquals(0, Wigner.threeJDoubled(6, 6, 4, 4, -4, 0), 0.0);
    // Two equal rows and an odd sum.
    assertEquals(0, Wigner.nineJDoubled(40, 38, 42, 40, 38, 42, 30, 32, 32), 0.0);
  }

  /**
   * Edmonds' asymptotic formula, (A2.2): for a, b, c much above f, {c a b; f b+m a+n} ≈
   * (−1)^(a+b+c+f+m) d^f_mn(θ)/√((2a+1)(2b+1)), cos θ = (a(a+1)+b(b+1)−c(c+1))/(2√(a(a+1)b(b+1))).
   * It leaves errors of relative order f/a.
   */
  @ParameterizedTest
  @CsvSource({"0, 0", "1, 0", "0, 1", "1, 1", "2, -1", "-1, 2", "-2, -2"})
  void asymptoticSixJ(int m, int n) {
    int f = 2;
    double previous = Double.POSITIVE_INFINITY;
    for (int scale : new int[] {1, 4, 16}) {
      int a = 60 * scale;
      int b = 50 * scale;
      int c = 40 * scale;
      double cos =
          (a * (a + 1.0) + b * (b + 1.0) - c * (c + 1.0))
              / (2 * Math.sqrt(a * (a + 1.0) * b * (b + 1.0)));
      double d = Rotation.smallDDoubled(2 * f, 2 * m, 2 * n, Math.acos(cos));
      double sign = (a + b + c + f + m & 1) == 0 ? 1 : -1;
      double scaled =
          Wigner.sixJDoubled(2 * c, 2 * a, 2 * b, 2 * f, 2 * (b + m), 2 * (a + n))
              * sign
              * Math.sqrt((2 * a + 1.0) * (2 * b + 1.0));
      double error = Math.abs(scaled - d);
      assertTrue(error < 3.0 / a, m + " " + n + " " + scale + ": " + scaled + " against " + d);
      assertTrue(error < previous, "does not converge at scale " + scale);
      previous = error;
    }
  }

  private static int[] numbers(String text) {
    return Arrays.stream(text.split(" ")).mapToInt(Integer::parseInt).toArray();
  }
}
