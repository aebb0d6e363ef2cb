package org.toprung.budget.bench;

import java.util.Arrays;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.function.Consumer;
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
  private static final Bench UNKNOWN = new Bench(new Values());

  /** What is known; null stands for what is not. Never changed once a bench holds it. */
  private static final class Values {
    private Temperature temperature;
    private List<Frequency> trapFrequencies;
    private Temperature environment;
    private MagneticField magneticNoise;
    private ElectricField electricField;
    private List<Frequency> linewidths;
    private List<Frequency> drifts;
    private List<Double> intensityNoise;
  }

  private final Values values;

  private Bench(Values values) {
    this.values = values;
  }

  /** A copy in which something is set. */
  private Bench with(Consumer<Values> change) {
    Values copy = new Values();
    copy.temperature = values.temperature;
    copy.trapFrequencies = values.trapFrequencies;
    copy.environment = values.environment;
    copy.magneticNoise = values.magneticNoise;
    copy.electricField = values.electricField;
    copy.linewidths = values.linewidths;
    copy.drifts = values.drifts;
    copy.intensityNoise = values.intensityNoise;
    change.accept(copy);
    return new Bench(copy);
  }

  /**
   * A bench nothing is known of.
   *
   * @return a bench without any value
   */
  public static Bench unknown() {
    return UNKNOWN;
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
    return with(v -> v.temperature = value);
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
    return with(v -> v.trapFrequencies = three);
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
    return with(v -> v.environment = value);
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
    return with(v -> v.magneticNoise = rms);
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
    return with(v -> v.electricField = rms);
  }

  /**
   * Sets the laser linewidths.
   *
   * @param fwhm Lorentzian full width at half maximum of each laser, one per step, at least 0
   * @return a copy
   * @throws IllegalArgumentException if a width is negative
   */
  public Bench withLinewidths(Frequency... fwhm) {
    List<Frequency> given = List.of(fwhm);
    given.forEach(f -> requireNotNegative(f.hertz(), "linewidth " + f));
    return with(v -> v.linewidths = given);
  }

  /**
   * Sets the slow frequency error of the lasers.
   *
   * @param rms root mean square from shot to shot of each laser, one per step, at least 0
   * @return a copy
   * @throws IllegalArgumentException if a value is negative
   */
  public Bench withDrifts(Frequency... rms) {
    List<Frequency> given = List.of(rms);
    given.forEach(f -> requireNotNegative(f.hertz(), "drift " + f));
    return with(v -> v.drifts = given);
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
    List<Double> given = Arrays.stream(rms).boxed().toList();
    return with(v -> v.intensityNoise = given);
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
    return Optional.ofNullable(values.temperature);
  }

  /**
   * Trap frequencies along lab x, y and z.
   *
   * @return a list of three frequencies, if known
   */
  public Optional<List<Frequency>> trapFrequencies() {
    return Optional.ofNullable(values.trapFrequencies);
  }

  /**
   * Temperature of the surrounding walls.
   *
   * @return the temperature, if known
   */
  public Optional<Temperature> environment() {
    return Optional.ofNullable(values.environment);
  }

  /**
   * Root mean square of the magnetic field along the axis.
   *
   * @return the spread, if known
   */
  public Optional<MagneticField> magneticNoise() {
    return Optional.ofNullable(values.magneticNoise);
  }

  /**
   * Root mean square length of the residual electric field.
   *
   * @return the field, if known
   */
  public Optional<ElectricField> electricField() {
    return Optional.ofNullable(values.electricField);
  }

  /**
   * Lorentzian linewidths, one per step.
   *
   * @return the full widths at half maximum, if known
   */
  public Optional<List<Frequency>> linewidths() {
    return Optional.ofNullable(values.linewidths);
  }

  /**
   * Slow frequency errors, one per step.
   *
   * @return the root mean squares, if known
   */
  public Optional<List<Frequency>> drifts() {
    return Optional.ofNullable(values.drifts);
  }

  /**
   * Relative intensity noise, one per step.
   *
   * @return the root mean squares, if known
   */
  public Optional<List<Double>> intensityNoise() {
    return Optional.ofNullable(values.intensityNoise);
  }

  /**
   * Checks that every list has one value per step.
   *
   * @param steps number of steps of the drive
   * @throws IllegalArgumentException if a list is shorter or longer; the message names it
   */
  public void requireSteps(int steps) {
    requireLength(values.linewidths, steps, "linewidth");
    requireLength(values.drifts, steps, "drift");
    requireLength(values.intensityNoise, steps, "intensity_noise");
  }

  private static void requireLength(List<?> values, int steps, String what) {
    if (values != null && values.size() != steps) {
      throw new IllegalArgumentException(
          what + " has " + values.size() + " values, but the drive has " + steps + " steps");
    }
  }
}
