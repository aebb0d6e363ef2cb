package org.toprung.budget.report;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import org.toprung.budget.Budget;
import org.toprung.budget.CauseCheck;
import org.toprung.budget.Check;
import org.toprung.budget.report.Outline.Column;

/** What the simulation says about the budget; where it objects, before anything else. */
final class CheckSections {
  private static final double NEGLIGIBLE = 1e-9; // error not worth a row
  private static final String RULE =
      "agreement is 10 % of the simulated total, or three standard errors";

  private final ReportContent content;
  private final Budget budget;
  private final Check check;

  CheckSections(ReportContent content) {
    this.content = content;
    this.budget = content.budget();
    this.check = content.check();
  }

  /** A section where the simulation objects; nothing where it does not. */
  void addDisagreement(Outline.Writer out) {
    List<CauseCheck> objections = check.disagreements();
    if (check.agrees() && objections.isEmpty()) {
      return;
    }
    out.section("DISAGREEMENT between budget and simulation");
    List<List<String>> rows = new ArrayList<>();
    if (!check.agrees()) {
      rows.add(row("TOTAL", budget.total(), check.total(), check.standardError()));
    }
    for (CauseCheck c : objections) {
      rows.add(row(c.cause(), c.composed(), c.simulated(), c.standardError()));
    }
    out.table(
        List.of(
            Column.left("what differs"),
            Column.right("budget"),
            Column.right("simulation"),
            Column.right("±"),
            Column.left("the budget is")),
        rows);
    out.sentence(
        check.agrees()
            ? "The total holds, but trust neither the size of these causes nor their levers."
            : "Believe the simulation, not the total of the budget.");
  }

  private static List<String> row(
      String what, double composed, double simulated, double standardError) {
    return List.of(
        what,
        Figures.probability(composed),
        Figures.probability(simulated),
        standardError == 0 ? "" : Figures.uncertainty(standardError),
        Figures.probability(Math.abs(composed - simulated))
            + (composed < simulated ? " too small" : " too large"));
  }

  void addCheck(Outline.Writer out) {
    out.section("Check by simulation of the whole ladder");
    out.fact("total of the budget", Figures.probability(budget.total()));
    out.fact(
        "simulated total",
        String.format(
            Locale.ROOT,
            "%s ± %s (one standard error; %d shots, seed %d)",
            Figures.probability(check.total()),
            Figures.uncertainty(check.standardError()),
            check.shots(),
            check.seed()));
    double difference = budget.total() - check.total();
    out.fact(
        check.agrees() ? "agrees" : "DISAGREES",
        String.format(
            Locale.ROOT,
            "the total of the causes is %s %s; %s",
            Figures.probability(Math.abs(difference)),
            difference < 0 ? "smaller" : "larger",
            RULE));
    if (check.causes().isEmpty()) {
      out.fact("each cause alone", "not simulated");
      return;
    }
    List<List<String>> rows = new ArrayList<>();
    for (CauseCheck c : check.causes()) {
      if (c.agrees() && Math.max(Math.abs(c.composed()), Math.abs(c.simulated())) < NEGLIGIBLE) {
        continue;
      }
      rows.add(
          List.of(
              c.cause(),
              Figures.probability(c.composed()),
              Figures.probability(c.simulated()),
              c.standardError() == 0 ? "" : Figures.uncertainty(c.standardError()),
              c.agrees() ? "agrees" : "DISAGREES"));
    }
    out.table(
        List.of(
            Column.left("each cause alone"),
            Column.right("budget"),
            Column.right("simulation"),
            Column.right("±"),
            Column.left("verdict")),
        rows);
  }
}
