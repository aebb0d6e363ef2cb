/**
 * Radial wavefunctions of the valence electron and integrals over them, in atomic units.
 *
 * <p>Wavefunctions are normalized and positive near r = 0: the outermost lobe has the sign
 * (−1)^(n−l−1). Lengths are counted in Bohr radii; the finite nuclear mass enters through the
 * reduced-mass energy unit only, which changes lengths by less than 1e-5.
 */
package org.toprung.core.radial;
