/**
 * Reports of a checked budget: a page for people (text or Markdown), tables for spreadsheets, JSON
 * for programs and charts; beside it two budgets compared, and what a sequencer plays.
 *
 * <p>All are rendered to text in memory, those of a budget from the same {@link
 * org.toprung.budget.report.ReportContent}. A report in words is written once, as an outline of
 * facts, tables and sentences, and then laid out as text or Markdown, so that both say the same; it
 * begins with the disagreement where the simulation does not confirm the budget. Errors are
 * probabilities; every key, column and axis says its unit. JSON needs an optional dependency
 * (Jackson), which an application that asks for it brings along; the others need none.
 */
package org.toprung.budget.report;
