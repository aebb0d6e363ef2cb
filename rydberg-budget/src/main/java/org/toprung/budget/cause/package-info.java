/**
 * The causes of error of a pulse, each with its formula.
 *
 * <p>A quasi-static disturbance (constant during a shot) is averaged over the exact response of a
 * square pulse, P = Ω²/(Ω²+δ²) sin²(½√(Ω²+δ²) τ), in which it may change the Rabi frequency and the
 * detuning together; the average is a Gauss-Hermite sum over its Gaussian distribution. Loss and
 * white noise have closed forms. An error is what the cause adds to that of the undisturbed pulse.
 */
package org.toprung.budget.cause;
