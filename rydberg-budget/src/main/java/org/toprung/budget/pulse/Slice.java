package org.toprung.budget.pulse;

import java.util.List;

/**
 * A stretch of constant settings for a waveform generator.
 *
 * @param seconds length, s
 * @param fieldFactors programmed field of each beam over its full field, one per step
 * @param detuningHertz laser minus the program's resonance, Hz
 * @param phaseRadians phase of the ladder's light, rad
 */
public record Slice(
    double seconds, List<Double> fieldFactors, double detuningHertz, double phaseRadians) {
  /**
   * Copies the list.
   *
   * @param seconds length, s
   * @param fieldFactors programmed field of each beam over its full field, one per step
   * @param detuningHertz laser minus the program's resonance, Hz
   * @param phaseRadians phase of the ladder's light, rad
   */
  public Slice {
    fieldFactors = List.copyOf(fieldFactors);
  }
}
