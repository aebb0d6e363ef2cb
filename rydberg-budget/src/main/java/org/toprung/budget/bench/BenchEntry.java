package org.toprung.budget.bench;

import java.util.Objects;
import java.util.Set;
import org.toprung.budget.bench.Disturbance.Kind;

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

  /**
   * What this number matters for.
   *
   * @return the disturbances that it enters, an immutable set
   */
  public Set<Disturbance> disturbances() {
    return switch (value) {
      case TEMPERATURE, TRAP_FREQUENCY -> Set.of(common(Kind.DOPPLER), common(Kind.POSITION));
      case POINTING -> Set.of(common(Kind.POSITION));
      case ENVIRONMENT_TEMPERATURE -> Set.of(common(Kind.BLACKBODY));
      case MAGNETIC_NOISE -> Set.of(common(Kind.MAGNETIC_FIELD));
      case ELECTRIC_FIELD -> Set.of(common(Kind.ELECTRIC_FIELD));
      case LENGTH_ERROR -> Set.of(common(Kind.PULSE_LENGTH));
      case FREQUENCY_ERROR -> Set.of(common(Kind.LASER_FREQUENCY));
      case TRAP_INTENSITY_NOISE -> Set.of(common(Kind.TRAP_INTENSITY));
      case PREPARATION_ERROR -> Set.of(common(Kind.PREPARATION));
      case DETECTION_ERROR -> Set.of(common(Kind.DETECTION));
      case LINEWIDTH -> Set.of(new Disturbance(Kind.LINEWIDTH, index));
      case DRIFT -> Set.of(new Disturbance(Kind.DRIFT, index));
      case INTENSITY_NOISE -> Set.of(new Disturbance(Kind.INTENSITY, index));
      case POLARIZATION_IMPURITY -> Set.of(new Disturbance(Kind.POLARIZATION, index));
      case FREQUENCY_NOISE_DENSITY -> Set.of(new Disturbance(Kind.FREQUENCY_SPECTRUM, index));
      case INTENSITY_NOISE_DENSITY -> Set.of(new Disturbance(Kind.INTENSITY_SPECTRUM, index));
    };
  }

  private static Disturbance common(Kind kind) {
    return new Disturbance(kind, Disturbance.COMMON);
  }
}
