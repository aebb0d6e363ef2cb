package org.toprung.budget.dynamics;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.junit.jupiter.api.Test;
import org.toprung.budget.TestDrives;
import org.toprung.budget.pulse.Pulse;
import org.toprung.budget.pulse.PulseProgram;
import org.toprung.core.drive.Ladder;
import org.toprung.core.drive.LadderSetting;
import org.toprung.core.quantity.Frequency;
import org.toprung.core.quantity.Time;

class EdgeResidualTest {
  private static final double EDGE = 3e-9;

  /** Near enough that edges of some nanoseconds leave something, with weak beams. */
  private static Ladder ladder() {
    return TestDrives.rubidium()
        .detuned(Frequency.gigahertz(0.2))
        .resolve()
        .ladder()
        .withFieldScaled(0, 0.1)
        .withFieldScaled(1, 0.2);
  }

  private static LadderSystem system(Ladder ladder, double edge) {
    Pulse pulse = Pulse.pi().withEdges(Time.ofSeconds(edge), Time.ofSeconds(edge));
    return LadderSystem.of(CalibratedProgram.of(ladder, pulse));
  }

  /**
   * The bare ladder from its bare start through the program in steps of 0.1 ns, midpoint rule:
   * population of the intermediate level at the end, where the light is off.
   */
  private static double bruteForce(CalibratedProgram calibrated) {
    Ladder ladder = calibrated.ladder();
    PulseProgram program = calibrated.program();
    int n = ladder.size();
    double[] hRe = new double[n * n];
    double[] hIm = new double[n * n];
    double[] re = new double[n];
    double[] im = new double[n];
    re[ladder.start()] = 1;
    Propagation propagation = new Propagation(n);
    double[] breaks = program.breaks();
    for (int b = 0; b + 1 < breaks.length; b++) {
      double length = breaks[b + 1] - breaks[b];
      int steps = program.isConstant(b) ? 1 : (int) Math.ceil(length / 1e-10);
      for (int s = 0; s < steps; s++) {
        double t = breaks[b] + (s + 0.5) * length / steps;
        LadderSetting setting =
            LadderSetting.nominal(2)
                .withFieldFactor(0, program.fieldFactor(0, t))
                .withFieldFactor(1, program.fieldFactor(1, t))
                .withLaserOffset(1, calibrated.laserOffsetHertz(t));
        ladder.hamiltonianHertz(setting, hRe, hIm);
        propagation.advance(hRe, hIm, length / steps, re, im);
      }
    }
    double sum = 0;
    for (int i = 0; i < n; i++) {
      sum += ladder.isIntermediate(i) ? re[i] * re[i] + im[i] * im[i] : 0;
    }
    return sum;
  }

  /**
   * Against integration of the bare ladder; first order is good to the admixture of some percent.
   */
  @Test
  void agreesWithTheBareLadderIntegratedThroughThePulse() {
    LadderSystem system = system(ladder(), EDGE);
    double expected = bruteForce(system.calibrated());
    assertTrue(expected > 1e-6, "something is left: " + expected);
    assertEquals(expected, EdgeResidual.of(system).orElseThrow(), 0.03 * expected);
  }

  /**
   * Closed form: an error-function edge of rise time r (10–90 %), σ = r/2.5631, leaves |ω|²
   * exp(−(2πEσ)²), ω = Ω/2E, of the state that is populated then. The rise finds the start, the
   * fall the target; what the two leave interferes, so that it is between nothing and twice their
   * sum.
   */
  @Test
  void isBoundedByTheClosedFormOfItsEdges() {
    double before = Double.POSITIVE_INFINITY;
    for (double edge : new double[] {EDGE, 2 * EDGE, 3 * EDGE}) {
      LadderSystem system = system(ladder(), edge);
      Ladder ladder = system.calibrated().ladder();
      double closed = 0;
      for (Ladder.Coupling c : ladder.couplings()) {
        int middle = ladder.isIntermediate(c.upper()) ? c.upper() : c.lower();
        double energy = ladder.states().get(middle).energyHertz();
        double exponent = 2 * Math.PI * energy * edge / 2.5631;
        closed += Math.pow(0.5 * c.rabiHertz() / energy, 2) * Math.exp(-exponent * exponent);
      }
      double played = EdgeResidual.of(system).orElseThrow();
      assertTrue(played <= 2.1 * closed, played + " against " + closed);
      assertTrue(played < before, "slower edges leave less");
      before = played;
    }
  }

  @Test
  void doesNotAssessAJump() {
    LadderSystem system = LadderSystem.of(CalibratedProgram.of(ladder(), Pulse.pi()));
    assertTrue(EdgeResidual.of(system).isEmpty());
  }
}
