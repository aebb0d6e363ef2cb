package org.toprung.budget.dynamics;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.constraints.DoubleRange;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;
import org.toprung.budget.TestDrives;
import org.toprung.budget.pulse.Pulse;
import org.toprung.core.drive.Ladder;
import org.toprung.core.drive.LadderSetting;
import org.toprung.core.linear.ComplexMatrix;
import org.toprung.core.linear.Decoupling;
import org.toprung.core.linear.MatrixExponential;
import org.toprung.core.quantity.Frequency;
import org.toprung.core.quantity.Time;

class LadderSystemTest {
  private static final Ladder STRETCHED = TestDrives.rubidium().resolve().ladder();
  private static final Ladder MANY = TestDrives.impureRubidium().resolve().ladder();

  static List<Pulse> perfectPulses() {
    return List.of(
        Pulse.pi(),
        Pulse.gaussian(Math.PI),
        Pulse.blackman(Math.PI),
        Pulse.sineSquared(Math.PI),
        Pulse.blackman(Math.PI).shapingStep(0),
        Pulse.blackman(0.5 * Math.PI),
        Pulse.square(2 * Math.PI),
        Pulse.gaussian(2 * Math.PI),
        Pulse.bb1(Math.PI),
        Pulse.bb1(0.5 * Math.PI),
        Pulse.ramsey(Time.ofSeconds(3e-6), 0),
        Pulse.echo(Time.ofSeconds(3e-6), 0));
  }

  /** Exact mathematics: a calibrated pulse without noise turns by what it was made for. */
  @ParameterizedTest
  @MethodSource("perfectPulses")
  void makesNoErrorWithACalibratedPulse(Pulse pulse) {
    LadderSystem system = LadderSystem.of(CalibratedProgram.of(STRETCHED, pulse));
    assertEquals(0, system.noiseFreeError(), 1e-9, pulse.name());
  }

  /**
   * Exact mathematics: with X the dressed states, exp(−2πiHt) X = X exp(−2πi H_eff t) for the full
   * ladder, losses included, by the exponential of the n × n matrix.
   */
  @Property(tries = 12, seed = "41")
  void evolvesDressedStatesAsTheFullLadderDoes(
      @ForAll @DoubleRange(min = 0, max = 1.1) double first,
      @ForAll @DoubleRange(min = 0, max = 1.1) double second,
      @ForAll @DoubleRange(min = -3e6, max = 3e6) double offset,
      @ForAll @DoubleRange(min = -1e6, max = 1e6) double firstOffset,
      @ForAll @DoubleRange(min = -0.2, max = 0.2) double gauss) {
    for (Ladder ladder : List.of(STRETCHED, MANY)) {
      CalibratedProgram calibrated = CalibratedProgram.of(ladder, Pulse.pi());
      LadderPlan plan = LadderSystem.of(calibrated).plan();
      ShotSetting shot = ShotSetting.nominal(2);
      shot.fieldFactor[0] = first;
      shot.fieldFactor[1] = second;
      shot.laserOffset[0] = firstOffset;
      shot.laserOffset[1] = offset;
      shot.magneticTesla = 1e-4 * gauss;
      shot.targetHertz = 3e4;
      shot.intermediateDecays = true;
      shot.rydbergDecayPerSecond = 8e3;
      Decoupling work = plan.workspace();
      plan.decouple(0, shot, work);
      int n = ladder.size();
      int p = plan.size();
      assertTrue(p < n);
      double[][] x = new double[2][n * p];
      work.dressed(x[0], x[1]);
      double[][] h = new double[2][p * p];
      work.effective(h[0], h[1]);
      LadderSetting setting =
          LadderSetting.nominal(2)
              .withFieldFactor(0, first)
              .withFieldFactor(1, second)
              .withLaserOffset(0, firstOffset)
              .withLaserOffset(1, calibrated.fullPowerOffsetHertz() + offset)
              .withMagneticOffset(1e-4 * gauss)
              .withTargetShift(3e4);
      double[][] full = new double[2][n * n];
      ladder.hamiltonianHertz(setting, full[0], full[1]);
      ladder.addLossHertz(8e3, full[1]);
      double seconds = calibrated.program().seconds();
      // energies count from the start's in the magnetic field of the shot
      double zeeman = 1e-4 * gauss * ladder.states().get(ladder.start()).hertzPerTesla();
      for (int i = 0; i < n; i++) {
        full[0][i * n + i] -= zeeman;
      }
      ComplexMatrix big = exponential(n, full, seconds);
      ComplexMatrix small = exponential(p, h, seconds);
      ComplexMatrix dressed = ComplexMatrix.zeros(n, p);
      for (int i = 0; i < n; i++) {
        for (int j = 0; j < p; j++) {
          dressed.set(i, j, x[0][i * p + j], x[1][i * p + j]);
        }
      }
      ComplexMatrix left = big.times(dressed);
      left.addScaled(-1, dressed.times(small));
      assertEquals(0, left.norm(), 1e-9 * p);
    }
  }

  private static ComplexMatrix exponential(int n, double[][] h, double seconds) {
    ComplexMatrix m = ComplexMatrix.zeros(n, n);
    Propagation.propagator(MatrixExponential.ofSize(n), n, h[0], h[1], seconds, m);
    return m;
  }

  @Test
  void refusesASweepThatItCannotFollow() {
    Pulse far = Pulse.chirped(Time.ofSeconds(1e-4), Frequency.megahertz(2000));
    CalibratedProgram program = CalibratedProgram.of(TestDrives.rubidium().resolve().ladder(), far);
    String message =
        assertThrows(ArithmeticException.class, () -> LadderSystem.of(program)).getMessage();
    assertTrue(message.contains("over 2 GHz changes too fast"), message);
  }
}
