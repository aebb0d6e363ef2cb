package org.toprung.budget.app;

import picocli.CommandLine.ITypeConverter;
import picocli.CommandLine.TypeConversionException;

/** Reads a number of shots that a check accepts. */
final class ShotCount implements ITypeConverter<Integer> {
  private static final int FEWEST_SHOTS = 2;
  private static final int MOST_SHOTS = 100_000_000;

  @Override
  public Integer convert(String text) {
    try {
      int shots = Integer.parseInt(text);
      if (shots >= FEWEST_SHOTS && shots <= MOST_SHOTS) {
        return shots;
      }
    } catch (NumberFormatException notANumber) {
      // refused below, like any other text
    }
    throw new TypeConversionException(
        "given " + text + "; allowed: a whole number from " + FEWEST_SHOTS + " to " + MOST_SHOTS);
  }
}
