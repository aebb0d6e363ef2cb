package org.toprung.budget.pulse;

/**
 * What success of a pulse is; the error is 1 − success.
 *
 * <p>Below, the ideal pulse is {@link Pulse#ideal()} in the resonant two-level system of start s
 * and target t, and ψ is the state that the real pulse leaves.
 */
public enum Goal {
  /** Success is the population of the wanted target, summed over all wanted states. */
  TRANSFER,
  /** Success is |⟨w|ψ⟩|², w being the state that the ideal pulse makes. */
  ROTATION,
  /**
   * The start comes back with the planned phase relative to an idling state: success is ¼|1 + c
   * e^(−iφ0)|², c being the amplitude of the start in ψ and φ0 the phase of c after the ideal
   * pulse.
   */
  RETURN,
  /** Success is (1 + contrast)/2 of a fringe, that is |⟨w|ψ⟩|² at the phase where w is the top. */
  COHERENCE
}
