package org.toprung.core.drive;

import java.util.ArrayList;
import java.util.List;
import org.toprung.core.linear.ComplexMatrix;
import org.toprung.core.linear.LinearSystem;

/**
 * The effective two-level system that is left when the intermediate sublevels of a ladder are
 * eliminated.
 *
 * <p>With start s, targets t and the intermediate sublevels Q, whose block of the Hamiltonian over
 * h is H<sub>QQ</sub> − iγ/4π, the amplitudes that follow start and target are x<sub>s</sub> =
 * −H<sub>QQ</sub>⁻¹H<sub>Qs</sub> and x<sub>t</sub> likewise, and
 *
 * <ul>
 *   <li>effective Rabi frequency of target t: 2(H<sub>ts</sub> + H<sub>tQ</sub>x<sub>s</sub>);
 *   <li>light shift of the start: Re H<sub>sQ</sub>x<sub>s</sub> + shift by levels outside the
 *       ladder, of the target likewise with x<sub>t</sub>;
 *   <li>scattering rate of the start: Σ<sub>i</sub> γ<sub>i</sub>|x<sub>s,i</sub>|², of the target
 *       likewise.
 * </ul>
 *
 * <p>This is second order in the first and the last step and exact in the steps between. For two
 * steps it is the textbook sum Σ Ω<sub>ti</sub>Ω<sub>is</sub>/2(Δ<sub>i</sub> + iγ/2), Σ
 * |Ω<sub>is</sub>|²Δ<sub>i</sub>/4(Δ<sub>i</sub>² + γ²/4); for three steps with a resonant, strong
 * middle one it is Ω1Ω3/Ω2. The width keeps every result finite when a sublevel is resonant;
 * elimination itself is then void, which {@link #admixture()} tells. A target that can carry
 * several nuclear projections is the superposition that the light couples to.
 *
 * <p>References: Cohen-Tannoudji, Dupont-Roc and Grynberg, Atom-Photon Interactions (1992),
 * complement BI; Saffman and Walker, Phys. Rev. A 72, 022347 (2005); Brion, Pedersen and Mølmer, J.
 * Phys. A 40, 1033 (2007).
 *
 * <p>Immutable.
 */
public final class Elimination {
  private final double[] targetRabi; // Hz by state, on the last rung
  private final double[] targetBound; // Hz by state: were all paths to add up
  private final int strongest;
  private final double rabi; // Hz
  private final double[] startShift; // Hz by step
  private final double[] targetShift; // Hz by step
  private final double startScattering; // 1/s
  private final double targetScattering; // 1/s
  private final double admixture;
  private final double[][] startFollowing; // amplitudes by state, real and imaginary
  private final double[][] targetFollowing;

  private Elimination(Ladder ladder) {
    int n = ladder.size();
    int last = ladder.steps() - 1;
    double[] re = new double[n * n];
    double[] im = new double[n * n];
    ladder.hamiltonianHertz(LadderSetting.nominal(ladder.steps()), re, im);
    ladder.addLossHertz(0, im);
    // on resonance both ends lie where levels outside the ladder have moved the start
    double energy = re[ladder.start() * n + ladder.start()];
    for (int i = 0; i < n; i++) {
      re[i * n + i] -= energy;
    }
    Following following = new Following(ladder, re, im);
    double[][] s = following.of(ladder.start());
    int[] wanted = ladder.wanted();
    this.targetRabi = new double[n];
    this.targetBound = new double[n];
    double[] weightRe = new double[n];
    double[] weightIm = new double[n];
    double norm = 0;
    for (int t = 0; t < n; t++) {
      if (ladder.states().get(t).rung() != ladder.steps()) {
        continue;
      }
      double[] coupling = following.effective(t, s, ladder.start());
      targetRabi[t] = 2 * Math.hypot(coupling[0], coupling[1]);
      targetBound[t] = 2 * following.bound(t, s, ladder.start());
      if (ladder.isWanted(t)) {
        weightRe[t] = coupling[0];
        weightIm[t] = coupling[1];
        norm += coupling[0] * coupling[0] + coupling[1] * coupling[1];
      }
    }
    int best = wanted[0];
    for (int w : wanted) {
      best = targetRabi[w] > targetRabi[best] ? w : best;
    }
    this.strongest = best;
    this.rabi = 2 * Math.sqrt(norm);
    double[][] x = new double[2][n];
    this.startShift = new double[ladder.steps()];
    this.targetShift = new double[ladder.steps()];
    for (int w : wanted) {
      // the bright superposition; any member will do when nothing couples
      double aRe = norm > 0 ? weightRe[w] / Math.sqrt(norm) : w == wanted[0] ? 1 : 0;
      double aIm = norm > 0 ? weightIm[w] / Math.sqrt(norm) : 0;
      double[][] t = following.of(w);
      for (int i = 0; i < n; i++) {
        x[0][i] += aRe * t[0][i] - aIm * t[1][i];
        x[1][i] += aRe * t[1][i] + aIm * t[0][i];
      }
      for (int k = 0; k < ladder.steps(); k++) {
        targetShift[k] += (aRe * aRe + aIm * aIm) * ladder.farShiftHertz(w, k);
      }
    }
    for (int k = 0; k < ladder.steps(); k++) {
      startShift[k] = ladder.farShiftHertz(ladder.start(), k);
    }
    startShift[0] += following.shift(s);
    targetShift[last] += following.shift(x);
    this.startFollowing = s;
    this.targetFollowing = x;
    double largest = 0;
    double fromStart = 0;
    double fromTarget = 0;
    for (int i = 0; i < n; i++) {
      largest = Math.max(largest, Math.max(startAdmixture(i), targetAdmixture(i)));
      fromStart += ladder.states().get(i).decayPerSecond() * startAdmixture(i);
      fromTarget += ladder.states().get(i).decayPerSecond() * targetAdmixture(i);
    }
    this.startScattering = fromStart;
    this.targetScattering = fromTarget;
    this.admixture = Math.sqrt(largest);
  }

  /**
   * Eliminates the intermediate sublevels of a ladder at nominal powers.
   *
   * @param ladder the ladder
   * @return the effective system of its start and its wanted target
   */
  public static Elimination of(Ladder ladder) {
    return new Elimination(ladder);
  }

  /** The amplitudes of the intermediate sublevels that follow a state of the first or last rung. */
  private static final class Following {
    private final int n;
    private final double[] re;
    private final double[] im;
    private final int[] q;
    private final LinearSystem block; // null without intermediate sublevels

    Following(Ladder ladder, double[] re, double[] im) {
      this.n = ladder.size();
      this.re = re;
      this.im = im;
      List<Integer> middle = new ArrayList<>();
      for (int i = 0; i < n; i++) {
        if (ladder.isIntermediate(i)) {
          middle.add(i);
        }
      }
      this.q = middle.stream().mapToInt(Integer::intValue).toArray();
      if (q.length == 0) {
        block = null;
        return;
      }
      ComplexMatrix h = ComplexMatrix.zeros(q.length, q.length);
      for (int i = 0; i < q.length; i++) {
        for (int j = 0; j < q.length; j++) {
          h.set(i, j, re[q[i] * n + q[j]], im[q[i] * n + q[j]]);
        }
      }
      this.block = LinearSystem.of(h);
    }

    /** −H_QQ⁻¹ H_Qs, zero outside Q: real and imaginary parts. */
    double[][] of(int state) {
      double[][] x = new double[2][n];
      if (q.length == 0) {
        return x;
      }
      double[] vRe = new double[q.length];
      double[] vIm = new double[q.length];
      for (int i = 0; i < q.length; i++) {
        vRe[i] = -re[q[i] * n + state];
        vIm[i] = -im[q[i] * n + state];
      }
      block.solve(vRe, vIm);
      for (int i = 0; i < q.length; i++) {
        x[0][q[i]] = vRe[i];
        x[1][q[i]] = vIm[i];
      }
      return x;
    }

    /** H_ts + H_tQ x, Hz. */
    double[] effective(int t, double[][] x, int s) {
      double sumRe = re[t * n + s];
      double sumIm = im[t * n + s];
      for (int i : q) {
        sumRe += re[t * n + i] * x[0][i] - im[t * n + i] * x[1][i];
        sumIm += re[t * n + i] * x[1][i] + im[t * n + i] * x[0][i];
      }
      return new double[] {sumRe, sumIm};
    }

    /** |H_ts| + Σ |H_tQ x|, Hz. */
    double bound(int t, double[][] x, int s) {
      double sum = Math.hypot(re[t * n + s], im[t * n + s]);
      for (int i : q) {
        sum += Math.hypot(re[t * n + i], im[t * n + i]) * Math.hypot(x[0][i], x[1][i]);
      }
      return sum;
    }

    /** Re of H_sQ x_s = −x† H_QQ x, the shift of the followed state, Hz. */
    double shift(double[][] x) {
      double sum = 0;
      for (int i : q) {
        for (int j : q) {
          double hRe = re[i * n + j];
          double hIm = im[i * n + j];
          double vRe = hRe * x[0][j] - hIm * x[1][j];
          double vIm = hRe * x[1][j] + hIm * x[0][j];
          sum -= x[0][i] * vRe + x[1][i] * vIm;
        }
      }
      return sum;
    }
  }

  /**
   * Effective Rabi frequency over 2π of the wanted target.
   *
   * @return the modulus, Hz
   */
  public double rabiHertz() {
    return rabi;
  }

  /**
   * Effective Rabi frequency over 2π between the start and one state of the last rung.
   *
   * @param state index of the state
   * @return the modulus, Hz; zero for states of other rungs
   */
  public double rabiHertz(int state) {
    return targetRabi[state];
  }

  /**
   * Whether the paths to a state cancel, but for rounding.
   *
   * @param state index of a state of the last rung
   * @return true if its Rabi frequency is below 10⁻¹² of the sum of the moduli of its paths
   */
  boolean cancels(int state) {
    return !(targetRabi[state] > StepLight.NEGLIGIBLE * targetBound[state]);
  }

  /**
   * The wanted sublevel that takes the largest part of the coupling.
   *
   * @return index of the state
   */
  public int strongestWanted() {
    return strongest;
  }

  /**
   * Light shift of the start by one beam. The near-resonant part counts with the first beam.
   *
   * @param step index of the step
   * @return the shift over h, positive upwards, Hz
   */
  public double startShiftHertz(int step) {
    return startShift[step];
  }

  /**
   * Light shift of the target by one beam. The near-resonant part counts with the last beam.
   *
   * @param step index of the step
   * @return the shift over h, positive upwards, Hz
   */
  public double targetShiftHertz(int step) {
    return targetShift[step];
  }

  /**
   * Light shift of the start by all beams.
   *
   * @return the shift over h, positive upwards, Hz
   */
  public double startShiftHertz() {
    return sum(startShift);
  }

  /**
   * Light shift of the target by all beams.
   *
   * @return the shift over h, positive upwards, Hz
   */
  public double targetShiftHertz() {
    return sum(targetShift);
  }

  private static double sum(double[] values) {
    double sum = 0;
    for (double v : values) {
      sum += v;
    }
    return sum;
  }

  /**
   * Rate at which the start sublevel scatters photons through the intermediate levels.
   *
   * @return the rate, 1/s
   */
  public double startScatteringPerSecond() {
    return startScattering;
  }

  /**
   * Rate at which the target scatters photons through the intermediate levels.
   *
   * @return the rate, 1/s
   */
  public double targetScatteringPerSecond() {
    return targetScattering;
  }

  /**
   * The largest amplitude of one intermediate sublevel in the dressed start or target, Ω/2|Δ| for
   * two steps. Elimination is good to about the square of it.
   *
   * @return the amplitude, ≥ 0
   */
  public double admixture() {
    return admixture;
  }

  /**
   * Population of an intermediate sublevel in the dressed start.
   *
   * @param state index of the state
   * @return the population
   */
  public double startAdmixture(int state) {
    return population(startFollowing, state);
  }

  /**
   * Population of an intermediate sublevel in the dressed target.
   *
   * @param state index of the state
   * @return the population
   */
  public double targetAdmixture(int state) {
    return population(targetFollowing, state);
  }

  private static double population(double[][] x, int state) {
    return x[0][state] * x[0][state] + x[1][state] * x[1][state];
  }

  /** Amplitudes of the intermediate sublevels in the dressed start: real and imaginary parts. */
  double[][] startFollowing() {
    return startFollowing;
  }

  /** Amplitudes of the intermediate sublevels in the dressed target: real and imaginary parts. */
  double[][] targetFollowing() {
    return targetFollowing;
  }
}
