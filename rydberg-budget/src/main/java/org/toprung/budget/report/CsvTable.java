package org.toprung.budget.report;

import java.util.List;
import java.util.stream.Collectors;

/**
 * Rows of comma-separated values by RFC 4180: lines end in CR LF, cells are quoted where needed.
 */
final class CsvTable {
  private final StringBuilder text = new StringBuilder();
  private final int columns;

  CsvTable(List<String> header) {
    this.columns = header.size();
    row(header);
  }

  /** Adds a row. */
  void row(List<String> cells) {
    if (cells.size() != columns) {
      throw new IllegalArgumentException(cells + " has not " + columns + " cells");
    }
    text.append(cells.stream().map(CsvTable::quoted).collect(Collectors.joining(",")))
        .append("\r\n");
  }

  /** A number that comes back exactly. */
  static String number(String what, double value) {
    if (!(Math.abs(value) <= Double.MAX_VALUE)) {
      throw new IllegalStateException(what + " is " + value + ", not finite");
    }
    return Double.toString(value + 0.0); // no negative zero
  }

  private static String quoted(String cell) {
    boolean plain = cell.chars().noneMatch(c -> c == ',' || c == '"' || c == '\r' || c == '\n');
    return plain ? cell : '"' + cell.replace("\"", "\"\"") + '"';
  }

  @Override
  public String toString() {
    return text.toString();
  }
}
