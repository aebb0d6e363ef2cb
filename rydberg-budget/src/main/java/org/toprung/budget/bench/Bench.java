package org.toprung.budget.bench;

import java.util.Arrays;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import org.toprung.core.quantity.ElectricField;
import org.toprung.core.quantity.Frequency;
import org.toprung.core.quantity.MagneticField;
import org.toprung.core.quantity.Temperature;

/**
 * The disturbances of one apparatus.
 *
 * <p>Spreads are root mean squares of Gaussian distributions from shot to shot; a linewidth is the
 * full width at half maximum of a Lorentzian line (white frequency noise). What is not given is not
 * assumed to be zero: the budget lists it as not assessed.
 *
 * <p>Immutable: each {@code with…} method gives a copy.
 */
public final class Bench {
  private static final Bench EMPTY = new Bench(null, null, null, null, null, null, null, null);

  private final Temperature temperature;
  private final List<Frequency> trapFrequencies;
  private final Temperature environment;
  private final MagneticField magneticNoise;
  private final ElectricField electricField;
  private final List<Frequency> linewidths;
  private final List<Frequency> drifts;
  private final List<Double> intensityNoise;

  private Bench(
      Temperature temperature,
      List<Frequency> trapFrequencies,
      Temperature environment,
      MagneticField magneticNoise,
      ElectricField electricField,
      List<Frequency> linewidths,
      List<Frequency> drifts,
      List<Double> intensityNoise) {
    this.temperature = temperature;
    this.trapFrequencies = trapFrequencies;
    this.environment = environment;
    this.magneticNoise = magneticNoise;
    this.electricField = electricField;
    this.linewidths = linewidths;
    this.drifts = drifts;
    this.intensityNoise = intensityNoise;
  }

  /**
   * A bench nothing is known of.
   *
   * @return a bench without any value
   */
  public static Bench unknown() {
    return EMPTY;
  }

  /**
   * Sets the temperature of the atom.
   *
   * @param value temperature, above zero
   * @return a copy
   * @throws IllegalArgumentException if the temperature is not above zero
   */
  public Bench withTemperature(Temperature value) {
    requirePositive(value.kelvin(), "temperature " + value);
    return new Bench(
        value,
        trapFrequencies,
        environment,
        magneticNoise,
        electricField,
        linewidths,
        drifts,
        intensityNoise);
  }

  /**
   * Sets the frequencies of the trap that holds the atom, which is switched off or left on during
   * the pulse: they set where the atom is and the zero-point motion.
   *
   * @param x along lab x, positive
   * @param y along lab y, positive
   * @param z along lab z, positive
   * @return a copy
   * @throws IllegalArgumentException if a frequency is not positive
   */
  public Bench withTrapFrequencies(Frequency x, Frequency y, Frequency z) {
    List<Frequency> three = List.of(x, y, z);
    three.forEach(f -> requirePositive(f.hertz(), "trap frequency " + f));
    return new Bench(
        temperature,
        three,
        environment,
        magneticNoise,
        electricField,
        linewidths,
        drifts,
        intensityNoise);
  }

  /**
   * Sets the temperature of the walls that the Rydberg atom sees.
   *
   * @param value temperature, above zero
   * @return a copy
   * @throws IllegalArgumentException if the temperature is not above zero
   */
  public Bench withEnvironment(Temperature value) {
    requirePositive(value.kelvin(), "environment temperature " + value);
    return new Bench(
        temperature,
        trapFrequencies,
        value,
        magneticNoise,
        electricField,
        linewidths,
        drifts,
        intensityNoise);
  }

  /**
   * Sets the spread of the magnetic field along the axis.
   *
   * @param rms root mean square from shot to shot, at least 0
   * @return a copy
   * @throws IllegalArgumentException if the value is negative
   */
  public Bench withMagneticNoise(MagneticField rms) {
    requireNotNegative(rms.tesla(), "magnetic noise " + rms);
    return new Bench(
        temperature,
        trapFrequencies,
        environment,
        rms,
        electricField,
        linewidths,
        drifts,
        intensityNoise);
  }

  /**
   * Sets the residual electric field: random in direction, each component Gaussian.
   *
   * @param rms root mean square of the length of the field vector, at least 0
   * @return a copy
   * @throws IllegalArgumentException if the value is negative
   */
  public Bench withElectricField(ElectricField rms) {
    requireNotNegative(rms.voltsPerMetre(), "electric field " + rms);
    return new Bench(
        temperature,
        trapFrequencies,
        environment,
        magneticNoise,
        rms,
        linewidths,
        drifts,
        intensityNoise);
  }

  /**
   * Sets the laser linewidths.
   *
   * @param fwhm Lorentzian full width at half maximum of each laser, one per step, at least 0
   * @return a copy
   * @throws IllegalArgumentException if a width is negative
   */
  public Bench withLinewidths(Frequency... fwhm) {
    List<Frequency> values = List.of(fwhm);
    values.forEach(f -> requireNotNegative(f.hertz(), "linewidth " + f));
    return new Bench(
        temperature,
        trapFrequencies,
        environment,
        magneticNoise,
        electricField,
        values,
        drifts,
        intensityNoise);
  }

  /**
   * Sets the slow frequency error of the lasers.
   *
   * @param rms root mean square from shot to shot of each laser, one per step, at least 0
   * @return a copy
   * @throws IllegalArgumentException if a value is negative
   */
  public Bench withDrifts(Frequency... rms) {
    List<Frequency> values = List.of(rms);
    values.forEach(f -> requireNotNegative(f.hertz(), "drift " + f));
    return new Bench(
        temperature,
        trapFrequencies,
        environment,
        magneticNoise,
        electricField,
        linewidths,
        values,
        intensityNoise);
  }

  /**
   * Sets the spread of the beam intensities.
   *
   * @param rms relative root mean square from shot to shot of each beam, one per step, from 0 to
   *     0.5
   * @return a copy
   * @throws IllegalArgumentException if a value is out of range
   */
  public Bench withIntensityNoise(double... rms) {
    for (double value : rms) {
      if (!(value >= 0 && value <= 0.5)) {
        throw new IllegalArgumentException(
            String.format(
                Locale.ROOT, "relative intensity noise %s must be between 0 and 0.5", value));
      }
    }
    List<Double> values = Arrays.stream(rms).boxed().toList();
    return new Bench(
        temperature,
        trapFrequencies,
        environment,
        magneticNoise,
        electricField,
        linewidths,
        drifts,
        values);
  }

  private static void requirePositive(double value, String what) {
    if (!(value > 0 && value < Double.POSITIVE_INFINITY)) {
      throw new IllegalArgumentException(what + " must be above zero and finite");
    }
  }

  private static void requireNotNegative(double value, String what) {
    if (!(value >= 0 && value < Double.POSITIVE_INFINITY)) {
      throw new IllegalArgumentException(what + " must be at least zero and finite");
    }
  }

  /**
   * Temperature of the atom.
   *
   * @return the temperature, if known
   */
  public Optional<Temperature> temperature() {
    return Optional.ofNullable(temperature);
  }

  /**
   * Trap frequencies along lab x, y and z.
   *
   * @return a list of three frequencies, if known
   */
  public Optional<List<Frequency>> trapFrequencies() {
    return Optional.ofNullable(trapFrequencies);
  }

  /**
   * Temperature of the surrounding walls.
   *
   * @return the temperature, if known
   */
  public Optional<Temperature> environment() {
    return Optional.ofNullable(environment);
  }

  /**
   * Root mean square of the magnetic field along the axis.
   *
   * @return the spread, if known
   */
  public Optional<MagneticField> magneticNoise() {
    return Optional.ofNullable(magneticNoise);
  }

  /**
   * Root mean square length of the residual electric field.
   *
   * @return the field, if known
   */
  public Optional<ElectricField> electricField() {
    return Optional.ofNullable(electricField);
  }

  /**
   * Lorentzian linewidths, one per step.
   *
   * @return the full widths at half maximum, if known
   */
  public Optional<List<Frequency>> linewidths() {
    return Optional.ofNullable(linewidths);
  }

  /**
   * Slow frequency errors, one per step.
   *
   * @return the root mean squares, if known
   */
  public Optional<List<Frequency>> drifts() {
    return Optional.ofNullable(drifts);
  }

  /**
   * Relative intensity noise, one per step.
   *
   * @return the root mean squares, if known
   */
  public Optional<List<Double>> intensityNoise() {
    return Optional.ofNullable(intensityNoise);
  }

  /**
   * Checks that every list has one value per step.
   *
   * @param steps number of steps of the drive
   * @throws IllegalArgumentException if a list is shorter or longer; the message names it
   */
  public void requireSteps(int steps) {
    requireLength(linewidths, steps, "linewidth");
    requireLength(drifts, steps, "drift");
    requireLength(intensityNoise, steps, "intensity_noise");
  }

  private static void requireLength(List<?> values, int steps, String what) {
    if (values != null && values.size() != steps) {
      throw new IllegalArgumentException(
          what + " has " + values.size() + " values, but the drive has " + steps + " steps");
    }
  }
}
