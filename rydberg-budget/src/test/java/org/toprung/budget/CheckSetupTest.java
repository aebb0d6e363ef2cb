package org.toprung.budget;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.toprung.core.quantity.Frequency.hertz;
import static org.toprung.core.quantity.Frequency.kilohertz;

import java.util.ArrayList;
import java.util.Collections;
import java.util.List;
import java.util.concurrent.CompletableFuture;
import java.util.concurrent.CountDownLatch;
import java.util.concurrent.ExecutionException;
import java.util.concurrent.ExecutorService;
import java.util.concurrent.Executors;
import java.util.concurrent.TimeUnit;
import java.util.concurrent.TimeoutException;
import org.junit.jupiter.api.Test;
import org.toprung.budget.bench.Bench;
import org.toprung.budget.pulse.Pulse;

class CheckSetupTest {
  private static final Budget BUDGET =
      Budget.of(TestDrives.rubidium().resolve(), Pulse.pi())
          .on(Bench.unknown().withDrifts(kilohertz(100), hertz(0)))
          .compose();

  @Test
  void runsOnTheOnlyThreadOfAnExecutorFromWithin() throws Exception {
    ExecutorService single = Executors.newSingleThreadExecutor();
    try {
      CheckSetup setup = BUDGET.checking().shots(500).seed(3);
      Check within = single.submit(() -> setup.on(single).run()).get(60, TimeUnit.SECONDS);
      assertEquals(setup.run(), within);
    } finally {
      single.shutdownNow();
    }
  }

  @Test
  void reportsRisingProgressThatEndsAtThePlannedNumber() {
    List<Integer> told = Collections.synchronizedList(new ArrayList<>());
    CheckSetup setup = BUDGET.checking().shots(1000).reporting(told::add);
    setup.run();
    for (int i = 1; i < told.size(); i++) {
      assertTrue(told.get(i) > told.get(i - 1), told.toString());
    }
    assertEquals(setup.plannedShots(), told.get(told.size() - 1));
  }

  @Test
  void passesOnWhatAListenerThrows() {
    CheckSetup setup =
        BUDGET
            .checking()
            .shots(1000)
            .reporting(
                done -> {
                  throw new IllegalStateException("no more paper");
                });
    assertEquals(
        "no more paper", assertThrows(IllegalStateException.class, setup::run).getMessage());
  }

  /** A single worker thread is free again soon after what it helps with is given up. */
  @Test
  void stopsWhenTheFutureIsCancelledOrTimesOut() throws Exception {
    for (boolean cancel : new boolean[] {true, false}) {
      ExecutorService single = Executors.newSingleThreadExecutor();
      try {
        CountDownLatch begun = new CountDownLatch(1);
        CompletableFuture<Check> check =
            BUDGET
                .checking()
                .shots(100_000_000)
                .on(single)
                .reporting(done -> begun.countDown())
                .start();
        assertTrue(begun.await(60, TimeUnit.SECONDS));
        if (cancel) {
          assertTrue(check.cancel(false));
        } else {
          check.orTimeout(1, TimeUnit.MILLISECONDS);
          ExecutionException late = assertThrows(ExecutionException.class, check::get);
          assertTrue(late.getCause() instanceof TimeoutException, late.toString());
        }
        single.shutdown();
        assertTrue(single.awaitTermination(60, TimeUnit.SECONDS), "the worker goes on");
        assertFalse(check.isDone() && !check.isCompletedExceptionally());
      } finally {
        single.shutdownNow();
      }
    }
  }
}
