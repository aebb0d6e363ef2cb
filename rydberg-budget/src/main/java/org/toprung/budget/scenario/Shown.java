package org.toprung.budget.scenario;

import com.fasterxml.jackson.databind.JsonNode;

/** How values of a scenario are shown in messages: on one line, and not at any length. */
final class Shown {
  private static final int LONGEST = 60; // characters of a value

  private Shown() {}

  /** The value as it may have stood in the file, with its type where that is not plain to see. */
  static String value(JsonNode node) {
    if (node.isObject()) {
      return "a table";
    }
    String text = node.toString();
    return text.length() <= LONGEST ? text : text.substring(0, LONGEST) + "...";
  }

  /** The text with control characters written out, so that it cannot break a line or a terminal. */
  static String onOneLine(String text) {
    StringBuilder line = new StringBuilder(text.length());
    text.codePoints()
        .forEach(
            c -> {
              if (c == '\n') {
                line.append("\\n");
              } else if (isControl(c)) {
                line.append(String.format("\\u%04x", c));
              } else {
                line.appendCodePoint(c);
              }
            });
    return line.toString();
  }

  /** Whether a character would act on a terminal or break a line instead of being seen. */
  static boolean isControl(int codePoint) {
    return switch (Character.getType(codePoint)) {
      case Character.CONTROL,
          Character.FORMAT,
          Character.SURROGATE,
          Character.LINE_SEPARATOR,
          Character.PARAGRAPH_SEPARATOR ->
          true;
      default -> false;
    };
  }
}
