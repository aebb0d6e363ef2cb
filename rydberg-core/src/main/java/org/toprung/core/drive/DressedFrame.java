package org.toprung.core.drive;

import org.toprung.core.linear.Decoupling;

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
 * <p>{@link Decoupling} finds ω by iteration with the exact resolvent of Q at the energy of each
 * state of P, which converges when the couplings between P and Q are small against the distance of
 * P from the eigenvalues of Q; what happens inside Q may be as strong as it likes.
 *
 * <p>References: Bloch, Nucl. Phys. 6, 329 (1958); des Cloizeaux, Nucl. Phys. 20, 321 (1960);
 * Bravyi, DiVincenzo and Loss, Ann. Phys. 326, 2793 (2011).
 *
 * <p>Immutable.
 */
public final class DressedFrame {
  private final int n;
  private final int[] populated;
  private final double[][] basis; // re and im, n x p
  private final double[][] effective; // re and im, p x p, Hz

  private DressedFrame(int n, int[] populated, Decoupling solved) {
    int p = populated.length;
    this.n = n;
    this.populated = populated;
    this.basis = new double[2][n * p];
    this.effective = new double[2][p * p];
    solved.dressed(basis[0], basis[1]);
    solved.effective(effective[0], effective[1]);
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
    Decoupling decoupling = ladder.decoupling(populated);
    ladder.fill(setting, decoupling);
    decoupling.anchor();
    return new DressedFrame(ladder.size(), populated.clone(), decoupling);
  }

  /** The same set of states at another setting, near an anchor. */
  static DressedFrame near(
      Ladder ladder,
      LadderSetting setting,
      int[] populated,
      Decoupling decoupling,
      Decoupling.Anchor anchor) {
    ladder.fill(setting, decoupling);
    decoupling.decouple(anchor);
    return new DressedFrame(ladder.size(), populated, decoupling);
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
      re[i] = basis[0][i * populated.length + index];
      im[i] = basis[1][i * populated.length + index];
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
    return effective[0][row * populated.length + column];
  }

  /**
   * Imaginary part of the effective Hamiltonian over h.
   *
   * @param row position in the list of populated states
   * @param column position in the list of populated states
   * @return matrix element, Hz
   */
  public double effectiveImHertz(int row, int column) {
    return effective[1][row * populated.length + column];
  }
}
