package org.toprung.core.drive;

/**
 * Where a ladder is resonant with its beams at given fields, and how fast it goes there.
 *
 * @param offsetHertz what is added to the last laser's frequency, counted from bare N-photon
 *     resonance with the target as calculated, to sit on the light-shifted resonance, Hz
 * @param rabiHertz effective Rabi frequency over 2π, Hz; 0 where a beam is off
 * @param startHertz energy of the start over h that the light has moved it to, Hz
 */
public record LadderResonance(double offsetHertz, double rabiHertz, double startHertz) {}
