package org.toprung.budget.report;

import java.util.ArrayList;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.OptionalDouble;
import java.util.Set;
import java.util.StringJoiner;
import org.toprung.budget.Budget;
import org.toprung.budget.BudgetComparison;
import org.toprung.budget.report.Outline.Column;

/**
 * Which causes moved between two budgets, the largest move first, and which settings differ: as a
 * page of text that fits {@value Page#WIDTH} columns, or in GitHub-flavoured Markdown. A cause that
 * is assessed in one of the budgets only is said to be; its error counts as a move.
 *
 * <p>Immutable and thread-safe.
 */
public final class ComparisonReport {
  private static final double WORTH_A_ROW = 0.001; // move over the larger total
  private static final String NOT_ASSESSED = "not assessed";
  private static final String NOT_GIVEN = "not given";

  private final Outline outline;

  private ComparisonReport(Outline outline) {
    this.outline = outline;
  }

  /**
   * Compares two budgets.
   *
   * @param before the budget to compare with
   * @param after the budget of interest
   * @return the report
   */
  public static ComparisonReport between(ComparedBudget before, ComparedBudget after) {
    Outline.Writer out = new Outline.Writer("Two budgets compared");
    BudgetComparison comparison = BudgetComparison.between(before.budget(), after.budget());
    totals(out, before, after);
    moves(out, comparison);
    settings(out, before.budget(), after.budget());
    return new ComparisonReport(out.outline());
  }

  /**
   * The report for people.
   *
   * @return lines of at most {@value Page#WIDTH} columns, each ended by a line feed
   */
  public String text() {
    return TextLayout.of(outline);
  }

  /**
   * The report for notebooks and wikis.
   *
   * @return Markdown, each line ended by a line feed
   */
  public String markdown() {
    return MarkdownLayout.of(outline);
  }

  private static void totals(Outline.Writer out, ComparedBudget before, ComparedBudget after) {
    out.section("Result");
    out.fact("before", before.title());
    out.fact("", total(before.budget()));
    out.fact("after", after.title());
    out.fact("", total(after.budget()));
    double difference = after.budget().total() - before.budget().total();
    out.fact(
        "the total",
        difference == 0
            ? "did not change"
            : (difference < 0 ? "falls by " : "rises by ")
                + Figures.probability(Math.abs(difference))
                + relative(difference, before.budget().total()));
    if (before.budget().pulse().goal() != after.budget().pulse().goal()) {
      out.fact(
          "beware", "the two pulses have different goals, so that their errors differ in kind");
    }
  }

  private static String total(Budget budget) {
    return String.format(
        Locale.ROOT,
        "error (%s) %%, %s",
        Figures.measured(100 * budget.total(), 100 * budget.uncertainty()),
        PulseSection.meaning(budget.pulse().goal()));
  }

  private static String relative(double difference, double before) {
    return before > 0 ? ", " + Figures.change(difference / before) : "";
  }

  private static void moves(Outline.Writer out, BudgetComparison comparison) {
    out.section("Causes that moved (probabilities, the largest move first)");
    List<List<String>> rows = new ArrayList<>();
    StringJoiner still = new StringJoiner("; ");
    double least = WORTH_A_ROW * Math.max(comparison.before(), comparison.after());
    for (BudgetComparison.Change change : comparison.changes()) {
      boolean inBoth = change.before().isPresent() && change.after().isPresent();
      if (Math.abs(change.difference()) <= least && inBoth) {
        still.add(change.cause());
        continue;
      }
      rows.add(
          List.of(
              change.cause(),
              shown(change.before()),
              shown(change.after()),
              signed(change.difference()),
              inBoth ? factor(change) : ""));
    }
    rows.add(
        List.of(
            "TOTAL",
            Figures.probability(comparison.before()),
            Figures.probability(comparison.after()),
            signed(comparison.after() - comparison.before()),
            ""));
    out.table(
        List.of(
            Column.left("cause"),
            Column.right("before"),
            Column.right("after"),
            Column.right("change"),
            Column.left("which is")),
        rows);
    if (still.length() > 0) {
      out.fact("hardly moved", still + " (each by less than 0.1 % of the total)");
    }
  }

  private static String shown(OptionalDouble error) {
    return error.isPresent() ? Figures.probability(error.getAsDouble()) : NOT_ASSESSED;
  }

  private static String signed(double difference) {
    String size = Figures.probability(difference);
    return difference > 0 ? "+" + size : size;
  }

  private static String factor(BudgetComparison.Change change) {
    double before = change.before().orElseThrow();
    double after = change.after().orElseThrow();
    return before > 0 && after > 0 ? "times " + Figures.number(after / before, 3) : "";
  }

  private static void settings(Outline.Writer out, Budget before, Budget after) {
    Map<String, String> old = Settings.of(before);
    Map<String, String> now = Settings.of(after);
    Set<String> names = new LinkedHashSet<>(old.keySet());
    names.addAll(now.keySet());
    out.section("Settings that differ");
    boolean same = true;
    for (String name : names) {
      String was = old.getOrDefault(name, NOT_GIVEN);
      String is = now.getOrDefault(name, NOT_GIVEN);
      if (!was.equals(is)) {
        out.fact(name, was);
        out.fact("", "-> " + is);
        same = false;
      }
    }
    if (same) {
      out.sentence("None.");
    }
  }
}
