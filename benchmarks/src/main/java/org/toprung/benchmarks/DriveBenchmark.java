package org.toprung.benchmarks;

import java.util.concurrent.TimeUnit;
import org.openjdk.jmh.annotations.Benchmark;
import org.openjdk.jmh.annotations.BenchmarkMode;
import org.openjdk.jmh.annotations.Fork;
import org.openjdk.jmh.annotations.Measurement;
import org.openjdk.jmh.annotations.Mode;
import org.openjdk.jmh.annotations.OutputTimeUnit;
import org.openjdk.jmh.annotations.Param;
import org.openjdk.jmh.annotations.Scope;
import org.openjdk.jmh.annotations.Setup;
import org.openjdk.jmh.annotations.State;
import org.openjdk.jmh.annotations.Warmup;
import org.toprung.core.drive.Drive;
import org.toprung.core.drive.PulsePlan;

/** A drive whose wavefunctions are known already, and the plan of its pulse. */
@State(Scope.Benchmark)
@BenchmarkMode(Mode.AverageTime)
@OutputTimeUnit(TimeUnit.MICROSECONDS)
@Fork(2)
@Warmup(iterations = 3, time = 1)
@Measurement(iterations = 5, time = 1)
public class DriveBenchmark {
  /** Whether every sublevel takes part, or only three. */
  @Param({"false", "true"})
  public boolean everySublevel;

  private Drive drive;

  /** Resolves the drive once. */
  @Setup
  public void resolveOnce() {
    drive = Scenes.drive(everySublevel).resolve();
  }

  /**
   * Resolves the drive again.
   *
   * @return the drive
   */
  @Benchmark
  public Drive warm() {
    return Scenes.drive(everySublevel).resolve();
  }

  /**
   * Plans a π pulse.
   *
   * @return the plan
   */
  @Benchmark
  public PulsePlan plan() {
    return drive.plan(Math.PI);
  }
}
