package org.toprung.budget.report;

import java.util.ArrayList;
import java.util.List;
import org.toprung.budget.Budget;
import org.toprung.budget.pulse.PulseProgram;
import org.toprung.budget.pulse.Slice;
import org.toprung.core.quantity.Time;

/**
 * What a sequencer plays, as comma-separated values by RFC 4180: one row for each slice of constant
 * settings. Fields are those programmed, without the edges of the modulators; the header says what
 * detunings count from. The offset is what the last laser is set to, in the middle of the slice,
 * light shifts included.
 */
public final class ProgramReport {
  private static final int SLICES = 500;

  private ProgramReport() {}

  /**
   * Renders the program of a budget in slices of a five-hundredth of its length or longer where
   * nothing changes.
   *
   * @param budget the budget whose pulse is played
   * @return a header and one row for each slice, each ended by CR LF
   */
  public static String render(Budget budget) {
    return render(budget, Time.ofSeconds(budget.program().seconds() / SLICES));
  }

  /**
   * Renders the program of a budget.
   *
   * @param budget the budget whose pulse is played
   * @param spacing greatest length of a slice where anything changes
   * @return a header and one row for each slice, each ended by CR LF
   * @throws IllegalArgumentException if the spacing is not positive, or so short that there would
   *     be more than a million slices
   */
  public static String render(Budget budget, Time spacing) {
    PulseProgram program = budget.program();
    List<String> header = new ArrayList<>(List.of("begin (s)", "length (s)"));
    for (int k = 1; k <= program.steps(); k++) {
      header.add("field of beam " + k + " (fraction of full)");
    }
    header.add("detuning from " + PulseSection.reference(program) + " (Hz)");
    header.add("offset of laser " + program.steps() + " from bare resonance (Hz)");
    header.add("phase (rad)");
    CsvTable table = new CsvTable(header);
    double begin = 0;
    for (Slice slice : program.slices(spacing)) {
      List<String> row = new ArrayList<>();
      row.add(CsvTable.number("begin", begin));
      row.add(CsvTable.number("length", slice.seconds()));
      slice.fieldFactors().forEach(f -> row.add(CsvTable.number("field", f)));
      row.add(CsvTable.number("detuning", slice.detuningHertz()));
      double middle = begin + 0.5 * slice.seconds();
      row.add(CsvTable.number("offset", budget.laserOffset(Time.ofSeconds(middle)).hertz()));
      row.add(CsvTable.number("phase", slice.phaseRadians()));
      table.row(row);
      begin += slice.seconds();
    }
    return table.toString();
  }
}
