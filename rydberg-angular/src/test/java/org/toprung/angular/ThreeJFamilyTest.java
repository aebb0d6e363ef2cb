package org.toprung.angular;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Arrays;
import java.util.SplittableRandom;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class ThreeJFamilyTest {

  /** Measured: 1.5e-12 over 4000 random families up to j = 500. */
  private static final double RELATIVE = 4e-12;

  private static void assertOverJ1(int tj2, int tj3, int tm2, int tm3) {
    double[] family = new double[Math.min(tj2, tj3) + 2];
    Arrays.fill(family, 9);
    int count = ThreeJFamily.overJ1Doubled(tj2, tj3, tm2, tm3, family);
    int lowest = ThreeJFamily.lowestJ1Doubled(tj2, tj3, tm2, tm3);
    assertEquals((tj2 + tj3 - lowest) / 2 + 1, count);
    for (int k = 0; k < count; k++) {
      int t = lowest + 2 * k;
      double single = Wigner.threeJDoubled(t, tj2, tj3, -tm2 - tm3, tm2, tm3);
      assertRelative(single, family[k], t, tj2, tj3, tm2, tm3);
    }
    for (int k = count; k < family.length; k++) {
      assertEquals(9, family[k]);
    }
  }

  private static void assertOverM2(int tj1, int tj2, int tj3, int tm1) {
    double[] family = new double[tj2 + 2];
    Arrays.fill(family, 9);
    int count = ThreeJFamily.overM2Doubled(tj1, tj2, tj3, tm1, family);
    int lowest = ThreeJFamily.lowestM2Doubled(tj2, tj3, tm1);
    for (int k = 0; k < count; k++) {
      int t = lowest + 2 * k;
      double single = Wigner.threeJDoubled(tj1, tj2, tj3, tm1, t, -tm1 - t);
      assertRelative(single, family[k], tj1, tj2, tj3, tm1, t);
    }
    for (int k = count; k < family.length; k++) {
      assertEquals(9, family[k]);
    }
    // The family is complete: Σ (j1 j2 j3; m1 m2 m3)² = 1/(2j1+1).
    double sum = 0;
    for (int k = 0; k < count; k++) {
      sum += family[k] * family[k];
    }
    assertEquals(1, sum * (tj1 + 1), 1e-11);
  }

  private static void assertRelative(double expected, double value, int... arguments) {
    // Below the normal range digits are lost by both.
    double tolerance = Math.max(RELATIVE * Math.abs(expected), Double.MIN_NORMAL);
    assertEquals(expected, value, tolerance, () -> Arrays.toString(arguments));
  }

  @Test
  void sweepsAgreeWithSingleSymbols() {
    SplittableRandom random = new SplittableRandom(33);
    for (int i = 0; i < 700; i++) {
      int[] a = RandomArguments.threeJ(random, i < 300 ? 8 : i < 600 ? 60 : i < 695 ? 400 : 1000);
      assertOverJ1(a[1], a[2], a[4], a[5]);
      assertOverM2(a[0], a[1], a[2], a[3]);
    }
  }

  @ParameterizedTest
  @CsvSource({
    "0, 0, 0, 0",
    "0, 5, 0, 3",
    "1, 1, 1, -1",
    "1, 1, 1, 1",
    "2, 2, 0, 0",
    "7, 7, 7, -7",
    "100, 100, 0, 0",
    "100, 100, 100, -100",
    "100, 100, 40, -40",
    "101, 60, 1, 0",
    "400, 400, 2, -2",
    "1000, 1000, 1000, -1000",
    "1000, 998, 0, 0",
    "400, 2, 400, -2"
  })
  void sweepsOverJ1AtTheEdges(int tj2, int tj3, int tm2, int tm3) {
    assertOverJ1(tj2, tj3, tm2, tm3);
  }

  @ParameterizedTest
  @CsvSource({
    "0, 0, 0, 0",
    "0, 7, 7, 0",
    "2, 7, 7, 2",
    "14, 7, 7, 0",
    "14, 7, 7, -14",
    "100, 100, 100, 0",
    "200, 100, 100, 0",
    "200, 100, 100, 100",
    "2, 400, 400, 0",
    "800, 400, 400, 0",
    "400, 400, 400, 0",
    "3, 1000, 1001, 1",
    "1000, 1000, 1000, 998"
  })
  void sweepsOverM2AtTheEdges(int tj1, int tj2, int tj3, int tm1) {
    assertOverM2(tj1, tj2, tj3, tm1);
  }

  @Test
  void zerosOfParityStayExact() {
    double[] family = new double[101];
    assertEquals(101, ThreeJFamily.overJ1Doubled(100, 100, 0, 0, family));
    for (int k = 0; k <= 100; k++) {
      assertEquals(k % 2 != 0, family[k] == 0);
    }
  }

  @Test
  void nothingIsOutsideTheFamilies() {
    assertEquals(4, ThreeJFamily.lowestJ1Doubled(4, 6, 2, 2));
    assertEquals(2, ThreeJFamily.lowestJ1Doubled(4, 6, 0, 0));
    assertEquals(-4, ThreeJFamily.lowestM2Doubled(4, 6, 2));
    assertEquals(-2, ThreeJFamily.lowestM2Doubled(4, 6, -4));
    double[] family = new double[9];
    assertEquals(5, ThreeJFamily.overM2Doubled(4, 4, 6, 0, family));
    assertEquals(4, ThreeJFamily.overM2Doubled(4, 4, 6, 4, family));
    assertEquals(5, ThreeJFamily.overM2Doubled(4, 6, 4, 2, new double[5]));
  }

  @Test
  void brokenSelectionRulesGiveAnEmptyFamily() {
    double[] family = new double[9];
    assertEquals(0, ThreeJFamily.overJ1Doubled(2, 2, 4, 0, family));
    assertEquals(0, ThreeJFamily.overJ1Doubled(2, 2, 0, 1, family));
    assertEquals(0, ThreeJFamily.overM2Doubled(2, 2, 6, 0, family));
    assertEquals(0, ThreeJFamily.overM2Doubled(2, 2, 2, 4, family));
    assertEquals(0, ThreeJFamily.overM2Doubled(2, 2, 2, 1, family));
    assertEquals(0, family[0]);
  }

  @Test
  void badArgumentsAndShortArraysAreRefused() {
    double[] family = new double[2];
    IllegalArgumentException e =
        assertThrows(
            IllegalArgumentException.class, () -> ThreeJFamily.overJ1Doubled(2, 2, 0, 0, family));
    assertTrue(e.getMessage().contains("array of 2 is too short for 3"), e.getMessage());
    assertEquals(2, ThreeJFamily.overJ1Doubled(2, 2, 2, 0, family));
    assertThrows(
        IllegalArgumentException.class, () -> ThreeJFamily.overM2Doubled(2, 2, 2, 0, family));
    assertThrows(
        IllegalArgumentException.class, () -> ThreeJFamily.overJ1Doubled(-2, 2, 0, 0, family));
    assertThrows(
        IllegalArgumentException.class, () -> ThreeJFamily.overM2Doubled(2, 2, -2, 0, family));
    int limit = Wigner.MAX_DOUBLED_J;
    assertThrows(
        IllegalArgumentException.class, () -> ThreeJFamily.overJ1Doubled(limit, 2, 0, 0, family));
  }
}
