package org.toprung.budget.report;

/**
 * The report for notebooks and wikis: what {@link TextReport} says, in GitHub-flavoured Markdown
 * with tables. All text of the scenario is escaped.
 */
public final class MarkdownReport {
  private MarkdownReport() {}

  /**
   * Renders the report.
   *
   * @param content what to tell about
   * @return Markdown, each line ended by a line feed
   */
  public static String render(ReportContent content) {
    return MarkdownLayout.of(BudgetOutline.of(content));
  }
}
