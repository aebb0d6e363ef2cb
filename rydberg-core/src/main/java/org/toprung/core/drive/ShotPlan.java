package org.toprung.core.drive;

import java.util.ArrayList;
import java.util.List;

/**
 * The plan of one square pulse as it goes into the log of a shot: where the kernel was evaluated
 * and what it answered.
 *
 * @param description the ladder in words
 * @param powersWatts power of each beam, W
 * @param detuningHertz detuning of the first step, Hz; 0 for a single step
 * @param fieldFactors for each beam the field at the atom over the field in the focus
 * @param areaRadians Ωt
 * @param rabiHertz effective Rabi frequency over 2π, Hz
 * @param startLightShiftHertz light shift of the start, Hz
 * @param targetLightShiftHertz light shift of the target, Hz
 * @param scatteringPerSecond mean scattering rate of start and target, 1/s
 * @param durationSeconds length of the pulse, s
 * @param frequencyOffsetHertz what is added to the last laser's frequency, Hz
 */
public record ShotPlan(
    String description,
    List<Double> powersWatts,
    double detuningHertz,
    List<Double> fieldFactors,
    double areaRadians,
    double rabiHertz,
    double startLightShiftHertz,
    double targetLightShiftHertz,
    double scatteringPerSecond,
    double durationSeconds,
    double frequencyOffsetHertz) {

  /**
   * Checks the parts.
   *
   * @param description the ladder in words
   * @param powersWatts power of each beam, W
   * @param detuningHertz detuning of the first step, Hz
   * @param fieldFactors field factors
   * @param areaRadians Ωt
   * @param rabiHertz effective Rabi frequency over 2π, Hz
   * @param startLightShiftHertz light shift of the start, Hz
   * @param targetLightShiftHertz light shift of the target, Hz
   * @param scatteringPerSecond mean scattering rate, 1/s
   * @param durationSeconds length of the pulse, s
   * @param frequencyOffsetHertz offset of the last laser, Hz
   * @throws IllegalArgumentException if there is no description, powers and factors differ in
   *     number, length or Rabi frequency is not positive, or a number is not finite
   */
  public ShotPlan {
    powersWatts = List.copyOf(powersWatts);
    fieldFactors = List.copyOf(fieldFactors);
    if (description == null) {
      throw new IllegalArgumentException("a plan needs a description, not null");
    }
    if (powersWatts.isEmpty() || powersWatts.size() != fieldFactors.size()) {
      throw new IllegalArgumentException(
          "a plan needs one power and one field factor for each beam, given "
              + powersWatts.size()
              + " and "
              + fieldFactors.size());
    }
    if (!(areaRadians > 0 && rabiHertz > 0 && durationSeconds > 0)) {
      throw new IllegalArgumentException(
          "area, Rabi frequency and length of a pulse must be positive, given "
              + List.of(areaRadians, rabiHertz, durationSeconds));
    }
    List<Double> all = new ArrayList<>(powersWatts);
    all.addAll(fieldFactors);
    all.addAll(List.of(detuningHertz, areaRadians, rabiHertz, durationSeconds));
    all.addAll(List.of(startLightShiftHertz, targetLightShiftHertz));
    all.addAll(List.of(scatteringPerSecond, frequencyOffsetHertz));
    for (double value : all) {
      if (!(Math.abs(value) < Double.POSITIVE_INFINITY)) {
        throw new IllegalArgumentException("the numbers of a plan must be finite, given " + value);
      }
    }
  }

  /**
   * Evaluates a kernel into a plan.
   *
   * @param kernel the kernel
   * @param powerWatts power of each beam, W, positive
   * @param detuningHertz detuning of the first step, Hz; 0 for a single step
   * @param fieldFactor for each beam the field at the atom over the field in the focus, positive
   * @param areaRadians Ωt, positive
   * @return the plan
   * @throws IllegalArgumentException if the kernel refuses the point or the area is not positive
   */
  public static ShotPlan of(
      DriveKernel kernel,
      double[] powerWatts,
      double detuningHertz,
      double[] fieldFactor,
      double areaRadians) {
    KernelResult result = kernel.newResult();
    kernel.evaluate(powerWatts, detuningHertz, fieldFactor, result);
    return new ShotPlan(
        kernel.data().description(),
        boxed(powerWatts),
        detuningHertz,
        boxed(fieldFactor),
        areaRadians,
        result.rabiHertz(),
        result.startLightShiftHertz(),
        result.targetLightShiftHertz(),
        result.scatteringPerSecond(),
        result.durationSeconds(areaRadians),
        result.frequencyOffsetHertz());
  }

  private static List<Double> boxed(double[] values) {
    List<Double> list = new ArrayList<>();
    for (double value : values) {
      list.add(value);
    }
    return list;
  }
}
