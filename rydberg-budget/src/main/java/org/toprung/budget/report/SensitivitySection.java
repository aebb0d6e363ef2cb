package org.toprung.budget.report;

import java.util.ArrayList;
import java.util.List;
import org.toprung.budget.Sensitivity;
import org.toprung.budget.report.Outline.Column;

/** Which single value to improve first, by what half or twice of it does to the total. */
final class SensitivitySection {
  private static final double WORTH_A_ROW = 0.01; // change over the total
  private static final int MOST_ROWS = 12;

  private SensitivitySection() {}

  static void add(Outline.Writer out, ReportContent content) {
    double total = content.budget().total();
    List<Sensitivity> worth =
        content.sensitivities().stream()
            .filter(
                s ->
                    Math.max(Math.abs(s.savedByHalving()), Math.abs(s.savedByDoubling()))
                        >= WORTH_A_ROW * total)
            .toList();
    out.section(
        "What to improve first (the total with one value halved or doubled, the pulse planned anew)");
    List<List<String>> rows = new ArrayList<>();
    for (Sensitivity s : worth.subList(0, Math.min(MOST_ROWS, worth.size()))) {
      rows.add(
          List.of(
              s.value(),
              Figures.probability(total - s.savedByHalving()),
              change(-s.savedByHalving(), total),
              Figures.probability(total - s.savedByDoubling()),
              change(-s.savedByDoubling(), total),
              advice(s, total)));
    }
    out.table(
        List.of(
            Column.left("value"),
            Column.right("if halved"),
            Column.right("change"),
            Column.right("if doubled"),
            Column.right("change"),
            Column.left("so")),
        rows);
    int others = content.sensitivities().size() - rows.size();
    if (others > 0) {
      out.sentence(
          others
              + (others == 1 ? " other value changes" : " other values change")
              + " the total by less than 1 % either way"
              + (worth.size() > MOST_ROWS ? ", or rank below these" : ""));
    }
  }

  private static String change(double difference, double total) {
    return total > 0 ? Figures.change(difference / total) : "";
  }

  private static String advice(Sensitivity s, double total) {
    if (s.best() < WORTH_A_ROW * total) {
      return "leave it";
    }
    return s.savedByHalving() >= s.savedByDoubling() ? "halve it" : "double it";
  }
}
