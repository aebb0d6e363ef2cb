/**
 * Alkali atoms: species, levels, sublevels and the catalogue of measured values with their sources.
 *
 * <p>Energies are E/h in Hz of the hyperfine centre of gravity of a level, counted from the
 * ionization limit, so bound levels are negative. Angular momenta cross this interface as doubled
 * integers, or written out ("3/2").
 */
package org.toprung.core.atom;
