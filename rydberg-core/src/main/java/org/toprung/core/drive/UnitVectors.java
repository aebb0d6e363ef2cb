package org.toprung.core.drive;

import java.util.Locale;

/** Checked directions. */
final class UnitVectors {
  private UnitVectors() {}

  /** The unit vector along (x, y, z); the name is used in the message of a refusal. */
  static double[] of(String name, double x, double y, double z) {
    double scale = Math.max(Math.abs(x), Math.max(Math.abs(y), Math.abs(z)));
    if (!(scale > 0 && scale < Double.POSITIVE_INFINITY)) {
      throw new IllegalArgumentException(
          String.format(
              Locale.ROOT,
              "%s [%s, %s, %s] must be a finite vector that is not zero",
              name,
              x,
              y,
              z));
    }
    double a = x / scale;
    double b = y / scale;
    double c = z / scale;
    double length = Math.sqrt(a * a + b * b + c * c);
    return new double[] {a / length, b / length, c / length};
  }
}
