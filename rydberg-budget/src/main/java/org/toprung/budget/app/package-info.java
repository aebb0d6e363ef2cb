/** The command line: one scenario file in, one report out. */
package org.toprung.budget.app;
