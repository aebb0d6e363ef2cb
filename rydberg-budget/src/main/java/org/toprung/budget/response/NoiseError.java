package org.toprung.budget.response;

/**
 * Mean error by a spectrum of noise.
 *
 * @param error mean change of the error, ∫ S(f) F(f) df over the range of the table
 * @param numericalError estimated error of that integral, from halving the panels
 * @param shareBelow share of the filter function's area below the lowest frequency of the table:
 *     how much of a white noise the table would not show because it does not reach low enough
 * @param shareAbove the same above the highest frequency of the table
 */
public record NoiseError(
    double error, double numericalError, double shareBelow, double shareAbove) {}
