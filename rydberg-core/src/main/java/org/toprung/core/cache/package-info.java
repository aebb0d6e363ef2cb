/** Bounded concurrent caches. Not exported. */
package org.toprung.core.cache;
