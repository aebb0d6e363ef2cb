package org.toprung.core.atom;

import org.toprung.angular.HalfInteger;

/** Doubled integers of this package from and to what people write. */
final class Halves {
  private Halves() {}

  /** "2" or "3/2". */
  static String text(int doubled) {
    return HalfInteger.ofHalves(doubled).toString();
  }

  /** The doubled integer of a number that must be a half-integer; the message names it. */
  static int doubled(String name, double value) {
    try {
      return HalfInteger.of(value).doubled();
    } catch (IllegalArgumentException e) {
      throw Refusal.of("%s must be an integer or half-integer, given %s", name, value);
    }
  }
}
