package org.toprung.angular;

import java.math.BigInteger;

/**
 * Racah's sums in exact integer arithmetic. Arguments are doubled and have passed the selection
 * rules.
 */
final class ExactWigner {

  private ExactWigner() {}

  /**
   * 3j symbol: (−1)^(j1−j2−m3) √(Π(j±m)! / ((J+1)! a! b! c!)) · S with a = j1+j2−j3, b = j1−j2+j3,
   * c = −j1+j2+j3, J = a+b+c and the integer S = Σ (−1)^z C(a, z) C(b, j1−m1−z) C(c, j2+m2−z).
   * Varshalovich, Moskalev and Khersonskii, Quantum Theory of Angular Momentum (1988), 8.2.1 (3).
   */
  static SignedRoot threeJ(int tj1, int tj2, int tj3, int tm1, int tm2, int tm3) {
    int a = (tj1 + tj2 - tj3) / 2;
    int b = (tj1 - tj2 + tj3) / 2;
    int c = (-tj1 + tj2 + tj3) / 2;
    int x = (tj1 - tm1) / 2;
    int y = (tj2 + tm2) / 2;
    int first = Math.max(0, Math.max(x - b, y - c));
    int last = Math.min(a, Math.min(x, y));
    BigInteger term =
        binomial(a, first).multiply(binomial(b, x - first)).multiply(binomial(c, y - first));
    BigInteger sum = BigInteger.ZERO;
    for (int z = first; z <= last; z++) {
      sum = (z & 1) == 0 ? sum.add(term) : sum.subtract(term);
      term =
          term.multiply(
                  BigInteger.valueOf((long) (a - z) * (x - z)).multiply(BigInteger.valueOf(y - z)))
              .divide(
                  BigInteger.valueOf((long) (z + 1) * (b - x + z + 1))
                      .multiply(BigInteger.valueOf(c - y + z + 1)));
    }
    BigInteger numerator =
        product(
            factorial((tj1 + tm1) / 2),
            factorial((tj1 - tm1) / 2),
            factorial((tj2 + tm2) / 2),
            factorial((tj2 - tm2) / 2),
            factorial((tj3 + tm3) / 2),
            factorial((tj3 - tm3) / 2));
    BigInteger denominator =
        product(factorial(a + b + c + 1), factorial(a), factorial(b), factorial(c));
    int phase = ((tj1 - tj2 - tm3) / 2 & 1) == 0 ? 1 : -1;
    return root(phase, sum, numerator, denominator);
  }

  /**
   * 6j symbol {a b c; d e f}: Δ(aef) Δ(dbf) Δ(dec)/Δ(abc) · S with the integer S = Σ (−1)^t C(t+1,
   * a+b+c+1) C(a+b−c, t−d−e−c) C(b+c−a, t−a−e−f) C(a+c−b, t−d−b−f), which is Racah's sum,
   * Varshalovich et al. 9.2.1 (1), with its factorials collected into binomials.
   */
  static SignedRoot sixJ(int ta, int tb, int tc, int td, int te, int tf) {
    BigInteger sum = sixJSum(ta, tb, tc, td, te, tf);
    BigInteger numerator =
        product(
            triangleNumerator(ta, te, tf),
            triangleNumerator(td, tb, tf),
            triangleNumerator(td, te, tc),
            factorial((ta + tb + tc) / 2 + 1));
    BigInteger denominator =
        product(
            factorial((ta + te + tf) / 2 + 1),
            factorial((td + tb + tf) / 2 + 1),
            factorial((td + te + tc) / 2 + 1),
            triangleNumerator(ta, tb, tc));
    return root(1, sum, numerator, denominator);
  }

  private static BigInteger sixJSum(int ta, int tb, int tc, int td, int te, int tf) {
    int p1 = (ta + tb + tc) / 2;
    int p2 = (ta + te + tf) / 2;
    int p3 = (td + tb + tf) / 2;
    int p4 = (td + te + tc) / 2;
    int q1 = (ta + tb + td + te) / 2;
    int q2 = (tb + tc + te + tf) / 2;
    int q3 = (ta + tc + td + tf) / 2;
    int first = Math.max(Math.max(p1, p2), Math.max(p3, p4));
    int last = Math.min(q1, Math.min(q2, q3));
    BigInteger term =
        product(
            binomial(first + 1, p1 + 1),
            binomial(q1 - p4, first - p4),
            binomial(q2 - p2, first - p2),
            binomial(q3 - p3, first - p3));
    BigInteger sum = BigInteger.ZERO;
    for (int t = first; t <= last; t++) {
      sum = (t & 1) == 0 ? sum.add(term) : sum.subtract(term);
      term =
          term.multiply(BigInteger.valueOf((long) (t + 2) * (q1 - t)))
              .multiply(BigInteger.valueOf((long) (q2 - t) * (q3 - t)))
              .divide(
                  BigInteger.valueOf((long) (t + 1 - p1) * (t + 1 - p2))
                      .multiply(BigInteger.valueOf((long) (t + 1 - p3) * (t + 1 - p4))));
    }
    return sum;
  }

  /**
   * 9j symbol {a b c; d e f; g h i} = Σ_x (−1)^(2x) (2x+1) {a b c; f i x} {d e f; b x h} {g h i; x
   * a d}, Varshalovich et al. 10.2.4 (20). Every triangle that holds x occurs in two of the three
   * symbols; taken as leading triangle in one of them it cancels, and 9j = Π Δ(outer) Σ (−1)^(2x)
   * (2x+1) S1 S2 S3 with integer S.
   */
  static SignedRoot nineJ(int ta, int tb, int tc, int td, int te, int tf, int tg, int th, int ti) {
    int first = Math.max(Math.abs(ta - ti), Math.max(Math.abs(tb - tf), Math.abs(td - th)));
    int last = Math.min(ta + ti, Math.min(tb + tf, td + th));
    BigInteger sum = BigInteger.ZERO;
    for (int tx = first; tx <= last; tx += 2) {
      // Leading triangles aix, bfx, dhx: each then stands once above and once below the line.
      BigInteger s1 = sixJSum(ta, ti, tx, tf, tb, tc);
      BigInteger s2 = sixJSum(tb, tf, tx, td, th, te);
      BigInteger s3 = sixJSum(td, th, tx, ti, ta, tg);
      BigInteger p = s1.multiply(s2).multiply(s3).multiply(BigInteger.valueOf(tx + 1));
      sum = (tx & 1) == 0 ? sum.add(p) : sum.subtract(p);
    }
    int[][] triangles = {
      {ta, tb, tc}, {td, te, tf}, {tg, th, ti}, {ta, td, tg}, {tb, te, th}, {tc, tf, ti}
    };
    BigInteger n = BigInteger.ONE;
    BigInteger d = BigInteger.ONE;
    for (int[] t : triangles) {
      n = n.multiply(triangleNumerator(t[0], t[1], t[2]));
      d = d.multiply(factorial((t[0] + t[1] + t[2]) / 2 + 1));
    }
    return root(1, sum, n, d);
  }

  private static SignedRoot root(int phase, BigInteger sum, BigInteger n, BigInteger d) {
    return SignedRoot.of(phase * sum.signum(), sum.multiply(sum).multiply(n), d);
  }

  private static BigInteger triangleNumerator(int ta, int tb, int tc) {
    return product(
        factorial((ta + tb - tc) / 2),
        factorial((ta - tb + tc) / 2),
        factorial((-ta + tb + tc) / 2));
  }

  private static BigInteger product(BigInteger... factors) {
    BigInteger p = BigInteger.ONE;
    for (BigInteger f : factors) {
      p = p.multiply(f);
    }
    return p;
  }

  private static BigInteger binomial(int n, int k) {
    return factorial(n).divide(factorial(k).multiply(factorial(n - k)));
  }

  private static BigInteger factorial(int n) {
    return Factorials.exact(n);
  }
}
