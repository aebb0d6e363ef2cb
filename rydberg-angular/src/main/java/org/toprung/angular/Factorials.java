package org.toprung.angular;

import java.math.BigInteger;
import org.apache.commons.numbers.core.DD;

/**
 * Factorials up to {@link #LARGEST}!, as m·2^e with 1 ≤ m &lt; 2 so that no product of a few of
 * them overflows. The table is accumulated in double-double arithmetic and rounded once: each
 * mantissa is the nearest {@code double}.
 */
final class Factorials {

  /** Largest tabulated argument: enough for 6j symbols inside a 9j symbol at the largest j. */
  static final int LARGEST = 2 * Wigner.MAX_DOUBLED_J + 1;

  static final double[] MANTISSA = new double[LARGEST + 1];
  static final int[] EXPONENT = new int[LARGEST + 1];

  static {
    DD product = DD.ONE;
    int exponent = 0;
    MANTISSA[0] = 1;
    for (int n = 1; n <= LARGEST; n++) {
      product = product.multiply(n);
      int shift = Math.getExponent(product.hi());
      product = product.scalb(-shift);
      exponent += shift;
      MANTISSA[n] = product.hi();
      EXPONENT[n] = exponent;
    }
  }

  private Factorials() {}

  /** n! exactly. */
  static BigInteger exact(int n) {
    return n <= Exact.LARGEST
        ? Exact.TABLE[n]
        : Exact.TABLE[Exact.LARGEST].multiply(rangeProduct(Exact.LARGEST + 1, n));
  }

  /** The product first·(first+1)·...·last, split in halves so that the factors stay balanced. */
  private static BigInteger rangeProduct(int first, int last) {
    if (first == last) {
      return BigInteger.valueOf(first);
    }
    int middle = (first + last) >>> 1;
    return rangeProduct(first, middle).multiply(rangeProduct(middle + 1, last));
  }

  /** Exact factorials, built when the first exact symbol is asked for. */
  private static final class Exact {

    static final int LARGEST = 512;
    static final BigInteger[] TABLE = new BigInteger[LARGEST + 1];

    static {
      TABLE[0] = BigInteger.ONE;
      for (int n = 1; n <= LARGEST; n++) {
        TABLE[n] = TABLE[n - 1].multiply(BigInteger.valueOf(n));
      }
    }
  }
}
