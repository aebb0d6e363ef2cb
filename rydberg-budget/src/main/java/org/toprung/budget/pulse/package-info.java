/**
 * Pulses that a drive is switched on for, and the programs that a sequencer plays.
 *
 * <p>Frequencies and detunings are ordinary ones (Hz), times in s, phases and areas in rad. The
 * effective two-level system is H/h = −δ|t⟩⟨t| + (Ω/2)(e^(−iφ)|t⟩⟨s| + h.c.), with start s, target
 * t and δ the laser's frequency minus the resonance.
 */
package org.toprung.budget.pulse;
