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
import org.toprung.budget.response.PulseResponse;
import org.toprung.core.drive.Drive;
import org.toprung.core.quantity.Frequency;

/** Response of a pulse, composing its budget, and checking the total on all processors. */
@State(Scope.Benchmark)
@BenchmarkMode(Mode.AverageTime)
@OutputTimeUnit(TimeUnit.MILLISECONDS)
@Fork(2)
@Warmup(iterations = 3, time = 1)
@Measurement(iterations = 5, time = 1)
public class BudgetBenchmark {

  /** Whether every sublevel takes part, or only three. */
  @Param({"false", "true"})
  public boolean everySublevel;

  /** Shape of the pulse. */
  @Param({"pi", "blackman"})
  public String shape;

  private Drive drive;
  private Pulse pulse;
  private Budget budget;
  private Frequency rabi;

  /** Resolves the drive and composes once. */
  @Setup
  public void composeOnce() {
    drive = Scenes.drive(everySublevel).resolve();
    pulse = shape.equals("pi") ? Pulse.pi() : Pulse.blackman(Math.PI);
    budget = compose();
    rabi = budget.plan().rabi();
  }

  /**
   * Responds in the effective two-level system: static response and preparation of the filters.
   *
   * @return the response
   */
  @Benchmark
  public PulseResponse response() {
    return PulseResponse.twoLevel(pulse, 2, rabi);
  }

  /**
   * Composes a budget on a resolved drive.
   *
   * @return the budget
   */
  @Benchmark
  public Budget compose() {
    return Budget.of(drive, pulse).on(Scenes.bench()).compose();
  }

  /**
   * Simulates 1000 shots with all disturbances.
   *
   * @return the check
   */
  @Benchmark
  public Check check1000() {
    return budget.checking().shots(1000).totalOnly().run();
  }

  /**
   * Simulates 10000 shots with all disturbances.
   *
   * @return the check
   */
  @Benchmark
  public Check check10000() {
    return budget.checking().shots(10_000).totalOnly().run();
  }
}
