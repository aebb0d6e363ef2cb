package org.toprung.core.drive;

import java.util.List;
import org.toprung.core.atom.Sublevel;
import org.toprung.core.quantity.Frequency;

/**
 * What the light of a drive does to one ground sublevel, driven or idle: for a qubit stored in two
 * of them, the difference is its dephasing and the idle one's scattering is its loss.
 *
 * @param sublevel the ground sublevel
 * @param shifts light shift by each beam, near- and far-resonant, positive upwards, in the order of
 *     the steps
 * @param scatteringPerSecond rate of photon scattering through the first step's levels, 1/s
 */
public record GroundLight(Sublevel sublevel, List<Frequency> shifts, double scatteringPerSecond) {
  /**
   * Copies the list.
   *
   * @param sublevel the ground sublevel
   * @param shifts light shift by each beam
   * @param scatteringPerSecond scattering rate, 1/s
   */
  public GroundLight {
    shifts = List.copyOf(shifts);
  }

  /**
   * Light shift by all beams.
   *
   * @return the move of its energy over h, positive upwards
   */
  public Frequency shift() {
    return Frequency.ofHertz(shifts.stream().mapToDouble(Frequency::hertz).sum());
  }
}
