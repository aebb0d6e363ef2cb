package org.toprung.budget.dynamics;

import org.toprung.budget.pulse.Pulse;
import org.toprung.budget.pulse.PulseProgram;
import org.toprung.core.quantity.Frequency;

/**
 * Final state of the ideal pulse in the resonant two-level system of start s and target t, H/h =
 * −δ|t⟩⟨t| + (Ω/2)(e^(−iφ)|t⟩⟨s| + h.c.).
 *
 * @param startRe real part of the start's amplitude
 * @param startIm imaginary part of the start's amplitude
 * @param targetRe real part of the target's amplitude
 * @param targetIm imaginary part of the target's amplitude
 */
record IdealRotation(double startRe, double startIm, double targetRe, double targetIm) {
  private static final int SMOOTH_STEPS = 400;
  private static final double GAUSS = Math.sqrt(3) / 6;
  private static final double NEAR = 0.5 + Math.sqrt(3) / 3;

  static IdealRotation of(Pulse pulse, int steps, double rabiHertz) {
    PulseProgram program = pulse.ideal().program(steps, Frequency.ofHertz(rabiHertz));
    Propagation propagation = new Propagation(2);
    double[] re = {1, 0};
    double[] im = {0, 0};
    double[] breaks = program.breaks();
    for (int i = 0; i + 1 < breaks.length; i++) {
      double length = breaks[i + 1] - breaks[i];
      if (program.isConstant(i)) {
        double[] h = hamiltonian(program, breaks[i] + 0.5 * length, rabiHertz);
        advance(propagation, h, h, 1, length, re, im);
        continue;
      }
      double step = length / SMOOTH_STEPS;
      for (int s = 0; s < SMOOTH_STEPS; s++) {
        double from = breaks[i] + s * step;
        double[] a = hamiltonian(program, from + (0.5 - GAUSS) * step, rabiHertz);
        double[] b = hamiltonian(program, from + (0.5 + GAUSS) * step, rabiHertz);
        advance(propagation, a, b, NEAR, 0.5 * step, re, im);
        advance(propagation, a, b, 1 - NEAR, 0.5 * step, re, im);
      }
    }
    return new IdealRotation(re[0], im[0], re[1], im[1]);
  }

  /** Real and imaginary part of the coupling to the target, and the energy of the target, Hz. */
  private static double[] hamiltonian(PulseProgram program, double t, double rabiHertz) {
    double half = 0.5 * rabiHertz * program.amplitude(t);
    double phase = program.phaseRadians(t);
    return new double[] {
      half * Math.cos(phase), -half * Math.sin(phase), -program.detuningHertz(t)
    };
  }

  private static void advance(
      Propagation propagation,
      double[] a,
      double[] b,
      double weight,
      double seconds,
      double[] re,
      double[] im) {
    double cRe = weight * a[0] + (1 - weight) * b[0];
    double cIm = weight * a[1] + (1 - weight) * b[1];
    double energy = weight * a[2] + (1 - weight) * b[2];
    propagation.advance(
        new double[] {0, cRe, cRe, energy}, new double[] {0, -cIm, cIm, 0}, seconds, re, im);
  }
}
