package org.toprung.budget.pulse;

/**
 * A stretch of a pulse.
 *
 * @param areaRadians area of the amplitude, from which the length follows; NaN if the length is
 *     fixed
 * @param fixedSeconds length, where it is fixed
 * @param shape course of the amplitude
 * @param level greatest amplitude, relative to full power
 * @param sweep course of the detuning
 * @param fromHertz detuning at the beginning
 * @param toHertz detuning at the end
 * @param phaseRadians phase of the light
 */
record Part(
    double areaRadians,
    double fixedSeconds,
    Shape shape,
    double level,
    Sweep sweep,
    double fromHertz,
    double toHertz,
    double phaseRadians) {

  /** At full power until the area is reached. */
  static Part turn(Shape shape, double areaRadians, double phaseRadians) {
    return new Part(areaRadians, Double.NaN, shape, 1, Sweep.LINEAR, 0, 0, phaseRadians);
  }

  static Part dark(double seconds, double phaseRadians) {
    return slice(seconds, 0, 0, phaseRadians);
  }

  static Part slice(double seconds, double level, double detuningHertz, double phaseRadians) {
    return new Part(
        Double.NaN,
        seconds,
        Shape.CONSTANT,
        level,
        Sweep.LINEAR,
        detuningHertz,
        detuningHertz,
        phaseRadians);
  }

  static Part timed(double seconds, Shape shape, Sweep sweep, double fromHertz, double toHertz) {
    return new Part(Double.NaN, seconds, shape, 1, sweep, fromHertz, toHertz, 0);
  }

  double seconds(double rabiHertz) {
    return Double.isNaN(areaRadians)
        ? fixedSeconds
        : areaRadians / (2 * Math.PI * rabiHertz * level * shape.mean());
  }

  boolean isConstantAmplitude() {
    return shape == Shape.CONSTANT;
  }

  /** Whether the amplitude stays constant into the next part. */
  boolean goesOnAs(Part next) {
    return isConstantAmplitude() && next.isConstantAmplitude() && level == next.level();
  }

  /** Amplitude at the beginning and at the end. */
  double edgeLevel() {
    return isConstantAmplitude() ? level : 0;
  }
}
