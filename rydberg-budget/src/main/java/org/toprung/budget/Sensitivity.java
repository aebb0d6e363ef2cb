package org.toprung.budget;

/**
 * How the total reacts to one value of the bench, a power or a detuning.
 *
 * @param value name of the value, for people: {@code linewidth, step 1}
 * @param slope change of the total per relative change of the value, dE/d ln x; positive where less
 *     is better
 * @param savedByHalving how much smaller the total is at half the value; negative where half is
 *     worse
 * @param savedByDoubling how much smaller the total is at twice the value
 */
public record Sensitivity(
    String value, double slope, double savedByHalving, double savedByDoubling) {

  /**
   * The better of halving and doubling.
   *
   * @return how much smaller the total gets, at least 0
   */
  public double best() {
    return Math.max(0, Math.max(savedByHalving, savedByDoubling));
  }
}
