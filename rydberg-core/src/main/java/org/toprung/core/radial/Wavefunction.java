package org.toprung.core.radial;

/**
 * A normalized radial wavefunction P(r) = r R(r) as a table, ∫P² dr = 1. Immutable; positive near r
 * = 0.
 */
public final class Wavefunction {
  private final double[] radiusA0;
  private final double[] value;

  /** Takes over the arrays. */
  Wavefunction(double[] radiusA0, double[] value) {
    this.radiusA0 = radiusA0;
    this.value = value;
  }

  /**
   * The number of points.
   *
   * @return at least 2
   */
  public int size() {
    return radiusA0.length;
  }

  /**
   * The radii, rising, from the inner cut outwards; the wave is zero outside them.
   *
   * @return a new array of radii in a0
   */
  public double[] radiiA0() {
    return radiusA0.clone();
  }

  /**
   * The wave at the radii.
   *
   * @return a new array of P in a0^−1/2
   */
  public double[] values() {
    return value.clone();
  }
}
