package org.toprung.budget.cause;

/**
 * Error of a pulse when something stays wrong during the whole of it, all else as calibrated.
 * Implementations are immutable and thread-safe.
 */
interface Reaction {
  /** Error when the laser is off the calibrated resonance, Hz. */
  double detuned(double hertz);

  /** Error when the intensity of one beam is this times the calibrated one. */
  double brightened(int step, double intensity);

  /** Error when the pulse is this times as long as calibrated. */
  double stretched(double factor);

  /** Mean error over positions of the atom in the beams, calibrated for the mean field. */
  double over(BeamFields fields);
}
