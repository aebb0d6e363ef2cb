package org.toprung.budget.report;

import java.util.List;
import java.util.Optional;

/**
 * One panel of a filter chart: filter functions, and the noise density they meet.
 *
 * @param heading what fluctuates
 * @param filters filter functions, by the left axis
 * @param density noise density, by the right axis; empty where none is known
 * @param band frequencies between which most of the error arises, Hz; empty without a density
 * @param finding what the panel tells, in a sentence
 */
record FilterPanel(
    String heading,
    List<Curve> filters,
    Optional<Curve> density,
    Optional<Band> band,
    String finding) {

  /** Frequencies from one to another. */
  record Band(double fromHertz, double toHertz) {}

  /**
   * A curve of positive values; where a value is zero the curve is interrupted.
   *
   * @param name what it shows, with its unit
   * @param hertz frequencies, rising
   * @param values at each frequency
   */
  record Curve(String name, double[] hertz, double[] values) {
    double highest() {
      double highest = 0;
      for (double value : values) {
        highest = Math.max(highest, value);
      }
      return highest;
    }

    double lowest() {
      double lowest = highest();
      for (double value : values) {
        lowest = value > 0 ? Math.min(lowest, value) : lowest;
      }
      return lowest;
    }

    Curve renamed(String newName) {
      return new Curve(newName, hertz, values);
    }

    /** Whether no eye could tell the curves apart. */
    boolean looksLike(Curve other) {
      double peak = Math.max(highest(), other.highest());
      for (int i = 0; i < values.length; i++) {
        double larger = Math.max(values[i], other.values[i]);
        if (Math.abs(values[i] - other.values[i]) > 0.02 * larger + 1e-5 * peak) {
          return false;
        }
      }
      return true;
    }
  }
}
