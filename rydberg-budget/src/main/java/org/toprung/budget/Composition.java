package org.toprung.budget;

import java.util.List;
import org.toprung.budget.response.Fate;

/**
 * The total of independent causes.
 *
 * <p>To lowest order errors add. When they are not small, two disturbances of the rotation can undo
 * each other, and an atom can be lost only once. Each disturbance i that wrongly turns the state or
 * its reading shrinks the contrast 1 − 2E by its own factor 1 − 2E<sub>i</sub> (exact for an
 * amplitude error with a Gaussian spread and for dephasing, within a tenth of the second-order term
 * for a detuning), and each way of losing the atom leaves 1 − E<sub>i</sub>:
 *
 * <pre>1 − E = (½ + ½ Π(1 − 2E<sub>i</sub>)) · Π(1 − E<sub>j</sub>)</pre>
 *
 * <p>What turns the state beyond ½ is not made better by noise on top of it: the first factor is at
 * most 1 − E<sub>i</sub> of the worst of them.
 */
final class Composition {
  private Composition() {}

  static double total(List<Part> parts) {
    double contrast = 1;
    double largest = 0;
    double kept = 1;
    for (Part part : parts) {
      if (isTurn(part.kind())) {
        contrast *= Math.max(0, 1 - 2 * part.error());
        largest = Math.max(largest, part.error());
      } else {
        kept *= Math.max(0, 1 - part.error());
      }
    }
    return 1 - Math.min(0.5 + 0.5 * contrast, 1 - Math.min(1, largest)) * kept;
  }

  /** One cause. */
  record Part(Fate.Kind kind, double error) {}

  private static boolean isTurn(Fate.Kind kind) {
    return kind == Fate.Kind.PHASE || kind == Fate.Kind.READOUT || kind == Fate.Kind.RECOVERABLE;
  }
}
