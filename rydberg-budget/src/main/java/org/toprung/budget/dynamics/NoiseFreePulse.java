package org.toprung.budget.dynamics;

import org.toprung.core.drive.Ladder;

/**
 * Outcome of a pulse on the ladder without noise and without loss.
 *
 * @param missed error by the goal of the pulse that the other two do not count: the atom stayed in
 *     the start, sits in the intermediate level, or has the wrong phase
 * @param otherRydberg probability of another sublevel of the Rydberg level
 * @param otherGround probability of another sublevel of the ground level
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
    return new NoiseFreePulse(Math.max(0, error - rydberg - ground), rydberg, ground);
  }
}
