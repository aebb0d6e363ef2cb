/**
 * Reports of a checked budget: a table for people, JSON for programs and a chart.
 *
 * <p>All three are rendered to text in memory from the same {@link
 * org.toprung.budget.report.ReportContent}. Errors are probabilities; every key, column and axis
 * says its unit. JSON needs an optional dependency (Jackson), which an application that asks for it
 * brings along; table and chart need none.
 */
package org.toprung.budget.report;
