package org.toprung.budget.scenario;

import java.util.Optional;
import java.util.function.Function;
import java.util.regex.Matcher;
import java.util.regex.Pattern;

/**
 * What a bench value says: a quantity, and how well it is known.
 *
 * @param quantity the quantity
 * @param uncertainty its standard uncertainty, if stated
 */
record Stated<Q>(Q quantity, Optional<Q> uncertainty) {
  private static final String UNSIGNED = "(?:\\d+(?:\\.\\d*)?|\\.\\d+)(?:[eE][+-]?\\d{1,3})?";
  private static final Pattern NUMBER = Pattern.compile("[+-]?" + UNSIGNED);
  private static final Pattern PLUS_MINUS =
      Pattern.compile("([+-]?" + UNSIGNED + ")\\s*(?:\u00b1|\\+-)\\s*(" + UNSIGNED + ")\\s*(\\S*)");

  /** Reads a text such as "6 uK", "6 ± 1 uK" or "6 +- 1 uK". */
  static <Q> Stated<Q> quantity(Value value, Function<String, Q> parser, String example) {
    String text = value.text("text such as \"" + example + "\"").strip();
    if (!hasSign(text)) {
      return new Stated<>(value.parsed(parser, example), Optional.empty());
    }
    String withSpread = example.replaceFirst(" ", " \u00b1 1 ");
    Matcher parts =
        parts(value, text, "text such as \"" + example + "\" or \"" + withSpread + "\"");
    String unit = " " + parts.group(3);
    return value.guarded(
        () ->
            new Stated<>(
                parser.apply(parts.group(1) + unit),
                Optional.of(parser.apply(parts.group(2) + unit))));
  }

  /** Reads a number, or a text such as "0.004 ± 0.001". */
  static Stated<Double> ratio(Value value) {
    String allowed = "a number from 0 to 0.5";
    if (!value.isText()) {
      return new Stated<>(value.number(allowed), Optional.empty());
    }
    String text = allowed + ", or a text such as \"0.004 \u00b1 0.001\"";
    Matcher parts = parts(value, value.text(text).strip(), text);
    if (!parts.group(3).isEmpty()) {
      throw value.refused(text + ", without a unit");
    }
    return new Stated<>(
        Double.valueOf(parts.group(1)), Optional.of(Double.valueOf(parts.group(2))));
  }

  /** Reads a plain number of a line of data. */
  static double number(String text) {
    double number = NUMBER.matcher(text).matches() ? Double.parseDouble(text) : Double.NaN;
    if (!(Math.abs(number) <= Double.MAX_VALUE)) {
      throw new IllegalArgumentException("allowed: a finite number");
    }
    return number;
  }

  private static boolean hasSign(String text) {
    return text.contains("\u00b1") || text.contains("+-");
  }

  private static Matcher parts(Value value, String text, String allowed) {
    Matcher parts = PLUS_MINUS.matcher(text);
    if (!parts.matches()) {
      throw value.refused(allowed);
    }
    return parts;
  }
}
