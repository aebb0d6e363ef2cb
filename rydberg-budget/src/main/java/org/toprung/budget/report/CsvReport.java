package org.toprung.budget.report;

import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.function.Function;
import java.util.stream.Collectors;
import org.toprung.budget.CauseCheck;
import org.toprung.budget.CauseEntry;

/**
 * The report for spreadsheets: comma-separated values by RFC 4180, one row for each cause, largest
 * first. Errors are probabilities; numbers are written so that they come back exactly. The cells of
 * the simulation are empty for causes that it did not take alone.
 *
 * <p>The errors add up to the total only but for the overlap of the causes, which {@link
 * TextReport} and {@link JsonReport} give.
 */
public final class CsvReport {
  private static final List<String> HEADER =
      List.of(
          "cause",
          "error (probability)",
          "uncertainty (probability)",
          "uncertainty from atomic data (probability)",
          "uncertainty from bench values (probability)",
          "share of the sum (fraction)",
          "fate",
          "place",
          "simulated alone (probability)",
          "standard error (probability)",
          "simulation agrees (true or false)",
          "lever",
          "source");

  private CsvReport() {}

  /**
   * Renders the report.
   *
   * @param content what to tell about
   * @return a header and one row for each cause, each ended by CR LF
   * @throws IllegalStateException if a number of the budget is not finite
   */
  public static String render(ReportContent content) {
    Map<String, CauseCheck> checks =
        content.check().causes().stream()
            .collect(Collectors.toMap(CauseCheck::cause, Function.identity()));
    CsvTable table = new CsvTable(HEADER);
    for (CauseEntry cause : content.budget().causes()) {
      Optional<CauseCheck> check = Optional.ofNullable(checks.get(cause.cause()));
      table.row(
          List.of(
              cause.cause(),
              CsvTable.number(cause.cause(), cause.error()),
              CsvTable.number(cause.cause(), cause.uncertainty()),
              CsvTable.number(cause.cause(), cause.atomicUncertainty()),
              CsvTable.number(cause.cause(), cause.benchUncertainty()),
              CsvTable.number(cause.cause(), content.share(cause.error())),
              cause.fate().kind().word(),
              cause.fate().place(),
              check.map(c -> CsvTable.number(c.cause(), c.simulated())).orElse(""),
              check.map(c -> CsvTable.number(c.cause(), c.standardError())).orElse(""),
              check.map(c -> Boolean.toString(c.agrees())).orElse(""),
              cause.lever(),
              cause.source()));
    }
    return table.toString();
  }
}
