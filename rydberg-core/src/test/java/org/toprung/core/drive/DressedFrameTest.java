package org.toprung.core.drive;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.constraints.DoubleRange;
import org.junit.jupiter.api.Test;
import org.toprung.core.atom.Level;

class DressedFrameTest {
  private static final LadderSetting NOMINAL = LadderSetting.nominal(2);

  private static Ladder threeLevels(double detuning, double one, double two) {
    return new Ladder(
        2,
        List.of(
            new Ladder.State("start", Level.parse("5S1/2"), 0, 0, 0, 0),
            new Ladder.State("middle", Level.parse("5P3/2"), 1, -detuning, 1e7, 0),
            new Ladder.State("target", Level.parse("50S1/2"), 2, 0, 0, 0)),
        List.of(new Ladder.Coupling(0, 1, one, 0), new Ladder.Coupling(1, 2, 0, two)),
        new double[3][2],
        0,
        new int[] {2});
  }

  /** Exact: with Ω1 = Ω2 = Ω the bright state and the middle form a two-level system. */
  @Property(tries = 50, seed = "21")
  void findsTheExactSplittingOfASymmetricLadder(
      @ForAll @DoubleRange(min = 1e6, max = 3e8) double rabi) {
    double detuning = 1e9;
    DressedFrame frame = DressedFrame.of(threeLevels(detuning, rabi, rabi), NOMINAL, 0, 2);
    // bright state: coupling Ω/√2 (over 2: Ω√2/2), dark state at zero
    double bright = 0.5 * (-detuning + Math.sqrt(detuning * detuning + 2 * rabi * rabi));
    double coupling = Math.hypot(frame.effectiveReHertz(1, 0), frame.effectiveImHertz(1, 0));
    assertEquals(bright, 2 * coupling, 1e-9 * bright);
    assertEquals(frame.effectiveReHertz(0, 0), frame.effectiveReHertz(1, 1), 1e-6 * bright);
  }

  @Test
  void givesAnOrthonormalInvariantBasis() {
    DressedFrame frame = DressedFrame.of(threeLevels(5e8, 1.5e8, 8e7), NOMINAL, 0, 2);
    double[][] re = new double[2][3];
    double[][] im = new double[2][3];
    for (int p = 0; p < 2; p++) {
      frame.dressedState(p, re[p], im[p]);
      double norm = 0;
      for (int i = 0; i < 3; i++) {
        norm += re[p][i] * re[p][i] + im[p][i] * im[p][i];
      }
      assertEquals(1, norm, 1e-13);
    }
    double overlapRe = 0;
    double overlapIm = 0;
    for (int i = 0; i < 3; i++) {
      overlapRe += re[0][i] * re[1][i] + im[0][i] * im[1][i];
      overlapIm += re[0][i] * im[1][i] - im[0][i] * re[1][i];
    }
    assertEquals(0, Math.hypot(overlapRe, overlapIm), 1e-13);
    assertEquals(0.15, Math.abs(re[0][1]), 0.02); // admixture Ω1/2Δ
  }

  @Test
  void refusesStatesThatCannotBeToldApart() {
    ArithmeticException e =
        assertThrows(
            ArithmeticException.class,
            () -> DressedFrame.of(threeLevels(1e6, 1.5e8, 8e7), NOMINAL, 0, 2));
    assertTrue(e.getMessage().contains("iterations"), e.getMessage());
  }

  /** Closed form: Ω1Ω2/2Δ and shifts Ω²/4Δ, to the square of the admixture. */
  @Property(tries = 50, seed = "23")
  void tendsToSecondOrderFarFromResonance(
      @ForAll @DoubleRange(min = 1e6, max = 5e7) double one,
      @ForAll @DoubleRange(min = 1e6, max = 5e7) double two) {
    double detuning = 2e9;
    Ladder ladder = threeLevels(detuning, one, two);
    Elimination second = Elimination.of(ladder);
    assertEquals(one * two / (2 * detuning), second.rabiHertz(), 1e-4 * second.rabiHertz());
    assertEquals(one * one / (4 * detuning), second.startShiftHertz(), 1e-4 * one);
    DressedFrame frame = DressedFrame.of(ladder, NOMINAL, 0, 2);
    double bound = 3 * (one * one + two * two) / (detuning * detuning);
    double coupling = Math.hypot(frame.effectiveReHertz(1, 0), frame.effectiveImHertz(1, 0));
    assertEquals(second.rabiHertz(), 2 * coupling, bound * second.rabiHertz() + 1e-3);
    assertEquals(
        second.targetShiftHertz(),
        frame.effectiveReHertz(1, 1),
        bound * Math.abs(second.targetShiftHertz()) + 1e-3);
  }

  @Test
  void plansAPulseThatTransfersAll() {
    Ladder ladder = threeLevels(1e9, 1.2e8, 6e7);
    PulsePlan plan = PulsePlanner.plan(ladder, Math.PI);
    DressedFrame frame =
        DressedFrame.of(ladder, NOMINAL.withLaserOffset(1, plan.frequencyOffset().hertz()), 0, 2);
    assertEquals(
        frame.effectiveReHertz(0, 0), frame.effectiveReHertz(1, 1), 1e-6 * plan.rabi().hertz());
    assertEquals(0.5, plan.duration().seconds() * plan.rabi().hertz(), 1e-12);
  }
}
