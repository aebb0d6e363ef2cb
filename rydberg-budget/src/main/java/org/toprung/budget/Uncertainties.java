package org.toprung.budget;

import java.util.List;
import org.toprung.budget.bench.Bench;
import org.toprung.budget.bench.BenchEntry;
import org.toprung.budget.cause.Cause;

/**
 * Standard uncertainties of causes and total from independent inputs: the change with each input
 * moved by its standard uncertainty, added in squares. One input moves all causes together, so that
 * the total is not the sum of squares of its causes.
 */
final class Uncertainties {
  private final double[] causes;
  private double total;

  private Uncertainties(int causes) {
    this.causes = new double[causes];
  }

  /** From the atomic values. */
  static Uncertainties atomic(Assessment nominal) {
    List<Cause> causes = nominal.causes();
    Uncertainties found = new Uncertainties(causes.size());
    double[] errors = nominal.errors();
    List<double[]> variations =
        nominal.model().variations().parallelStream()
            .map(varied -> Assessment.errors(causes, varied))
            .toList();
    for (double[] moved : variations) {
      double change = Assessment.total(causes, moved) - nominal.total();
      for (int i = 0; i < moved.length; i++) {
        moved[i] -= errors[i];
      }
      found.add(moved, change);
    }
    return found;
  }

  /** From the stated uncertainties of bench values, half the change between both signs. */
  static Uncertainties ofBench(Assessment nominal) {
    Uncertainties found = new Uncertainties(nominal.causes().size());
    Bench bench = nominal.bench();
    for (BenchEntry entry : bench.entries()) {
      double relative = bench.relativeUncertainty(entry.value(), entry.index());
      if (relative > 0) {
        Assessment more = nominal.scaled(entry, 1 + relative);
        Assessment less = nominal.scaled(entry, Math.max(0, 1 - relative));
        double[] change = more.errors();
        for (int i = 0; i < change.length; i++) {
          change[i] = 0.5 * (change[i] - less.errors()[i]);
        }
        found.add(change, 0.5 * (more.total() - less.total()));
      }
    }
    return found;
  }

  private void add(double[] changes, double changeOfTotal) {
    for (int i = 0; i < causes.length; i++) {
      causes[i] = Math.hypot(causes[i], changes[i]);
    }
    total = Math.hypot(total, changeOfTotal);
  }

  double ofCause(int index) {
    return causes[index];
  }

  double ofTotal() {
    return total;
  }
}
