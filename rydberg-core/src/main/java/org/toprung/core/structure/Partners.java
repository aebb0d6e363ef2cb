package org.toprung.core.structure;

import java.util.ArrayList;
import java.util.List;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;

/** The levels that a dipole can reach from a level. */
final class Partners {
  private Partners() {}

  /** All of them from the lowest up to a largest n, ordered by n. */
  static List<Level> of(Species species, Level level, int largestN) {
    List<Level> partners = new ArrayList<>();
    for (int n = 1; n <= Math.min(largestN, Level.MAXIMUM_N); n++) {
      for (int l = level.l() - 1; l <= level.l() + 1; l += 2) {
        for (int doubledJ = 2 * l - 1; doubledJ <= 2 * l + 1; doubledJ += 2) {
          if (l >= 0 && l < n && doubledJ > 0 && Math.abs(doubledJ - level.doubledJ()) <= 2) {
            Level partner = Level.of(n, l, doubledJ);
            if (species.isValid(partner)) {
              partners.add(partner);
            }
          }
        }
      }
    }
    return partners;
  }
}
