package org.toprung.budget.report;

import java.util.Arrays;
import java.util.Comparator;
import java.util.stream.Collectors;
import org.toprung.budget.Budget;
import org.toprung.budget.CauseEntry;
import org.toprung.budget.response.Fate;

/** The report of a checked budget in words and tables, what matters most first. */
final class BudgetOutline {
  private static final double WORTH_A_WORD = 5e-4; // share of the sum

  private final Outline.Writer out;
  private final ReportContent content;
  private final Budget budget;

  private BudgetOutline(ReportContent content) {
    this.out = new Outline.Writer(content.title());
    this.content = content;
    this.budget = content.budget();
  }

  static Outline of(ReportContent content) {
    return new BudgetOutline(content).written();
  }

  private Outline written() {
    CheckSections check = new CheckSections(content);
    check.addDisagreement(out);
    result();
    PulseSection.add(out, budget);
    CauseSections.add(out, content);
    out.list("Not assessed, so not in the total", budget.notAssessed());
    SensitivitySection.add(out, content);
    check.addCheck(out);
    DriveSections.add(out, budget);
    out.list("WARNINGS", content.warnings());
    out.list("CAUTION", content.cautions());
    return out.outline();
  }

  /** What a reader in a hurry needs. */
  private void result() {
    out.section("Result");
    out.fact(
        "error of one pulse",
        "("
            + Figures.measured(100 * budget.total(), 100 * budget.uncertainty())
            + ") %, which is "
            + PulseSection.meaning(budget.pulse().goal()));
    out.fact(
        "uncertainty",
        percent(budget.atomicUncertainty())
            + " from atomic data, "
            + (budget.benchUncertainty() > 0
                ? percent(budget.benchUncertainty()) + " from stated bench values"
                : "none from bench values: no stated uncertainty counts"));
    CauseEntry largest = budget.causes().get(0);
    out.fact(
        "largest cause",
        largest.cause()
            + ", "
            + Figures.share(content.share(largest.error()))
            + " of the sum of all causes");
    out.fact("where the error goes", fates());
    out.fact("simulation", content.verdict());
    if (!content.warnings().isEmpty()) {
      out.fact("warnings", content.warnings().size() + ", see below");
    }
  }

  /** An uncertainty to two digits. */
  private static String percent(double probability) {
    return Figures.number(100 * probability, 2) + " %";
  }

  /** The sum of the causes by what becomes of the atom, most first. */
  private String fates() {
    return Arrays.stream(Fate.Kind.values())
        .filter(kind -> Math.abs(content.share(sum(kind))) >= WORTH_A_WORD)
        .sorted(Comparator.comparingDouble(this::sum).reversed())
        .map(kind -> kind.word() + " " + Figures.share(content.share(sum(kind))))
        .collect(Collectors.joining(", "));
  }

  private double sum(Fate.Kind kind) {
    return budget.causes().stream()
        .filter(c -> c.fate().kind() == kind)
        .mapToDouble(CauseEntry::error)
        .sum();
  }
}
