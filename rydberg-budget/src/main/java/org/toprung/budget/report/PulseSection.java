package org.toprung.budget.report;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.StringJoiner;
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
  private static final double ONE_SIDED = 0.01; // slope against curvature, worth telling
  private static final double NEGLIGIBLE = 1e-9; // error not worth telling
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
    if (program.reference() != FrequencyReference.BARE) {
      out.fact("frequency offset", offset(plan, program));
    }
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

  private static String offset(PulsePlan plan, PulseProgram program) {
    boolean always = program.reference() == FrequencyReference.FULL_POWER || isSteady(program);
    return Figures.signed(plan.frequencyOffset())
        + " added to the last laser puts the ladder on its light-shifted resonance"
        + (always ? "" : " at full power");
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
    Frequency detuning = Frequency.ofHertz(rounded(DETUNING_STEP * budget.plan().rabi().hertz()));
    Knob laser = Knob.frequency(response.steps() - 1);
    StringJoiner costs = new StringJoiner(", ");
    costs.add(cost(response, laser, detuning.hertz(), Figures.of(detuning) + " of detuning"));
    if (response.knobs().contains(Knob.amplitude())) {
      costs.add(
          cost(
              response,
              Knob.amplitude(),
              AMPLITUDE_STEP,
              Figures.percent(AMPLITUDE_STEP) + " of Rabi frequency"));
    }
    out.fact("costs in error", costs + ", to second order");
  }

  /** What a step of a knob adds to the error; either way where the ways differ. */
  private static String cost(PulseResponse response, Knob knob, double step, String what) {
    double linear = response.slope(knob) * step;
    double square = 0.5 * response.curvature(knob, knob) * step * step;
    if (Math.abs(linear) <= Math.max(ONE_SIDED * Math.abs(square), NEGLIGIBLE)) {
      return Figures.probability(square) + " for " + what;
    }
    return String.format(
        Locale.ROOT,
        "%s for +%s and %s for -%s",
        Figures.probability(square + linear),
        what,
        Figures.probability(square - linear),
        what);
  }

  /** To one digit. */
  private static double rounded(double value) {
    double decade = Math.pow(10, Math.floor(Math.log10(value)));
    return decade * Math.max(1, Math.rint(value / decade));
  }

  private static void played(Outline.Writer out, PulseProgram program) {
    List<Stretch> stretches = Stretch.of(program);
    if (stretches.size() == 1 && stretches.get(0).isPlain()) {
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
                program.steps() == 1
                    ? "programmed field (lowest to highest)"
                    : "programmed fields (lowest to highest)"),
            Column.left("detuning"),
            Column.left("phase")),
        rows);
    if (stretches.size() > MOST_STRETCHES) {
      out.sentence(
          String.format(Locale.ROOT, "and %d more stretches", stretches.size() - MOST_STRETCHES));
    }
  }
}
