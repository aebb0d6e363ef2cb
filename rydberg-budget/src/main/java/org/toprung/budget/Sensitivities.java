package org.toprung.budget;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import java.util.function.DoubleFunction;
import java.util.function.Supplier;
import org.toprung.budget.bench.Bench;
import org.toprung.budget.bench.BenchEntry;
import org.toprung.core.drive.Drive;
import org.toprung.core.drive.DriveSetup;
import org.toprung.core.quantity.Frequency;

/** Asks what the total would be at other values, with the pulse planned anew. */
final class Sensitivities {
  private static final double SMALL = 0.01; // relative step of the slope

  private final Assessment nominal;
  private final List<Sensitivity> found = new ArrayList<>();

  private Sensitivities(Assessment nominal) {
    this.nominal = nominal;
  }

  static List<Sensitivity> of(Assessment nominal) {
    Sensitivities all = new Sensitivities(nominal);
    Bench bench = nominal.bench();
    for (BenchEntry entry : bench.entries()) {
      all.add(
          entry.name(),
          f -> total(() -> nominal.on(bench.scaled(entry.value(), entry.index(), f))));
    }
    Drive drive = nominal.model().drive();
    int steps = drive.steps().size();
    for (int k = 0; k < steps; k++) {
      int step = k;
      all.add(
          "power, step " + (k + 1),
          f ->
              total(
                  () ->
                      nominal.on(
                          drive.setup().withBeam(step, beam -> beam.brightened(f)).resolve())));
    }
    for (int k = 0; k < steps - 1; k++) {
      int step = k;
      all.add(
          "detuning, step " + (k + 1),
          f -> total(() -> nominal.on(detuned(drive, steps - 1, step, f).resolve())));
    }
    all.found.sort(
        Comparator.comparingDouble(Sensitivity::best)
            .thenComparing(s -> Math.abs(s.slope()))
            .reversed());
    return List.copyOf(all.found);
  }

  private static DriveSetup detuned(Drive drive, int count, int step, double factor) {
    Frequency[] detunings = new Frequency[count];
    for (int k = 0; k < count; k++) {
      double f = k == step ? factor : 1;
      detunings[k] = Frequency.ofHertz(f * drive.detuning(k).hertz());
    }
    return drive.setup().detuned(detunings);
  }

  /**
   * The total of a variation, if there is one: a probability above its limit is refused, and light
   * must not meet a resonance.
   */
  private static Optional<Double> total(Supplier<Assessment> variation) {
    try {
      return Optional.of(variation.get().total());
    } catch (IllegalArgumentException | ArithmeticException impossible) {
      return Optional.empty();
    }
  }

  private void add(String value, DoubleFunction<Optional<Double>> total) {
    Optional<Double> half = total.apply(0.5);
    Optional<Double> twice = total.apply(2);
    Optional<Double> more = total.apply(1 + SMALL);
    Optional<Double> less = total.apply(1 - SMALL);
    if (half.isPresent() && twice.isPresent() && more.isPresent() && less.isPresent()) {
      found.add(
          new Sensitivity(
              value,
              (more.get() - less.get()) / (2 * SMALL),
              nominal.total() - half.get(),
              nominal.total() - twice.get()));
    }
  }
}
