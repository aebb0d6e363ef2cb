package org.toprung.budget.report;

import org.toprung.budget.Budget;

/**
 * A budget and what it is called.
 *
 * @param title one line that names the scenario
 * @param budget the budget
 */
public record ComparedBudget(String title, Budget budget) {
  /**
   * Checks the parts.
   *
   * @param title one line that names the scenario
   * @param budget the budget
   * @throws IllegalArgumentException if a part is missing
   */
  public ComparedBudget {
    if (title == null || budget == null) {
      throw new IllegalArgumentException("a comparison needs titles and budgets, not null");
    }
  }
}
