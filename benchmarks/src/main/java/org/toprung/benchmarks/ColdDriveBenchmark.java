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
import org.openjdk.jmh.annotations.State;
import org.openjdk.jmh.annotations.Warmup;
import org.toprung.core.drive.Drive;

/**
 * The first drive of a fresh virtual machine: class loading, catalogue and wavefunctions included.
 */
@State(Scope.Benchmark)
@BenchmarkMode(Mode.SingleShotTime)
@OutputTimeUnit(TimeUnit.MILLISECONDS)
@Fork(8)
@Warmup(iterations = 0)
@Measurement(iterations = 1)
public class ColdDriveBenchmark {
  /** Number of steps of the ladder. */
  @Param({"1", "2", "3"})
  public int photons;

  /**
   * Resolves a drive.
   *
   * @return the drive
   */
  @Benchmark
  public Drive resolve() {
    return Scenes.ladder(photons).resolve();
  }
}
