package org.toprung.core.atom;

import java.util.Locale;

/** Builds the exceptions of this package, so that all are formatted alike. */
final class Refusal {
  private Refusal() {}

  static IllegalArgumentException of(String template, Object... parts) {
    return new IllegalArgumentException(String.format(Locale.ROOT, template, parts));
  }
}
