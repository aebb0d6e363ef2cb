/**
 * Error budgets of Rydberg excitation pulses.
 *
 * <p>{@link org.toprung.budget.Budget} composes the causes of error of a pulse on a bench and
 * checks the sum by simulation. Errors are probabilities, 1 − probability of the wanted outcome;
 * uncertainties are one standard deviation and come from the atomic values, the bench being taken
 * as given. Length and frequency of the pulse are taken to be calibrated on the atom, so that an
 * uncertain dipole element does not count as a rotation error.
 */
package org.toprung.budget;
