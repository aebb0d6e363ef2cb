package org.toprung.angular;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigInteger;
import java.util.SplittableRandom;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class RacahSumTest {

  private static final int HALF = 8;
  private static final long[] EXTREMES = {0, 1, -1, Long.MIN_VALUE, Long.MAX_VALUE, -2};

  /**
   * One step of the nest against big integers, with limbs that make every carry and borrow occur.
   */
  @Test
  void aStepIsExactForEveryCarryAndBorrow() {
    SplittableRandom random = new SplittableRandom(1);
    for (int i = 0; i < 20000; i++) {
      long[] limbs = new long[2 * HALF];
      int size = 1 + random.nextInt(4);
      for (int k = 0; k < size; k++) {
        limbs[k] = limb(random);
        limbs[HALF + k] = limb(random);
      }
      long n = factor(random);
      long d = factor(random);
      BigInteger numerator = signed(limbs, size);
      BigInteger denominator = unsigned(limbs, size);
      int newSize = RacahSum.step(limbs, HALF, size, n, d);
      assertTrue(newSize == size || newSize == size + 1);
      BigInteger product = denominator.multiply(BigInteger.valueOf(d));
      assertEquals(product, unsigned(limbs, newSize));
      assertEquals(
          product.subtract(numerator.multiply(BigInteger.valueOf(n))), signed(limbs, newSize));
    }
  }

  private static long limb(SplittableRandom random) {
    int choice = random.nextInt(2 * EXTREMES.length);
    return choice < EXTREMES.length ? EXTREMES[choice] : random.nextLong();
  }

  /** Factors below 2^61, so that one limb more holds both products. */
  private static long factor(SplittableRandom random) {
    return random.nextBoolean() ? 1 + random.nextInt(100) : random.nextLong() >>> 3 | 1;
  }

  private static BigInteger unsigned(long[] limbs, int size) {
    BigInteger value = BigInteger.ZERO;
    for (int k = size - 1; k >= 0; k--) {
      value = value.shiftLeft(64).add(new BigInteger(Long.toUnsignedString(limbs[HALF + k])));
    }
    return value;
  }

  private static BigInteger signed(long[] limbs, int size) {
    BigInteger value = BigInteger.valueOf(limbs[size - 1]);
    for (int k = size - 2; k >= 0; k--) {
      value = value.shiftLeft(64).add(new BigInteger(Long.toUnsignedString(limbs[k])));
    }
    return value;
  }

  /** Unequal factors at the upper end of the range: the work space must be large enough for all. */
  @ParameterizedTest
  @CsvSource({
    "2000, 2000, 3600, 1600, -1600, 0",
    "4000, 600, 4000, 3400, 0, -3400",
    "4000, 4000, 4000, 0, 0, 0",
    "3999, 4000, 3999, 1, 0, -1",
    "4000, 1000, 3600, 100, -300, 200"
  })
  void threeJAtTheUpperEndOfTheRange(int a, int b, int c, int ma, int mb, int mc) {
    double exact = Wigner.exactThreeJDoubled(a, b, c, ma, mb, mc).doubleValue();
    assertEquals(exact, Wigner.threeJDoubled(a, b, c, ma, mb, mc), 2e-15 * Math.abs(exact));
  }

  @ParameterizedTest
  @CsvSource({
    "4000, 4000, 4000, 4000, 4000, 4000",
    "4000, 600, 4000, 3400, 800, 3600",
    "2000, 2000, 3600, 2000, 2000, 400",
    "3999, 4000, 3999, 2000, 3999, 2000"
  })
  void sixJAtTheUpperEndOfTheRange(int a, int b, int c, int d, int e, int f) {
    double exact = Wigner.exactSixJDoubled(a, b, c, d, e, f).doubleValue();
    assertEquals(exact, Wigner.sixJDoubled(a, b, c, d, e, f), 2e-15 * Math.abs(exact));
    assertTrue(exact != 0);
  }
}
