package org.toprung.budget.dynamics;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.toprung.core.quantity.Frequency.kilohertz;
import static org.toprung.core.quantity.Frequency.megahertz;
import static org.toprung.core.quantity.Time.microseconds;
import static org.toprung.core.quantity.Time.nanoseconds;

import java.util.List;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;
import org.junit.jupiter.params.provider.ValueSource;
import org.toprung.budget.PlayedProgram;
import org.toprung.budget.pulse.Goal;
import org.toprung.budget.pulse.Pulse;
import org.toprung.core.linear.ComplexMatrix;
import org.toprung.core.linear.MatrixExponential;
import org.toprung.core.quantity.Frequency;
import org.toprung.core.quantity.Time;

class TwoLevelSystemTest {
  private static final double RABI = 1e6; // Hz
  private static final double[] FULL = {1, 1};

  static List<Pulse> pulses() {
    return List.of(
        Pulse.pi(),
        Pulse.pi().offsetBy(kilohertz(100)),
        Pulse.pi().withEdges(nanoseconds(50), nanoseconds(80)).holdingFrequency(),
        Pulse.square(Math.PI / 2),
        Pulse.square(2 * Math.PI),
        Pulse.gaussian(Math.PI),
        Pulse.gaussian(Math.PI).holdingFrequency(),
        Pulse.blackman(Math.PI / 2),
        Pulse.sineSquared(2 * Math.PI).offsetBy(kilohertz(30)),
        Pulse.sineSquared(Math.PI).shapingStep(0).holdingFrequency(),
        Pulse.ramsey(microseconds(3), 0.7),
        Pulse.echo(microseconds(2), 0.3),
        Pulse.chirped(microseconds(5), megahertz(10)),
        Pulse.chirpedSmoothly(microseconds(6), megahertz(-8)),
        Pulse.bb1(Math.PI),
        Pulse.corpse(Math.PI / 2));
  }

  private static double success(Pulse pulse, double[] end, double[] ideal) {
    double re = ideal[0] * end[0] + ideal[2] * end[2];
    double im = ideal[0] * end[2] - ideal[2] * end[0];
    if (pulse.goal() == Goal.TRANSFER) {
      return end[1] * end[1] + end[3] * end[3];
    }
    if (pulse.goal() == Goal.RETURN) {
      double size = Math.hypot(ideal[0], ideal[2]);
      return 0.25 * (Math.pow(1 + re / size, 2) + Math.pow(im / size, 2));
    }
    re += ideal[1] * end[1] + ideal[3] * end[3];
    im += ideal[1] * end[3] - ideal[3] * end[1];
    return re * re + im * im;
  }

  /** Validation: the equation of motion solved by an eighth-order Runge-Kutta method. */
  @ParameterizedTest
  @MethodSource("pulses")
  void agreesWithTheEquationOfMotion(Pulse pulse) {
    double[] shift = {2e5, -3e5};
    TwoLevelSystem system = TwoLevelSystem.of(pulse, 2, RABI, shift);
    double[] ideal = new PlayedProgram(pulse.ideal(), RABI, 0, 0).end();
    double[] nominal = new PlayedProgram(pulse, RABI, shift).end();
    double[] disturbed =
        new PlayedProgram(pulse, RABI, shift)
            .times(t -> 1.03)
            .detunedBy(t -> 7e4)
            .shiftedBy(t -> 0.9)
            .end();
    assertEquals(1 - success(pulse, nominal, ideal), system.error(1, 0, FULL), 2e-9);
    assertEquals(
        1 - success(pulse, disturbed, ideal), system.error(1.03, 7e4, new double[] {0.9, 1}), 2e-9);
  }

  /** Regression of the two ways through one class: segments one by one, and the closed loop. */
  @ParameterizedTest
  @MethodSource("pulses")
  void answersAlikeByItsSegments(Pulse pulse) {
    TwoLevelSystem system = TwoLevelSystem.of(pulse, 2, RABI, new double[] {2e5, -3e5});
    double[] re = new double[2];
    double[] im = new double[2];
    system.begin(re, im);
    double[] h = new double[4];
    double[] g = new double[4];
    MatrixExponential exponential = MatrixExponential.ofSize(2);
    for (int m = 0; m < system.segments(); m++) {
      system.hamiltonianHertz(m, h, g);
      ComplexMatrix u = ComplexMatrix.zeros(2, 2);
      double phase = 2 * Math.PI * system.segmentSeconds(m);
      for (int i = 0; i < 4; i++) {
        u.set(i / 2, i % 2, phase * g[i], -phase * h[i]);
      }
      exponential.compute(u, u);
      double[] nextRe = new double[2];
      double[] nextIm = new double[2];
      u.multiply(re, im, nextRe, nextIm);
      re = nextRe;
      im = nextIm;
    }
    assertEquals(system.error(1, 0, FULL), system.error(re, im), 1e-11);
  }

  /** Validation: Rabi's formula. */
  @ParameterizedTest
  @ValueSource(doubles = {0, 0.1, -0.7, 3})
  void followsRabisFormula(double detuning) {
    TwoLevelSystem system = TwoLevelSystem.of(Pulse.pi(), 1, RABI, new double[1]);
    double w = Math.sqrt(1 + detuning * detuning);
    double expected = 1 - Math.pow(Math.sin(0.5 * Math.PI * w) / w, 2);
    assertEquals(expected, system.error(1, detuning * RABI, new double[] {1}), 1e-14);
  }

  /** Validation: the line of a weak pulse is the squared Fourier transform of its form, a sinc². */
  @ParameterizedTest
  @ValueSource(doubles = {0, 0.4, 0.5, 1.5, 2.3})
  void weakSquarePulseHasTheSincSquaredLine(double turns) {
    double area = 1e-3;
    TwoLevelSystem system = TwoLevelSystem.of(Pulse.square(Math.PI), 1, RABI, new double[1]);
    double weak = area / Math.PI;
    double tau = 0.5 / RABI;
    double x = Math.PI * turns;
    double sinc = x == 0 ? 1 : Math.sin(x) / x;
    double transferred = 1 - system.error(weak, turns / tau, new double[] {1});
    // next order in the area: area²/12 of it on resonance
    assertEquals(0.25 * area * area * sinc * sinc, transferred, 0.25 * area * area * 2e-7);
  }

  /** Validation: Landau, Zener: exp(−π²Ω²/|sweep rate|), all ordinary frequencies. */
  @ParameterizedTest
  @ValueSource(doubles = {0.05, 0.1, 0.2})
  void longChirpFailsAsLandauAndZenerSay(double adiabaticity) {
    double sweep = 100e6;
    double duration = adiabaticity * sweep / (RABI * RABI);
    TwoLevelSystem system =
        TwoLevelSystem.of(
            Pulse.chirped(Time.ofSeconds(duration), Frequency.ofHertz(sweep)),
            1,
            RABI,
            new double[1]);
    double expected = Math.exp(-Math.PI * Math.PI * adiabaticity);
    // the ends of a finite sweep ring with amplitude Ω/sweep each
    double ringing = 2 * RABI / sweep * 2 * Math.sqrt(expected * (1 - expected));
    assertEquals(expected, system.error(1, 0, new double[] {1}), ringing + 1e-4);
  }

  /**
   * Validation: a fringe over a Gaussian spread σ of detunings (rad/s) has the contrast
   * exp(−σ²T²/2); short pulses, so that they do not feel the spread themselves.
   */
  @Test
  void ramseyFringeFadesWithTheSpreadOfDetunings() {
    double rabi = 1e9;
    double wait = 3e-6;
    double spread = 80e3; // Hz
    TwoLevelSystem system =
        TwoLevelSystem.of(Pulse.ramsey(microseconds(3), 0), 1, rabi, new double[1]);
    double sum = 0;
    double weight = 0;
    for (int i = -400; i <= 400; i++) {
      double x = i / 50.0;
      double w = Math.exp(-0.5 * x * x);
      sum += w * system.error(1, x * spread, new double[] {1});
      weight += w;
    }
    double contrast = 1 - 2 * sum / weight;
    // each pulse of finite length adds 1/Ω of its own (angular Ω) to the time in the dark
    double phase = 2 * Math.PI * spread * (wait + 1 / (Math.PI * rabi));
    assertEquals(Math.exp(-0.5 * phase * phase), contrast, 1e-5);
  }

  @Test
  void echoRefocusesAStaticDetuning() {
    TwoLevelSystem echo =
        TwoLevelSystem.of(Pulse.echo(microseconds(10), 0), 1, 100 * RABI, new double[1]);
    TwoLevelSystem ramsey =
        TwoLevelSystem.of(Pulse.ramsey(microseconds(20), 0), 1, 100 * RABI, new double[1]);
    double[] one = {1};
    assertTrue(ramsey.error(1, 2e4, one) > 0.5);
    assertTrue(echo.error(1, 2e4, one) < 1e-6);
  }

  /** Validation: sixth order in the amplitude for BB1, fourth in the detuning for CORPSE. */
  @Test
  void compositesCompensateToTheirOrders() {
    double[] one = {1};
    TwoLevelSystem bb1 = TwoLevelSystem.of(Pulse.bb1(Math.PI), 1, RABI, new double[1]);
    assertEquals(6, order(bb1.error(1.04, 0, one), bb1.error(1.08, 0, one)), 0.05);
    TwoLevelSystem corpse = TwoLevelSystem.of(Pulse.corpse(Math.PI), 1, RABI, new double[1]);
    // the fourth order is small: beyond 0.01 Ω the sixth takes over
    assertEquals(4, order(corpse.error(1, 2e3, one), corpse.error(1, 4e3, one)), 0.1);
  }

  private static double order(double once, double twice) {
    return Math.log(twice / once) / Math.log(2);
  }

  static Stream<Runnable> refusals() {
    return Stream.of(
        () -> TwoLevelSystem.of(Pulse.pi(), 1, Double.NaN, new double[1]),
        () -> TwoLevelSystem.of(Pulse.pi(), 1, 0, new double[1]),
        () -> TwoLevelSystem.of(Pulse.pi(), 2, RABI, new double[1]),
        () -> TwoLevelSystem.of(Pulse.pi(), 1, RABI, new double[] {Double.NaN}),
        () ->
            TwoLevelSystem.of(
                Pulse.stirap(microseconds(4), microseconds(1)), 2, RABI, new double[2]));
  }

  @ParameterizedTest
  @MethodSource("refusals")
  void refusesWhatItCannotDrive(Runnable creation) {
    assertThrows(IllegalArgumentException.class, creation::run);
  }
}
