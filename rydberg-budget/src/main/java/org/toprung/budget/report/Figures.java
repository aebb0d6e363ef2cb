package org.toprung.budget.report;

import java.math.BigDecimal;
import java.math.MathContext;
import java.math.RoundingMode;
import java.util.Arrays;
import java.util.Locale;
import java.util.regex.Pattern;
import java.util.stream.Collectors;
import org.toprung.core.quantity.Frequency;
import org.toprung.core.quantity.Intensity;
import org.toprung.core.quantity.Length;
import org.toprung.core.quantity.Power;
import org.toprung.core.quantity.Time;

/** Numbers as people read them: a few significant digits and a unit. */
final class Figures {
  private static final int DIGITS = 4;
  private static final int VECTOR_DIGITS = 3;
  private static final Pattern DECIMAL = Pattern.compile("\\d+\\.\\d+(?:E-?\\d+)?");
  private static final double SMALLEST = 1e-10; // probability told from zero

  private Figures() {}

  static String of(Frequency value) {
    return Frequency.ofHertz(rounded(value.hertz())).toString();
  }

  static String of(Time value) {
    return Time.ofSeconds(rounded(value.seconds())).toString();
  }

  static String of(Power value) {
    return Power.ofWatts(rounded(value.watts())).toString();
  }

  static String of(Length value) {
    return Length.ofMetres(rounded(value.metres())).toString();
  }

  static String of(Intensity value) {
    return Intensity.ofWattsPerSquareMetre(rounded(value.wattsPerSquareMetre())).toString();
  }

  /** The components of a vector, in parentheses. */
  static String vector(double... components) {
    return Arrays.stream(components)
        .mapToObj(c -> number(c, VECTOR_DIGITS))
        .collect(Collectors.joining(", ", "(", ")"));
  }

  /** A wavelength: always in nanometres, to a picometre. */
  static String nanometres(Length value) {
    return String.format(Locale.ROOT, "%.3f nm", value.metres() * 1e9);
  }

  /** A frequency with its sign, for shifts and detunings. */
  static String signed(Frequency value) {
    return value.hertz() > 0 ? "+" + of(value) : of(value);
  }

  /** A probability in a column: three digits and a power of ten; nothing smaller than matters. */
  static String probability(double value) {
    if (Math.abs(value) < SMALLEST) {
      return value == 0 ? "0" : "<1e-10";
    }
    return String.format(Locale.ROOT, "%.2e", value);
  }

  /** A standard uncertainty of a probability: two digits say all it knows. */
  static String uncertainty(double value) {
    return value < SMALLEST ? probability(value) : String.format(Locale.ROOT, "%.1e", value);
  }

  /** A value to the second digit of its uncertainty. */
  static String measured(double value, double uncertainty) {
    if (!(uncertainty > 0)) {
      return number(value, DIGITS) + " ± 0";
    }
    BigDecimal known = new BigDecimal(uncertainty).round(new MathContext(2));
    BigDecimal rounded = new BigDecimal(value).setScale(known.scale(), RoundingMode.HALF_EVEN);
    return rounded.toPlainString() + " ± " + known.toPlainString();
  }

  static String percent(double fraction) {
    return number(100 * fraction, 3) + " %";
  }

  /** A part of a whole, to a tenth of a percent. */
  static String share(double fraction) {
    double percent = Math.rint(1000 * fraction) / 10 + 0.0; // no negative zero
    return String.format(Locale.ROOT, "%.1f %%", percent);
  }

  /** A relative change with its sign, to a percent. */
  static String change(double fraction) {
    double percent = Math.rint(100 * fraction);
    return percent == 0 ? "0 %" : String.format(Locale.ROOT, "%+.0f %%", percent);
  }

  static String number(double value, int digits) {
    BigDecimal rounded = new BigDecimal(value).round(new MathContext(digits));
    return rounded.signum() == 0 ? "0" : rounded.stripTrailingZeros().toPlainString();
  }

  /** A text with its decimal numbers rounded. */
  static String shortened(String text) {
    return DECIMAL.matcher(text).replaceAll(m -> number(Double.parseDouble(m.group()), DIGITS));
  }

  static double rounded(double value) {
    return new BigDecimal(value).round(new MathContext(DIGITS)).doubleValue();
  }
}
