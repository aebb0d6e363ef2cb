package org.toprung.budget.report;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.toprung.budget.Budget;
import org.toprung.budget.CauseEntry;
import org.toprung.budget.Check;
import org.toprung.budget.ReferenceScenario;
import org.toprung.budget.Sensitivity;
import org.toprung.budget.TestDrives;
import org.toprung.budget.pulse.Pulse;
import org.toprung.core.quantity.Frequency;
import org.toprung.core.quantity.Time;

class TextReportTest {

  @Test
  void fitsAHundredColumnsWhateverTheScenario() {
    for (ReportContent content :
        Stream.concat(
                SampleReport.all().stream(),
                SampleReport.all().stream()
                    .map(c -> SampleReport.checked(c, false, "Doppler shift", "Undisturbed pulse")))
            .toList()) {
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
    String text = TextReport.render(SampleReport.with(sample, bad));
    assertTrue(text.contains("DISAGREES"), text);
    assertTrue(text.contains("the simulation disagrees"), text);
  }

  @Test
  void saysFirstHowLargeTheErrorIsAndWhatCausesIt() {
    ReportContent content = SampleReport.checked(SampleReport.reference(), true);
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

  private static List<String> headings(String text) {
    List<String> lines = text.lines().toList();
    return lines.stream()
        .filter(l -> !l.isEmpty() && !l.startsWith(" ") && !l.startsWith("="))
        .skip(1)
        .toList();
  }

  @Test
  void beginsWithWhatTheSimulationObjectsTo() {
    ReportContent sample = SampleReport.reference();
    for (ReportContent content :
        List.of(
            SampleReport.checked(sample, false),
            SampleReport.checked(sample, true, "Doppler shift"),
            SampleReport.checked(sample, false, "Doppler shift", "Electric field"))) {
      String text = TextReport.render(content);
      assertTrue(headings(text).get(0).startsWith("DISAGREEMENT"), text);
      String section = text.substring(text.indexOf("DISAGREEMENT"), text.indexOf("\nResult"));
      assertEquals(!content.check().agrees(), section.contains("  TOTAL "), section);
      content
          .check()
          .causes()
          .forEach(c -> assertEquals(!c.agrees(), section.contains(c.cause()), section));
      assertTrue(text.substring(text.indexOf("\nWARNINGS")).contains("disagrees"), text);
    }
    String text = TextReport.render(SampleReport.checked(sample, true));
    assertEquals("Result", headings(text).get(0));
    assertFalse(text.contains("DISAGREE"), text);
  }

  /** The rows of the table, read back, are the total but for the overlap that has its own row. */
  @Test
  void showsRowsThatAddUpToTheTotal() {
    ReportContent content = SampleReport.reference();
    List<String> lines = TextReport.render(content).lines().toList();
    int from = 0;
    while (!lines.get(from).startsWith("Error budget")) {
      from++;
    }
    double sum = 0;
    for (String line : lines.subList(from + 2, lines.size())) {
      if (line.startsWith("  TOTAL")) {
        double total = Double.parseDouble(line.strip().split(" +")[1]);
        assertEquals(total, sum, 0.006 * total);
        assertEquals(content.budget().total(), total, 0.006 * total);
        return;
      }
      Matcher error = Pattern.compile("-?\\d\\.\\d\\de-\\d\\d").matcher(line);
      sum += error.find() ? Double.parseDouble(error.group()) : 0;
    }
    throw new AssertionError("no total");
  }

  @Test
  void splitsTheUncertaintyIntoAtomAndBench() {
    String none = TextReport.render(SampleReport.reference());
    assertTrue(none.contains("none from bench values"), none);
    Budget budget = SampleReport.noisy().budget();
    assertTrue(budget.benchUncertainty() > 0);
    String text = TextReport.render(SampleReport.noisy());
    for (double part : List.of(budget.atomicUncertainty(), budget.benchUncertainty())) {
      assertTrue(text.contains(Figures.number(100 * part, 2) + " % from "), text);
    }
  }

  @Test
  void tellsWhereEveryLargeCauseGoes() {
    ReportContent content = SampleReport.reference();
    String joined = TextReport.render(content).replaceAll("\\s+", "");
    for (CauseEntry cause : content.budget().causes()) {
      if (content.share(cause.error()) > 0.01) {
        String where = cause.fate().kind().word() + ": " + cause.fate().place();
        assertTrue(joined.contains(where.replaceAll("\\s+", "")), where);
      }
    }
  }

  /** The best value is the first, and its row says which way to turn it. */
  @Test
  void ranksWhatToImprove() {
    ReportContent content = SampleReport.reference();
    Sensitivity best = content.sensitivities().get(0);
    List<String> lines = TextReport.render(content).lines().toList();
    int from = 0;
    while (!lines.get(from).startsWith("What to improve first")) {
      from++;
    }
    String row = lines.get(from + 2);
    assertTrue(row.startsWith("  " + best.value()), row);
    assertTrue(
        row.endsWith(best.savedByHalving() > best.savedByDoubling() ? "halve it" : "double it"),
        row);
    double total = content.budget().total();
    assertTrue(row.contains(Figures.probability(total - best.savedByHalving())), row);
    assertTrue(row.contains(Figures.probability(total - best.savedByDoubling())), row);
  }

  @Test
  void comparesEachCauseAloneOrSaysThatItWasNot() {
    ReportContent each = SampleReport.checked(SampleReport.reference(), true);
    String text = TextReport.render(each);
    assertTrue(text.contains("each cause alone  "), text);
    assertTrue(text.substring(text.indexOf("Check by")).contains("Doppler shift"), text);
    Check check = new Check(0.005, 1e-4, true, 40, 1, List.of());
    String total = TextReport.render(SampleReport.with(SampleReport.reference(), check));
    assertTrue(total.contains("not simulated"), total);
  }

  @Test
  void tellsWhatIsPlayed() {
    String plain = TextReport.render(SampleReport.reference());
    assertTrue(plain.contains("every beam at full field for the whole duration"), plain);
    String smooth = TextReport.render(SampleReport.noisy());
    assertTrue(smooth.contains("played from"), smooth);
    assertTrue(smooth.contains("0 to 1"), smooth);
    assertTrue(smooth.contains("at the fields of the moment"), smooth);
  }

  /** 1 % of Rabi frequency costs (π/2 × 0.01)² with a square π pulse, exact to second order. */
  @Test
  void tellsWhatAnErrorOfTheRabiFrequencyCosts() {
    String text = TextReport.render(SampleReport.reference());
    assertTrue(text.contains("2.47e-04 for 1 % of Rabi frequency"), text);
  }

  private static ReportContent quiet(Pulse pulse) {
    Budget budget = Budget.of(TestDrives.rubidium().resolve(), pulse).compose();
    Check check = new Check(0.005, 1e-4, true, 40, 1, List.of());
    return new ReportContent("Quiet", budget, check, List.of());
  }

  /** A chirp is not at its best Rabi frequency, so that more and less differ in cost. */
  @Test
  void tellsWhatIsSweptAndCostsEitherWayWhereTheyDiffer() {
    String text =
        TextReport.render(quiet(Pulse.chirped(Time.microseconds(1), Frequency.megahertz(10))));
    assertTrue(text.contains("-5 MHz to +5 MHz"), text);
    assertTrue(text.replaceAll("\\s+", " ").contains(" for +1 % of Rabi frequency and "), text);
    assertFalse(text.contains("for the whole duration"), text);
  }

  @Test
  void laysOutPulsesOfEveryKind() {
    for (Pulse pulse :
        List.of(
            Pulse.ramsey(Time.microseconds(1), 1.5),
            Pulse.bb1(Math.PI),
            Pulse.square(2 * Math.PI).withEdges(Time.nanoseconds(20), Time.nanoseconds(20)))) {
      ReportContent content = quiet(pulse);
      String text = TextReport.render(content);
      assertTrue(text.contains(pulse.name()), text);
      assertTrue(text.contains("programmed fields"), text);
      assertTrue(text.lines().allMatch(l -> l.codePointCount(0, l.length()) <= 100), text);
      assertFalse(FilterChart.render(content).contains("NaN"));
    }
  }

  /** STIRAP sits on the bare resonance, where no light shift is added. */
  @Test
  void givesNoOffsetToAPulseOnTheBareResonance() {
    Pulse pulse = Pulse.stirap(Time.microseconds(1), Time.nanoseconds(700));
    String text = TextReport.render(quiet(pulse));
    assertFalse(text.contains("\n  frequency offset"), text);
    assertTrue(text.contains("counts from the resonance of the atom without light"), text);
    assertTrue(text.contains("0 to 1; 0"), text);
    assertFalse(text.contains("of Rabi frequency,"), text);
  }
}
