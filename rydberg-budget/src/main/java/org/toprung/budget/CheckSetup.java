package org.toprung.budget;

import java.util.Objects;
import java.util.concurrent.CancellationException;
import java.util.concurrent.CompletableFuture;
import java.util.concurrent.ExecutorService;
import java.util.concurrent.ForkJoinPool;
import java.util.function.IntConsumer;

/**
 * How to check a budget by simulation. Immutable.
 *
 * <pre>{@code
 * Check check = budget.checking().shots(10_000).seed(1).run();
 * CompletableFuture<Check> later = budget.checking().on(pool).start();
 * }</pre>
 */
public final class CheckSetup {
  private static final int MOST_SHOTS = 100_000_000;
  private static final int DEFAULT_SHOTS = 2000;

  private final Budget budget;
  private final int shots;
  private final long seed;
  private final boolean alone;
  private final IntConsumer progress;
  private final ExecutorService executor;

  private CheckSetup(
      Budget budget,
      int shots,
      long seed,
      boolean alone,
      IntConsumer progress,
      ExecutorService executor) {
    this.budget = budget;
    this.shots = shots;
    this.seed = seed;
    this.alone = alone;
    this.progress = progress;
    this.executor = executor;
  }

  static CheckSetup of(Budget budget) {
    return new CheckSetup(budget, DEFAULT_SHOTS, 1, true, done -> {}, ForkJoinPool.commonPool());
  }

  /**
   * Sets the number of shots of each simulation.
   *
   * @param newShots 2 to 100 million
   * @return a copy
   * @throws IllegalArgumentException if the number is out of range
   */
  public CheckSetup shots(int newShots) {
    if (newShots < 2 || newShots > MOST_SHOTS) {
      throw new IllegalArgumentException(
          "a check takes 2 to " + MOST_SHOTS + " shots, not " + newShots);
    }
    return new CheckSetup(budget, newShots, seed, alone, progress, executor);
  }

  /**
   * Sets the seed of the drawn disturbances: the same seed gives the same bits on any number of
   * threads.
   *
   * @param newSeed any number
   * @return a copy
   */
  public CheckSetup seed(long newSeed) {
    return new CheckSetup(budget, shots, newSeed, alone, progress, executor);
  }

  /**
   * Leaves out the simulations of single causes, so that only the total is checked.
   *
   * @return a copy
   */
  public CheckSetup totalOnly() {
    return new CheckSetup(budget, shots, seed, false, progress, executor);
  }

  /**
   * Reports progress.
   *
   * @param newProgress told the number of shots done so far of {@link #plannedShots()}, from any
   *     thread, one call at a time and in rising order
   * @return a copy
   * @throws NullPointerException if it is null
   */
  public CheckSetup reporting(IntConsumer newProgress) {
    Objects.requireNonNull(newProgress, "progress");
    return new CheckSetup(budget, shots, seed, alone, newProgress, executor);
  }

  /**
   * Sets who does the work beside the thread that waits for it; otherwise the processors at hand.
   *
   * @param newExecutor an executor, at work until the check is done
   * @return a copy
   * @throws NullPointerException if it is null
   */
  public CheckSetup on(ExecutorService newExecutor) {
    Objects.requireNonNull(newExecutor, "executor");
    return new CheckSetup(budget, shots, seed, alone, progress, newExecutor);
  }

  /**
   * Number of shots of all simulations together.
   *
   * @return the number, at most that of an {@code int}
   */
  public int plannedShots() {
    return (int) Math.min(Integer.MAX_VALUE, (long) shots * budget.simulations(alone));
  }

  /**
   * Simulates and waits for the result. Interrupting the waiting thread stops the simulation.
   *
   * @return the check
   * @throws CancellationException if the thread was interrupted; it stays interrupted
   * @throws ArithmeticException if a disturbance takes a shot so far off that an intermediate level
   *     becomes resonant
   */
  public Check run() {
    return budget.check(shots, seed, alone, progress, executor);
  }

  /**
   * Simulates in the background. Cancelling the future stops the simulation soon, and so does
   * whatever else completes it before the check does, such as a timeout.
   *
   * @return the check to come
   */
  public CompletableFuture<Check> start() {
    CompletableFuture<Check> result = new CompletableFuture<>();
    Thread coordinator =
        new Thread(
            () -> {
              try {
                result.complete(run());
              } catch (RuntimeException | Error e) {
                result.completeExceptionally(e);
              }
            },
            "toprung-check");
    coordinator.setDaemon(true);
    result.whenComplete(
        (check, failure) -> {
          // cancelled, timed out, or completed by somebody else: nobody waits for the check
          if (Thread.currentThread() != coordinator) {
            coordinator.interrupt();
          }
        });
    coordinator.start();
    return result;
  }
}
