package org.toprung.budget.scenario;

import java.util.ArrayList;
import java.util.List;

/**
 * Finds the lines of keys and items in a TOML text, which the parser that reads the values does not
 * tell.
 *
 * <p>The text has been accepted by that parser, so nothing is checked here. What cannot be followed
 * has no place: a message then goes without a line.
 */
final class TomlPlaces {
  private static final int END = -1;

  private final String text;
  private int at;
  private int line = 1;

  private TomlPlaces(String text) {
    this.text = text;
  }

  static Place of(String text) {
    Place root = Place.at(1);
    new TomlPlaces(text).document(root);
    return root;
  }

  private int peek() {
    return at < text.length() ? text.charAt(at) : END;
  }

  private void advance() {
    if (peek() == '\n') {
      line++;
    }
    at++;
  }

  private boolean skip(String expected) {
    if (!text.startsWith(expected, at)) {
      return false;
    }
    for (int i = 0; i < expected.length(); i++) {
      advance();
    }
    return true;
  }

  private void blanks() {
    while (peek() == ' ' || peek() == '\t') {
      advance();
    }
  }

  /** Skips what may stand between two entries: white space, comments and, in lists, commas. */
  private void gap() {
    while (peek() != END) {
      if (peek() == '#') {
        while (peek() != '\n' && peek() != END) {
          advance();
        }
      } else if (Character.isWhitespace(peek()) || peek() == ',') {
        advance();
      } else {
        return;
      }
    }
  }

  private void document(Place root) {
    Place table = root;
    for (gap(); peek() != END; gap()) {
      int before = at;
      if (skip("[[")) {
        table = header(root, true);
        skip("]]");
      } else if (skip("[")) {
        table = header(root, false);
        skip("]");
      } else {
        entry(table);
      }
      if (at == before) {
        return; // not to be followed any further
      }
    }
  }

  private Place header(Place root, boolean isArray) {
    int where = line;
    List<String> path = path();
    Place table = root;
    for (String key : path) {
      table = table.open().named(key, where);
    }
    return isArray ? table.added(where) : table.open();
  }

  private void entry(Place table) {
    int where = line;
    Place place = table;
    for (String key : path()) {
      place = place.named(key, where);
    }
    blanks();
    skip("=");
    blanks();
    value(place);
  }

  private List<String> path() {
    List<String> path = new ArrayList<>();
    do {
      blanks();
      path.add(key());
      blanks();
    } while (skip("."));
    return path;
  }

  private String key() {
    int from = at;
    if (peek() == '"' || peek() == '\'') {
      boolean escapes = peek() == '"';
      string();
      String inside = text.substring(from + 1, Math.max(from + 1, at - 1));
      return escapes ? unescaped(inside) : inside;
    }
    while (peek() != END && (Character.isLetterOrDigit(peek()) || peek() == '_' || peek() == '-')) {
      advance();
    }
    return text.substring(from, at);
  }

  private static String unescaped(String key) {
    StringBuilder plain = new StringBuilder();
    for (int i = 0; i < key.length(); i++) {
      char c = key.charAt(i);
      if (c != '\\' || i + 1 == key.length()) {
        plain.append(c);
        continue;
      }
      i++;
      switch (key.charAt(i)) {
        case 'b' -> plain.append('\b');
        case 't' -> plain.append('\t');
        case 'n' -> plain.append('\n');
        case 'f' -> plain.append('\f');
        case 'r' -> plain.append('\r');
        case 'u', 'U' -> {
          int digits = key.charAt(i) == 'u' ? 4 : 8;
          plain.appendCodePoint(Integer.parseInt(key.substring(i + 1, i + 1 + digits), 16));
          i += digits;
        }
        default -> plain.append(key.charAt(i));
      }
    }
    return plain.toString();
  }

  private void value(Place place) {
    if (peek() == '"' || peek() == '\'') {
      string();
    } else if (skip("[")) {
      list(place);
    } else if (skip("{")) {
      inlineTable(place);
    } else {
      while (peek() != END && ",]}#\n".indexOf(peek()) < 0) {
        advance();
      }
    }
  }

  private void list(Place place) {
    for (gap(); peek() != END && !skip("]"); gap()) {
      int before = at;
      value(place.added(line));
      if (at == before) {
        return;
      }
    }
  }

  private void inlineTable(Place place) {
    for (gap(); peek() != END && !skip("}"); gap()) {
      int before = at;
      entry(place);
      if (at == before) {
        return;
      }
    }
  }

  private void string() {
    String quote = text.substring(at, at + 1);
    boolean escapes = quote.equals("\"");
    boolean isLong = skip(quote.repeat(3));
    String end = isLong ? quote.repeat(3) : quote;
    if (!isLong) {
      skip(quote);
    }
    while (peek() != END && !skip(end)) {
      if (escapes && peek() == '\\') {
        advance();
      }
      advance();
    }
    if (isLong) {
      // one or two quotes may stand before the three that end the string
      while (text.startsWith(quote, at)) {
        advance();
      }
    }
  }
}
