package org.toprung.budget.report;

import java.util.ArrayList;
import java.util.List;
import java.util.StringJoiner;
import org.toprung.budget.pulse.PulseProgram;
import org.toprung.budget.pulse.Slice;
import org.toprung.core.quantity.Frequency;
import org.toprung.core.quantity.Time;

/**
 * A stretch of a program between two of its breaks, by the range of what is programmed in it.
 *
 * @param from when it begins, s
 * @param seconds its length, s
 * @param ranges of each beam, its lowest and highest programmed field over the full one
 * @param detunings at the beginning and at the end, Hz
 * @param radians phase at the beginning and at the end
 */
record Stretch(
    double from, double seconds, List<double[]> ranges, double[] detunings, double[] radians) {
  private static final int SAMPLES = 65;
  private static final double SAME = 5e-4; // of full field

  /** The stretches in order. */
  static List<Stretch> of(PulseProgram program) {
    List<Stretch> stretches = new ArrayList<>();
    double from = 0;
    // one slice for each stretch, since none is longer than the program
    for (Slice slice : program.slices(Time.ofSeconds(program.seconds()))) {
      stretches.add(of(program, from, slice.seconds()));
      from += slice.seconds();
    }
    return stretches;
  }

  private static Stretch of(PulseProgram program, double from, double seconds) {
    List<double[]> ranges = new ArrayList<>();
    for (int k = 0; k < program.steps(); k++) {
      double[] range = {Double.POSITIVE_INFINITY, 0};
      for (int i = 0; i < SAMPLES; i++) {
        double field = program.programmedFieldFactor(k, inside(from, seconds, i));
        range[0] = Math.min(range[0], field);
        range[1] = Math.max(range[1], field);
      }
      ranges.add(range);
    }
    double first = inside(from, seconds, 0);
    double last = inside(from, seconds, SAMPLES - 1);
    return new Stretch(
        from,
        seconds,
        ranges,
        new double[] {program.detuningHertz(first), program.detuningHertz(last)},
        new double[] {program.phaseRadians(first), program.phaseRadians(last)});
  }

  /** Points that keep off the ends, where a program may jump. */
  private static double inside(double from, double seconds, int i) {
    return from + seconds * (1e-9 + (1 - 2e-9) * i / (SAMPLES - 1));
  }

  boolean isAtFullPower() {
    return ranges.stream().allMatch(r -> r[0] > 1 - SAME && r[1] < 1 + SAME);
  }

  /** Whether every beam is at full power, with one frequency and one phase. */
  boolean isPlain() {
    return isAtFullPower() && detunings[0] == detunings[1] && radians[0] == radians[1];
  }

  String fields() {
    List<String> shown = ranges.stream().map(Stretch::field).toList();
    if (shown.stream().allMatch(shown.get(0)::equals)) {
      return shown.get(0);
    }
    StringJoiner text = new StringJoiner("; ");
    shown.forEach(text::add);
    return text.toString();
  }

  private static String field(double[] range) {
    String low = Figures.number(Math.rint(range[0] / SAME) * SAME, 3);
    String high = Figures.number(Math.rint(range[1] / SAME) * SAME, 3);
    return low.equals(high) ? low : low + " to " + high;
  }

  String detuning() {
    String first = Figures.signed(Frequency.ofHertz(detunings[0]));
    String last = Figures.signed(Frequency.ofHertz(detunings[1]));
    return first.equals(last) ? first : first + " to " + last;
  }

  String phase() {
    String first = Figures.number(radians[0], 4);
    String last = Figures.number(radians[1], 4);
    return (first.equals(last) ? first : first + " to " + last) + " rad";
  }
}
