package org.toprung.budget.cause;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.OptionalDouble;
import org.toprung.budget.bench.Bench;
import org.toprung.budget.dynamics.CalibratedProgram;
import org.toprung.budget.dynamics.EdgeResidual;
import org.toprung.budget.dynamics.LadderReaction;
import org.toprung.budget.dynamics.LadderSystem;
import org.toprung.budget.dynamics.NoiseFreePulse;
import org.toprung.budget.dynamics.TwoLevelSystem;
import org.toprung.budget.pulse.Goal;
import org.toprung.budget.pulse.Pulse;
import org.toprung.budget.pulse.PulseProgram;
import org.toprung.budget.response.PulseResponse;
import org.toprung.core.atom.Level;
import org.toprung.core.drive.Drive;
import org.toprung.core.drive.Elimination;
import org.toprung.core.drive.Ladder;
import org.toprung.core.drive.PulsePlan;
import org.toprung.core.quantity.Frequency;
import org.toprung.core.quantity.Temperature;
import org.toprung.core.quantity.Time;
import org.toprung.core.structure.Lifetimes;
import org.toprung.core.structure.StarkShift;

/**
 * A pulse on a drive, reduced to what causes need: how it reacts to what stays wrong during a pulse
 * and to noise, where the atom spends its time, and the rates of loss.
 *
 * <p>Length and frequency are calibrated on the atom as warm as it is: at the mean field of each
 * beam. {@link #variations()} are the same pulse with one atomic input moved by its standard
 * uncertainty; each is planned anew.
 *
 * <p>Immutable and thread-safe.
 */
public final class PulseModel {

  /** Factors on the atomic inputs; 1 is the catalogue's value. */
  private record Inputs(
      double[] elements,
      double intermediateDecay,
      double spontaneous,
      double blackbody,
      double polarizability,
      double farShift) {

    static Inputs nominal(int steps) {
      double[] ones = new double[steps];
      Arrays.fill(ones, 1);
      return new Inputs(ones, 1, 1, 1, 1, 1);
    }

    Inputs withElement(int step, double factor) {
      double[] varied = elements.clone();
      varied[step] = factor;
      return new Inputs(varied, 1, 1, 1, 1, 1);
    }
  }

  private final Drive drive;
  private final Pulse pulse;
  private final BeamFields fields;
  private final Inputs inputs;
  private final CalibratedProgram calibrated;
  private final LadderSystem system;
  private final NoiseFreePulse noiseFree;
  private final StarkShift stark;
  private final boolean twoLevel;
  private final Reaction reaction;
  private final double baseline;
  private final double baselineWithoutOffset;
  private final Lazy<PulseResponse> response;
  private final Lazy<double[]> seconds; // by state of the ladder

  private PulseModel(Drive drive, Pulse pulse, BeamFields fields, Inputs inputs) {
    this.drive = drive;
    this.pulse = pulse;
    this.fields = fields;
    this.inputs = inputs;
    Ladder ladder = adjusted(drive.ladder());
    Pulse centred = pulse.offsetBy(Frequency.ofHertz(0));
    this.calibrated = calibrated(ladder, pulse);
    CalibratedProgram onResonance = calibrated(ladder, centred);
    this.system = LadderSystem.of(onResonance);
    this.noiseFree = NoiseFreePulse.of(system);
    double[] e = drive.electricFieldVoltsPerMetre();
    this.stark = StarkShift.of(drive.species(), drive.target()).about(e[0], e[1], e[2]);
    this.twoLevel = pulse.isTwoLevel() && system.decouplesIntermediates();
    this.reaction = reaction(calibrated);
    this.baseline = reaction.detuned(0);
    this.baselineWithoutOffset =
        pulse.offset().hertz() == 0 ? baseline : reaction(onResonance).detuned(0);
    this.response =
        new Lazy<>(() -> twoLevel ? effectiveResponse() : PulseResponse.ladder(ladder, pulse));
    this.seconds = new Lazy<>(system::secondsInStates);
  }

  private CalibratedProgram calibrated(Ladder ladder, Pulse played) {
    double product = fields.meanProduct();
    for (int k = 0; k < drive.steps().size(); k++) {
      product /= Math.sqrt(fields.meanIntensity(k));
    }
    return CalibratedProgram.of(ladder, played, product);
  }

  /**
   * A variation of the drive's ladder with the atomic inputs of this model, at the mean field of
   * each beam.
   *
   * @param given the ladder
   * @return the ladder as the mean atom sees it
   */
  public Ladder adjusted(Ladder given) {
    Ladder ladder =
        given
            .withIntermediateDecayScaled(inputs.intermediateDecay())
            .withFarShiftsScaled(inputs.farShift());
    for (int k = 0; k < inputs.elements().length; k++) {
      ladder =
          ladder
              .withElementScaled(k, inputs.elements()[k])
              .withFieldScaled(k, Math.sqrt(fields.meanIntensity(k)));
    }
    return ladder;
  }

  private Reaction reaction(CalibratedProgram program) {
    return twoLevel
        ? new TwoLevelReaction(TwoLevelSystem.of(program.pulse(), steps(), rabiHertz(), shifts()))
        : new WholeLadderReaction(LadderReaction.of(LadderSystem.of(program)), steps());
  }

  private PulseResponse effectiveResponse() {
    Frequency[] shifts =
        Arrays.stream(shifts()).mapToObj(Frequency::ofHertz).toArray(Frequency[]::new);
    return PulseResponse.twoLevel(pulse, steps(), Frequency.ofHertz(rabiHertz()), shifts);
  }

  /** Moves of the resonance by each beam, Hz. */
  private double[] shifts() {
    Elimination elimination = Elimination.of(calibrated.ladder());
    double[] shifts = new double[steps()];
    for (int k = 0; k < shifts.length; k++) {
      shifts[k] = elimination.targetShiftHertz(k) - elimination.startShiftHertz(k);
    }
    return shifts;
  }

  private int steps() {
    return drive.steps().size();
  }

  /** Rabi frequency that the area-based lengths of the program follow from. */
  private double rabiHertz() {
    return calibrated.meanRabiHertz();
  }

  /**
   * The model of a pulse with the atomic values as they are.
   *
   * @param drive the drive
   * @param pulse the pulse
   * @param bench the disturbances, of which the mean field of the beams depends on some
   * @return the model
   * @throws IllegalArgumentException if the pulse cannot be played on the drive
   */
  public static PulseModel of(Drive drive, Pulse pulse, Bench bench) {
    return new PulseModel(
        drive, pulse, BeamFields.of(drive, bench), Inputs.nominal(drive.steps().size()));
  }

  /**
   * The same pulse on another bench.
   *
   * @param bench the disturbances
   * @return a model, this one where the mean fields are the same
   */
  public PulseModel on(Bench bench) {
    BeamFields other = BeamFields.of(drive, bench);
    return other.sameAs(fields) ? this : new PulseModel(drive, pulse, other, inputs);
  }

  /**
   * The same pulse with each uncertain atomic input raised by one standard uncertainty.
   *
   * @return one model per input
   */
  public List<PulseModel> variations() {
    Inputs nominal = Inputs.nominal(drive.steps().size());
    double[] ones = nominal.elements();
    Lifetimes lifetimes = Lifetimes.of(drive.species());
    double decay = 0;
    for (Level level : drive.intermediates()) {
      decay = Math.max(decay, lifetimes.spontaneousRatePerSecond(level).relative());
    }
    double spontaneous = lifetimes.spontaneousRatePerSecond(target()).relative();
    double blackbody =
        lifetimes.blackbodyRatePerSecond(target(), Temperature.ofKelvin(300)).relative();
    List<Inputs> varied = new ArrayList<>();
    for (int k = 0; k < ones.length; k++) {
      varied.add(nominal.withElement(k, 1 + drive.steps().get(k).relativeUncertainty()));
    }
    varied.add(new Inputs(ones, 1 + decay, 1, 1, 1, 1));
    varied.add(new Inputs(ones, 1, 1 + spontaneous, 1, 1, 1));
    varied.add(new Inputs(ones, 1, 1, 1 + blackbody, 1, 1));
    varied.add(new Inputs(ones, 1, 1, 1, 1 + stark.relativeUncertainty(), 1));
    varied.add(new Inputs(ones, 1, 1, 1, 1, 1 + drive.farShiftRelativeUncertainty()));
    return varied.stream().map(v -> new PulseModel(drive, pulse, fields, v)).toList();
  }

  private Level target() {
    return drive.target().level();
  }

  /**
   * The drive.
   *
   * @return the drive as resolved, with nominal atomic values
   */
  public Drive drive() {
    return drive;
  }

  /**
   * The pulse.
   *
   * @return the pulse
   */
  public Pulse pulse() {
    return pulse;
  }

  /**
   * What is played, on the ladder at the mean field of each beam.
   *
   * @return the calibrated program
   */
  public CalibratedProgram calibrated() {
    return calibrated;
  }

  /**
   * What is played.
   *
   * @return the program
   */
  public PulseProgram program() {
    return calibrated.program();
  }

  /**
   * What is played, on the ladder with states beside it that a variation of it has.
   *
   * @param variation the ladder of the variation
   * @return the calibrated program
   */
  public CalibratedProgram calibratedAmong(Ladder variation) {
    return calibrated(calibrated.ladder().withStatesOf(variation), pulse);
  }

  /**
   * Field of each beam that the pulse is calibrated for, over the nominal one.
   *
   * @return root mean square over the positions of the atom, by step
   */
  public double[] meanFields() {
    double[] mean = new double[steps()];
    for (int k = 0; k < mean.length; k++) {
      mean[k] = Math.sqrt(fields.meanIntensity(k));
    }
    return mean;
  }

  /**
   * Length and frequency of the pulse for the atom as warm as it is.
   *
   * @return the plan
   */
  public PulsePlan plan() {
    return new PulsePlan(
        Time.ofSeconds(seconds()),
        Frequency.ofHertz(calibrated.fullPowerOffsetHertz()),
        Frequency.ofHertz(rabiHertz()));
  }

  double seconds() {
    return program().seconds();
  }

  /** Whether this is a square π pulse at resonance, for which there are closed forms. */
  boolean isPlainTransfer() {
    PulseProgram program = program();
    return twoLevel
        && pulse.goal() == Goal.TRANSFER
        && pulse.areaRadians().isPresent()
        && program.breaks().length == 2
        && program.isConstant(0)
        && pulse.offset().hertz() == 0;
  }

  Reaction reaction() {
    return reaction;
  }

  /** Error of the undisturbed pulse in the system that reactions are computed in. */
  double baseline() {
    return baseline;
  }

  /** What the pulse's own offset costs. */
  double offsetError() {
    return baseline - baselineWithoutOffset;
  }

  /**
   * How the pulse reacts to disturbances.
   *
   * @return the response of the effective two-level system, of the whole ladder where there is none
   */
  public PulseResponse response() {
    return response.get();
  }

  NoiseFreePulse noiseFree() {
    return noiseFree;
  }

  /** Error of the planned pulse without noise on a variation of the drive's ladder. */
  double noiseFreeErrorOf(Ladder ladder) {
    return LadderReaction.of(system).on(adjusted(ladder)).error();
  }

  /** An unwanted sublevel after the pulse. */
  record Leak(String sublevel, double population) {}

  /** Unwanted sublevels of a rung after the undisturbed pulse. */
  List<Leak> leaks(int rung) {
    List<Leak> leaks = new ArrayList<>();
    Ladder ladder = system.calibrated().ladder();
    double[] populations = system.finalPopulations();
    for (int i = 0; i < populations.length; i++) {
      Ladder.State state = ladder.states().get(i);
      boolean wanted = i == ladder.start() || ladder.isWanted(i);
      if (state.rung() == rung && !wanted && populations[i] > 0) {
        leaks.add(new Leak(state.label(), populations[i]));
      }
    }
    return leaks;
  }

  /** What the edges leave in the intermediate level; empty without the rise time of the edges. */
  OptionalDouble residualIntermediate() {
    return EdgeResidual.of(system);
  }

  /**
   * Probability that the intermediate level scatters a photon during the pulse.
   *
   * @return the probability
   */
  public double scatteringPerPulse() {
    double photons = 0;
    List<Ladder.State> states = calibrated.ladder().states();
    for (int i = 0; i < states.size(); i++) {
      photons += states.get(i).decayPerSecond() * seconds.get()[i];
    }
    return -Math.expm1(-photons);
  }

  /** Probability that a loss of the Rydberg level at some rate happens during the pulse. */
  double lost(double ratePerSecond) {
    double spent = 0;
    List<Ladder.State> states = calibrated.ladder().states();
    for (int i = 0; i < states.size(); i++) {
      spent += states.get(i).rung() == steps() ? seconds.get()[i] : 0;
    }
    return -Math.expm1(-ratePerSecond * spent);
  }

  /**
   * Spontaneous decay rate of the target level.
   *
   * @return the rate, 1/s
   */
  public double spontaneousPerSecond() {
    return inputs.spontaneous()
        * Lifetimes.of(drive.species()).spontaneousRatePerSecond(target()).value();
  }

  /**
   * Rate at which blackbody radiation takes the atom from the target level, ionization included.
   *
   * @param environment temperature of the walls
   * @return the rate, 1/s
   */
  public double blackbodyPerSecond(Temperature environment) {
    Lifetimes lifetimes = Lifetimes.of(drive.species());
    return inputs.blackbody()
        * (lifetimes.blackbodyRatePerSecond(target(), environment).value()
            + lifetimes.blackbodyIonizationRatePerSecond(target(), environment).value());
  }

  /** Stark shift of the target when these components are added to the static field, Hz. */
  double starkShiftHertz(double ex, double ey, double ez) {
    return inputs.polarizability() * stark.hertz(ex, ey, ez);
  }
}
