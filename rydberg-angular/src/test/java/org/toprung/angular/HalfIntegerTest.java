package org.toprung.angular;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertSame;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.stream.Collectors;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.constraints.IntRange;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.NullSource;
import org.junit.jupiter.params.provider.ValueSource;

class HalfIntegerTest {

  private static HalfInteger h(String text) {
    return HalfInteger.parse(text);
  }

  @ParameterizedTest
  @CsvSource({
    "2, 4",
    "1.5, 3",
    "3/2, 3",
    "-3/2, -3",
    "−1/2, -1",
    "+7/2, 7",
    "0, 0",
    "-0.5, -1",
    "4/1, 8",
    "' 5 / 2 ', 5",
    "2.0, 4",
    "2.50, 5",
    "2., 4",
    "1073741823.5, 2147483647",
    "-1073741824, -2147483648"
  })
  void parsesIntegersDecimalsAndFractions(String text, int doubled) {
    assertEquals(doubled, HalfInteger.parse(text).doubled());
  }

  @ParameterizedTest
  @NullSource
  @ValueSource(
      strings = {
        "", "x", "1.25", "1/3", "3/4", "1.5.5", "1e0", "NaN", "3/", "/2", "2.05", "1/0", "0.49"
      })
  void refusesOtherTextsAndNamesThem(String text) {
    IllegalArgumentException e =
        assertThrows(IllegalArgumentException.class, () -> HalfInteger.parse(text));
    assertTrue(e.getMessage().contains("not an integer or half-integer"), e.getMessage());
    assertTrue(e.getMessage().contains(String.valueOf(text)), e.getMessage());
  }

  @ParameterizedTest
  @ValueSource(strings = {"1073741824", "-1073741824.5", "9999999999/2", "2147483648/1"})
  void refusesTextsOutOfRange(String text) {
    IllegalArgumentException e =
        assertThrows(IllegalArgumentException.class, () -> HalfInteger.parse(text));
    assertTrue(e.getMessage().contains("out of range: " + text), e.getMessage());
  }

  @ParameterizedTest
  @ValueSource(
      doubles = {
        Double.NaN,
        Double.POSITIVE_INFINITY,
        Double.NEGATIVE_INFINITY,
        1e10,
        -1e10,
        1073741824.0
      })
  void refusesDoublesOutOfRange(double value) {
    IllegalArgumentException e =
        assertThrows(IllegalArgumentException.class, () -> HalfInteger.of(value));
    assertTrue(e.getMessage().contains("out of range: " + value), e.getMessage());
  }

  @ParameterizedTest
  @ValueSource(doubles = {0.25, 1.4999999999999998, -0.1, Double.MIN_VALUE})
  void refusesDoublesThatAreNoHalfIntegers(double value) {
    IllegalArgumentException e =
        assertThrows(IllegalArgumentException.class, () -> HalfInteger.of(value));
    assertTrue(e.getMessage().contains(Double.toString(value)), e.getMessage());
  }

  @Test
  void acceptsTheWholeRangeOfDoubles() {
    assertEquals(Integer.MAX_VALUE, HalfInteger.of(1073741823.5).doubled());
    assertEquals(Integer.MIN_VALUE, HalfInteger.of(-1073741824.0).doubled());
    assertEquals(3, HalfInteger.of(1.5).doubled());
    assertEquals(0, HalfInteger.of(-0.0).doubled());
  }

  @Test
  void acceptsIntegersWhoseDoubleFits() {
    assertEquals(-2147483648, HalfInteger.of(-1073741824).doubled());
    assertThrows(IllegalArgumentException.class, () -> HalfInteger.of(1073741824));
  }

  @Property(seed = "1", tries = 200)
  void textAndDoubleAndBackAreTheIdentity(@ForAll int doubled) {
    HalfInteger x = HalfInteger.ofHalves(doubled);
    assertEquals(x, HalfInteger.parse(x.toString()));
    assertEquals(x, HalfInteger.of(x.doubleValue()));
    assertEquals(x.hashCode(), HalfInteger.parse(x.toString()).hashCode());
    assertEquals(doubled % 2 == 0, x.isInteger());
  }

  @Property(seed = "2", tries = 200)
  void arithmeticIsThatOfTheDoubles(
      @ForAll @IntRange(min = -100000, max = 100000) int a,
      @ForAll @IntRange(min = -100000, max = 100000) int b) {
    HalfInteger x = HalfInteger.ofHalves(a);
    HalfInteger y = HalfInteger.ofHalves(b);
    assertEquals(a + b, x.plus(y).doubled());
    assertEquals(a - b, x.minus(y).doubled());
    assertEquals(-a, x.negate().doubled());
    assertEquals(3 * a, x.times(3).doubled());
    assertEquals(Math.abs(a), x.abs().doubled());
    assertEquals(Integer.signum(a), x.signum());
    assertEquals(Integer.compare(a, b), x.compareTo(y));
    assertEquals(a == b, x.equals(y));
    assertEquals((a - b) % 2 == 0, x.hasParityOf(y));
  }

  @Test
  void overflowIsAnError() {
    HalfInteger largest = HalfInteger.ofHalves(Integer.MAX_VALUE);
    HalfInteger smallest = HalfInteger.ofHalves(Integer.MIN_VALUE);
    assertThrows(ArithmeticException.class, () -> largest.plus(HalfInteger.HALF));
    assertThrows(ArithmeticException.class, () -> smallest.minus(HalfInteger.HALF));
    assertThrows(ArithmeticException.class, smallest::negate);
    assertThrows(ArithmeticException.class, smallest::abs);
    assertThrows(ArithmeticException.class, () -> largest.times(2));
    assertThrows(ArithmeticException.class, largest::multiplicity);
  }

  @Test
  void printsAsAFraction() {
    assertEquals("3/2", HalfInteger.of(1.5).toString());
    assertEquals("-1/2", HalfInteger.ofHalves(-1).toString());
    assertEquals("2", HalfInteger.of(2).toString());
    assertEquals("0", HalfInteger.ZERO.toString());
  }

  @Test
  void smallValuesAreShared() {
    assertSame(HalfInteger.ZERO, HalfInteger.of(0));
    assertSame(HalfInteger.HALF, HalfInteger.of(0.5));
    assertSame(HalfInteger.ONE, HalfInteger.of(1));
    assertNotEquals(HalfInteger.ONE, new Object());
  }

  @Test
  void integersConvertAndHalvesDoNot() {
    assertEquals(-3, HalfInteger.of(-3).intValueExact());
    assertThrows(ArithmeticException.class, HalfInteger.HALF::intValueExact);
  }

  @Test
  void projectionsRunFromMinusJToJ() {
    assertEquals(
        "-3/2 -1/2 1/2 3/2",
        h("3/2").projections().map(HalfInteger::toString).collect(Collectors.joining(" ")));
    assertEquals(List.of(HalfInteger.ZERO), HalfInteger.ZERO.projections().toList());
    assertEquals(4, h("3/2").multiplicity());
    assertEquals(1, HalfInteger.ZERO.multiplicity());
    assertThrows(IllegalArgumentException.class, () -> h("-1/2").projections());
    assertThrows(IllegalArgumentException.class, () -> h("-1/2").multiplicity());
  }

  @Test
  void couplingsRunFromTheDifferenceToTheSum() {
    assertEquals(
        "1/2 3/2 5/2",
        HalfInteger.couplings(h("3/2"), h("1"))
            .map(HalfInteger::toString)
            .collect(Collectors.joining(" ")));
    assertEquals(List.of(h("2")), HalfInteger.couplings(h("0"), h("2")).toList());
    assertThrows(IllegalArgumentException.class, () -> HalfInteger.couplings(h("1"), h("-1")));
    assertThrows(IllegalArgumentException.class, () -> HalfInteger.couplings(h("-1"), h("1")));
  }

  @ParameterizedTest
  @CsvSource({
    "1, 1, 2, true",
    "1, 1, 3, false",
    "3, 1, 1, false",
    "1, 3, 1, false",
    "1/2, 1/2, 1, true",
    "1/2, 1/2, 1/2, false",
    "0, 0, 0, true",
    "1/2, 1, 3/2, true",
    "1, 1/2, 1, false",
    "-1, 1, 1, false",
    "1, 2, 1, true",
    "2, 1, 1, true"
  })
  void triangleRule(String a, String b, String c, boolean expected) {
    assertEquals(expected, HalfInteger.isTriangle(h(a), h(b), h(c)));
  }

  @ParameterizedTest
  @CsvSource({
    "1, 1, true",
    "-1, 1, true",
    "2, 1, false",
    "-2, 1, false",
    "1/2, 1, false",
    "1/2, 3/2, true",
    "0, 0, true",
    "0, -1, false"
  })
  void projectionRule(String m, String j, boolean expected) {
    assertEquals(expected, h(m).isProjectionOf(h(j)));
    assertFalse(h(m).isProjectionOf(h("-5")));
  }
}
