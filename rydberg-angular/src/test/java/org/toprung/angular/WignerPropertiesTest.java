package org.toprung.angular;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Arrays;
import java.util.SplittableRandom;
import net.jqwik.api.Arbitraries;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import org.junit.jupiter.api.Test;

/**
 * Exact laws of the symbols, Varshalovich et al. chapters 8 to 10 and Edmonds chapters 3 and 6.
 * Doubled angular momenta up to 200, integers and half-integers mixed.
 */
class WignerPropertiesTest {

  /** Two evaluations of one symbol, each with a few roundings. */
  private static final double SAME = 6e-15;

  private static final int[] SIZES = {4, 12, 60, 200};

  @Provide
  Arbitrary<int[]> threeJ() {
    return Arbitraries.randomValue(
        r -> RandomArguments.threeJ(new SplittableRandom(r.nextLong()), SIZES[r.nextInt(4)]));
  }

  @Provide
  Arbitrary<int[]> sixJ() {
    return Arbitraries.randomValue(
        r -> RandomArguments.sixJ(new SplittableRandom(r.nextLong()), SIZES[r.nextInt(4)]));
  }

  @Provide
  Arbitrary<int[]> nineJ() {
    return Arbitraries.randomValue(
        r -> RandomArguments.nineJ(new SplittableRandom(r.nextLong()), SIZES[r.nextInt(3)]));
  }

  @Provide
  Arbitrary<int[]> smallNineJ() {
    return Arbitraries.randomValue(
        r -> RandomArguments.nineJ(new SplittableRandom(r.nextLong()), r.nextBoolean() ? 4 : 9));
  }

  private static double threeJ(int... a) {
    return Wigner.threeJDoubled(a[0], a[1], a[2], a[3], a[4], a[5]);
  }

  private static double sixJ(int... a) {
    return Wigner.sixJDoubled(a[0], a[1], a[2], a[3], a[4], a[5]);
  }

  private static double nineJ(int... a) {
    return Wigner.nineJDoubled(a[0], a[1], a[2], a[3], a[4], a[5], a[6], a[7], a[8]);
  }

  private static int sign(int doubled) {
    return (doubled / 2 & 1) == 0 ? 1 : -1;
  }

  private static void assertSame(double expected, double value) {
    assertEquals(expected, value, SAME * Math.abs(expected));
  }

  @Property(seed = "31", tries = 400)
  void columnsOfThreeJPermute(@ForAll("threeJ") int[] a) {
    double value = threeJ(a);
    int odd = sign(a[0] + a[1] + a[2]);
    assertSame(value, threeJ(a[1], a[2], a[0], a[4], a[5], a[3]));
    assertSame(value, threeJ(a[2], a[0], a[1], a[5], a[3], a[4]));
    assertSame(odd * value, threeJ(a[1], a[0], a[2], a[4], a[3], a[5]));
    assertSame(odd * value, threeJ(a[0], a[2], a[1], a[3], a[5], a[4]));
    assertSame(odd * value, threeJ(a[0], a[1], a[2], -a[3], -a[4], -a[5]));
  }

  /**
   * Regge, Nuovo Cimento 10, 544 (1958): rows and columns of the square permute, and it transposes.
   */
  @Property(seed = "32", tries = 400)
  void reggeSymmetriesOfThreeJ(@ForAll("threeJ") int[] a) {
    int[][] square = {
      {a[1] + a[2] - a[0], a[0] + a[2] - a[1], a[0] + a[1] - a[2]},
      {a[0] - a[3], a[1] - a[4], a[2] - a[5]},
      {a[0] + a[3], a[1] + a[4], a[2] + a[5]}
    };
    double value = threeJ(a);
    int odd = sign(a[0] + a[1] + a[2]);
    int[][] transposed = new int[3][3];
    for (int i = 0; i < 3; i++) {
      for (int k = 0; k < 3; k++) {
        transposed[i][k] = square[k][i];
      }
    }
    assertSame(value, ofSquare(transposed));
    assertSame(odd * value, ofSquare(new int[][] {square[1], square[0], square[2]}));
    assertSame(value, ofSquare(new int[][] {square[1], square[2], square[0]}));
    assertSame(odd * value, ofSquare(new int[][] {transposed[2], transposed[1], transposed[0]}));
  }

  private static double ofSquare(int[][] s) {
    return threeJ(
        (s[1][0] + s[2][0]) / 2,
        (s[1][1] + s[2][1]) / 2,
        (s[1][2] + s[2][2]) / 2,
        (s[2][0] - s[1][0]) / 2,
        (s[2][1] - s[1][1]) / 2,
        (s[2][2] - s[1][2]) / 2);
  }

  @Property(seed = "33", tries = 200)
  void threeJAreOrthogonalOverProjections(@ForAll("threeJ") int[] a) {
    int t1 = a[0];
    int t2 = a[1];
    int tm = -a[5];
    for (int t3 : new int[] {a[2], a[2] + 2}) {
      double sum = 0;
      for (int tm1 = -t1; tm1 <= t1; tm1 += 2) {
        sum += threeJ(t1, t2, a[2], tm1, tm - tm1, -tm) * threeJ(t1, t2, t3, tm1, tm - tm1, -tm);
      }
      assertEquals(t3 == a[2] ? 1.0 / (t3 + 1) : 0, sum, 1e-14);
    }
  }

  @Property(seed = "34", tries = 200)
  void threeJAreCompleteOverTheThird(@ForAll("threeJ") int[] a) {
    int tm = a[3] + a[4];
    for (int tm1 : new int[] {a[3], a[3] + 2, a[3] - 4}) {
      double sum = 0;
      for (int t3 = Math.abs(a[0] - a[1]); t3 <= a[0] + a[1]; t3 += 2) {
        sum +=
            (t3 + 1)
                * threeJ(a[0], a[1], t3, a[3], a[4], -tm)
                * threeJ(a[0], a[1], t3, tm1, tm - tm1, -tm);
      }
      assertEquals(tm1 == a[3] ? 1 : 0, sum, 2e-13);
    }
  }

  @Property(seed = "35", tries = 200)
  void clebschGordanCoefficientsAreCompleteAndFollowTheThreeJ(@ForAll("threeJ") int[] a) {
    double sum = 0;
    for (int t = Math.abs(a[0] - a[1]); t <= a[0] + a[1]; t += 2) {
      double c = Wigner.clebschGordanDoubled(a[0], a[3], a[1], a[4], t, a[3] + a[4]);
      sum += c * c;
    }
    assertEquals(1, sum, 2e-13);
    double c = Wigner.clebschGordanDoubled(a[0], a[3], a[1], a[4], a[2], -a[5]);
    assertSame(sign(a[0] - a[1] - a[5]) * Math.sqrt(a[2] + 1.0) * threeJ(a), c);
    assertSame(
        Wigner.exactClebschGordanDoubled(a[0], a[3], a[1], a[4], a[2], -a[5]).doubleValue(), c);
  }

  @Property(seed = "61", tries = 400)
  void columnsAndRowsOfSixJPermute(@ForAll("sixJ") int[] a) {
    double value = sixJ(a);
    assertSame(value, sixJ(a[1], a[2], a[0], a[4], a[5], a[3]));
    assertSame(value, sixJ(a[1], a[0], a[2], a[4], a[3], a[5]));
    assertSame(value, sixJ(a[3], a[4], a[2], a[0], a[1], a[5]));
    assertSame(value, sixJ(a[0], a[4], a[5], a[3], a[1], a[2]));
  }

  /** Regge, Nuovo Cimento 11, 116 (1959); Varshalovich et al. 9.4.2 (4). */
  @Property(seed = "62", tries = 400)
  void reggeSymmetryOfSixJ(@ForAll("sixJ") int[] a) {
    int s = (a[1] + a[2] + a[4] + a[5]) / 2;
    if (((a[1] + a[2] + a[4] + a[5]) & 1) == 0) {
      assertSame(sixJ(a), sixJ(a[0], s - a[1], s - a[2], a[3], s - a[4], s - a[5]));
    }
  }

  /** Varshalovich et al. 9.8 (3). */
  @Property(seed = "63", tries = 200)
  void sixJAreOrthogonal(@ForAll("sixJ") int[] s) {
    int a = s[0];
    int b = s[1];
    int c = s[3];
    int d = s[4];
    int p = s[5];
    for (int q : new int[] {p, p + 2}) {
      double sum = 0;
      for (int x = Math.abs(a - b); x <= a + b; x += 2) {
        sum += (x + 1) * sixJ(a, b, x, c, d, p) * sixJ(c, d, x, a, b, q);
      }
      assertEquals(p == q ? 1.0 / (p + 1) : 0, sum, 1e-13);
    }
  }

  /** Racah's back-coupling rule, Varshalovich et al. 9.8 (4); Edmonds (6.2.11). */
  @Property(seed = "64", tries = 200)
  void racahBackcoupling(@ForAll("sixJ") int[] s) {
    int a = s[0];
    int c = s[1];
    int q = s[2];
    int b = s[3];
    int d = s[4];
    int p = s[5];
    double sum = 0;
    for (int x = Math.abs(a - b); x <= a + b; x += 2) {
      sum += sign(p + q + x) * (x + 1) * sixJ(a, b, x, c, d, p) * sixJ(c, d, x, b, a, q);
    }
    assertEquals(sixJ(s), sum, 1e-13);
  }

  /** Varshalovich et al. 9.8 (5); Edmonds (6.2.12). */
  @Property(seed = "65", tries = 200)
  void biedenharnElliott(@ForAll("sixJ") int[] s, @ForAll long seed) {
    int p = s[0];
    int q = s[1];
    int r = s[2];
    int e = s[3];
    int a = s[4];
    int d = s[5];
    int[] fbc = secondSixJ(new SplittableRandom(seed), p, q, r);
    int f = fbc[0];
    int b = fbc[1];
    int c = fbc[2];
    int total = a + b + c + d + e + f + p + q + r;
    double sum = 0;
    for (int x = Math.abs(a - b); x <= a + b; x += 2) {
      sum +=
          sign(total + x)
              * (x + 1)
              * sixJ(a, b, x, c, d, p)
              * sixJ(c, d, x, e, f, q)
              * sixJ(e, f, x, b, a, r);
    }
    assertEquals(sixJ(p, q, r, e, a, d) * sixJ(p, q, r, f, b, c), sum, 1e-14);
  }

  /** The lower row of a 6j symbol with the given upper row. */
  private static int[] secondSixJ(SplittableRandom random, int p, int q, int r) {
    int largest = Math.max(p, Math.max(q, r)) + 2;
    while (true) {
      int b = random.nextInt(largest + 1);
      int c = RandomArguments.third(random, p, b, largest + b);
      int f = RandomArguments.third(random, q, c, largest + c);
      if (Wigner.isTriangle(f, b, r)) {
        return new int[] {f, b, c};
      }
    }
  }

  @Property(seed = "66", tries = 200)
  void racahCoefficientsAreSixJWithASign(@ForAll("sixJ") int[] s) {
    // {a b e; d c f} = (−1)^(a+b+c+d) W(abcd; ef)
    double w = Wigner.racahWDoubled(s[0], s[1], s[4], s[3], s[2], s[5]);
    assertSame(sign(s[0] + s[1] + s[4] + s[3]) * sixJ(s), w);
    assertEquals(
        w,
        Wigner.racahW(
            HalfInteger.ofHalves(s[0]),
            HalfInteger.ofHalves(s[1]),
            HalfInteger.ofHalves(s[4]),
            HalfInteger.ofHalves(s[3]),
            HalfInteger.ofHalves(s[2]),
            HalfInteger.ofHalves(s[5])));
  }

  @Property(seed = "91", tries = 200)
  void nineJTransposesAndPermutes(@ForAll("nineJ") int[] a) {
    int odd = sign(a[0] + a[1] + a[2] + a[3] + a[4] + a[5] + a[6] + a[7] + a[8]);
    double value = nineJ(a);
    double tolerance = 1e-11 * Math.abs(value);
    assertEquals(value, nineJ(a[0], a[3], a[6], a[1], a[4], a[7], a[2], a[5], a[8]), tolerance);
    assertEquals(
        odd * value, nineJ(a[3], a[4], a[5], a[0], a[1], a[2], a[6], a[7], a[8]), tolerance);
    assertEquals(
        odd * value, nineJ(a[0], a[2], a[1], a[3], a[5], a[4], a[6], a[8], a[7]), tolerance);
    assertEquals(value, nineJ(a[6], a[7], a[8], a[0], a[1], a[2], a[3], a[4], a[5]), tolerance);
  }

  /** Varshalovich et al. 10.9.1 (1); Edmonds (6.4.14). */
  @Property(seed = "92", tries = 200)
  void nineJWithAZeroIsASixJ(@ForAll("sixJ") int[] s) {
    int a = s[0];
    int b = s[1];
    int c = s[2];
    int e = s[3];
    int d = s[4];
    int g = s[5];
    double expected = sign(b + c + d + g) * sixJ(s) / Math.sqrt((c + 1.0) * (g + 1.0));
    assertEquals(expected, nineJ(a, b, c, d, e, c, g, g, 0), 1e-11 * Math.abs(expected));
  }

  /** Varshalovich et al. 10.8.1: two ways to couple four angular momenta. */
  @Property(seed = "93", tries = 25)
  void nineJAreOrthogonal(@ForAll("smallNineJ") int[] s) {
    for (int c : new int[] {s[2], s[2] + 2}) {
      assertEquals(
          c == s[2] ? 1.0 / ((s[2] + 1) * (s[5] + 1)) : 0,
          nineJOverlap(s[0], s[1], s[2], s[3], s[4], s[5], s[8], c, s[5]),
          1e-13);
    }
  }

  @Test
  void nineJAreOrthogonalWithLargeAndSmallMembers() {
    assertEquals(1.0 / (191 * 200), nineJOverlap(190, 2, 190, 200, 3, 199, 103, 190, 199), 1e-13);
    assertEquals(0, nineJOverlap(190, 2, 190, 200, 3, 199, 103, 192, 199), 1e-13);
  }

  /** Σ_gh (2g+1)(2h+1) {a b c; d e f; g h i} {a b c′; d e f′; g h i}. */
  private static double nineJOverlap(
      int a, int b, int c, int d, int e, int f, int i, int c2, int f2) {
    double sum = 0;
    for (int g = Math.abs(a - d); g <= a + d; g += 2) {
      for (int h = Math.abs(b - e); h <= b + e; h += 2) {
        sum +=
            (g + 1.0)
                * (h + 1)
                * nineJ(a, b, c, d, e, f, g, h, i)
                * nineJ(a, b, c2, d, e, f2, g, h, i);
      }
    }
    return sum;
  }

  @Property(seed = "94", tries = 100)
  void halfIntegerFormsAreThoseOfDoubledArguments(
      @ForAll("threeJ") int[] t, @ForAll("sixJ") int[] s, @ForAll("smallNineJ") int[] n) {
    HalfInteger[] a = halves(t);
    assertEquals(threeJ(t), Wigner.threeJ(a[0], a[1], a[2], a[3], a[4], a[5]));
    assertEquals(
        Wigner.exactThreeJDoubled(t[0], t[1], t[2], t[3], t[4], t[5]),
        Wigner.exactThreeJ(a[0], a[1], a[2], a[3], a[4], a[5]));
    assertEquals(
        Wigner.clebschGordanDoubled(t[0], t[3], t[1], t[4], t[2], -t[5]),
        Wigner.clebschGordan(a[0], a[3], a[1], a[4], a[2], a[5].negate()));
    assertEquals(
        Wigner.exactClebschGordanDoubled(t[0], t[3], t[1], t[4], t[2], -t[5]),
        Wigner.exactClebschGordan(a[0], a[3], a[1], a[4], a[2], a[5].negate()));
    assertTrue(Wigner.threeJViolation(a[0], a[1], a[2], a[3], a[4], a[5]).isEmpty());
    HalfInteger[] b = halves(s);
    assertEquals(sixJ(s), Wigner.sixJ(b[0], b[1], b[2], b[3], b[4], b[5]));
    assertEquals(
        Wigner.exactSixJDoubled(s[0], s[1], s[2], s[3], s[4], s[5]),
        Wigner.exactSixJ(b[0], b[1], b[2], b[3], b[4], b[5]));
    assertTrue(Wigner.sixJViolation(b[0], b[1], b[2], b[3], b[4], b[5]).isEmpty());
    HalfInteger[] c = halves(n);
    assertEquals(nineJ(n), Wigner.nineJ(c[0], c[1], c[2], c[3], c[4], c[5], c[6], c[7], c[8]));
    assertEquals(
        Wigner.exactNineJDoubled(n[0], n[1], n[2], n[3], n[4], n[5], n[6], n[7], n[8]),
        Wigner.exactNineJ(c[0], c[1], c[2], c[3], c[4], c[5], c[6], c[7], c[8]));
    assertTrue(
        Wigner.nineJViolation(c[0], c[1], c[2], c[3], c[4], c[5], c[6], c[7], c[8]).isEmpty());
  }

  private static HalfInteger[] halves(int[] doubled) {
    return Arrays.stream(doubled).mapToObj(HalfInteger::ofHalves).toArray(HalfInteger[]::new);
  }
}
