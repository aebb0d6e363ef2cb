package org.toprung.angular;

/**
 * 3j and 6j symbols as {@code double}: Racah's alternating sums in exact integer arithmetic, so
 * that their cancellation costs no digits, times a root of factorials, which are products of
 * positive numbers. Arguments are doubled and have passed the selection rules.
 *
 * <p>With the ratio of successive terms n/d, d and n products of small integers, the sum in units
 * of its first term is h(first) of the nest h(k) = 1 − n(k)/d(k) · h(k+1), h(last) = 1. Written as
 * h = N/D it needs no division: N(k) = d(k) D(k+1) − n(k) N(k+1), D(k) = d(k) D(k+1). N and D start
 * in two {@code long}s; when these fill up they move to two's complement numbers of as many 64-bit
 * limbs as needed. The result has an error of a few units in the last place, and is exactly zero
 * when the symbol is.
 */
final class RacahSum {

  /** N in the lower half, D in the upper half; grown on demand, bounded by the largest j. */
  private static final ThreadLocal<long[]> SCRATCH = ThreadLocal.withInitial(() -> new long[128]);

  private RacahSum() {}

  /**
   * 3j symbol (formula in {@link ExactWigner#threeJ}): with a, b, c, x, y as there and the first
   * term 1/(f! (a−f)! (x−f)! (y−f)! (b−x+f)! (c−y+f)!), f = first.
   */
  static double threeJ(int tj1, int tj2, int tj3, int tm1, int tm2, int tm3) {
    int a = (tj1 + tj2 - tj3) >> 1;
    int b = (tj1 - tj2 + tj3) >> 1;
    int c = (tj2 + tj3 - tj1) >> 1;
    int x = (tj1 - tm1) >> 1;
    int y = (tj2 + tm2) >> 1;
    int p2 = x - b;
    int p3 = y - c;
    int first = Math.max(0, Math.max(p2, p3));
    int last = Math.min(a, Math.min(x, y));
    int u = (tj1 + tm1) >> 1;
    int v = (tj2 - tm2) >> 1;
    int w = (tj3 + tm3) >> 1;
    int s = (tj3 - tm3) >> 1;
    int perimeter = a + b + c + 1;
    double[] m = Factorials.MANTISSA;
    int[] e = Factorials.EXPONENT;
    double square =
        (m[x] * m[u]) * (m[y] * m[v]) * ((m[w] * m[s]) * (m[a] * m[b])) * (m[c] / m[perimeter]);
    int squareExponent =
        e[x] + e[u] + e[y] + e[v] + e[w] + e[s] + e[a] + e[b] + e[c] - e[perimeter];
    double divisor =
        (m[first] * m[a - first]) * (m[x - first] * m[y - first]) * (m[first - p2] * m[first - p3]);
    int divisorExponent =
        e[first] + e[a - first] + e[x - first] + e[y - first] + e[first - p2] + e[first - p3];
    double phase = ((((tj1 - tj2 - tm3) >> 1) + first) & 1) == 0 ? 1 : -1;
    return sum(
        false,
        first,
        last,
        a,
        x,
        y,
        0,
        p2,
        p3,
        0,
        phase * root(square, squareExponent),
        divisor,
        (squareExponent >> 1) - divisorExponent);
  }

  /**
   * 6j symbol {a b c; d e f}: Δ(abc) Δ(aef) Δ(dbf) Δ(dec) Σ (−1)^t (t+1)! / (Π (t−p)! Π (q−t)!),
   * with Δ² = (a+b−c)! (a−b+c)! (−a+b+c)!/(a+b+c+1)!, p the perimeters of the four triangles and q
   * the sums over the three pairs of columns. Varshalovich et al. 9.2.1 (1); Edmonds (6.3.7).
   */
  static double sixJ(int ta, int tb, int tc, int td, int te, int tf) {
    int p1 = (ta + tb + tc) >> 1;
    int p2 = (ta + te + tf) >> 1;
    int p3 = (td + tb + tf) >> 1;
    int p4 = (td + te + tc) >> 1;
    int q1 = (ta + tb + td + te) >> 1;
    int q2 = (tb + tc + te + tf) >> 1;
    int q3 = (ta + tc + td + tf) >> 1;
    int first = Math.max(Math.max(p1, p2), Math.max(p3, p4));
    int last = Math.min(q1, Math.min(q2, q3));
    double[] m = Factorials.MANTISSA;
    int[] e = Factorials.EXPONENT;
    // The twelve lengths of the Δ are the differences of the q and the p.
    double square =
        (m[q1 - p1] * m[q2 - p1] * m[q3 - p1])
            * (m[q1 - p2] * m[q2 - p2] * m[q3 - p2])
            * ((m[q1 - p3] * m[q2 - p3] * m[q3 - p3]) * (m[q1 - p4] * m[q2 - p4] * m[q3 - p4]))
            / ((m[p1 + 1] * m[p2 + 1]) * (m[p3 + 1] * m[p4 + 1]));
    int squareExponent =
        e[q1 - p1]
            + e[q2 - p1]
            + e[q3 - p1]
            - e[p1 + 1]
            + e[q1 - p2]
            + e[q2 - p2]
            + e[q3 - p2]
            - e[p2 + 1]
            + e[q1 - p3]
            + e[q2 - p3]
            + e[q3 - p3]
            - e[p3 + 1]
            + e[q1 - p4]
            + e[q2 - p4]
            + e[q3 - p4]
            - e[p4 + 1];
    double divisor =
        (m[first - p1] * m[first - p2])
            * (m[first - p3] * m[first - p4])
            * (m[q1 - first] * m[q2 - first] * m[q3 - first]);
    int divisorExponent =
        e[first - p1]
            + e[first - p2]
            + e[first - p3]
            + e[first - p4]
            + e[q1 - first]
            + e[q2 - first]
            + e[q3 - first];
    double top = (first & 1) == 0 ? m[first + 1] : -m[first + 1];
    return sum(
        true,
        first,
        last,
        q1,
        q2,
        q3,
        p1,
        p2,
        p3,
        p4,
        top * root(square, squareExponent),
        divisor,
        (squareExponent >> 1) + e[first + 1] - divisorExponent);
  }

  /** √(square·2^exponent) without the factor 2^⌊exponent/2⌋. */
  private static double root(double square, int exponent) {
    return Math.sqrt((exponent & 1) == 0 ? square : 2 * square);
  }

  /**
   * factor/divisor·2^exponent·N/D for terms of ratio n/d = (t+2)(q1−t)(q2−t)(q3−t) /
   * ((t+1−p1)(t+1−p2)(t+1−p3) (t+1−p4)); without the factors t+2 and t+1−p4 for a 3j symbol.
   */
  private static double sum(
      boolean six,
      int first,
      int last,
      int q1,
      int q2,
      int q3,
      int p1,
      int p2,
      int p3,
      int p4,
      double factor,
      double divisor,
      int exponent) {
    long numerator = 1;
    long denominator = 1;
    for (int t = last - 1; t >= first; t--) {
      long n = (long) (q1 - t) * (q2 - t) * (q3 - t);
      long d = (long) (t + 1 - p1) * (t + 1 - p2) * (t + 1 - p3);
      if (six) {
        n *= t + 2;
        d *= t + 1 - p4;
      }
      // Both products must stay below 2^62, so that their difference fits.
      if (Long.numberOfLeadingZeros(d) + Long.numberOfLeadingZeros(denominator) < 66
          || Long.numberOfLeadingZeros(n) + Long.numberOfLeadingZeros(Math.abs(numerator)) < 66) {
        return longSum(
            six,
            first,
            t,
            q1,
            q2,
            q3,
            p1,
            p2,
            p3,
            p4,
            numerator,
            denominator,
            factor,
            divisor,
            exponent);
      }
      denominator *= d;
      numerator = denominator - n * numerator;
    }
    return scaled(factor * numerator / (divisor * denominator), exponent);
  }

  /** Goes on from t downwards in as many limbs as needed. */
  private static double longSum(
      boolean six,
      int first,
      int from,
      int q1,
      int q2,
      int q3,
      int p1,
      int p2,
      int p3,
      int p4,
      long numerator,
      long denominator,
      double factor,
      double divisor,
      int exponent) {
    // No factor of n or d exceeds this; the bit more per factor covers the difference of the
    // products.
    int largest =
        six
            ? from + 2
            : Math.max(
                Math.max(Math.max(q1, q2), q3) - first, from + 1 - Math.min(0, Math.min(p2, p3)));
    int bitsPerStep = (six ? 4 : 3) * (33 - Integer.numberOfLeadingZeros(largest));
    int half = (from - first + 1) * bitsPerStep / 64 + 4;
    long[] limbs = SCRATCH.get();
    if (limbs.length < 2 * half) {
      limbs = new long[2 * half];
      SCRATCH.set(limbs);
    }
    half = limbs.length >> 1;
    limbs[0] = numerator;
    limbs[half] = denominator;
    int size = 1;
    for (int t = from; t >= first; t--) {
      long n = (long) (q1 - t) * (q2 - t) * (q3 - t);
      long d = (long) (t + 1 - p1) * (t + 1 - p2) * (t + 1 - p3);
      if (six) {
        n *= t + 2;
        d *= t + 1 - p4;
      }
      size = step(limbs, half, size, n, d);
    }
    boolean negative = limbs[size - 1] < 0;
    if (negative) {
      negate(limbs, size);
    }
    int topN = top(limbs, 0, size);
    int topD = top(limbs, half, size);
    double ratio = leading(limbs, 0, topN) / (divisor * leading(limbs, half, topD));
    int shift =
        64 * (topN - topD)
            + Long.numberOfLeadingZeros(limbs[half + topD])
            - Long.numberOfLeadingZeros(limbs[topN]);
    return scaled(negative ? -factor * ratio : factor * ratio, exponent + shift);
  }

  /** D ← d·D, N ← d·D − n·N; returns the number of limbs, one more than before if it is needed. */
  static int step(long[] limbs, int half, int size, long n, long d) {
    long carryN = 0;
    long carryD = 0;
    long borrow = 0;
    long limbN = 0;
    long difference = 0;
    for (int i = 0; i < size; i++) {
      limbN = limbs[i];
      long limbD = limbs[half + i];
      long lowD = limbD * d;
      long sumD = lowD + carryD;
      carryD = unsignedHigh(limbD, d) + less(sumD, lowD);
      long lowN = limbN * n;
      long sumN = lowN + carryN;
      carryN = unsignedHigh(limbN, n) + less(sumN, lowN);
      long raw = sumD - sumN;
      difference = raw - borrow;
      borrow = less(sumD, sumN) | less(raw, borrow);
      limbs[half + i] = sumD;
      limbs[i] = difference;
    }
    // One limb more, D extended by zero and N by its sign.
    long top = carryD - (carryN + (limbN >> 63) * n) - borrow;
    if (carryD == 0 && top == difference >> 63) {
      return size;
    }
    limbs[half + size] = carryD;
    limbs[size] = top;
    return size + 1;
  }

  /** High half of the product of an unsigned limb and a factor below 2^63. */
  private static long unsignedHigh(long limb, long factor) {
    return Math.multiplyHigh(limb, factor) + (limb >> 63 & factor);
  }

  /** 1 if a &lt; b as unsigned numbers, else 0. */
  private static long less(long a, long b) {
    return Long.compareUnsigned(a, b) < 0 ? 1 : 0;
  }

  private static void negate(long[] limbs, int size) {
    long carry = 1;
    for (int i = 0; i < size; i++) {
      limbs[i] = ~limbs[i] + carry;
      carry = carry == 1 && limbs[i] == 0 ? 1 : 0;
    }
  }

  /** Index of the highest limb that is not zero; 0 if all are. */
  private static int top(long[] limbs, int offset, int size) {
    int top = size - 1;
    while (top > 0 && limbs[offset + top] == 0) {
      top--;
    }
    return top;
  }

  /** The leading 63 bits, shifted to the top: from 2^62 to 2^63, or 0. */
  private static double leading(long[] limbs, int offset, int top) {
    long high = limbs[offset + top];
    int shift = Long.numberOfLeadingZeros(high);
    long bits = high << shift;
    if (shift > 0 && top > 0) {
      bits |= limbs[offset + top - 1] >>> (64 - shift);
    }
    return bits >>> 1;
  }

  /** value·2^exponent; a zero comes out without a sign. */
  private static double scaled(double value, int exponent) {
    return exponent > -1000 && exponent < 1000
        ? value * Double.longBitsToDouble((exponent + 1023L) << 52) + 0.0
        : Math.scalb(value, exponent) + 0.0;
  }
}
