package org.toprung.core.structure;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;

/**
 * A far-off-resonant light shift as a function of the laser frequency, prepared for one
 * superposition of sublevels and one polarization: the sum over states of {@link FarLightShift},
 * with its terms gathered but none of them left out.
 *
 * <p>As a function of the laser frequency L the sum over states is
 *
 * <p>s(L) = c + (f0 + f1 L + Σ<sub>k</sub> R<sub>k</sub>/(P<sub>k</sub> − L)) · (1 or 1/L²),
 *
 * <p>the 1/L² above the ionization threshold of the level. With L = L0 + δ a pole at the distance g
 * = P − L0 gives R/(g − δ) = (R/g) Σ<sub>j</sub> (δ/g)<sup>j</sup>. Poles nearer to L0 than {@value
 * #NEAR_HERTZ} Hz are kept one by one; of the others the geometric series are added up once, to
 * {@value #ORDER} terms. Within |δ| ≤ {@value #REACH_HERTZ} Hz the remainder of each is below
 * 8<sup>−16</sup>·8/7 = 4·10<sup>−15</sup> of the term itself, which is rounding: this is no
 * interpolation.
 *
 * <p>Immutable and thread-safe.
 *
 * @param centreHertz the laser frequency L0 it was prepared at, Hz
 * @param closure whether L0 lies above the ionization threshold
 * @param constant c, Hz/(V/m)²
 * @param coefficients of δ<sup>j</sup> in the bracket, from j = 0
 * @param poles the poles near L0
 */
public record FarShiftSeries(
    double centreHertz,
    boolean closure,
    double constant,
    List<Double> coefficients,
    List<Pole> poles) {

  /** Largest change of the laser frequency a series is good for, Hz. */
  public static final double REACH_HERTZ = 2e12;

  private static final double NEAR_HERTZ = 8 * REACH_HERTZ;
  private static final int ORDER = 16;

  /**
   * A resonance near the laser frequency.
   *
   * @param distanceHertz its place minus L0, Hz
   * @param residue R, in the unit of the bracket times Hz
   */
  public record Pole(double distanceHertz, double residue) {}

  /**
   * Checks the numbers.
   *
   * @param centreHertz the laser frequency it was prepared at, Hz, positive
   * @param closure whether it lies above the ionization threshold
   * @param constant c, Hz/(V/m)²
   * @param coefficients of δ<sup>j</sup>, at least one
   * @param poles the poles near L0
   * @throws IllegalArgumentException if the frequency is not positive and finite, there is no
   *     coefficient or a number is not finite
   */
  public FarShiftSeries {
    if (!(centreHertz > 0 && centreHertz < Double.POSITIVE_INFINITY)) {
      throw new IllegalArgumentException(
          String.format(
              Locale.ROOT,
              "laser frequency must be positive and finite, given %s Hz",
              centreHertz));
    }
    coefficients = List.copyOf(coefficients);
    poles = List.copyOf(poles);
    if (coefficients.isEmpty()) {
      throw new IllegalArgumentException("a series needs at least one coefficient, given none");
    }
    double sum = constant;
    for (double c : coefficients) {
      sum += c;
    }
    for (Pole pole : poles) {
      sum += pole.distanceHertz() + pole.residue();
    }
    if (!(Math.abs(sum) < Double.POSITIVE_INFINITY)) {
      throw new IllegalArgumentException("the numbers of a series must be finite, given " + sum);
    }
  }

  /** Adds the terms of a sum over states up. */
  static final class Gatherer {
    private final double centre;
    private final boolean closure;
    private final double[] coefficients = new double[ORDER];
    private final List<Pole> poles = new ArrayList<>();
    private double constant;

    Gatherer(double centreHertz, boolean closure) {
      this.centre = centreHertz;
      this.closure = closure;
    }

    /** A part that does not depend on the laser frequency. */
    void constant(double c) {
      constant += c;
    }

    /** f0 + f1 L in the bracket. */
    void linear(double f0, double f1) {
      coefficients[0] += f0 + f1 * centre;
      coefficients[1] += f1;
    }

    /** R/(P − L) in the bracket. */
    void pole(double placeHertz, double residue) {
      double distance = placeHertz - centre;
      if (residue == 0) {
        return;
      }
      if (!(Math.abs(distance) > NEAR_HERTZ)) {
        poles.add(new Pole(distance, residue));
        return;
      }
      double term = residue / distance;
      for (int j = 0; j < ORDER; j++) {
        coefficients[j] += term;
        term /= distance;
      }
    }

    FarShiftSeries gathered() {
      List<Double> list = new ArrayList<>();
      for (double c : coefficients) {
        list.add(c);
      }
      return new FarShiftSeries(centre, closure, constant, list, poles);
    }
  }

  /**
   * The shift divided by the square of the field amplitude, off the prepared laser frequency. For
   * many calls use a {@link #evaluator()}.
   *
   * @param offsetHertz δ, the laser frequency minus the prepared one, at most {@link #REACH_HERTZ}
   *     either way
   * @return shift/h in Hz/(V/m)², positive where the level moves up
   * @throws IllegalArgumentException if the offset is beyond reach
   */
  public double hertzPerFieldSquared(double offsetHertz) {
    if (!(Math.abs(offsetHertz) <= REACH_HERTZ)) {
      throw new IllegalArgumentException(
          String.format(
              Locale.ROOT,
              "laser offset %s Hz must be within %s Hz of the prepared frequency",
              offsetHertz,
              REACH_HERTZ));
    }
    return evaluator().at(offsetHertz);
  }

  /**
   * The same numbers laid out for speed.
   *
   * @return an evaluator, immutable and thread-safe
   */
  public Evaluator evaluator() {
    return new Evaluator(this);
  }

  /** Evaluates a series without checks and without allocation. Immutable and thread-safe. */
  public static final class Evaluator {
    private final double centre;
    private final boolean closure;
    private final double constant;
    private final double[] coefficient;
    private final double[] distance;
    private final double[] residue;

    private Evaluator(FarShiftSeries series) {
      this.centre = series.centreHertz;
      this.closure = series.closure;
      this.constant = series.constant;
      this.coefficient = series.coefficients.stream().mapToDouble(c -> c).toArray();
      this.distance = series.poles.stream().mapToDouble(Pole::distanceHertz).toArray();
      this.residue = series.poles.stream().mapToDouble(Pole::residue).toArray();
    }

    /**
     * The shift divided by the square of the field amplitude.
     *
     * @param offsetHertz the laser frequency minus the prepared one; its limit is not checked
     * @return shift/h in Hz/(V/m)²
     */
    public double at(double offsetHertz) {
      double bracket = 0;
      for (int j = coefficient.length - 1; j >= 0; j--) {
        bracket = bracket * offsetHertz + coefficient[j];
      }
      for (int k = 0; k < distance.length; k++) {
        bracket += residue[k] / (distance[k] - offsetHertz);
      }
      double laser = centre + offsetHertz;
      return constant + (closure ? bracket / (laser * laser) : bracket);
    }
  }
}
