package org.toprung.budget.report;

import static org.toprung.core.quantity.Temperature.kelvin;
import static org.toprung.core.quantity.Temperature.microkelvin;

import java.util.List;
import java.util.stream.Collectors;
import java.util.stream.Stream;
import org.toprung.budget.Budget;
import org.toprung.budget.CauseCheck;
import org.toprung.budget.Check;
import org.toprung.budget.ReferenceScenario;
import org.toprung.budget.TestDrives;
import org.toprung.budget.bench.Bench;
import org.toprung.budget.bench.BenchValue;
import org.toprung.budget.bench.NoiseDensity;
import org.toprung.budget.pulse.Pulse;
import org.toprung.budget.scenario.Scenario;

/** Contents for the tests of the reports; computed once, since a budget takes its time. */
final class SampleReport {
  static final NoiseDensity FREQUENCY_NOISE =
      NoiseDensity.of(new double[] {1e3, 1e5, 4e5, 6e5, 1e7}, new double[] {900, 60, 3e3, 60, 40});
  static final NoiseDensity INTENSITY_NOISE =
      NoiseDensity.of(new double[] {1e2, 1e6}, new double[] {1e-9, 1e-12});

  private static final ReportContent REFERENCE = of(ReferenceScenario.text());
  private static final ReportContent WIDE = of(wideScenario());
  private static final ReportContent SHAPED = of(shapedScenario());
  private static final ReportContent NOISY = noisyPulse();

  private SampleReport() {}

  static ReportContent of(String scenarioText) {
    Scenario s = Scenario.parse(scenarioText, "sample.toml");
    Budget budget = s.budget();
    return new ReportContent(s.title(), budget, budget.check(40, 1));
  }

  static ReportContent reference() {
    return REFERENCE;
  }

  /** A drive with several targets, vectors as polarizations, a long title and no bench. */
  static ReportContent wide() {
    return WIDE;
  }

  /** Beams of other shapes than the round one in its focus, and an electric field. */
  static ReportContent shaped() {
    return SHAPED;
  }

  /** A smooth pulse off resonance on a bench with spectra and stated uncertainties. */
  static ReportContent noisy() {
    return NOISY;
  }

  static List<ReportContent> all() {
    return List.of(REFERENCE, WIDE, SHAPED, NOISY);
  }

  /** The same budget with a check that objects to the total, to causes of these names, or not. */
  static ReportContent checked(ReportContent content, boolean agrees, String... objections) {
    List<CauseCheck> causes =
        Stream.concat(
                content.budget().causes().stream().map(c -> c.cause()),
                Stream.of("Undisturbed pulse"))
            .map(c -> checked(content.budget(), c, List.of(objections).contains(c)))
            .collect(Collectors.toList());
    double total = content.budget().total() * (agrees ? 1.01 : 2);
    return with(content, new Check(total, 0.01 * total, agrees, 400, 3, causes));
  }

  private static CauseCheck checked(Budget budget, String cause, boolean objects) {
    double composed =
        budget.causes().stream()
            .filter(c -> c.cause().equals(cause))
            .mapToDouble(c -> c.error())
            .sum();
    double simulated = objects ? composed + 0.3 * budget.total() : composed;
    return new CauseCheck(cause, composed, simulated, 0.01 * budget.total(), !objects);
  }

  static ReportContent with(ReportContent content, Check check) {
    return new ReportContent(content.title(), content.budget(), check, content.sensitivities());
  }

  private static ReportContent noisyPulse() {
    Bench bench =
        Bench.unknown()
            .withTemperature(microkelvin(10))
            .withEnvironment(kelvin(300))
            .withFrequencyNoiseDensity(0, FREQUENCY_NOISE)
            .withIntensityNoiseDensity(1, INTENSITY_NOISE)
            .knownTo(BenchValue.TEMPERATURE, 0, 0.3);
    Budget budget =
        Budget.of(TestDrives.rubidium().resolve(), Pulse.gaussian(Math.PI)).on(bench).compose();
    return checked(
        new ReportContent("Noisy", budget, new Check(0.01, 0.001, true, 40, 1, List.of())), true);
  }

  private static String wideScenario() {
    String text =
        ReferenceScenario.text()
            .replace("Rubidium reference drive", "A title that never seems to end, ".repeat(8))
            .replace("\"sigma+\" ", "[[0.6, 0.1], [0.2, 0.3], [0, 0]] ")
            .replace("\"sigma-\"\n", "[0.123456789, 0.987654321, 0]\n");
    return text.substring(0, text.indexOf("[bench]"));
  }

  private static String shapedScenario() {
    return ReferenceScenario.text()
        .replace(
            "magnetic = \"4 G\"",
            "electric = [\"0 V/m\", \"0 V/m\", \"5 V/m\"]\nmagnetic = \"4 G\"")
        .replace(
            "waist = \"20 um\"",
            "waist = [\"20 um\", \"30 um\"]\nwaist_axis = [0, 1, 0]\n"
                + "offset = [\"0 um\", \"5 um\", \"0 um\"]\nimpurity = 0.002\nimpurity_phase_deg = 45")
        .replace("power = \"150 mW\"", "intensity = \"15 kW/cm2\"")
        .replace("waist = \"25 um\"\n", "");
  }
}
