package org.toprung.budget.bench;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.toprung.budget.bench.BenchValue.DETECTION_ERROR;
import static org.toprung.budget.bench.BenchValue.DRIFT;
import static org.toprung.budget.bench.BenchValue.ELECTRIC_FIELD;
import static org.toprung.budget.bench.BenchValue.FREQUENCY_NOISE_DENSITY;
import static org.toprung.budget.bench.BenchValue.INTENSITY_NOISE;
import static org.toprung.budget.bench.BenchValue.LINEWIDTH;
import static org.toprung.budget.bench.BenchValue.MAGNETIC_NOISE;
import static org.toprung.budget.bench.BenchValue.POINTING;
import static org.toprung.budget.bench.BenchValue.TEMPERATURE;
import static org.toprung.budget.bench.BenchValue.TRAP_FREQUENCY;
import static org.toprung.core.quantity.Frequency.hertz;
import static org.toprung.core.quantity.Frequency.kilohertz;

import java.util.EnumSet;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Set;
import java.util.stream.Collectors;
import java.util.stream.Stream;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.constraints.DoubleRange;
import net.jqwik.api.constraints.IntRange;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.function.Executable;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.EnumSource;
import org.toprung.core.quantity.ElectricField;
import org.toprung.core.quantity.Length;
import org.toprung.core.quantity.MagneticField;
import org.toprung.core.quantity.Temperature;

class BenchTest {
  private static final NoiseDensity DENSITY =
      NoiseDensity.of(new double[] {10, 1000}, new double[] {4e-6, 4e-6});

  /** Everything there is, for two steps; the first laser has a density and no linewidth. */
  private static Bench full() {
    return Bench.unknown()
        .withTemperature(Temperature.microkelvin(6))
        .withTrapFrequencies(kilohertz(80), kilohertz(70), kilohertz(10))
        .withEnvironment(Temperature.kelvin(295))
        .withMagneticNoise(MagneticField.milligauss(2))
        .withElectricField(ElectricField.millivoltsPerCentimetre(3))
        .withLinewidths(hertz(0), hertz(300))
        .withDrifts(kilohertz(1), kilohertz(2))
        .withIntensityNoise(0.004, 0.3)
        .withPointing(Length.micrometres(1), Length.micrometres(2))
        .withPolarizationImpurity(0.001, 0.002)
        .withLengthError(0.01)
        .withFrequencyError(kilohertz(3))
        .withTrapIntensityNoise(0.02)
        .withPreparationError(0.003)
        .withDetectionError(0.5)
        .withFrequencyNoiseDensity(0, DENSITY)
        .withIntensityNoiseDensity(1, DENSITY);
  }

  private static String refused(Executable action) {
    return assertThrows(IllegalArgumentException.class, action).getMessage();
  }

  @Test
  void holdsEveryValueInSiUnits() {
    Bench bench = full();
    assertEquals(6e-6, bench.value(TEMPERATURE, 0).orElseThrow());
    assertEquals(7e4, bench.value(TRAP_FREQUENCY, 1).orElseThrow());
    assertEquals(2e-7, bench.value(MAGNETIC_NOISE, 0).orElseThrow(), 1e-22);
    assertEquals(0.3, bench.value(ELECTRIC_FIELD, 0).orElseThrow(), 1e-16);
    assertEquals(2e-6, bench.value(POINTING, 1).orElseThrow(), 1e-21);
    assertEquals(0.5, bench.value(DETECTION_ERROR, 0).orElseThrow());
    assertEquals(1, bench.value(FREQUENCY_NOISE_DENSITY, 0).orElseThrow());
    assertEquals(OptionalDouble.empty(), bench.value(FREQUENCY_NOISE_DENSITY, 1));
    assertEquals(OptionalDouble.empty(), bench.value(DRIFT, 2));
    assertEquals(
        EnumSet.allOf(BenchValue.class),
        bench.entries().stream().map(BenchEntry::value).collect(Collectors.toSet()));
    assertEquals(10 + 2 + 5 * 2 + 2, bench.entries().size());
    bench.requireSteps(2);
  }

  @ParameterizedTest
  @EnumSource(BenchValue.class)
  void knowsNothingThatWasNotGiven(BenchValue value) {
    assertFalse(Bench.unknown().isKnown(value));
    assertTrue(full().isKnown(value));
    assertEquals(OptionalDouble.empty(), Bench.unknown().value(value, 0));
    assertEquals(List.of(), Bench.unknown().entries());
    assertThrows(IllegalArgumentException.class, () -> Bench.unknown().scaled(value, 0, 1));
    assertThrows(IllegalArgumentException.class, () -> Bench.unknown().knownTo(value, 0, 0.1));
  }

  @Property(seed = "41", tries = 80)
  void scalesOneNumberAndNoOther(
      @ForAll @IntRange(min = 0, max = 23) int which,
      @ForAll @DoubleRange(min = 0.1, max = 1.99) double factor) {
    Bench bench = full();
    BenchEntry entry = bench.entries().get(which);
    Bench scaled = bench.scaled(entry.value(), entry.index(), factor);
    for (BenchEntry other : bench.entries()) {
      double before = bench.value(other.value(), other.index()).orElseThrow();
      double after = scaled.value(other.value(), other.index()).orElseThrow();
      boolean moved = other.equals(entry) && !entry.value().isDensity();
      assertEquals(moved ? factor * before : before, after, 1e-15 * before, other.name());
    }
    double variance = entry.value() == FREQUENCY_NOISE_DENSITY ? factor * factor : 1;
    assertEquals(4e-6 * variance, scaled.frequencyNoiseDensity(0).orElseThrow().at(100), 1e-18);
  }

  @Test
  void scalesSamples() {
    Bench bench = full().withDriftSamples(0, hertz(-300), hertz(400));
    Bench twice = bench.scaled(DRIFT, 0, 2);
    assertArrayEquals(new double[] {-600, 800}, twice.spread(DRIFT, 0).orElseThrow().samples());
    assertEquals(2e3, twice.value(DRIFT, 1).orElseThrow());
    assertArrayEquals(new double[] {-300, 400}, bench.spread(DRIFT, 0).orElseThrow().samples());
  }

  /** What can be given can be doubled in the mind, though it could not be given like that. */
  @Test
  void imaginesRatiosTwiceAsLargeAsCanBeGiven() {
    assertEquals(0.6, full().scaled(INTENSITY_NOISE, 1, 2).value(INTENSITY_NOISE, 1).orElseThrow());
    assertEquals(1, full().scaled(DETECTION_ERROR, 0, 2).value(DETECTION_ERROR, 0).orElseThrow());
    assertTrue(refused(() -> full().scaled(DETECTION_ERROR, 0, 2.1)).contains("detection error"));
    for (double factor : new double[] {-1, Double.NaN, Double.POSITIVE_INFINITY}) {
      refused(() -> full().scaled(DRIFT, 0, factor));
      refused(() -> full().scaled(FREQUENCY_NOISE_DENSITY, 0, factor));
    }
    assertEquals(0, full().scaled(DRIFT, 0, 0).value(DRIFT, 0).orElseThrow());
    assertTrue(refused(() -> full().scaled(TEMPERATURE, 0, 0)).contains("above zero"));
  }

  @Test
  void remembersHowWellANumberIsKnown() {
    Bench bench = full().knownTo(DRIFT, 1, 0.2).knownTo(TEMPERATURE, 0, 0.1);
    assertEquals(0.2, bench.relativeUncertainty(DRIFT, 1));
    assertEquals(0, bench.relativeUncertainty(DRIFT, 0));
    assertEquals(0, bench.relativeUncertainty(DRIFT, 2));
    assertEquals(0.1, bench.relativeUncertainty(TEMPERATURE, 0));
    assertEquals(0.2, bench.scaled(DRIFT, 1, 2).relativeUncertainty(DRIFT, 1));
    assertEquals(0, full().relativeUncertainty(DRIFT, 1));
  }

  @Test
  void forgetsTheUncertaintyOfWhatIsReplaced() {
    Bench bench = full().knownTo(DRIFT, 0, 0.1).knownTo(DRIFT, 1, 0.2);
    assertEquals(0, bench.withDrifts(hertz(1), hertz(2)).relativeUncertainty(DRIFT, 1));
    Bench sampled = bench.withDriftSamples(1, hertz(5));
    assertEquals(0, sampled.relativeUncertainty(DRIFT, 1));
    assertEquals(0.1, sampled.relativeUncertainty(DRIFT, 0));
    Bench noisy = full().knownTo(FREQUENCY_NOISE_DENSITY, 0, 0.3);
    assertEquals(0.3, noisy.relativeUncertainty(FREQUENCY_NOISE_DENSITY, 0));
    assertEquals(
        0,
        noisy
            .withFrequencyNoiseDensity(0, DENSITY)
            .relativeUncertainty(FREQUENCY_NOISE_DENSITY, 0));
  }

  @Test
  void refusesUncertaintiesThatMakeNoSense() {
    for (double relative : new double[] {-0.1, 1.1, Double.NaN}) {
      assertTrue(refused(() -> full().knownTo(DRIFT, 0, relative)).contains("drift, step 1"));
    }
    // a temperature of zero would follow, which no budget can use
    assertTrue(refused(() -> full().knownTo(TEMPERATURE, 0, 1)).contains("below 1"));
    assertEquals(1, full().knownTo(DRIFT, 0, 1).relativeUncertainty(DRIFT, 0));
    // there is nothing to be relative to
    assertTrue(refused(() -> full().knownTo(LINEWIDTH, 0, 0.1)).contains("is 0"));
    assertEquals(0, full().knownTo(LINEWIDTH, 0, 0).relativeUncertainty(LINEWIDTH, 0));
  }

  @Test
  void givesASpreadForWhatDiffersFromShotToShot() {
    Bench bench =
        full()
            .withMagneticSamples(MagneticField.milligauss(1), MagneticField.milligauss(-7))
            .withElectricSamples(ElectricField.ofVoltsPerMetre(0.5))
            .withIntensitySamples(0, 0.01, -0.02);
    assertEquals(Math.sqrt(25e-14), bench.spread(MAGNETIC_NOISE, 0).orElseThrow().rms(), 1e-20);
    assertEquals(5e-7, bench.magneticNoise().orElseThrow().tesla(), 1e-20);
    assertEquals(0.5, bench.electricField().orElseThrow().voltsPerMetre());
    assertFalse(bench.spread(INTENSITY_NOISE, 0).orElseThrow().isGaussian());
    assertEquals(0.3, bench.spread(INTENSITY_NOISE, 1).orElseThrow().rms());
    assertTrue(bench.spread(DRIFT, 0).orElseThrow().isGaussian());
    assertEquals(Optional.empty(), bench.spread(DRIFT, 2));
    assertEquals(Optional.empty(), Bench.unknown().spread(DRIFT, 0));
    for (BenchValue value : List.of(TEMPERATURE, LINEWIDTH, FREQUENCY_NOISE_DENSITY)) {
      assertTrue(refused(() -> bench.spread(value, 0)).contains("no spread"));
    }
  }

  @Test
  void listsTheRootMeanSquaresOfSamplesToo() {
    assertEquals(
        List.of(kilohertz(1), hertz(500)),
        full().withDriftSamples(1, hertz(500)).drifts().orElseThrow());
    assertEquals(
        List.of(0.02),
        Bench.unknown().withIntensitySamples(0, -0.02).intensityNoise().orElseThrow());
    // of step 1 nothing is known, so there is no list of one per step
    assertEquals(Optional.empty(), Bench.unknown().withDriftSamples(1, hertz(5)).drifts());
    assertEquals(
        List.of(hertz(1), hertz(2)),
        full().withDriftSamples(1, hertz(5)).withDrifts(hertz(1), hertz(2)).drifts().orElseThrow());
  }

  @Test
  void refusesSamplesOutOfRange() {
    refused(() -> full().withIntensitySamples(0));
    refused(() -> full().withMagneticSamples());
    assertTrue(refused(() -> full().withIntensitySamples(0, -1.01)).contains("-1.01"));
    assertTrue(refused(() -> full().withIntensitySamples(0, 0.7, -0.7)).contains("0.5"));
    refused(() -> full().withIntensitySamples(0, Double.NaN));
    assertTrue(
        refused(() -> full().withElectricSamples(ElectricField.ofVoltsPerMetre(-1)))
            .contains("at least zero"));
  }

  @Test
  void refusesNumbersOutOfRange() {
    Bench none = Bench.unknown();
    refused(() -> none.withTemperature(Temperature.kelvin(0)));
    refused(() -> none.withTrapFrequencies(hertz(1), hertz(0), hertz(1)));
    refused(() -> none.withMagneticNoise(MagneticField.milligauss(-1)));
    refused(() -> none.withLinewidths(hertz(1), hertz(-1)));
    refused(() -> none.withPointing(Length.micrometres(-1)));
    refused(() -> none.withFrequencyError(hertz(-1)));
    for (double ratio : new double[] {-0.01, 0.51, Double.NaN}) {
      refused(() -> none.withIntensityNoise(0.1, ratio));
      refused(() -> none.withPolarizationImpurity(ratio));
      refused(() -> none.withLengthError(ratio));
      refused(() -> none.withTrapIntensityNoise(ratio));
      refused(() -> none.withPreparationError(ratio));
      refused(() -> none.withDetectionError(ratio));
    }
    refused(none::withLinewidths);
    refused(() -> none.withIntensityNoise(0, 0, 0, 0));
  }

  @ParameterizedTest
  @EnumSource(BenchValue.class)
  void refusesIndexesThatNoNumberHas(BenchValue value) {
    int beyond = value.arity() == BenchValue.Arity.ONE ? 1 : 3;
    for (int index : new int[] {-1, beyond}) {
      assertTrue(refused(() -> full().value(value, index)).contains(value.words()));
      refused(() -> full().relativeUncertainty(value, index));
      refused(() -> full().scaled(value, index, 1));
      refused(() -> full().knownTo(value, index, 0.1));
      refused(() -> new BenchEntry(value, index));
    }
    refused(() -> full().withDriftSamples(3, hertz(1)));
    refused(() -> full().withIntensityNoiseDensity(-1, DENSITY));
  }

  @Test
  void refusesListsThatDoNotFitTheDrive() {
    full().requireSteps(2);
    assertTrue(refused(() -> full().requireSteps(1)).contains("1 steps"));
    assertTrue(refused(() -> full().requireSteps(3)).contains("3 steps"));
    Bench sampled = Bench.unknown().withDriftSamples(1, hertz(1));
    sampled.requireSteps(2);
    assertTrue(refused(() -> sampled.requireSteps(1)).contains("drift, step 2"));
    Bench spectral = Bench.unknown().withIntensityNoiseDensity(2, DENSITY);
    assertTrue(refused(() -> spectral.requireSteps(2)).contains("density, step 3"));
  }

  @Test
  void countsNoWhiteNoiseTwice() {
    String message = refused(() -> full().withFrequencyNoiseDensity(1, DENSITY).requireSteps(2));
    assertTrue(message.contains("laser 2 has a linewidth of 300 Hz and"), message);
  }

  @Test
  void namesItsNumbers() {
    assertEquals("linewidth, step 2", new BenchEntry(LINEWIDTH, 1).name());
    assertEquals("trap frequency, z", new BenchEntry(TRAP_FREQUENCY, 2).name());
    assertEquals("temperature", new BenchEntry(TEMPERATURE, 0).name());
    assertEquals("trap_frequency", TRAP_FREQUENCY.key());
  }

  @Test
  void letsTheAtomFlyOnlyWhenTold() {
    assertFalse(full().movesDuringPulse());
    assertTrue(full().withMotionDuringPulse().withLengthError(0).movesDuringPulse());
  }

  @Test
  void hasOneDisturbancePerStepOrOneInAll() {
    Set<Disturbance> all = Disturbance.all(2);
    long perStep = Stream.of(Disturbance.Kind.values()).filter(Disturbance.Kind::isPerStep).count();
    assertEquals(Disturbance.Kind.values().length + perStep, all.size());
    assertTrue(all.contains(new Disturbance(Disturbance.Kind.DRIFT, 1)));
    assertFalse(all.contains(new Disturbance(Disturbance.Kind.DRIFT, 2)));
    refused(() -> new Disturbance(Disturbance.Kind.DRIFT, -1));
    refused(() -> new Disturbance(Disturbance.Kind.DOPPLER, 0));
    refused(() -> new Disturbance(Disturbance.Kind.DOPPLER, -5));
    refused(() -> new Disturbance(null, -1));
    refused(() -> Disturbance.all(0));
  }
}
