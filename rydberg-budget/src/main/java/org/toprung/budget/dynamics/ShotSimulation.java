package org.toprung.budget.dynamics;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Set;
import java.util.SplittableRandom;
import java.util.concurrent.CancellationException;
import java.util.concurrent.CompletableFuture;
import java.util.concurrent.ExecutionException;
import java.util.concurrent.ExecutorService;
import java.util.concurrent.ForkJoinPool;
import java.util.concurrent.Future;
import java.util.concurrent.atomic.AtomicBoolean;
import java.util.concurrent.atomic.AtomicInteger;
import java.util.function.IntConsumer;
import org.toprung.budget.bench.Bench;
import org.toprung.budget.bench.BenchValue;
import org.toprung.budget.bench.Disturbance;
import org.toprung.budget.bench.Disturbance.Kind;
import org.toprung.core.drive.Drive;
import org.toprung.core.drive.Ladder;

/**
 * Error of a pulse found by brute force: shots drawn from the disturbances of a bench, each
 * propagated on the ladder, whose far-off states are decoupled exactly for every shot.
 *
 * <p>Loss is non-Hermitian, −iΓ/4π on the diagonal (natural decay of the intermediate sublevels,
 * decay of the Rydberg level): an atom that scattered or decayed counts as an error, even if it
 * comes back. White frequency noise of a Lorentzian line of full width Δν is a random walk of the
 * laser's phase with variance 2πΔν per second. Tabulated densities are played as sums of tones. A
 * phase turns the states above its laser's step, the small admixture of the other rungs being left
 * out, which is a relative error of the order of the admixture's square. Intensity noise within a
 * shot acts to first order in the intensity.
 *
 * <p>Atoms that do not begin in the start count as errors, and outcomes are read wrongly, with
 * certainty in the mean: they move the mean by their probabilities and add no scatter.
 *
 * <p>Shot i of seed s uses its own generator, and partial sums are added in a fixed order, so that
 * the result does not depend on the number of threads. Memory does not grow with the number of
 * shots.
 *
 * <p>Immutable and thread-safe: each {@code with…} method gives a copy.
 */
public final class ShotSimulation {
  private static final int SMALLEST_CHUNK = 50;
  private static final int MOST_CHUNKS = 4000;
  private static final long GOLDEN_GAMMA = 0x9E3779B97F4A7C15L;

  private final Drive drive;
  private final CalibratedProgram calibrated;
  private final Bench bench;
  private final Options options;

  private record Options(
      Set<Disturbance> active,
      double spontaneousPerSecond,
      double blackbodyPerSecond,
      double[] meanFields,
      List<Ladder> variants) {}

  /**
   * Mean and spread of a set of shots.
   *
   * @param error mean error, 1 − success by the goal of the pulse
   * @param standardError standard error of the mean from the scatter of the shots
   */
  public record Result(double error, double standardError) {}

  private ShotSimulation(Drive drive, CalibratedProgram calibrated, Bench bench, Options options) {
    this.drive = drive;
    this.calibrated = calibrated;
    this.bench = bench;
    this.options = options;
  }

  /**
   * A simulation of everything on a bench but decay of the Rydberg level.
   *
   * @param drive the drive
   * @param calibrated the pulse, calibrated on the drive's ladder
   * @param bench the disturbances; what is not given does not disturb
   * @return the simulation
   * @throws IllegalArgumentException if the bench does not have one value per step of the drive
   */
  public static ShotSimulation of(Drive drive, CalibratedProgram calibrated, Bench bench) {
    int steps = drive.steps().size();
    bench.requireSteps(steps);
    return new ShotSimulation(
        drive,
        calibrated,
        bench,
        new Options(Disturbance.all(steps), 0, 0, ones(steps), List.of()));
  }

  private static double[] ones(int steps) {
    double[] ones = new double[steps];
    Arrays.fill(ones, 1);
    return ones;
  }

  /**
   * Restricts the disturbances.
   *
   * @param active the ones that disturb, if the bench knows them
   * @return a copy
   */
  public ShotSimulation withDisturbances(Set<Disturbance> active) {
    return with(
        new Options(
            Set.copyOf(active),
            options.spontaneousPerSecond,
            options.blackbodyPerSecond,
            options.meanFields,
            options.variants));
  }

  /**
   * Sets the decay of the Rydberg level.
   *
   * @param spontaneousPerSecond rate of spontaneous decay, 1/s, at least 0
   * @param blackbodyPerSecond rate of transitions and ionization by blackbody radiation, 1/s, at
   *     least 0
   * @return a copy
   * @throws IllegalArgumentException if a rate is negative or not finite
   */
  public ShotSimulation withDecay(double spontaneousPerSecond, double blackbodyPerSecond) {
    for (double rate : new double[] {spontaneousPerSecond, blackbodyPerSecond}) {
      if (!(rate >= 0 && rate < Double.POSITIVE_INFINITY)) {
        throw new IllegalArgumentException(
            "decay rate " + rate + " 1/s must be at least 0 and finite");
      }
    }
    return with(
        new Options(
            options.active,
            spontaneousPerSecond,
            blackbodyPerSecond,
            options.meanFields,
            options.variants));
  }

  /**
   * Sets the fields that the pulse is calibrated for, where they are not the nominal ones because
   * the atom is warm: field factors of a shot count from them.
   *
   * @param overNominal field of each beam that the ladder of the calibrated pulse has, over the
   *     drive's nominal field; copied
   * @return a copy
   */
  public ShotSimulation withMeanFields(double[] overNominal) {
    return with(
        new Options(
            options.active,
            options.spontaneousPerSecond,
            options.blackbodyPerSecond,
            overNominal.clone(),
            options.variants));
  }

  /**
   * Sets the ladders of impure light, one of which is drawn for each shot where {@link
   * Kind#POLARIZATION} is active.
   *
   * @param variants ladders of the same states as the drive's, equally likely; none for pure light
   * @return a copy
   * @throws IllegalArgumentException if a ladder does not have the states of the drive's
   */
  public ShotSimulation withPolarizationVariants(List<Ladder> variants) {
    for (Ladder variant : variants) {
      if (!labels(variant).equals(labels(calibrated.ladder()))) {
        throw new IllegalArgumentException(
            "a ladder of impure light must have the states "
                + labels(calibrated.ladder())
                + ", given "
                + labels(variant));
      }
    }
    return with(
        new Options(
            options.active,
            options.spontaneousPerSecond,
            options.blackbodyPerSecond,
            options.meanFields,
            List.copyOf(variants)));
  }

  private static List<String> labels(Ladder ladder) {
    return ladder.states().stream().map(Ladder.State::label).toList();
  }

  private ShotSimulation with(Options newOptions) {
    return new ShotSimulation(drive, calibrated, bench, newOptions);
  }

  /**
   * Runs the shots on the common pool.
   *
   * @param shots number of shots, at least 2
   * @param seed seed
   * @param progress told the number of shots done, from any thread, one call at a time, in rising
   *     order
   * @return mean error and standard error
   * @throws IllegalArgumentException if there are fewer than 2 shots
   * @throws CancellationException if the waiting thread was interrupted; its interrupt flag is kept
   * @throws ArithmeticException if a shot lies so far off that its dressed states cannot be told
   *     apart
   */
  public Result run(int shots, long seed, IntConsumer progress) {
    return run(shots, seed, progress, ForkJoinPool.commonPool());
  }

  /**
   * Runs the shots on an executor, in as many tasks as there are processors. The calling thread is
   * one of them, so that it may belong to the executor itself, even as its only thread.
   *
   * @param shots number of shots, at least 2
   * @param seed seed
   * @param progress told the number of shots done, from any thread, one call at a time, in rising
   *     order
   * @param executor what runs the tasks beside the caller's
   * @return mean error and standard error
   * @throws IllegalArgumentException if there are fewer than 2 shots
   * @throws CancellationException if the waiting thread was interrupted; its interrupt flag is kept
   * @throws ArithmeticException if a shot lies so far off that its dressed states cannot be told
   *     apart
   */
  public Result run(int shots, long seed, IntConsumer progress, ExecutorService executor) {
    if (shots < 2) {
      throw new IllegalArgumentException("a simulation takes at least 2 shots, not " + shots);
    }
    Run run = new Run(shots, seed, progress);
    int helpers = Math.min(run.sums.length, Runtime.getRuntime().availableProcessors()) - 1;
    List<Future<?>> futures = new ArrayList<>();
    try {
      for (int t = 0; t < helpers; t++) {
        futures.add(executor.submit(run));
      }
      run.takePart(true);
      run.finished.get();
    } catch (InterruptedException e) {
      Thread.currentThread().interrupt();
      CancellationException cancelled =
          new CancellationException("the simulation was interrupted while it was running");
      cancelled.initCause(e);
      throw cancelled;
    } catch (ExecutionException e) {
      throw unchecked(e.getCause());
    } finally {
      run.stopped.set(true);
      // what has not begun finds nothing left to do
      futures.forEach(future -> future.cancel(false));
    }
    return run.result();
  }

  private static RuntimeException unchecked(Throwable thrown) {
    Throwable cause = thrown;
    // a pool may throw a copy without the message, which is in the original
    while (cause.getMessage() == null && cause.getCause() != null) {
      cause = cause.getCause();
    }
    if (cause instanceof Error) {
      throw (Error) cause;
    }
    return (RuntimeException) cause; // a run throws nothing checked
  }

  /** The state of one run, shared by its tasks. */
  private final class Run implements Runnable {
    private final int shots;
    private final int chunk;
    private final long seed;
    private final IntConsumer progress;
    private final ShotShape shape;
    private final ShotDraw draw;
    private final double[][] sums; // by chunk: sum, squares about its mean, number
    private final AtomicInteger next = new AtomicInteger();
    private int done; // guarded by this
    private final CompletableFuture<Void> finished = new CompletableFuture<>();
    private final AtomicBoolean stopped = new AtomicBoolean();

    Run(int shots, long seed, IntConsumer progress) {
      this.shots = shots;
      this.seed = seed;
      this.progress = progress;
      this.chunk = Math.max(SMALLEST_CHUNK, (int) Math.ceil((double) shots / MOST_CHUNKS));
      this.sums = new double[(int) Math.ceil((double) shots / chunk)][];
      this.draw =
          new ShotDraw(
              drive,
              bench,
              options.active,
              options.spontaneousPerSecond,
              options.blackbodyPerSecond,
              options.meanFields,
              options.variants.size());
      boolean impure =
          !options.variants.isEmpty()
              && options.active.stream().anyMatch(d -> d.kind() == Kind.POLARIZATION);
      List<Ladder> ladders = impure ? options.variants : List.of(calibrated.ladder());
      this.shape = new ShotShape(calibrated, ladders, bench, options.active, draw.moves());
    }

    @Override
    public void run() {
      try {
        takePart(false);
      } catch (InterruptedException impossible) {
        throw new IllegalStateException(impossible);
      }
    }

    /**
     * Takes chunks until there are none left.
     *
     * @param interruptible whether to give up when interrupted, as the caller does
     */
    void takePart(boolean interruptible) throws InterruptedException {
      try {
        ShotPropagator propagator = new ShotPropagator(shape, draw);
        double[] errors = new double[chunk];
        int c;
        while ((c = next.getAndIncrement()) < sums.length) {
          int from = (int) ((long) c * chunk);
          int count = Math.min(shots - from, chunk);
          for (int i = 0; i < count; i++) {
            if (stopped.get()) {
              return;
            }
            if (interruptible && Thread.interrupted()) {
              throw new InterruptedException();
            }
            errors[i] = error(propagator, from + i);
          }
          sums[c] = moments(errors, count);
          report(count);
        }
      } catch (RuntimeException | Error e) {
        stopped.set(true);
        finished.completeExceptionally(e);
      }
    }

    private double error(ShotPropagator propagator, int shot) {
      try {
        return propagator.error(generator(seed, shot));
      } catch (ArithmeticException e) {
        ArithmeticException named =
            new ArithmeticException(
                "shot "
                    + shot
                    + " of seed "
                    + seed
                    + " cannot be simulated: the bench moves lasers or levels so far that "
                    + e.getMessage()
                    + "; allowed: disturbances that are small against the detuning of the"
                    + " intermediate levels");
        named.initCause(e);
        throw named;
      }
    }

    /** One at a time, so that what is told only rises. */
    private synchronized void report(int count) {
      done += count;
      progress.accept(done);
      if (done == shots) {
        finished.complete(null);
      }
    }

    private double[] moments(double[] errors, int count) {
      double sum = 0;
      for (int i = 0; i < count; i++) {
        sum += errors[i];
      }
      double mean = sum / count;
      double squares = 0;
      for (int i = 0; i < count; i++) {
        squares += (errors[i] - mean) * (errors[i] - mean);
      }
      return new double[] {sum, squares, count};
    }

    Result result() {
      double mean = 0;
      for (double[] s : sums) {
        mean += s[0];
      }
      mean /= shots;
      double variance = 0;
      for (double[] s : sums) {
        // second moments of a chunk about its own mean, moved to the common mean
        double shift = s[0] / s[2] - mean;
        variance += s[1] + s[2] * shift * shift;
      }
      variance /= shots - 1;
      double unprepared = probability(BenchValue.PREPARATION_ERROR, Kind.PREPARATION);
      double misread = probability(BenchValue.DETECTION_ERROR, Kind.DETECTION);
      double prepared = mean + unprepared * (1 - mean);
      double read = prepared + misread * (1 - 2 * prepared);
      double scale = (1 - unprepared) * Math.abs(1 - 2 * misread);
      return new Result(read, scale * Math.sqrt(variance / shots));
    }

    private double probability(BenchValue value, Kind kind) {
      return options.active.contains(new Disturbance(kind, Disturbance.COMMON))
          ? bench.value(value, 0).orElse(0)
          : 0;
    }
  }

  /**
   * The generator of a shot. A seed of its own is drawn for it, because generators that are seeded
   * a multiple of the golden gamma apart run through the same sequence, one behind the other.
   */
  private static SplittableRandom generator(long seed, int shot) {
    return new SplittableRandom(new SplittableRandom(seed + shot * GOLDEN_GAMMA).nextLong());
  }
}
