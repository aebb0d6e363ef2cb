/**
 * Physical quantities as immutable values, estimates with uncertainties, and constants.
 *
 * <p>Each quantity has an {@code of…} factory in SI, factories named after its units, a strict
 * {@code parse} and an accessor in SI. No quantity holds NaN or an infinity. All units are powers
 * of ten times the SI unit, so a decimal text is converted with one rounding and the printed form
 * reads back exactly.
 */
package org.toprung.core.quantity;
