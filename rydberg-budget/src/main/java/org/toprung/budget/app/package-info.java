/** The command line: a scenario file in and its report out, or two scenarios compared. */
package org.toprung.budget.app;
