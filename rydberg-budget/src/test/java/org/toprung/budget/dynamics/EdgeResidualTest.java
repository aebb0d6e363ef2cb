package org.toprung.budget.dynamics;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
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

  /** Closed form against the program, whose two edges interfere: within the bounds of that. */
  @Test
  void boundsTheProgramByTheClosedFormOfItsEdges() {
    LadderSystem system = system(ladder(), EDGE);
    double closed = EdgeResidual.ofErrorFunctions(system, EDGE, EDGE);
    double played = EdgeResidual.of(system).orElseThrow();
    assertTrue(played <= 2.1 * closed, played + " against " + closed);
    assertTrue(closed > 1e-6);
    assertEquals(
        closed,
        2 * closed
            - EdgeResidual.ofErrorFunctions(system, EDGE, 1)
            - EdgeResidual.ofErrorFunctions(system, 1, EDGE),
        1e-12);
  }

  @Test
  void doesNotAssessAJump() {
    LadderSystem system = LadderSystem.of(CalibratedProgram.of(ladder(), Pulse.pi()));
    assertTrue(EdgeResidual.of(system).isEmpty());
  }

  @Test
  void refusesEdgesWithoutDuration() {
    LadderSystem system = system(ladder(), EDGE);
    for (double bad : new double[] {0, -1e-9, Double.NaN, Double.POSITIVE_INFINITY}) {
      IllegalArgumentException e =
          assertThrows(
              IllegalArgumentException.class,
              () -> EdgeResidual.ofErrorFunctions(system, EDGE, bad));
      assertTrue(e.getMessage().contains("edge time"), e.getMessage());
    }
  }
}
