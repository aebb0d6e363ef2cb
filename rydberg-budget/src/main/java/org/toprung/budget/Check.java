package org.toprung.budget;

import java.util.List;

/**
 * Result of checking a budget by simulation.
 *
 * @param total simulated error of the pulse, all disturbances together
 * @param standardError standard error of the simulated error
 * @param agrees whether the composed total lies within 10 % of the simulated one or within three
 *     standard errors
 * @param shots number of shots
 * @param seed seed of the drawn disturbances
 * @param causes each cause alone, in the order of the budget; empty if only the total was checked
 */
public record Check(
    double total,
    double standardError,
    boolean agrees,
    int shots,
    long seed,
    List<CauseCheck> causes) {

  /**
   * Copies the list.
   *
   * @param total simulated error of the pulse
   * @param standardError its standard error
   * @param agrees whether the composed total agrees
   * @param shots number of shots
   * @param seed seed of the drawn disturbances
   * @param causes each cause alone
   */
  public Check {
    causes = List.copyOf(causes);
  }

  /**
   * The causes that the simulation does not confirm when they act alone.
   *
   * @return an immutable list, empty when all agree
   */
  public List<CauseCheck> disagreements() {
    return causes.stream().filter(c -> !c.agrees()).toList();
  }
}
