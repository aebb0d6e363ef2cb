package org.toprung.budget;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.OptionalDouble;

/**
 * Which causes moved between two budgets, the largest move first.
 *
 * @param before total before
 * @param after total after
 * @param changes cause by cause
 */
public record BudgetComparison(double before, double after, List<Change> changes) {

  /**
   * One cause in both budgets.
   *
   * @param cause name of the cause
   * @param before its error before; empty where it was not assessed
   * @param after its error after; empty where it is not assessed
   */
  public record Change(String cause, OptionalDouble before, OptionalDouble after) {
    /**
     * After minus before, what is not assessed counting as nothing.
     *
     * @return the difference of errors
     */
    public double difference() {
      return after.orElse(0) - before.orElse(0);
    }
  }

  /**
   * Copies the list.
   *
   * @param before total before
   * @param after total after
   * @param changes cause by cause
   */
  public BudgetComparison {
    changes = List.copyOf(changes);
  }

  /**
   * Compares two budgets by the names of their causes.
   *
   * @param before the budget to compare with
   * @param after the budget of interest
   * @return the comparison
   */
  public static BudgetComparison between(Budget before, Budget after) {
    Map<String, OptionalDouble[]> found = new LinkedHashMap<>();
    for (CauseEntry entry : before.causes()) {
      found.put(
          entry.cause(),
          new OptionalDouble[] {OptionalDouble.of(entry.error()), OptionalDouble.empty()});
    }
    for (CauseEntry entry : after.causes()) {
      found
              .computeIfAbsent(
                  entry.cause(),
                  c -> new OptionalDouble[] {OptionalDouble.empty(), OptionalDouble.empty()})[1] =
          OptionalDouble.of(entry.error());
    }
    List<Change> changes = new ArrayList<>();
    found.forEach((cause, errors) -> changes.add(new Change(cause, errors[0], errors[1])));
    changes.sort((a, b) -> Double.compare(Math.abs(b.difference()), Math.abs(a.difference())));
    return new BudgetComparison(before.total(), after.total(), changes);
  }
}
