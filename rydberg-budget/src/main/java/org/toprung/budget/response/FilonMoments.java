package org.toprung.budget.response;

/**
 * Integrals of e<sup>iθu</sup> with the polynomials of degree {@value #DEGREE} that interpolate
 * between five equally spaced nodes on 0 ≤ u ≤ 1: quadrature that stays as good at any θ, because
 * only the smooth factor is interpolated.
 *
 * <p>With ℓ<sub>a</sub> the Lagrange polynomial of node a:
 *
 * <ul>
 *   <li>single: ∫₀¹ ℓ<sub>a</sub>(u) e<sup>iθu</sup> du;
 *   <li>ordered: ∫₀¹ du ∫₀ᵘ dv ℓ<sub>a</sub>(u) ℓ<sub>b</sub>(v) cos θ(u−v).
 * </ul>
 *
 * <p>Monomials come from their power series in θ below {@value #SERIES_BELOW}, from integration by
 * parts above, where neither loses more than two digits.
 *
 * <p>Reference: Filon, Proc. R. Soc. Edinburgh 49, 38 (1930), here with degree 4 and nested.
 */
final class FilonMoments {
  static final int DEGREE = 4;
  static final int NODES = DEGREE + 1;
  private static final double SERIES_BELOW = 3;
  private static final double[][] LAGRANGE = lagrange();

  /** Parts of the single integrals, for every node. */
  final double[] re = new double[NODES];

  final double[] im = new double[NODES];

  /** The ordered integrals, later node first. */
  final double[] ordered = new double[NODES * NODES];

  private final double[] powerRe = new double[NODES];
  private final double[] powerIm = new double[NODES];
  private final double[] nested = new double[NODES * NODES];

  /** Coefficients of the Lagrange polynomials, [node][power]. */
  private static double[][] lagrange() {
    double[][] table = new double[NODES][];
    for (int a = 0; a < NODES; a++) {
      double[] p = {1};
      for (int b = 0; b < NODES; b++) {
        if (b == a) {
          continue;
        }
        double[] next = new double[p.length + 1];
        double scale = (double) DEGREE / (a - b);
        for (int k = 0; k < p.length; k++) {
          next[k + 1] += scale * p[k];
          next[k] -= scale * p[k] * b / DEGREE;
        }
        p = next;
      }
      table[a] = p;
    }
    return table;
  }

  void compute(double theta) {
    if (theta < SERIES_BELOW) {
      series(theta);
    } else {
      byParts(theta);
    }
    for (int a = 0; a < NODES; a++) {
      double sumRe = 0;
      double sumIm = 0;
      for (int k = 0; k < NODES; k++) {
        sumRe += LAGRANGE[a][k] * powerRe[k];
        sumIm += LAGRANGE[a][k] * powerIm[k];
      }
      re[a] = sumRe;
      im[a] = sumIm;
      for (int b = 0; b < NODES; b++) {
        double sum = 0;
        for (int k = 0; k < NODES; k++) {
          double inner = 0;
          for (int l = 0; l < NODES; l++) {
            inner += LAGRANGE[b][l] * nested[k * NODES + l];
          }
          sum += LAGRANGE[a][k] * inner;
        }
        ordered[a * NODES + b] = sum;
      }
    }
  }

  /** ∫ u^a e^{iθu} = Σ (iθ)^k / (k! (a+k+1)); ∫∫ u^a v^b (u−v)^k = k! b! / ((k+b+1)! (a+b+k+2)). */
  private void series(double theta) {
    for (int a = 0; a < NODES; a++) {
      double term = 1; // θ^k/k!
      double sumRe = 0;
      double sumIm = 0;
      for (int k = 0; term > 1e-18 || k == 0; k++) {
        double sign = (k & 2) == 0 ? 1 : -1;
        if ((k & 1) == 0) {
          sumRe += sign * term / (a + k + 1);
        } else {
          sumIm += sign * term / (a + k + 1);
        }
        term *= theta / (k + 1);
      }
      powerRe[a] = sumRe;
      powerIm[a] = sumIm;
    }
    double factorial = 1; // b!
    for (int b = 0; b < NODES; b++) {
      factorial *= Math.max(1, b);
      for (int a = 0; a < NODES; a++) {
        double term = factorial; // b! θ^k / (k+b+1)!
        for (int i = 2; i <= b + 1; i++) {
          term /= i;
        }
        double sum = 0;
        for (int k = 0; term > 1e-18 || k == 0; k += 2) {
          sum += ((k & 2) == 0 ? term : -term) / (a + b + k + 2);
          term *= theta * theta / ((k + b + 2.0) * (k + b + 3.0));
        }
        nested[a * NODES + b] = sum;
      }
    }
  }

  private void byParts(double theta) {
    double cos = Math.cos(theta);
    double sin = Math.sin(theta);
    // μ_0 = (e^{iθ} − 1)/(iθ), μ_a = (e^{iθ} − a μ_{a−1})/(iθ)
    for (int a = 0; a < NODES; a++) {
      double topRe = cos - (a == 0 ? 1 : a * powerRe[a - 1]);
      double topIm = sin - (a == 0 ? 0 : a * powerIm[a - 1]);
      powerRe[a] = topIm / theta;
      powerIm[a] = -topRe / theta;
    }
    // I_{a0} = (i/θ)(1/(a+1) − μ_a), I_{ab} = (i/θ)(1/(a+b+1) − b I_{a,b−1})
    for (int a = 0; a < NODES; a++) {
      double lastRe = powerRe[a];
      double lastIm = powerIm[a];
      for (int b = 0; b < NODES; b++) {
        double factor = Math.max(1, b);
        double topRe = 1.0 / (a + b + 1) - factor * lastRe;
        double topIm = -factor * lastIm;
        lastRe = -topIm / theta;
        lastIm = topRe / theta;
        nested[a * NODES + b] = lastRe;
      }
    }
  }
}
