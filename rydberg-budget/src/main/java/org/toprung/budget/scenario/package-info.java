/**
 * Scenario files: one TOML file that describes atom, field, beams, pulse and bench.
 *
 * <p>Reading is strict. An unknown key, a missing value, an unknown unit or an impossible value is
 * refused with one line that gives file, line, key, what was given and what is allowed; nothing is
 * guessed and nothing is silently left out. Frequencies are ordinary frequencies.
 *
 * <p>The TOML parser (Jackson) is an optional dependency: an application that calls {@link
 * org.toprung.budget.scenario.Scenario} brings it along.
 */
package org.toprung.budget.scenario;
