package org.toprung.core.drive;

import java.util.HashMap;
import java.util.Map;
import java.util.Set;
import java.util.function.BiFunction;
import org.toprung.core.atom.Level;
import org.toprung.core.quantity.Estimate;
import org.toprung.core.structure.FarLightShift;

/** Light shifts of the first and the last rung by levels outside the ladder. Not thread-safe. */
final class FarShifts {
  private final DriveSetup setup;
  private final RotatingFrame frame;
  private final StepLight light;
  private final BiFunction<Integer, Integer, Set<Level>> inLadder;
  private final Map<String, Estimate> known = new HashMap<>();

  /**
   * Prepares the shifts.
   *
   * @param inLadder levels that the ladder itself couples to a rung by the beam of a step
   */
  FarShifts(
      DriveSetup setup,
      RotatingFrame frame,
      StepLight light,
      BiFunction<Integer, Integer, Set<Level>> inLadder) {
    this.setup = setup;
    this.frame = frame;
    this.light = light;
    this.inLadder = inLadder;
  }

  /** Shift of a state, Hz by step. */
  double[] hertz(ProductState s, int rung) {
    double[] shift = new double[setup.steps()];
    for (int k = 0; k < shift.length; k++) {
      shift[k] = of(s, rung, k).value();
    }
    return shift;
  }

  /** Shift of a state by one beam with its uncertainty, Hz. */
  Estimate of(ProductState s, int rung, int step) {
    double squared = light.fieldVoltsPerMetre(step) * light.fieldVoltsPerMetre(step);
    double value = 0;
    double uncertainty = 0;
    for (int c = 0; c < s.amplitude().length; c++) {
      double weight = s.amplitude()[c] * s.amplitude()[c] * squared;
      Estimate e = perFieldSquared(s.level(), s.doubledMj()[c], rung, step);
      value += weight * e.value();
      uncertainty += weight * e.uncertainty();
    }
    return new Estimate(value, uncertainty);
  }

  private Estimate perFieldSquared(Level level, int doubledMj, int rung, int step) {
    return known.computeIfAbsent(
        level + " " + doubledMj + " " + step,
        key ->
            FarLightShift.of(setup.species())
                .hertzPerFieldSquared(
                    level,
                    doubledMj,
                    frame.laserHertz(step),
                    light.polarization(step),
                    inLadder.apply(rung, step)));
  }
}
