package org.toprung.budget.report;

import org.toprung.budget.Budget;
import org.toprung.budget.ReferenceScenario;
import org.toprung.budget.scenario.Scenario;

/** Contents for the tests of the reports. */
final class SampleReport {
  private SampleReport() {}

  static ReportContent of(String scenarioText) {
    Scenario s = Scenario.parse(scenarioText, "sample.toml");
    Budget budget = s.budget();
    return new ReportContent(s.title(), budget, budget.check(40, 1));
  }

  static ReportContent reference() {
    return of(ReferenceScenario.text());
  }

  /** A drive with several targets, vectors as polarizations, a long title and no bench. */
  static ReportContent wide() {
    String text =
        ReferenceScenario.text()
            .replace("Rubidium reference drive", "A title that never seems to end, ".repeat(8))
            .replace("\"sigma+\" ", "[[0.6, 0.1], [0.2, 0.3], [0, 0]] ")
            .replace("\"sigma-\"\n", "[0.123456789, 0.987654321, 0]\n");
    return of(text.substring(0, text.indexOf("[bench]")));
  }

  /** Beams of other shapes than the round one in its focus, and an electric field. */
  static ReportContent shaped() {
    return of(
        ReferenceScenario.text()
            .replace(
                "magnetic = \"4 G\"",
                "electric = [\"0 V/m\", \"0 V/m\", \"5 V/m\"]\nmagnetic = \"4 G\"")
            .replace(
                "waist = \"20 um\"",
                "waist = [\"20 um\", \"30 um\"]\nwaist_axis = [0, 1, 0]\n"
                    + "offset = [\"0 um\", \"5 um\", \"0 um\"]\nimpurity = 0.002\nimpurity_phase_deg = 45")
            .replace("power = \"150 mW\"", "intensity = \"15 kW/cm2\"")
            .replace("waist = \"25 um\"\n", ""));
  }
}
