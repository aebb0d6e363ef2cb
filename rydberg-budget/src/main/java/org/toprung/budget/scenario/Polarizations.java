package org.toprung.budget.scenario;

import java.util.List;
import org.toprung.angular.Polarization;

/** Reads a polarization: a name or a vector of the lab frame. */
final class Polarizations {
  private static final String ALLOWED =
      "\"sigma+\", \"sigma-\", \"pi\", \"linear 30 deg\", a vector [x, y, z] or a complex vector"
          + " [[re, im], [re, im], [re, im]]";

  private Polarizations() {}

  static Polarization read(Value value) {
    if (value.isText()) {
      return value.guarded(() -> Polarization.parse(value.text(ALLOWED)));
    }
    List<Value> axes = value.items(3, ALLOWED);
    double[] parts = new double[6];
    for (int axis = 0; axis < 3; axis++) {
      Value component = axes.get(axis);
      if (component.isList()) {
        List<Value> pair = component.items(2, "a number or [re, im]");
        parts[2 * axis] = pair.get(0).number("a finite number, the real part");
        parts[2 * axis + 1] = pair.get(1).number("a finite number, the imaginary part");
      } else {
        parts[2 * axis] = component.number("a finite number or [re, im]");
      }
    }
    return value.guarded(
        () -> Polarization.ofVector(parts[0], parts[1], parts[2], parts[3], parts[4], parts[5]));
  }
}
