package org.toprung.budget.response;

import java.util.Locale;

/**
 * Something a pulse reacts to.
 *
 * @param kind what is turned
 * @param step index of the laser or beam from 0; 0 where the kind has no steps
 */
public record Knob(Kind kind, int step) {

  /** What can be turned. */
  public enum Kind {
    /**
     * Effective Rabi frequency, relative change, light shifts unchanged. Two-level systems only.
     */
    AMPLITUDE,
    /** Frequency of a laser, Hz. */
    FREQUENCY,
    /** Intensity of a beam, relative change: coupling and light shift together. */
    INTENSITY
  }

  /**
   * Checks the index.
   *
   * @param kind what is turned
   * @param step index of the laser or beam from 0
   * @throws IllegalArgumentException if the index is negative
   */
  public Knob {
    if (!(step >= 0)) {
      throw new IllegalArgumentException("steps count from 0, there is no step " + step);
    }
  }

  /**
   * The effective Rabi frequency.
   *
   * @return the knob
   */
  public static Knob amplitude() {
    return new Knob(Kind.AMPLITUDE, 0);
  }

  /**
   * The frequency of a laser.
   *
   * @param laser index of its step from 0
   * @return the knob
   * @throws IllegalArgumentException if the index is negative
   */
  public static Knob frequency(int laser) {
    return new Knob(Kind.FREQUENCY, laser);
  }

  /**
   * The intensity of a beam.
   *
   * @param beam index of its step from 0
   * @return the knob
   * @throws IllegalArgumentException if the index is negative
   */
  public static Knob intensity(int beam) {
    return new Knob(Kind.INTENSITY, beam);
  }

  @Override
  public String toString() {
    String name = kind.name().toLowerCase(Locale.ROOT);
    return kind == Kind.AMPLITUDE ? name : name + " " + (step + 1);
  }
}
