/**
 * Small dense complex matrices: the arithmetic behind dressed ladders and pulse propagation.
 *
 * <p>Not part of the public API: exported to the budget module alone. A general linear-algebra
 * library was not taken because none of the light ones offers the exponential of a complex
 * non-Hermitian matrix, and the matrices here (a handful to a few dozen rows) need no blocking.
 */
package org.toprung.core.linear;
