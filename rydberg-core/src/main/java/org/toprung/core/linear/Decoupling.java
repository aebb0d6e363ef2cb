package org.toprung.core.linear;

import java.util.Arrays;

/**
 * Splits the states of a sparse Hamiltonian exactly into the ones that matter (P) and the rest (Q).
 *
 * <p>The wave operator ω (Q × P) solves Bloch's equation H<sub>QP</sub> + H<sub>QQ</sub>ω −
 * ω(H<sub>PP</sub> + H<sub>PQ</sub>ω) = 0, so that the columns of X = (1; ω)(1 + ω†ω)<sup>−½</sup>
 * are orthonormal and span an invariant subspace of H; the effective Hamiltonian is X†HX, which is
 * S W S⁻¹ with S = (1 + ω†ω)<sup>½</sup> and W = H<sub>PP</sub> + H<sub>PQ</sub>ω. Both hold for a
 * non-Hermitian H too: the subspace stays invariant, only the effective Hamiltonian is not
 * Hermitian either.
 *
 * <p>ω is found by iteration, ω ← ω − (H<sub>QQ</sub> − E<sub>j</sub>)⁻¹ · residual in column j,
 * with a resolvent from a nearby {@link Anchor} as preconditioner, until a step is below {@value
 * #CLOSE}. X†HX is stationary about the invariant subspace of a Hermitian H, so that what is left
 * is less than its square times the distance between P and Q; on a loss rate it is a relative error
 * of less than {@value #CLOSE}.
 *
 * <p>References: Bloch, Nucl. Phys. 6, 329 (1958); des Cloizeaux, Nucl. Phys. 20, 321 (1960).
 *
 * <p>Holds the Hamiltonian and the workspace: reuse one instance per thread. Not thread-safe.
 */
public final class Decoupling {
  private static final double CLOSE = 1e-7;
  private static final double ANCHOR_CLOSE = 1e-13;
  private static final int MAX_ITERATIONS = 500;
  private static final int SLOW = 30;
  private static final double LARGEST_ADMIXTURE = 0.5;
  private static final double SAME_ENERGY = 0.005; // of the distance to the rest
  private static final double NEGLIGIBLE = 1e-4; // of the largest element of a resolvent

  /**
   * The solution at one Hamiltonian and its resolvents, where other solutions nearby start from.
   * Immutable; may be used by any number of decouplings of the same shape.
   */
  public static final class Anchor {
    private final double[] xRe;
    private final double[] xIm;
    private final Resolvent[] resolvents; // one per column, shared where energies are close

    private Anchor(double[] xRe, double[] xIm, Resolvent[] resolvents) {
      this.xRe = xRe;
      this.xIm = xIm;
      this.resolvents = resolvents;
    }
  }

  /** The inverse of H_QQ − E by rows, without its negligible elements. */
  private static final class Resolvent {
    private final double energyRe;
    private final int[] first;
    private final int[] column;
    private final double[] re;
    private final double[] im;

    private Resolvent(double energyRe, int[] first, int[] column, double[] re, double[] im) {
      this.energyRe = energyRe;
      this.first = first;
      this.column = column;
      this.re = re;
      this.im = im;
    }
  }

  private final int n;
  private final int p;
  private final int q;
  private final int[] position; // of a state: P first, then Q
  private final int[] lower; // positions
  private final int[] upper;
  private final double[] diagonalRe; // by position
  private final double[] diagonalIm;
  private final double[] couplingRe;
  private final double[] couplingIm;
  private final double[] xRe; // column j at j * n: 1 on P, ω on Q
  private final double[] xIm;
  private final double[] yRe; // H x
  private final double[] yIm;
  private final double[] residualRe;
  private final double[] residualIm;
  private final double[] overlapRe; // p x p, row-major
  private final double[] overlapIm;
  private final double[] zRe; // (1 + ω†ω)^−½
  private final double[] zIm;
  private final double[] aRe;
  private final double[] aIm;
  private final double[] bRe;
  private final double[] bIm;
  private final double[] effectiveRe;
  private final double[] effectiveIm;

  private Decoupling(int n, int p, int[] position, int[] lower, int[] upper) {
    this.n = n;
    this.p = p;
    this.q = n - p;
    this.position = position;
    this.lower = lower;
    this.upper = upper;
    this.diagonalRe = new double[n];
    this.diagonalIm = new double[n];
    this.couplingRe = new double[lower.length];
    this.couplingIm = new double[lower.length];
    this.xRe = new double[n * p];
    this.xIm = new double[n * p];
    this.yRe = new double[n * p];
    this.yIm = new double[n * p];
    this.residualRe = new double[q];
    this.residualIm = new double[q];
    this.overlapRe = new double[p * p];
    this.overlapIm = new double[p * p];
    this.zRe = new double[p * p];
    this.zIm = new double[p * p];
    this.aRe = new double[p * p];
    this.aIm = new double[p * p];
    this.bRe = new double[p * p];
    this.bIm = new double[p * p];
    this.effectiveRe = new double[p * p];
    this.effectiveIm = new double[p * p];
  }

  /**
   * A workspace for Hamiltonians of one pattern, with all values zero.
   *
   * @param states number of states
   * @param populated indices of the states in P, without repeats
   * @param lower for each coupling the index of one state
   * @param upper for each coupling the index of the other state
   * @return a new workspace
   */
  public static Decoupling of(int states, int[] populated, int[] lower, int[] upper) {
    int[] position = new int[states];
    Arrays.fill(position, -1);
    int next = 0;
    for (int s : populated) {
      position[s] = next++;
    }
    for (int s = 0; s < states; s++) {
      if (position[s] < 0) {
        position[s] = next++;
      }
    }
    int[] low = Arrays.stream(lower).map(s -> position[s]).toArray();
    int[] up = Arrays.stream(upper).map(s -> position[s]).toArray();
    return new Decoupling(states, populated.length, position, low, up);
  }

  /**
   * Number of states in P.
   *
   * @return dimension of the effective Hamiltonian
   */
  public int size() {
    return p;
  }

  /**
   * Sets a diagonal element of the Hamiltonian.
   *
   * @param state index of the state
   * @param re real part
   * @param im imaginary part
   */
  public void setDiagonal(int state, double re, double im) {
    diagonalRe[position[state]] = re;
    diagonalIm[position[state]] = im;
  }

  /**
   * Sets the element ⟨upper|H|lower⟩ of a coupling, and ⟨lower|H|upper⟩ to its conjugate. Several
   * couplings of the same two states add.
   *
   * @param coupling index of the coupling
   * @param re real part
   * @param im imaginary part
   */
  public void setCoupling(int coupling, double re, double im) {
    couplingRe[coupling] = re;
    couplingIm[coupling] = im;
  }

  /**
   * Solves without knowing anything, and keeps the solution for others nearby to start from.
   *
   * @return the solution at the present Hamiltonian
   * @throws ArithmeticException if P and Q cannot be told apart; the message gives the number of
   *     iterations
   */
  public Anchor anchor() {
    Arrays.fill(xRe, 0);
    Arrays.fill(xIm, 0);
    for (int j = 0; j < p; j++) {
      xRe[j * n + j] = 1;
    }
    Resolvent[] resolvents = resolvents();
    iterate(resolvents, ANCHOR_CLOSE, MAX_ITERATIONS);
    normalize();
    return new Anchor(xRe.clone(), xIm.clone(), resolvents);
  }

  /**
   * Solves from a solution nearby and keeps the new one; the resolvents stay the old ones.
   *
   * @param near solution at a Hamiltonian that is not far away
   * @return the solution at the present Hamiltonian
   * @throws ArithmeticException if P and Q cannot be told apart; the message gives the number of
   *     iterations
   */
  public Anchor anchor(Anchor near) {
    System.arraycopy(near.xRe, 0, xRe, 0, xRe.length);
    System.arraycopy(near.xIm, 0, xIm, 0, xIm.length);
    if (!tryIterate(near.resolvents, ANCHOR_CLOSE, SLOW)) {
      return anchor();
    }
    normalize();
    return new Anchor(xRe.clone(), xIm.clone(), near.resolvents);
  }

  /**
   * Solves for the present Hamiltonian.
   *
   * @param near solution at a Hamiltonian that is not far away
   * @throws ArithmeticException if P and Q cannot be told apart; the message gives the number of
   *     iterations
   */
  public void decouple(Anchor near) {
    System.arraycopy(near.xRe, 0, xRe, 0, xRe.length);
    System.arraycopy(near.xIm, 0, xIm, 0, xIm.length);
    if (!tryIterate(near.resolvents, CLOSE, SLOW)) {
      anchor();
      return;
    }
    normalize();
  }

  private void iterate(Resolvent[] resolvents, double close, int most) {
    if (!tryIterate(resolvents, close, most)) {
      throw notSeparable(most);
    }
  }

  private static ArithmeticException notSeparable(int iterations) {
    return new ArithmeticException(
        "the intermediate level is too near resonance to be decoupled: no dressed states within "
            + iterations
            + " iterations");
  }

  /** Leaves H x in y; false if it does not converge or P is no longer the larger part. */
  private boolean tryIterate(Resolvent[] resolvents, double close, int most) {
    for (int iteration = 0; iteration < most; iteration++) {
      apply();
      double change = 0;
      for (int j = 0; j < p; j++) {
        residual(j);
        change = Math.max(change, step(resolvents[j], j));
      }
      if (change < close) {
        apply();
        return isDressed();
      }
      if (!(change < 1e3)) {
        return false;
      }
    }
    return false;
  }

  private boolean isDressed() {
    double largest = 0;
    for (int i = p; i < n; i++) {
      double sum = 0;
      for (int j = 0; j < p; j++) {
        sum += Math.abs(xRe[j * n + i]) + Math.abs(xIm[j * n + i]);
      }
      largest = Math.max(largest, sum);
    }
    return largest < LARGEST_ADMIXTURE * Math.sqrt(p);
  }

  private void apply() {
    for (int j = 0; j < p; j++) {
      int at = j * n;
      for (int i = 0; i < n; i++) {
        double re = xRe[at + i];
        double im = xIm[at + i];
        yRe[at + i] = diagonalRe[i] * re - diagonalIm[i] * im;
        yIm[at + i] = diagonalRe[i] * im + diagonalIm[i] * re;
      }
      for (int c = 0; c < lower.length; c++) {
        int l = at + lower[c];
        int u = at + upper[c];
        double re = couplingRe[c];
        double im = couplingIm[c];
        yRe[u] += re * xRe[l] - im * xIm[l];
        yIm[u] += re * xIm[l] + im * xRe[l];
        yRe[l] += re * xRe[u] + im * xIm[u];
        yIm[l] += re * xIm[u] - im * xRe[u];
      }
    }
  }

  /** Column j of H_QP + H_QQ ω − ω W, W being the first p rows of y. */
  private void residual(int j) {
    int at = j * n;
    for (int i = 0; i < q; i++) {
      residualRe[i] = yRe[at + p + i];
      residualIm[i] = yIm[at + p + i];
    }
    for (int k = 0; k < p; k++) {
      double re = yRe[at + k];
      double im = yIm[at + k];
      if (re == 0 && im == 0) {
        continue;
      }
      int from = k * n + p;
      for (int i = 0; i < q; i++) {
        residualRe[i] -= re * xRe[from + i] - im * xIm[from + i];
        residualIm[i] -= re * xIm[from + i] + im * xRe[from + i];
      }
    }
  }

  private double step(Resolvent r, int j) {
    int at = j * n + p;
    double change = 0;
    for (int i = 0; i < q; i++) {
      double re = 0;
      double im = 0;
      for (int e = r.first[i]; e < r.first[i + 1]; e++) {
        int c = r.column[e];
        re += r.re[e] * residualRe[c] - r.im[e] * residualIm[c];
        im += r.re[e] * residualIm[c] + r.im[e] * residualRe[c];
      }
      xRe[at + i] -= re;
      xIm[at + i] -= im;
      change = Math.max(change, Math.abs(re) + Math.abs(im));
    }
    return change;
  }

  private Resolvent[] resolvents() {
    Resolvent[] found = new Resolvent[p];
    for (int j = 0; j < p; j++) {
      double gap = Double.POSITIVE_INFINITY;
      for (int i = p; i < n; i++) {
        gap = Math.min(gap, Math.abs(diagonalRe[i] - diagonalRe[j]));
      }
      for (int k = 0; k < j && found[j] == null; k++) {
        if (Math.abs(found[k].energyRe - diagonalRe[j]) <= SAME_ENERGY * gap) {
          found[j] = found[k];
        }
      }
      if (found[j] == null) {
        found[j] = resolvent(j);
      }
    }
    return found;
  }

  private Resolvent resolvent(int j) {
    int[] first = new int[q + 1];
    if (q == 0) {
      return new Resolvent(diagonalRe[j], first, new int[0], new double[0], new double[0]);
    }
    ComplexMatrix shifted = ComplexMatrix.zeros(q, q);
    for (int i = 0; i < q; i++) {
      shifted.set(i, i, diagonalRe[p + i] - diagonalRe[j], diagonalIm[p + i] - diagonalIm[j]);
    }
    for (int c = 0; c < lower.length; c++) {
      if (lower[c] >= p && upper[c] >= p) {
        shifted.add(upper[c] - p, lower[c] - p, couplingRe[c], couplingIm[c]);
        shifted.add(lower[c] - p, upper[c] - p, couplingRe[c], -couplingIm[c]);
      }
    }
    LinearSystem system = LinearSystem.of(shifted);
    ComplexMatrix inverse = ComplexMatrix.zeros(q, q);
    double[] re = new double[q];
    double[] im = new double[q];
    double largest = 0;
    for (int c = 0; c < q; c++) {
      Arrays.fill(re, 0);
      Arrays.fill(im, 0);
      re[c] = 1;
      system.solve(re, im);
      for (int i = 0; i < q; i++) {
        inverse.set(i, c, re[i], im[i]);
        largest = Math.max(largest, Math.abs(re[i]) + Math.abs(im[i]));
      }
    }
    int[] column = new int[q * q];
    double[] keptRe = new double[q * q];
    double[] keptIm = new double[q * q];
    int kept = 0;
    for (int i = 0; i < q; i++) {
      for (int c = 0; c < q; c++) {
        double size = Math.abs(inverse.re(i, c)) + Math.abs(inverse.im(i, c));
        if (i == c || size > NEGLIGIBLE * largest) {
          column[kept] = c;
          keptRe[kept] = inverse.re(i, c);
          keptIm[kept] = inverse.im(i, c);
          kept++;
        }
      }
      first[i + 1] = kept;
    }
    return new Resolvent(
        diagonalRe[j],
        first,
        Arrays.copyOf(column, kept),
        Arrays.copyOf(keptRe, kept),
        Arrays.copyOf(keptIm, kept));
  }

  /** X†HX from x and y = H x. */
  private void normalize() {
    for (int i = 0; i < p; i++) {
      for (int j = 0; j < p; j++) {
        double gRe = 0;
        double gIm = 0;
        double mRe = yRe[j * n + i];
        double mIm = yIm[j * n + i];
        int left = i * n;
        int right = j * n;
        for (int k = p; k < n; k++) {
          double re = xRe[left + k];
          double im = xIm[left + k];
          gRe += re * xRe[right + k] + im * xIm[right + k];
          gIm += re * xIm[right + k] - im * xRe[right + k];
          mRe += re * yRe[right + k] + im * yIm[right + k];
          mIm += re * yIm[right + k] - im * yRe[right + k];
        }
        overlapRe[i * p + j] = gRe + (i == j ? 1 : 0);
        overlapIm[i * p + j] = gIm;
        effectiveRe[i * p + j] = mRe;
        effectiveIm[i * p + j] = mIm;
      }
    }
    inverseSquareRoot();
    product(zRe, zIm, effectiveRe, effectiveIm, aRe, aIm);
    product(aRe, aIm, zRe, zIm, effectiveRe, effectiveIm);
  }

  /**
   * Newton's iteration z ← z(3 − g z²)/2, which converges from 1 for ‖g − 1‖ &lt; 1; all iterates
   * commute with g. Higham, Functions of Matrices (2008), section 6.
   */
  private void inverseSquareRoot() {
    for (int i = 0; i < p; i++) {
      for (int j = 0; j < p; j++) {
        int e = i * p + j;
        zRe[e] = (i == j ? 1.5 : 0) - 0.5 * overlapRe[e];
        zIm[e] = -0.5 * overlapIm[e];
      }
    }
    for (int iteration = 0; iteration < 60; iteration++) {
      product(zRe, zIm, zRe, zIm, aRe, aIm);
      product(overlapRe, overlapIm, aRe, aIm, bRe, bIm);
      double off = 0;
      for (int e = 0; e < p * p; e++) {
        boolean onDiagonal = e / p == e % p;
        off = Math.max(off, Math.abs(bRe[e] - (onDiagonal ? 1 : 0)) + Math.abs(bIm[e]));
        bRe[e] = (onDiagonal ? 1.5 : 0) - 0.5 * bRe[e];
        bIm[e] = -0.5 * bIm[e];
      }
      product(zRe, zIm, bRe, bIm, aRe, aIm);
      System.arraycopy(aRe, 0, zRe, 0, p * p);
      System.arraycopy(aIm, 0, zIm, 0, p * p);
      if (off < 1e-8) {
        return; // the step just taken has squared it
      }
    }
  }

  private void product(
      double[] lRe, double[] lIm, double[] rRe, double[] rIm, double[] outRe, double[] outIm) {
    for (int i = 0; i < p; i++) {
      int row = i * p;
      Arrays.fill(outRe, row, row + p, 0);
      Arrays.fill(outIm, row, row + p, 0);
      for (int k = 0; k < p; k++) {
        double re = lRe[row + k];
        double im = lIm[row + k];
        if (re == 0 && im == 0) {
          continue;
        }
        int from = k * p;
        for (int j = 0; j < p; j++) {
          outRe[row + j] += re * rRe[from + j] - im * rIm[from + j];
          outIm[row + j] += re * rIm[from + j] + im * rRe[from + j];
        }
      }
    }
  }

  /**
   * The effective Hamiltonian of the last solution.
   *
   * @param re receives the real parts, row-major, length size²
   * @param im receives the imaginary parts, row-major, length size²
   */
  public void effective(double[] re, double[] im) {
    System.arraycopy(effectiveRe, 0, re, 0, p * p);
    System.arraycopy(effectiveIm, 0, im, 0, p * p);
  }

  /**
   * The orthonormal dressed states X of the last solution.
   *
   * @param re receives the real parts: states × size, row-major, rows in the order of the states
   * @param im receives the imaginary parts likewise
   */
  public void dressed(double[] re, double[] im) {
    for (int s = 0; s < n; s++) {
      int i = position[s];
      for (int j = 0; j < p; j++) {
        double sumRe = 0;
        double sumIm = 0;
        for (int k = 0; k < p; k++) {
          double xr = xRe[k * n + i];
          double xi = xIm[k * n + i];
          sumRe += xr * zRe[k * p + j] - xi * zIm[k * p + j];
          sumIm += xr * zIm[k * p + j] + xi * zRe[k * p + j];
        }
        re[s * p + j] = sumRe;
        im[s * p + j] = sumIm;
      }
    }
  }
}
