package org.toprung.budget.dynamics;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import org.toprung.budget.pulse.PulseProgram;

/**
 * A program cut into segments of constant Hamiltonian.
 *
 * <p>What is constant stays one segment, or several where noise has to be followed. What changes
 * smoothly is cut into steps of length h, each replaced by two exponentials of length h/2 with the
 * mean Hamiltonians (½ ± √3/3) H(t1) + (½ ∓ √3/3) H(t2) at the two Gauss points t1, t2 = (½ ∓
 * √3/6)h: the commutator-free Magnus integrator of order four (Blanes and Moan, Appl. Numer. Math.
 * 56, 1519 (2006)). Both are again constant Hamiltonians, of the true frame and Hermitian.
 *
 * <p>Immutable.
 */
final class Timeline {
  private static final double GAUSS = Math.sqrt(3) / 6;
  private static final double NEAR = 0.5 + Math.sqrt(3) / 3;

  /** Fields, frequency and phase at one time. */
  record Sample(double[] fields, double lastOffset, double phase, boolean isConstant) {}

  private final List<Sample> samples = new ArrayList<>();
  private final List<double[]> segments = new ArrayList<>(); // seconds, sample, sample, weight

  private Timeline() {}

  /**
   * Cuts a program.
   *
   * @param calibrated the program
   * @param smoothSteps number of steps between breaks where anything changes, at least 1
   * @param longest greatest length of a segment, s; may be infinite
   * @return the segments
   */
  static Timeline of(CalibratedProgram calibrated, int smoothSteps, double longest) {
    Timeline timeline = new Timeline();
    PulseProgram program = calibrated.program();
    double[] breaks = program.breaks();
    Map<List<Double>, Integer> constants = new HashMap<>();
    for (int i = 0; i + 1 < breaks.length; i++) {
      double from = breaks[i];
      double length = breaks[i + 1] - from;
      if (program.isConstant(i)) {
        Sample sample = sample(calibrated, from + 0.5 * length, true);
        List<Double> key = new ArrayList<>(List.of(sample.lastOffset(), sample.phase()));
        for (double f : sample.fields()) {
          key.add(f);
        }
        Integer index = constants.get(key);
        if (index == null) {
          index = timeline.add(sample);
          constants.put(key, index);
        }
        int parts = parts(length, longest);
        for (int s = 0; s < parts; s++) {
          timeline.segments.add(new double[] {length / parts, index, index, 1});
        }
        continue;
      }
      int steps = Math.max(smoothSteps, parts(length, 2 * longest));
      double h = length / steps;
      for (int s = 0; s < steps; s++) {
        int a = timeline.add(sample(calibrated, from + (s + 0.5 - GAUSS) * h, false));
        int b = timeline.add(sample(calibrated, from + (s + 0.5 + GAUSS) * h, false));
        timeline.segments.add(new double[] {0.5 * h, a, b, NEAR});
        timeline.segments.add(new double[] {0.5 * h, a, b, 1 - NEAR});
      }
    }
    return timeline;
  }

  private static int parts(double length, double longest) {
    return Math.max(1, (int) Math.ceil(length / longest * (1 - 1e-9)));
  }

  private static Sample sample(CalibratedProgram calibrated, double t, boolean isConstant) {
    PulseProgram program = calibrated.program();
    double[] fields = new double[program.steps()];
    for (int k = 0; k < fields.length; k++) {
      fields[k] = program.fieldFactor(k, t);
    }
    return new Sample(fields, calibrated.laserOffsetHertz(t), program.phaseRadians(t), isConstant);
  }

  private int add(Sample sample) {
    samples.add(sample);
    return samples.size() - 1;
  }

  List<Sample> samples() {
    return samples;
  }

  int segments() {
    return segments.size();
  }

  double seconds(int segment) {
    return segments.get(segment)[0];
  }

  int first(int segment) {
    return (int) segments.get(segment)[1];
  }

  int second(int segment) {
    return (int) segments.get(segment)[2];
  }

  /** Weight of the first sample; the second has the rest. */
  double firstWeight(int segment) {
    return segments.get(segment)[3];
  }

  boolean isConstant(int segment) {
    return first(segment) == second(segment);
  }
}
