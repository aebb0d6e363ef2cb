package org.toprung.budget.pulse;

/**
 * Amplitudes of start and target during a program, turned by exact rotations of short slices: H/h =
 * −δ|t⟩⟨t| + (Ω/2)(e^(−iφ)|t⟩⟨s| + h.c.), up to a phase that makes the determinant 1.
 */
final class TwoStates {
  private double startRe = 1;
  private double startIm;
  private double targetRe;
  private double targetIm;

  static TwoStates after(
      PulseProgram program, double rabiHertz, double detuningHertz, int slicesPerInterval) {
    TwoStates states = new TwoStates();
    double[] breaks = program.breaks();
    for (int i = 0; i + 1 < breaks.length; i++) {
      int n = program.isConstant(i) ? 1 : slicesPerInterval;
      double dt = (breaks[i + 1] - breaks[i]) / n;
      for (int j = 0; j < n; j++) {
        double t = breaks[i] + (j + 0.5) * dt;
        states.turn(
            rabiHertz * program.amplitude(t),
            program.detuningHertz(t) + detuningHertz,
            program.phaseRadians(t),
            dt);
      }
    }
    return states;
  }

  /** Up to the phase e^{iπδdt}: cos a − i sin a n·σ, a = π√(Ω² + δ²)dt, n along (Ω, δ). */
  private void turn(double rabi, double detuning, double phase, double dt) {
    double norm = Math.hypot(rabi, detuning);
    double a = Math.PI * norm * dt;
    double cos = Math.cos(a);
    double sx = norm == 0 ? 0 : Math.sin(a) * rabi / norm;
    double sz = norm == 0 ? 0 : Math.sin(a) * detuning / norm;
    double c = Math.cos(phase);
    double s = Math.sin(phase);
    // −i sin a (Ω/ν)(e^{iφ} |s⟩⟨t| + e^{−iφ} |t⟩⟨s|) − i sin a (δ/ν)(|s⟩⟨s| − |t⟩⟨t|)
    double sr = cos * startRe + sz * startIm + sx * (s * targetRe + c * targetIm);
    double si = cos * startIm - sz * startRe + sx * (s * targetIm - c * targetRe);
    double tr = cos * targetRe - sz * targetIm + sx * (-s * startRe + c * startIm);
    double ti = cos * targetIm + sz * targetRe + sx * (-s * startIm - c * startRe);
    startRe = sr;
    startIm = si;
    targetRe = tr;
    targetIm = ti;
  }

  double target() {
    return targetRe * targetRe + targetIm * targetIm;
  }

  double start() {
    return startRe * startRe + startIm * startIm;
  }

  /** 1 − |⟨other|this⟩|², written as |s₁t₂ − t₁s₂|² so that nothing cancels. */
  double infidelity(TwoStates o) {
    double re =
        startRe * o.targetRe - startIm * o.targetIm - targetRe * o.startRe + targetIm * o.startIm;
    double im =
        startRe * o.targetIm + startIm * o.targetRe - targetRe * o.startIm - targetIm * o.startRe;
    return re * re + im * im;
  }

  /** 1 − ½|tr U†V| of the whole rotations, of which these states are the first column. */
  double gateInfidelity(TwoStates o) {
    double same =
        square(startRe - o.startRe)
            + square(startIm - o.startIm)
            + square(targetRe - o.targetRe)
            + square(targetIm - o.targetIm);
    double opposite =
        square(startRe + o.startRe)
            + square(startIm + o.startIm)
            + square(targetRe + o.targetRe)
            + square(targetIm + o.targetIm);
    return 0.5 * Math.min(same, opposite);
  }

  private static double square(double x) {
    return x * x;
  }

  /** Population of the upper (+1) or lower (−1) dressed state at these settings, phase 0. */
  double dressed(double rabi, double detuning, int sign) {
    double norm = Math.hypot(rabi, detuning);
    // H/h = −δ/2 + ½[[δ, Ω], [Ω, −δ]] in the order s, t
    double vs = rabi;
    double vt = sign * norm - detuning;
    double length = Math.hypot(vs, vt);
    double re = (vs * startRe + vt * targetRe) / length;
    double im = (vs * startIm + vt * targetIm) / length;
    return re * re + im * im;
  }
}
