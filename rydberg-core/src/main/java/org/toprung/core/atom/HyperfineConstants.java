package org.toprung.core.atom;

/**
 * Hyperfine constants of a level, E(F) = A K/2 + B [3K(K+1)/4 − I(I+1)J(J+1)] / [2I(2I−1)J(2J−1)]
 * with K = F(F+1) − I(I+1) − J(J+1) (Arimondo, Inguscio and Violino, Rev. Mod. Phys. 49, 31
 * (1977)).
 *
 * @param aHertz magnetic dipole constant A/h in Hz
 * @param bHertz electric quadrupole constant B/h in Hz; 0 for j = 1/2 and where it is not measured
 * @param measured whether A is measured for this very level; otherwise it is scaled with the
 *     inverse cube of the effective principal quantum number
 * @param source the publication, and what was done to its value
 */
public record HyperfineConstants(double aHertz, double bHertz, boolean measured, String source) {}
