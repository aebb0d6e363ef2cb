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
import org.toprung.budget.Budget;
import org.toprung.budget.Check;
import org.toprung.budget.pulse.Pulse;
import org.toprung.core.drive.Drive;

/** Composing a budget, and checking it with 1000 shots on all processors. */
@State(Scope.Benchmark)
@BenchmarkMode(Mode.AverageTime)
@OutputTimeUnit(TimeUnit.MILLISECONDS)
@Fork(2)
@Warmup(iterations = 3, time = 1)
@Measurement(iterations = 5, time = 1)
public class BudgetBenchmark {
  private static final int SHOTS = 1000;

  /** Whether every sublevel takes part, or only three. */
  @Param({"false", "true"})
  public boolean everySublevel;

  private Drive drive;
  private Budget budget;

  /** Resolves the drive and composes once. */
  @Setup
  public void composeOnce() {
    drive = Scenes.drive(everySublevel).resolve();
    budget = compose();
  }

  /**
   * Composes a budget on a resolved drive.
   *
   * @return the budget
   */
  @Benchmark
  public Budget compose() {
    return Budget.of(drive, Pulse.pi()).on(Scenes.bench()).compose();
  }

  /**
   * Simulates 1000 shots.
   *
   * @return the check
   */
  @Benchmark
  public Check check() {
    return budget.check(SHOTS, 1);
  }
}
