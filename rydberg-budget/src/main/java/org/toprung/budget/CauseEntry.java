package org.toprung.budget;

/**
 * One line of a budget.
 *
 * @param cause name of the cause
 * @param error what it adds to the error of the pulse, a probability
 * @param uncertainty standard uncertainty of the error from the atomic values
 * @param lever what to change and what it buys
 * @param source formula or method behind the error
 */
public record CauseEntry(
    String cause, double error, double uncertainty, String lever, String source) {}
