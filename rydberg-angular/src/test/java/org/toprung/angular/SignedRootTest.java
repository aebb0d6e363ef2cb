package org.toprung.angular;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertSame;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigInteger;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class SignedRootTest {

  private static SignedRoot root(int sign, long p, long q) {
    return SignedRoot.of(sign, BigInteger.valueOf(p), BigInteger.valueOf(q));
  }

  @ParameterizedTest
  @CsvSource({
    "-1, 2, 15, -sqrt(2/15)",
    "1, 4, 30, sqrt(2/15)",
    "1, 1, 9, 1/3",
    "-1, 4, 1, -2",
    "1, 2, 1, sqrt(2)",
    "0, 2, 3, 0",
    "-1, 0, 7, 0",
    "5, 1, 1, 1",
    "1, 1, 2, sqrt(1/2)",
    "1, 4, 3, sqrt(4/3)"
  })
  void printsInLowestTerms(int sign, long p, long q, String text) {
    assertEquals(text, root(sign, p, q).toString());
  }

  @Test
  void refusesASquareThatIsNoNonNegativeFraction() {
    assertThrows(IllegalArgumentException.class, () -> root(1, -1, 2));
    assertThrows(IllegalArgumentException.class, () -> root(1, 1, 0));
    IllegalArgumentException e = assertThrows(IllegalArgumentException.class, () -> root(1, 1, -3));
    assertTrue(e.getMessage().contains("1/-3"), e.getMessage());
  }

  @Test
  void multiplicationStaysExact() {
    SignedRoot a = root(-1, 2, 15);
    SignedRoot b = root(1, 5, 6);
    assertEquals(root(-1, 1, 9), a.times(b));
    assertEquals(root(1, 4, 225), a.square());
    assertEquals("2/15", a.square().toString());
    assertEquals(SignedRoot.ZERO, a.times(SignedRoot.ZERO));
    assertEquals(a, a.times(SignedRoot.ONE));
    assertTrue(a.square().isRational());
    assertFalse(a.isRational());
    assertFalse(root(1, 1, 2).isRational());
    assertFalse(root(1, 2, 1).isRational());
  }

  @Test
  void negationChangesTheSignOnly() {
    SignedRoot a = root(-1, 2, 15);
    assertEquals(root(1, 2, 15), a.negate());
    assertEquals(1, a.negate().signum());
    assertSame(SignedRoot.ZERO, SignedRoot.ZERO.negate());
    assertEquals(BigInteger.TWO, a.squareNumerator());
    assertEquals(BigInteger.valueOf(15), a.squareDenominator());
  }

  @Test
  void equalityLooksAtSignNumeratorAndDenominator() {
    SignedRoot a = root(1, 2, 15);
    assertEquals(a.hashCode(), root(3, 4, 30).hashCode());
    assertNotEquals(a.hashCode(), a.negate().hashCode());
    assertNotEquals(root(1, 2, 3).hashCode(), root(1, 3, 2).hashCode());
    assertNotEquals(a, a.negate());
    assertNotEquals(a, root(1, 1, 15));
    assertNotEquals(a, root(1, 2, 17));
    assertNotEquals(a, new Object());
  }

  @Test
  void doubleValueIsCorrectAlsoWhereTheFractionIsOutOfTheRangeOfDoubles() {
    assertEquals(-Math.sqrt(2.0 / 15), root(-1, 2, 15).doubleValue(), 6e-17);
    assertEquals(0, SignedRoot.ZERO.doubleValue());
    BigInteger huge = BigInteger.TEN.pow(500);
    assertEquals(1e-250, SignedRoot.of(1, BigInteger.ONE, huge).doubleValue(), 1e-265);
    assertEquals(1e250, SignedRoot.of(1, huge, BigInteger.ONE).doubleValue(), 1e235);
    assertEquals(Math.sqrt(2.0), SignedRoot.of(1, huge.shiftLeft(1), huge).doubleValue(), 3e-16);
  }
}
