package org.toprung.core.atom;

/**
 * One magnetic sublevel: |level, F, mF⟩ of the hyperfine basis, or |level, mJ⟩ with the nuclear
 * spin left open. Immutable.
 *
 * <p>Whether F can occur with the nuclear spin of an atom is checked by the species.
 */
public final class Sublevel {
  private static final int NO_F = -1;

  private final Level level;
  private final int doubledF;
  private final int doubledM;

  private Sublevel(Level level, int doubledF, int doubledM) {
    this.level = level;
    this.doubledF = doubledF;
    this.doubledM = doubledM;
  }

  /**
   * A hyperfine sublevel.
   *
   * @param level the level as text, for example "5S1/2"
   * @param f total angular momentum F, a non-negative integer or half-integer
   * @param mF its projection, −F to F in steps of 1
   * @return the sublevel
   * @throws IllegalArgumentException if the level is not understood, or F or mF is not allowed
   */
  public static Sublevel hyperfine(String level, double f, double mF) {
    return hyperfine(Level.parse(level), f, mF);
  }

  /**
   * A hyperfine sublevel.
   *
   * @param level the level
   * @param f total angular momentum F, a non-negative integer or half-integer
   * @param mF its projection, −F to F in steps of 1
   * @return the sublevel
   * @throws IllegalArgumentException if F or mF is not allowed
   */
  public static Sublevel hyperfine(Level level, double f, double mF) {
    int doubledF = Halves.doubled("F of " + level, f);
    if (!(doubledF >= 0)) {
      throw Refusal.of("F of %s must not be negative, given %s", level, f);
    }
    return new Sublevel(level, doubledF, projection(level, "F", doubledF, "mF", mF));
  }

  /**
   * A fine-structure sublevel.
   *
   * @param level the level as text, for example "68S1/2"
   * @param mJ projection of j, −j to j in steps of 1
   * @return the sublevel
   * @throws IllegalArgumentException if the level is not understood or mJ is not allowed
   */
  public static Sublevel fine(String level, double mJ) {
    return fine(Level.parse(level), mJ);
  }

  /**
   * A fine-structure sublevel.
   *
   * @param level the level
   * @param mJ projection of j, −j to j in steps of 1
   * @return the sublevel
   * @throws IllegalArgumentException if mJ is not allowed
   */
  public static Sublevel fine(Level level, double mJ) {
    return new Sublevel(level, NO_F, projection(level, "j", level.doubledJ(), "mJ", mJ));
  }

  private static int projection(Level level, String name, int doubled, String mName, double m) {
    int doubledM = Halves.doubled(mName + " of " + level, m);
    if (Math.abs(doubledM) > doubled || (doubledM - doubled) % 2 != 0) {
      throw Refusal.of(
          "%s of %s with %s=%s must be %s to %s in steps of 1, given %s",
          mName,
          level,
          name,
          Halves.text(doubled),
          Halves.text(-doubled),
          Halves.text(doubled),
          Halves.text(doubledM));
    }
    return doubledM;
  }

  /**
   * The level this is a sublevel of.
   *
   * @return the level
   */
  public Level level() {
    return level;
  }

  /**
   * Whether the sublevel is one of the hyperfine basis.
   *
   * @return true for |F, mF⟩, false for |mJ⟩
   */
  public boolean isHyperfine() {
    return doubledF != NO_F;
  }

  /**
   * Twice F.
   *
   * @return 2F
   * @throws IllegalStateException if the sublevel is not one of the hyperfine basis
   */
  public int doubledF() {
    if (!isHyperfine()) {
      throw new IllegalStateException(this + " has no F: it is a fine-structure sublevel");
    }
    return doubledF;
  }

  /**
   * Twice the projection.
   *
   * @return 2mF of a hyperfine sublevel, else 2mJ
   */
  public int doubledM() {
    return doubledM;
  }

  /** {@inheritDoc} */
  @Override
  public boolean equals(Object other) {
    return other instanceof Sublevel that
        && that.level.equals(level)
        && that.doubledF == doubledF
        && that.doubledM == doubledM;
  }

  /** {@inheritDoc} */
  @Override
  public int hashCode() {
    return (level.hashCode() * 31 + doubledF) * 31 + doubledM;
  }

  /**
   * The sublevel as text.
   *
   * @return for example "5S1/2 F=2 mF=2" or "68S1/2 mJ=1/2"
   */
  @Override
  public String toString() {
    return isHyperfine()
        ? level + " F=" + Halves.text(doubledF) + " mF=" + Halves.text(doubledM)
        : level + " mJ=" + Halves.text(doubledM);
  }
}
