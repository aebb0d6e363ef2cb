package org.toprung.budget.dynamics;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Arrays;
import java.util.List;
import java.util.Set;
import java.util.SplittableRandom;
import java.util.concurrent.CancellationException;
import java.util.concurrent.ExecutorService;
import java.util.concurrent.Executors;
import java.util.concurrent.TimeUnit;
import org.junit.jupiter.api.Test;
import org.toprung.budget.TestDrives;
import org.toprung.budget.bench.Bench;
import org.toprung.budget.bench.Disturbance;
import org.toprung.budget.bench.Disturbance.Kind;
import org.toprung.budget.bench.NoiseDensity;
import org.toprung.budget.pulse.Pulse;
import org.toprung.core.drive.Drive;
import org.toprung.core.quantity.Frequency;

class ShotSimulationTest {
  private static final Drive DRIVE = TestDrives.rubidium().resolve();

  private static ShotSimulation simulation(Pulse pulse, Bench bench) {
    return ShotSimulation.of(DRIVE, CalibratedProgram.of(DRIVE.ladder(), pulse), bench);
  }

  private static ShotSimulation.Result run(ShotSimulation simulation, int threads, int shots) {
    ExecutorService executor = Executors.newFixedThreadPool(threads);
    try {
      return simulation.run(shots, 5, done -> {}, executor);
    } finally {
      executor.shutdownNow();
    }
  }

  @Test
  void givesTheSameResultOnOneThreadAndOnEight() {
    Bench bench =
        TestDrives.bench()
            .withIntensityNoiseDensity(
                0, NoiseDensity.of(new double[] {1e2, 1e6}, new double[] {1e-10, 1e-10}));
    ShotSimulation simulation = simulation(Pulse.pi(), bench).withDecay(4e3, 5e3);
    assertEquals(run(simulation, 1, 1234), run(simulation, 8, 1234));
  }

  /** Exact mathematics: nothing disturbs, and shots do not scatter. */
  @Test
  void leavesACalibratedPulseAloneOnAnUnknownBench() {
    ShotSimulation simulation = simulation(Pulse.pi(), Bench.unknown()).withDisturbances(Set.of());
    ShotSimulation.Result result = run(simulation, 1, 2);
    assertEquals(0, result.error(), 1e-9);
    assertEquals(0, result.standardError(), 1e-12);
  }

  /** Closed form: E → E + p(1 − E) for atoms not prepared, E + d(1 − 2E) for outcomes misread. */
  @Test
  void appliesPreparationAndDetectionToTheMean() {
    Bench bench = Bench.unknown().withPreparationError(0.02).withDetectionError(0.01);
    ShotSimulation.Result result =
        run(
            simulation(Pulse.pi(), bench)
                .withDisturbances(
                    Set.of(
                        new Disturbance(Kind.PREPARATION, Disturbance.COMMON),
                        new Disturbance(Kind.DETECTION, Disturbance.COMMON))),
            1,
            2);
    assertEquals(0.02 + 0.01 * (1 - 2 * 0.02), result.error(), 1e-9);
  }

  /** Closed form: white noise of linewidth Δν (Hz) costs a square π pulse π²Δν/4Ω, Ω in rad/s. */
  @Test
  void losesToAWhiteLineWhatSecondOrderSays() {
    double width = 2e3;
    Bench bench = Bench.unknown().withLinewidths(Frequency.ofHertz(width), Frequency.ofHertz(0));
    CalibratedProgram calibrated = CalibratedProgram.of(DRIVE.ladder(), Pulse.pi());
    ShotSimulation.Result result =
        run(
            ShotSimulation.of(DRIVE, calibrated, bench)
                .withDisturbances(Set.of(new Disturbance(Kind.LINEWIDTH, 0))),
            2,
            20000);
    double radiansPerSecond = 2 * Math.PI * calibrated.rabiHertz();
    double expected = Math.PI * Math.PI * width / (4 * radiansPerSecond);
    assertEquals(expected, result.error(), 4 * result.standardError() + 0.01 * expected);
  }

  /** Exact mathematics: the variance of a trace is the integral of its density (Parseval). */
  @Test
  void synthesizesTracesOfTheVarianceThatTheTableHolds() {
    double[] hertz = new double[400];
    double[] perHertz = new double[400];
    for (int i = 0; i < hertz.length; i++) {
      hertz[i] = 1e3 * Math.pow(1e3, i / 399.0);
      double bump = Math.log(hertz[i] / 2e5);
      perHertz[i] = 1e2 * Math.exp(-20 * bump * bump) + 1e6 / hertz[i];
    }
    NoiseDensity fine = NoiseDensity.of(hertz, perHertz);
    NoiseDensity coarse = NoiseDensity.of(new double[] {10, 1e3, 1e5}, new double[] {5, 1, 1e-3});
    for (NoiseDensity density : List.of(fine, coarse)) {
      double[] seconds = new double[40];
      Arrays.fill(seconds, 1e-8); // far shorter than any period: means are values
      ToneTrace trace = new ToneTrace(new NoiseTones(density), seconds);
      double[] means = new double[40];
      SplittableRandom random = new SplittableRandom(7);
      int draws = 20000;
      double square = 0;
      double fourth = 0;
      for (int d = 0; d < draws; d++) {
        trace.drawMeans(random, means);
        square += means[20] * means[20] / draws;
        fourth += Math.pow(means[20], 4) / draws;
      }
      double scatter = Math.sqrt((fourth - square * square) / draws);
      double power = density.power(density.lowestHertz(), density.highestHertz());
      assertEquals(power, square, 4 * scatter);
      assertTrue(scatter < 0.03 * power);
    }
  }

  /** The phase that frequency noise adds up to is 2π times the integral of its trace. */
  @Test
  void addsUpThePhaseOfAFrequencyTrace() {
    NoiseTones tones =
        new NoiseTones(NoiseDensity.of(new double[] {1e3, 1e5}, new double[] {1e3, 1e3}));
    double[] seconds = new double[64];
    Arrays.fill(seconds, 3e-7);
    Arrays.fill(seconds, 20, 30, 5e-7);
    double[] means = new double[64];
    new ToneTrace(tones, seconds).drawMeans(new SplittableRandom(3), means);
    double[] kicks = new double[65];
    new ToneTrace(tones, seconds).drawPhaseKicks(new SplittableRandom(3), new double[64], kicks);
    double expected = 0;
    for (int m = 0; m < 64; m++) {
      expected += 2 * Math.PI * means[m] * seconds[m];
    }
    assertEquals(expected, Arrays.stream(kicks).sum(), 1e-9 * Math.abs(expected));
  }

  /** Noise much slower than the pulse is the same as a wrong value for the whole shot. */
  @Test
  void takesSlowSpectraForSpreads() {
    double hertz = 6e4;
    double relative = 0.03;
    NoiseDensity slow = NoiseDensity.of(new double[] {1, 10}, new double[] {1.0 / 9, 1.0 / 9});
    Bench bench =
        Bench.unknown()
            .withDrifts(Frequency.ofHertz(hertz), Frequency.ofHertz(0))
            .withIntensityNoise(0, relative)
            .withFrequencyNoiseDensity(0, slow.scaled(hertz * hertz))
            .withIntensityNoiseDensity(1, slow.scaled(relative * relative));
    for (Pulse pulse : List.of(Pulse.pi(), Pulse.blackman(Math.PI), Pulse.bb1(0.5 * Math.PI))) {
      ShotSimulation all = simulation(pulse, bench);
      compare(all, new Disturbance(Kind.DRIFT, 0), new Disturbance(Kind.FREQUENCY_SPECTRUM, 0));
      compare(all, new Disturbance(Kind.INTENSITY, 1), new Disturbance(Kind.INTENSITY_SPECTRUM, 1));
    }
  }

  private static void compare(ShotSimulation all, Disturbance spread, Disturbance spectrum) {
    ShotSimulation.Result slow = run(all.withDisturbances(Set.of(spread)), 2, 6000);
    ShotSimulation.Result trace = run(all.withDisturbances(Set.of(spectrum)), 2, 6000);
    double allowed = 4 * Math.hypot(slow.standardError(), trace.standardError());
    // an intensity trace acts to first order: a relative difference of the order of the spread
    assertEquals(slow.error(), trace.error(), allowed + 0.03 * slow.error(), spread.toString());
    assertTrue(slow.error() > 1e-7, "something happens");
  }

  /** An atom that flies through wide beams during a short pulse meets hardly any other field. */
  @Test
  void letsASlowAtomMoveWithoutHarm() {
    Bench still = TestDrives.bench();
    Set<Disturbance> where =
        Set.of(
            new Disturbance(Kind.POSITION, Disturbance.COMMON),
            new Disturbance(Kind.DOPPLER, Disturbance.COMMON));
    double standing = run(simulation(Pulse.pi(), still).withDisturbances(where), 2, 2000).error();
    ShotSimulation.Result moving =
        run(simulation(Pulse.pi(), still.withMotionDuringPulse()).withDisturbances(where), 2, 2000);
    assertEquals(standing, moving.error(), 0.02 * standing);
  }

  @Test
  void stopsSoonWhenTheWaitingThreadIsInterrupted() throws InterruptedException {
    ShotSimulation simulation = simulation(Pulse.pi(), TestDrives.bench());
    ExecutorService executor = Executors.newFixedThreadPool(2);
    Thread waiting = Thread.currentThread();
    try {
      assertThrows(
          CancellationException.class,
          () -> simulation.run(50_000_000, 1, done -> waiting.interrupt(), executor));
      assertTrue(Thread.interrupted(), "the interrupt flag is kept");
      executor.shutdown();
      assertTrue(executor.awaitTermination(20, TimeUnit.SECONDS), "tasks end by themselves");
    } finally {
      executor.shutdownNow();
    }
  }
}
