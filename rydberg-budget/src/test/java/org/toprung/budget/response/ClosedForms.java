package org.toprung.budget.response;

import java.util.function.DoubleUnaryOperator;
import org.toprung.budget.pulse.Pulse;
import org.toprung.budget.pulse.PulseProgram;
import org.toprung.core.quantity.Frequency;

/**
 * What is known in closed form of resonant pulses that turn about one axis, by the angle θ(t) = ∫Ω
 * dt: a detuning x(t) (Hz) leaves the amplitude 2π∫½ sin θ x dt in the wrong state, a relative
 * amplitude error ε(t) the angle ½∫Ω ε dt.
 *
 * <p>The integrals here are done by brute force, Simpson's rule on many points of each interval.
 */
public final class ClosedForms {
  private static final int POINTS = 4000;

  private ClosedForms() {}

  /**
   * To first order in the coupling Ω′ to a sublevel that lies δ away an abrupt π pulse of the Rabi
   * frequency Ω leaves π²Ω′²|∫cos(πΩt) exp(2πiδt) dt|² there, Ω′²/4δ² when δ is large.
   */
  public static double neighbour(double rabiHertz, double otherRabiHertz, double awayHertz) {
    double a = Math.PI * rabiHertz;
    double b = 2 * Math.PI * awayHertz;
    double integral =
        (a * a + b * b - 2 * a * b * Math.sin(b * Math.PI / (2 * a)))
            / ((a * a - b * b) * (a * a - b * b));
    return Math.pow(Math.PI * otherRabiHertz, 2) * integral;
  }

  /** |∫ g(θ(t)) e^{2πift} dt|². */
  static double power(Pulse pulse, double rabiHertz, DoubleUnaryOperator g, double hertz) {
    return integral(pulse, rabiHertz, (angle, rate) -> g.applyAsDouble(angle), hertz);
  }

  /** |∫ Ω(t) e^{2πift} dt|², Ω in rad/s. */
  static double ratePower(Pulse pulse, double rabiHertz, double hertz) {
    return integral(pulse, rabiHertz, (angle, rate) -> rate, hertz);
  }

  private interface Kernel {
    double at(double angle, double rate);
  }

  private static double integral(Pulse pulse, double rabiHertz, Kernel g, double hertz) {
    PulseProgram program = pulse.program(1, Frequency.ofHertz(rabiHertz));
    double[] breaks = program.breaks();
    double angle = 0;
    double re = 0;
    double im = 0;
    for (int i = 0; i + 1 < breaks.length; i++) {
      double h = (breaks[i + 1] - breaks[i]) / POINTS;
      for (int k = 0; k < POINTS; k++) {
        double from = breaks[i] + k * h;
        double early = rate(program, rabiHertz, k == 0 ? from + 1e-6 * h : from);
        double middle = rate(program, rabiHertz, from + 0.5 * h);
        double late = rate(program, rabiHertz, from + (k + 1 == POINTS ? 1 - 1e-6 : 1) * h);
        double half = angle + h * (5 * early + 8 * middle - late) / 24;
        double end = angle + h * (early + 4 * middle + late) / 6;
        double[] values = {g.at(angle, early), g.at(half, middle), g.at(end, late)};
        double[] weights = {h / 6, 4 * h / 6, h / 6};
        for (int s = 0; s < 3; s++) {
          double phase = 2 * Math.PI * hertz * (from + 0.5 * s * h);
          re += weights[s] * values[s] * Math.cos(phase);
          im += weights[s] * values[s] * Math.sin(phase);
        }
        angle = end;
      }
    }
    return re * re + im * im;
  }

  private static double rate(PulseProgram program, double rabiHertz, double t) {
    // one axis: a phase of π is a turn backwards
    double sign = Math.cos(program.phaseRadians(t)) < 0 ? -1 : 1;
    return sign * 2 * Math.PI * rabiHertz * program.amplitude(t);
  }
}
