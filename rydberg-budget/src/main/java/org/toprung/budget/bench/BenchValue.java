package org.toprung.budget.bench;

import java.util.Locale;

/** A kind of number that a {@link Bench} holds. */
public enum BenchValue {
  /** Temperature of the atom, K. */
  TEMPERATURE(Arity.ONE, "K", 0, Double.MAX_VALUE),
  /** Frequencies of the trap along lab x, y and z, Hz. */
  TRAP_FREQUENCY(Arity.AXES, "Hz", 0, Double.MAX_VALUE),
  /** Temperature of the walls that the Rydberg atom sees, K. */
  ENVIRONMENT_TEMPERATURE(Arity.ONE, "K", 0, Double.MAX_VALUE),
  /** Root mean square of the magnetic field along the axis, T. */
  MAGNETIC_NOISE(Arity.ONE, "T", 0, Double.MAX_VALUE),
  /** Root mean square length of the residual electric field, V/m. */
  ELECTRIC_FIELD(Arity.ONE, "V/m", 0, Double.MAX_VALUE),
  /** Lorentzian full width of each laser, Hz. */
  LINEWIDTH(Arity.STEPS, "Hz", 0, Double.MAX_VALUE),
  /** Root mean square frequency error of each laser from shot to shot, Hz. */
  DRIFT(Arity.STEPS, "Hz", 0, Double.MAX_VALUE),
  /** Relative root mean square intensity noise of each beam from shot to shot. */
  INTENSITY_NOISE(Arity.STEPS, "", 0, 0.5),
  /** Root mean square displacement of each beam, in each direction across it, m. */
  POINTING(Arity.STEPS, "m", 0, Double.MAX_VALUE),
  /** Part of the intensity of each beam in the orthogonal polarization, of unknown phase. */
  POLARIZATION_IMPURITY(Arity.STEPS, "", 0, 0.5),
  /** Relative root mean square error of the length of the pulse. */
  LENGTH_ERROR(Arity.ONE, "", 0, 0.5),
  /** Root mean square error of the frequency the laser is set to, Hz. */
  FREQUENCY_ERROR(Arity.ONE, "Hz", 0, Double.MAX_VALUE),
  /** Relative root mean square intensity noise of a trap that stays on. */
  TRAP_INTENSITY_NOISE(Arity.ONE, "", 0, 0.5),
  /** Probability that the atom does not begin in the start. */
  PREPARATION_ERROR(Arity.ONE, "", 0, 0.5),
  /** Probability that the outcome is read wrongly. */
  DETECTION_ERROR(Arity.ONE, "", 0, 0.5),
  /** Factor on the amplitude of the frequency noise that each laser's density describes. */
  FREQUENCY_NOISE_DENSITY(Arity.STEPS, "", 0, Double.MAX_VALUE),
  /** Factor on the amplitude of the intensity noise that each beam's density describes. */
  INTENSITY_NOISE_DENSITY(Arity.STEPS, "", 0, Double.MAX_VALUE);

  /** How many numbers there are of a kind. */
  public enum Arity {
    /** One. */
    ONE,
    /** One along each axis of the lab: x, y, z. */
    AXES,
    /** One for each step of the drive. */
    STEPS
  }

  private final Arity arity;
  private final String unit;
  private final double lowest;
  private final double highest;

  BenchValue(Arity arity, String unit, double lowest, double highest) {
    this.arity = arity;
    this.unit = unit;
    this.lowest = lowest;
    this.highest = highest;
  }

  /**
   * Name in a scenario file.
   *
   * @return the key, lower case with underscores
   */
  public String key() {
    return name().toLowerCase(Locale.ROOT);
  }

  /**
   * Name for people.
   *
   * @return the key with blanks
   */
  public String words() {
    return key().replace('_', ' ');
  }

  /**
   * How many numbers there are.
   *
   * @return the arity
   */
  public Arity arity() {
    return arity;
  }

  /**
   * Unit of the number.
   *
   * @return an SI unit, empty for a ratio
   */
  public String unit() {
    return unit;
  }

  /** Whether zero makes no sense: what is divided by, or a logarithm is taken of. */
  private boolean isPositive() {
    return this == TEMPERATURE || this == TRAP_FREQUENCY || this == ENVIRONMENT_TEMPERATURE;
  }

  /** Refuses a number that the value cannot have. */
  double requireAllowed(double number, Object shown) {
    boolean allowed = number >= lowest && number <= highest && (number > 0 || !isPositive());
    if (allowed) {
      return number;
    }
    String range =
        isPositive()
            ? "must be above zero and finite"
            : highest < Double.MAX_VALUE
                ? "must be between 0 and " + highest
                : "must be at least zero and finite";
    throw new IllegalArgumentException(words() + " " + shown + " " + range);
  }
}
