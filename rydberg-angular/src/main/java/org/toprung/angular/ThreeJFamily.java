package org.toprung.angular;

/**
 * All 3j symbols of a running angular momentum or a running projection, in one sweep into an array
 * of the caller.
 *
 * <p>The symbols obey a three-term recurrence in j1 or in m2 (references 1, 2). In the outer,
 * classically forbidden parts of the range it is stable only inwards; so one sweep runs upwards and
 * one downwards. They are joined halfway between the outermost maxima, and the whole is scaled to
 * one symbol from {@link Wigner#threeJDoubled}. Where the symbol is much smaller than the maxima
 * around it the recurrence has cancelled, and the symbol is taken from there too.
 *
 * <p>Accuracy: 10<sup>−11</sup> relative for angular momenta up to 500. Nothing is allocated; all
 * methods are safe for any number of threads, each with its own array.
 *
 * <ol>
 *   <li>K. Schulten, R. G. Gordon, Exact recursive evaluation of 3j- and 6j-coefficients for
 *       quantum-mechanical coupling of angular momenta, J. Math. Phys. 16, 1961 (1975),
 *       doi:10.1063/1.522426
 *   <li>J. H. Luscombe, M. Luban, Simplified recursive algorithm for Wigner 3j and 6j symbols,
 *       Phys. Rev. E 57, 7274 (1998), doi:10.1103/PhysRevE.57.7274
 * </ol>
 */
public final class ThreeJFamily {

  /** Entries are scaled down by its inverse when one exceeds it, far from overflow. */
  private static final double LARGE = 0x1p600;

  /** A symbol below this part of the maxima around it is evaluated on its own. */
  private static final double CANCELLED = 0x1p-6;

  private ThreeJFamily() {}

  /**
   * Returns twice the lowest j1 for which (j1 j2 j3; −m2−m3 m2 m3) can differ from zero:
   * max(|j2−j3|, |m2+m3|).
   *
   * @param tj2 2·j2
   * @param tj3 2·j3
   * @param tm2 2·m2
   * @param tm3 2·m3
   * @return 2·j1 of the first entry of {@link #overJ1Doubled}
   */
  public static int lowestJ1Doubled(int tj2, int tj3, int tm2, int tm3) {
    return Math.max(Math.abs(tj2 - tj3), Math.abs(tm2 + tm3));
  }

  /**
   * Fills an array with the 3j symbols (j1 j2 j3; −m2−m3 m2 m3) of all j1 from {@link
   * #lowestJ1Doubled} to j2+j3, in steps of 1.
   *
   * @param tj2 2·j2
   * @param tj3 2·j3
   * @param tm2 2·m2
   * @param tm3 2·m3
   * @param symbols (output) the symbols from index 0; entries beyond the last symbol are left alone
   * @return the number of symbols: j2+j3−lowest+1, or 0 if m2 or m3 is no projection of j2 or j3
   * @throws IllegalArgumentException if an angular momentum is negative or j2 + j3 is above the
   *     supported range, or if the array is too short
   */
  public static int overJ1Doubled(int tj2, int tj3, int tm2, int tm3, double[] symbols) {
    Wigner.requireRange(tj2, tj3, tj2 + tj3);
    if (!isProjection(tj2, tm2) || !isProjection(tj3, tm3)) {
      return 0;
    }
    int lowest = lowestJ1Doubled(tj2, tj3, tm2, tm3);
    int count = (tj2 + tj3 - lowest) / 2 + 1;
    requireRoom(symbols, count);
    fill(true, lowest, tj2, tj3, tm2, tm3, symbols, count);
    return count;
  }

  /**
   * Returns twice the lowest m2 for which (j1 j2 j3; m1 m2 −m1−m2) can differ from zero: max(−j2,
   * −j3−m1).
   *
   * @param tj2 2·j2
   * @param tj3 2·j3
   * @param tm1 2·m1
   * @return 2·m2 of the first entry of {@link #overM2Doubled}
   */
  public static int lowestM2Doubled(int tj2, int tj3, int tm1) {
    return Math.max(-tj2, -tj3 - tm1);
  }

  /**
   * Fills an array with the 3j symbols (j1 j2 j3; m1 m2 −m1−m2) of all m2 from {@link
   * #lowestM2Doubled} to min(j2, j3−m1), in steps of 1.
   *
   * @param tj1 2·j1
   * @param tj2 2·j2
   * @param tj3 2·j3
   * @param tm1 2·m1
   * @param symbols (output) the symbols from index 0; entries beyond the last symbol are left alone
   * @return the number of symbols, or 0 if the angular momenta form no triangle or m1 is no
   *     projection of j1
   * @throws IllegalArgumentException if an angular momentum is negative or above the supported
   *     range, or if the array is too short
   */
  public static int overM2Doubled(int tj1, int tj2, int tj3, int tm1, double[] symbols) {
    Wigner.requireRange(tj1, tj2, tj3);
    if (!Wigner.isTriangle(tj1, tj2, tj3) || !isProjection(tj1, tm1)) {
      return 0;
    }
    int lowest = lowestM2Doubled(tj2, tj3, tm1);
    int count = (Math.min(tj2, tj3 - tm1) - lowest) / 2 + 1;
    requireRoom(symbols, count);
    fill(false, lowest, tj1, tj2, tj3, tm1, symbols, count);
    return count;
  }

  private static boolean isProjection(int tj, int tm) {
    return Wigner.isProjection(tj, tm);
  }

  private static void requireRoom(double[] symbols, int count) {
    if (symbols.length < count) {
      throw new IllegalArgumentException(
          "array of " + symbols.length + " is too short for " + count + " symbols");
    }
  }

  /**
   * Both sweeps. The family is (j2, j3, m2, m3) for a running j1, (j1, j2, j3, m1) for a running
   * m2; t = lowest + 2i is twice the running number of entry i.
   */
  private static void fill(
      boolean overJ, int lowest, int a, int b, int c, int d, double[] f, int count) {
    int last = count - 1;
    f[last] = 1;
    int high = sweepDown(overJ, lowest, a, b, c, d, f, last);
    if (high > 0) {
      sweepUpAndJoin(overJ, lowest, a, b, c, d, f, last, high);
    }
    int anchor = 0;
    for (int i = 1; i <= last; i++) {
      if (Math.abs(f[i]) > Math.abs(f[anchor])) {
        anchor = i;
      }
    }
    scale(f, 0, last, symbol(overJ, lowest + 2 * anchor, a, b, c, d) / f[anchor]);
    int left = 0;
    int right = nextMaximum(f, 0, last);
    for (int i = 1; i < last; i++) {
      if (i > right) {
        left = right;
        right = nextMaximum(f, right, last);
      }
      double maxima = Math.min(Math.abs(f[left]), Math.abs(f[right]));
      if (f[i] != 0 && Math.abs(f[i]) < CANCELLED * maxima) {
        f[i] = symbol(overJ, lowest + 2 * i, a, b, c, d);
      }
    }
  }

  /** Index of the next local maximum of the modulus above a maximum or the first entry. */
  private static int nextMaximum(double[] f, int from, int last) {
    int i = from;
    while (i < last && Math.abs(f[i + 1]) < Math.abs(f[i])) {
      i++;
    }
    while (i < last && Math.abs(f[i + 1]) >= Math.abs(f[i])) {
      i++;
    }
    return i;
  }

  /** Runs down from the last entry to the first maximum; returns its index. */
  private static int sweepDown(
      boolean overJ, int lowest, int a, int b, int c, int d, double[] f, int last) {
    for (int i = last; i > 0; i--) {
      double value = entryBelow(overJ, lowest, i, a, b, c, d, f, last);
      if (Math.abs(value) < Math.abs(f[i])) {
        return i;
      }
      f[i - 1] = value;
      if (Math.abs(value) > LARGE) {
        scale(f, i - 1, last, 1 / LARGE);
      }
    }
    return 0;
  }

  /**
   * Runs up from the first entry to a maximum halfway between the outermost ones, since rounding
   * builds up with the square of the distance; then goes on with the sweep downwards to meet it
   * there.
   */
  private static void sweepUpAndJoin(
      boolean overJ, int lowest, int a, int b, int c, int d, double[] f, int last, int high) {
    f[0] = 1;
    int middle = -1;
    int meeting = 0;
    double upNext;
    while (true) {
      upNext = entryAbove(overJ, lowest, meeting, a, b, c, d, f);
      if (Math.abs(upNext) < Math.abs(f[meeting])) {
        if (middle < 0) {
          middle = (meeting + high) / 2;
        }
        if (meeting >= middle) {
          break;
        }
      }
      if (meeting + 1 == high) {
        break;
      }
      meeting++;
      f[meeting] = upNext;
      if (Math.abs(upNext) > LARGE) {
        scale(f, 0, meeting, 1 / LARGE);
      }
    }
    double up = f[meeting];
    for (int i = high; i > meeting + 1; i--) {
      f[i - 1] = entryBelow(overJ, lowest, i, a, b, c, d, f, last);
    }
    double downNext = f[meeting + 1];
    double down = entryBelow(overJ, lowest, meeting + 1, a, b, c, d, f, last);
    // Least squares over the two shared entries: one of them may be a zero of the symbol. Ratios,
    // so
    // that squares of large entries cannot overflow.
    double size = Math.max(Math.abs(down), Math.abs(downNext));
    double p = down / size;
    double n = downNext / size;
    scale(f, meeting + 1, last, (up * p + upNext * n) / (p * p + n * n) / size);
  }

  /** Entry i − 1 from entries i and i + 1. */
  private static double entryBelow(
      boolean overJ, int lowest, int i, int a, int b, int c, int d, double[] f, int last) {
    int t = lowest + 2 * i;
    double sum = middle(overJ, t, a, b, c, d) * f[i];
    if (i < last) {
      sum += upperFactor(overJ, t) * link(overJ, t + 2, a, b, c, d) * f[i + 1];
    }
    return -sum / (lowerFactor(overJ, t) * link(overJ, t, a, b, c, d));
  }

  /** Entry i + 1 from entries i and i − 1. */
  private static double entryAbove(
      boolean overJ, int lowest, int i, int a, int b, int c, int d, double[] f) {
    int t = lowest + 2 * i;
    if (t == 0 && overJ) {
      // The recurrence is empty at j1 = 0; (1 j j; 0 m −m)/(0 j j; 0 m −m) = m/√(j(j+1)).
      return f[0] * c / Math.sqrt(a * (a + 2.0));
    }
    double sum = middle(overJ, t, a, b, c, d) * f[i];
    if (i > 0) {
      sum += lowerFactor(overJ, t) * link(overJ, t, a, b, c, d) * f[i - 1];
    }
    return -sum / (upperFactor(overJ, t) * link(overJ, t + 2, a, b, c, d));
  }

  private static void scale(double[] f, int from, int to, double factor) {
    for (int i = from; i <= to; i++) {
      f[i] = f[i] * factor + 0.0; // no negative zeros
    }
  }

  private static double symbol(boolean overJ, int t, int a, int b, int c, int d) {
    return overJ ? RacahSum.threeJ(t, a, b, -c - d, c, d) : RacahSum.threeJ(a, b, c, d, t, -d - t);
  }

  /**
   * The coefficient that links an entry to the one below: A(j) = √((j²−(j2−j3)²) ((j2+j3+1)²−j²)
   * (j²−m1²)), times 8, or C(m2) = √((j2−m2+1) (j2+m2) (j3+m3+1) (j3−m3)), times 4.
   */
  private static double link(boolean overJ, int t, int a, int b, int c, int d) {
    if (overJ) {
      double difference = a - b;
      double sum = a + b + 2.0;
      double m1 = c + d;
      return Math.sqrt(
          (t - difference) * (t + difference) * ((sum - t) * (sum + t)) * ((t - m1) * (t + m1)));
    }
    double m3 = -d - t;
    return Math.sqrt((b - t + 2.0) * (b + t) * ((c + m3 + 2) * (c - m3)));
  }

  /**
   * B(j) = −(2j+1) (j2(j2+1) m1 − j3(j3+1) m1 − j(j+1) (m3−m2)), times 8, or D(m2) = j2(j2+1) +
   * j3(j3+1) − j1(j1+1) + 2 m2 m3, times 4.
   */
  private static double middle(boolean overJ, int t, int a, int b, int c, int d) {
    if (overJ) {
      double m1 = -c - d;
      double difference = (double) (a - b) * (a + b + 2);
      return -(t + 1.0) * (difference * m1 - t * (t + 2.0) * (d - c));
    }
    double m3 = -d - t;
    return b * (b + 2.0) + c * (c + 2.0) - a * (a + 2.0) + 2 * t * m3;
  }

  /** Factor of the link upwards: j, or 1. */
  private static double upperFactor(boolean overJ, int t) {
    return overJ ? t / 2.0 : 1;
  }

  /** Factor of the link downwards: j + 1, or 1. */
  private static double lowerFactor(boolean overJ, int t) {
    return overJ ? t / 2.0 + 1 : 1;
  }
}
