package org.toprung.budget.report;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.StringJoiner;
import org.toprung.budget.Budget;
import org.toprung.budget.CauseEntry;
import org.toprung.budget.report.Outline.Column;

/** The causes, how they add up, and what to do about the large ones. */
final class CauseSections {
  private static final double WORTH_A_LEVER = 0.01; // share of the sum
  private static final double NEGLIGIBLE = 1e-9; // error not worth a row

  private CauseSections() {}

  static void add(Outline.Writer out, ReportContent content) {
    Budget budget = content.budget();
    out.section("Error budget (probabilities; ±: one standard uncertainty, atomic data and bench)");
    List<List<String>> rows = new ArrayList<>();
    List<List<String>> levers = new ArrayList<>();
    StringJoiner negligible = new StringJoiner("; ");
    for (CauseEntry cause : budget.causes()) {
      if (Math.max(Math.abs(cause.error()), cause.uncertainty()) < NEGLIGIBLE) {
        negligible.add(cause.cause());
        continue;
      }
      double share = content.share(cause.error());
      rows.add(
          List.of(
              cause.cause(),
              Figures.probability(cause.error()),
              Figures.uncertainty(cause.uncertainty()),
              Figures.share(share),
              cause.fate().kind().word() + ": " + cause.fate().place()));
      if (share >= WORTH_A_LEVER) {
        levers.add(List.of(cause.cause(), cause.lever()));
      }
    }
    rows.add(
        List.of(
            "Overlap",
            Figures.probability(budget.overlap()),
            "",
            "",
            "lost only once, or undone by each other"));
    rows.add(
        List.of(
            "TOTAL",
            Figures.probability(budget.total()),
            Figures.uncertainty(budget.uncertainty()),
            "",
            ""));
    out.table(
        List.of(
            Column.left("cause"),
            Column.right("error"),
            Column.right("±"),
            Column.right("share"),
            Column.left("where it goes")),
        rows);
    if (negligible.length() > 0) {
      out.fact(String.format(Locale.ROOT, "below %.0e each", NEGLIGIBLE), negligible.toString());
    }
    out.section("Levers of the causes above 1 % of their sum");
    out.table(
        List.of(Column.left("cause"), Column.left("what to change, and what remains")), levers);
  }
}
