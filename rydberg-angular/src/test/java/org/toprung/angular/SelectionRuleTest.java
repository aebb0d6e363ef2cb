package org.toprung.angular;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Arrays;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

class SelectionRuleTest {

  private static HalfInteger[] parse(String numbers) {
    return Arrays.stream(numbers.split(" ")).map(HalfInteger::parse).toArray(HalfInteger[]::new);
  }

  private static void assertViolation(
      String rule, String part, Optional<SelectionRule.Violation> violation) {
    if (rule.equals("none")) {
      assertTrue(violation.isEmpty(), violation::toString);
    } else {
      assertEquals(SelectionRule.valueOf(rule), violation.orElseThrow().rule());
      assertTrue(violation.get().message().contains(part), violation.get()::message);
    }
  }

  @ParameterizedTest
  @CsvSource({
    "1 1 2 0 0 0, none, ''",
    "1 1 3 0 0 0, TRIANGLE, 'j1 = 1, j2 = 1, j3 = 3'",
    "1 1 1/2 0 0 1/2, INTEGER_PERIMETER, 'j3 = 1/2'",
    "1 1 1 0 1 0, PROJECTION_SUM, '0 + 1 + 0 = 1'",
    "1 1 1 2 -1 -1, PROJECTION_RANGE, '|m1| must not exceed j1: j1 = 1, m1 = 2'",
    "1 1 1 1 -2 1, PROJECTION_RANGE, 'm2 = -2'",
    "1 1 1 1 1 -2, PROJECTION_RANGE, 'm3 = -2'",
    "1 1 1 1/2 -1 1/2, PROJECTION_PARITY, 'j1 - m1 must be an integer: j1 = 1, m1 = 1/2'",
    "1 1 1 0 0 0, none, ''"
  })
  void threeJRules(String numbers, String rule, String part) {
    HalfInteger[] a = parse(numbers);
    assertViolation(rule, part, Wigner.threeJViolation(a[0], a[1], a[2], a[3], a[4], a[5]));
    if (!rule.equals("none")) {
      assertEquals(0, Wigner.threeJ(a[0], a[1], a[2], a[3], a[4], a[5]));
      assertEquals(SignedRoot.ZERO, Wigner.exactThreeJ(a[0], a[1], a[2], a[3], a[4], a[5]));
    }
  }

  @ParameterizedTest
  @CsvSource({
    "1 0 1 0 2 0, none, ''",
    "1 0 1 0 3 0, TRIANGLE, 'j = 3'",
    "1 0 1 1 2 0, PROJECTION_SUM, '0 + 1 = 1, m = 0'",
    "1 2 1 -1 2 1, PROJECTION_RANGE, 'm1 = 2'",
    "1 0 1 2 2 2, PROJECTION_RANGE, 'm2 = 2'",
    "1 1 1 1 1 2, PROJECTION_RANGE, 'm = 2'",
    "1 1/2 1 -1/2 2 0, PROJECTION_PARITY, 'm1 = 1/2'",
    "1 1 1/2 1/2 1 1, INTEGER_PERIMETER, 'j2 = 1/2'"
  })
  void clebschGordanRules(String numbers, String rule, String part) {
    HalfInteger[] a = parse(numbers);
    assertViolation(rule, part, Wigner.clebschGordanViolation(a[0], a[1], a[2], a[3], a[4], a[5]));
    if (!rule.equals("none")) {
      assertEquals(0, Wigner.clebschGordan(a[0], a[1], a[2], a[3], a[4], a[5]));
      assertEquals(SignedRoot.ZERO, Wigner.exactClebschGordan(a[0], a[1], a[2], a[3], a[4], a[5]));
    }
  }

  @ParameterizedTest
  @CsvSource({
    "1 1 1 1 1 1, none, ''",
    "1 1 3 1 1 1, TRIANGLE, 'j1 = 1, j2 = 1, j3 = 3'",
    "1 1 1 1 3 1, TRIANGLE, 'j1 = 1, j5 = 3, j6 = 1'",
    "1 2 1 1 1 2, none, ''",
    "2 1 1 1 1 3, TRIANGLE, 'j4 = 1, j2 = 1, j6 = 3'",
    "1 1 2 3 2 2, none, ''",
    "1 1 2 5/2 1/2 3/2, none, ''",
    "1 1 1 3 1 2, TRIANGLE, 'j4 = 3, j5 = 1, j3 = 1'",
    "1 1 1 1/2 1/2 1, INTEGER_PERIMETER, 'j5 = 1/2, j6 = 1'"
  })
  void sixJRules(String numbers, String rule, String part) {
    HalfInteger[] a = parse(numbers);
    assertViolation(rule, part, Wigner.sixJViolation(a[0], a[1], a[2], a[3], a[4], a[5]));
    if (!rule.equals("none")) {
      assertEquals(0, Wigner.sixJ(a[0], a[1], a[2], a[3], a[4], a[5]));
      assertEquals(SignedRoot.ZERO, Wigner.exactSixJ(a[0], a[1], a[2], a[3], a[4], a[5]));
    }
  }

  @ParameterizedTest
  @CsvSource({
    "1 1 1 1 1 1 1 1 2, none, ''",
    "1 1 3 1 1 1 1 1 1, TRIANGLE, 'j1 = 1, j2 = 1, j3 = 3'",
    "1 1 2 1 1 3 1 1 1, TRIANGLE, 'j4 = 1, j5 = 1, j6 = 3'",
    "1 1 2 1 1 2 1 1 3, TRIANGLE, 'j7 = 1, j8 = 1, j9 = 3'",
    "2 1 1 2 2 0 5 5 1, TRIANGLE, 'j1 = 2, j4 = 2, j7 = 5'",
    "2 1 1 2 3 1 3 5 2, TRIANGLE, 'j2 = 1, j5 = 3, j8 = 5'",
    "1 1 2 1 1 2 1 1 1, none, ''",
    "1 1 0 1 1 0 1 1 1, TRIANGLE, 'j3 = 0, j6 = 0, j9 = 1'",
    "1 1 1 1 1 1 1 1 1/2, INTEGER_PERIMETER, 'j9 = 1/2'"
  })
  void nineJRules(String numbers, String rule, String part) {
    HalfInteger[] a = parse(numbers);
    assertViolation(
        rule, part, Wigner.nineJViolation(a[0], a[1], a[2], a[3], a[4], a[5], a[6], a[7], a[8]));
    if (!rule.equals("none")) {
      assertEquals(0, Wigner.nineJ(a[0], a[1], a[2], a[3], a[4], a[5], a[6], a[7], a[8]));
      assertEquals(
          SignedRoot.ZERO, Wigner.exactNineJ(a[0], a[1], a[2], a[3], a[4], a[5], a[6], a[7], a[8]));
    }
  }

  @ParameterizedTest
  @ValueSource(ints = {-1, -2, Integer.MIN_VALUE})
  void aNegativeAngularMomentumIsAnErrorInEveryPlace(int t) {
    for (int place = 0; place < 9; place++) {
      int[] a = new int[9];
      a[place] = t;
      IllegalArgumentException e =
          assertThrows(
              IllegalArgumentException.class,
              () -> Wigner.nineJDoubled(a[0], a[1], a[2], a[3], a[4], a[5], a[6], a[7], a[8]));
      assertTrue(e.getMessage().contains("cannot be negative: " + HalfInteger.ofHalves(t)));
      assertThrows(
          IllegalArgumentException.class,
          () -> Wigner.exactNineJDoubled(a[0], a[1], a[2], a[3], a[4], a[5], a[6], a[7], a[8]));
      HalfInteger[] h =
          Arrays.stream(a).mapToObj(HalfInteger::ofHalves).toArray(HalfInteger[]::new);
      assertThrows(
          IllegalArgumentException.class,
          () -> Wigner.nineJViolation(h[0], h[1], h[2], h[3], h[4], h[5], h[6], h[7], h[8]));
      if (place < 6) {
        assertThrows(
            IllegalArgumentException.class,
            () -> Wigner.sixJDoubled(a[0], a[1], a[2], a[3], a[4], a[5]));
        assertThrows(
            IllegalArgumentException.class,
            () -> Wigner.exactSixJDoubled(a[0], a[1], a[2], a[3], a[4], a[5]));
        assertThrows(
            IllegalArgumentException.class,
            () -> Wigner.sixJViolation(h[0], h[1], h[2], h[3], h[4], h[5]));
      }
      if (place < 3) {
        assertThrows(
            IllegalArgumentException.class, () -> Wigner.threeJDoubled(a[0], a[1], a[2], 0, 0, 0));
        assertThrows(
            IllegalArgumentException.class,
            () -> Wigner.exactThreeJDoubled(a[0], a[1], a[2], 0, 0, 0));
        assertThrows(
            IllegalArgumentException.class,
            () -> Wigner.clebschGordanDoubled(a[0], 0, a[1], 0, a[2], 0));
        HalfInteger o = HalfInteger.ZERO;
        assertThrows(
            IllegalArgumentException.class,
            () -> Wigner.threeJViolation(h[0], h[1], h[2], o, o, o));
        assertThrows(
            IllegalArgumentException.class,
            () -> Wigner.clebschGordanViolation(h[0], o, h[1], o, h[2], o));
      }
    }
  }

  @Test
  void theSupportedRangeEndsAtItsLimit() {
    int limit = Wigner.MAX_DOUBLED_J;
    assertEquals(
        1 / Math.sqrt(limit + 1.0), Wigner.threeJDoubled(limit, 0, limit, limit, 0, -limit), 1e-16);
    assertEquals(
        Wigner.exactSixJDoubled(limit, limit, 2, limit, limit, 2).doubleValue(),
        Wigner.sixJDoubled(limit, limit, 2, limit, limit, 2),
        1e-18);
    IllegalArgumentException e =
        assertThrows(
            IllegalArgumentException.class,
            () -> Wigner.threeJDoubled(limit + 1, 1, limit, 1, -1, 0));
    assertTrue(e.getMessage().contains("above the supported 2000: one of 4001/2, 1/2, 2000"));
  }

  @Test
  void projectionsThatOverflowAnIntegerAreJustOutOfRange() {
    assertEquals(0, Wigner.threeJDoubled(2, 2, 2, Integer.MIN_VALUE, Integer.MIN_VALUE, 0));
    assertEquals(0, Wigner.clebschGordanDoubled(2, 0, 2, 0, 2, Integer.MIN_VALUE));
  }
}
