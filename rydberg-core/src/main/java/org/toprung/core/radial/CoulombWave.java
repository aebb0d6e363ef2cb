package org.toprung.core.radial;

import java.util.Arrays;
import org.apache.commons.numbers.gamma.Gamma;

/**
 * A bound Coulomb wave at any effective quantum number ν &gt; l, decaying outside and normalized
 * analytically: P = (−1)^(n−l−1) W_{ν,l+½}(2r/ν) / √(ν² Γ(ν+l+1) Γ(ν−l)) (Seaton, Proc. Phys. Soc.
 * 88, 801 (1966); Rep. Prog. Phys. 46, 167 (1983)).
 *
 * <p>W and its derivative are found outside the outer turning point: U(a, 2l+2, z) by its
 * asymptotic series for the two orders with 0 ≤ a &lt; 1 and a − 1, where the series hardly
 * cancels, then upwards in ν by W_{κ+1} = (z − 2κ) W_κ − (κ−l−1)(κ+l) W_{κ−1}, and z W′_κ = (z/2 −
 * κ) W_κ − W_{κ+1} (DLMF 13.15.1, 13.15.26), which is stable there. From that point the
 * differential equation is integrated inward on panels in x = √r by Taylor series,
 *
 * <p>x² u″ − x u′ = [4l(l+1) − 8x² + 4x⁴/ν²] u, u(x) = P(x²),
 *
 * <p>and the wave is kept at the Gauss-Legendre nodes of each panel; the panels are the same for
 * all waves. It is cut off where it starts to grow inward inside the inner turning point: for ν
 * from experiment the irregular part takes over there, inside the core.
 */
final class CoulombWave {
  /** Nodes of a panel. */
  static final int NODES = 12;

  private static final double[] NODE = {
    0.1252334085114689,
    0.3678314989981802,
    0.5873179542866175,
    0.7699026741943047,
    0.9041172563704749,
    0.9815606342467193
  };
  private static final double[] WEIGHT = {
    0.2491470458134028,
    0.2334925365383548,
    0.2031674267230659,
    0.1600783285433462,
    0.1069393259953184,
    0.0471753363865118
  };

  /** Panels are as wide as this in x, and nearer to the nucleus a third of their upper end. */
  private static final double WIDTH = 0.5;

  private static final int INNER_PANELS = 24;
  private static final double INNER_RATIO = 2.0 / 3;
  private static final double INNER_END = 1.5;

  /** The panels reach to 2ν² + 22ν^(4/3) + 40, where the wave is below 1e-17. */
  private static final double TAIL = 22;

  private static final double LEAST_TAIL = 40;
  private static final double LEAST_ARGUMENT = 100;

  private static final int TERMS = 64;
  private static final double NEGLIGIBLE = 1e-19;

  /** A coefficient depends on as many of its predecessors. */
  private static final int REACH = 6;

  private final int first;
  private final double[] values;

  private CoulombWave(int first, double[] values) {
    this.first = first;
    this.values = values;
  }

  /** The wave of effective quantum number ν &gt; l. */
  static CoulombWave of(int n, int l, double nu) {
    double outer = 2 * nu * nu + TAIL * Math.pow(nu, 4.0 / 3) + LEAST_TAIL;
    double reach = Math.max(outer, LEAST_ARGUMENT * nu / 2);
    int panels = INNER_PANELS + (int) Math.ceil((Math.sqrt(reach) - INNER_END) / WIDTH);
    double x = boundary(panels);
    double[] state = outside(l, nu, x);
    double[] values = new double[panels * NODES];
    double barrier = barrier(l, nu);
    double sign = (n - l - 1) % 2 == 0 ? 1 : -1;
    int first = 0;
    double[] c = new double[TERMS];
    for (int panel = panels - 1; panel >= 0; panel--) {
      double low = boundary(panel);
      int terms = expand(c, l, nu, x, state[0], state[1], x - low);
      double half = (x - low) / 2;
      for (int i = 0; i < NODES; i++) {
        values[panel * NODES + i] = sign * sum(c, terms, low + half * (1 + node(i)) - x);
      }
      double next = sum(c, terms, low - x);
      double slope = slope(c, terms, low - x);
      if (low < barrier && l > 0 && Math.abs(next) >= Math.abs(state[0])) {
        // the panel in which the growing part takes over is left out whole
        first = panel + 1;
        Arrays.fill(values, 0, first * NODES, 0);
        break;
      }
      state = new double[] {next, slope};
      x = low;
    }
    return new CoulombWave(first, values);
  }

  /** √r of the inner turning point. */
  private static double barrier(int l, double nu) {
    double root = Math.sqrt(Math.max(0, 1 - l * (l + 1.0) / (nu * nu)));
    return Math.sqrt(nu * nu * (1 - root));
  }

  /** Upper end of the panel before the given one. */
  private static double boundary(int panel) {
    if (panel >= INNER_PANELS) {
      return INNER_END + WIDTH * (panel - INNER_PANELS);
    }
    return panel == 0 ? 0 : INNER_END * Math.pow(INNER_RATIO, INNER_PANELS - panel);
  }

  private static double node(int i) {
    return i < NODES / 2 ? -NODE[NODES / 2 - 1 - i] : NODE[i - NODES / 2];
  }

  private static double weight(int i) {
    return i < NODES / 2 ? WEIGHT[NODES / 2 - 1 - i] : WEIGHT[i - NODES / 2];
  }

  /** P (positive) and dP/dx at x, outside the outer turning point. */
  private static double[] outside(int l, double nu, double x) {
    double z = 2 * x * x / nu;
    int steps = (int) Math.ceil(nu - l) - 1;
    // 0 < f <= 1; w = W / sqrt(Gamma(kappa+l+1) Gamma(kappa-l)) stays in range for all kappa
    double f = nu - l - steps;
    double kappa = l + f;
    double gammas = Gamma.value(f);
    gammas *= gammas;
    for (int i = 0; i <= 2 * l; i++) {
      gammas *= f + i;
    }
    double unit = Math.exp(-z / 2) * Math.pow(z, kappa) / Math.sqrt(gammas);
    double here = unit * series(1 - f, l, z);
    double ratio = ratio(kappa, l);
    double above = unit * z * series(-f, l, z) / ratio;
    for (int i = 0; i < steps; i++) {
      kappa += 1;
      double next = ratio(kappa, l);
      double higher = ((z - 2 * kappa) * above - ratio * here) / next;
      here = above;
      above = higher;
      ratio = next;
    }
    double slope = ((z / 2 - nu) * here - ratio * above) / z;
    return new double[] {here / nu, slope * (2 / nu) * 2 * x / nu};
  }

  /** √[(κ+l+1)(κ−l)]: what the normalization gains from κ to κ + 1. */
  private static double ratio(double kappa, int l) {
    return Math.sqrt((kappa + l + 1) * (kappa - l));
  }

  /** z^a U(a, 2l+2, z) for −1 ≤ a &lt; 1 by Σ (a)_k (a−2l−1)_k / (k! (−z)^k) (DLMF 13.7.3). */
  private static double series(double a, int l, double z) {
    double term = 1;
    double sum = 1;
    for (int k = 0; k < TERMS; k++) {
      double next = -term * (a + k) * (a - 2 * l - 1 + k) / ((k + 1) * z);
      if (k > 2 * l + 2 && Math.abs(next) >= Math.abs(term)) {
        break;
      }
      term = next;
      sum += term;
      if (Math.abs(term) <= NEGLIGIBLE * Math.abs(sum)) {
        break;
      }
    }
    return sum;
  }

  /**
   * Taylor coefficients of u about x: with x = x0 + t the equation is (x0+t)² u″ − (x0+t) u′ − [L −
   * 8(x0+t)² + K(x0+t)⁴] u = 0. Returns how many there are; the last ones add nothing at t =
   * −width.
   */
  private static int expand(
      double[] c, int l, double nu, double x, double u, double du, double width) {
    double k4 = 4 / (nu * nu);
    double x2 = x * x;
    double g0 = 4.0 * l * (l + 1) - 8 * x2 + k4 * x2 * x2;
    double g1 = -16 * x + 4 * k4 * x2 * x;
    double g2 = -8 + 6 * k4 * x2;
    double g3 = 4 * k4 * x;
    c[0] = u;
    c[1] = du;
    double inverse = 1 / x2;
    double power = width;
    double largest = Math.max(Math.abs(u), Math.abs(du) * width);
    int negligible = 0;
    for (int m = 0; m + 2 < TERMS; m++) {
      double right = x * (m + 1) * c[m + 1] + m * c[m] + g0 * c[m];
      right -= 2 * x * (m + 1.0) * m * c[m + 1] + m * (m - 1.0) * c[m];
      right += m > 0 ? g1 * c[m - 1] : 0;
      right += m > 1 ? g2 * c[m - 2] : 0;
      right += m > 2 ? g3 * c[m - 3] : 0;
      right += m > 3 ? k4 * c[m - 4] : 0;
      c[m + 2] = right * inverse / ((m + 2.0) * (m + 1.0));
      power *= width;
      double size = Math.abs(c[m + 2]) * power;
      largest = Math.max(largest, size);
      negligible = size <= NEGLIGIBLE * largest ? negligible + 1 : 0;
      if (negligible == REACH) {
        return m + 3;
      }
    }
    return TERMS;
  }

  private static double sum(double[] c, int terms, double t) {
    double sum = 0;
    for (int m = terms - 1; m >= 0; m--) {
      sum = sum * t + c[m];
    }
    return sum;
  }

  private static double slope(double[] c, int terms, double t) {
    double sum = 0;
    for (int m = terms - 1; m >= 1; m--) {
      sum = sum * t + m * c[m];
    }
    return sum;
  }

  /** ∫ P_a r^k P_b dr. */
  double power(CoulombWave other, int k) {
    int from = Math.max(first, other.first);
    int to = Math.min(values.length, other.values.length) / NODES;
    double sum = 0;
    for (int panel = from; panel < to; panel++) {
      double low = boundary(panel);
      double half = (boundary(panel + 1) - low) / 2;
      for (int i = 0; i < NODES; i++) {
        double x = low + half * (1 + node(i));
        int index = panel * NODES + i;
        sum +=
            half * weight(i) * 2 * Math.pow(x, 2 * k + 1) * (values[index] * other.values[index]);
      }
    }
    return sum;
  }

  /** The wave at its nodes, stretched by a factor. */
  Wavefunction table(double lengthScale) {
    int from = first * NODES;
    double[] radii = new double[values.length - from];
    double[] stretched = new double[values.length - from];
    for (int index = from; index < values.length; index++) {
      double low = boundary(index / NODES);
      double half = (boundary(index / NODES + 1) - low) / 2;
      double x = low + half * (1 + node(index % NODES));
      radii[index - from] = lengthScale * x * x;
      stretched[index - from] = values[index] / Math.sqrt(lengthScale);
    }
    return new Wavefunction(radii, stretched);
  }
}
