package org.toprung.budget.report;

import java.util.ArrayList;
import java.util.List;

/** Reads comma-separated values by the grammar of RFC 4180, section 2. */
final class CsvText {
  private CsvText() {}

  static List<List<String>> parsed(String text) {
    List<List<String>> rows = new ArrayList<>();
    List<String> row = new ArrayList<>();
    StringBuilder cell = new StringBuilder();
    boolean quoted = false;
    for (int i = 0; i < text.length(); i++) {
      char c = text.charAt(i);
      boolean quoteFollows = i + 1 < text.length() && text.charAt(i + 1) == '"';
      if (quoted && c == '"' && quoteFollows) {
        cell.append('"');
        i++;
      } else if (c == '"') {
        quoted = !quoted;
      } else if (quoted || c != ',' && c != '\r') {
        cell.append(c);
      } else {
        row.add(cell.toString());
        cell.setLength(0);
        if (c == '\r') {
          i++; // the line feed
          rows.add(row);
          row = new ArrayList<>();
        }
      }
    }
    return rows;
  }
}
