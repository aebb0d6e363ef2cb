package org.toprung.budget.pulse;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.apache.commons.math4.legacy.ode.FirstOrderDifferentialEquations;
import org.apache.commons.math4.legacy.ode.nonstiff.DormandPrince853Integrator;
import org.junit.jupiter.api.Test;
import org.toprung.core.quantity.Frequency;
import org.toprung.core.quantity.Time;

/** Passage through a resonant intermediate level, three states, integrated by Commons Math. */
class StirapTest {
  private static final Time WIDTH = Time.microseconds(2);
  private static final Time DELAY = Time.microseconds(0.7);

  /** Populations of the three states; the middle one is written −iy to stay real. */
  private static double[] populations(PulseProgram program, double pumpHertz, double stokesHertz) {
    FirstOrderDifferentialEquations equations =
        new FirstOrderDifferentialEquations() {
          @Override
          public int getDimension() {
            return 3;
          }

          @Override
          public void computeDerivatives(double t, double[] c, double[] rate) {
            double pump = Math.PI * pumpHertz * program.fieldFactor(0, t);
            double stokes = Math.PI * stokesHertz * program.fieldFactor(1, t);
            rate[0] = -pump * c[1];
            rate[1] = pump * c[0] + stokes * c[2];
            rate[2] = -stokes * c[1];
          }
        };
    double[] c = {1, 0, 0};
    new DormandPrince853Integrator(1e-14, 1e-8, 1e-11, 1e-11)
        .integrate(equations, 0, c, program.seconds(), c);
    return new double[] {c[0] * c[0], c[1] * c[1], c[2] * c[2]};
  }

  @Test
  void bringsTheAtomOverWhateverTheStrength() {
    for (Pulse pulse :
        new Pulse[] {Pulse.stirap(WIDTH, DELAY), Pulse.gaussianStirap(WIDTH, DELAY)}) {
      PulseProgram program = pulse.program(2, Frequency.megahertz(1));
      for (double strength : new double[] {20e6, 25e6, 30e6}) {
        double[] p = populations(program, strength, strength);
        assertEquals(1, p[0] + p[1] + p[2], 1e-8);
        assertTrue(p[2] > 0.999, pulse.name() + " " + strength + ": " + p[2]);
      }
    }
  }

  @Test
  void beginsWithTheSecondStep() {
    PulseProgram program = Pulse.stirap(WIDTH, DELAY).program(2, Frequency.megahertz(1));
    assertEquals(2.7e-6, program.seconds(), 1e-18);
    assertEquals(0, program.fieldFactor(0, 0.5e-6));
    assertEquals(0.5, program.fieldFactor(1, 0.5e-6), 1e-12);
    assertEquals(0.5, program.fieldFactor(0, 1.2e-6), 1e-12);
    assertEquals(0, program.fieldFactor(1, 2.2e-6));
    assertEquals(4, program.breaks().length);
  }
}
