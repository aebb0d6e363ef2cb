package org.toprung.core.drive;

import java.util.Arrays;

/**
 * The effective two-level system that is left when the intermediate sublevels of a ladder are
 * eliminated to second order in the couplings.
 *
 * <p>With Ω<sub>is</sub>, Ω<sub>ti</sub> the couplings of intermediate sublevel i, Δ<sub>i</sub>
 * the detuning of the first laser from it and γ its natural width,
 *
 * <ul>
 *   <li>effective Rabi frequency of target t: Σ<sub>i</sub> Ω<sub>ti</sub>Ω<sub>is</sub> /
 *       2(Δ<sub>i</sub> + iγ/2) + coupling through the fine-structure partner;
 *   <li>light shift of the start: Σ<sub>i</sub> |Ω<sub>is</sub>|² Δ<sub>i</sub> / 4(Δ<sub>i</sub>²
 *       + γ²/4) + far-off-resonant part, of the target likewise with Ω<sub>ti</sub>;
 *   <li>scattering rate of the start: Σ<sub>i</sub> γ |Ω<sub>is</sub>|² / 4(Δ<sub>i</sub>² + γ²/4),
 *       of the target likewise.
 * </ul>
 *
 * <p>The width keeps every result finite when a sublevel is resonant; elimination itself is then
 * void, which {@link #admixture()} tells. A target that can carry several nuclear projections is
 * the superposition that the light couples to. References: Saffman and Walker, Phys. Rev. A 72,
 * 022347 (2005); Brion, Pedersen and Mølmer, J. Phys. A 40, 1033 (2007).
 *
 * <p>Immutable.
 */
public final class Elimination {
  private final double rabi; // Hz
  private final double[] startShift; // Hz by step
  private final double[] targetShift; // Hz by step
  private final double startScattering; // 1/s
  private final double targetScattering; // 1/s
  private final double admixture;

  private Elimination(
      double rabi,
      double[] startShift,
      double[] targetShift,
      double startScattering,
      double targetScattering,
      double admixture) {
    this.rabi = rabi;
    this.startShift = startShift;
    this.targetShift = targetShift;
    this.startScattering = startScattering;
    this.targetScattering = targetScattering;
    this.admixture = admixture;
  }

  /**
   * Eliminates the intermediate sublevels of a ladder at nominal powers.
   *
   * @param ladder ladder of two steps
   * @return the effective system of its start and its wanted target
   */
  public static Elimination of(Ladder ladder) {
    return of(ladder, ladder.wanted());
  }

  static Elimination of(Ladder ladder, int[] target) {
    int n = ladder.size();
    double[][] upRe = new double[2][n];
    double[][] upIm = new double[2][n];
    double[] re = new double[target.length];
    double[] im = new double[target.length];
    effectiveCoupling(ladder, target, re, im);
    double norm = 0;
    for (int t = 0; t < target.length; t++) {
      norm += re[t] * re[t] + im[t] * im[t];
    }
    double rabi = Math.sqrt(norm);
    // couplings of the start (step 0) and of the driven superposition of targets (step 1)
    for (Ladder.Coupling c : ladder.couplings()) {
      if (c.step() == 0 && c.lower() == ladder.start()) {
        upRe[0][c.upper()] += c.rabiReHertz();
        upIm[0][c.upper()] += c.rabiImHertz();
      } else if (c.step() == 1) {
        int t = indexOf(target, c.upper());
        if (t >= 0) {
          double wRe = rabi > 0 ? re[t] / rabi : t == 0 ? 1 : 0;
          double wIm = rabi > 0 ? im[t] / rabi : 0;
          // conj(weight) times coupling
          upRe[1][c.lower()] += wRe * c.rabiReHertz() + wIm * c.rabiImHertz();
          upIm[1][c.lower()] += wRe * c.rabiImHertz() - wIm * c.rabiReHertz();
        }
      }
    }
    double[] shift = new double[2];
    double[] scattering = new double[2];
    double admixture = 0;
    for (int i = 0; i < n; i++) {
      Ladder.State s = ladder.states().get(i);
      if (s.rung() != 1) {
        continue;
      }
      double detuning = -s.energyHertz();
      double width = s.decayPerSecond() / (2 * Math.PI);
      double denominator = 4 * (detuning * detuning + 0.25 * width * width);
      for (int k = 0; k < 2; k++) {
        double square = upRe[k][i] * upRe[k][i] + upIm[k][i] * upIm[k][i];
        shift[k] += square * detuning / denominator;
        scattering[k] += s.decayPerSecond() * square / denominator;
        if (square > 0) {
          admixture = Math.max(admixture, Math.sqrt(square / denominator));
        }
      }
    }
    double[] startShift = new double[2];
    double[] targetShift = new double[2];
    for (int k = 0; k < 2; k++) {
      startShift[k] = ladder.farShiftHertz(ladder.start(), k);
      for (int t = 0; t < target.length; t++) {
        double weight = rabi > 0 ? (re[t] * re[t] + im[t] * im[t]) / norm : t == 0 ? 1 : 0;
        targetShift[k] += weight * ladder.farShiftHertz(target[t], k);
      }
    }
    startShift[0] += shift[0];
    targetShift[1] += shift[1];
    return new Elimination(rabi, startShift, targetShift, scattering[0], scattering[1], admixture);
  }

  private static void effectiveCoupling(Ladder ladder, int[] target, double[] re, double[] im) {
    for (Ladder.Coupling up : ladder.couplings()) {
      int t = indexOf(target, up.upper());
      if (t < 0) {
        continue;
      }
      if (up.step() == Ladder.DIRECT && up.lower() == ladder.start()) {
        re[t] += up.rabiReHertz();
        im[t] += up.rabiImHertz();
      }
      if (up.step() != 1) {
        continue;
      }
      for (Ladder.Coupling low : ladder.couplings()) {
        if (low.step() != 0 || low.lower() != ladder.start() || low.upper() != up.lower()) {
          continue;
        }
        Ladder.State s = ladder.states().get(low.upper());
        double detuning = -s.energyHertz();
        double halfWidth = s.decayPerSecond() / (4 * Math.PI);
        double productRe =
            up.rabiReHertz() * low.rabiReHertz() - up.rabiImHertz() * low.rabiImHertz();
        double productIm =
            up.rabiReHertz() * low.rabiImHertz() + up.rabiImHertz() * low.rabiReHertz();
        double denominator = 2 * (detuning * detuning + halfWidth * halfWidth);
        re[t] += (productRe * detuning + productIm * halfWidth) / denominator;
        im[t] += (productIm * detuning - productRe * halfWidth) / denominator;
      }
    }
  }

  private static int indexOf(int[] array, int value) {
    for (int i = 0; i < array.length; i++) {
      if (array[i] == value) {
        return i;
      }
    }
    return -1;
  }

  /**
   * Effective Rabi frequency over 2π.
   *
   * @return the modulus, Hz
   */
  public double rabiHertz() {
    return rabi;
  }

  /**
   * Light shift of the start by one beam.
   *
   * @param step index of the step
   * @return the shift over h, positive upwards, Hz
   */
  public double startShiftHertz(int step) {
    return startShift[step];
  }

  /**
   * Light shift of the target by one beam.
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
    return Arrays.stream(startShift).sum();
  }

  /**
   * Light shift of the target by all beams.
   *
   * @return the shift over h, positive upwards, Hz
   */
  public double targetShiftHertz() {
    return Arrays.stream(targetShift).sum();
  }

  /**
   * Rate at which the start sublevel scatters photons through the intermediate level.
   *
   * @return the rate, 1/s
   */
  public double startScatteringPerSecond() {
    return startScattering;
  }

  /**
   * Rate at which the target scatters photons through the intermediate level.
   *
   * @return the rate, 1/s
   */
  public double targetScatteringPerSecond() {
    return targetScattering;
  }

  /**
   * The largest amplitude that the light mixes of one intermediate sublevel into start or target,
   * Ω/2|Δ|. Elimination is good to about the square of it.
   *
   * @return the amplitude, ≥ 0
   */
  public double admixture() {
    return admixture;
  }
}
