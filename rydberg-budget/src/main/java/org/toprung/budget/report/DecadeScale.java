package org.toprung.budget.report;

import java.util.stream.DoubleStream;

/** A logarithmic scale that begins and ends at powers of ten. */
final class DecadeScale {
  private static final int FEWEST = 3; // decades
  private static final int MOST = 5;
  private static final double NOTHING = 1e-9; // a probability not worth a decade

  private final int first; // powers of ten
  private final int last;

  private DecadeScale(int first, int last) {
    this.first = first;
    this.last = last;
  }

  /** The decades from a low to a high positive value; at most so many, the low ones left out. */
  static DecadeScale spanning(double low, double high, int most) {
    int last = (int) Math.ceil(Math.log10(high) - 1e-9);
    int first = (int) Math.floor(Math.log10(low) + 1e-9);
    return new DecadeScale(Math.min(last - 1, Math.max(first, last - most)), last);
  }

  /**
   * An axis for probabilities on which the largest value ends, at most at probability 1, and on
   * which as many of the small ones begin as five decades hold.
   */
  static DecadeScale covering(double... values) {
    double largest = DoubleStream.of(values).reduce(NOTHING, Math::max);
    double smallest = DoubleStream.of(values).filter(v -> v > NOTHING).min().orElse(largest);
    int last = Math.min(0, (int) Math.ceil(Math.log10(largest)));
    // one below the decade of a value that is a power of ten itself, which else had no length
    int wanted = (int) Math.ceil(Math.log10(smallest)) - 1;
    return new DecadeScale(Math.min(last - FEWEST, Math.max(last - MOST, wanted)), last);
  }

  int first() {
    return first;
  }

  int last() {
    return last;
  }

  /** Whether a value lies on the axis, not beyond its lower end. */
  boolean reaches(double value) {
    return value > lowest();
  }

  double lowest() {
    return Math.pow(10, first);
  }

  /** Where a value lies: 0 at the lower end of the axis and below, 1 at the upper end and above. */
  double fraction(double value) {
    if (!reaches(value)) {
      return 0;
    }
    return Math.min(1, (Math.log10(value) - first) / (last - first));
  }
}
