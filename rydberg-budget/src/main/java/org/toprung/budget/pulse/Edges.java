package org.toprung.budget.pulse;

import org.apache.commons.numbers.gamma.Erfc;
import org.apache.commons.numbers.gamma.InverseErf;

/**
 * Rise and fall of a modulator's field, 10–90 %.
 *
 * <p>A step is the normal distribution function, cut two rise times before and after its middle
 * (5.1 standard deviations) and stretched there by 1.5·10⁻⁷ so that it begins at exactly 0 and ends
 * at exactly 1. Its difference to an abrupt step is odd about the middle: the area of the field is
 * kept. The area of a product of M such fields is kept by {@link #delay}.
 *
 * @param riseSeconds time from 10 % to 90 % of an upward step, s
 * @param fallSeconds time from 90 % to 10 % of a downward step, s
 */
record Edges(double riseSeconds, double fallSeconds) {
  static final Edges ABRUPT = new Edges(0, 0);

  private static final double REACH = 2; // rise times
  // with v = 2 z t/rise, the step is (1 + erf v)/2
  private static final double TWO_Z = 2 * InverseErf.value(0.8);
  private static final double END = REACH * TWO_Z;
  private static final double CUT = 0.5 * Erfc.value(END);

  /** ∫ S(1 − S) dt over the cut and stretched step, in rise times. */
  private static final double LACK = lack();

  private static double lack() {
    double tails = Math.exp(-END * END) / Math.sqrt(Math.PI) - END * Erfc.value(END);
    double whole = 1 / Math.sqrt(2 * Math.PI) - tails; // erf steps have ∫ S(1 − S) dv = 1/√(2π)
    return (whole - 2 * END * CUT * (1 - CUT)) / ((1 - 2 * CUT) * (1 - 2 * CUT)) / TWO_Z;
  }

  boolean isAbrupt() {
    return riseSeconds == 0 && fallSeconds == 0;
  }

  /** The shortest time between jumps at which the field still reaches the level between them. */
  double shortestSeconds() {
    return REACH * Math.max(riseSeconds, fallSeconds);
  }

  private double seconds(double jump) {
    if (jump == 0) {
      return 0;
    }
    return jump > 0 ? riseSeconds : fallSeconds;
  }

  /** Time before and after the middle of a step within which the field moves. */
  double reach(double jump) {
    return REACH * seconds(jump);
  }

  /**
   * What the edge adds to the field of an abrupt step, at a time after the middle (negative:
   * before). Never more than half the jump.
   */
  double excess(double jump, double after) {
    double reach = reach(jump);
    double distance = Math.abs(after);
    if (!(distance < reach)) {
      return 0;
    }
    double rest = (0.5 * Erfc.value(TWO_Z * distance / seconds(jump)) - CUT) / (1 - 2 * CUT);
    return after < 0 ? jump * rest : -jump * rest;
  }

  /**
   * How much later than the programmed jump the middle of the step must come for the area of the
   * product of M equal fields to be kept.
   *
   * <p>With f the field before, d the jump and S the step, ∫[(f + dS)^M − abrupt] dt is −d²J for M
   * = 2 and −(3/2)d²(2f + d)J for M = 3, J = ∫S(1 − S)dt, since the odd parts integrate to zero;
   * the delay times the jump of the product makes up for it.
   */
  double delay(double before, double after, int fields) {
    double jump = after - before;
    double time = LACK * seconds(jump) * jump;
    switch (fields) {
      case 1:
        return 0;
      case 2:
        return -time / (before + after);
      default:
        return -1.5 * time * (before + after) / (before * before + before * after + after * after);
    }
  }
}
