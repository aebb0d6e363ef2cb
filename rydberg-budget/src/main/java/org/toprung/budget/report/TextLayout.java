package org.toprung.budget.report;

import java.util.List;
import java.util.StringJoiner;
import org.toprung.budget.report.Outline.Column;

/** An outline as a page of text that fits {@value Page#WIDTH} columns. */
final class TextLayout {
  private static final String INDENT = "  ";
  private static final int GAP = 2; // columns between cells
  private static final int NARROWEST = 24; // columns of the last cell of a row

  private final Page page = new Page();

  private TextLayout() {}

  static String of(Outline outline) {
    return new TextLayout().laidOut(outline);
  }

  private String laidOut(Outline outline) {
    page.title(outline.title());
    for (Outline.Section section : outline.sections()) {
      page.heading(section.heading());
      section.blocks().forEach(this::block);
    }
    return page.toString();
  }

  private void block(Outline.Block block) {
    if (block instanceof Outline.Fact fact) {
      page.value(fact.label(), fact.value());
    } else if (block instanceof Outline.Sentence sentence) {
      page.bullet(sentence.text());
    } else if (block instanceof Outline.Table table) {
      table(table);
    }
  }

  /** Cells as wide as the widest of their column; the last one is wrapped where it is long. */
  private void table(Outline.Table table) {
    List<Column> columns = table.columns();
    List<String> names = columns.stream().map(Column::name).toList();
    int[] widths = new int[columns.size() - 1];
    int room = Page.WIDTH - INDENT.length();
    for (int i = 0; i < widths.length; i++) {
      widths[i] = width(names.get(i));
      for (List<String> row : table.rows()) {
        widths[i] = Math.max(widths[i], width(row.get(i)));
      }
      room -= widths[i] + GAP;
    }
    int lastWidth = lastWidth(table);
    if (room < Math.min(NARROWEST, lastWidth)) {
      table.rows().forEach(row -> page.value(row.get(0), named(names, row)));
      return;
    }
    row(columns, widths, names, lastWidth);
    table.rows().forEach(row -> row(columns, widths, row, lastWidth));
  }

  /** A row that is too wide for a table: its cells one after the other, with their names. */
  private static String named(List<String> names, List<String> row) {
    StringJoiner text = new StringJoiner("; ");
    for (int i = 1; i < row.size(); i++) {
      if (!row.get(i).isEmpty()) {
        text.add(names.get(i) + " " + row.get(i));
      }
    }
    return text.toString();
  }

  private static int lastWidth(Outline.Table table) {
    int last = table.columns().size() - 1;
    int widest = width(table.columns().get(last).name());
    for (List<String> row : table.rows()) {
      widest = Math.max(widest, width(row.get(last)));
    }
    return widest;
  }

  private void row(List<Column> columns, int[] widths, List<String> cells, int lastWidth) {
    StringBuilder start = new StringBuilder(INDENT);
    for (int i = 0; i < widths.length; i++) {
      start.append(placed(columns.get(i), cells.get(i), widths[i])).append(" ".repeat(GAP));
    }
    String last = cells.get(widths.length);
    boolean right = columns.get(widths.length).isRight();
    if (right) {
      start.append(" ".repeat(lastWidth - width(last)));
    }
    page.hanging(start.toString(), last);
  }

  private static String placed(Column column, String cell, int width) {
    String gap = " ".repeat(width - width(cell));
    return column.isRight() ? gap + cell : cell + gap;
  }

  private static int width(String cell) {
    return cell.codePointCount(0, cell.length());
  }
}
