package org.toprung.budget.pulse;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;

/**
 * The field of one beam over its full field: the M-th root of an amplitude, M beams being shaped
 * alike, with every jump rounded by the modulator.
 *
 * <p>Time counts from the beginning of the first part until {@link #delayedBy} makes room for the
 * first edge. Immutable.
 */
final class Track {
  private static final int NONE = -1;

  private final List<Part> parts;
  private final double[] starts; // s, of the parts, with the end as the last
  private final double[] bounds; // s, where the amplitude goes from part to part
  private final double[] jumps; // of the field, at each bound
  private final int[] lastJump; // by the number of bounds passed: index of the nearest jump
  private final int[] nextJump;
  private final int root;
  private final Edges edges;

  private Track(
      List<Part> parts, double[] starts, double[] bounds, double[] jumps, int root, Edges edges) {
    this.parts = parts;
    this.starts = starts;
    this.bounds = bounds;
    this.jumps = jumps;
    this.root = root;
    this.edges = edges;
    int n = jumps.length;
    this.lastJump = new int[n + 1];
    this.nextJump = new int[n + 1];
    lastJump[0] = NONE;
    nextJump[n] = NONE;
    for (int j = 0; j < n; j++) {
      lastJump[j + 1] = jumps[j] == 0 ? lastJump[j] : j;
      int k = n - 1 - j;
      nextJump[k] = jumps[k] == 0 ? nextJump[k + 1] : k;
    }
  }

  /** A beam that stays at full field. */
  static Track on() {
    return new Track(
        List.of(Part.slice(1, 1, 0, 0)),
        new double[] {Double.NEGATIVE_INFINITY, Double.POSITIVE_INFINITY},
        new double[] {Double.NEGATIVE_INFINITY, Double.POSITIVE_INFINITY},
        new double[2],
        1,
        Edges.ABRUPT);
  }

  /**
   * A shaped beam.
   *
   * @param parts the parts, none of them without length
   * @param seconds their lengths
   * @param root how many beams share the amplitude
   * @param edges of the modulator
   */
  static Track of(List<Part> parts, double[] seconds, int root, Edges edges) {
    List<Part> joined = new ArrayList<>(); // a bound without a jump would not move with its edges
    double[] starts = new double[parts.size() + 1];
    double end = 0;
    for (int j = 0; j < parts.size(); j++) {
      if (j == 0 || !parts.get(j - 1).goesOnAs(parts.get(j))) {
        starts[joined.size()] = end;
        joined.add(parts.get(j));
      }
      end += seconds[j];
    }
    int n = joined.size();
    starts = Arrays.copyOf(starts, n + 1);
    starts[n] = end;
    double[] bounds = starts.clone();
    double[] jumps = new double[n + 1];
    double before = 0;
    for (int j = 0; j <= n; j++) {
      double after = j == n ? 0 : field(joined.get(j).edgeLevel(), root);
      jumps[j] = after - before;
      if (jumps[j] != 0) {
        bounds[j] += edges.delay(before, after, root);
      }
      before = after;
    }
    return new Track(List.copyOf(joined), starts, bounds, jumps, root, edges);
  }

  Track delayedBy(double seconds) {
    return new Track(parts, plus(starts, seconds), plus(bounds, seconds), jumps, root, edges);
  }

  private static double[] plus(double[] times, double seconds) {
    double[] later = times.clone();
    for (int j = 0; j < later.length; j++) {
      later[j] += seconds;
    }
    return later;
  }

  private static double field(double amplitude, int root) {
    switch (root) {
      case 1:
        return amplitude;
      case 2:
        return Math.sqrt(amplitude);
      default:
        return Math.cbrt(amplitude);
    }
  }

  double end() {
    return starts[parts.size()];
  }

  /**
   * Shortest time between neighbouring jumps, whether programmed or moved for their edges; infinite
   * where there are fewer than two.
   */
  double shortestSeconds() {
    double shortest = Double.POSITIVE_INFINITY;
    for (int j = 0; j < jumps.length; j++) {
      int last = lastJump[j];
      if (jumps[j] != 0 && last != NONE) {
        double programmed = starts[j] - starts[last];
        shortest = Math.min(shortest, Math.min(programmed, bounds[j] - bounds[last]));
      }
    }
    return shortest;
  }

  /** How long before the beginning of the first part the field begins to rise. */
  double lead() {
    double earliest = 0;
    for (int j = 0; j < bounds.length; j++) {
      earliest = Math.min(earliest, bounds[j] - edges.reach(jumps[j]));
    }
    return 0 - earliest;
  }

  /** When the field has come to rest; at least the end of the last part. */
  double rest() {
    double latest = end();
    for (int j = 0; j < bounds.length; j++) {
      latest = Math.max(latest, bounds[j] + edges.reach(jumps[j]));
    }
    return latest;
  }

  /** Times of jumps and of kinks of the program, without edges. */
  List<Double> programmedBreaks() {
    List<Double> breaks = new ArrayList<>();
    for (int j = 0; j < bounds.length; j++) {
      boolean kink = isShaped(j - 1) || isShaped(j);
      if (Double.isFinite(bounds[j]) && (kink || jumps[j] != 0)) {
        breaks.add(bounds[j]);
      }
    }
    return breaks;
  }

  private boolean isShaped(int part) {
    return part >= 0 && part < parts.size() && !parts.get(part).isConstantAmplitude();
  }

  /** Times where the edges begin and end. */
  List<Double> edgeBreaks() {
    List<Double> breaks = new ArrayList<>();
    for (int j = 0; j < bounds.length; j++) {
      double reach = edges.reach(jumps[j]);
      if (Double.isFinite(bounds[j]) && jumps[j] != 0 && reach > 0) {
        breaks.add(bounds[j] - reach);
        breaks.add(bounds[j] + reach);
      }
    }
    return breaks;
  }

  /** Number of bounds that have passed: the part is one less. */
  private int passed(double t) {
    int low = 0;
    int high = bounds.length;
    while (low < high) {
      int middle = (low + high) >>> 1;
      if (bounds[middle] <= t) {
        low = middle + 1;
      } else {
        high = middle;
      }
    }
    return low;
  }

  double programmed(double t) {
    return programmed(passed(t), t);
  }

  private double programmed(int passed, double t) {
    if (passed == 0 || passed > parts.size()) {
      return 0;
    }
    Part part = parts.get(passed - 1);
    if (part.isConstantAmplitude()) {
      return field(part.level(), root);
    }
    return field(part.level() * part.shape().at(relative(passed - 1, t)), root);
  }

  private double relative(int part, double t) {
    double x = (t - starts[part]) / (starts[part + 1] - starts[part]);
    return Math.max(0, Math.min(1, x));
  }

  double actual(double t) {
    int passed = passed(t);
    double field = programmed(passed, t);
    if (edges.isAbrupt()) {
      return field;
    }
    // jumps lie at least an edge's reach apart: only the nearest on either side count
    field += excess(lastJump[passed], t) + excess(nextJump[passed], t);
    return Math.max(0, field);
  }

  private double excess(int jump, double t) {
    return jump == NONE ? 0 : edges.excess(jumps[jump], t - bounds[jump]);
  }

  private boolean isReachedBy(int jump, double t) {
    return jump != NONE && Math.abs(t - bounds[jump]) < edges.reach(jumps[jump]);
  }

  /** Whether the field is constant around a time between breaks. */
  boolean isConstantAt(double t) {
    int passed = passed(t);
    return isProgramConstantAt(t)
        && !isReachedBy(lastJump[passed], t)
        && !isReachedBy(nextJump[passed], t);
  }

  boolean isProgramConstantAt(double t) {
    return !isShaped(passed(t) - 1);
  }

  /** Root of the mean programmed amplitude between two times within one part. */
  double programmedMean(double from, double to) {
    int passed = passed(0.5 * (from + to));
    if (!isShaped(passed - 1)) {
      return programmed(passed, from);
    }
    Part part = parts.get(passed - 1);
    double x1 = relative(passed - 1, from);
    double x2 = relative(passed - 1, to);
    double mean = (part.shape().integral(x2) - part.shape().integral(x1)) / (x2 - x1);
    return field(part.level() * Math.max(0, mean), root);
  }
}
