package org.toprung.benchmarks;

import java.util.concurrent.TimeUnit;
import org.openjdk.jmh.annotations.Benchmark;
import org.openjdk.jmh.annotations.BenchmarkMode;
import org.openjdk.jmh.annotations.Fork;
import org.openjdk.jmh.annotations.Measurement;
import org.openjdk.jmh.annotations.Mode;
import org.openjdk.jmh.annotations.OperationsPerInvocation;
import org.openjdk.jmh.annotations.OutputTimeUnit;
import org.openjdk.jmh.annotations.Param;
import org.openjdk.jmh.annotations.Scope;
import org.openjdk.jmh.annotations.Setup;
import org.openjdk.jmh.annotations.State;
import org.openjdk.jmh.annotations.Warmup;
import org.toprung.core.drive.Drive;
import org.toprung.core.drive.DriveKernel;
import org.toprung.core.drive.KernelResult;
import org.toprung.core.drive.KernelTable;

/**
 * Evaluation of a prepared drive, one point or a batch, each at a power and detuning of its own.
 */
@State(Scope.Thread)
@BenchmarkMode(Mode.AverageTime)
@OutputTimeUnit(TimeUnit.NANOSECONDS)
@Fork(2)
@Warmup(iterations = 3, time = 1)
@Measurement(iterations = 5, time = 1)
public class DriveKernelBenchmark {
  private static final int POINTS = 1024;

  /** Whether every sublevel takes part, or only three. */
  @Param({"false", "true"})
  public boolean everySublevel;

  private final double[] watts = new double[2];
  private final double[] factors = {1, 1};
  private final double[] detunings = new double[POINTS];
  private final double[] allWatts = new double[2 * POINTS];
  private final double[] allFactors = new double[2 * POINTS];
  private Drive drive;
  private DriveKernel kernel;
  private KernelResult result;
  private KernelTable table;
  private int next;

  /** Prepares the kernel and its points. */
  @Setup
  public void prepareOnce() {
    drive = Scenes.drive(everySublevel).resolve();
    kernel = drive.kernel();
    result = kernel.newResult();
    table = kernel.newTable(POINTS);
    for (int p = 0; p < POINTS; p++) {
      detunings[p] = 1.2e9 + 1e5 * p;
      allWatts[2 * p] = 2e-3 + 1e-6 * p;
      allWatts[2 * p + 1] = 0.15 - 5e-5 * p;
      allFactors[2 * p] = 1 - 1e-4 * p;
      allFactors[2 * p + 1] = 1 - 2e-4 * p;
    }
  }

  /**
   * Prepares a kernel.
   *
   * @return the kernel
   */
  @Benchmark
  public DriveKernel prepare() {
    return drive.kernel();
  }

  /**
   * Evaluates one point.
   *
   * @return the result
   */
  @Benchmark
  public KernelResult single() {
    next = (next + 1) % POINTS;
    watts[0] = allWatts[2 * next];
    watts[1] = allWatts[2 * next + 1];
    kernel.evaluate(watts, detunings[next], factors, result);
    return result;
  }

  /**
   * Evaluates a batch; the time is that of one point.
   *
   * @return the table
   */
  @Benchmark
  @OperationsPerInvocation(POINTS)
  public KernelTable batch() {
    kernel.evaluate(allWatts, detunings, allFactors, table);
    return table;
  }
}
