package org.toprung.budget.report;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import org.junit.jupiter.api.Test;
import org.toprung.budget.Budget;
import org.toprung.budget.ReferenceScenario;
import org.toprung.budget.scenario.Scenario;

class ComparisonReportTest {
  private static final Budget BEFORE = SampleReport.reference().budget();

  private static ComparedBudget with(String old, String instead) {
    Scenario scenario = Scenario.parse(ReferenceScenario.with(old, instead), "after.toml");
    return new ComparedBudget("After", scenario.budget());
  }

  private static String compared(ComparedBudget after) {
    return ComparisonReport.between(new ComparedBudget("Before", BEFORE), after).text();
  }

  private static List<String> section(String text, String heading) {
    List<String> lines = text.lines().toList();
    int from = 0;
    while (!lines.get(from).startsWith(heading)) {
      from++;
    }
    int to = from + 1;
    while (to < lines.size() && lines.get(to).startsWith(" ")) {
      to++;
    }
    return lines.subList(from + 1, to);
  }

  /**
   * Four times the temperature is four times the squared Doppler shift: nothing else moves much.
   */
  @Test
  void tellsWhichCauseMovedFirst() {
    String text = compared(with("\"10 uK\"", "\"40 uK\""));
    List<String> moves = section(text, "Causes that moved");
    assertTrue(moves.get(1).startsWith("  Doppler shift"), text);
    String[] cells = moves.get(1).strip().split(" {2,}");
    double factor = Double.parseDouble(cells[cells.length - 1].replace("times ", ""));
    // the zero-point motion of the trap does not grow
    assertTrue(factor > 3.5 && factor < 4.01, moves.get(1));
    assertTrue(text.contains("the total                 rises by"), text);
    List<String> settings = section(text, "Settings that differ");
    assertEquals(2, settings.size(), text);
    assertTrue(settings.get(0).matches(" +temperature +10 uK"), settings.get(0));
    assertTrue(settings.get(1).matches(" +-> 40 uK"), settings.get(1));
  }

  @Test
  void tellsWhichCausesAreAssessedInOneBudgetOnly() {
    String text = compared(with("magnetic_noise", "# magnetic_noise"));
    assertTrue(text.contains("not assessed"), text);
    assertTrue(text.contains("not given"), text);
  }

  @Test
  void findsNoDifferenceBetweenTwins() {
    String text = compared(new ComparedBudget("Twin", BEFORE));
    assertTrue(text.contains("did not change"), text);
    assertEquals(List.of("  - None."), section(text, "Settings that differ"));
    assertEquals(1, section(text, "Causes").stream().filter(l -> l.contains("TOTAL")).count());
    for (var cause : BEFORE.causes()) {
      assertTrue(text.replaceAll("\\s+", " ").contains(cause.cause()), cause.cause());
    }
  }

  @Test
  void fitsThePageAndSaysTheSameInMarkdown() {
    ComparisonReport report =
        ComparisonReport.between(
            new ComparedBudget("A title that never seems to end, ".repeat(8), BEFORE),
            new ComparedBudget("Noisy | *", SampleReport.noisy().budget()));
    for (String line : report.text().lines().toList()) {
      assertTrue(line.codePointCount(0, line.length()) <= Page.WIDTH, line);
    }
    assertTrue(report.text().contains("Gaussian"), report.text());
    assertTrue(report.text().contains("density of rms"), report.text());
    assertTrue(report.markdown().contains("Noisy \\| \\*"), report.markdown());
    assertTrue(report.markdown().contains("| TOTAL |"), report.markdown());
    assertFalse(report.text().contains("beware"), report.text());
  }

  @Test
  void refusesMissingParts() {
    assertThrows(IllegalArgumentException.class, () -> new ComparedBudget(null, BEFORE));
    assertThrows(IllegalArgumentException.class, () -> new ComparedBudget("title", null));
  }
}
