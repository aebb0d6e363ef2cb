package org.toprung.budget;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.function.DoubleFunction;
import org.toprung.budget.bench.BenchEntry;
import org.toprung.core.drive.Drive;
import org.toprung.core.drive.DriveSetup;
import org.toprung.core.quantity.Frequency;

/** Asks what the total would be at other values, with the pulse planned anew. */
final class Sensitivities {
  private static final double SMALL = 0.01; // relative step of the slope

  /** A value, and the total when it is multiplied. */
  private record Question(String value, DoubleFunction<Assessment> multiplied) {}

  private Sensitivities() {}

  static List<Sensitivity> of(Assessment nominal) {
    List<Question> questions = new ArrayList<>();
    for (BenchEntry entry : nominal.bench().entries()) {
      questions.add(new Question(entry.name(), f -> nominal.scaled(entry, f)));
    }
    Drive drive = nominal.model().drive();
    int steps = drive.steps().size();
    for (int k = 0; k < steps; k++) {
      int step = k;
      questions.add(
          new Question(
              "power, step " + (k + 1),
              f -> nominal.on(drive.setup().withBeam(step, b -> b.brightened(f)).resolve())));
    }
    for (int k = 0; k < steps - 1; k++) {
      int step = k;
      questions.add(
          new Question(
              "detuning, step " + (k + 1),
              f -> nominal.on(detuned(drive, steps - 1, step, f).resolve())));
    }
    return questions.parallelStream()
        .map(question -> answer(question, nominal.total()))
        .flatMap(Optional::stream)
        .sorted(
            Comparator.comparingDouble(Sensitivity::best)
                .thenComparing(s -> Math.abs(s.slope()))
                .reversed())
        .toList();
  }

  private static DriveSetup detuned(Drive drive, int count, int step, double factor) {
    Frequency[] detunings = new Frequency[count];
    for (int k = 0; k < count; k++) {
      double f = k == step ? factor : 1;
      detunings[k] = Frequency.ofHertz(f * drive.detuning(k).hertz());
    }
    return drive.setup().detuned(detunings);
  }

  /** Nothing where one of the variations cannot be had. */
  private static Optional<Sensitivity> answer(Question question, double total) {
    OptionalDouble half = total(question, 0.5);
    OptionalDouble twice = total(question, 2);
    OptionalDouble more = total(question, 1 + SMALL);
    OptionalDouble less = total(question, 1 - SMALL);
    if (half.isEmpty() || twice.isEmpty() || more.isEmpty() || less.isEmpty()) {
      return Optional.empty();
    }
    return Optional.of(
        new Sensitivity(
            question.value(),
            (more.getAsDouble() - less.getAsDouble()) / (2 * SMALL),
            total - half.getAsDouble(),
            total - twice.getAsDouble()));
  }

  /**
   * The total of a variation, if there is one: a probability above its limit is refused, and light
   * must not meet a resonance.
   */
  private static OptionalDouble total(Question question, double factor) {
    try {
      return OptionalDouble.of(question.multiplied().apply(factor).total());
    } catch (IllegalArgumentException | ArithmeticException impossible) {
      return OptionalDouble.empty();
    }
  }
}
