package org.toprung.budget.app;

import java.io.Console;
import java.io.PrintStream;
import java.util.function.IntConsumer;
import java.util.function.LongSupplier;

/**
 * Shows how far the simulation is, on one line that is wiped at the end. Nothing is shown before a
 * second has passed, nor more than five times a second, nor where the output is not a terminal.
 */
final class Progress implements IntConsumer, AutoCloseable {
  private static final long PATIENCE = 1_000_000_000L; // ns
  private static final long INTERVAL = 200_000_000L; // ns

  private final PrintStream err;
  private final boolean terminal;
  private final int shots;
  private final LongSupplier clock;
  private final long begin; // ns
  private long next = PATIENCE; // ns after begin
  private int widest;

  Progress(PrintStream err, boolean terminal, int shots, LongSupplier nanoClock) {
    this.err = err;
    this.terminal = terminal;
    this.shots = shots;
    this.clock = nanoClock;
    this.begin = nanoClock.getAsLong();
  }

  /** Whether a person watches. */
  static boolean isTerminal() {
    Console console = System.console();
    if (console == null) {
      return false;
    }
    try {
      // from Java 22 on there may be a console without a terminal
      return (boolean) Console.class.getMethod("isTerminal").invoke(console);
    } catch (ReflectiveOperationException olderJava) {
      return true;
    }
  }

  @Override
  public synchronized void accept(int done) {
    long passed = clock.getAsLong() - begin;
    if (!terminal || passed < next) {
      return;
    }
    next = passed + INTERVAL;
    String line = "simulated " + done + " of " + shots + " shots";
    widest = Math.max(widest, line.length());
    err.print("\r" + line + " ".repeat(widest - line.length()));
    err.flush();
  }

  @Override
  public synchronized void close() {
    if (widest > 0) {
      err.print("\r" + " ".repeat(widest) + "\r");
      err.flush();
    }
  }
}
