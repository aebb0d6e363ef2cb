package org.toprung.angular;

import java.util.SplittableRandom;

/** Random doubled arguments that obey every selection rule. */
final class RandomArguments {

  private RandomArguments() {}

  static int[] threeJ(SplittableRandom random, int largest) {
    while (true) {
      int ta = random.nextInt(largest + 1);
      int tb = random.nextInt(largest + 1);
      int tc = third(random, ta, tb, largest);
      int tma = projection(random, ta);
      int tmb = projection(random, tb);
      if (tc >= 0 && Math.abs(tma + tmb) <= tc) {
        return new int[] {ta, tb, tc, tma, tmb, -tma - tmb};
      }
    }
  }

  static int[] sixJ(SplittableRandom random, int largest) {
    while (true) {
      int ta = random.nextInt(largest + 1);
      int tb = random.nextInt(largest + 1);
      int td = random.nextInt(largest + 1);
      int tc = third(random, ta, tb, largest);
      int te = tc < 0 ? -1 : third(random, td, tc, largest);
      int tf = te < 0 ? -1 : third(random, ta, te, largest);
      if (tf >= 0 && Wigner.isTriangle(td, tb, tf)) {
        return new int[] {ta, tb, tc, td, te, tf};
      }
    }
  }

  static int[] nineJ(SplittableRandom random, int largest) {
    while (true) {
      int ta = random.nextInt(largest + 1);
      int tb = random.nextInt(largest + 1);
      int td = random.nextInt(largest + 1);
      int te = random.nextInt(largest + 1);
      int tc = third(random, ta, tb, largest);
      int tf = third(random, td, te, largest);
      int tg = third(random, ta, td, largest);
      int th = third(random, tb, te, largest);
      if (tc < 0 || tf < 0 || tg < 0 || th < 0) {
        continue;
      }
      int ti = third(random, tg, th, largest);
      if (ti >= 0 && Wigner.isTriangle(tc, tf, ti)) {
        return new int[] {ta, tb, tc, td, te, tf, tg, th, ti};
      }
    }
  }

  static int projection(SplittableRandom random, int tj) {
    return 2 * random.nextInt(tj + 1) - tj;
  }

  /** A third side, evenly from those allowed; negative if none is. */
  static int third(SplittableRandom random, int ta, int tb, int largest) {
    int low = Math.abs(ta - tb);
    int high = Math.min(ta + tb, largest - ((largest ^ ta ^ tb) & 1));
    return high < low ? -1 : low + 2 * random.nextInt((high - low) / 2 + 1);
  }
}
