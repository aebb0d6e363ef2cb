package org.toprung.budget.report;

import java.util.ArrayList;
import java.util.List;
import java.util.function.ToDoubleFunction;

/** Breaks text into lines, whatever its width is measured in. */
final class Lines {
  private static final String ELLIPSIS = "…";

  private Lines() {}

  /**
   * Breaks at spaces, but not before a percent sign, or inside a word that is wider than a whole
   * line.
   */
  static List<String> wrapped(String text, double room, ToDoubleFunction<String> width) {
    List<String> lines = new ArrayList<>();
    String line = "";
    for (String word : text.strip().split(" +(?![ %])")) {
      String longer = line.isEmpty() ? word : line + " " + word;
      if (width.applyAsDouble(longer) <= room) {
        line = longer;
        continue;
      }
      if (!line.isEmpty()) {
        lines.add(line);
      }
      String rest = word;
      while (width.applyAsDouble(rest) > room) {
        String start = fitting(rest, room, width);
        lines.add(start);
        rest = rest.substring(start.length());
      }
      line = rest;
    }
    lines.add(line);
    return lines;
  }

  /** At most so many lines; the last one tells by an ellipsis that something is missing. */
  static List<String> wrapped(
      String text, double room, int mostLines, ToDoubleFunction<String> width) {
    List<String> all = wrapped(text, room, width);
    if (all.size() <= mostLines) {
      return all;
    }
    List<String> lines = new ArrayList<>(all.subList(0, mostLines));
    double left = room - width.applyAsDouble(ELLIPSIS);
    String last = fitting(lines.get(mostLines - 1), left, width).stripTrailing();
    lines.set(mostLines - 1, last + ELLIPSIS);
    return lines;
  }

  /** The longest start that fits, at least one character. */
  private static String fitting(String text, double room, ToDoubleFunction<String> width) {
    int end = text.offsetByCodePoints(0, 1);
    while (end < text.length()) {
      int next = text.offsetByCodePoints(end, 1);
      if (width.applyAsDouble(text.substring(0, next)) > room) {
        break;
      }
      end = next;
    }
    return text.substring(0, end);
  }
}
