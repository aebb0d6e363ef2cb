package org.toprung.budget.report;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import org.junit.jupiter.api.Test;
import org.toprung.budget.Budget;
import org.toprung.budget.CauseEntry;
import org.toprung.budget.TestDrives;
import org.toprung.budget.pulse.Pulse;
import org.toprung.budget.pulse.PulseProgram;
import org.toprung.core.quantity.Time;

/** Causes and programs as comma-separated values, and the report in Markdown. */
class TableReportsTest {

  private static List<List<String>> causes(ReportContent content) {
    return CsvText.parsed(CsvReport.render(content));
  }

  @Test
  void hasOneRowForEachCauseWithAllItsValues() {
    ReportContent content = SampleReport.checked(SampleReport.noisy(), true, "Doppler shift");
    List<List<String>> rows = causes(content);
    List<CauseEntry> causes = content.budget().causes();
    assertEquals(causes.size() + 1, rows.size());
    List<String> header = rows.get(0);
    for (int i = 0; i < causes.size(); i++) {
      List<String> row = rows.get(i + 1);
      CauseEntry cause = causes.get(i);
      assertEquals(header.size(), row.size());
      assertEquals(cause.cause(), row.get(0));
      assertEquals(cause.error(), Double.parseDouble(row.get(1)));
      assertEquals(cause.atomicUncertainty(), Double.parseDouble(row.get(3)));
      assertEquals(cause.benchUncertainty(), Double.parseDouble(row.get(4)));
      assertEquals(cause.fate().kind().word(), row.get(6));
      assertEquals(cause.fate().place(), row.get(7));
      assertEquals(
          !cause.cause().equals("Doppler shift"), Boolean.parseBoolean(row.get(10)), row.get(0));
      assertEquals(cause.lever(), row.get(11));
      assertEquals(cause.source(), row.get(12));
    }
  }

  @Test
  void namesAUnitInEveryColumnOfNumbers() {
    List<List<String>> rows = causes(SampleReport.checked(SampleReport.reference(), true));
    for (int i = 0; i < rows.get(0).size(); i++) {
      boolean number =
          rows.get(1).get(i).matches("-?\\d.*\\d") && !rows.get(1).get(i).contains(" ");
      assertEquals(
          number, rows.get(0).get(i).matches(".*\\((probability|fraction)\\)"), rows.get(0).get(i));
    }
  }

  @Test
  void leavesCellsOfTheSimulationEmptyWhereItDidNotLook() {
    ReportContent content = SampleReport.reference();
    ReportContent total =
        SampleReport.with(
            content, new org.toprung.budget.Check(0.005, 1e-4, true, 40, 1, List.of()));
    for (List<String> row : causes(total).subList(1, 4)) {
      assertEquals(List.of("", "", ""), row.subList(8, 11));
    }
  }

  /** The area of the rows is that of the pulse: 2π Ω ∫a dt = π for a π pulse. */
  @Test
  void writesWhatTheSequencerPlays() {
    Budget budget = played(Pulse.gaussian(Math.PI));
    PulseProgram program = budget.program();
    List<List<String>> rows = CsvText.parsed(ProgramReport.render(budget));
    assertEquals("begin (s)", rows.get(0).get(0));
    assertTrue(rows.get(0).get(4).matches("detuning from .* \\(Hz\\)"), rows.get(0).get(4));
    assertEquals(501, rows.size());
    double area = 0;
    double end = 0;
    for (List<String> row : rows.subList(1, rows.size())) {
      double[] v = row.stream().mapToDouble(Double::parseDouble).toArray();
      assertEquals(end, v[0], 1e-15);
      end = v[0] + v[1];
      // both beams carry the root of the amplitude, of which each plays its mean
      area += 2 * Math.PI * budget.plan().rabi().hertz() * v[2] * v[3] * v[1];
      // between bare resonance, where it is dark, and the light-shifted one at full power
      double most = budget.plan().frequencyOffset().hertz();
      assertTrue(v[5] / most > -1e-6 && v[5] / most < 1 + 1e-6, v[5] + " of " + most);
    }
    assertEquals(program.seconds(), end, 1e-12 * end);
    // the dressing that full power costs 0.2 % of the Rabi frequency is weaker below it
    assertEquals(Math.PI, area, 3e-3 * Math.PI);
  }

  @Test
  void cutsAsFinelyAsAsked() {
    Budget budget = played(Pulse.gaussian(Math.PI));
    Time third = Time.ofSeconds(budget.program().seconds() / 3);
    assertEquals(4, CsvText.parsed(ProgramReport.render(budget, third)).size());
    assertThrows(
        IllegalArgumentException.class, () -> ProgramReport.render(budget, Time.ofSeconds(0)));
    Budget square = played(Pulse.pi());
    List<List<String>> rows = CsvText.parsed(ProgramReport.render(square));
    assertEquals(2, rows.size());
    double offset = Double.parseDouble(rows.get(1).get(5));
    assertEquals(square.plan().frequencyOffset().hertz(), offset, 1e-6 * Math.abs(offset));
  }

  private static Budget played(Pulse pulse) {
    return Budget.of(TestDrives.rubidium().resolve(), pulse).compose();
  }

  @Test
  void saysInMarkdownWhatTheTextSays() {
    for (ReportContent content : SampleReport.all()) {
      String markdown = MarkdownReport.render(content);
      String text = TextReport.render(content);
      String plain = markdown.replaceAll("\\\\(\\p{Punct})", "$1").replaceAll("[\\s|*:#=-]+", "");
      assertTrue(markdown.startsWith("# "), markdown);
      for (String line : text.lines().skip(2).toList()) {
        for (String word : line.strip().split(" +")) {
          String bare = word.replaceAll("[\\s|*:#=-]+", "");
          assertTrue(plain.contains(bare), bare);
        }
      }
      for (String line : markdown.lines().filter(l -> l.startsWith("|")).toList()) {
        assertTrue(line.endsWith("|"), line);
      }
    }
  }
}
