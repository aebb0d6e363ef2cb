package org.toprung.core.drive;

import java.util.Objects;

/**
 * What a {@link DriveKernel} answers, owned by the caller and overwritten by each evaluation. One
 * instance serves one thread at a time.
 */
public final class KernelResult {
  final double[] amplitude; // scratch: couplings start to targets, Hz; re, im by target
  final double[] inverse; // scratch: 1/|E − iγ/4π|² by intermediate, 1/Hz²

  private double rabi; // Hz
  private double trapShift; // Hz
  private double startFirst; // Hz, by the first beam
  private double startSecond; // Hz
  private double targetFirst; // Hz
  private double targetSecond; // Hz
  private double startScattering; // 1/s
  private double targetScattering; // 1/s

  KernelResult(int targets, int intermediates) {
    this.amplitude = new double[2 * targets];
    this.inverse = new double[intermediates];
    set(Double.NaN, Double.NaN);
    setStart(Double.NaN, Double.NaN, Double.NaN);
    setTarget(Double.NaN, Double.NaN, Double.NaN);
  }

  void set(double rabiHertz, double trapShiftHertz) {
    this.rabi = rabiHertz;
    this.trapShift = trapShiftHertz;
  }

  void setStart(double firstHertz, double secondHertz, double perSecond) {
    this.startFirst = firstHertz;
    this.startSecond = secondHertz;
    this.startScattering = perSecond;
  }

  void setTarget(double firstHertz, double secondHertz, double perSecond) {
    this.targetFirst = firstHertz;
    this.targetSecond = secondHertz;
    this.targetScattering = perSecond;
  }

  /**
   * Effective Rabi frequency over 2π between start and wanted target.
   *
   * @return the modulus, Hz; NaN before the first evaluation
   */
  public double rabiHertz() {
    return rabi;
  }

  /**
   * Light shift of the start by all beams.
   *
   * @return the move of its energy over h, Hz, positive upwards; NaN before the first evaluation
   */
  public double startLightShiftHertz() {
    return startFirst + startSecond;
  }

  /**
   * Light shift of the target by all beams.
   *
   * @return the move of its energy over h, Hz, positive upwards; NaN before the first evaluation
   */
  public double targetLightShiftHertz() {
    return targetFirst + targetSecond;
  }

  /**
   * Light shift of the start by one beam. The near-resonant part counts with the first beam.
   *
   * @param step index of the step, 0 or 1
   * @return the move of its energy over h, Hz, positive upwards; 0 for a beam that is not there
   */
  public double startLightShiftHertz(int step) {
    return Objects.checkIndex(step, 2) == 0 ? startFirst : startSecond;
  }

  /**
   * Light shift of the target by one beam. The near-resonant part counts with the last beam.
   *
   * @param step index of the step, 0 or 1
   * @return the move of its energy over h, Hz, positive upwards; 0 for a beam that is not there
   */
  public double targetLightShiftHertz(int step) {
    return Objects.checkIndex(step, 2) == 0 ? targetFirst : targetSecond;
  }

  /**
   * Rate at which the start scatters.
   *
   * @return the rate, 1/s; NaN before the first evaluation
   */
  public double startScatteringPerSecond() {
    return startScattering;
  }

  /**
   * Rate at which the target scatters.
   *
   * @return the rate, 1/s; NaN before the first evaluation
   */
  public double targetScatteringPerSecond() {
    return targetScattering;
  }

  /**
   * Rate at which an atom scatters that spends equal times in start and target.
   *
   * @return the rate, 1/s; NaN before the first evaluation
   */
  public double scatteringPerSecond() {
    return 0.5 * (startScattering + targetScattering);
  }

  /**
   * What to add to the last laser's frequency, counted from bare resonance, to sit on the
   * light-shifted resonance: to second order target shift − start shift, plus that of a trap that
   * shines during the pulse.
   *
   * @return the offset, Hz; NaN before the first evaluation
   */
  public double frequencyOffsetHertz() {
    return targetLightShiftHertz() - startLightShiftHertz() + trapShift;
  }

  /**
   * Length of a square pulse.
   *
   * @param areaRadians Ωt, positive; π for full transfer
   * @return area/(2π · Rabi frequency), s; NaN before the first evaluation
   * @throws IllegalArgumentException if the area is not positive and finite
   */
  public double durationSeconds(double areaRadians) {
    if (!(areaRadians > 0 && areaRadians < Double.POSITIVE_INFINITY)) {
      throw new IllegalArgumentException(
          "pulse area " + areaRadians + " rad must be positive and finite");
    }
    return areaRadians / (2 * Math.PI * rabi);
  }

  /**
   * Probability to scatter during a square pulse that starts in the ground sublevel.
   *
   * @param areaRadians Ωt, positive; an odd multiple of π spends equal times in both states
   * @return mean rate times length; NaN before the first evaluation
   * @throws IllegalArgumentException if the area is not positive and finite
   */
  public double scatteringPerPulse(double areaRadians) {
    return scatteringPerSecond() * durationSeconds(areaRadians);
  }
}
