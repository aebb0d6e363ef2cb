package org.toprung.budget.dynamics;

import java.util.Arrays;
import org.toprung.core.drive.Ladder;

/**
 * Error of a calibrated pulse on the whole ladder when something stays wrong during the pulse. The
 * steps are those with which amplitudes are good to {@value #ACCURACY}; what is wanted are
 * differences, which are better.
 *
 * <p>Immutable and thread-safe.
 */
public final class LadderReaction {
  private static final double ACCURACY = 1e-6;

  private final CalibratedProgram calibrated;
  private final LadderPlan plan;
  private final Outcomes outcomes;
  private final int start;

  private LadderReaction(
      CalibratedProgram calibrated, Ladder ladder, LadderPlan plan, Outcomes outcomes) {
    this.calibrated = calibrated;
    this.plan = plan;
    this.outcomes = outcomes;
    int first = 0;
    while (plan.active()[first] != ladder.start()) {
      first++;
    }
    this.start = first;
  }

  /**
   * The reaction of a pulse.
   *
   * @param calibrated the pulse on its ladder
   * @return the reaction
   */
  public static LadderReaction of(CalibratedProgram calibrated) {
    int[] active = LadderSystem.activeStates(calibrated);
    int steps = LadderSystem.smoothSteps(calibrated, active, ACCURACY);
    Timeline timeline = Timeline.of(calibrated, steps, Double.POSITIVE_INFINITY);
    return of(calibrated, calibrated.ladder(), active, timeline);
  }

  private static LadderReaction of(
      CalibratedProgram calibrated, Ladder ladder, int[] active, Timeline timeline) {
    double accuracy = LadderSystem.accuracyHertz(calibrated, 0.1 * ACCURACY);
    return new LadderReaction(
        calibrated,
        ladder,
        LadderPlan.of(calibrated, ladder, active, timeline, accuracy),
        LadderSystem.outcomes(calibrated, ladder, active));
  }

  /**
   * The same program on another ladder.
   *
   * @param ladder the ladder
   * @return the reaction
   */
  public LadderReaction on(Ladder ladder) {
    int[] active = ActiveStates.of(calibrated, ladder);
    return of(calibrated, ladder, active, plan.timeline());
  }

  /**
   * Error of the pulse as planned.
   *
   * @return the error by the goal of the pulse
   */
  public double error() {
    double[] ones = new double[calibrated.ladder().steps()];
    Arrays.fill(ones, 1);
    return error(ones, 0, 1);
  }

  /**
   * Error when the atom sees something else than planned.
   *
   * @param fieldFactor field of each beam over the planned one
   * @param offsetHertz added to the frequency of the last laser, Hz
   * @param stretch length of the pulse over the planned one
   * @return the error by the goal of the pulse
   */
  public double error(double[] fieldFactor, double offsetHertz, double stretch) {
    ShotSetting shot = ShotSetting.nominal(fieldFactor.length);
    System.arraycopy(fieldFactor, 0, shot.fieldFactor, 0, fieldFactor.length);
    shot.laserOffset[fieldFactor.length - 1] = offsetHertz;
    return error(shot, stretch);
  }

  /**
   * Error of the pulse as planned when levels decay and what has decayed is lost.
   *
   * @param intermediateDecays whether the intermediate levels decay
   * @param rydbergPerSecond decay rate of the Rydberg level, 1/s
   * @return the error by the goal of the pulse
   */
  public double errorWithLoss(boolean intermediateDecays, double rydbergPerSecond) {
    ShotSetting shot = ShotSetting.nominal(calibrated.ladder().steps());
    shot.intermediateDecays = intermediateDecays;
    shot.rydbergDecayPerSecond = rydbergPerSecond;
    return error(shot, 1);
  }

  private double error(ShotSetting shot, double stretch) {
    EffectiveLadder effective = new EffectiveLadder(plan);
    effective.load(shot);
    int p = plan.size();
    double[] re = new double[p];
    double[] im = new double[p];
    re[start] = 1;
    double[] hRe = new double[p * p];
    double[] hIm = new double[p * p];
    Propagation propagation = new Propagation(p);
    for (int m = 0; m < plan.timeline().segments(); m++) {
      effective.segment(m, hRe, hIm);
      propagation.advance(hRe, hIm, stretch * plan.timeline().seconds(m), re, im);
    }
    return outcomes.error(re, im);
  }
}
