package org.toprung.budget.bench;

import java.util.Locale;

/** A kind of number that a {@link Bench} holds. */
public enum BenchValue {
  /** Temperature of the atom, K. */
  TEMPERATURE(Arity.ONE, "K", 1e4),
  /** Frequencies of the trap along lab x, y and z, Hz. */
  TRAP_FREQUENCY(Arity.AXES, "Hz", 1e12),
  /** Temperature of the walls that the Rydberg atom sees, K. */
  ENVIRONMENT_TEMPERATURE(Arity.ONE, "K", 1e4),
  /** Root mean square of the magnetic field along the axis, T. */
  MAGNETIC_NOISE(Arity.ONE, "T", 1),
  /** Root mean square length of the residual electric field, V/m. */
  ELECTRIC_FIELD(Arity.ONE, "V/m", 1e7),
  /** Lorentzian full width of each laser, Hz. */
  LINEWIDTH(Arity.STEPS, "Hz", 1e12),
  /** Root mean square frequency error of each laser from shot to shot, Hz. */
  DRIFT(Arity.STEPS, "Hz", 1e12),
  /** Relative root mean square intensity noise of each beam from shot to shot. */
  INTENSITY_NOISE(Arity.STEPS, "", 0.5),
  /** Root mean square displacement of each beam, in each direction across it, m. */
  POINTING(Arity.STEPS, "m", 1),
  /** Part of the intensity of each beam in the orthogonal polarization, of unknown phase. */
  POLARIZATION_IMPURITY(Arity.STEPS, "", 0.5),
  /** Relative root mean square error of the length of the pulse. */
  LENGTH_ERROR(Arity.ONE, "", 0.5),
  /** Root mean square error of the frequency the laser is set to, Hz. */
  FREQUENCY_ERROR(Arity.ONE, "Hz", 1e12),
  /** Relative root mean square intensity noise of a trap that stays on. */
  TRAP_INTENSITY_NOISE(Arity.ONE, "", 0.5),
  /** Probability that the atom does not begin in the start. */
  PREPARATION_ERROR(Arity.ONE, "", 0.5),
  /** Probability that the outcome is read wrongly. */
  DETECTION_ERROR(Arity.ONE, "", 0.5),
  /** Factor on the amplitude of the frequency noise that each laser's density describes. */
  FREQUENCY_NOISE_DENSITY(Arity.STEPS, "", 1e6),
  /** Factor on the amplitude of the intensity noise that each beam's density describes. */
  INTENSITY_NOISE_DENSITY(Arity.STEPS, "", 1e6);

  /** How many numbers there are of a kind. */
  public enum Arity {
    /** One. */
    ONE,
    /** One along each axis of the lab: x, y, z. */
    AXES,
    /** One for each step of the drive. */
    STEPS
  }

  /** Steps of the longest ladder, and axes of space. */
  private static final int MOST = 3;

  private final Arity arity;
  private final String unit;
  private final double highest;

  BenchValue(Arity arity, String unit, double highest) {
    this.arity = arity;
    this.unit = unit;
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

  /**
   * The largest number allowed: beyond anything that an apparatus is meant to do, so that slips of
   * the pen are caught.
   *
   * @return the number, in the {@link #unit()}
   */
  public double highest() {
    return highest;
  }

  /** Whether zero makes no sense: what is divided by, or a logarithm is taken of. */
  boolean isPositive() {
    return this == TEMPERATURE || this == TRAP_FREQUENCY || this == ENVIRONMENT_TEMPERATURE;
  }

  /**
   * Whether the number is the size of a deviation from shot to shot, which samples can give too.
   */
  boolean isSpread() {
    return switch (this) {
      case MAGNETIC_NOISE,
          ELECTRIC_FIELD,
          DRIFT,
          INTENSITY_NOISE,
          POINTING,
          LENGTH_ERROR,
          FREQUENCY_ERROR,
          TRAP_INTENSITY_NOISE ->
          true;
      default -> false;
    };
  }

  /** Whether the number is a factor on a table. */
  boolean isDensity() {
    return this == FREQUENCY_NOISE_DENSITY || this == INTENSITY_NOISE_DENSITY;
  }

  /** Refuses an index that no number of this kind has. */
  void requireIndex(int index) {
    int most = arity == Arity.ONE ? 0 : MOST - 1;
    if (!(index >= 0 && index <= most)) {
      throw new IllegalArgumentException(
          words() + " has no index " + index + "; allowed: " + (most == 0 ? "0" : "0 to " + most));
    }
  }

  /** Refuses a list of another length than the arity has. */
  void requireCount(int count) {
    boolean allowed =
        switch (arity) {
          case ONE -> count == 1;
          case AXES -> count == MOST;
          case STEPS -> count >= 1 && count <= MOST;
        };
    if (!allowed) {
      throw new IllegalArgumentException(
          words() + ": given " + count + " numbers; allowed: one per step, 1 to " + MOST);
    }
  }

  /** Refuses a number that the value cannot have. */
  void requireAllowed(double number, Object shown) {
    requireUpTo(highest, number, shown);
  }

  /**
   * Refuses a number that the value cannot have even in the mind. What if a number were twice as
   * large can be asked of every number that may be given.
   */
  void requireImaginable(double number) {
    requireUpTo(2 * highest, number, number);
  }

  private void requireUpTo(double most, double number, Object shown) {
    if (number >= 0 && number <= most && (number > 0 || !isPositive())) {
      return;
    }
    String largest =
        (most < 1000 ? String.valueOf(most) : String.format(Locale.ROOT, "%.0e", most))
            + (unit.isEmpty() ? "" : " " + unit);
    String range =
        isPositive()
            ? "must be above zero and at most " + largest
            : unit.isEmpty()
                ? "must be between 0 and " + largest
                : "must be at least zero and at most " + largest;
    throw new IllegalArgumentException(words() + " " + shown + " " + range);
  }
}
