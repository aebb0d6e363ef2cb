package org.toprung.budget.report;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.stream.Collectors;
import java.util.stream.DoubleStream;
import org.toprung.budget.CauseCheck;
import org.toprung.budget.CauseEntry;
import org.toprung.budget.Check;
import org.toprung.budget.response.Fate;

/**
 * What a chart shows: which rows, on which axis, and what has to be said because no bar can show
 * it. A logarithmic axis has no place for zero and negative errors, and none for very small ones.
 *
 * @param title names the scenario
 * @param subtitles what was driven, and whether the simulation agrees, cause by cause
 * @param rows rows from the top down: the total, the simulated total, then causes
 * @param scale the axis
 * @param notes what the bars do not tell, in sentences
 */
record ChartContent(
    String title, List<String> subtitles, List<Row> rows, DecadeScale scale, List<String> notes) {

  /** What a row stands for. */
  enum Kind {
    TOTAL,
    SIMULATED,
    CAUSE
  }

  /**
   * One error with its standard uncertainty; for a cause what becomes of the atom, and what the
   * simulation finds for it alone.
   */
  record Row(
      Kind kind,
      String name,
      double error,
      double uncertainty,
      Optional<Fate.Kind> fate,
      Optional<CauseCheck> alone) {
    Row(Kind kind, String name, double error, double uncertainty) {
      this(kind, name, error, uncertainty, Optional.empty(), Optional.empty());
    }

    private static Row of(CauseEntry cause, Check check) {
      return new Row(
          Kind.CAUSE,
          cause.cause(),
          cause.error(),
          cause.uncertainty(),
          Optional.of(cause.fate().kind()),
          check.causes().stream().filter(c -> c.cause().equals(cause.cause())).findFirst());
    }

    Row {
      if (!(Math.abs(error) <= Double.MAX_VALUE && uncertainty <= Double.MAX_VALUE)) {
        throw new IllegalStateException(
            name + " is " + error + " ± " + uncertainty + ", which is not finite");
      }
    }

    /** How the bar is hatched, by what becomes of the atom. */
    List<Hatch> hatching() {
      return fate.map(ChartContent::hatching).orElse(List.of());
    }

    String value() {
      return Figures.probability(error) + " ± " + Figures.uncertainty(uncertainty);
    }
  }

  static ChartContent of(ReportContent content) {
    return of(
        content.title(),
        content.budget().drive()
            + ", "
            + content.budget().pulse()
            + " of "
            + Figures.of(content.budget().plan().duration()),
        new Row(Kind.TOTAL, "Total", content.budget().total(), content.budget().uncertainty()),
        content.check(),
        content.budget().causes(),
        content.budget().notAssessed());
  }

  static ChartContent of(
      String title,
      String pulse,
      Row total,
      Check check,
      List<CauseEntry> causes,
      List<String> notAssessed) {
    Row simulated =
        new Row(Kind.SIMULATED, "Simulated total", check.total(), check.standardError());
    List<Row> ranked = causes.stream().map(c -> Row.of(c, check)).toList();
    List<Row> rows = new ArrayList<>(List.of(total, simulated));
    rows.addAll(ranked);
    DecadeScale scale =
        DecadeScale.covering(
            DoubleStream.concat(
                    rows.stream().mapToDouble(r -> r.error()),
                    DoubleStream.of(
                        total.error() + total.uncertainty(),
                        simulated.error() + simulated.uncertainty()))
                .toArray());
    rows.removeIf(r -> r.kind() == Kind.CAUSE && !scale.reaches(r.error()));
    String agreement =
        String.format(
            Locale.ROOT,
            "The simulation (%d shots, seed %d) %s the total.",
            check.shots(),
            check.seed(),
            check.agrees() ? "agrees with" : "DISAGREES with");
    List<String> subtitles = new ArrayList<>(List.of(pulse, agreement));
    if (!check.disagreements().isEmpty()) {
      subtitles.add(
          check.disagreements().stream()
              .map(CauseCheck::cause)
              .collect(Collectors.joining("; ", "It DISAGREES with these causes alone: ", ".")));
    }
    return new ChartContent(
        title, subtitles, List.copyOf(rows), scale, notes(ranked, scale, notAssessed));
  }

  private static List<Hatch> hatching(Fate.Kind fate) {
    return switch (fate) {
      case PHASE -> List.of();
      case LEAK -> List.of(Hatch.RISING);
      case LOSS -> List.of(Hatch.FALLING);
      case READOUT -> List.of(Hatch.UPRIGHT);
      case RECOVERABLE -> List.of(Hatch.RISING, Hatch.FALLING);
    };
  }

  /** What the hatching means, for the kinds that are drawn. */
  private static String legend(List<Row> causes, DecadeScale scale) {
    return Arrays.stream(Fate.Kind.values())
        .filter(
            kind ->
                causes.stream()
                    .anyMatch(
                        r -> r.fate().filter(kind::equals).isPresent() && scale.reaches(r.error())))
        .map(kind -> described(hatching(kind)) + ": " + kind.word())
        .collect(Collectors.joining("; ", "Bars by what becomes of the atom: ", "."));
  }

  private static String described(List<Hatch> hatching) {
    return switch (hatching.size()) {
      case 0 -> "plain";
      case 1 -> hatching.get(0).name().toLowerCase(Locale.ROOT) + " lines";
      default -> "crossed lines";
    };
  }

  private static List<String> notes(List<Row> causes, DecadeScale scale, List<String> notAssessed) {
    List<String> notes = new ArrayList<>();
    notes.add(
        "Whiskers and ±: one standard uncertainty, atomic data and stated bench values; for the"
            + " simulation one standard error.");
    if (causes.stream().anyMatch(r -> scale.reaches(r.error()))) {
      notes.add(legend(causes, scale));
    }
    if (causes.stream().anyMatch(r -> r.alone().isPresent())) {
      notes.add("Diamonds: what the simulation finds for a cause alone, black where it disagrees.");
    }
    List<Row> undrawn = causes.stream().filter(r -> !scale.reaches(r.error())).toList();
    note(
        notes,
        String.format(Locale.ROOT, "Too small to draw, at most %.0e", scale.lowest()),
        undrawn.stream().filter(r -> !isNegative(r)).map(ChartContent::named).toList());
    note(
        notes,
        "Negative, so not drawn; lessening the total",
        undrawn.stream().filter(ChartContent::isNegative).map(ChartContent::named).toList());
    note(notes, "Not assessed, so not in the total", notAssessed);
    return List.copyOf(notes);
  }

  private static void note(List<String> notes, String start, List<String> items) {
    if (!items.isEmpty()) {
      notes.add(start + ": " + String.join("; ", items) + ".");
    }
  }

  private static boolean isNegative(Row row) {
    return Figures.probability(row.error()).startsWith("-");
  }

  private static String named(Row row) {
    return row.name() + " (" + Figures.probability(row.error()) + ")";
  }

  /** The whole chart in words. */
  String description() {
    StringBuilder text = new StringBuilder("Error of one pulse as a probability, by cause.");
    subtitles.forEach(s -> text.append(' ').append(s));
    rows.forEach(r -> text.append(' ').append(r.name()).append(": ").append(r.value()).append('.'));
    notes.forEach(n -> text.append(' ').append(n));
    return text.toString();
  }
}
