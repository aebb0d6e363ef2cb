package org.toprung.budget;

import java.util.function.DoubleUnaryOperator;
import org.toprung.budget.pulse.FrequencyReference;
import org.toprung.budget.pulse.Pulse;
import org.toprung.budget.pulse.PulseProgram;
import org.toprung.core.quantity.Frequency;

/**
 * A program on the two-level system, written from its equation: H/h = −δ|t⟩⟨t| +
 * (Ω/2)(e^(−iφ)|t⟩⟨s| + h.c.), the light shift of each beam with its own intensity.
 */
public final class PlayedProgram implements SchrodingerEquation.Hamiltonian {
  private final PulseProgram program;
  private final double rabi;
  private final double[] shift;
  private DoubleUnaryOperator rabiFactor = t -> 1;
  private DoubleUnaryOperator detuning = t -> 0;
  private DoubleUnaryOperator intensity = t -> 1;

  /** The program as it should be. */
  public PlayedProgram(Pulse pulse, double rabiHertz, double... shiftHertz) {
    this.program = pulse.program(shiftHertz.length, Frequency.ofHertz(rabiHertz));
    this.rabi = rabiHertz;
    this.shift = shiftHertz;
  }

  /** Multiplies the effective Rabi frequency. */
  public PlayedProgram times(DoubleUnaryOperator factor) {
    this.rabiFactor = factor;
    return this;
  }

  /** Adds to the detuning, Hz. */
  public PlayedProgram detunedBy(DoubleUnaryOperator hertz) {
    this.detuning = hertz;
    return this;
  }

  /** Multiplies the light shift of the first beam. */
  public PlayedProgram shiftedBy(DoubleUnaryOperator relativeIntensity) {
    this.intensity = relativeIntensity;
    return this;
  }

  /** The final state from the start, {start re, target re, start im, target im}. */
  public double[] end() {
    return SchrodingerEquation.solve(this, program.breaks(), new double[] {1, 0, 0, 0});
  }

  @Override
  public void write(double t, double[] re, double[] im) {
    double omega = rabi * rabiFactor.applyAsDouble(t) * program.amplitude(t);
    double delta = program.detuningHertz(t) + detuning.applyAsDouble(t);
    for (int k = 0; k < shift.length; k++) {
      double now = Math.pow(program.fieldFactor(k, t), 2);
      double foreseen =
          program.reference() == FrequencyReference.FOLLOWING
              ? Math.pow(program.programmedFieldFactor(k, t), 2)
              : 1;
      delta -= ((k == 0 ? intensity.applyAsDouble(t) : 1) * now - foreseen) * shift[k];
    }
    double phase = program.phaseRadians(t);
    re[1] = 0.5 * omega * Math.cos(phase);
    im[1] = 0.5 * omega * Math.sin(phase);
    re[2] = re[1];
    im[2] = -im[1];
    re[3] = -delta;
  }
}
