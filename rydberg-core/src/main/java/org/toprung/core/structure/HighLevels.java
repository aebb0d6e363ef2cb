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
   * is that at the largest n. Where those n have no such l, the nearly circular levels with the
   * same n − l are taken.
   */
  static Estimate continued(
      Species species, Level level, int largestN, Function<Level, Estimate> values) {
    boolean circular = level.l() >= largestN - BASE;
    Level upper = below(level, largestN, circular);
    Level lower = below(level, largestN - BASE, circular);
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

  private static Level below(Level level, int n, boolean circular) {
    int down = circular ? level.n() - n : 0;
    return Level.of(n, level.l() - down, level.doubledJ() - 2 * down);
  }
}
