package org.toprung.core.drive;

import java.util.Arrays;
import java.util.function.Function;
import org.toprung.core.linear.Decoupling;
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
  private static final double GOOD_ENOUGH = 1e-10; // of the Rabi frequency
  private static final double SMALL = 1e-6; // Hz
  private static final double FAINT = 1e-4; // of the full field

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
    double[] full = new double[ladder.steps()];
    Arrays.fill(full, 1);
    LadderResonance resonance = resonances(ladder).apply(full);
    return new PulsePlan(
        Time.ofSeconds(areaRadians / (2 * Math.PI * resonance.rabiHertz())),
        Frequency.ofHertz(resonance.offsetHertz()),
        Frequency.ofHertz(resonance.rabiHertz()));
  }

  /**
   * Resonance and Rabi frequency at other fields. Dressed states are used at every field if they
   * can be told apart at full field, second order at every field otherwise.
   *
   * @param ladder the ladder
   * @return a function of the field of each beam over its nominal field, one number of at least 0
   *     per step; it has a workspace of its own and must not be shared by threads
   */
  public static Function<double[], LadderResonance> resonances(Ladder ladder) {
    Elimination second = Elimination.of(ladder);
    // a trap moves the target off bare resonance
    double bare = ladder.states().get(second.strongestWanted()).energyHertz();
    try {
      return new DressedResonance(ladder, second)::at;
    } catch (ArithmeticException notSeparable) {
      return fields -> eliminated(second, bare, fields);
    }
  }

  private static LadderResonance eliminated(Elimination second, double bare, double[] fields) {
    double rabi = second.rabiHertz();
    double start = 0;
    double target = bare;
    for (int k = 0; k < fields.length; k++) {
      rabi *= fields[k];
      start += fields[k] * fields[k] * second.startShiftHertz(k);
      target += fields[k] * fields[k] * second.targetShiftHertz(k);
    }
    return new LadderResonance(target - start, rabi, start);
  }

  /** Finds the resonance of the dressed start and the dressed target. */
  private static final class DressedResonance {
    private final Ladder ladder;
    private final int[] populated; // the start, then the wanted states
    private final Decoupling decoupling;
    private final Decoupling.Anchor anchor;
    private final double fullOffset; // Hz, second order

    DressedResonance(Ladder ladder, Elimination second) {
      int[] wanted = ladder.wanted();
      this.ladder = ladder;
      this.populated = new int[wanted.length + 1];
      populated[0] = ladder.start();
      System.arraycopy(wanted, 0, populated, 1, wanted.length);
      double[] full = new double[ladder.steps()];
      Arrays.fill(full, 1);
      double bare = ladder.states().get(second.strongestWanted()).energyHertz();
      this.fullOffset = eliminated(second, bare, full).offsetHertz();
      this.decoupling = ladder.decoupling(populated);
      ladder.fill(
          LadderSetting.nominal(ladder.steps()).withLaserOffset(ladder.steps() - 1, fullOffset),
          decoupling);
      this.anchor = decoupling.anchor();
      at(full);
    }

    LadderResonance at(double[] fields) {
      LadderSetting setting = LadderSetting.nominal(ladder.steps());
      boolean dark = false;
      for (int k = 0; k < fields.length; k++) {
        // a little light tells which superposition of several wanted states it couples to
        double least = populated.length > 2 ? FAINT : 0;
        setting = setting.withFieldFactor(k, Math.max(least, fields[k]));
        dark |= fields[k] == 0;
      }
      double offset = fullOffset;
      double rabi = 0;
      double start = 0;
      for (int i = 0; i < ITERATIONS; i++) {
        double[] dressed = dressed(setting.withLaserOffset(ladder.steps() - 1, offset));
        rabi = dressed[0];
        start = dressed[2];
        offset += dressed[1];
        if (Math.abs(dressed[1]) < GOOD_ENOUGH * rabi || Math.abs(dressed[1]) < SMALL) {
          break;
        }
      }
      return new LadderResonance(offset, dark ? 0 : rabi, start);
    }

    /** Rabi frequency, remaining gap target − start and energy of the start, Hz. */
    private double[] dressed(LadderSetting setting) {
      DressedFrame frame = DressedFrame.near(ladder, setting, populated, decoupling, anchor);
      int n = populated.length - 1;
      double square = 0;
      for (int t = 1; t <= n; t++) {
        square += abs2(frame, t, 0);
      }
      double start = frame.effectiveReHertz(0, 0);
      if (n == 1) {
        return new double[] {2 * Math.sqrt(square), frame.effectiveReHertz(1, 1) - start, start};
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
      return new double[] {2 * Math.sqrt(square), energy / square - start, start};
    }
  }

  private static double abs2(DressedFrame frame, int row, int column) {
    double re = frame.effectiveReHertz(row, column);
    double im = frame.effectiveImHertz(row, column);
    return re * re + im * im;
  }
}
