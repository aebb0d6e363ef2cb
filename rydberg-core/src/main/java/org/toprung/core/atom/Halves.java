package org.toprung.core.atom;

/** Half-integers held as doubled integers: text and exact conversion. */
final class Halves {
  private Halves() {}

  /** "2" or "3/2". */
  static String text(int doubled) {
    return doubled % 2 == 0 ? Integer.toString(doubled / 2) : doubled + "/2";
  }

  /** The doubled integer of a number that must be a half-integer. */
  static int doubled(String name, double value) {
    double twice = 2 * value;
    if (!(Math.abs(twice) <= 10_000 && twice == Math.rint(twice))) {
      throw Refusal.of("%s must be an integer or half-integer, given %s", name, value);
    }
    return (int) twice;
  }
}
