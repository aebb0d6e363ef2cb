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
 *   <li>The nominal position of the atom is the lab origin unless the drive moves it; a beam is
 *       focused there unless its focus is moved. Rabi frequencies and light shifts are those of the
 *       field at the nominal position, field factors count from it.
 *   <li>A beam is a travelling wave with the phase of a plane wave. A retro-reflected beam is not
 *       offered: as a coherent step of a ladder it is a standing wave, whose Rabi frequency depends
 *       on where the atom sits to a fraction of a wavelength and which kicks it both ways at once,
 *       so that neither a sum of intensities nor a single wave vector describes it.
 *   <li>A static electric field shifts the Rydberg sublevels quadratically and diagonally in
 *       m<sub>J</sub>; lower levels are left alone.
 *   <li>Light shifts are moves of a level's energy over h, positive upwards.
 *   <li>The Rydberg level has no hyperfine structure here: its sublevels are
 *       |m<sub>J</sub>⟩|m<sub>I</sub>⟩, and "the target" is m<sub>J</sub> with whatever
 *       m<sub>I</sub> the start brings along.
 * </ul>
 */
package org.toprung.core.drive;
