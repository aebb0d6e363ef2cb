package org.toprung.core.radial;

import java.util.Arrays;
import java.util.Locale;

/**
 * Numerov integration, from outside inward, of the radial equation of one potential and l on the
 * grid r = x², x = ih.
 *
 * <p>With P(r) = r^{1/4} y(√r) the radial equation P″ = [2(V − E) + l(l+1)/r²] P becomes
 *
 * <p>y″ = [8x²(V − E) + (2l + ½)(2l + 3/2)/x²] y,
 *
 * <p>in which the wavelength of a Coulomb wave hardly changes along x. Normalization ∫P² dr =
 * 2∫x²y² dx (Bhatti, Cromer and Cooke, Phys. Rev. A 24, 161 (1981) use the same square-root grid).
 * The local error of a step is h⁶y⁽⁶⁾/240; its part g³y, which is nearly all of it where g = y″/y
 * changes slowly, is taken out.
 *
 * <p>The energy is given, so at small r the irregular solution comes in with the size of the
 * mismatch between energy and potential. It is cut off where the wave starts to grow inward inside
 * the inner turning point, or would get a node more than n−l−1; fewer nodes than that are an error.
 */
final class NumerovSolver {
  /** The grid ends at 2n² + 14 n^(4/3) + 40, where the wave has decayed to e^−20 or less. */
  private static final double TAIL = 14;

  private static final double LEAST_TAIL = 40;

  private static final double SEED = 1e-30;

  private final double spinOrbit;
  private final double polarization;
  private final double step;
  private final double centrifugal;
  private final int l;

  /** Replaced by a longer table when a higher level asks for it; the numbers never change. */
  private volatile double[] strengths;

  NumerovSolver(ValencePotential potential, int l, double step) {
    this.spinOrbit = 8 * potential.spinOrbit();
    this.polarization = 4 * potential.polarizability();
    this.step = step;
    this.l = l;
    this.centrifugal = (2 * l + 0.5) * (2 * l + 1.5);
    int size = (int) Math.ceil(Math.sqrt(potential.coreRadius()) / step) + 1;
    double[] core = new double[size];
    for (int i = 1; i < size; i++) {
      double x2 = i * step * i * step;
      core[i] = 8 * x2 * potential.energy(x2) + centrifugal / x2;
    }
    this.strengths = core;
  }

  /**
   * The normalized wave of a bound level.
   *
   * @param n principal quantum number; the outermost lobe gets the sign (−1)^(n−l−1)
   * @param effectiveN √(−1/2E), E in Hartree
   */
  RadialWave solve(int n, double effectiveN) {
    double energy = -0.5 / (effectiveN * effectiveN);
    double outer =
        2 * effectiveN * effectiveN + TAIL * Math.pow(effectiveN, 4.0 / 3.0) + LEAST_TAIL;
    int last = (int) Math.ceil(Math.sqrt(outer) / step);
    double[] y = new double[last + 1];
    double twelfth = step * step / 12;
    // Numerov in w = (1 - h²g/12) y: w(i-1) = (12/f(i) - 10) w(i) - w(i+1), which keeps the
    // division
    // out of the chain of dependent operations
    double wOuter = 0;
    int expected = n - l - 1;
    double w = expected % 2 == 0 ? SEED : -SEED;
    double inverse = 1;
    double scaled = 0;
    y[last - 1] = w * inverse;
    double sum = 0;
    int nodes = 0;
    int first = 1;
    boolean allowedSeen = false;
    double energyScale = 8 * energy * step * step;
    double[] g = strengths(last);
    for (int i = last - 1; i > 1; i--) {
      double here = y[i];
      sum += (double) i * i * here * here;
      double wInner = (12 * inverse - 10 - sixthOrder(scaled) * inverse) * w - wOuter;
      double strength = g[i - 1] - energyScale * (i - 1) * (i - 1);
      scaled = step * step * strength;
      inverse = 1 / (1 - twelfth * strength);
      double inner = wInner * inverse;
      boolean node = inner * here < 0;
      boolean allowed = strength < 0;
      boolean growsInBarrier = allowedSeen && !allowed && Math.abs(inner) >= Math.abs(here);
      if (growsInBarrier || node && nodes == expected) {
        first = i;
        break;
      }
      nodes += node ? 1 : 0;
      allowedSeen |= allowed;
      y[i - 1] = inner;
      wOuter = w;
      w = wInner;
    }
    if (nodes != expected) {
      throw new ArithmeticException(
          String.format(
              Locale.ROOT,
              "wave of n=%d l=%d at n*=%s has %d nodes instead of %d",
              n,
              l,
              effectiveN,
              nodes,
              expected));
    }
    double norm = 1 / Math.sqrt(2 * step * step * step * sum);
    if (!(norm > 0 && norm < Double.POSITIVE_INFINITY)) {
      throw new ArithmeticException(
          String.format(Locale.ROOT, "no wave found for n=%d l=%d at n*=%s", n, l, effectiveN));
    }
    for (int i = first; i < last; i++) {
      y[i] *= norm;
    }
    return new RadialWave(step, first, y, nodes);
  }

  /**
   * The main part of the local error h⁶y⁽⁶⁾/240, with y⁽⁶⁾ ≈ g³y; not where the wave changes so
   * fast that the expansion fails.
   */
  private static double sixthOrder(double scaled) {
    return Math.abs(scaled) < 1 ? scaled * scaled * scaled / 240 : 0;
  }

  /** 8x²V + centrifugal/x² by grid index, at least up to a last one. */
  private double[] strengths(int last) {
    double[] known = strengths;
    if (known.length > last) {
      return known;
    }
    double[] grown = Arrays.copyOf(known, last + 1 + last / 4);
    for (int i = known.length; i < grown.length; i++) {
      double inverse = 1 / (i * step * i * step);
      grown[i] = -8 + inverse * (centrifugal + inverse * (spinOrbit - polarization * inverse));
    }
    // two threads that grow the table at once compute the same numbers
    strengths = grown;
    return grown;
  }
}
