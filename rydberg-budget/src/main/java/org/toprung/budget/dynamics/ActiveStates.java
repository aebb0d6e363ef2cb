package org.toprung.budget.dynamics;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.stream.IntStream;
import org.toprung.budget.pulse.PulseProgram;
import org.toprung.core.drive.Ladder;
import org.toprung.core.linear.Decoupling;

/**
 * Chooses the states of a ladder that a pulse can populate; the others follow them.
 *
 * <p>They are the start, the wanted states and every ground or Rydberg state less than half as far
 * from the start's energy as the nearest intermediate state: the rest is as far off as the
 * intermediate level itself. Without an intermediate level they are the states within a gigahertz,
 * since edges of a pulse last longer than its inverse.
 *
 * <p>Of a pulse without jumps, states further off than {@value #SLOW} times its steepest slope take
 * no part either: a kink of slope s leaves (Ωs/4πδ²)² at the distance δ, below 1e-8 there.
 *
 * <p>Where an intermediate state is nearer to resonance than twice the Rabi frequency that leads to
 * it, or where these states cannot be decoupled from the rest (at full power, in the dark, in each
 * beam alone and all along the program), all of the ladder takes part: what is near does not follow
 * closely enough.
 */
final class ActiveStates {
  private static final double FOLLOWS_ANY_EDGE = 1e9; // Hz
  private static final double FAR_OFF = 2; // detuning over Rabi frequency
  private static final double SLOW = 20; // distance, Hz, over slope of the amplitude, 1/s
  private static final double DARK = 1e-3; // amplitude that is no jump
  private static final int SLOPES = 64; // between breaks where anything changes
  private static final int STEPS = 16; // between breaks where anything changes

  private ActiveStates() {}

  /**
   * The active states.
   *
   * @param calibrated the program
   * @param ladder the ladder, which may differ from the one that the program was calibrated on
   * @return ascending indices
   */
  static int[] of(CalibratedProgram calibrated, Ladder ladder) {
    LadderTerms terms = new LadderTerms(ladder);
    List<Timeline.Sample> settings = settings(calibrated);
    int[] natural = natural(ladder, reach(calibrated));
    if (isFarOff(ladder) && isSeparable(terms, natural, settings)) {
      return natural;
    }
    return IntStream.range(0, ladder.size()).toArray();
  }

  /** Whether every intermediate state is further off than twice what drives it. */
  private static boolean isFarOff(Ladder ladder) {
    for (Ladder.Coupling c : ladder.couplings()) {
      double rabi = Math.hypot(c.rabiReHertz(), c.rabiImHertz());
      for (int state : new int[] {c.lower(), c.upper()}) {
        double energy = Math.abs(ladder.states().get(state).energyHertz());
        if (ladder.isIntermediate(state) && !(energy >= FAR_OFF * rabi)) {
          return false;
        }
      }
    }
    return true;
  }

  /** Distance within which the shape of a pulse can populate a state, Hz. */
  private static double reach(CalibratedProgram calibrated) {
    PulseProgram program = calibrated.program();
    double jumping = program.steps() == 1 ? FOLLOWS_ANY_EDGE : Double.POSITIVE_INFINITY;
    if (!calibrated.pulse().isTwoLevel()) {
      return jumping;
    }
    double[] breaks = program.breaks();
    double steepest = 0;
    double detuning = 0;
    double last = 0;
    for (int b = 0; b + 1 < breaks.length; b++) {
      double step = (breaks[b + 1] - breaks[b]) / SLOPES;
      for (int i = 0; i < SLOPES; i++) {
        double t = breaks[b] + (i + 0.5) * step;
        double amplitude = program.amplitude(t);
        if (i == 0 && Math.abs(program.amplitude(breaks[b] + 1e-6 * step) - last) > DARK) {
          return jumping;
        }
        if (i > 0) {
          steepest = Math.max(steepest, Math.abs(amplitude - last) / step);
        }
        last = amplitude;
        detuning = Math.max(detuning, Math.abs(program.detuningHertz(t)));
      }
      last = program.amplitude(breaks[b + 1] - 1e-6 * step);
    }
    return last > DARK ? jumping : Math.min(jumping, SLOW * steepest + 2 * detuning);
  }

  private static int[] natural(Ladder ladder, double reach) {
    double nearest = 2 * reach;
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

  private static boolean isOwn(Ladder ladder, int state) {
    return state == ladder.start() || ladder.isWanted(state);
  }

  private static List<Timeline.Sample> settings(CalibratedProgram calibrated) {
    int steps = calibrated.ladder().steps();
    double offset = calibrated.fullPowerOffsetHertz();
    double[] full = new double[steps];
    Arrays.fill(full, 1);
    List<double[]> fields = new ArrayList<>(List.of(full, new double[steps]));
    for (int k = 0; k < steps; k++) {
      // each beam alone, as in the wings of pulses that follow each other
      double[] alone = new double[steps];
      alone[k] = 1;
      fields.add(alone);
    }
    List<Timeline.Sample> settings = new ArrayList<>();
    fields.forEach(f -> settings.add(new Timeline.Sample(f, offset, 0, true)));
    settings.addAll(Timeline.of(calibrated, STEPS, Double.POSITIVE_INFINITY).samples());
    return settings;
  }

  private static boolean isSeparable(
      LadderTerms terms, int[] populated, List<Timeline.Sample> settings) {
    Decoupling decoupling = terms.decoupling(populated);
    ShotSetting nominal = ShotSetting.nominal(terms.steps());
    Decoupling.Anchor full = null;
    try {
      for (Timeline.Sample setting : settings) {
        terms.fill(setting.fields(), setting.lastOffset(), nominal, decoupling);
        if (full == null) {
          full = decoupling.anchor();
        } else {
          decoupling.anchor(full);
        }
      }
      return true;
    } catch (ArithmeticException notSeparable) {
      return false;
    }
  }
}
