package org.toprung.budget.report;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import org.toprung.budget.Budget;
import org.toprung.budget.pulse.FrequencyReference;
import org.toprung.budget.pulse.Goal;
import org.toprung.budget.pulse.PulseProgram;
import org.toprung.budget.report.Outline.Column;
import org.toprung.budget.response.Knob;
import org.toprung.budget.response.PulseResponse;
import org.toprung.core.drive.PulsePlan;
import org.toprung.core.quantity.Frequency;
import org.toprung.core.quantity.Time;

/** The pulse: what it is for, where to set it, what is played and how it reacts. */
final class PulseSection {
  private static final int MOST_STRETCHES = 12;
  private static final double AMPLITUDE_STEP = 0.01;
  private static final double DETUNING_STEP = 0.01; // of the Rabi frequency

  private PulseSection() {}

  static void add(Outline.Writer out, Budget budget) {
    PulsePlan plan = budget.plan();
    PulseProgram program = budget.program();
    out.section("Pulse");
    out.fact("pulse", budget.pulse().toString());
    out.fact("success", success(budget.pulse().goal()));
    out.fact("duration", Figures.of(Time.ofSeconds(program.seconds())));
    out.fact("Rabi frequency", Figures.of(plan.rabi()) + " at full power, in the pulse");
    out.fact(
        "frequency offset",
        Figures.signed(plan.frequencyOffset())
            + " added to the last laser puts the ladder on its light-shifted resonance"
            + (program.reference() == FrequencyReference.FULL_POWER || isSteady(program)
                ? ""
                : " at full power"));
    if (!isSteady(program)) {
      out.fact("laser frequency", "counts from " + reference(program));
    }
    if (budget.pulse().offset().hertz() != 0) {
      out.fact(
          "deliberate offset", Figures.signed(budget.pulse().offset()) + " from that resonance");
    }
    reaction(out, budget);
    played(out, program);
  }

  /** Whether there is nothing to follow: every beam is at full power all the time. */
  private static boolean isSteady(PulseProgram program) {
    return program.reference() != FrequencyReference.BARE
        && Stretch.of(program).stream().allMatch(Stretch::isAtFullPower);
  }

  /** What success is, in words. */
  static String success(Goal goal) {
    return switch (goal) {
      case TRANSFER -> "the atom is in the wanted target sublevel";
      case ROTATION -> "the state is the one that the ideal pulse makes";
      case RETURN -> "the start comes back, with the planned phase against an idle state";
      case COHERENCE -> "full contrast of the fringe";
    };
  }

  /** What the error is, in words. */
  static String meaning(Goal goal) {
    return switch (goal) {
      case TRANSFER -> "1 - probability of the wanted target";
      case ROTATION -> "1 - overlap with the state that the ideal pulse makes";
      case RETURN -> "1 - probability that the start comes back with the planned phase";
      case COHERENCE -> "half of what the contrast of the fringe lacks of 1";
    };
  }

  /** What detunings of a program count from, in words. */
  static String reference(PulseProgram program) {
    return switch (program.reference()) {
      case FOLLOWING -> "the light-shifted resonance at the fields of the moment";
      case FULL_POWER -> "the light-shifted resonance at full power";
      case BARE -> "the resonance of the atom without light";
    };
  }

  private static void reaction(Outline.Writer out, Budget budget) {
    PulseResponse response = budget.response();
    double hertz = rounded(DETUNING_STEP * budget.plan().rabi().hertz());
    String detuning =
        Figures.probability(response.errorPerSquaredHertz() * hertz * hertz)
            + " for "
            + Figures.of(Frequency.ofHertz(hertz))
            + " of detuning";
    String amplitude =
        response.knobs().contains(Knob.amplitude())
            ? ", "
                + Figures.probability(
                    response.errorPerSquaredAmplitude() * AMPLITUDE_STEP * AMPLITUDE_STEP)
                + " for 1 % of Rabi frequency"
            : "";
    out.fact("costs in error", detuning + amplitude + "; both grow with the square");
  }

  /** To one digit. */
  private static double rounded(double value) {
    double decade = Math.pow(10, Math.floor(Math.log10(value)));
    return decade * Math.max(1, Math.rint(value / decade));
  }

  private static void played(Outline.Writer out, PulseProgram program) {
    List<Stretch> stretches = Stretch.of(program);
    if (stretches.size() == 1 && isSteady(program)) {
      out.fact("what is played", "every beam at full field for the whole duration");
      return;
    }
    List<List<String>> rows = new ArrayList<>();
    for (Stretch s : stretches.subList(0, Math.min(MOST_STRETCHES, stretches.size()))) {
      rows.add(
          List.of(
              Figures.of(Time.ofSeconds(s.from())),
              Figures.of(Time.ofSeconds(s.seconds())),
              s.fields(),
              s.detuning(),
              s.phase()));
    }
    out.table(
        List.of(
            Column.right("played from"),
            Column.right("for"),
            Column.left(
                program.steps() == 1 ? "field (lowest to highest)" : "fields (lowest to highest)"),
            Column.left("detuning"),
            Column.left("phase")),
        rows);
    if (stretches.size() > MOST_STRETCHES) {
      out.sentence(
          String.format(Locale.ROOT, "and %d more stretches", stretches.size() - MOST_STRETCHES));
    }
  }
}
