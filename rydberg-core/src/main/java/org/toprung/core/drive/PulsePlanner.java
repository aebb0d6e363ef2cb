package org.toprung.core.drive;

import org.toprung.core.quantity.Frequency;
import org.toprung.core.quantity.Time;

/**
 * Finds length and laser offset of a square pulse on a ladder.
 *
 * <p>The offset is where the dressed start and the dressed target (the superposition of wanted
 * sublevels that the dressed start couples to) are degenerate, found by repeating offset ← offset +
 * E<sub>target</sub> − E<sub>start</sub>; the Rabi frequency is taken there. Where the intermediate
 * level is so near that dressed states cannot be told apart, the second-order values of {@link
 * Elimination} are used.
 */
public final class PulsePlanner {
  private static final int ITERATIONS = 20;
  private static final double GOOD_ENOUGH = 1e-9; // of the Rabi frequency

  private PulsePlanner() {}

  /**
   * Plans a square pulse at nominal powers.
   *
   * @param ladder the ladder
   * @param areaRadians Ωt, positive
   * @return duration and frequency offset
   * @throws IllegalArgumentException if the area is not positive and finite
   */
  public static PulsePlan plan(Ladder ladder, double areaRadians) {
    if (!(areaRadians > 0 && areaRadians < Double.POSITIVE_INFINITY)) {
      throw new IllegalArgumentException(
          "pulse area " + areaRadians + " rad must be positive and finite");
    }
    Elimination second = Elimination.of(ladder);
    // a trap moves the target off bare resonance
    double bare = ladder.states().get(second.strongestWanted()).energyHertz();
    double eliminated = second.targetShiftHertz() - second.startShiftHertz() + bare;
    double offset = eliminated;
    double rabi = second.rabiHertz();
    try {
      for (int i = 0; i < ITERATIONS; i++) {
        double[] dressed = dressed(ladder, offset);
        rabi = dressed[0];
        offset += dressed[1];
        if (Math.abs(dressed[1]) < GOOD_ENOUGH * rabi) {
          break;
        }
      }
    } catch (ArithmeticException notSeparable) {
      offset = eliminated;
      rabi = second.rabiHertz();
    }
    return new PulsePlan(
        Time.ofSeconds(areaRadians / (2 * Math.PI * rabi)),
        Frequency.ofHertz(offset),
        Frequency.ofHertz(rabi));
  }

  /** Rabi frequency and remaining gap target − start of the dressed two-level system, Hz. */
  private static double[] dressed(Ladder ladder, double offset) {
    int[] wanted = ladder.wanted();
    int[] populated = new int[wanted.length + 1];
    populated[0] = ladder.start();
    System.arraycopy(wanted, 0, populated, 1, wanted.length);
    LadderSetting setting =
        LadderSetting.nominal(ladder.steps()).withLaserOffset(ladder.steps() - 1, offset);
    DressedFrame frame = DressedFrame.of(ladder, setting, populated);
    int n = wanted.length;
    double square = 0;
    for (int t = 1; t <= n; t++) {
      square += abs2(frame, t, 0);
    }
    double energy = 0;
    for (int a = 1; a <= n; a++) {
      for (int b = 1; b <= n; b++) {
        // conj(v_a) H_ab v_b, real part
        double vRe =
            frame.effectiveReHertz(a, 0) * frame.effectiveReHertz(b, 0)
                + frame.effectiveImHertz(a, 0) * frame.effectiveImHertz(b, 0);
        double vIm =
            frame.effectiveReHertz(a, 0) * frame.effectiveImHertz(b, 0)
                - frame.effectiveImHertz(a, 0) * frame.effectiveReHertz(b, 0);
        energy += vRe * frame.effectiveReHertz(a, b) - vIm * frame.effectiveImHertz(a, b);
      }
    }
    return new double[] {2 * Math.sqrt(square), energy / square - frame.effectiveReHertz(0, 0)};
  }

  private static double abs2(DressedFrame frame, int row, int column) {
    double re = frame.effectiveReHertz(row, column);
    double im = frame.effectiveImHertz(row, column);
    return re * re + im * im;
  }
}
