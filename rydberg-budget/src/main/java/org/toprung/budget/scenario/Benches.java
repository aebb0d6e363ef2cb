package org.toprung.budget.scenario;

import java.util.List;
import java.util.Optional;
import java.util.function.BiFunction;
import java.util.function.Function;
import org.toprung.budget.bench.Bench;
import org.toprung.core.quantity.ElectricField;
import org.toprung.core.quantity.Frequency;
import org.toprung.core.quantity.MagneticField;
import org.toprung.core.quantity.Temperature;

/** Reads the bench; every value may be left out, and is then not assessed. */
final class Benches {
  static final List<String> KEYS =
      List.of(
          "temperature",
          "trap_frequency",
          "environment_temperature",
          "magnetic_noise",
          "electric_field",
          "linewidth",
          "drift",
          "intensity_noise");

  private final Table table;
  private final int steps;
  private Bench bench = Bench.unknown();

  private Benches(Table table, int steps) {
    this.table = table;
    this.steps = steps;
  }

  static Bench read(Optional<Table> table, int steps) {
    return table.map(t -> new Benches(t, steps).read()).orElse(Bench.unknown());
  }

  private Bench read() {
    one("temperature", Temperature::parse, "10 uK", Bench::withTemperature);
    frequencies("trap_frequency", 3, "along x, y and z", "80 kHz")
        .ifPresent(
            f ->
                bench =
                    guarded("trap_frequency", () -> bench.withTrapFrequencies(f[0], f[1], f[2])));
    one("environment_temperature", Temperature::parse, "300 K", Bench::withEnvironment);
    one("magnetic_noise", MagneticField::parse, "2 mG", Bench::withMagneticNoise);
    one("electric_field", ElectricField::parse, "5 mV/cm", Bench::withElectricField);
    frequencies("linewidth", steps, "one per step", "500 Hz")
        .ifPresent(f -> bench = guarded("linewidth", () -> bench.withLinewidths(f)));
    frequencies("drift", steps, "one per step", "2 kHz")
        .ifPresent(f -> bench = guarded("drift", () -> bench.withDrifts(f)));
    table
        .optional("intensity_noise")
        .ifPresent(
            v -> {
              String allowed = "a list of " + steps + " numbers from 0 to 0.5, one per step";
              double[] rms =
                  v.items(steps, allowed).stream()
                      .mapToDouble(i -> i.number("a number from 0 to 0.5"))
                      .toArray();
              bench = v.guarded(() -> bench.withIntensityNoise(rms));
            });
    return bench;
  }

  private <T> void one(
      String key, Function<String, T> parser, String example, BiFunction<Bench, T, Bench> setter) {
    table
        .optional(key)
        .ifPresent(
            v -> {
              T quantity = v.parsed(parser, example);
              bench = v.guarded(() -> setter.apply(bench, quantity));
            });
  }

  private Optional<Frequency[]> frequencies(String key, int count, String which, String example) {
    return table
        .optional(key)
        .map(
            v ->
                v
                    .items(
                        count,
                        "a list of " + count + " texts such as \"" + example + "\", " + which)
                    .stream()
                    .map(i -> i.parsed(Frequency::parse, example))
                    .toArray(Frequency[]::new));
  }

  private Bench guarded(String key, java.util.function.Supplier<Bench> action) {
    return table.optional(key).orElseThrow().guarded(action);
  }
}
