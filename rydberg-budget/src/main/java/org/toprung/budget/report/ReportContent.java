package org.toprung.budget.report;

import java.util.ArrayList;
import java.util.List;
import org.toprung.budget.Budget;
import org.toprung.budget.Check;
import org.toprung.budget.Sensitivity;

/**
 * What a report tells about.
 *
 * @param title one line that names the scenario
 * @param budget the budget
 * @param check its check by simulation
 * @param sensitivities how the total reacts to single values, the most rewarding first
 */
public record ReportContent(
    String title, Budget budget, Check check, List<Sensitivity> sensitivities) {
  private static final double LARGE_TOTAL = 0.05;

  /**
   * Checks the parts.
   *
   * @param title one line that names the scenario
   * @param budget the budget
   * @param check its check by simulation
   * @param sensitivities how the total reacts to single values; copied
   * @throws IllegalArgumentException if a part is missing
   */
  public ReportContent {
    if (title == null || budget == null || check == null || sensitivities == null) {
      throw new IllegalArgumentException(
          "a report needs a title, a budget, a check and sensitivities, not null");
    }
    sensitivities = List.copyOf(sensitivities);
  }

  /**
   * Computes the sensitivities, which takes some ten budgets, once for all reports.
   *
   * @param title one line that names the scenario
   * @param budget the budget
   * @param check its check by simulation
   * @throws IllegalArgumentException if a part is missing
   */
  public ReportContent(String title, Budget budget, Check check) {
    this(title, budget, check, budget == null ? null : budget.sensitivities());
  }

  /** Whether the simulation confirms the budget, in a few words. */
  String verdict() {
    int objections = check.disagreements().size();
    String alone =
        objections == 0
            ? ""
            : ", DISAGREES with "
                + objections
                + (objections == 1 ? " cause" : " causes")
                + " alone";
    return (check.agrees() ? "agrees with the total" : "DISAGREES with the total") + alone;
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
    int objections = check.disagreements().size();
    if (objections > 0) {
      warnings.add(
          "the simulation disagrees with "
              + (objections == 1 ? "one cause" : objections + " causes")
              + " taken alone: see the top of the report");
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
