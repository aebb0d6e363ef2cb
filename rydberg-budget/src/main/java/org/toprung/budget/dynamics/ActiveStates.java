package org.toprung.budget.dynamics;

import java.util.ArrayList;
import java.util.List;
import org.toprung.core.drive.Ladder;
import org.toprung.core.linear.Decoupling;

/**
 * Chooses the states of a ladder that a pulse can populate; the others follow them.
 *
 * <p>They are the start, the wanted states and every ground or Rydberg state less than half as far
 * from the start's energy as the nearest intermediate state: the rest is as far off as the
 * intermediate level itself. Without an intermediate level they are the states within a gigahertz,
 * since edges of a pulse last longer than its inverse. Where these cannot be decoupled from the
 * rest, an intermediate state is near resonance, and all states below the first wide gap in
 * |energy| that can be decoupled take part; all of the ladder, if there is no such gap.
 */
final class ActiveStates {
  private static final double WIDE_GAP = 4; // ratio of neighbouring energies
  private static final double FOLLOWS_ANY_EDGE = 1e9; // Hz

  private ActiveStates() {}

  /**
   * The active states.
   *
   * @param ladder the ladder
   * @param fields field factors at full power
   * @param lastOffset offset of the last laser there, Hz
   * @return ascending indices
   */
  static int[] of(Ladder ladder, double[] fields, double lastOffset) {
    LadderTerms terms = new LadderTerms(ladder);
    int[] natural = natural(ladder);
    if (isSeparable(terms, natural, fields, lastOffset)) {
      return natural;
    }
    double[] distances =
        ladder.states().stream().mapToDouble(s -> Math.abs(s.energyHertz())).sorted().toArray();
    for (int i = 0; i + 1 < distances.length; i++) {
      if (distances[i + 1] > WIDE_GAP * distances[i]) {
        int[] near = nearer(ladder, 0.5 * (distances[i] + distances[i + 1]));
        if (isSeparable(terms, near, fields, lastOffset)) {
          return near;
        }
      }
    }
    return nearer(ladder, Double.POSITIVE_INFINITY);
  }

  private static int[] natural(Ladder ladder) {
    double nearest = ladder.steps() == 1 ? 2 * FOLLOWS_ANY_EDGE : Double.POSITIVE_INFINITY;
    for (int i = 0; i < ladder.size(); i++) {
      if (ladder.isIntermediate(i)) {
        nearest = Math.min(nearest, Math.abs(ladder.states().get(i).energyHertz()));
      }
    }
    List<Integer> found = new ArrayList<>();
    for (int i = 0; i < ladder.size(); i++) {
      boolean near = Math.abs(ladder.states().get(i).energyHertz()) < 0.5 * nearest;
      if (isOwn(ladder, i) || !ladder.isIntermediate(i) && near) {
        found.add(i);
      }
    }
    return found.stream().mapToInt(Integer::intValue).toArray();
  }

  private static int[] nearer(Ladder ladder, double distance) {
    List<Integer> found = new ArrayList<>();
    for (int i = 0; i < ladder.size(); i++) {
      if (isOwn(ladder, i) || Math.abs(ladder.states().get(i).energyHertz()) < distance) {
        found.add(i);
      }
    }
    return found.stream().mapToInt(Integer::intValue).toArray();
  }

  private static boolean isOwn(Ladder ladder, int state) {
    return state == ladder.start() || ladder.isWanted(state);
  }

  private static boolean isSeparable(
      LadderTerms terms, int[] populated, double[] fields, double lastOffset) {
    Decoupling decoupling = terms.decoupling(populated);
    List<double[]> settings = new ArrayList<>(List.of(fields, new double[fields.length]));
    for (int k = 0; k < fields.length; k++) {
      // each beam alone, as in the wings of pulses that follow each other
      double[] alone = new double[fields.length];
      alone[k] = fields[k];
      settings.add(alone);
    }
    try {
      for (double[] f : settings) {
        terms.fill(f, lastOffset, ShotSetting.nominal(fields.length), decoupling);
        decoupling.anchor();
      }
      return true;
    } catch (ArithmeticException notSeparable) {
      return false;
    }
  }
}
