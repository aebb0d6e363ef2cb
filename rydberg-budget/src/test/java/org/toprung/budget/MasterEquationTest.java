package org.toprung.budget;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.toprung.core.quantity.Frequency.hertz;
import static org.toprung.core.quantity.Frequency.kilohertz;

import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;
import org.toprung.budget.bench.Bench;
import org.toprung.budget.dynamics.BareLadder;
import org.toprung.budget.dynamics.CalibratedProgram;
import org.toprung.budget.dynamics.LadderReaction;
import org.toprung.budget.pulse.Pulse;
import org.toprung.core.drive.Drive;
import org.toprung.core.drive.Ladder;
import org.toprung.core.quantity.Time;

/**
 * Causes and propagators against a density matrix that is integrated without them: the master
 * equation with decay and with the dephasing that white frequency noise is.
 */
class MasterEquationTest {
  private static final Drive RUBIDIUM = TestDrives.rubidium().resolve();

  static Stream<Pulse> pulses() {
    return Stream.of(
        Pulse.pi(),
        Pulse.gaussian(Math.PI),
        Pulse.sineSquared(Math.PI),
        Pulse.bb1(Math.PI),
        Pulse.ramsey(Time.ofSeconds(4e-7), 0));
  }

  /** Error of a two-level pulse in the light of a laser of some width. */
  private static double error(Pulse pulse, double rabi, double fwhm) {
    double[] populations =
        new MasterEquation(new PlayedProgram(pulse, rabi, 0), 2)
            .dephasing(2 * Math.PI * fwhm, 1)
            .populations(pulse.program(1, hertz(rabi)).breaks(), 0);
    return 1 - populations[1];
  }

  /** Whatever the pulse, and with no regard to how the budget comes by its number. */
  @ParameterizedTest
  @MethodSource("pulses")
  void countsWhiteNoiseLikeADephasedDensityMatrix(Pulse pulse) {
    Bench bench = Bench.unknown().withLinewidths(hertz(300), hertz(0));
    Budget budget = Budget.of(RUBIDIUM, pulse).on(bench).compose();
    double counted =
        budget.causes().stream()
            .filter(c -> c.cause().equals("Laser linewidth, step 1"))
            .findFirst()
            .orElseThrow()
            .error();
    double rabi = budget.plan().rabi().hertz();
    double expected = error(pulse, rabi, 300) - error(pulse, rabi, 0);
    assertTrue(expected > 1e-5);
    assertEquals(expected, counted, 1e-6);
    assertEquals(expected, counted, 2e-3 * expected);
  }

  /** A broad line too: the exact solution for a square pulse, the saturating one for others. */
  @Test
  void countsABroadLineLikeADephasedDensityMatrix() {
    Bench bench = Bench.unknown().withLinewidths(kilohertz(60), hertz(0));
    for (Pulse pulse : new Pulse[] {Pulse.pi(), Pulse.gaussian(Math.PI)}) {
      Budget budget = Budget.of(RUBIDIUM, pulse).on(bench).compose();
      double counted =
          budget.causes().stream()
              .filter(c -> c.cause().equals("Laser linewidth, step 1"))
              .findFirst()
              .orElseThrow()
              .error();
      double expected = error(pulse, budget.plan().rabi().hertz(), 60e3);
      double tolerance = pulse.name().equals("pi") ? 1e-8 : 5e-3 * expected;
      assertTrue(expected > 5e-3);
      assertEquals(expected, counted, tolerance, pulse.name());
    }
  }

  /** The bare ladder of three states with decay of both upper ones out of it. */
  @Test
  void losesLikeADecayingDensityMatrix() {
    Ladder ladder = RUBIDIUM.ladder();
    Pulse pulse = Pulse.gaussian(Math.PI);
    CalibratedProgram played = CalibratedProgram.of(ladder, pulse);
    double rydbergDecay = 8e3;
    double[] populations =
        new MasterEquation(
                BareLadder.hamiltonian(ladder, played, true, rydbergDecay), ladder.size())
            .populations(played.program().breaks(), ladder.start());
    double found = 0;
    for (int w : ladder.wanted()) {
      found += populations[w];
    }
    double propagated = LadderReaction.of(played).errorWithLoss(true, rydbergDecay);
    assertTrue(propagated > 3e-3);
    assertEquals(1 - found, propagated, 1e-6);
  }

  /** Exact: an undriven coherence does nothing to populations, whatever dephases. */
  @Test
  void leavesPopulationsOfADarkLadderAlone() {
    double[] populations =
        new MasterEquation((t, re, im) -> re[3] = 1.5e6, 2)
            .dephasing(1e6, 1)
            .populations(new double[] {0, 1e-6}, 0);
    assertEquals(1, populations[0], 1e-14);
    assertEquals(0, populations[1], 1e-14);
  }
}
