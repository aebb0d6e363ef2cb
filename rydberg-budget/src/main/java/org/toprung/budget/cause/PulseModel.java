package org.toprung.budget.cause;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.OptionalDouble;
import org.toprung.budget.bench.Bench;
import org.toprung.budget.dynamics.CalibratedProgram;
import org.toprung.budget.dynamics.NoiseFreePulse;
import org.toprung.budget.pulse.Goal;
import org.toprung.budget.pulse.Pulse;
import org.toprung.budget.pulse.PulseProgram;
import org.toprung.budget.response.PulseResponse;
import org.toprung.core.atom.Level;
import org.toprung.core.drive.Drive;
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

  /** Factors on the atomic inputs that the ladder is made of; 1 is the catalogue's value. */
  private record Couplings(double[] elements, double farShift) {
    static Couplings nominal(int steps) {
      double[] ones = new double[steps];
      Arrays.fill(ones, 1);
      return new Couplings(ones, 1);
    }

    Couplings withElement(int step, double factor) {
      double[] varied = elements.clone();
      varied[step] = factor;
      return new Couplings(varied, farShift);
    }
  }

  /** Factors on the atomic inputs that the ladder does not know. */
  private record Rates(
      double intermediateDecay, double spontaneous, double blackbody, double polarizability) {
    static final Rates NOMINAL = new Rates(1, 1, 1, 1);
  }

  private final Drive drive;
  private final BeamFields fields;
  private final Couplings couplings;
  private final Rates rates;
  private final PulseCore core;
  private final StarkShift stark;

  private PulseModel(
      Drive drive,
      BeamFields fields,
      Couplings couplings,
      Rates rates,
      PulseCore core,
      StarkShift stark) {
    this.drive = drive;
    this.fields = fields;
    this.couplings = couplings;
    this.rates = rates;
    this.core = core;
    this.stark = stark;
  }

  private static PulseModel of(
      Drive drive, Pulse pulse, BeamFields fields, Couplings couplings, StarkShift stark) {
    double meanRabi = fields.meanProduct();
    for (int k = 0; k < drive.steps().size(); k++) {
      meanRabi /= Math.sqrt(fields.meanIntensity(k));
    }
    Ladder ladder = adjusted(drive.ladder(), fields, couplings);
    PulseCore core = new PulseCore(ladder, pulse, meanRabi);
    return new PulseModel(drive, fields, couplings, Rates.NOMINAL, core, stark);
  }

  private static Ladder adjusted(Ladder given, BeamFields fields, Couplings couplings) {
    Ladder ladder = given.withFarShiftsScaled(couplings.farShift());
    for (int k = 0; k < couplings.elements().length; k++) {
      ladder =
          ladder
              .withElementScaled(k, couplings.elements()[k])
              .withFieldScaled(k, Math.sqrt(fields.meanIntensity(k)));
    }
    return ladder;
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
    double[] e = drive.electricFieldVoltsPerMetre();
    StarkShift stark = StarkShift.of(drive.species(), drive.target()).about(e[0], e[1], e[2]);
    Couplings nominal = Couplings.nominal(drive.steps().size());
    return of(drive, pulse, BeamFields.of(drive, bench), nominal, stark);
  }

  /**
   * The same pulse on another bench.
   *
   * @param bench the disturbances
   * @return a model, this one where the mean fields are the same
   */
  public PulseModel on(Bench bench) {
    BeamFields other = BeamFields.of(drive, bench);
    return other.sameAs(fields) ? this : of(drive, pulse(), other, couplings, stark);
  }

  /**
   * The same pulse with each uncertain atomic input raised by one standard uncertainty.
   *
   * @return one model per input
   */
  public List<PulseModel> variations() {
    Couplings nominal = Couplings.nominal(steps());
    Lifetimes lifetimes = Lifetimes.of(drive.species());
    double decay = 0;
    for (Level level : drive.intermediates()) {
      decay = Math.max(decay, lifetimes.spontaneousRatePerSecond(level).relative());
    }
    double spontaneous = lifetimes.spontaneousRatePerSecond(target()).relative();
    double blackbody =
        lifetimes.blackbodyRatePerSecond(target(), Temperature.ofKelvin(300)).relative();
    List<PulseModel> varied = new ArrayList<>();
    for (int k = 0; k < steps(); k++) {
      double factor = 1 + drive.steps().get(k).relativeUncertainty();
      varied.add(of(drive, pulse(), fields, nominal.withElement(k, factor), stark));
    }
    double farShift = 1 + drive.farShiftRelativeUncertainty();
    varied.add(of(drive, pulse(), fields, new Couplings(nominal.elements(), farShift), stark));
    varied.add(with(new Rates(1 + decay, 1, 1, 1)));
    varied.add(with(new Rates(1, 1 + spontaneous, 1, 1)));
    varied.add(with(new Rates(1, 1, 1 + blackbody, 1)));
    varied.add(with(new Rates(1, 1, 1, 1 + stark.relativeUncertainty())));
    return varied;
  }

  private PulseModel with(Rates other) {
    return new PulseModel(drive, fields, couplings, other, core, stark);
  }

  private int steps() {
    return drive.steps().size();
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
    return core.pulse();
  }

  /**
   * What is played, on the ladder at the mean field of each beam.
   *
   * @return the calibrated program
   */
  public CalibratedProgram calibrated() {
    return core.calibrated();
  }

  /**
   * A variation of the drive's ladder with the atomic inputs of this model, at the mean field of
   * each beam.
   *
   * @param given the ladder
   * @return the ladder as the mean atom sees it
   */
  public Ladder adjusted(Ladder given) {
    return adjusted(given, fields, couplings);
  }

  /**
   * What is played, on the ladder with states beside it that a variation of it has.
   *
   * @param variation the ladder of the variation
   * @return the calibrated program
   */
  public CalibratedProgram calibratedAmong(Ladder variation) {
    return core.calibratedOn(calibrated().ladder().withStatesOf(variation));
  }

  /**
   * What is played.
   *
   * @return the program
   */
  public PulseProgram program() {
    return calibrated().program();
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
        Frequency.ofHertz(calibrated().fullPowerOffsetHertz()),
        Frequency.ofHertz(calibrated().meanRabiHertz()));
  }

  double seconds() {
    return program().seconds();
  }

  /** Whether this is a square π pulse at resonance, for which there are closed forms. */
  boolean isPlainTransfer() {
    PulseProgram program = program();
    return core.isTwoLevel()
        && pulse().goal() == Goal.TRANSFER
        && pulse().areaRadians().isPresent()
        && program.breaks().length == 2
        && program.isConstant(0)
        && pulse().offset().hertz() == 0;
  }

  Reaction reaction() {
    return core.reaction();
  }

  /** Error of the undisturbed pulse in the system that reactions are computed in. */
  double baseline() {
    return core.baseline();
  }

  /** What the pulse's own offset costs. */
  double offsetError() {
    return core.offsetError();
  }

  /**
   * How the pulse reacts to disturbances.
   *
   * @return the response of the effective two-level system, of the whole ladder where there is none
   */
  public PulseResponse response() {
    return core.response();
  }

  NoiseFreePulse noiseFree() {
    return core.noiseFree();
  }

  /** Error of the planned pulse without noise on a variation of the drive's ladder. */
  double noiseFreeErrorOf(Ladder ladder) {
    return core.noiseFreeErrorOn(adjusted(ladder));
  }

  /** An unwanted sublevel after the pulse. */
  record Leak(String sublevel, double population) {}

  /** Unwanted sublevels of a rung after the undisturbed pulse. */
  List<Leak> leaks(int rung) {
    List<Leak> leaks = new ArrayList<>();
    Ladder ladder = calibrated().ladder();
    double[] populations = core.system().finalPopulations();
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
    return core.residualIntermediate();
  }

  /**
   * Probability that the intermediate level scatters a photon during the pulse.
   *
   * @return the probability
   */
  public double scatteringPerPulse() {
    return -Math.expm1(-scatteredPhotons());
  }

  private double scatteredPhotons() {
    double photons = 0;
    List<Ladder.State> states = calibrated().ladder().states();
    for (int i = 0; i < states.size(); i++) {
      photons += states.get(i).decayPerSecond() * core.seconds()[i];
    }
    return rates.intermediateDecay() * photons;
  }

  /** What scattering by the intermediate level adds to the error. */
  double scatteringError() {
    return core.isTwoLevel()
        ? lossError(scatteredPhotons())
        : core.intermediateLoss(rates.intermediateDecay());
  }

  /** What a loss of the Rydberg level at some rate, 1/s, adds to the error. */
  double decayError(double ratePerSecond) {
    if (!core.isTwoLevel()) {
      return core.rydbergLoss(ratePerSecond);
    }
    double spent = 0;
    List<Ladder.State> states = calibrated().ladder().states();
    for (int i = 0; i < states.size(); i++) {
      spent += states.get(i).rung() == steps() ? core.seconds()[i] : 0;
    }
    return lossError(ratePerSecond * spent);
  }

  /**
   * Error of a pulse that loses the atom with the expected number n of losses: 1 − e^(−n), but a
   * pulse that has to return is compared with an idling state, which holds half the atom: 1 − ¼(1 +
   * e^(−n/2))².
   */
  private double lossError(double losses) {
    if (pulse().goal() != Goal.RETURN) {
      return -Math.expm1(-losses);
    }
    double missing = -Math.expm1(-0.5 * losses);
    return missing - 0.25 * missing * missing;
  }

  /**
   * Spontaneous decay rate of the target level.
   *
   * @return the rate, 1/s
   */
  public double spontaneousPerSecond() {
    return rates.spontaneous()
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
    return rates.blackbody()
        * (lifetimes.blackbodyRatePerSecond(target(), environment).value()
            + lifetimes.blackbodyIonizationRatePerSecond(target(), environment).value());
  }

  /** Stark shift of the target when these components are added to the static field, Hz. */
  double starkShiftHertz(double ex, double ey, double ez) {
    return rates.polarizability() * stark.hertz(ex, ey, ez);
  }
}
