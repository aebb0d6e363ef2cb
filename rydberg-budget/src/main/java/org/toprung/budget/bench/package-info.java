/**
 * What disturbs an apparatus from one shot to the next: temperature, fields, lasers. Every value is
 * optional, so that a budget can say what it had no number for.
 */
package org.toprung.budget.bench;
