package org.toprung.budget.report;

import java.util.ArrayList;
import java.util.List;
import org.toprung.budget.Budget;
import org.toprung.budget.Check;

/**
 * What a report tells about.
 *
 * @param title one line that names the scenario
 * @param budget the budget
 * @param check its check by simulation
 */
public record ReportContent(String title, Budget budget, Check check) {
  private static final double LARGE_TOTAL = 0.05;

  /**
   * Checks the parts.
   *
   * @param title one line that names the scenario
   * @param budget the budget
   * @param check its check by simulation
   * @throws IllegalArgumentException if a part is missing
   */
  public ReportContent {
    if (title == null || budget == null || check == null) {
      throw new IllegalArgumentException("a report needs a title, a budget and a check, not null");
    }
  }

  /**
   * Part of the sum of all causes that one of them makes; all parts add up to 1. Negative for a
   * cause that lessens the error.
   */
  double share(double error) {
    double sum = budget.causes().stream().mapToDouble(c -> c.error()).sum();
    return sum > 0 ? error / sum : 0;
  }

  /** What makes the numbers doubtful, in sentences. */
  List<String> warnings() {
    List<String> warnings = new ArrayList<>(budget.drive().warnings());
    if (budget.total() > LARGE_TOTAL) {
      warnings.add(
          "the total is above 5 %: causes add up only while their sum is small, so trust the"
              + " simulation rather than the sum");
    }
    if (!check.agrees()) {
      warnings.add(
          "the simulation disagrees with the composed total: at least one cause is not described"
              + " well by adding it to the others");
    }
    return List.copyOf(warnings);
  }

  /** Safety of the beams, and what the numbers are good for. */
  List<String> cautions() {
    List<String> cautions = new ArrayList<>(LaserCaution.of(budget.drive()));
    cautions.add("All figures are estimates for planning, to be confirmed on the apparatus.");
    return List.copyOf(cautions);
  }
}
