package org.toprung.angular;

/** A rule without which a Wigner symbol or a Clebsch-Gordan coefficient vanishes identically. */
public enum SelectionRule {
  /** Three coupled angular momenta must form a triangle: |a − b| ≤ c ≤ a + b. */
  TRIANGLE,

  /** Three coupled angular momenta must add up to an integer. */
  INTEGER_PERIMETER,

  /** The projections of a 3j symbol must add up to zero; m1 + m2 = m for Clebsch-Gordan. */
  PROJECTION_SUM,

  /** A projection must lie within its angular momentum: |m| ≤ j. */
  PROJECTION_RANGE,

  /** An angular momentum and its projection must differ by an integer. */
  PROJECTION_PARITY;

  /**
   * A broken rule, with the numbers that break it.
   *
   * @param rule the rule
   * @param message a sentence for people that names the rule and the numbers
   */
  public record Violation(SelectionRule rule, String message) {}
}
