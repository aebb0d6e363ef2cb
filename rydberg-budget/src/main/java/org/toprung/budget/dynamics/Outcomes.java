package org.toprung.budget.dynamics;

import java.util.ArrayList;
import java.util.List;
import org.toprung.budget.pulse.Goal;
import org.toprung.core.drive.Ladder;

/**
 * The vectors, in the basis of the dressed active states, that success is measured with.
 *
 * <p>Immutable.
 */
final class Outcomes {
  private final List<double[][]> vectors = new ArrayList<>(); // {re, im}
  private final double idle;

  private Outcomes(double idle) {
    this.idle = idle;
  }

  /**
   * The outcomes of a pulse.
   *
   * <p>The target of a rotation is the superposition of wanted states that the start couples to at
   * full power, with the phase of the coupling, so that the two-level system has a positive Rabi
   * frequency. A returning start is compared with an idling state with the phase that the ideal
   * pulse gives it, and the one that the light shift gives it along the program.
   *
   * @param calibrated the program
   * @param ladder the ladder, which may be another than it was calibrated on
   * @param active indices of the active states
   * @param re effective Hamiltonian at full power, real parts
   * @param im imaginary parts
   */
  static Outcomes of(
      CalibratedProgram calibrated, Ladder ladder, int[] active, double[] re, double[] im) {
    int p = active.length;
    int start = 0;
    while (active[start] != ladder.start()) {
      start++;
    }
    Goal goal = calibrated.pulse().goal();
    if (goal == Goal.TRANSFER) {
      Outcomes outcomes = new Outcomes(0);
      for (int i = 0; i < p; i++) {
        if (ladder.isWanted(active[i])) {
          double[][] vector = new double[2][p];
          vector[0][i] = 1;
          outcomes.vectors.add(vector);
        }
      }
      return outcomes;
    }
    for (int state : active) {
      if (goal != Goal.RETURN && ladder.isIntermediate(state)) {
        throw new IllegalArgumentException(
            calibrated.pulse().name()
                + " has to leave start and target in a superposition, but "
                + ladder.states().get(state).label()
                + " is so near resonance that it takes part; allowed: a drive with more detuning"
                + " from its intermediate levels, or a pulse that transfers or returns the atom");
      }
    }
    double[] ideal =
        TwoLevelSystem.idealEnd(calibrated.pulse(), ladder.steps(), calibrated.rabiHertz());
    double[][] vector = new double[2][p];
    if (goal == Goal.RETURN) {
      double phase = Math.atan2(ideal[1], ideal[0]) - calibrated.startPhaseRadians();
      vector[0][start] = 0.5 * Math.cos(phase);
      vector[1][start] = 0.5 * Math.sin(phase);
      Outcomes outcomes = new Outcomes(0.5);
      outcomes.vectors.add(vector);
      return outcomes;
    }
    vector[0][start] = ideal[0];
    vector[1][start] = ideal[1];
    double square = 0;
    for (int i = 0; i < p; i++) {
      if (ladder.isWanted(active[i])) {
        square += re[i * p + start] * re[i * p + start] + im[i * p + start] * im[i * p + start];
      }
    }
    for (int i = 0; i < p; i++) {
      if (ladder.isWanted(active[i])) {
        double a = re[i * p + start] / Math.sqrt(square);
        double b = im[i * p + start] / Math.sqrt(square);
        vector[0][i] = a * ideal[2] - b * ideal[3];
        vector[1][i] = a * ideal[3] + b * ideal[2];
      }
    }
    Outcomes outcomes = new Outcomes(0);
    outcomes.vectors.add(vector);
    return outcomes;
  }

  int count() {
    return vectors.size();
  }

  double[][] vector(int outcome) {
    return vectors.get(outcome);
  }

  double idle() {
    return idle;
  }

  /** 1 − Σ |c + ⟨w|ψ⟩|². */
  double error(double[] re, double[] im) {
    double success = 0;
    for (int v = 0; v < vectors.size(); v++) {
      double[] wRe = vectors.get(v)[0];
      double[] wIm = vectors.get(v)[1];
      double real = idle;
      double imaginary = 0;
      for (int i = 0; i < re.length; i++) {
        real += wRe[i] * re[i] + wIm[i] * im[i];
        imaginary += wRe[i] * im[i] - wIm[i] * re[i];
      }
      success += real * real + imaginary * imaginary;
    }
    return 1 - success;
  }
}
