package org.toprung.budget.dynamics;

import org.toprung.budget.pulse.Goal;
import org.toprung.core.drive.Ladder;

/**
 * Outcome of a pulse on the ladder without noise and without loss.
 *
 * @param missed error by the goal of the pulse that the other two do not count: the atom stayed in
 *     the start, sits in the intermediate level, or has the wrong phase
 * @param otherRydberg error by another sublevel of the Rydberg level: its probability, about half
 *     of that for a pulse that has to return
 * @param otherGround error by another sublevel of the ground level, likewise
 */
public record NoiseFreePulse(double missed, double otherRydberg, double otherGround) {

  /**
   * Propagates a pulse.
   *
   * @param system the pulse on its ladder
   * @return where the atom ends
   */
  public static NoiseFreePulse of(LadderSystem system) {
    Ladder ladder = system.calibrated().ladder();
    double[] populations = system.finalPopulations();
    double rydberg = 0;
    double ground = 0;
    for (int i = 0; i < populations.length; i++) {
      int rung = ladder.states().get(i).rung();
      if (rung == 0 && i != ladder.start()) {
        ground += populations[i];
      } else if (rung == ladder.steps() && !ladder.isWanted(i)) {
        rydberg += populations[i];
      }
    }
    double error = system.noiseFreeError();
    double leaked = rydberg + ground;
    double lost = Math.min(error, cost(leaked, system.calibrated().pulse().goal()));
    double share = leaked > 0 ? lost / leaked : 0;
    return new NoiseFreePulse(Math.max(0, error - lost), share * rydberg, share * ground);
  }

  /**
   * Error of a pulse that leaves a population elsewhere and is right otherwise: 1 − ¼(1 + √(1 −
   * p))² where half the atom idles.
   */
  private static double cost(double leaked, Goal goal) {
    if (goal != Goal.RETURN) {
      return leaked;
    }
    double missing = 1 - Math.sqrt(Math.max(0, 1 - leaked));
    return missing - 0.25 * missing * missing;
  }
}
