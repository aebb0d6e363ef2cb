package org.toprung.budget.cause;

import java.util.Arrays;
import java.util.List;
import java.util.OptionalDouble;
import org.toprung.budget.dynamics.CalibratedProgram;
import org.toprung.budget.dynamics.EdgeResidual;
import org.toprung.budget.dynamics.LadderReaction;
import org.toprung.budget.dynamics.LadderSystem;
import org.toprung.budget.dynamics.NoiseFreePulse;
import org.toprung.budget.dynamics.TwoLevelSystem;
import org.toprung.budget.pulse.Pulse;
import org.toprung.budget.response.PulseResponse;
import org.toprung.core.drive.Elimination;
import org.toprung.core.drive.Ladder;
import org.toprung.core.quantity.Frequency;

/**
 * A pulse calibrated on one ladder, and how it reacts: what costs time to compute and does not
 * depend on rates of loss.
 *
 * <p>Immutable and thread-safe.
 */
final class PulseCore {
  private final Ladder ladder;
  private final Pulse pulse;
  private final double meanRabi; // over the Rabi frequency at the mean field of each beam
  private final CalibratedProgram calibrated;
  private final LadderSystem system; // without the pulse's own offset
  private final NoiseFreePulse noiseFree;
  private final boolean twoLevel;
  private final Reaction reaction;
  private final double baseline;
  private final double baselineWithoutOffset;
  private final Lazy<PulseResponse> response;
  private final Lazy<double[]> seconds;
  private final Lazy<OptionalDouble> residual;
  private final Lazy<LadderReaction> whole;

  PulseCore(Ladder ladder, Pulse pulse, double meanRabi) {
    this.ladder = ladder;
    this.pulse = pulse;
    this.meanRabi = meanRabi;
    this.calibrated = CalibratedProgram.of(ladder, pulse, meanRabi);
    boolean offset = pulse.offset().hertz() != 0;
    CalibratedProgram onResonance =
        offset
            ? CalibratedProgram.of(ladder, pulse.offsetBy(Frequency.ofHertz(0)), meanRabi)
            : calibrated;
    this.system = LadderSystem.of(onResonance);
    this.noiseFree = NoiseFreePulse.of(system);
    this.twoLevel = pulse.isTwoLevel() && system.decouplesIntermediates();
    this.reaction = reaction(calibrated);
    this.baseline = reaction.detuned(0);
    this.baselineWithoutOffset = offset ? reaction(onResonance).detuned(0) : baseline;
    this.response =
        new Lazy<>(() -> twoLevel ? effectiveResponse() : PulseResponse.ladder(ladder, pulse));
    LadderSystem played = offset ? LadderSystem.of(calibrated) : system;
    this.seconds = new Lazy<>(played::secondsInStates);
    this.whole = new Lazy<>(() -> LadderReaction.of(calibrated));
    this.residual = new Lazy<>(() -> EdgeResidual.of(system));
  }

  private Reaction reaction(CalibratedProgram program) {
    return twoLevel
        ? new TwoLevelReaction(
            TwoLevelSystem.of(
                program.pulse(),
                ladder.steps(),
                calibrated.meanRabiHertz(),
                shifts(),
                startShifts()))
        : new WholeLadderReaction(LadderReaction.of(program), ladder.steps());
  }

  private PulseResponse effectiveResponse() {
    return PulseResponse.twoLevel(
        pulse,
        Frequency.ofHertz(calibrated.meanRabiHertz()),
        frequencies(shifts()),
        frequencies(startShifts()));
  }

  private static List<Frequency> frequencies(double[] hertz) {
    return Arrays.stream(hertz).mapToObj(Frequency::ofHertz).toList();
  }

  /** Moves of the resonance by each beam, Hz. */
  private double[] shifts() {
    Elimination elimination = Elimination.of(ladder);
    double[] shifts = new double[ladder.steps()];
    for (int k = 0; k < shifts.length; k++) {
      shifts[k] = elimination.targetShiftHertz(k) - elimination.startShiftHertz(k);
    }
    return shifts;
  }

  /** Moves of the start by each beam, Hz. */
  private double[] startShifts() {
    Elimination elimination = Elimination.of(ladder);
    double[] shifts = new double[ladder.steps()];
    for (int k = 0; k < shifts.length; k++) {
      shifts[k] = elimination.startShiftHertz(k);
    }
    return shifts;
  }

  /** The same pulse calibrated on a ladder that has more states. */
  CalibratedProgram calibratedOn(Ladder other) {
    return CalibratedProgram.of(other, pulse, meanRabi);
  }

  /** Error of the planned pulse without noise on another ladder. */
  double noiseFreeErrorOn(Ladder other) {
    return whole.get().on(other).error();
  }

  /** What decay of the intermediate levels, multiplied by a factor, adds to the error. */
  double intermediateLoss(double factor) {
    LadderReaction decaying = whole.get().on(ladder.withIntermediateDecayScaled(factor));
    return decaying.errorWithLoss(true, 0) - decaying.error();
  }

  /** What decay of the Rydberg level adds to the error. */
  double rydbergLoss(double perSecond) {
    return whole.get().errorWithLoss(false, perSecond) - whole.get().error();
  }

  CalibratedProgram calibrated() {
    return calibrated;
  }

  Pulse pulse() {
    return pulse;
  }

  LadderSystem system() {
    return system;
  }

  NoiseFreePulse noiseFree() {
    return noiseFree;
  }

  boolean isTwoLevel() {
    return twoLevel;
  }

  Reaction reaction() {
    return reaction;
  }

  double baseline() {
    return baseline;
  }

  double offsetError() {
    return baseline - baselineWithoutOffset;
  }

  PulseResponse response() {
    return response.get();
  }

  /** Time-integrated populations of the ladder's states, s; not to be changed. */
  double[] seconds() {
    return seconds.get();
  }

  OptionalDouble residualIntermediate() {
    return residual.get();
  }
}
