package org.toprung.benchmarks;

import java.util.SplittableRandom;

/** Fixed lists of random valid arguments, long enough that no memo of the last call helps. */
final class WignerArguments {

  private static final int COUNT = 4096;

  private WignerArguments() {}

  /** Rows of six doubled arguments of 3j symbols that obey every selection rule. */
  static int[][] threeJ(int largestDoubled, long seed) {
    SplittableRandom random = new SplittableRandom(seed);
    int[][] rows = new int[COUNT][];
    for (int i = 0; i < COUNT; ) {
      int ta = random.nextInt(largestDoubled + 1);
      int tb = random.nextInt(largestDoubled + 1);
      int tc = third(random, ta, tb, largestDoubled);
      int tma = 2 * random.nextInt(ta + 1) - ta;
      int tmb = 2 * random.nextInt(tb + 1) - tb;
      if (tc >= 0 && Math.abs(tma + tmb) <= tc) {
        rows[i++] = new int[] {ta, tb, tc, tma, tmb, -tma - tmb};
      }
    }
    return rows;
  }

  /** Rows of six doubled arguments of 6j symbols that obey every selection rule. */
  static int[][] sixJ(int largestDoubled, long seed) {
    SplittableRandom random = new SplittableRandom(seed);
    int[][] rows = new int[COUNT][];
    for (int i = 0; i < COUNT; ) {
      int ta = random.nextInt(largestDoubled + 1);
      int tb = random.nextInt(largestDoubled + 1);
      int tc = third(random, ta, tb, largestDoubled);
      int td = random.nextInt(largestDoubled + 1);
      int te = tc < 0 ? -1 : third(random, td, tc, largestDoubled);
      int tf = te < 0 ? -1 : third(random, ta, te, largestDoubled);
      if (tf >= 0 && ((td + tb + tf) & 1) == 0 && tf <= td + tb && tf >= Math.abs(td - tb)) {
        rows[i++] = new int[] {ta, tb, tc, td, te, tf};
      }
    }
    return rows;
  }

  /** Rows of nine doubled arguments of 9j symbols that obey every selection rule. */
  static int[][] nineJ(int largestDoubled, long seed) {
    SplittableRandom random = new SplittableRandom(seed);
    int[][] rows = new int[COUNT][];
    for (int i = 0; i < COUNT; ) {
      int ta = random.nextInt(largestDoubled + 1);
      int tb = random.nextInt(largestDoubled + 1);
      int td = random.nextInt(largestDoubled + 1);
      int te = random.nextInt(largestDoubled + 1);
      int tc = third(random, ta, tb, largestDoubled);
      int tf = third(random, td, te, largestDoubled);
      int tg = third(random, ta, td, largestDoubled);
      int th = third(random, tb, te, largestDoubled);
      if (tc < 0 || tf < 0 || tg < 0 || th < 0) {
        continue;
      }
      int ti = third(random, tg, th, largestDoubled);
      if (ti >= Math.abs(tc - tf) && ti <= tc + tf && ((ti ^ tc ^ tf) & 1) == 0) {
        rows[i++] = new int[] {ta, tb, tc, td, te, tf, tg, th, ti};
      }
    }
    return rows;
  }

  /** A third side, evenly from those allowed; negative if none is. */
  private static int third(SplittableRandom random, int ta, int tb, int largest) {
    int low = Math.abs(ta - tb);
    int high = Math.min(ta + tb, largest - ((largest ^ ta ^ tb) & 1));
    return high < low ? -1 : low + 2 * random.nextInt((high - low) / 2 + 1);
  }
}
