package org.toprung.budget;

import org.toprung.budget.response.Fate;

/**
 * One line of a budget.
 *
 * @param cause name of the cause
 * @param error what it adds to the error of the pulse, a probability
 * @param atomicUncertainty standard uncertainty of the error from the atomic values
 * @param benchUncertainty standard uncertainty of the error from the stated uncertainties of bench
 *     values; 0 where none is stated
 * @param fate where the atom is when it went wrong this way
 * @param lever what to change and what it buys
 * @param source formula or method behind the error, and where it is published
 */
public record CauseEntry(
    String cause,
    double error,
    double atomicUncertainty,
    double benchUncertainty,
    Fate fate,
    String lever,
    String source) {

  /**
   * Standard uncertainty of the error, atomic values and bench values together.
   *
   * @return the uncertainty
   */
  public double uncertainty() {
    return Math.hypot(atomicUncertainty, benchUncertainty);
  }
}
