package org.toprung.core.drive;

import java.util.Arrays;
import java.util.Locale;

/**
 * What may differ from one shot to the next without touching the atomic structure: the field of
 * each beam at the atom, the frequency of each laser, the magnetic field and an extra shift of the
 * target level.
 *
 * <p>Immutable. The nominal setting is the drive as it was described: unit field factors and no
 * offsets.
 */
public final class LadderSetting {
  private final double[] fieldFactor; // E(atom)/E(nominal), one per step
  private final double[] laserOffset; // Hz, one per step
  private final double magneticOffset; // T
  private final double targetShift; // Hz

  private LadderSetting(
      double[] fieldFactor, double[] laserOffset, double magneticOffset, double targetShift) {
    this.fieldFactor = fieldFactor;
    this.laserOffset = laserOffset;
    this.magneticOffset = magneticOffset;
    this.targetShift = targetShift;
  }

  /**
   * The setting in which nothing differs from the drive as described.
   *
   * @param steps number of steps of the ladder, at least 1
   * @return the nominal setting
   */
  public static LadderSetting nominal(int steps) {
    if (steps < 1) {
      throw new IllegalArgumentException("a ladder has at least one step, not " + steps);
    }
    double[] ones = new double[steps];
    Arrays.fill(ones, 1);
    return new LadderSetting(ones, new double[steps], 0, 0);
  }

  /**
   * Scales the electric field of one beam at the atom; its intensity changes by the square.
   *
   * @param step index of the step, from 0
   * @param factor field over nominal field, at least 0
   * @return a copy with this field factor
   */
  public LadderSetting withFieldFactor(int step, double factor) {
    if (!(factor >= 0 && factor < Double.POSITIVE_INFINITY)) {
      throw new IllegalArgumentException(
          String.format(
              Locale.ROOT, "field factor %s must be a finite number of at least 0", factor));
    }
    double[] copy = fieldFactor.clone();
    copy[step] = factor;
    return new LadderSetting(copy, laserOffset, magneticOffset, targetShift);
  }

  /**
   * Moves the frequency of one laser as the atom sees it.
   *
   * @param step index of the step, from 0
   * @param hertz ordinary frequency added to the laser's, Hz
   * @return a copy with this laser offset
   */
  public LadderSetting withLaserOffset(int step, double hertz) {
    double[] copy = laserOffset.clone();
    copy[step] = requireFinite(hertz, "laser offset", "Hz");
    return new LadderSetting(fieldFactor, copy, magneticOffset, targetShift);
  }

  /**
   * Changes the magnetic field along the quantization axis.
   *
   * @param tesla field added to the drive's bias field, T
   * @return a copy with this field change
   */
  public LadderSetting withMagneticOffset(double tesla) {
    return new LadderSetting(
        fieldFactor, laserOffset, requireFinite(tesla, "magnetic field change", "T"), targetShift);
  }

  /**
   * Shifts the target sublevels, for example by a stray electric field.
   *
   * @param hertz shift over h, positive upwards, Hz
   * @return a copy with this shift
   */
  public LadderSetting withTargetShift(double hertz) {
    return new LadderSetting(
        fieldFactor, laserOffset, magneticOffset, requireFinite(hertz, "target shift", "Hz"));
  }

  /**
   * The number of steps.
   *
   * @return number of steps
   */
  public int steps() {
    return fieldFactor.length;
  }

  /**
   * Field of a beam over its nominal field.
   *
   * @param step index of the step, from 0
   * @return the field factor
   */
  public double fieldFactor(int step) {
    return fieldFactor[step];
  }

  /**
   * Offset of a laser's frequency.
   *
   * @param step index of the step, from 0
   * @return the offset, Hz
   */
  public double laserOffsetHertz(int step) {
    return laserOffset[step];
  }

  /**
   * Change of the magnetic field.
   *
   * @return the change, T
   */
  public double magneticOffsetTesla() {
    return magneticOffset;
  }

  /**
   * Extra shift of the target sublevels.
   *
   * @return the shift, Hz
   */
  public double targetShiftHertz() {
    return targetShift;
  }

  private static double requireFinite(double value, String what, String unit) {
    if (Math.abs(value) < Double.POSITIVE_INFINITY) {
      return value;
    }
    throw new IllegalArgumentException(what + " " + value + " " + unit + " must be finite");
  }
}
