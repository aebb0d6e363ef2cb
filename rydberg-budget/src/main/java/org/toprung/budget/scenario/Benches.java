package org.toprung.budget.scenario;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.function.BiFunction;
import java.util.function.Function;
import java.util.function.ToDoubleFunction;
import java.util.stream.Stream;
import org.toprung.budget.bench.Bench;
import org.toprung.budget.bench.BenchValue;
import org.toprung.budget.bench.NoiseDensity;
import org.toprung.core.quantity.ElectricField;
import org.toprung.core.quantity.Frequency;
import org.toprung.core.quantity.Length;
import org.toprung.core.quantity.MagneticField;
import org.toprung.core.quantity.Temperature;

/** Reads the bench; every value may be left out, and is then not assessed. */
final class Benches {
  private static final String NONE = "none";
  private static final String MOTION = "motion_during_pulse";
  private static final List<BenchValue> SAMPLED =
      List.of(
          BenchValue.MAGNETIC_NOISE,
          BenchValue.ELECTRIC_FIELD,
          BenchValue.DRIFT,
          BenchValue.INTENSITY_NOISE);

  static final List<String> KEYS =
      Stream.of(
              Stream.of(BenchValue.values()).map(BenchValue::key),
              SAMPLED.stream().map(Benches::samplesKey),
              Stream.of(MOTION))
          .flatMap(keys -> keys)
          .toList();

  /**
   * How the numbers of one kind are read.
   *
   * @param reader reads one of them
   * @param si size of one of them; any unit, as only ratios are taken
   * @param setter puts all of them on a bench
   * @param example what one looks like, for messages
   */
  private record Kind<Q>(
      BenchValue value,
      Function<Value, Stated<Q>> reader,
      ToDoubleFunction<Q> si,
      BiFunction<Bench, List<Q>, Bench> setter,
      String example) {}

  private final Sources sources;
  private final Table table;
  private final int steps;
  private Bench bench = Bench.unknown();

  private Benches(Sources sources, Table table, int steps) {
    this.sources = sources;
    this.table = table;
    this.steps = steps;
  }

  static Bench read(Sources sources, Optional<Table> table, int steps) {
    return table.map(t -> new Benches(sources, t, steps).read()).orElse(Bench.unknown());
  }

  private Bench read() {
    for (BenchValue value : BenchValue.values()) {
      table.optional(value.key()).ifPresent(v -> read(value, v));
    }
    for (BenchValue value : SAMPLED) {
      table.optional(samplesKey(value)).ifPresent(v -> readSamples(value, v));
    }
    table
        .optional(MOTION)
        .filter(Value::flag)
        .ifPresent(v -> bench = bench.withMotionDuringPulse());
    return bench;
  }

  private void read(BenchValue value, Value v) {
    switch (value) {
      case TEMPERATURE -> temperature(value, v, "10 uK", Bench::withTemperature);
      case ENVIRONMENT_TEMPERATURE -> temperature(value, v, "300 K", Bench::withEnvironment);
      case TRAP_FREQUENCY ->
          frequencies(
              value, v, "80 kHz", (b, f) -> b.withTrapFrequencies(f.get(0), f.get(1), f.get(2)));
      case LINEWIDTH ->
          frequencies(value, v, "500 Hz", (b, f) -> b.withLinewidths(f.toArray(Frequency[]::new)));
      case DRIFT ->
          frequencies(value, v, "2 kHz", (b, f) -> b.withDrifts(f.toArray(Frequency[]::new)));
      case FREQUENCY_ERROR ->
          frequencies(value, v, "2 kHz", (b, f) -> b.withFrequencyError(f.get(0)));
      case MAGNETIC_NOISE ->
          read(
              new Kind<>(
                  value,
                  i -> Stated.quantity(i, MagneticField::parse, "2 mG"),
                  MagneticField::tesla,
                  (b, m) -> b.withMagneticNoise(m.get(0)),
                  "2 mG"),
              v);
      case ELECTRIC_FIELD ->
          read(
              new Kind<>(
                  value,
                  i -> Stated.quantity(i, ElectricField::parse, "5 mV/cm"),
                  ElectricField::voltsPerMetre,
                  (b, e) -> b.withElectricField(e.get(0)),
                  "5 mV/cm"),
              v);
      case POINTING ->
          read(
              new Kind<>(
                  value,
                  i -> Stated.quantity(i, Length::parse, "0.5 um"),
                  Length::metres,
                  (b, p) -> b.withPointing(p.toArray(Length[]::new)),
                  "0.5 um"),
              v);
      case INTENSITY_NOISE -> ratios(value, v, Bench::withIntensityNoise);
      case POLARIZATION_IMPURITY -> ratios(value, v, Bench::withPolarizationImpurity);
      case LENGTH_ERROR -> ratios(value, v, (b, r) -> b.withLengthError(r[0]));
      case TRAP_INTENSITY_NOISE -> ratios(value, v, (b, r) -> b.withTrapIntensityNoise(r[0]));
      case PREPARATION_ERROR -> ratios(value, v, (b, r) -> b.withPreparationError(r[0]));
      case DETECTION_ERROR -> ratios(value, v, (b, r) -> b.withDetectionError(r[0]));
      case FREQUENCY_NOISE_DENSITY, INTENSITY_NOISE_DENSITY -> densities(value, v);
    }
  }

  private void temperature(
      BenchValue value, Value v, String example, BiFunction<Bench, Temperature, Bench> setter) {
    read(
        new Kind<>(
            value,
            i -> Stated.quantity(i, Temperature::parse, example),
            Temperature::kelvin,
            (b, t) -> setter.apply(b, t.get(0)),
            example),
        v);
  }

  private void frequencies(
      BenchValue value, Value v, String example, BiFunction<Bench, List<Frequency>, Bench> setter) {
    read(
        new Kind<>(
            value,
            i -> Stated.quantity(i, Frequency::parse, example),
            Frequency::hertz,
            setter,
            example),
        v);
  }

  private void ratios(BenchValue value, Value v, BiFunction<Bench, double[], Bench> setter) {
    read(
        new Kind<Double>(
            value,
            Stated::ratio,
            Double::doubleValue,
            (b, r) -> setter.apply(b, r.stream().mapToDouble(Double::doubleValue).toArray()),
            ""),
        v);
  }

  private <Q> void read(Kind<Q> kind, Value v) {
    List<Value> items = items(kind.value(), v, kind.example());
    List<Stated<Q>> stated = new ArrayList<>();
    for (Value item : items) {
      Stated<Q> one = kind.reader().apply(item);
      // all of them like this one: so that the item is blamed and not the list
      List<Q> alike = items.stream().map(i -> one.quantity()).toList();
      item.guarded(() -> kind.setter().apply(Bench.unknown(), alike));
      stated.add(one);
    }
    List<Q> quantities = stated.stream().map(Stated::quantity).toList();
    bench = v.guarded(() -> kind.setter().apply(bench, quantities));
    for (int i = 0; i < items.size(); i++) {
      Optional<Q> uncertainty = stated.get(i).uncertainty();
      if (uncertainty.isPresent()) {
        int index = i;
        double size = Math.abs(kind.si().applyAsDouble(quantities.get(i)));
        double spread = kind.si().applyAsDouble(uncertainty.get());
        double relative = spread == 0 ? 0 : size == 0 ? 1 : spread / size;
        bench = items.get(i).guarded(() -> bench.knownTo(kind.value(), index, relative));
      }
    }
  }

  private List<Value> items(BenchValue value, Value v, String example) {
    String what = example.isEmpty() ? "numbers from 0 to 0.5" : "texts such as \"" + example + "\"";
    return switch (value.arity()) {
      case ONE -> List.of(v);
      case AXES -> v.items(3, "a list of 3 " + what + ", along x, y and z");
      case STEPS -> v.items(steps, "a list of " + steps + " " + what + ", one per step");
    };
  }

  private List<Value> files(Value v) {
    return v.items(
        steps, "a list of " + steps + " names of files, or \"" + NONE + "\", one per step");
  }

  private static boolean isNone(Value item) {
    return item.isText() && item.text("").equals(NONE);
  }

  private void densities(BenchValue value, Value v) {
    List<Value> items = files(v);
    for (int k = 0; k < items.size(); k++) {
      Value item = items.get(k);
      if (isNone(item)) {
        continue;
      }
      int step = k;
      String square = value == BenchValue.FREQUENCY_NOISE_DENSITY ? "Hz2/Hz" : "1/Hz";
      NoiseDensity density =
          DataFile.named(item, sources, "two columns, Hz and " + square).density();
      bench =
          item.guarded(
              () -> {
                Bench noisy =
                    value == BenchValue.FREQUENCY_NOISE_DENSITY
                        ? bench.withFrequencyNoiseDensity(step, density)
                        : bench.withIntensityNoiseDensity(step, density);
                noisy.requireSteps(steps); // a linewidth beside it counts twice
                return noisy;
              });
    }
  }

  private static String samplesKey(BenchValue value) {
    return value.key() + "_samples";
  }

  private void readSamples(BenchValue value, Value v) {
    List<Value> items = value.arity() == BenchValue.Arity.ONE ? List.of(v) : files(v);
    for (int k = 0; k < items.size(); k++) {
      Value item = items.get(k);
      if (value.arity() == BenchValue.Arity.ONE || !isNone(item)) {
        if (bench.value(value, k).orElse(0) > 0) {
          throw item.refused(
              value.key() + " or its samples, not both (in a list, 0 or \"" + NONE + "\")");
        }
        int step = k;
        DataFile data = DataFile.named(item, sources, "samples, one per line");
        bench = item.guarded(() -> sampled(value, step, data));
      }
    }
  }

  private Bench sampled(BenchValue value, int step, DataFile data) {
    switch (value) {
      case MAGNETIC_NOISE:
        return bench.withMagneticSamples(
            data.lines(MagneticField::parse).toArray(MagneticField[]::new));
      case ELECTRIC_FIELD:
        return bench.withElectricSamples(data.lines(Benches::length).toArray(ElectricField[]::new));
      case DRIFT:
        return bench.withDriftSamples(step, data.lines(Frequency::parse).toArray(Frequency[]::new));
      default:
        return bench.withIntensitySamples(
            step, data.lines(Benches::relative).stream().mapToDouble(r -> r).toArray());
    }
  }

  private static ElectricField length(String text) {
    ElectricField length = ElectricField.parse(text);
    if (!(length.voltsPerMetre() >= 0)) {
      throw new IllegalArgumentException("allowed: a length of the field, at least zero");
    }
    return length;
  }

  private static double relative(String text) {
    double deviation = Stated.number(text);
    if (!(deviation >= -1)) {
      throw new IllegalArgumentException("allowed: a relative deviation, at least -1");
    }
    return deviation;
  }
}
