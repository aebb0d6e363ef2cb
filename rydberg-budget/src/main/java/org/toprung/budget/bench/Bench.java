package org.toprung.budget.bench;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.EnumMap;
import java.util.List;
import java.util.Map;
import java.util.Objects;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.TreeMap;
import java.util.function.Consumer;
import java.util.function.Function;
import java.util.function.ToDoubleFunction;
import java.util.stream.Collectors;
import org.toprung.core.quantity.ElectricField;
import org.toprung.core.quantity.Frequency;
import org.toprung.core.quantity.Length;
import org.toprung.core.quantity.MagneticField;
import org.toprung.core.quantity.Temperature;

/**
 * The disturbances of one apparatus.
 *
 * <p>Spreads are root mean squares of Gaussian distributions from shot to shot, or samples; a
 * linewidth is the full width at half maximum of a Lorentzian line (white frequency noise). Any
 * number may have a relative standard uncertainty: {@link #knownTo}. None may exceed {@link
 * BenchValue#highest}. What is not given is not assumed to be zero: the budget lists it as not
 * assessed.
 *
 * <p>Immutable: each {@code with…} method gives a copy.
 */
public final class Bench {
  private static final Bench UNKNOWN = new Bench(new Values());

  /** What is known. Never changed once a bench holds it. */
  private static final class Values {
    private final Map<BenchValue, double[]> numbers = new EnumMap<>(BenchValue.class);
    private final Map<BenchValue, double[]> uncertainties = new EnumMap<>(BenchValue.class);
    private final Map<BenchValue, Map<Integer, Spread>> samples = new EnumMap<>(BenchValue.class);
    private final Map<BenchValue, Map<Integer, NoiseDensity>> densities =
        new EnumMap<>(BenchValue.class);
    private boolean motion;

    Values copy() {
      Values copy = new Values();
      copy.numbers.putAll(numbers);
      copy.uncertainties.putAll(uncertainties);
      samples.forEach((value, map) -> copy.samples.put(value, new TreeMap<>(map)));
      densities.forEach((value, map) -> copy.densities.put(value, new TreeMap<>(map)));
      copy.motion = motion;
      return copy;
    }

    /** What was said of an older number does not hold for what replaces it. */
    void forgetUncertainty(BenchValue value, int index) {
      uncertainties.computeIfPresent(
          value,
          (k, old) -> {
            double[] rest = old.clone();
            if (index < rest.length) {
              rest[index] = 0;
            }
            return rest;
          });
    }
  }

  private final Values values;

  private Bench(Values values) {
    this.values = values;
  }

  /** A copy in which something is set. */
  private Bench with(Consumer<Values> change) {
    Values copy = values.copy();
    change.accept(copy);
    return new Bench(copy);
  }

  /** A copy with new numbers, which replace samples and an uncertainty of the old ones. */
  private Bench with(BenchValue value, double[] numbers, Object[] shown) {
    value.requireCount(numbers.length);
    for (int i = 0; i < numbers.length; i++) {
      value.requireAllowed(numbers[i], shown[i]);
    }
    return with(
        v -> {
          v.numbers.put(value, numbers.clone());
          v.uncertainties.remove(value);
          v.samples.remove(value);
        });
  }

  private <Q> Bench with(BenchValue value, ToDoubleFunction<Q> si, List<Q> quantities) {
    return with(value, quantities.stream().mapToDouble(si).toArray(), quantities.toArray());
  }

  private Bench withRatios(BenchValue value, double... ratios) {
    return with(value, ratios, Arrays.stream(ratios).boxed().toArray());
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
    return with(BenchValue.TEMPERATURE, Temperature::kelvin, List.of(value));
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
    return with(BenchValue.TRAP_FREQUENCY, Frequency::hertz, List.of(x, y, z));
  }

  /**
   * Sets the temperature of the walls that the Rydberg atom sees.
   *
   * @param value temperature, above zero
   * @return a copy
   * @throws IllegalArgumentException if the temperature is not above zero
   */
  public Bench withEnvironment(Temperature value) {
    return with(BenchValue.ENVIRONMENT_TEMPERATURE, Temperature::kelvin, List.of(value));
  }

  /**
   * Sets the spread of the magnetic field along the axis.
   *
   * @param rms root mean square from shot to shot, at least 0
   * @return a copy
   * @throws IllegalArgumentException if the value is negative
   */
  public Bench withMagneticNoise(MagneticField rms) {
    return with(BenchValue.MAGNETIC_NOISE, MagneticField::tesla, List.of(rms));
  }

  /**
   * Sets the magnetic field by samples.
   *
   * @param deviations measured deviations from the calibrated field along the axis
   * @return a copy
   * @throws IllegalArgumentException if there is none
   */
  public Bench withMagneticSamples(MagneticField... deviations) {
    return sampled(BenchValue.MAGNETIC_NOISE, 0, si(deviations, MagneticField::tesla));
  }

  /**
   * Sets the residual electric field: random in direction, each component Gaussian.
   *
   * @param rms root mean square of the length of the field vector, at least 0
   * @return a copy
   * @throws IllegalArgumentException if the value is negative
   */
  public Bench withElectricField(ElectricField rms) {
    return with(BenchValue.ELECTRIC_FIELD, ElectricField::voltsPerMetre, List.of(rms));
  }

  /**
   * Sets the residual electric field by samples of its length; its direction is random.
   *
   * @param lengths measured lengths, at least 0
   * @return a copy
   * @throws IllegalArgumentException if there is none or one is negative
   */
  public Bench withElectricSamples(ElectricField... lengths) {
    for (ElectricField length : lengths) {
      if (!(length.voltsPerMetre() >= 0)) {
        throw new IllegalArgumentException(
            "length " + length + " of an electric field must be at least zero");
      }
    }
    return sampled(BenchValue.ELECTRIC_FIELD, 0, si(lengths, ElectricField::voltsPerMetre));
  }

  /**
   * Sets the laser linewidths.
   *
   * @param fwhm Lorentzian full width at half maximum of each laser, one per step, at least 0
   * @return a copy
   * @throws IllegalArgumentException if a width is negative, or there are not 1 to 3
   */
  public Bench withLinewidths(Frequency... fwhm) {
    return with(BenchValue.LINEWIDTH, Frequency::hertz, List.of(fwhm));
  }

  /**
   * Sets the slow frequency error of the lasers.
   *
   * @param rms root mean square from shot to shot of each laser, one per step, at least 0
   * @return a copy
   * @throws IllegalArgumentException if a value is negative
   */
  public Bench withDrifts(Frequency... rms) {
    return with(BenchValue.DRIFT, Frequency::hertz, List.of(rms));
  }

  /**
   * Sets the slow frequency error of one laser by samples.
   *
   * @param step index of the step, from 0
   * @param deviations measured deviations from the calibrated frequency
   * @return a copy
   * @throws IllegalArgumentException if there is none
   */
  public Bench withDriftSamples(int step, Frequency... deviations) {
    return sampled(BenchValue.DRIFT, step, si(deviations, Frequency::hertz));
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
    return withRatios(BenchValue.INTENSITY_NOISE, rms);
  }

  /**
   * Sets the intensity of one beam by samples.
   *
   * @param step index of the step, from 0
   * @param relative measured relative deviations from the calibrated intensity, at least −1, with a
   *     root mean square up to 0.5
   * @return a copy
   * @throws IllegalArgumentException if there is none, one is below −1, or they spread further
   */
  public Bench withIntensitySamples(int step, double... relative) {
    for (double deviation : relative) {
      if (!(deviation >= -1)) {
        throw new IllegalArgumentException(
            "relative intensity deviation " + deviation + " must be at least -1");
      }
    }
    return sampled(BenchValue.INTENSITY_NOISE, step, relative);
  }

  /**
   * Sets the pointing jitter of the beams.
   *
   * @param rms root mean square displacement of each beam at the atom in each of the two directions
   *     across it, one per step, at least 0
   * @return a copy
   * @throws IllegalArgumentException if a value is negative
   */
  public Bench withPointing(Length... rms) {
    return with(BenchValue.POINTING, Length::metres, List.of(rms));
  }

  /**
   * Sets how much light of the orthogonal polarization is in the beams, coherent with the wanted
   * light and of unknown phase.
   *
   * @param fraction part of the intensity, one per step, from 0 to 0.5
   * @return a copy
   * @throws IllegalArgumentException if a value is out of range
   */
  public Bench withPolarizationImpurity(double... fraction) {
    return withRatios(BenchValue.POLARIZATION_IMPURITY, fraction);
  }

  /**
   * Sets how well the length of the pulse is calibrated.
   *
   * @param relativeRms relative root mean square error, from 0 to 0.5
   * @return a copy
   * @throws IllegalArgumentException if the value is out of range
   */
  public Bench withLengthError(double relativeRms) {
    return withRatios(BenchValue.LENGTH_ERROR, relativeRms);
  }

  /**
   * Sets how well the frequency of the lasers is calibrated.
   *
   * @param rms root mean square error of the summed frequency, at least 0
   * @return a copy
   * @throws IllegalArgumentException if the value is negative
   */
  public Bench withFrequencyError(Frequency rms) {
    return with(BenchValue.FREQUENCY_ERROR, Frequency::hertz, List.of(rms));
  }

  /**
   * Sets the intensity noise of a trap that stays on during the pulse.
   *
   * @param relativeRms relative root mean square from shot to shot, from 0 to 0.5
   * @return a copy
   * @throws IllegalArgumentException if the value is out of range
   */
  public Bench withTrapIntensityNoise(double relativeRms) {
    return withRatios(BenchValue.TRAP_INTENSITY_NOISE, relativeRms);
  }

  /**
   * Sets the probability that the atom does not begin in the start.
   *
   * @param probability from 0 to 0.5
   * @return a copy
   * @throws IllegalArgumentException if the value is out of range
   */
  public Bench withPreparationError(double probability) {
    return withRatios(BenchValue.PREPARATION_ERROR, probability);
  }

  /**
   * Sets the probability that the outcome is read wrongly.
   *
   * @param probability from 0 to 0.5
   * @return a copy
   * @throws IllegalArgumentException if the value is out of range
   */
  public Bench withDetectionError(double probability) {
    return withRatios(BenchValue.DETECTION_ERROR, probability);
  }

  /**
   * Sets the spectrum of the frequency noise of one laser.
   *
   * @param step index of the step, from 0
   * @param density one-sided density, Hz²/Hz
   * @return a copy
   * @throws IllegalArgumentException if no drive has such a step, or the root mean square over the
   *     whole table is more than {@link BenchValue#DRIFT} may be
   */
  public Bench withFrequencyNoiseDensity(int step, NoiseDensity density) {
    return with(BenchValue.FREQUENCY_NOISE_DENSITY, step, density, BenchValue.DRIFT);
  }

  /**
   * Sets the spectrum of the relative intensity noise of one beam.
   *
   * @param step index of the step, from 0
   * @param density one-sided density, 1/Hz
   * @return a copy
   * @throws IllegalArgumentException if no drive has such a step, or the root mean square over the
   *     whole table is more than {@link BenchValue#INTENSITY_NOISE} may be
   */
  public Bench withIntensityNoiseDensity(int step, NoiseDensity density) {
    return with(BenchValue.INTENSITY_NOISE_DENSITY, step, density, BenchValue.INTENSITY_NOISE);
  }

  private Bench with(BenchValue value, int step, NoiseDensity density, BenchValue slow) {
    value.requireIndex(step);
    Objects.requireNonNull(density, value.words());
    double rms = density.rms();
    if (!(rms <= slow.highest())) {
      throw new IllegalArgumentException(
          value.words()
              + ": the root mean square over the whole table is "
              + rms
              + "; allowed: at most "
              + slow.highest());
    }
    return with(
        v -> {
          v.densities.computeIfAbsent(value, k -> new TreeMap<>()).put(step, density);
          v.forgetUncertainty(value, step);
        });
  }

  /**
   * Lets the atom fly through the beams during the pulse instead of standing still: for long
   * pulses. Only the simulation follows it.
   *
   * @return a copy
   */
  public Bench withMotionDuringPulse() {
    return with(v -> v.motion = true);
  }

  private static <Q> double[] si(Q[] quantities, ToDoubleFunction<Q> si) {
    return Arrays.stream(quantities).mapToDouble(si).toArray();
  }

  private Bench sampled(BenchValue value, int index, double[] deviations) {
    value.requireIndex(index);
    Spread spread = Spread.of(deviations);
    value.requireAllowed(spread.rms(), spread.rms() + " (root mean square of samples)");
    return with(
        v -> {
          v.samples.computeIfAbsent(value, k -> new TreeMap<>()).put(index, spread);
          v.forgetUncertainty(value, index);
        });
  }

  /**
   * States how well a number is known.
   *
   * @param value what it is
   * @param index 0, or the axis, or the step, from 0
   * @param relative standard uncertainty over the number, from 0 to 1; below 1 for temperatures and
   *     trap frequencies, which cannot be 0
   * @return a copy
   * @throws IllegalArgumentException if the number is not known, if it is 0 and the uncertainty is
   *     not, or if the uncertainty is out of range
   */
  public Bench knownTo(BenchValue value, int index, double relative) {
    BenchEntry entry = new BenchEntry(value, index);
    if (!(relative >= 0 && (value.isPositive() ? relative < 1 : relative <= 1))) {
      throw new IllegalArgumentException(
          "relative uncertainty "
              + relative
              + " of "
              + entry.name()
              + (value.isPositive() ? " must be at least 0 and below 1" : " must be from 0 to 1"));
    }
    double number = known(entry);
    if (number == 0 && relative > 0) {
      throw new IllegalArgumentException(
          entry.name() + " is 0, so it has no relative uncertainty; allowed: 0");
    }
    return with(
        v -> {
          double[] old = v.uncertainties.getOrDefault(value, new double[0]);
          double[] copy = Arrays.copyOf(old, Math.max(old.length, index + 1));
          copy[index] = relative;
          v.uncertainties.put(value, copy);
        });
  }

  /**
   * A number times a factor: what would be, were this disturbance stronger or weaker. A ratio may
   * become twice as large as can be given. What is known of its uncertainty stays.
   *
   * @param value what it is
   * @param index 0, or the axis, or the step, from 0
   * @param factor factor on the number; on the amplitude of the noise of a density or of samples
   * @return a copy
   * @throws IllegalArgumentException if the number is not known or impossible after that
   */
  public Bench scaled(BenchValue value, int index, double factor) {
    BenchEntry entry = new BenchEntry(value, index);
    value.requireImaginable(factor * known(entry));
    return with(
        v -> {
          if (v.samples.containsKey(value)) {
            v.samples.get(value).computeIfPresent(index, (i, s) -> s.scaled(factor));
          }
          if (v.densities.containsKey(value)) {
            v.densities.get(value).computeIfPresent(index, (i, d) -> d.scaled(factor * factor));
          }
          double[] numbers = v.numbers.get(value);
          if (numbers != null && index < numbers.length) {
            double[] copy = numbers.clone();
            copy[index] *= factor;
            v.numbers.put(value, copy);
          }
        });
  }

  private double known(BenchEntry entry) {
    return value(entry.value(), entry.index())
        .orElseThrow(() -> new IllegalArgumentException(entry.name() + " is not known"));
  }

  /**
   * One number of the bench.
   *
   * @param value what it is
   * @param index 0, or the axis, or the step, from 0
   * @return the number in the SI unit of the value, the root mean square of samples, 1 for a
   *     density; empty if it is not known
   * @throws IllegalArgumentException if there is no such index
   */
  public OptionalDouble value(BenchValue value, int index) {
    value.requireIndex(index);
    if (value.isDensity()) {
      return density(value, index).isPresent() ? OptionalDouble.of(1) : OptionalDouble.empty();
    }
    Optional<Spread> sampled = samples(value, index);
    if (sampled.isPresent()) {
      return OptionalDouble.of(sampled.get().rms());
    }
    double[] numbers = values.numbers.get(value);
    return numbers == null || index >= numbers.length
        ? OptionalDouble.empty()
        : OptionalDouble.of(numbers[index]);
  }

  private Optional<Spread> samples(BenchValue value, int index) {
    return Optional.ofNullable(values.samples.getOrDefault(value, Map.of()).get(index));
  }

  private Optional<NoiseDensity> density(BenchValue value, int step) {
    return Optional.ofNullable(values.densities.getOrDefault(value, Map.of()).get(step));
  }

  /**
   * Whether anything is known of a value.
   *
   * @param value what it is
   * @return true if there is a number, a sample or a density, for any step
   */
  public boolean isKnown(BenchValue value) {
    return entries().stream().anyMatch(e -> e.value() == value);
  }

  /**
   * How a value differs from shot to shot.
   *
   * @param value what it is, a root mean square; for the electric field it is that of the length of
   *     a vector, whose components are Gaussian where there are no samples
   * @param index 0, or the step, from 0
   * @return the samples, or a Gaussian of the given root mean square; empty if neither is known
   * @throws IllegalArgumentException if the value is no root mean square, or has no such index
   */
  public Optional<Spread> spread(BenchValue value, int index) {
    if (!value.isSpread()) {
      throw new IllegalArgumentException(
          value.words() + " is no deviation from shot to shot, so it has no spread");
    }
    value.requireIndex(index);
    Optional<Spread> sampled = samples(value, index);
    if (sampled.isPresent()) {
      return sampled;
    }
    OptionalDouble rms = value(value, index);
    return rms.isPresent() ? Optional.of(Spread.gaussian(rms.getAsDouble())) : Optional.empty();
  }

  /**
   * How well a number is known.
   *
   * @param value what it is
   * @param index 0, or the axis, or the step, from 0
   * @return standard uncertainty over the number; 0 where none was stated
   * @throws IllegalArgumentException if there is no such index
   */
  public double relativeUncertainty(BenchValue value, int index) {
    value.requireIndex(index);
    double[] stated = values.uncertainties.getOrDefault(value, new double[0]);
    return index < stated.length ? stated[index] : 0;
  }

  /**
   * Every number that is known.
   *
   * @return an immutable list in the order of {@link BenchValue}
   */
  public List<BenchEntry> entries() {
    List<BenchEntry> known = new ArrayList<>();
    for (BenchValue value : BenchValue.values()) {
      int count = values.numbers.getOrDefault(value, new double[0]).length;
      for (Map<Integer, ?> map :
          List.of(
              values.samples.getOrDefault(value, Map.of()),
              values.densities.getOrDefault(value, Map.of()))) {
        for (int index : map.keySet()) {
          count = Math.max(count, index + 1);
        }
      }
      for (int i = 0; i < count; i++) {
        if (value(value, i).isPresent()) {
          known.add(new BenchEntry(value, i));
        }
      }
    }
    return List.copyOf(known);
  }

  private <Q> Optional<Q> one(BenchValue value, Function<Double, Q> quantity) {
    OptionalDouble number = value(value, 0);
    return number.isPresent()
        ? Optional.of(quantity.apply(number.getAsDouble()))
        : Optional.empty();
  }

  private <Q> Optional<List<Q>> all(BenchValue value, Function<Double, Q> quantity) {
    List<BenchEntry> known = entries().stream().filter(e -> e.value() == value).toList();
    boolean complete = !known.isEmpty() && known.get(known.size() - 1).index() == known.size() - 1;
    return complete
        ? Optional.of(known.stream().map(e -> quantity.apply(known(e))).toList())
        : Optional.empty();
  }

  /**
   * Temperature of the atom.
   *
   * @return the temperature, if known
   */
  public Optional<Temperature> temperature() {
    return one(BenchValue.TEMPERATURE, Temperature::ofKelvin);
  }

  /**
   * Trap frequencies along x, y, z.
   *
   * @return a list of three frequencies, if known
   */
  public Optional<List<Frequency>> trapFrequencies() {
    return all(BenchValue.TRAP_FREQUENCY, Frequency::ofHertz);
  }

  /**
   * Temperature of the surrounding walls.
   *
   * @return the temperature, if known
   */
  public Optional<Temperature> environment() {
    return one(BenchValue.ENVIRONMENT_TEMPERATURE, Temperature::ofKelvin);
  }

  /**
   * Root mean square of the magnetic field along the axis.
   *
   * @return the spread, if known
   */
  public Optional<MagneticField> magneticNoise() {
    return one(BenchValue.MAGNETIC_NOISE, MagneticField::ofTesla);
  }

  /**
   * Root mean square length of the residual electric field.
   *
   * @return the field, if known
   */
  public Optional<ElectricField> electricField() {
    return one(BenchValue.ELECTRIC_FIELD, ElectricField::ofVoltsPerMetre);
  }

  /**
   * Lorentzian linewidths, one per step.
   *
   * @return the full widths at half maximum, if known
   */
  public Optional<List<Frequency>> linewidths() {
    return all(BenchValue.LINEWIDTH, Frequency::ofHertz);
  }

  /**
   * Slow frequency errors, one per step.
   *
   * @return the root mean squares, of samples too, if each is known up to the last one given
   */
  public Optional<List<Frequency>> drifts() {
    return all(BenchValue.DRIFT, Frequency::ofHertz);
  }

  /**
   * Relative intensity noise, one per step.
   *
   * @return the root mean squares, of samples too, if each is known up to the last one given
   */
  public Optional<List<Double>> intensityNoise() {
    return all(BenchValue.INTENSITY_NOISE, Double::valueOf);
  }

  /**
   * Spectrum of the frequency noise of a laser.
   *
   * @param step index of the step, from 0
   * @return one-sided density, Hz²/Hz, if known
   */
  public Optional<NoiseDensity> frequencyNoiseDensity(int step) {
    return density(BenchValue.FREQUENCY_NOISE_DENSITY, step);
  }

  /**
   * Spectrum of the relative intensity noise of a beam.
   *
   * @param step index of the step, from 0
   * @return one-sided density, 1/Hz, if known
   */
  public Optional<NoiseDensity> intensityNoiseDensity(int step) {
    return density(BenchValue.INTENSITY_NOISE_DENSITY, step);
  }

  /**
   * Whether the atom flies through the beams during the pulse.
   *
   * @return false if it is taken to stand still
   */
  public boolean movesDuringPulse() {
    return values.motion;
  }

  /**
   * Checks that every list has one value per step, and that no laser's white noise counts twice.
   *
   * @param steps number of steps of the drive
   * @throws IllegalArgumentException if a list is shorter or longer, samples or a density belong to
   *     no step, or a laser has a linewidth as well as a density; the message names it
   */
  public void requireSteps(int steps) {
    values.numbers.forEach(
        (value, numbers) -> {
          if (value.arity() == BenchValue.Arity.STEPS && numbers.length != steps) {
            throw new IllegalArgumentException(
                value.key()
                    + " has "
                    + numbers.length
                    + " values, but the drive has "
                    + steps
                    + " steps");
          }
        });
    for (BenchEntry entry : entries()) {
      if (entry.value().arity() == BenchValue.Arity.STEPS && entry.index() >= steps) {
        throw new IllegalArgumentException(
            entry.name() + " is given, but the drive has " + steps + " steps");
      }
    }
    for (int k = 0; k < steps; k++) {
      double linewidth = value(BenchValue.LINEWIDTH, k).orElse(0);
      if (linewidth > 0 && frequencyNoiseDensity(k).isPresent()) {
        throw new IllegalArgumentException(
            "laser "
                + (k + 1)
                + " has a linewidth of "
                + Frequency.ofHertz(linewidth)
                + " and a frequency noise density; allowed: one of them (or a linewidth of 0), as"
                + " its white noise would count twice");
      }
    }
  }

  /**
   * What is known, in one line.
   *
   * @return names and numbers in SI units
   */
  @Override
  public String toString() {
    return entries().stream()
        .map(
            e ->
                e.name()
                    + " "
                    + value(e.value(), e.index()).orElseThrow()
                    + (e.value().unit().isEmpty() ? "" : " " + e.value().unit()))
        .collect(Collectors.joining("; ", "bench of ", ""));
  }
}
