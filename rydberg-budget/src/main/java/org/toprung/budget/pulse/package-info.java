/** The pulse that a drive is switched on for. */
package org.toprung.budget.pulse;
