package org.toprung.core.drive;

import java.util.List;

/**
 * What measurements say about the light at the atom.
 *
 * @param intensities one entry for each beam
 * @param chiSquared sum of the squared deviations of model from measurement in units of their
 *     uncertainties
 * @param spareMeasurements number of measurements beyond what is needed, which is what chiSquared
 *     should come out near
 * @param kernel a kernel that expects these intensities, in agreement with the measurements
 */
public record CalibrationResult(
    List<Intensity> intensities, double chiSquared, int spareMeasurements, DriveKernel kernel) {

  /**
   * Intensity of one beam.
   *
   * @param ratio actual over expected intensity at the atom
   * @param measurementUncertainty standard uncertainty of the ratio from the measurements
   * @param elementUncertainty standard uncertainty of the ratio from dipole elements and
   *     far-off-resonant shifts; it matters for the ratio as a statement about light, not for the
   *     corrected kernel, which agrees with the measurements whatever the elements are
   */
  public record Intensity(double ratio, double measurementUncertainty, double elementUncertainty) {
    /**
     * Both uncertainties together.
     *
     * @return the standard uncertainty of the ratio
     */
    public double uncertainty() {
      return Math.hypot(measurementUncertainty, elementUncertainty);
    }
  }

  /**
   * Copies the list.
   *
   * @param intensities one entry for each beam
   * @param chiSquared sum of squared deviations
   * @param spareMeasurements number of measurements beyond what is needed
   * @param kernel the corrected kernel
   */
  public CalibrationResult {
    intensities = List.copyOf(intensities);
  }
}
