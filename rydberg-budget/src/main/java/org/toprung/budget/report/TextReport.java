package org.toprung.budget.report;

/**
 * The report for people: one page of text that fits {@value Page#WIDTH} columns.
 *
 * <p>Should the simulation not confirm the budget, the page begins with that. To keep tables short,
 * levers of causes below 1 % of the total are left out here and causes that hardly exist are only
 * named; {@link JsonReport} and {@link CsvReport} have them all.
 */
public final class TextReport {
  private TextReport() {}

  /**
   * Renders the report.
   *
   * @param content what to tell about
   * @return lines of at most {@value Page#WIDTH} columns, each ended by a line feed
   */
  public static String render(ReportContent content) {
    return TextLayout.of(BudgetOutline.of(content));
  }
}
