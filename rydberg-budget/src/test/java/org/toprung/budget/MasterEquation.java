package org.toprung.budget;

import java.util.Arrays;
import org.apache.commons.math4.legacy.ode.FirstOrderDifferentialEquations;
import org.apache.commons.math4.legacy.ode.nonstiff.DormandPrince853Integrator;

/**
 * dρ/dt = −2πi (Kρ − ρK†) + Σ γ(PρP − ½Pρ − ½ρP) for the density matrix, K = H/h with loss out of
 * the system as −iΓ/4π on the diagonal and P projectors on some states, whose coherence with the
 * others decays at γ/2: the master equation of Lindblad, Commun. Math. Phys. 48, 119 (1976), by the
 * eighth-order method of Dormand and Prince. White frequency noise of a Lorentzian line of full
 * width Δν is P on the states above that laser with γ = 2πΔν.
 */
final class MasterEquation {
  private static final double TOLERANCE = 1e-11;

  private final SchrodingerEquation.Hamiltonian hamiltonian;
  private final int n;
  private final double[] dephasing; // 1/s, of the coherence of each pair of states

  MasterEquation(SchrodingerEquation.Hamiltonian hamiltonian, int n) {
    this.hamiltonian = hamiltonian;
    this.n = n;
    this.dephasing = new double[n * n];
  }

  /** Adds a dephasing of some states against all others. */
  MasterEquation dephasing(double gammaPerSecond, int... states) {
    for (int i = 0; i < n; i++) {
      for (int j = 0; j < n; j++) {
        if (contains(states, i) != contains(states, j)) {
          dephasing[i * n + j] += 0.5 * gammaPerSecond;
        }
      }
    }
    return this;
  }

  private static boolean contains(int[] states, int state) {
    return Arrays.stream(states).anyMatch(s -> s == state);
  }

  /** Populations at the last break, from a pure state at the first. */
  double[] populations(double[] breaks, int start) {
    double[] rho = new double[2 * n * n];
    rho[start * n + start] = 1;
    for (int b = 0; b + 1 < breaks.length; b++) {
      double from = breaks[b];
      double length = breaks[b + 1] - from;
      new DormandPrince853Integrator(1e-12 * length, length, TOLERANCE, TOLERANCE)
          .integrate(equations(from, length), 0, rho, length, rho);
    }
    double[] populations = new double[n];
    for (int i = 0; i < n; i++) {
      populations[i] = rho[i * n + i];
    }
    return populations;
  }

  private FirstOrderDifferentialEquations equations(double from, double length) {
    return new FirstOrderDifferentialEquations() {
      @Override
      public int getDimension() {
        return 2 * n * n;
      }

      @Override
      public void computeDerivatives(double t, double[] rho, double[] dot) {
        double inside = from + Math.min(Math.max(t, 1e-9 * length), (1 - 1e-9) * length);
        int square = n * n;
        double[] re = new double[square];
        double[] im = new double[square];
        hamiltonian.write(inside, re, im);
        for (int i = 0; i < n; i++) {
          for (int j = 0; j < n; j++) {
            double real = 0;
            double imaginary = 0;
            for (int k = 0; k < n; k++) {
              // (Kρ)_ij − (ρK†)_ij, K†_kj = conj(K_jk)
              int ik = i * n + k;
              int kj = k * n + j;
              int jk = j * n + k;
              real += re[ik] * rho[kj] - im[ik] * rho[square + kj];
              imaginary += re[ik] * rho[square + kj] + im[ik] * rho[kj];
              real -= rho[ik] * re[jk] + rho[square + ik] * im[jk];
              imaginary -= rho[square + ik] * re[jk] - rho[ik] * im[jk];
            }
            int ij = i * n + j;
            dot[ij] = 2 * Math.PI * imaginary - dephasing[ij] * rho[ij];
            dot[square + ij] = -2 * Math.PI * real - dephasing[ij] * rho[square + ij];
          }
        }
      }
    };
  }
}
