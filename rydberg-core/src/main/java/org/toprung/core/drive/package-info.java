/**
 * From beams and an atom to couplings: what a ladder of lasers does to an atom.
 *
 * <p>{@link org.toprung.core.drive.Drive} is the entry. Conventions of this package:
 *
 * <ul>
 *   <li>The magnetic field is the quantization axis and lab z; polarizations are complex vectors of
 *       the lab frame.
 *   <li>Rabi frequency Ω = E0 |⟨d·ε⟩| / ħ with E(t) = E0 cos ωt; public values are Ω/2π in Hz, full
 *       transfer at Ωt = π.
 *   <li>The detuning of the ladder is the first laser's frequency minus the frequency from the
 *       start, at its own energy in the field, to the centre of gravity of the intermediate level's
 *       hyperfine manifold.
 *   <li>Light shifts are moves of a level's energy over h, positive upwards.
 *   <li>The Rydberg level has no hyperfine structure here: its sublevels are
 *       |m<sub>J</sub>⟩|m<sub>I</sub>⟩, and "the target" is m<sub>J</sub> with whatever
 *       m<sub>I</sub> the start brings along.
 * </ul>
 */
package org.toprung.core.drive;
