package org.toprung.core.drive;

import org.toprung.core.linear.ComplexMatrix;
import org.toprung.core.linear.LinearSystem;

/**
 * Sublevels as the light dresses them: the part of the ladder that is meant to be populated,
 * decoupled exactly from the intermediate levels.
 *
 * <p>For a Hamiltonian H split into the populated states P and the rest Q, the wave operator ω (Q ×
 * P) solves Bloch's equation H<sub>QP</sub> + H<sub>QQ</sub>ω − ω(H<sub>PP</sub> + H<sub>PQ</sub>ω)
 * = 0; the columns of X = (1; ω)(1 + ω†ω)<sup>−½</sup> are orthonormal, span an invariant subspace
 * of H, and X†HX is the Hermitian effective Hamiltonian of des Cloizeaux, to all orders in the
 * couplings. To second order it is the one of {@link Elimination}.
 *
 * <p>A pulse whose edges are slow against the intermediate detuning and fast against the effective
 * Rabi period takes the bare start into its dressed form and the dressed target back to the bare
 * one; that is what "square" means for a ladder driven through a far-detuned level.
 *
 * <p>ω is found by iteration with the exact resolvent of Q at the energy of each state of P, which
 * converges when the couplings between P and Q are small against the distance of P from the
 * eigenvalues of Q; what happens inside Q may be as strong as it likes.
 *
 * <p>References: Bloch, Nucl. Phys. 6, 329 (1958); des Cloizeaux, Nucl. Phys. 20, 321 (1960);
 * Bravyi, DiVincenzo and Loss, Ann. Phys. 326, 2793 (2011).
 *
 * <p>Immutable.
 */
public final class DressedFrame {
  private static final int MAX_ITERATIONS = 500;
  private static final double LARGEST_ADMIXTURE = 0.5;

  private final int n;
  private final int[] populated;
  private final ComplexMatrix basis; // n x p
  private final ComplexMatrix effective; // p x p, Hz

  private DressedFrame(int n, int[] populated, ComplexMatrix basis, ComplexMatrix effective) {
    this.n = n;
    this.populated = populated;
    this.basis = basis;
    this.effective = effective;
  }

  /**
   * Dresses a set of states.
   *
   * @param ladder the ladder
   * @param setting the setting of the lasers and fields
   * @param populated indices of the states to decouple, without repeats
   * @return the dressed frame
   * @throws ArithmeticException if the intermediate level is too near resonance for the dressed
   *     states to be told apart; the message gives the number of iterations
   */
  public static DressedFrame of(Ladder ladder, LadderSetting setting, int... populated) {
    int n = ladder.size();
    double[] re = new double[n * n];
    double[] im = new double[n * n];
    ladder.hamiltonianHertz(setting, re, im);
    boolean[] inP = new boolean[n];
    for (int p : populated) {
      inP[p] = true;
    }
    int[] rest = new int[n - populated.length];
    int fill = 0;
    for (int i = 0; i < n; i++) {
      if (!inP[i]) {
        rest[fill++] = i;
      }
    }
    ComplexMatrix hPp = block(re, im, n, populated, populated);
    if (rest.length == 0) {
      return new DressedFrame(n, populated.clone(), embed(n, populated, null), hPp);
    }
    ComplexMatrix hQp = block(re, im, n, rest, populated);
    ComplexMatrix hPq = block(re, im, n, populated, rest);
    ComplexMatrix hQq = block(re, im, n, rest, rest);
    ComplexMatrix omega = waveOperator(hPp, hPq, hQp, hQq);
    ComplexMatrix overlap = ComplexMatrix.identity(populated.length);
    overlap.addScaled(1, omega.adjoint().times(omega));
    ComplexMatrix normalizer = inverseSquareRoot(overlap);
    ComplexMatrix basis = embed(n, populated, normalizer);
    ComplexMatrix lower = omega.times(normalizer);
    for (int i = 0; i < rest.length; i++) {
      for (int j = 0; j < populated.length; j++) {
        basis.set(rest[i], j, lower.re(i, j), lower.im(i, j));
      }
    }
    int[] all = new int[n];
    for (int i = 0; i < n; i++) {
      all[i] = i;
    }
    ComplexMatrix h = block(re, im, n, all, all);
    ComplexMatrix effective = basis.adjoint().times(h.times(basis));
    return new DressedFrame(n, populated.clone(), basis, effective);
  }

  private static ComplexMatrix waveOperator(
      ComplexMatrix hPp, ComplexMatrix hPq, ComplexMatrix hQp, ComplexMatrix hQq) {
    int p = hPp.rows();
    int q = hQq.rows();
    LinearSystem[] gap = new LinearSystem[p];
    for (int j = 0; j < p; j++) {
      ComplexMatrix shifted = ComplexMatrix.zeros(q, q);
      shifted.copyFrom(hQq);
      for (int i = 0; i < q; i++) {
        shifted.add(i, i, -hPp.re(j, j), -hPp.im(j, j));
      }
      gap[j] = LinearSystem.of(shifted);
    }
    ComplexMatrix omega = ComplexMatrix.zeros(q, p);
    double[] stepRe = new double[q];
    double[] stepIm = new double[q];
    for (int iteration = 0; iteration < MAX_ITERATIONS; iteration++) {
      ComplexMatrix w = hPq.times(omega);
      w.addScaled(1, hPp);
      ComplexMatrix residual = hQq.times(omega);
      residual.addScaled(1, hQp);
      residual.addScaled(-1, omega.times(w));
      double change = 0;
      for (int j = 0; j < p; j++) {
        for (int i = 0; i < q; i++) {
          stepRe[i] = -residual.re(i, j);
          stepIm[i] = -residual.im(i, j);
        }
        gap[j].solve(stepRe, stepIm);
        for (int i = 0; i < q; i++) {
          omega.add(i, j, stepRe[i], stepIm[i]);
          change = Math.max(change, Math.hypot(stepRe[i], stepIm[i]));
        }
      }
      if (!(omega.norm() < LARGEST_ADMIXTURE * Math.sqrt(p))) {
        throw notSeparable(iteration);
      }
      if (change < 1e-14) {
        return omega;
      }
    }
    throw notSeparable(MAX_ITERATIONS);
  }

  private static ArithmeticException notSeparable(int iterations) {
    return new ArithmeticException(
        "the intermediate level is too near resonance to be decoupled: no dressed states after "
            + iterations
            + " iterations");
  }

  /** Coupled Newton-Schulz iteration, Higham, Functions of Matrices (2008), section 6.7. */
  private static ComplexMatrix inverseSquareRoot(ComplexMatrix s) {
    int p = s.rows();
    ComplexMatrix y = ComplexMatrix.zeros(p, p);
    y.copyFrom(s);
    ComplexMatrix z = ComplexMatrix.identity(p);
    for (int iteration = 0; iteration < 60; iteration++) {
      ComplexMatrix t = z.times(y);
      t.scale(-0.5, 0);
      double off = 0;
      for (int i = 0; i < p; i++) {
        t.add(i, i, 1.5, 0);
        for (int j = 0; j < p; j++) {
          off = Math.max(off, Math.hypot(t.re(i, j) - (i == j ? 1 : 0), t.im(i, j)));
        }
      }
      if (off < 1e-15) {
        break;
      }
      y = y.times(t);
      z = t.times(z);
    }
    return z;
  }

  private static ComplexMatrix embed(int n, int[] rows, ComplexMatrix values) {
    ComplexMatrix m = ComplexMatrix.zeros(n, rows.length);
    for (int i = 0; i < rows.length; i++) {
      for (int j = 0; j < rows.length; j++) {
        m.set(
            rows[i],
            j,
            values == null ? (i == j ? 1 : 0) : values.re(i, j),
            values == null ? 0 : values.im(i, j));
      }
    }
    return m;
  }

  private static ComplexMatrix block(double[] re, double[] im, int n, int[] rows, int[] columns) {
    ComplexMatrix m = ComplexMatrix.zeros(rows.length, columns.length);
    for (int i = 0; i < rows.length; i++) {
      for (int j = 0; j < columns.length; j++) {
        m.set(i, j, re[rows[i] * n + columns[j]], im[rows[i] * n + columns[j]]);
      }
    }
    return m;
  }

  /**
   * Writes one dressed state in the bare basis of the ladder.
   *
   * @param index position in the list of populated states given at construction
   * @param re receives the real parts, length of the ladder
   * @param im receives the imaginary parts, length of the ladder
   */
  public void dressedState(int index, double[] re, double[] im) {
    for (int i = 0; i < n; i++) {
      re[i] = basis.re(i, index);
      im[i] = basis.im(i, index);
    }
  }

  /**
   * The populated states.
   *
   * @return a fresh array of indices into the ladder's states
   */
  public int[] populated() {
    return populated.clone();
  }

  /**
   * Real part of the effective Hamiltonian over h.
   *
   * @param row position in the list of populated states
   * @param column position in the list of populated states
   * @return matrix element, Hz
   */
  public double effectiveReHertz(int row, int column) {
    return effective.re(row, column);
  }

  /**
   * Imaginary part of the effective Hamiltonian over h.
   *
   * @param row position in the list of populated states
   * @param column position in the list of populated states
   * @return matrix element, Hz
   */
  public double effectiveImHertz(int row, int column) {
    return effective.im(row, column);
  }
}
