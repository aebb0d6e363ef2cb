/**
 * What follows from levels and radial integrals: reduced dipole elements, lifetimes,
 * polarizabilities and light shifts.
 *
 * <p>Conventions. Reduced elements are those of the Wigner-Eckart theorem in the 3j form, ⟨j
 * m|r_q|j′ m′⟩ = (−1)^{j−m} (j 1 j′; −m q m′) ⟨j‖r‖j′⟩, with Condon-Shortley phases, l coupled to s
 * in this order, and radial waves positive near r = 0; ⟨a‖r‖b⟩ = (−1)^{ja−jb} ⟨b‖r‖a⟩. The
 * spontaneous rate is ω³ |⟨‖d‖⟩|²/(3π ε0 ħ c³ (2J_upper + 1)). An oscillating field is E(t) = E0
 * cos ωt. Shifts are positive when the level moves up.
 */
package org.toprung.core.structure;
