/**
 * Reports of a checked budget: a table for people, JSON for programs and a chart.
 *
 * <p>All three are rendered to text in memory from the same {@link
 * org.toprung.budget.report.ReportContent}. Errors are probabilities; every key, column and axis
 * says its unit. JSON (Jackson) and chart (XChart) need optional dependencies, which an application
 * that asks for them brings along; the table needs none.
 */
package org.toprung.budget.report;
