package org.toprung.budget.bench;

import java.util.Objects;

/**
 * One number of a bench.
 *
 * @param value what it is
 * @param index 0, or the axis, or the step, from 0
 */
public record BenchEntry(BenchValue value, int index) {

  /**
   * Checks that there can be such a number.
   *
   * @param value what it is
   * @param index 0, or the axis, or the step, from 0
   * @throws IllegalArgumentException if the value has no number of that index
   */
  public BenchEntry {
    Objects.requireNonNull(value, "value");
    value.requireIndex(index);
  }

  /**
   * Name for people.
   *
   * @return such as {@code linewidth, step 1} or {@code trap frequency, z}
   */
  public String name() {
    switch (value.arity()) {
      case AXES:
        return value.words() + ", " + "xyz".charAt(index);
      case STEPS:
        return value.words() + ", step " + (index + 1);
      default:
        return value.words();
    }
  }
}
