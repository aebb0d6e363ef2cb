package org.toprung.core.structure;

import java.util.function.Function;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.quantity.Estimate;

/**
 * Continues what changes as a power of n* along a series to levels whose upper neighbours lie above
 * the largest n of the library.
 */
final class HighLevels {
  private static final int BASE = 10;

  private HighLevels() {}

  /**
   * The value at a level, from the values at a largest n and ten below it; the relative uncertainty
   * is that at the largest n.
   */
  static Estimate continued(
      Species species, Level level, int largestN, Function<Level, Estimate> values) {
    Level upper = Level.of(largestN, level.l(), level.doubledJ());
    Level lower = Level.of(largestN - BASE, level.l(), level.doubledJ());
    Estimate at = values.apply(upper);
    double before = values.apply(lower).value();
    if (!(at.value() * before > 0)) {
      return at;
    }
    double power =
        Math.log(at.value() / before)
            / Math.log(species.effectiveN(upper) / species.effectiveN(lower));
    double scale = Math.pow(species.effectiveN(level) / species.effectiveN(upper), power);
    return new Estimate(at.value() * scale, at.uncertainty() * scale);
  }
}
