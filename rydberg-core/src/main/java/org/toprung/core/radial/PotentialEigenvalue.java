package org.toprung.core.radial;

/**
 * Eigenvalues of a valence potential, whatever the measured energy is. The solution that is regular
 * at the nucleus is integrated outward by Numerov's rule on the grid of {@link NumerovSolver}; how
 * many nodes it has up to a radius far outside is the number of bound states below that energy
 * (Sturm's oscillation theorem), so the energy is found by bisection.
 */
final class PotentialEigenvalue {
  private static final double STEP = 0.004;
  private static final double REACH = 0.45;
  private static final double TOLERANCE = 1e-9;
  private static final double TAIL = 14;
  private static final double LEAST_TAIL = 40;
  private static final double LARGEST = 1e200;

  private PotentialEigenvalue() {}

  /**
   * √(−1/2E) of the state with n − l − 1 nodes, searched within 0.45 of an estimate.
   *
   * @throws ArithmeticException if it is not there
   */
  static double effectiveN(ValencePotential potential, int n, int l, double estimate) {
    double low = Math.max(estimate - REACH, 0.3);
    double high = estimate + REACH;
    double outer = 2 * high * high + TAIL * Math.pow(high, 4.0 / 3) + LEAST_TAIL;
    int last = (int) Math.ceil(Math.sqrt(outer) / STEP);
    double[] strengths = new double[last + 1];
    double centrifugal = (2 * l + 0.5) * (2 * l + 1.5);
    for (int i = 1; i <= last; i++) {
      double r = i * STEP * i * STEP;
      strengths[i] = 8 * r * potential.energy(r) + centrifugal / r;
    }
    int nodes = n - l - 1;
    if (!(nodes(strengths, l, low) <= nodes && nodes(strengths, l, high) > nodes)) {
      throw new ArithmeticException(
          "the potential has no state n=" + n + " l=" + l + " near n*=" + estimate);
    }
    while (high - low > TOLERANCE * high) {
      double middle = (low + high) / 2;
      if (nodes(strengths, l, middle) > nodes) {
        high = middle;
      } else {
        low = middle;
      }
    }
    return (low + high) / 2;
  }

  private static int nodes(double[] strengths, int l, double effectiveN) {
    double energyTerm = 4 / (effectiveN * effectiveN) * STEP * STEP;
    // where the power law holds, but far enough out for the centrifugal term times h² to be small
    int start = 1 + 2 * l;
    double inverse = inverse(strengths, energyTerm, start);
    double w = 1 / inverse;
    double next = Math.pow((start + 1.0) / start, 2 * l + 1.5);
    double nextInverse = inverse(strengths, energyTerm, start + 1);
    double wNext = next / nextInverse;
    int nodes = 0;
    for (int i = start + 1; i + 1 < strengths.length; i++) {
      double wFar = (12 * nextInverse - 10) * wNext - w;
      nextInverse = inverse(strengths, energyTerm, i + 1);
      double far = wFar * nextInverse;
      if (far * next < 0) {
        nodes++;
      }
      w = wNext;
      wNext = wFar;
      next = far;
      if (Math.abs(wNext) > LARGEST) {
        w /= LARGEST;
        wNext /= LARGEST;
        next /= LARGEST;
      }
    }
    return nodes;
  }

  private static double inverse(double[] strengths, double energyTerm, int i) {
    return 1 / (1 - STEP * STEP / 12 * (strengths[i] + energyTerm * i * i));
  }
}
