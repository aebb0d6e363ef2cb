package org.toprung.core.drive;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import org.toprung.core.quantity.Frequency;
import org.toprung.core.quantity.Power;

/**
 * How the powers of the beams of a drive weigh against each other, at its detuning.
 *
 * <p>For one and two steps the effective Rabi frequency goes as the root of the product of the
 * powers, and every light shift and scattering rate is a sum of parts that are each proportional to
 * one power ({@link Elimination}, second order). So
 *
 * <ul>
 *   <li>the differential shift is D = Σ D<sub>k</sub>P<sub>k</sub>, with constant slopes;
 *   <li>it vanishes at P2/P1 = −D1/D2 where the slopes differ in sign. With the near-resonant parts
 *       alone this is Ω1 = Ω2;
 *   <li>at a given Rabi frequency, hence pulse length, the mean scattering rate ½(s1P1 + s2P2) is
 *       least at P2/P1 = s1/s2: the closed form q + 1/q of Saffman and Walker, Phys. Rev. A 72,
 *       022347 (2005), is least at q = Ω2/Ω1 = 1.
 * </ul>
 *
 * <p>Immutable and thread-safe.
 */
public final class PowerBalance {
  private final List<Drive.Step> steps;
  private final double rabi; // Hz
  private final double[] watts;
  private final double[] slope; // Hz/W
  private final double[] scattering; // 1/(s W)

  private PowerBalance(Drive drive, Elimination elimination) {
    this.steps = drive.steps();
    this.rabi = elimination.rabiHertz();
    this.watts = steps.stream().mapToDouble(s -> s.beam().power().watts()).toArray();
    this.slope = new double[watts.length];
    for (int k = 0; k < watts.length; k++) {
      slope[k] = (elimination.targetShiftHertz(k) - elimination.startShiftHertz(k)) / watts[k];
    }
    this.scattering =
        watts.length == 1
            ? new double[1]
            : new double[] {
              elimination.startScatteringPerSecond() / watts[0],
              elimination.targetScatteringPerSecond() / watts[1]
            };
  }

  static PowerBalance of(Drive drive, Elimination elimination) {
    if (drive.steps().size() > 2) {
      throw new IllegalArgumentException(
          "powers are balanced for one or two steps, given "
              + drive.steps().size()
              + ": with a step between two intermediate levels shifts are not proportional to powers");
    }
    return new PowerBalance(drive, elimination);
  }

  /**
   * Slope of the differential light shift, target minus start, with the power of one beam.
   *
   * @param step index of the step, from 0
   * @return the slope, Hz/W
   * @throws IndexOutOfBoundsException if there is no such step
   */
  public double differentialShiftHertzPerWatt(int step) {
    return slope[step];
  }

  /**
   * The power ratio at which start and target shift alike.
   *
   * @return the ratio, or why there is none
   */
  public PowerRatio nullsDifferentialShift() {
    if (watts.length == 1) {
      return single();
    }
    double ratio = -slope[0] / slope[1];
    if (!(ratio > 0 && ratio < Double.POSITIVE_INFINITY)) {
      return new PowerRatio.None(
          String.format(
              Locale.ROOT,
              "both beams move target against start the same way, by %.6g and %.6g Hz/W, so no ratio"
                  + " of powers cancels the shift",
              slope[0],
              slope[1]));
    }
    return found(ratio);
  }

  /**
   * The power ratio with the least scattering during a pulse of given Rabi frequency.
   *
   * @return the ratio, or why there is none
   */
  public PowerRatio minimizesScattering() {
    if (watts.length == 1) {
      return single();
    }
    double ratio = scattering[0] / scattering[1];
    if (!(ratio > 0 && ratio < Double.POSITIVE_INFINITY)) {
      return new PowerRatio.None(
          String.format(
              Locale.ROOT,
              "scattering has no minimum: the beams add %.6g and %.6g per second and watt",
              scattering[0],
              scattering[1]));
    }
    return found(ratio);
  }

  private static PowerRatio single() {
    return new PowerRatio.None("a single beam has no power ratio");
  }

  private PowerRatio found(double ratio) {
    return new PowerRatio.Found(ratio, atSameRabi(ratio));
  }

  /** Powers of this ratio and the same product as now. */
  private List<Power> atSameRabi(double ratio) {
    double product = watts[0] * watts[1];
    return List.of(
        Power.ofWatts(Math.sqrt(product / ratio)), Power.ofWatts(Math.sqrt(product * ratio)));
  }

  /**
   * The powers at which every step has a given one-photon Rabi frequency, as {@link
   * Drive.Step#rabi()} counts it.
   *
   * @param stepRabi wanted one-photon Rabi frequency over 2π, positive
   * @return the power of each beam
   * @throws IllegalArgumentException if the Rabi frequency is not positive
   */
  public List<Power> powersForStepRabi(Frequency stepRabi) {
    requirePositive(stepRabi);
    List<Power> powers = new ArrayList<>();
    for (int k = 0; k < watts.length; k++) {
      double ratio = stepRabi.hertz() / steps.get(k).rabi().hertz();
      powers.add(Power.ofWatts(watts[k] * ratio * ratio));
    }
    return List.copyOf(powers);
  }

  /**
   * The powers at which all steps have the same one-photon Rabi frequency and the effective one
   * stays as it is.
   *
   * @return the power of each beam
   */
  public List<Power> powersForEqualStepRabi() {
    return watts.length == 1 ? List.of(steps.get(0).beam().power()) : atSameRabi(equalRabiRatio());
  }

  private double equalRabiRatio() {
    double q = steps.get(0).rabi().hertz() / steps.get(1).rabi().hertz();
    return q * q * watts[1] / watts[0];
  }

  /**
   * The powers for a wanted effective Rabi frequency: with equal one-photon Rabi frequencies where
   * the limits allow, else with one beam at its limit.
   *
   * @param wanted effective Rabi frequency over 2π, positive
   * @param limits largest power of each beam, positive
   * @return the powers, or the largest Rabi frequency that can be had
   * @throws IllegalArgumentException if the Rabi frequency or a limit is not positive, or there is
   *     not one limit for each beam
   */
  public PowerPlan powersForRabi(Frequency wanted, Power... limits) {
    requirePositive(wanted);
    if (limits.length != watts.length) {
      throw new IllegalArgumentException(
          "a limit is needed for each of " + watts.length + " beams, given " + limits.length);
    }
    double largest = rabi;
    for (int k = 0; k < limits.length; k++) {
      if (!(limits[k].watts() > 0)) {
        throw new IllegalArgumentException(
            "power limit " + limits[k] + " of beam " + (k + 1) + " must be positive");
      }
      largest *= Math.sqrt(limits[k].watts() / watts[k]);
    }
    if (wanted.hertz() > largest) {
      return new PowerPlan.OutOfReach(List.of(limits), Frequency.ofHertz(largest));
    }
    double scale = wanted.hertz() / rabi;
    double squared = scale * scale;
    if (watts.length == 1) {
      return new PowerPlan.Reached(List.of(Power.ofWatts(watts[0] * squared)), wanted);
    }
    double product = watts[0] * watts[1] * squared;
    double first = Math.sqrt(product / equalRabiRatio());
    first = Math.min(first, limits[0].watts());
    double second = Math.min(product / first, limits[1].watts());
    first = Math.min(product / second, limits[0].watts());
    return new PowerPlan.Reached(List.of(Power.ofWatts(first), Power.ofWatts(second)), wanted);
  }

  private static void requirePositive(Frequency rabi) {
    if (!(rabi.hertz() > 0)) {
      throw new IllegalArgumentException("Rabi frequency " + rabi + " must be positive");
    }
  }
}
