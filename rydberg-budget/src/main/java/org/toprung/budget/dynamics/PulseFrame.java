package org.toprung.budget.dynamics;

import java.util.ArrayList;
import java.util.List;
import org.toprung.core.drive.DressedFrame;
import org.toprung.core.drive.Ladder;
import org.toprung.core.drive.LadderSetting;

/**
 * The state a pulse begins with and the states its outcome is measured in.
 *
 * <p>Where the intermediate level is far enough, these are the dressed states at the pulse's
 * nominal setting, since edges that are slow against the intermediate detuning follow them;
 * otherwise the bare ones.
 *
 * <p>Immutable and thread-safe.
 */
public final class PulseFrame {

  /** Where the atom can be found after a pulse. */
  public enum Outcome {
    /** The start sublevel. */
    START,
    /** The wanted target, with any nuclear projection. */
    WANTED,
    /** Another sublevel of the Rydberg level. */
    OTHER_RYDBERG,
    /** Another sublevel of the ground level. */
    OTHER_GROUND
  }

  private final int size;
  private final List<Outcome> outcomes = new ArrayList<>();
  private final List<double[][]> vectors = new ArrayList<>(); // {re, im}

  private PulseFrame(int size) {
    this.size = size;
  }

  /**
   * The frame of a ladder.
   *
   * @param ladder the ladder
   * @param setting nominal setting of the pulse, with its frequency offset
   * @return the frame
   */
  public static PulseFrame of(Ladder ladder, LadderSetting setting) {
    int n = ladder.size();
    PulseFrame frame = new PulseFrame(n);
    int[] populated = populated(ladder);
    try {
      DressedFrame dressed = DressedFrame.of(ladder, setting, populated);
      for (int p = 0; p < populated.length; p++) {
        double[][] vector = new double[2][n];
        dressed.dressedState(p, vector[0], vector[1]);
        frame.add(outcome(ladder, populated[p]), vector);
      }
    } catch (ArithmeticException notSeparable) {
      for (int p : populated) {
        double[][] vector = new double[2][n];
        vector[0][p] = 1;
        frame.add(outcome(ladder, p), vector);
      }
    }
    return frame;
  }

  private void add(Outcome outcome, double[][] vector) {
    outcomes.add(outcome);
    vectors.add(vector);
  }

  /**
   * Ground and Rydberg states less than half as far from the start's energy as the nearest
   * intermediate state: the rest is as far off as the intermediate level itself. All of them where
   * there is no intermediate level.
   */
  private static int[] populated(Ladder ladder) {
    double nearest = Double.POSITIVE_INFINITY;
    for (int i = 0; i < ladder.size(); i++) {
      if (ladder.isIntermediate(i)) {
        nearest = Math.min(nearest, Math.abs(ladder.states().get(i).energyHertz()));
      }
    }
    List<Integer> found = new ArrayList<>();
    for (int i = 0; i < ladder.size(); i++) {
      Ladder.State s = ladder.states().get(i);
      boolean own = i == ladder.start() || ladder.isWanted(i);
      if (own || !ladder.isIntermediate(i) && Math.abs(s.energyHertz()) < 0.5 * nearest) {
        found.add(i);
      }
    }
    return found.stream().mapToInt(Integer::intValue).toArray();
  }

  private static Outcome outcome(Ladder ladder, int index) {
    if (index == ladder.start()) {
      return Outcome.START;
    }
    if (ladder.isWanted(index)) {
      return Outcome.WANTED;
    }
    return ladder.states().get(index).rung() == 0 ? Outcome.OTHER_GROUND : Outcome.OTHER_RYDBERG;
  }

  /**
   * Writes the state at the beginning of the pulse.
   *
   * @param re receives the real parts
   * @param im receives the imaginary parts
   */
  public void begin(double[] re, double[] im) {
    double[][] start = vectors.get(outcomes.indexOf(Outcome.START));
    System.arraycopy(start[0], 0, re, 0, size);
    System.arraycopy(start[1], 0, im, 0, size);
  }

  /**
   * Probability of an outcome.
   *
   * @param outcome what to look for
   * @param re real parts of the state
   * @param im imaginary parts of the state
   * @return the probability
   */
  public double probability(Outcome outcome, double[] re, double[] im) {
    double sum = 0;
    for (int v = 0; v < vectors.size(); v++) {
      if (outcomes.get(v) != outcome) {
        continue;
      }
      double[][] vector = vectors.get(v);
      double overlapRe = 0;
      double overlapIm = 0;
      for (int i = 0; i < size; i++) {
        overlapRe += vector[0][i] * re[i] + vector[1][i] * im[i];
        overlapIm += vector[0][i] * im[i] - vector[1][i] * re[i];
      }
      sum += overlapRe * overlapRe + overlapIm * overlapIm;
    }
    return sum;
  }
}
