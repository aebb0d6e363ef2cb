/**
 * Radial wavefunctions of the valence electron and integrals over them, in atomic units.
 *
 * <p>Wavefunctions are normalized and positive near r = 0: the outermost lobe has the sign
 * (−1)^(n−l−1). Lengths are counted in Bohr radii; the finite nuclear mass enters through the
 * reduced-mass energy unit, and through the length for hydrogen alone, where it amounts to 5e-4 (Li
 * 8e-5, Rb 6e-6).
 *
 * <p>Methods, from the most to the least that they know of the core: model potential (Numerov),
 * Coulomb waves at the quantum defect, quasi-classical closed formula and WKB. {@link
 * org.toprung.core.radial.RadialComparison} asks all of them.
 */
package org.toprung.core.radial;
