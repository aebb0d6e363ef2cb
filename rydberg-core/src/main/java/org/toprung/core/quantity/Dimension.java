package org.toprung.core.quantity;

import java.math.BigDecimal;
import java.util.List;
import java.util.Locale;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import java.util.stream.Collectors;

/**
 * The one table of units. Every unit is a power of ten times the SI unit, so a decimal text
 * converts to SI with a single rounding and {@code parse(x.toString())} gives back x exactly.
 */
enum Dimension {
  FREQUENCY(
      "frequency", unit("THz", 12), unit("GHz", 9), unit("MHz", 6), unit("kHz", 3), unit("Hz", 0)),
  POWER("power", unit("W", 0), unit("mW", -3), unit("uW", -6), unit("nW", -9)),
  INTENSITY(
      "intensity",
      unit("kW/cm2", 7),
      unit("W/mm2", 6),
      unit("W/cm2", 4),
      unit("mW/mm2", 3),
      unit("mW/cm2", 1),
      unit("W/m2", 0)),
  LENGTH("length", unit("m", 0), unit("cm", -2), unit("mm", -3), unit("um", -6), unit("nm", -9)),
  MAGNETIC_FIELD(
      "magnetic field",
      unit("T", 0),
      unit("mT", -3),
      unit("G", -4),
      unit("uT", -6),
      unit("mG", -7)),
  ELECTRIC_FIELD("electric field", unit("V/cm", 2), unit("V/m", 0), unit("mV/cm", -1)),
  TEMPERATURE("temperature", unit("K", 0), unit("mK", -3), unit("uK", -6), unit("nK", -9)),
  TIME("time", unit("s", 0), unit("ms", -3), unit("us", -6), unit("ns", -9));

  /** A unit and the power of ten that converts it to SI. */
  record Unit(String symbol, int exponent) {}

  private static final Pattern NUMBER_AND_UNIT =
      Pattern.compile("([+-]?(?:\\d+(?:\\.\\d*)?|\\.\\d+)(?:[eE][+-]?\\d{1,3})?)\\s*(\\S*)");
  private static final int LARGEST_PLAIN_EXPONENT = 9;

  private final String label;
  private final List<Unit> units;

  /** Units run from the largest to the smallest. */
  Dimension(String label, Unit... units) {
    this.label = label;
    this.units = List.of(units);
  }

  private static Unit unit(String symbol, int exponent) {
    return new Unit(symbol, exponent);
  }

  /**
   * The value in SI of a number of the named unit of this table. The shortest decimal form of the
   * number is converted, as if it had been written out, so factories and texts agree exactly.
   */
  double toSi(double value, String symbol) {
    return new BigDecimal(Double.toString(requireFinite(value, symbol)))
        .scaleByPowerOfTen(find(symbol).exponent())
        .doubleValue();
  }

  /** Refuses what is not a finite number. */
  double requireFinite(double value, String symbol) {
    if (Math.abs(value) <= Double.MAX_VALUE) {
      return value;
    }
    throw new IllegalArgumentException(
        String.format(
            Locale.ROOT, "%s must be a finite number, given %s %s", label, value, symbol));
  }

  double parse(String text) {
    Matcher matcher = NUMBER_AND_UNIT.matcher(text.strip());
    if (!matcher.matches()) {
      throw refused(text, "must be a number and a unit");
    }
    String symbol = matcher.group(2).replace('\u00b5', 'u').replace('\u03bc', 'u');
    if (symbol.isEmpty()) {
      throw refused(text, "has no unit");
    }
    Unit unit =
        units.stream()
            .filter(u -> u.symbol().equals(symbol))
            .findAny()
            .orElseThrow(() -> refused(text, "has the unknown unit \"" + matcher.group(2) + "\""));
    double si = new BigDecimal(matcher.group(1)).scaleByPowerOfTen(unit.exponent()).doubleValue();
    if (!(Math.abs(si) <= Double.MAX_VALUE)) {
      throw refused(text, "is too large");
    }
    return si;
  }

  private IllegalArgumentException refused(String text, String why) {
    String allowed = units.stream().map(Unit::symbol).collect(Collectors.joining(", "));
    return new IllegalArgumentException(
        label + " \"" + text + "\" " + why + "; allowed: a number and one of the units " + allowed);
  }

  private Unit find(String symbol) {
    return units.stream().filter(u -> u.symbol().equals(symbol)).findAny().orElseThrow();
  }

  /** The value in the largest unit that leaves at least one unit. */
  String format(double si) {
    Unit base = units.stream().filter(u -> u.exponent() == 0).findAny().orElseThrow();
    Unit best = base;
    if (si != 0) {
      BigDecimal size = new BigDecimal(Double.toString(Math.abs(si)));
      best =
          units.stream()
              .filter(u -> size.scaleByPowerOfTen(-u.exponent()).compareTo(BigDecimal.ONE) >= 0)
              .findFirst()
              .orElse(units.get(units.size() - 1));
    }
    BigDecimal number =
        new BigDecimal(Double.toString(si))
            .scaleByPowerOfTen(-best.exponent())
            .stripTrailingZeros();
    int magnitude = number.precision() - number.scale();
    String digits =
        Math.abs(magnitude) <= LARGEST_PLAIN_EXPONENT ? number.toPlainString() : number.toString();
    return digits + " " + best.symbol();
  }
}
