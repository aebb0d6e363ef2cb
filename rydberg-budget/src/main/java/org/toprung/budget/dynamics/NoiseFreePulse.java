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
   * @param calibrated the pulse, calibrated on its ladder
   * @return where the atom ends
   */
  public static NoiseFreePulse of(CalibratedProgram calibrated) {
    LadderSystem system = LadderSystem.of(calibrated);
    Ladder ladder = calibrated.ladder();
    double[][] end = system.end();
    int[] active = system.plan().active();
    double rydberg = 0;
    double ground = 0;
    for (int i = 0; i < active.length; i++) {
      double population = end[0][i] * end[0][i] + end[1][i] * end[1][i];
      int rung = ladder.states().get(active[i]).rung();
      if (rung == 0 && active[i] != ladder.start()) {
        ground += population;
      } else if (rung == ladder.steps() && !ladder.isWanted(active[i])) {
        rydberg += population;
      }
    }
    double error = system.error(end[0], end[1]);
    return new NoiseFreePulse(Math.max(0, error - rydberg - ground), rydberg, ground);
  }
}
