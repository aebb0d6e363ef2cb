package org.toprung.core.quantity;

import java.util.Locale;

/**
 * A number with its uncertainty. The unit is said by whoever hands out the estimate.
 *
 * @param value the best value, finite
 * @param uncertainty one standard deviation in the unit of the value, finite and not negative
 */
public record Estimate(double value, double uncertainty) {
  /**
   * Checks the parts.
   *
   * @param value the best value
   * @param uncertainty one standard deviation
   * @throws IllegalArgumentException if the value is not finite, or the uncertainty is not finite
   *     or is negative
   */
  public Estimate {
    if (!(Math.abs(value) <= Double.MAX_VALUE)) {
      throw new IllegalArgumentException(
          String.format(Locale.ROOT, "value of an estimate must be finite, given %s", value));
    }
    if (!(uncertainty >= 0 && uncertainty <= Double.MAX_VALUE)) {
      throw new IllegalArgumentException(
          String.format(
              Locale.ROOT,
              "uncertainty of an estimate must be finite and not negative, given %s",
              uncertainty));
    }
  }

  /**
   * The uncertainty in units of the value.
   *
   * @return uncertainty / |value|; 0 where the uncertainty is 0
   * @throws ArithmeticException if the value is 0 and the uncertainty is not
   */
  public double relative() {
    if (uncertainty == 0) {
      return 0;
    }
    if (value == 0) {
      throw new ArithmeticException(
          "relative uncertainty of 0 ± " + uncertainty + " does not exist");
    }
    return uncertainty / Math.abs(value);
  }
}
