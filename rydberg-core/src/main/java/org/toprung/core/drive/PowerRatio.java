package org.toprung.core.drive;

import java.util.List;
import org.toprung.core.quantity.Power;

/** A ratio of the powers of two beams at which something is at its best, or why there is none. */
public sealed interface PowerRatio {
  /**
   * There is such a ratio.
   *
   * @param secondOverFirst power of the second beam over power of the first, positive
   * @param powers the powers of both beams with this ratio and the effective Rabi frequency of the
   *     drive as it is
   */
  record Found(double secondOverFirst, List<Power> powers) implements PowerRatio {
    /**
     * Copies the list.
     *
     * @param secondOverFirst power of the second beam over power of the first
     * @param powers the powers of both beams
     */
    public Found {
      powers = List.copyOf(powers);
    }
  }

  /**
   * There is none.
   *
   * @param reason a sentence that says why
   */
  record None(String reason) implements PowerRatio {}
}
