package org.toprung.core.drive;

import java.util.List;
import org.toprung.core.quantity.Frequency;
import org.toprung.core.quantity.Power;

/** Powers for a wanted effective Rabi frequency, or the best there is within the limits. */
public sealed interface PowerPlan {
  /**
   * The power of each beam.
   *
   * @return an immutable list, one for each step
   */
  List<Power> powers();

  /**
   * Effective Rabi frequency over 2π with these powers.
   *
   * @return the modulus
   */
  Frequency rabi();

  /**
   * The wanted Rabi frequency can be had.
   *
   * @param powers the power of each beam
   * @param rabi the wanted effective Rabi frequency over 2π
   */
  record Reached(List<Power> powers, Frequency rabi) implements PowerPlan {
    /**
     * Copies the list.
     *
     * @param powers the power of each beam
     * @param rabi the wanted effective Rabi frequency over 2π
     */
    public Reached {
      powers = List.copyOf(powers);
    }
  }

  /**
   * The wanted Rabi frequency is not reachable.
   *
   * @param powers the limits: every beam at its largest power
   * @param rabi the largest effective Rabi frequency over 2π that is reachable
   */
  record OutOfReach(List<Power> powers, Frequency rabi) implements PowerPlan {
    /**
     * Copies the list.
     *
     * @param powers the limits
     * @param rabi the largest effective Rabi frequency over 2π
     */
    public OutOfReach {
      powers = List.copyOf(powers);
    }
  }
}
