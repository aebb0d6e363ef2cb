package org.toprung.budget;

/**
 * Result of checking a budget by simulation.
 *
 * @param total simulated error of the pulse, all disturbances together
 * @param standardError standard error of the simulated error
 * @param agrees whether the composed total lies within 10 % of the simulated one or within three
 *     standard errors
 * @param shots number of shots
 * @param seed seed of the drawn disturbances
 */
public record Check(double total, double standardError, boolean agrees, int shots, long seed) {}
