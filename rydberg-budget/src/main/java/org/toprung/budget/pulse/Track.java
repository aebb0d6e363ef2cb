package org.toprung.budget.pulse;

import java.util.ArrayList;
import java.util.List;

/**
 * The field of one beam over its full field: the M-th root of an amplitude, M beams being shaped
 * alike, with every jump rounded by the modulator.
 *
 * <p>Time counts from the beginning of the first part until {@link #delayedBy} makes room for the
 * first edge. Immutable.
 */
final class Track {
  private final List<Part> parts;
  private final double[] starts; // s, with the end as the last
  private final double[] bounds; // s, from where on each part's amplitude holds
  private final int root;
  private final Edges edges;

  private Track(List<Part> parts, double[] starts, double[] bounds, int root, Edges edges) {
    this.parts = parts;
    this.starts = starts;
    this.bounds = bounds;
    this.root = root;
    this.edges = edges;
  }

  /** A beam that stays at full field. */
  static Track on() {
    return new Track(
        List.of(Part.slice(1, 1, 0, 0)),
        new double[] {Double.NEGATIVE_INFINITY, Double.POSITIVE_INFINITY},
        new double[] {Double.NEGATIVE_INFINITY, Double.POSITIVE_INFINITY},
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
    int n = parts.size();
    double[] starts = new double[n + 1];
    for (int j = 0; j < n; j++) {
      starts[j + 1] = starts[j] + seconds[j];
    }
    double[] bounds = starts.clone();
    Track abrupt = new Track(parts, starts, starts, root, edges);
    for (int j = 0; j <= n; j++) {
      if (abrupt.jump(j) != 0) {
        bounds[j] += edges.delay(abrupt.before(j), abrupt.after(j), root);
      }
    }
    return new Track(parts, starts, bounds, root, edges);
  }

  Track delayedBy(double seconds) {
    return new Track(parts, plus(starts, seconds), plus(bounds, seconds), root, edges);
  }

  private static double[] plus(double[] times, double seconds) {
    double[] later = times.clone();
    for (int j = 0; j < later.length; j++) {
      later[j] += seconds;
    }
    return later;
  }

  private double field(double amplitude) {
    switch (root) {
      case 1:
        return amplitude;
      case 2:
        return Math.sqrt(amplitude);
      default:
        return Math.cbrt(amplitude);
    }
  }

  private double before(int bound) {
    return bound == 0 ? 0 : field(parts.get(bound - 1).edgeLevel());
  }

  private double after(int bound) {
    return bound == parts.size() ? 0 : field(parts.get(bound).edgeLevel());
  }

  private double jump(int bound) {
    return after(bound) - before(bound);
  }

  double end() {
    return starts[parts.size()];
  }

  /** Shortest time between neighbouring jumps; infinite where there are fewer than two. */
  double shortestSeconds() {
    double shortest = Double.POSITIVE_INFINITY;
    double last = Double.NEGATIVE_INFINITY;
    for (int j = 0; j < bounds.length; j++) {
      if (jump(j) != 0) {
        shortest = Math.min(shortest, bounds[j] - last);
        last = bounds[j];
      }
    }
    return shortest;
  }

  /** How long before the beginning of the first part the field begins to rise. */
  double lead() {
    double earliest = 0;
    for (int j = 0; j < bounds.length; j++) {
      earliest = Math.min(earliest, bounds[j] - edges.reach(jump(j)));
    }
    return -earliest;
  }

  /** When the field has come to rest; at least the end of the last part. */
  double rest() {
    double latest = end();
    for (int j = 0; j < bounds.length; j++) {
      latest = Math.max(latest, bounds[j] + edges.reach(jump(j)));
    }
    return latest;
  }

  /** Times of jumps and of kinks of the program, without edges. */
  List<Double> programmedBreaks() {
    List<Double> breaks = new ArrayList<>();
    for (int j = 0; j < bounds.length; j++) {
      boolean kink = isShaped(j - 1) || isShaped(j);
      if (Double.isFinite(bounds[j]) && (kink || jump(j) != 0)) {
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
      double reach = edges.reach(jump(j));
      if (Double.isFinite(bounds[j]) && jump(j) != 0 && reach > 0) {
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
      return field(part.level());
    }
    return field(part.level() * part.shape().at(relative(passed - 1, t)));
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
    for (int j = passed - 1; j >= 0; j--) {
      if (jump(j) != 0) {
        field += edges.excess(jump(j), t - bounds[j]);
        break;
      }
    }
    for (int j = passed; j < bounds.length; j++) {
      if (jump(j) != 0) {
        field += edges.excess(jump(j), t - bounds[j]);
        break;
      }
    }
    return Math.max(0, field);
  }

  /** Whether the field is constant around a time between breaks. */
  boolean isConstantAt(double t) {
    if (!isProgramConstantAt(t)) {
      return false;
    }
    for (int j = 0; j < bounds.length; j++) {
      if (Math.abs(t - bounds[j]) < edges.reach(jump(j))) {
        return false;
      }
    }
    return true;
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
    return field(part.level() * Math.max(0, mean));
  }
}
