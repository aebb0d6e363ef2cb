/**
 * How a pulse reacts to disturbances: second-order response to what stays the same during a pulse,
 * filter functions for what does not, time spent in each level, and leakage.
 *
 * <p>Conventions: spectral densities are one-sided and per ordinary frequency (Hz), frequency noise
 * in Hz²/Hz, relative intensity noise in 1/Hz. A filter function F multiplies the density, mean
 * error = ∫ S(f) F(f) df over f from 0 to ∞, so that F has the unit 1/Hz² for frequency noise and
 * none for relative intensity noise, and its limit at f = 0 is the error per squared static
 * deviation.
 */
package org.toprung.budget.response;
