package org.toprung.budget.report;

import java.util.List;

/** Text that is built line by line and never gets wider than {@value #WIDTH} columns. */
final class Page {
  static final int WIDTH = 100;

  private static final int INDENT = 2;
  private static final int LABEL = 26; // columns of the name of a value

  private final StringBuilder text = new StringBuilder();

  void title(String title) {
    wrap(title, WIDTH).forEach(this::line);
    line("=".repeat(Math.min(WIDTH, title.codePointCount(0, title.length()))));
  }

  void heading(String heading) {
    line("");
    line(heading);
  }

  /** A named value; a long one goes on below its beginning. */
  void value(String label, String value) {
    hanging(" ".repeat(INDENT) + padded(label, LABEL), value);
  }

  /** A sentence of a list. */
  void bullet(String sentence) {
    hanging(" ".repeat(INDENT) + "- ", sentence);
  }

  /** A row of a table: the cells as they stand, then text that is wrapped in the last column. */
  void hanging(String start, String rest) {
    int column = start.codePointCount(0, start.length());
    String lead = start;
    for (String part : wrap(rest, WIDTH - column)) {
      line(lead + part);
      lead = " ".repeat(column);
    }
  }

  static String padded(String cell, int columns) {
    return cell + " ".repeat(Math.max(1, columns - cell.codePointCount(0, cell.length())));
  }

  static String right(String cell, int columns) {
    return " ".repeat(Math.max(0, columns - cell.codePointCount(0, cell.length()))) + cell;
  }

  private void line(String line) {
    text.append(line.stripTrailing()).append('\n');
  }

  private static List<String> wrap(String text, int columns) {
    return Lines.wrapped(text, columns, line -> line.codePointCount(0, line.length()));
  }

  @Override
  public String toString() {
    return text.toString();
  }
}
