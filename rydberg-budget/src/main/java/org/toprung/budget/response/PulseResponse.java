package org.toprung.budget.response;

import java.util.ArrayList;
import java.util.Collections;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.toprung.budget.bench.NoiseDensity;
import org.toprung.budget.dynamics.CalibratedProgram;
import org.toprung.budget.dynamics.DrivenSystem;
import org.toprung.budget.dynamics.LadderSystem;
import org.toprung.budget.dynamics.TwoLevelSystem;
import org.toprung.budget.pulse.Pulse;
import org.toprung.core.drive.Drive;
import org.toprung.core.drive.Ladder;
import org.toprung.core.quantity.Frequency;

/**
 * How the error of a pulse reacts to small disturbances, to second order.
 *
 * <p><b>Static.</b> For deviations x that stay the same during a pulse, E ≈ E₀ + Σ g<sub>a</sub>
 * x<sub>a</sub> + ½ Σ H<sub>ab</sub> x<sub>a</sub> x<sub>b</sub>, with laser frequencies in Hz,
 * intensities and the amplitude (effective Rabi frequency) relative. Square pulse of area π with
 * Rabi frequency Ω/2π: errorPerSquaredHertz = (2π/Ω)², errorPerSquaredAmplitude = π²/4.
 *
 * <p><b>Noise.</b> A stationary noise of one-sided density S adds ∫ S(f) F(f) df to the mean error,
 * F(f) the filter function of the frequency of a laser (1/Hz²) or the intensity of a beam (no
 * unit). F follows from second-order time-dependent perturbation about the noise-free course,
 * including the second-order amplitude, so that pulses that are not perfect without noise are
 * treated right; there F may be negative. Where the light changes smoothly, F of an intensity is
 * good to 1e-4 up to the Rabi frequency and to 1e-3 at its foot, because its operator is constant
 * within a step of the propagation. Square π pulse: F = (2π)² |½∫ sin(Ωt) e<sup>2πift</sup> dt|².
 * Good while the added error is well below 1.
 *
 * <p>References: Green, Sastrawan, Uys and Biercuk, New J. Phys. 15, 095004 (2013) for filter
 * functions of driven two-level systems; Dyson, Phys. Rev. 75, 486 (1949) for the expansion.
 * Deviation: one expression for all goals and numbers of levels, not one per pulse.
 *
 * <p>Immutable and thread-safe.
 */
public final class PulseResponse {
  private final int steps;
  private final double error;
  private final double seconds;
  private final int panels;
  private final List<Knob> knobs;
  private final double[] slopes;
  private final double[][] curvatures;
  private final PerturbedPath[] perturbed;
  private final double[] fastNoise; // limit of the filter for f → ∞, by knob
  private final Map<String, Double> timeInStates;
  private final Map<String, Double> leakage;

  private PulseResponse(DrivenSystem system, Optional<TwoLevelSystem> twoLevel) {
    this.steps = system.steps();
    List<Knob> turned = new ArrayList<>();
    List<PulsePath.Operator> operators = new ArrayList<>();
    twoLevel.ifPresent(
        s -> {
          turned.add(Knob.amplitude());
          operators.add(s::amplitudeOperator);
        });
    for (int k = 0; k < steps; k++) {
      int step = k;
      turned.add(Knob.frequency(k));
      operators.add((m, re, im) -> system.frequencyOperator(step, m, re, im));
    }
    for (int k = 0; k < steps; k++) {
      int step = k;
      turned.add(Knob.intensity(k));
      operators.add((m, re, im) -> system.intensityOperator(step, m, re, im));
    }
    PulsePath path = new PulsePath(system, operators);
    int count = turned.size();
    this.knobs = List.copyOf(turned);
    this.error = path.error;
    this.seconds = path.seconds;
    this.panels = path.panels;
    this.slopes = new double[count];
    this.perturbed = new PerturbedPath[count];
    for (int a = 0; a < count; a++) {
      slopes[a] = path.slope(operators.get(a));
      perturbed[a] = path.perturbed(operators.get(a));
    }
    this.curvatures = new double[count][count];
    this.fastNoise = new double[count];
    for (int a = 0; a < count; a++) {
      for (int b = 0; b <= a; b++) {
        double bend = bend(path, system, knobs.get(a), knobs.get(b));
        curvatures[a][b] = 2 * perturbed[a].together(perturbed[b]) + bend;
        curvatures[b][a] = curvatures[a][b];
        if (a == b) {
          fastNoise[a] = 0.5 * bend;
        }
      }
    }
    double[] time = path.timeInStates();
    double[] end = path.finalPopulations();
    Map<String, Double> spent = new LinkedHashMap<>();
    Map<String, Double> left = new LinkedHashMap<>();
    for (int i = 0; i < time.length; i++) {
      String label = system.labels().get(i);
      spent.merge(label, time[i], Double::sum);
      if (!system.takesPart(i)) {
        left.merge(label, end[i], Double::sum);
      }
    }
    this.timeInStates = Collections.unmodifiableMap(spent);
    this.leakage = Collections.unmodifiableMap(left);
  }

  /**
   * What the bend of the Hamiltonian itself adds: a coupling goes with the root of an intensity.
   */
  private static double bend(PulsePath path, DrivenSystem system, Knob a, Knob b) {
    if (a.kind() == Knob.Kind.INTENSITY && b.kind() == Knob.Kind.INTENSITY) {
      return path.slope((m, re, im) -> system.intensityCurvature(a.step(), b.step(), m, re, im));
    }
    if (a.kind() == Knob.Kind.INTENSITY && b.kind() == Knob.Kind.AMPLITUDE
        || a.kind() == Knob.Kind.AMPLITUDE && b.kind() == Knob.Kind.INTENSITY) {
      TwoLevelSystem effective = (TwoLevelSystem) system;
      return path.slope(
          (m, re, im) -> {
            effective.amplitudeOperator(m, re, im);
            for (int i = 0; i < re.length; i++) {
              re[i] *= 0.5;
              im[i] *= 0.5;
            }
          });
    }
    return 0;
  }

  /**
   * Response of a pulse of the effective two-level system.
   *
   * @param pulse the pulse
   * @param steps number of lasers, 1 to 3
   * @param rabi effective Rabi frequency at full power, positive
   * @param shiftPerStep how far each beam at full power moves the resonance; one for each step, or
   *     none for no light shift
   * @return the response
   * @throws IllegalArgumentException if the pulse needs more than two levels, the Rabi frequency is
   *     not positive and finite, or the number of shifts does not fit
   */
  public static PulseResponse twoLevel(
      Pulse pulse, int steps, Frequency rabi, Frequency... shiftPerStep) {
    double[] shifts = new double[steps];
    if (shiftPerStep.length != 0) {
      if (shiftPerStep.length != steps) {
        throw new IllegalArgumentException(
            "one light shift for each of "
                + steps
                + " steps, or none, is needed; given: "
                + shiftPerStep.length);
      }
      for (int k = 0; k < steps; k++) {
        shifts[k] = shiftPerStep[k].hertz();
      }
    }
    TwoLevelSystem system = TwoLevelSystem.of(pulse, steps, rabi.hertz(), shifts);
    return new PulseResponse(system, Optional.of(system));
  }

  /**
   * Response of a pulse of the effective two-level system whose start is moved by the light too:
   * the phase of a start that has to return knows it, other goals do not.
   *
   * @param pulse the pulse
   * @param rabi effective Rabi frequency at full power, positive
   * @param shiftPerStep how far each beam at full power moves the resonance
   * @param startShiftPerStep how far each beam at full power moves the start
   * @return the response
   * @throws IllegalArgumentException if the pulse needs more than two levels, the Rabi frequency is
   *     not positive and finite, or the two lists differ in length
   */
  public static PulseResponse twoLevel(
      Pulse pulse,
      Frequency rabi,
      List<Frequency> shiftPerStep,
      List<Frequency> startShiftPerStep) {
    TwoLevelSystem system =
        TwoLevelSystem.of(
            pulse,
            shiftPerStep.size(),
            rabi.hertz(),
            shiftPerStep.stream().mapToDouble(Frequency::hertz).toArray(),
            startShiftPerStep.stream().mapToDouble(Frequency::hertz).toArray());
    return new PulseResponse(system, Optional.of(system));
  }

  /**
   * Response of a pulse on a resolved ladder, with every sublevel, calibrated there: its length and
   * laser frequency are the ones that suit the dressed ladder. Without loss, which acts in
   * proportion to {@link #secondsInStates()}.
   *
   * @param drive the drive
   * @param pulse the pulse
   * @return the response, which knows lasers and beams but no amplitude apart from them
   * @throws IllegalArgumentException if the drive does not have the steps that the pulse needs, or
   *     its start and target do not couple
   * @throws ArithmeticException if far-off states cannot be decoupled at some setting of the
   *     program
   */
  public static PulseResponse ladder(Drive drive, Pulse pulse) {
    return ladder(drive.ladder(), pulse);
  }

  /**
   * Response of a pulse on a variation of a drive's ladder, as {@link #ladder(Drive, Pulse)}.
   *
   * @param ladder the ladder
   * @param pulse the pulse
   * @return the response
   * @throws IllegalArgumentException as there
   * @throws ArithmeticException as there
   */
  public static PulseResponse ladder(Ladder ladder, Pulse pulse) {
    CalibratedProgram calibrated = CalibratedProgram.of(ladder, pulse);
    return new PulseResponse(LadderSystem.of(calibrated), Optional.empty());
  }

  /**
   * Error without noise.
   *
   * @return 1 − success by the pulse's goal
   */
  public double error() {
    return error;
  }

  /**
   * Number of lasers.
   *
   * @return steps of the ladder
   */
  public int steps() {
    return steps;
  }

  /**
   * Length of the pulse.
   *
   * @return duration, s
   */
  public double seconds() {
    return seconds;
  }

  /**
   * What this response knows.
   *
   * @return the knobs, an immutable list
   */
  public List<Knob> knobs() {
    return knobs;
  }

  /**
   * First derivative of the error.
   *
   * @param knob what is turned
   * @return g, 1/Hz for a frequency, no unit for an intensity or the amplitude
   * @throws IllegalArgumentException if this response does not know the knob
   */
  public double slope(Knob knob) {
    return slopes[index(knob)];
  }

  /**
   * Second derivative of the error.
   *
   * @param knob what is turned
   * @param other what is turned at the same time; the same for the plain second derivative
   * @return H, 1/Hz for every frequency among the two
   * @throws IllegalArgumentException if this response does not know a knob
   */
  public double curvature(Knob knob, Knob other) {
    return curvatures[index(knob)][index(other)];
  }

  /**
   * Error per squared relative deviation of the effective Rabi frequency, ½H.
   *
   * @return π²/4 for the square π pulse
   * @throws IllegalArgumentException for a ladder, which has no amplitude apart from its beams
   */
  public double errorPerSquaredAmplitude() {
    return 0.5 * curvature(Knob.amplitude(), Knob.amplitude());
  }

  /**
   * Error per squared detuning of the ladder, ½H of its last laser.
   *
   * @return 1/Hz²
   */
  public double errorPerSquaredHertz() {
    return 0.5 * curvature(Knob.frequency(steps - 1), Knob.frequency(steps - 1));
  }

  /**
   * Mixed term: error per relative amplitude and per Hz, H of amplitude and last laser.
   *
   * @return 1/Hz
   * @throws IllegalArgumentException for a ladder, which has no amplitude apart from its beams
   */
  public double crossPerHertz() {
    return curvature(Knob.amplitude(), Knob.frequency(steps - 1));
  }

  /**
   * First-order term in the relative amplitude; zero for a pulse at its best amplitude.
   *
   * @return error per relative amplitude
   * @throws IllegalArgumentException for a ladder, which has no amplitude apart from its beams
   */
  public double slopePerAmplitude() {
    return slope(Knob.amplitude());
  }

  /**
   * First-order term in the detuning; zero for a pulse at its best detuning.
   *
   * @return error per Hz
   */
  public double slopePerHertz() {
    return slope(Knob.frequency(steps - 1));
  }

  /**
   * Filter function of a laser's frequency noise.
   *
   * @param laser index of its step from 0
   * @param hertz frequency f of the noise, at least 0
   * @return F<sub>ν</sub>(f), 1/Hz²
   * @throws IllegalArgumentException if there is no such laser, or f is negative or not finite
   */
  public double frequencyFilter(int laser, double hertz) {
    return filter(index(Knob.frequency(laser)), hertz);
  }

  /**
   * Filter function of noise on the ladder's sum frequency: of the last laser, whose frequency
   * moves the target alone.
   *
   * @param hertz frequency f of the noise, at least 0
   * @return F<sub>ν</sub>(f), 1/Hz²
   * @throws IllegalArgumentException if f is negative or not finite
   */
  public double frequencyFilter(double hertz) {
    return frequencyFilter(steps - 1, hertz);
  }

  /**
   * Filter function of noise on the ladder's sum frequency at many frequencies.
   *
   * @param hertz frequencies of the noise, at least 0
   * @return F<sub>ν</sub>, 1/Hz², in the order given
   * @throws IllegalArgumentException if a frequency is negative or not finite
   */
  public double[] frequencyFilter(double[] hertz) {
    double[] out = new double[hertz.length];
    for (int i = 0; i < out.length; i++) {
      out[i] = frequencyFilter(hertz[i]);
    }
    return out;
  }

  /**
   * Filter function of a beam's relative intensity noise.
   *
   * @param beam index of its step from 0
   * @param hertz frequency f of the noise, at least 0
   * @return F<sub>I</sub>(f)
   * @throws IllegalArgumentException if there is no such beam, or f is negative or not finite
   */
  public double intensityFilter(int beam, double hertz) {
    return filter(index(Knob.intensity(beam)), hertz);
  }

  /**
   * Mean error by white frequency noise, per one-sided density: ∫ F<sub>ν</sub> df. A Lorentzian
   * line of full width Δν has the density Δν/π (Hz²/Hz), so that a square π pulse has the error
   * π²Δν/(4Ω).
   *
   * @param laser index of its step from 0
   * @return error per (Hz²/Hz), 1/Hz
   * @throws IllegalArgumentException if there is no such laser
   */
  public double whiteFrequencyNoise(int laser) {
    return perturbed[index(Knob.frequency(laser))].white();
  }

  /**
   * Mean error by a spectrum of frequency noise of a laser.
   *
   * @param laser index of its step from 0
   * @param density one-sided density, Hz²/Hz
   * @return the error, with its numerical error and what the table does not cover
   * @throws IllegalArgumentException if there is no such laser
   */
  public NoiseError frequencyNoise(int laser, NoiseDensity density) {
    return noise(index(Knob.frequency(laser)), density);
  }

  /**
   * Mean error by a spectrum of relative intensity noise of a beam.
   *
   * @param beam index of its step from 0
   * @param density one-sided density, 1/Hz
   * @return the error, with its numerical error and what the table does not cover
   * @throws IllegalArgumentException if there is no such beam
   */
  public NoiseError intensityNoise(int beam, NoiseDensity density) {
    return noise(index(Knob.intensity(beam)), density);
  }

  /**
   * Time-integrated populations: what decays, scatters or shifts in proportion to the time spent in
   * a level.
   *
   * @return label of the state → ∫ population dt, s; immutable
   */
  public Map<String, Double> secondsInStates() {
    return timeInStates;
  }

  /**
   * Populations at the end of states that the ideal pulse does not use.
   *
   * @return label of the state → probability; immutable, empty for two levels
   */
  public Map<String, Double> leakage() {
    return leakage;
  }

  /**
   * Moduli of the amplitudes at the end of states that the ideal pulse does not use: what the next
   * pulse of a sequence interferes with.
   *
   * @return label of the state → modulus, the root of {@link #leakage()}; immutable
   */
  public Map<String, Double> leakAmplitudes() {
    Map<String, Double> moduli = new LinkedHashMap<>();
    leakage.forEach((label, population) -> moduli.put(label, Math.sqrt(Math.max(0, population))));
    return Collections.unmodifiableMap(moduli);
  }

  /**
   * Frequencies equally spaced on a logarithmic scale.
   *
   * @param from first frequency, positive, Hz
   * @param to last frequency, above the first, Hz
   * @param n number of frequencies, at least 2
   * @return the frequencies, Hz
   * @throws IllegalArgumentException if the range or the number is not as said
   */
  public static double[] logGrid(double from, double to, int n) {
    if (!(from > 0 && from < to && to < Double.POSITIVE_INFINITY && n >= 2)) {
      throw new IllegalArgumentException(
          "a logarithmic grid needs 0 < from < to (Hz) and at least 2 points, not from "
              + from
              + " to "
              + to
              + " with "
              + n);
    }
    double[] out = new double[n];
    for (int i = 0; i < n; i++) {
      out[i] = from * Math.pow(to / from, i / (n - 1.0));
    }
    out[n - 1] = to;
    return out;
  }

  private double filter(int index, double hertz) {
    if (!(hertz >= 0 && hertz < Double.POSITIVE_INFINITY)) {
      throw new IllegalArgumentException(
          "a noise frequency is finite and at least 0 Hz, not " + hertz);
    }
    return perturbed[index].filter(hertz) + fastNoise[index];
  }

  private NoiseError noise(int index, NoiseDensity density) {
    return FilterIntegral.of(
        f -> filter(index, f),
        fastNoise[index],
        perturbed[index].white(),
        seconds,
        panels,
        density::at,
        density.frequencies());
  }

  private int index(Knob knob) {
    int index = knobs.indexOf(knob);
    if (index < 0) {
      throw new IllegalArgumentException(
          "this response knows nothing of " + knob + "; it knows " + knobs);
    }
    return index;
  }
}
