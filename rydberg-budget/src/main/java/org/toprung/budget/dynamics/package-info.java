/**
 * Propagation of the full ladder through a pulse: noise-free, and shot by shot with drawn
 * disturbances. Independent of the causes it is used to check.
 */
package org.toprung.budget.dynamics;
