package org.toprung.budget;

import org.apache.commons.math4.legacy.ode.FirstOrderDifferentialEquations;
import org.apache.commons.math4.legacy.ode.nonstiff.DormandPrince853Integrator;

/**
 * dψ/dt = −2πi (H/h) ψ with any time dependence, by the eighth-order method of Dormand and Prince:
 * a path to the final state that shares nothing with the library's propagators. Loss is
 * non-Hermitian, −iΓ/4π on the diagonal.
 */
public final class SchrodingerEquation {
  private static final double TOLERANCE = 1e-11;

  /** Writes H/h at a time, Hz, row by row; the arrays hold zeros. */
  public interface Hamiltonian {
    void write(double seconds, double[] re, double[] im);
  }

  private SchrodingerEquation() {}

  /**
   * Integrates from the first break to the last, restarting at each, where H may jump.
   *
   * @param psi the state at the beginning, real parts first, then imaginary ones
   * @return the state at the end, likewise
   */
  public static double[] solve(Hamiltonian h, double[] breaks, double[] psi) {
    double[] state = psi.clone();
    for (int i = 0; i + 1 < breaks.length; i++) {
      double from = breaks[i];
      double length = breaks[i + 1] - from;
      DormandPrince853Integrator integrator =
          new DormandPrince853Integrator(1e-12 * length, length, TOLERANCE, TOLERANCE);
      // a step may touch the breaks, where the program is not to be asked
      FirstOrderDifferentialEquations equations = equations(h, psi.length / 2, from, length);
      integrator.integrate(equations, 0, state, length, state);
    }
    return state;
  }

  private static FirstOrderDifferentialEquations equations(
      Hamiltonian h, int n, double from, double length) {
    return new FirstOrderDifferentialEquations() {
      @Override
      public int getDimension() {
        return 2 * n;
      }

      @Override
      public void computeDerivatives(double t, double[] y, double[] dot) {
        double inside = from + Math.min(Math.max(t, 1e-9 * length), (1 - 1e-9) * length);
        double[] re = new double[n * n];
        double[] im = new double[n * n];
        h.write(inside, re, im);
        for (int i = 0; i < n; i++) {
          double real = 0;
          double imaginary = 0;
          for (int j = 0; j < n; j++) {
            real += re[i * n + j] * y[j] - im[i * n + j] * y[n + j];
            imaginary += re[i * n + j] * y[n + j] + im[i * n + j] * y[j];
          }
          dot[i] = 2 * Math.PI * imaginary;
          dot[n + i] = -2 * Math.PI * real;
        }
      }
    };
  }
}
