package org.toprung.budget.report;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import org.junit.jupiter.api.Test;
import org.toprung.budget.CauseEntry;
import org.toprung.budget.Check;
import org.toprung.budget.ReferenceScenario;

class TextReportTest {

  @Test
  void fitsAHundredColumnsWhateverTheScenario() {
    for (ReportContent content :
        List.of(SampleReport.reference(), SampleReport.wide(), SampleReport.shaped())) {
      for (String line : TextReport.render(content).lines().toList()) {
        assertTrue(line.codePointCount(0, line.length()) <= 100, line);
        assertEquals(line.stripTrailing(), line);
      }
    }
  }

  @Test
  void tellsEveryCauseAndEveryWarning() {
    ReportContent content = SampleReport.of(ReferenceScenario.with("1.2 GHz", "80 MHz"));
    String text = TextReport.render(content).replaceAll("\\s+", " ");
    for (CauseEntry cause : content.budget().causes()) {
      assertTrue(text.contains(cause.cause()), cause.cause());
    }
    assertFalse(content.budget().drive().warnings().isEmpty());
    assertTrue(text.contains("nearly resonant"), text);
  }

  @Test
  void listsWhatIsNotAssessed() {
    ReportContent content = SampleReport.wide();
    assertTrue(content.budget().notAssessed().size() > 5);
    String joined = TextReport.render(content).replaceAll("\\s+", " ");
    for (String cause : content.budget().notAssessed()) {
      assertTrue(joined.contains(cause), cause);
    }
  }

  @Test
  void neverHidesADisagreement() {
    ReportContent sample = SampleReport.reference();
    Check bad = new Check(0.5, 0.001, false, 40, 1, List.of());
    String text = TextReport.render(new ReportContent("title", sample.budget(), bad));
    assertTrue(text.contains("DISAGREES"), text);
    assertTrue(text.contains("the simulation disagrees"), text);
  }

  @Test
  void saysFirstHowLargeTheErrorIsAndWhatCausesIt() {
    ReportContent content = SampleReport.reference();
    List<String> lines = TextReport.render(content).lines().toList();
    double percent = 100 * content.budget().total();
    String error = lines.stream().filter(l -> l.contains("error of one pulse")).findFirst().get();
    double shown = Double.parseDouble(error.substring(error.indexOf('(') + 1, error.indexOf('±')));
    assertEquals(percent, shown, 100 * content.budget().uncertainty());
    assertTrue(lines.indexOf(error) < 5, error);
    String cause = lines.stream().filter(l -> l.contains("largest cause")).findFirst().get();
    assertTrue(cause.contains(content.budget().causes().get(0).cause()), cause);
  }

  @Test
  void sharesAddUpToOne() {
    ReportContent content = SampleReport.reference();
    double sum =
        content.budget().causes().stream().mapToDouble(c -> content.share(c.error())).sum();
    assertEquals(1, sum, 1e-12);
  }

  @Test
  void cautionsThatFiguresAreEstimates() {
    assertTrue(TextReport.render(SampleReport.reference()).contains("confirmed on the apparatus"));
  }

  /** exp(−(5/20)²) = 0.939 of the field is left at a quarter of the waist. */
  @Test
  void tellsShapeAndPlaceOfBeamsAndTheElectricField() {
    String joined = TextReport.render(SampleReport.shaped()).replaceAll("\\s+", " ");
    for (String part :
        List.of(
            "2 mW, waists 20 um along (0, 1, 0) and 30 um, sigma+ with 0.2 % orthogonal to it at 45 deg",
            "focus at (0, 5, 0) um from the atom, 93.9 % of the peak field there",
            "flat top of 15 kW/cm2, sigma-, along (0, 0, -1)",
            "electric field (0, 0, 5) V/m, shifts the target by -",
            "recoil shift +",
            "15 kW/cm2 of unknown power")) {
      assertTrue(joined.contains(part), part + " in " + joined);
    }
    String plain = TextReport.render(SampleReport.reference());
    assertFalse(plain.contains("focus at") || plain.contains("orthogonal"), plain);
  }
}
