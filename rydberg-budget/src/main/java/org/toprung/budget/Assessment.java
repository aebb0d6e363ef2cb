package org.toprung.budget;

import java.util.ArrayList;
import java.util.Collections;
import java.util.List;
import org.toprung.budget.bench.Bench;
import org.toprung.budget.bench.BenchEntry;
import org.toprung.budget.cause.Cause;
import org.toprung.budget.cause.Causes;
import org.toprung.budget.cause.PulseModel;
import org.toprung.budget.pulse.Pulse;
import org.toprung.core.drive.Drive;

/**
 * Errors of all causes of a pulse on a bench and their total, without uncertainties: what a budget
 * is made of, and what variations of it are compared by.
 *
 * <p>Immutable.
 */
final class Assessment {
  private final PulseModel model;
  private final Bench bench;
  private final Causes found;
  private final List<Cause> causes;
  private final double[] errors;
  private final double total;

  private Assessment(PulseModel model, Bench bench, Causes found, double[] errors) {
    this.model = model;
    this.bench = bench;
    this.found = found;
    this.causes = found.assessed();
    this.errors = errors;
    this.total = total(causes, errors);
  }

  static Assessment of(Drive drive, Pulse pulse, Bench bench) {
    return of(PulseModel.of(drive, pulse, bench), bench);
  }

  private static Assessment of(PulseModel model, Bench bench) {
    Causes found = Causes.of(model, bench);
    return new Assessment(model, bench, found, errors(found.assessed(), model));
  }

  /**
   * The same pulse and drive with one number of the bench multiplied. What that number does not
   * enter is not computed again.
   */
  Assessment scaled(BenchEntry entry, double factor) {
    Bench other = bench.scaled(entry.value(), entry.index(), factor);
    PulseModel moved = model.on(other);
    if (moved != model) {
      return of(moved, other);
    }
    Causes refound = Causes.of(model, other);
    double[] changed = errors.clone();
    for (int i = 0; i < changed.length; i++) {
      Cause cause = refound.assessed().get(i);
      if (!Collections.disjoint(cause.disturbances(), entry.disturbances())) {
        changed[i] = cause.error(model);
      }
    }
    return new Assessment(model, other, refound, changed);
  }

  /** The same pulse on another drive and the same bench. */
  Assessment on(Drive other) {
    return of(other, model.pulse(), bench);
  }

  static double[] errors(List<Cause> causes, PulseModel model) {
    return causes.stream().mapToDouble(c -> c.error(model)).toArray();
  }

  static double total(List<Cause> causes, double[] errors) {
    List<Composition.Part> parts = new ArrayList<>();
    for (int i = 0; i < errors.length; i++) {
      parts.add(new Composition.Part(causes.get(i).kind(), errors[i]));
    }
    return Composition.total(parts);
  }

  PulseModel model() {
    return model;
  }

  Bench bench() {
    return bench;
  }

  List<Cause> causes() {
    return causes;
  }

  Cause cause(String name) {
    return causes.stream().filter(c -> c.name().equals(name)).findFirst().orElseThrow();
  }

  double[] errors() {
    return errors.clone();
  }

  double total() {
    return total;
  }

  List<String> notAssessed() {
    return found.notAssessed();
  }
}
