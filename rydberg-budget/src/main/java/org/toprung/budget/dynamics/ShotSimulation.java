package org.toprung.budget.dynamics;

import java.util.List;
import java.util.SplittableRandom;
import java.util.concurrent.atomic.AtomicInteger;
import java.util.function.IntConsumer;
import java.util.stream.IntStream;
import org.toprung.budget.bench.Bench;
import org.toprung.core.drive.Drive;
import org.toprung.core.drive.Ladder;
import org.toprung.core.drive.LadderSetting;
import org.toprung.core.linear.ComplexMatrix;
import org.toprung.core.linear.MatrixExponential;

/**
 * Error of a pulse found by brute force: shots drawn from the disturbances of a bench, each
 * propagated on the full ladder.
 *
 * <p>Loss is non-Hermitian, −iΓ/4π on the diagonal (natural decay of the intermediate sublevels,
 * total decay of the Rydberg level): an atom that scattered or decayed counts as an error, even if
 * it comes back. White frequency noise of a Lorentzian line of full width Δν is a random walk of
 * the laser's phase with variance 2πΔν per second, applied as kicks between {@value #SEGMENTS}
 * equal segments whose propagator is computed once a shot.
 *
 * <p>Shot i of seed s uses its own generator, and partial sums are added in a fixed order, so that
 * the result does not depend on the number of threads.
 */
public final class ShotSimulation {
  private static final int SEGMENTS = 64;
  private static final int CHUNK = 50;
  private static final long GOLDEN_GAMMA = 0x9E3779B97F4A7C15L;

  private final Ladder ladder;
  private final ShotNoise noise;
  private final PulseFrame frame;
  private final double rydbergDecay; // 1/s
  private final double duration; // s

  /**
   * Mean and spread of a set of shots.
   *
   * @param error mean error, 1 − probability of the wanted outcome
   * @param standardError standard error of the mean from the scatter of the shots
   */
  public record Result(double error, double standardError) {}

  /**
   * Prepares a simulation.
   *
   * @param drive the drive
   * @param nominal setting of the pulse, with its frequency offset
   * @param seconds duration of the pulse, s
   * @param rydbergDecayPerSecond total decay rate of the Rydberg level, 1/s
   * @param bench the disturbances; what is not given does not disturb
   */
  public ShotSimulation(
      Drive drive,
      LadderSetting nominal,
      double seconds,
      double rydbergDecayPerSecond,
      Bench bench) {
    this.ladder = drive.ladder();
    this.noise = new ShotNoise(drive, nominal, bench);
    this.frame = PulseFrame.of(ladder, nominal);
    this.rydbergDecay = rydbergDecayPerSecond;
    this.duration = seconds;
  }

  /**
   * Runs the shots on the processors at hand.
   *
   * @param shots number of shots, at least 2
   * @param seed seed
   * @param progress told the number of shots done, from any thread, in rising order per thread
   * @return mean error and standard error
   */
  public Result run(int shots, long seed, IntConsumer progress) {
    int chunks = (shots + CHUNK - 1) / CHUNK;
    AtomicInteger done = new AtomicInteger();
    List<double[]> sums =
        IntStream.range(0, chunks)
            .parallel()
            .mapToObj(
                c -> {
                  int from = c * CHUNK;
                  int to = Math.min(shots, from + CHUNK);
                  double[] sum = chunk(from, to, seed);
                  progress.accept(done.addAndGet(to - from));
                  return sum;
                })
            .toList();
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
    return new Result(mean, Math.sqrt(variance / shots));
  }

  private double[] chunk(int from, int to, long seed) {
    int n = ladder.size();
    Shot shot = new Shot(n);
    double[] errors = new double[to - from];
    double sum = 0;
    for (int i = from; i < to; i++) {
      errors[i - from] = shot.error(generator(seed, i));
      sum += errors[i - from];
    }
    double mean = sum / errors.length;
    double square = 0;
    for (double e : errors) {
      square += (e - mean) * (e - mean);
    }
    return new double[] {sum, square, errors.length};
  }

  /**
   * The generator of a shot. A seed of its own is drawn for it, because generators that are seeded
   * a multiple of the golden gamma apart run through the same sequence, one behind the other.
   */
  private static SplittableRandom generator(long seed, int shot) {
    return new SplittableRandom(new SplittableRandom(seed + shot * GOLDEN_GAMMA).nextLong());
  }

  /** Workspace of one thread. */
  private final class Shot {
    private final int n;
    private final double[] hRe;
    private final double[] hIm;
    private final ComplexMatrix propagator;
    private final MatrixExponential exponential;
    private double[] re;
    private double[] im;
    private double[] nextRe;
    private double[] nextIm;

    Shot(int n) {
      this.n = n;
      this.hRe = new double[n * n];
      this.hIm = new double[n * n];
      this.propagator = ComplexMatrix.zeros(n, n);
      this.exponential = MatrixExponential.ofSize(n);
      this.re = new double[n];
      this.im = new double[n];
      this.nextRe = new double[n];
      this.nextIm = new double[n];
    }

    double error(SplittableRandom random) {
      ladder.hamiltonianHertz(noise.draw(random), hRe, hIm);
      ladder.addLossHertz(rydbergDecay, hIm);
      int segments = noise.isWhite() ? SEGMENTS : 1;
      double dt = duration / segments;
      Evolution.fill(propagator, n, hRe, hIm, dt);
      exponential.compute(propagator, propagator);
      frame.begin(re, im);
      for (int s = 0; s < segments; s++) {
        propagator.multiply(re, im, nextRe, nextIm);
        swap();
        if (noise.isWhite()) {
          kick(random, dt);
        }
      }
      return 1 - frame.probability(PulseFrame.Outcome.WANTED, re, im);
    }

    private void swap() {
      double[] r = re;
      double[] i = im;
      re = nextRe;
      im = nextIm;
      nextRe = r;
      nextIm = i;
    }

    private void kick(SplittableRandom random, double dt) {
      double phase = 0;
      for (int k = 0; k < ladder.steps(); k++) {
        phase += Math.sqrt(2 * Math.PI * noise.linewidthHertz(k) * dt) * random.nextGaussian();
        double cos = Math.cos(phase);
        double sin = Math.sin(phase);
        for (int i = 0; i < n; i++) {
          if (ladder.states().get(i).rung() == k + 1) {
            double r = re[i];
            re[i] = r * cos - im[i] * sin;
            im[i] = r * sin + im[i] * cos;
          }
        }
      }
    }
  }
}
