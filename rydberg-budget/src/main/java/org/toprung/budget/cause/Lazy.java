package org.toprung.budget.cause;

import java.util.function.Supplier;

/** A value that is computed when first asked for, once. Thread-safe. */
final class Lazy<T> {
  private final Supplier<T> compute;
  private volatile T value;

  Lazy(Supplier<T> compute) {
    this.compute = compute;
  }

  T get() {
    T found = value;
    if (found == null) {
      synchronized (this) {
        found = value;
        if (found == null) {
          found = compute.get();
          value = found;
        }
      }
    }
    return found;
  }
}
