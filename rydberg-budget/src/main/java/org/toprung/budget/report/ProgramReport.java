package org.toprung.budget.report;

import java.util.ArrayList;
import java.util.List;
import org.toprung.budget.pulse.PulseProgram;
import org.toprung.budget.pulse.Slice;
import org.toprung.core.quantity.Time;

/**
 * What a sequencer plays, as comma-separated values by RFC 4180: one row for each slice of constant
 * settings. Fields are those programmed, without the edges of the modulators; the header says what
 * detunings count from.
 */
public final class ProgramReport {
  private static final int SLICES = 500;

  private ProgramReport() {}

  /**
   * Renders a program in slices of a five-hundredth of its length or longer where nothing changes.
   *
   * @param program what is played
   * @return a header and one row for each slice, each ended by CR LF
   */
  public static String render(PulseProgram program) {
    return render(program, Time.ofSeconds(program.seconds() / SLICES));
  }

  /**
   * Renders a program.
   *
   * @param program what is played
   * @param spacing greatest length of a slice where anything changes
   * @return a header and one row for each slice, each ended by CR LF
   * @throws IllegalArgumentException if the spacing is not positive, or so short that there would
   *     be more than a million slices
   */
  public static String render(PulseProgram program, Time spacing) {
    List<String> header = new ArrayList<>(List.of("begin (s)", "length (s)"));
    for (int k = 1; k <= program.steps(); k++) {
      header.add("field of beam " + k + " (fraction of full)");
    }
    header.add("detuning from " + PulseSection.reference(program) + " (Hz)");
    header.add("phase (rad)");
    CsvTable table = new CsvTable(header);
    double begin = 0;
    for (Slice slice : program.slices(spacing)) {
      List<String> row = new ArrayList<>();
      row.add(CsvTable.number("begin", begin));
      row.add(CsvTable.number("length", slice.seconds()));
      slice.fieldFactors().forEach(f -> row.add(CsvTable.number("field", f)));
      row.add(CsvTable.number("detuning", slice.detuningHertz()));
      row.add(CsvTable.number("phase", slice.phaseRadians()));
      table.row(row);
      begin += slice.seconds();
    }
    return table.toString();
  }
}
