package org.toprung.budget.bench;

import java.util.HashSet;
import java.util.Set;

/**
 * A door by which the world gets at the pulse; a simulation opens some of them.
 *
 * @param kind what happens
 * @param step index of the beam or laser, from 0, for kinds that each beam has of its own; {@value
 *     #COMMON} for the others
 */
public record Disturbance(Kind kind, int step) {
  /** Step of a disturbance that belongs to no single beam. */
  public static final int COMMON = -1;

  /** What can happen during a shot. */
  public enum Kind {
    /** Velocity of the atom along the light. */
    DOPPLER,
    /** Place of the atom in the beams, and pointing of the beams. */
    POSITION,
    /** Intensity of a beam from shot to shot. */
    INTENSITY(true),
    /** Intensity of a beam within a shot. */
    INTENSITY_SPECTRUM(true),
    /** White frequency noise of a laser. */
    LINEWIDTH(true),
    /** Frequency of a laser from shot to shot. */
    DRIFT(true),
    /** Frequency of a laser within a shot. */
    FREQUENCY_SPECTRUM(true),
    /** Magnetic field along the axis. */
    MAGNETIC_FIELD,
    /** Residual electric field. */
    ELECTRIC_FIELD,
    /** Light of the orthogonal polarization in a beam. */
    POLARIZATION(true),
    /** Length of the pulse. */
    PULSE_LENGTH,
    /** Setting of the laser frequency. */
    LASER_FREQUENCY,
    /** Intensity of a trap that stays on. */
    TRAP_INTENSITY,
    /** Decay of intermediate levels. */
    SCATTERING,
    /** Spontaneous decay of the Rydberg level. */
    SPONTANEOUS_DECAY,
    /** What blackbody radiation does to the Rydberg level. */
    BLACKBODY,
    /** Atoms that do not begin in the start. */
    PREPARATION,
    /** Outcomes that are read wrongly. */
    DETECTION;

    private final boolean perStep;

    Kind() {
      this(false);
    }

    Kind(boolean perStep) {
      this.perStep = perStep;
    }

    /**
     * Whether each beam or laser has one of its own.
     *
     * @return true for those
     */
    public boolean isPerStep() {
      return perStep;
    }
  }

  /**
   * Checks that kind and step go together.
   *
   * @param kind what happens
   * @param step index of the beam or laser from 0, or {@value #COMMON}
   * @throws IllegalArgumentException if the kind needs a step and none is given, or the reverse
   */
  public Disturbance {
    if (kind == null || (kind.isPerStep() ? step < 0 : step != COMMON)) {
      throw new IllegalArgumentException(
          "disturbance "
              + kind
              + " with step "
              + step
              + ": allowed are steps from 0 for what each beam has of its own, else "
              + COMMON);
    }
  }

  /**
   * Every disturbance there is.
   *
   * @param steps number of steps of the drive, at least 1
   * @return an immutable set
   * @throws IllegalArgumentException if there is no step
   */
  public static Set<Disturbance> all(int steps) {
    if (!(steps >= 1)) {
      throw new IllegalArgumentException(
          "disturbances of " + steps + " steps; allowed: at least 1 step");
    }
    Set<Disturbance> all = new HashSet<>();
    for (Kind kind : Kind.values()) {
      if (kind.isPerStep()) {
        for (int k = 0; k < steps; k++) {
          all.add(new Disturbance(kind, k));
        }
      } else {
        all.add(new Disturbance(kind, COMMON));
      }
    }
    return Set.copyOf(all);
  }
}
