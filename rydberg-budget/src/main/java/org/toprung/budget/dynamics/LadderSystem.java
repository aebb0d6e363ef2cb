package org.toprung.budget.dynamics;

import java.util.Arrays;
import java.util.List;
import java.util.Map;
import java.util.concurrent.ConcurrentHashMap;
import java.util.function.Supplier;
import org.toprung.core.drive.Ladder;
import org.toprung.core.linear.Decoupling;

/**
 * A ladder under a pulse, without noise and without loss: the states near resonance, from which the
 * states far off are decoupled exactly at every setting of the program.
 *
 * <p>The basis is the one of the dressed states, so that start and wanted states are what edges
 * that are slow against the intermediate detuning make of them.
 *
 * <p>Changes of the program are followed with steps halved until the final state has settled to
 * {@value #SETTLED}, or there are more than half of {@value #MOST_STEPS} between two breaks, where
 * what was reached is taken as soon as it is good to {@value #TOLERATED}. Operators are derivatives
 * of the effective Hamiltonian, the change of the dressed basis included.
 *
 * <p>Immutable and thread-safe.
 */
public final class LadderSystem implements DrivenSystem {
  private static final double SETTLED = 3e-10;
  private static final double TOLERATED = 1e-5;
  private static final int FIRST_STEPS = 6;
  private static final int MOST_STEPS = 800;
  private static final int UNBEARABLE_STEPS = 16 * MOST_STEPS;

  private final CalibratedProgram calibrated;
  private final LadderPlan plan;
  private final Outcomes outcomes;
  private final int smoothSteps;
  private final int start;
  private final double[][] segmentRe;
  private final double[][] segmentIm;
  private final Map<List<Integer>, LadderDerivative> derivatives = new ConcurrentHashMap<>();
  private final Map<Integer, double[][]> dressed = new ConcurrentHashMap<>();

  private LadderSystem(
      CalibratedProgram calibrated, LadderPlan plan, Outcomes outcomes, int smoothSteps) {
    this.smoothSteps = smoothSteps;
    this.calibrated = calibrated;
    this.plan = plan;
    this.outcomes = outcomes;
    int p = plan.size();
    int first = 0;
    while (plan.active()[first] != calibrated.ladder().start()) {
      first++;
    }
    this.start = first;
    EffectiveLadder effective = new EffectiveLadder(plan);
    effective.load(ShotSetting.nominal(steps()));
    int segments = plan.timeline().segments();
    this.segmentRe = new double[segments][];
    this.segmentIm = new double[segments][];
    for (int m = 0; m < segments; m++) {
      boolean same =
          m > 0
              && plan.timeline().isConstant(m)
              && plan.timeline().isConstant(m - 1)
              && plan.timeline().first(m) == plan.timeline().first(m - 1);
      if (same) {
        segmentRe[m] = segmentRe[m - 1];
        segmentIm[m] = segmentIm[m - 1];
        continue;
      }
      segmentRe[m] = new double[p * p];
      segmentIm[m] = new double[p * p];
      effective.segment(m, segmentRe[m], segmentIm[m]);
    }
  }

  /**
   * The system of a calibrated pulse.
   *
   * @param calibrated the program on its ladder
   * @return the system
   * @throws ArithmeticException if the far-off states cannot be decoupled at some setting of the
   *     program, though they can be at full power and in the dark, or if the program changes too
   *     fast to be followed
   */
  public static LadderSystem of(CalibratedProgram calibrated) {
    return settled(calibrated, activeStates(calibrated), SETTLED);
  }

  /** Steps between breaks with which the final state is good to a figure. */
  static int smoothSteps(CalibratedProgram calibrated, int[] active, double amplitude) {
    LadderSystem system = settled(calibrated, active, amplitude);
    return system.smoothSteps;
  }

  private static LadderSystem settled(
      CalibratedProgram calibrated, int[] active, double amplitude) {
    Outcomes outcomes = outcomes(calibrated, active);
    double accuracy = accuracyHertz(calibrated, 0.3 * amplitude);
    double[][] last = null;
    for (int steps = FIRST_STEPS; ; steps *= 2) {
      Timeline timeline = Timeline.of(calibrated, steps, Double.POSITIVE_INFINITY);
      LadderPlan plan = LadderPlan.of(calibrated, calibrated.ladder(), active, timeline, accuracy);
      LadderSystem system = new LadderSystem(calibrated, plan, outcomes, steps);
      if (timeline.samples().stream().allMatch(Timeline.Sample::isConstant)) {
        return system;
      }
      double[][] end = system.end();
      // halving the steps of an integrator of order four leaves a fifteenth of the change
      double left = last == null ? Double.POSITIVE_INFINITY : difference(last, end) / 15;
      if (left < amplitude || 2 * steps > MOST_STEPS && left < Math.max(amplitude, TOLERATED)) {
        return system;
      }
      if (2 * steps > UNBEARABLE_STEPS) {
        throw new ArithmeticException(
            calibrated.pulse().name()
                + " changes too fast, or sweeps too far, to be followed: amplitudes are not good to "
                + TOLERATED
                + " with "
                + steps
                + " steps between two breaks");
      }
      last = end;
    }
  }

  static int[] activeStates(CalibratedProgram calibrated) {
    return ActiveStates.of(calibrated, calibrated.ladder());
  }

  /** How well a Hamiltonian has to be known for a final amplitude to be good to some figure. */
  static double accuracyHertz(CalibratedProgram calibrated, double amplitude) {
    return amplitude / (2 * Math.PI * calibrated.program().seconds());
  }

  /**
   * Time spent in every state of the ladder, the eliminated ones too.
   *
   * @return time-integrated populations, s, in the order of the ladder's states
   */
  public double[] secondsInStates() {
    return TimeInStates.of(this);
  }

  /**
   * Populations after the pulse.
   *
   * @return by state of the ladder; 0 for states that are eliminated
   */
  public double[] finalPopulations() {
    double[][] end = end();
    double[] populations = new double[calibrated.ladder().size()];
    for (int i = 0; i < size(); i++) {
      populations[plan.active()[i]] = end[0][i] * end[0][i] + end[1][i] * end[1][i];
    }
    return populations;
  }

  /**
   * Whether no intermediate state takes part, so that start and target are two levels.
   *
   * @return false where an intermediate state is nearly resonant
   */
  public boolean decouplesIntermediates() {
    return Arrays.stream(plan.active()).noneMatch(calibrated.ladder()::isIntermediate);
  }

  static Outcomes outcomes(CalibratedProgram calibrated, int[] active) {
    return outcomes(calibrated, calibrated.ladder(), active);
  }

  static Outcomes outcomes(CalibratedProgram calibrated, Ladder ladder, int[] active) {
    int steps = ladder.steps();
    double[] ones = new double[steps];
    Arrays.fill(ones, 1);
    LadderTerms terms = new LadderTerms(ladder);
    Decoupling work = terms.decoupling(active);
    terms.fill(ones, calibrated.fullPowerOffsetHertz(), ShotSetting.nominal(steps), work);
    work.anchor();
    double[] re = new double[active.length * active.length];
    double[] im = new double[re.length];
    work.effective(re, im);
    return Outcomes.of(calibrated, ladder, active, re, im);
  }

  private static double difference(double[][] a, double[][] b) {
    double sum = 0;
    for (int i = 0; i < a[0].length; i++) {
      sum += Math.abs(a[0][i] - b[0][i]) + Math.abs(a[1][i] - b[1][i]);
    }
    return sum;
  }

  /** The state at the end: real and imaginary parts. */
  double[][] end() {
    double[][] state = new double[2][size()];
    begin(state[0], state[1]);
    Propagation propagation = new Propagation(size());
    for (int m = 0; m < segments(); m++) {
      propagation.advance(segmentRe[m], segmentIm[m], segmentSeconds(m), state[0], state[1]);
    }
    return state;
  }

  /**
   * The program that this system is driven by.
   *
   * @return the calibrated program
   */
  public CalibratedProgram calibrated() {
    return calibrated;
  }

  /**
   * Error of the pulse without noise and loss.
   *
   * @return the error by the goal of the pulse
   */
  public double noiseFreeError() {
    double[][] end = end();
    return error(end[0], end[1]);
  }

  LadderPlan plan() {
    return plan;
  }

  @Override
  public int size() {
    return plan.size();
  }

  @Override
  public int steps() {
    return plan.terms().steps();
  }

  @Override
  public int segments() {
    return plan.timeline().segments();
  }

  @Override
  public double segmentSeconds(int segment) {
    return plan.timeline().seconds(segment);
  }

  @Override
  public void hamiltonianHertz(int segment, double[] re, double[] im) {
    System.arraycopy(segmentRe[segment], 0, re, 0, segmentRe[segment].length);
    System.arraycopy(segmentIm[segment], 0, im, 0, segmentIm[segment].length);
  }

  @Override
  public void frequencyOperator(int step, int segment, double[] re, double[] im) {
    derivative(List.of(0, step), () -> LadderDerivative.byFrequency(plan, step))
        .segment(segment, re, im);
  }

  @Override
  public void intensityOperator(int step, int segment, double[] re, double[] im) {
    derivative(List.of(1, step), () -> LadderDerivative.byIntensity(plan, step))
        .segment(segment, re, im);
  }

  @Override
  public void intensityCurvature(int step, int otherStep, int segment, double[] re, double[] im) {
    int one = Math.min(step, otherStep);
    int two = Math.max(step, otherStep);
    derivative(List.of(2, one, two), () -> LadderDerivative.byIntensities(plan, one, two))
        .segment(segment, re, im);
  }

  private LadderDerivative derivative(List<Integer> key, Supplier<LadderDerivative> make) {
    return derivatives.computeIfAbsent(key, k -> make.get());
  }

  @Override
  public void begin(double[] re, double[] im) {
    Arrays.fill(re, 0);
    Arrays.fill(im, 0);
    re[start] = 1;
  }

  @Override
  public int outcomes() {
    return outcomes.count();
  }

  @Override
  public void outcome(int outcome, double[] re, double[] im) {
    System.arraycopy(outcomes.vector(outcome)[0], 0, re, 0, size());
    System.arraycopy(outcomes.vector(outcome)[1], 0, im, 0, size());
  }

  @Override
  public double idleAmplitude() {
    return outcomes.idle();
  }

  @Override
  public double error(double[] re, double[] im) {
    return outcomes.error(re, im);
  }

  @Override
  public List<String> labels() {
    return calibrated.ladder().states().stream().map(Ladder.State::label).toList();
  }

  @Override
  public boolean takesPart(int label) {
    Ladder ladder = calibrated.ladder();
    boolean resonant =
        ladder.isIntermediate(label)
            && Arrays.stream(plan.active()).anyMatch(state -> state == label);
    return label == ladder.start() || ladder.isWanted(label) || resonant;
  }

  @Override
  public void populations(int segment, double[] re, double[] im, double[] out) {
    int sample = nearest(segment);
    double[][] x = dressed(sample);
    int p = size();
    double[] turnedRe = re.clone();
    double[] turnedIm = im.clone();
    plan.turnBack(sample, turnedRe, turnedIm);
    for (int s = 0; s < out.length; s++) {
      double sumRe = 0;
      double sumIm = 0;
      for (int j = 0; j < p; j++) {
        double xr = x[0][s * p + j];
        double xi = x[1][s * p + j];
        sumRe += xr * turnedRe[j] - xi * turnedIm[j];
        sumIm += xr * turnedIm[j] + xi * turnedRe[j];
      }
      out[s] = sumRe * sumRe + sumIm * sumIm;
    }
  }

  /** The sample that is nearest to a segment. */
  private int nearest(int segment) {
    Timeline timeline = plan.timeline();
    boolean first = timeline.firstWeight(segment) > 0.5;
    return first ? timeline.first(segment) : timeline.second(segment);
  }

  /** Dressed states at a sample, as if the light had no phase. */
  private double[][] dressed(int sample) {
    return dressed.computeIfAbsent(
        sample,
        s -> {
          Decoupling work = plan.workspace();
          plan.decoupleSample(s, work);
          double[][] x = new double[2][plan.terms().size() * size()];
          work.dressed(x[0], x[1]);
          return x;
        });
  }
}
