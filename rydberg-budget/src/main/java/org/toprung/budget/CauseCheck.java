package org.toprung.budget;

/**
 * One cause alone against a simulation in which nothing else disturbs.
 *
 * @param cause name of the cause
 * @param composed its error in the budget
 * @param simulated what the disturbance adds to the simulated error of the undisturbed pulse
 * @param standardError standard error of the simulated value; 0 where nothing is drawn at random
 * @param agrees whether the two differ by less than three standard errors or a tenth of the
 *     simulated total of all causes
 */
public record CauseCheck(
    String cause, double composed, double simulated, double standardError, boolean agrees) {}
