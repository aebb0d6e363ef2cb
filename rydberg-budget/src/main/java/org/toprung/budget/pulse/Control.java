package org.toprung.budget.pulse;

import java.util.ArrayList;
import java.util.List;

/** Detuning and phase of the light over time; before and after, the nearest value. Immutable. */
final class Control {
  private final List<Part> parts;
  private final double[] starts; // s, with the end as the last
  private final double offsetHertz;

  Control(List<Part> parts, double[] seconds, double lead, double offsetHertz) {
    this.parts = parts;
    this.starts = new double[parts.size() + 1];
    this.starts[0] = lead;
    for (int j = 0; j < parts.size(); j++) {
      starts[j + 1] = starts[j] + seconds[j];
    }
    this.offsetHertz = offsetHertz;
  }

  private int part(double t) {
    int low = 1;
    int high = parts.size();
    while (low < high) {
      int middle = (low + high) >>> 1;
      if (starts[middle] <= t) {
        low = middle + 1;
      } else {
        high = middle;
      }
    }
    return low - 1;
  }

  private double relative(int part, double t) {
    double x = (t - starts[part]) / (starts[part + 1] - starts[part]);
    return Math.max(0, Math.min(1, x));
  }

  double phase(double t) {
    return parts.get(part(t)).phaseRadians();
  }

  double detuning(double t) {
    int j = part(t);
    Part p = parts.get(j);
    if (p.fromHertz() == p.toHertz()) {
      return offsetHertz + p.fromHertz();
    }
    return offsetHertz
        + p.fromHertz()
        + (p.toHertz() - p.fromHertz()) * p.sweep().at(relative(j, t));
  }

  boolean isConstantAt(double t) {
    int j = part(t);
    Part p = parts.get(j);
    return p.fromHertz() == p.toHertz() || !(t > starts[j] && t < starts[j + 1]);
  }

  /** Mean between two times without a break between them. */
  double meanDetuning(double from, double to) {
    double middle = 0.5 * (from + to);
    if (isConstantAt(middle)) {
      return detuning(middle);
    }
    int j = part(middle);
    Part p = parts.get(j);
    double x1 = relative(j, from);
    double x2 = relative(j, to);
    double mean = (p.sweep().integral(x2) - p.sweep().integral(x1)) / (x2 - x1);
    return offsetHertz + p.fromHertz() + (p.toHertz() - p.fromHertz()) * mean;
  }

  List<Double> breaks() {
    List<Double> breaks = new ArrayList<>();
    for (int j = 0; j < starts.length; j++) {
      boolean swept = isSwept(j - 1) || isSwept(j);
      if (swept || j > 0 && j < parts.size() && isJump(parts.get(j - 1), parts.get(j))) {
        breaks.add(starts[j]);
      }
    }
    return breaks;
  }

  private boolean isSwept(int j) {
    return j >= 0 && j < parts.size() && parts.get(j).fromHertz() != parts.get(j).toHertz();
  }

  private static boolean isJump(Part a, Part b) {
    return a.toHertz() != b.fromHertz() || a.phaseRadians() != b.phaseRadians();
  }
}
