package org.toprung.core.drive;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import org.toprung.core.quantity.Frequency;
import org.toprung.core.quantity.Power;

/**
 * How the powers of the beams of a drive weigh against each other, at its detuning.
 *
 * <p>To lowest order the effective Rabi frequency goes as the root of the product of the powers,
 * and every light shift and scattering rate is a sum of parts that are each proportional to one
 * power ({@link Elimination}). So
 *
 * <ul>
 *   <li>the differential shift D = Σ D<sub>k</sub>P<sub>k</sub> vanishes at P2/P1 = −D1/D2 where
 *       the slopes differ in sign. With the near-resonant parts alone this is Ω1 = Ω2;
 *   <li>at a given Rabi frequency, hence pulse length, the mean scattering rate ½(s1P1 + s2P2) is
 *       least at P2/P1 = s1/s2: the closed form q + 1/q of Saffman and Walker, Phys. Rev. A 72,
 *       022347 (2005), is least at q = Ω2/Ω1 = 1.
 * </ul>
 *
 * <p>The far-off-resonant shift of the start moves the detuning with the powers, which bends all of
 * this by about that shift over the detuning. It is followed with the {@link DriveKernel}: ratios
 * and powers are repeated until they stand still.
 *
 * <p>Immutable and thread-safe.
 */
public final class PowerBalance {
  private static final int REPEATS = 30; // each gains the shift over the detuning
  private static final double STILL = 1e-12;
  private static final double SMALL = 1e-4; // relative change of a power for a slope

  private final List<Drive.Step> steps;
  private final DriveKernel kernel;
  private final double rabi; // Hz
  private final double[] watts;

  private PowerBalance(Drive drive) {
    this.steps = drive.steps();
    this.kernel = drive.kernel();
    this.watts = new double[steps.size()];
    for (int k = 0; k < watts.length; k++) {
      watts[k] = kernel.powerWatts(k);
    }
    this.rabi = at(watts).rabiHertz();
  }

  static PowerBalance of(Drive drive) {
    return new PowerBalance(drive);
  }

  private KernelResult at(double... powers) {
    double[] ones = new double[powers.length];
    Arrays.fill(ones, 1);
    KernelResult result = kernel.newResult();
    kernel.evaluate(powers, kernel.detuningHertz(), ones, result);
    return result;
  }

  /**
   * Slope of the differential light shift, target minus start, with the power of one beam.
   *
   * @param step index of the step, from 0
   * @return the slope, Hz/W
   * @throws IndexOutOfBoundsException if there is no such step
   */
  public double differentialShiftHertzPerWatt(int step) {
    double[] powers = watts.clone();
    powers[step] = watts[step] * (1 + SMALL);
    double above = at(powers).frequencyOffsetHertz();
    powers[step] = watts[step] * (1 - SMALL);
    return (above - at(powers).frequencyOffsetHertz()) / (2 * SMALL * watts[step]);
  }

  /**
   * The power ratio at which the beams shift start and target alike; what a trap adds is left out.
   *
   * @return the ratio, or why there is none
   */
  public PowerRatio nullsDifferentialShift() {
    return ratio(
        (powers, result) -> {
          double first = result.targetLightShiftHertz(0) - result.startLightShiftHertz(0);
          double second = result.targetLightShiftHertz(1) - result.startLightShiftHertz(1);
          return -first / powers[0] / (second / powers[1]);
        },
        "both beams move target against start the same way, so no ratio of powers cancels the shift");
  }

  /**
   * The power ratio with the least scattering during a pulse of given Rabi frequency.
   *
   * @return the ratio, or why there is none
   */
  public PowerRatio minimizesScattering() {
    return ratio(
        (powers, result) ->
            result.startScatteringPerSecond()
                / powers[0]
                / (result.targetScatteringPerSecond() / powers[1]),
        "only one of start and target scatters");
  }

  /** The ratio P2/P1 that would be right if everything were proportional to the powers. */
  private interface Proportional {
    double ratio(double[] powers, KernelResult result);
  }

  private PowerRatio ratio(Proportional rule, String whyNone) {
    if (watts.length == 1) {
      return new PowerRatio.None("a single beam has no power ratio");
    }
    double[] powers = watts.clone();
    double ratio = 0;
    for (int i = 0; i < REPEATS; i++) {
      double next = rule.ratio(powers, at(powers));
      if (!(next > 0 && next < Double.POSITIVE_INFINITY)) {
        return new PowerRatio.None(whyNone);
      }
      boolean still = Math.abs(next - ratio) <= STILL * next;
      ratio = next;
      powers = withRabi(rabi, ratio);
      if (still) {
        return new PowerRatio.Found(ratio, quantities(powers));
      }
    }
    throw new ArithmeticException(
        "the power ratio does not settle within " + REPEATS + " repeats: the last is " + ratio);
  }

  /** Powers of a ratio that have an effective Rabi frequency. */
  private double[] withRabi(double wanted, double ratio) {
    double product = watts[0] * watts[1] * Math.pow(wanted / rabi, 2);
    for (int i = 0; i < REPEATS; i++) {
      double[] powers = {Math.sqrt(product / ratio), Math.sqrt(product * ratio)};
      double off = wanted / at(powers).rabiHertz();
      if (Math.abs(off - 1) <= STILL) {
        return powers;
      }
      product *= off * off;
    }
    throw notSettled(wanted);
  }

  private static ArithmeticException notSettled(double wanted) {
    return new ArithmeticException(
        "the powers for a Rabi frequency of "
            + wanted
            + " Hz do not settle within "
            + REPEATS
            + " repeats");
  }

  private static List<Power> quantities(double[] powers) {
    return Arrays.stream(powers).mapToObj(Power::ofWatts).toList();
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
    return quantities(watts.length == 1 ? watts : withRabi(rabi, equalRabiRatio()));
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
    double[] most = new double[limits.length];
    for (int k = 0; k < limits.length; k++) {
      most[k] = limits[k].watts();
      if (!(most[k] > 0)) {
        throw new IllegalArgumentException(
            "power limit " + limits[k] + " of beam " + (k + 1) + " must be positive");
      }
    }
    double largest = at(most).rabiHertz();
    if (wanted.hertz() > largest) {
      return new PowerPlan.OutOfReach(List.of(limits), Frequency.ofHertz(largest));
    }
    return new PowerPlan.Reached(quantities(within(wanted.hertz(), most)), wanted);
  }

  private double[] within(double wanted, double[] most) {
    if (watts.length == 1) {
      return new double[] {watts[0] * Math.pow(wanted / rabi, 2)};
    }
    double[] free = withRabi(wanted, equalRabiRatio());
    for (int k = 0; k < 2; k++) {
      if (free[k] > most[k]) {
        return withOneFixed(wanted, k, most[k]);
      }
    }
    return free;
  }

  private double[] withOneFixed(double wanted, int fixed, double power) {
    double[] powers = watts.clone();
    powers[fixed] = power;
    for (int i = 0; i < REPEATS; i++) {
      double off = wanted / at(powers).rabiHertz();
      if (Math.abs(off - 1) <= STILL) {
        return powers;
      }
      powers[1 - fixed] *= off * off;
    }
    throw notSettled(wanted);
  }

  private static void requirePositive(Frequency rabi) {
    if (!(rabi.hertz() > 0)) {
      throw new IllegalArgumentException("Rabi frequency " + rabi + " must be positive");
    }
  }
}
