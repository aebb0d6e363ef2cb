/**
 * Angular-momentum algebra and the polarization of light as a rank-one tensor: no units, no atoms.
 *
 * <h2>Conventions</h2>
 *
 * <ul>
 *   <li>Condon-Shortley phases; every 3j, 6j, 9j symbol and Clebsch-Gordan coefficient is real.
 *   <li>Wigner-Eckart theorem with the 3j form: ⟨j m|T<sup>k</sup><sub>q</sub>|j′ m′⟩ =
 *       (−1)<sup>j−m</sup> (j k j′; −m q m′) ⟨j‖T<sup>k</sup>‖j′⟩.
 *   <li>Rotations are active: D<sup>j</sup><sub>m′m</sub>(α, β, γ) = ⟨j m′|e<sup>−iαJz</sup>
 *       e<sup>−iβJy</sup> e<sup>−iγJz</sup>|j m⟩ = e<sup>−im′α</sup> d<sup>j</sup><sub>m′m</sub>(β)
 *       e<sup>−imγ</sup>.
 *   <li>Spherical unit vectors e<sub>±1</sub> = ∓(x ± iy)/√2, e<sub>0</sub> = z. A light field of
 *       complex polarization ε is Re(ε e<sup>−iωt</sup>).
 *   <li>Arguments named {@code tj}, {@code tm}, ... are twice the quantum number, so that
 *       half-integers travel as {@code int}; methods that take them are named {@code ...Doubled}.
 * </ul>
 *
 * <h2>Design history</h2>
 *
 * <p>Single 3j and 6j symbols come from Racah's sum in integers, not from a recurrence: a
 * recurrence computes a whole family to get one member, and near a zero of the symbol it keeps
 * absolute accuracy only. Double-double arithmetic was not needed either: eight in ten random
 * symbols up to j = 30, and four in ten up to j = 100, never leave a pair of {@code long}s. A table
 * of values was left out: reading it would hardly be faster than computing a small symbol from the
 * table of factorials. Families do use the recurrence, and repair it near zeros.
 *
 * <p>Everything is immutable or stateless and safe to use from any number of threads.
 */
package org.toprung.angular;
