package org.toprung.budget.report;

import java.util.LinkedHashMap;
import java.util.Map;
import java.util.Optional;
import org.toprung.budget.Budget;
import org.toprung.budget.bench.Bench;
import org.toprung.budget.bench.BenchEntry;
import org.toprung.budget.bench.BenchValue;
import org.toprung.budget.bench.NoiseDensity;
import org.toprung.core.drive.Drive;
import org.toprung.core.quantity.ElectricField;
import org.toprung.core.quantity.Frequency;
import org.toprung.core.quantity.Length;
import org.toprung.core.quantity.MagneticField;
import org.toprung.core.quantity.Temperature;

/** What a budget was computed for, setting by setting in words, to be compared. */
final class Settings {
  private Settings() {}

  /** Name of a setting → its value, in the order of a scenario. */
  static Map<String, String> of(Budget budget) {
    Map<String, String> settings = new LinkedHashMap<>();
    Drive drive = budget.drive();
    settings.put("ladder", drive.toString());
    settings.put("magnetic field", drive.field().toString());
    settings.put("electric field", Figures.vector(drive.electricFieldVoltsPerMetre()) + " V/m");
    for (int k = 0; k < drive.steps().size(); k++) {
      if (k < drive.intermediates().size()) {
        settings.put("detuning, step " + (k + 1), Figures.signed(drive.detuning(k)));
      }
      settings.put("beam, step " + (k + 1), BeamText.of(drive.steps().get(k)));
    }
    drive
        .trap()
        .ifPresent(
            trap ->
                settings.put(
                    "trap light",
                    Figures.nanometres(trap.wavelength())
                        + ", shifts start by "
                        + Figures.signed(trap.startShift())));
    drive.idle().ifPresent(idle -> settings.put("idle state", idle.sublevel().toString()));
    settings.put("pulse", budget.pulse().toString());
    Bench bench = budget.bench();
    bench.entries().forEach(entry -> settings.put(entry.name(), shown(bench, entry)));
    settings.put("motion during the pulse", bench.movesDuringPulse() ? "yes" : "no");
    return settings;
  }

  private static String shown(Bench bench, BenchEntry entry) {
    Optional<NoiseDensity> density = density(bench, entry);
    if (density.isPresent()) {
      return String.format(
          java.util.Locale.ROOT,
          "density of rms %s from %s to %s",
          shown(density.get().rms(), rmsUnit(entry.value())),
          Figures.of(Frequency.ofHertz(density.get().lowestHertz())),
          Figures.of(Frequency.ofHertz(density.get().highestHertz())));
    }
    double value = bench.value(entry.value(), entry.index()).orElseThrow();
    double relative = bench.relativeUncertainty(entry.value(), entry.index());
    return shown(value, entry.value().unit())
        + (relative > 0 ? " ± " + Figures.percent(relative) : "");
  }

  private static Optional<NoiseDensity> density(Bench bench, BenchEntry entry) {
    return switch (entry.value()) {
      case FREQUENCY_NOISE_DENSITY -> bench.frequencyNoiseDensity(entry.index());
      case INTENSITY_NOISE_DENSITY -> bench.intensityNoiseDensity(entry.index());
      default -> Optional.empty();
    };
  }

  private static String rmsUnit(BenchValue density) {
    return density == BenchValue.FREQUENCY_NOISE_DENSITY ? "Hz" : "";
  }

  private static String shown(double value, String unit) {
    double v = Figures.rounded(value);
    return switch (unit) {
      case "K" -> Temperature.ofKelvin(v).toString();
      case "Hz" -> Frequency.ofHertz(v).toString();
      case "T" -> MagneticField.ofTesla(v).toString();
      case "V/m" -> ElectricField.ofVoltsPerMetre(v).toString();
      case "m" -> Length.ofMetres(v).toString();
      default -> Figures.number(v, 4) + (unit.isEmpty() ? "" : " " + unit);
    };
  }
}
