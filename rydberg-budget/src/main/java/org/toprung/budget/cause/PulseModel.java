package org.toprung.budget.cause;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import org.toprung.budget.dynamics.CalibratedProgram;
import org.toprung.budget.dynamics.NoiseFreePulse;
import org.toprung.budget.pulse.Pulse;
import org.toprung.core.atom.Level;
import org.toprung.core.drive.Drive;
import org.toprung.core.drive.Elimination;
import org.toprung.core.drive.Ladder;
import org.toprung.core.drive.LadderSetting;
import org.toprung.core.drive.PulsePlan;
import org.toprung.core.drive.PulsePlanner;
import org.toprung.core.quantity.Frequency;
import org.toprung.core.quantity.Temperature;
import org.toprung.core.structure.Lifetimes;
import org.toprung.core.structure.StarkShift;

/**
 * A pulse on a drive, reduced to what causes need: the effective two-level system, how each beam
 * moves it, and the rates of loss.
 *
 * <p>{@link #variations()} are the same pulse with one atomic input moved by its standard
 * uncertainty; each is planned anew, because length and frequency of a real pulse are calibrated on
 * the atom.
 *
 * <p>Immutable.
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
  private final Inputs inputs;
  private final PulsePlan plan;
  private final Elimination elimination;
  private final NoiseFreePulse noiseFree;
  private final StarkShift stark;

  private PulseModel(Drive drive, Pulse pulse, Inputs inputs) {
    this.drive = drive;
    this.pulse = pulse;
    this.inputs = inputs;
    Ladder ladder =
        drive
            .ladder()
            .withIntermediateDecayScaled(inputs.intermediateDecay())
            .withFarShiftsScaled(inputs.farShift());
    for (int k = 0; k < inputs.elements().length; k++) {
      ladder = ladder.withElementScaled(k, inputs.elements()[k]);
    }
    this.plan = PulsePlanner.plan(ladder, pulse.planAreaRadians());
    this.elimination = Elimination.of(ladder);
    double[] e = drive.electricFieldVoltsPerMetre();
    this.stark = StarkShift.of(drive.species(), drive.target()).about(e[0], e[1], e[2]);
    this.noiseFree =
        NoiseFreePulse.of(CalibratedProgram.of(ladder, pulse.offsetBy(Frequency.ofHertz(0))));
  }

  /**
   * The model of a pulse with the atomic values as they are.
   *
   * @param drive the drive
   * @param pulse the pulse
   * @return the model
   */
  public static PulseModel of(Drive drive, Pulse pulse) {
    return new PulseModel(drive, pulse, Inputs.nominal(drive.steps().size()));
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
    return varied.stream().map(v -> new PulseModel(drive, pulse, v)).toList();
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
   * Length and frequency of the pulse.
   *
   * @return the plan
   */
  public PulsePlan plan() {
    return plan;
  }

  /**
   * Duration of the pulse.
   *
   * @return the duration, s
   */
  public double seconds() {
    return plan.duration().seconds();
  }

  /**
   * Setting of the ladder during the pulse, with the laser moved to the shifted resonance and by
   * the pulse's own offset.
   *
   * @return the setting
   */
  public LadderSetting setting() {
    return setting(plan.frequencyOffset().hertz() + pulse.offset().hertz());
  }

  private LadderSetting setting(double offsetHertz) {
    int last = drive.steps().size() - 1;
    return LadderSetting.nominal(drive.steps().size()).withLaserOffset(last, offsetHertz);
  }

  /**
   * Laser minus light-shifted resonance by intention.
   *
   * @return the offset, Hz
   */
  double offsetHertz() {
    return pulse.offset().hertz();
  }

  /** Error of the square pulse at another Rabi frequency (relative) and detuning, Hz. */
  double twoLevelError(double rabiFactor, double detuningHertz) {
    double rabi = plan.rabi().hertz() * rabiFactor;
    double generalized = Math.hypot(rabi, detuningHertz);
    if (generalized == 0) {
      return 1;
    }
    double amplitude = rabi / generalized * Math.sin(Math.PI * generalized * seconds());
    return 1 - amplitude * amplitude;
  }

  /** Error of the undisturbed two-level pulse, with its offset. */
  double baseline() {
    return twoLevelError(1, offsetHertz());
  }

  /** Move of the two-photon resonance with the relative intensity of one beam, Hz. */
  double resonanceShiftHertz(int step) {
    return elimination.targetShiftHertz(step) - elimination.startShiftHertz(step);
  }

  double scatteringPerSecond() {
    return 0.5 * (elimination.startScatteringPerSecond() + elimination.targetScatteringPerSecond());
  }

  /**
   * Probability that the intermediate level scatters a photon during the pulse.
   *
   * @return the probability
   */
  public double scatteringPerPulse() {
    return -Math.expm1(-scatteringPerSecond() * seconds());
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

  NoiseFreePulse noiseFree() {
    return noiseFree;
  }
}
