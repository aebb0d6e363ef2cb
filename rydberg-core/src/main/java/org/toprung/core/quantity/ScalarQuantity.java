package org.toprung.core.quantity;

/**
 * What all quantities share: one finite SI value, equality and order by it, and a text with a unit.
 *
 * @param <Q> the quantity itself, so that only like is compared with like
 */
abstract class ScalarQuantity<Q extends ScalarQuantity<Q>> implements Comparable<Q> {
  private final Dimension dimension;

  /** The value in the SI unit of the dimension. */
  final double si;

  ScalarQuantity(Dimension dimension, double si, String unit) {
    this.dimension = dimension;
    // adding zero turns -0.0 into 0.0, so that equal numbers are equal quantities
    this.si = dimension.requireFinite(si, unit) + 0.0;
  }

  /** {@inheritDoc} */
  @Override
  public final int compareTo(Q other) {
    return Double.compare(si, other.si);
  }

  /** {@inheritDoc} */
  @Override
  public final boolean equals(Object other) {
    return other != null && other.getClass() == getClass() && ((ScalarQuantity<?>) other).si == si;
  }

  /** {@inheritDoc} */
  @Override
  public final int hashCode() {
    return Double.hashCode(si);
  }

  /**
   * The value and a unit, in a form the {@code parse} method of the class reads back exactly.
   *
   * @return for example "4 G"
   */
  @Override
  public final String toString() {
    return dimension.format(si);
  }
}
