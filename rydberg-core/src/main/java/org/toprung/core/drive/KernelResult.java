package org.toprung.core.drive;

/**
 * What a {@link DriveKernel} answers, owned by the caller and overwritten by each evaluation. One
 * instance serves one thread at a time.
 */
public final class KernelResult {
  final double[] amplitude; // scratch: couplings start to targets, Hz; re, im by target
  final double[] inverse; // scratch: 1/|E − iγ/4π|² by intermediate, 1/Hz²

  private double rabi; // Hz
  private double startShift; // Hz
  private double targetShift; // Hz
  private double scattering; // 1/s

  KernelResult(int targets, int intermediates) {
    this.amplitude = new double[2 * targets];
    this.inverse = new double[intermediates];
    this.rabi = Double.NaN;
    this.startShift = Double.NaN;
    this.targetShift = Double.NaN;
    this.scattering = Double.NaN;
  }

  void set(double rabiHertz, double startShiftHertz, double targetShiftHertz, double perSecond) {
    this.rabi = rabiHertz;
    this.startShift = startShiftHertz;
    this.targetShift = targetShiftHertz;
    this.scattering = perSecond;
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
    return startShift;
  }

  /**
   * Light shift of the target by all beams.
   *
   * @return the move of its energy over h, Hz, positive upwards; NaN before the first evaluation
   */
  public double targetLightShiftHertz() {
    return targetShift;
  }

  /**
   * Rate at which an atom scatters that spends equal times in start and target.
   *
   * @return the rate, 1/s; NaN before the first evaluation
   */
  public double scatteringPerSecond() {
    return scattering;
  }

  /**
   * What to add to the last laser's frequency, counted from bare resonance, to sit on the
   * light-shifted resonance: to second order target shift − start shift.
   *
   * @return the offset, Hz; NaN before the first evaluation
   */
  public double frequencyOffsetHertz() {
    return targetShift - startShift;
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
    return scattering * durationSeconds(areaRadians);
  }
}
