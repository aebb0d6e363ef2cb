package org.toprung.angular;

/** A unit vector in the lab frame. */
record Direction(double x, double y, double z) {

  /** The unit vector along (x, y, z); the name is used in messages. */
  static Direction of(String name, double x, double y, double z) {
    double largest = Math.max(Math.abs(x), Math.max(Math.abs(y), Math.abs(z)));
    if (!(largest > 0 && largest < Double.POSITIVE_INFINITY)) {
      throw new IllegalArgumentException(
          name + " must be finite and not zero: (" + x + ", " + y + ", " + z + ")");
    }
    int exponent = Math.getExponent(largest);
    double sx = Math.scalb(x, -exponent);
    double sy = Math.scalb(y, -exponent);
    double sz = Math.scalb(z, -exponent);
    double norm = Math.sqrt(sx * sx + sy * sy + sz * sz);
    return new Direction(sx / norm, sy / norm, sz / norm);
  }

  /** Sine of the angle to the lab z axis. */
  double transverse() {
    return Math.hypot(x, y);
  }
}
