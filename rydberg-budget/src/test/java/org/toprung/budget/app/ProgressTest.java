package org.toprung.budget.app;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.ByteArrayOutputStream;
import java.io.PrintStream;
import java.nio.charset.StandardCharsets;
import org.junit.jupiter.api.Test;

class ProgressTest {
  private final ByteArrayOutputStream bytes = new ByteArrayOutputStream();
  private final PrintStream err = new PrintStream(bytes, true, StandardCharsets.UTF_8);
  private long nanoseconds;

  private Progress progress(boolean terminal) {
    return new Progress(err, terminal, 2000, () -> nanoseconds);
  }

  private String shown() {
    return bytes.toString(StandardCharsets.UTF_8);
  }

  @Test
  void isSilentWithinTheFirstSecond() {
    try (Progress progress = progress(true)) {
      nanoseconds = 999_000_000L;
      progress.accept(100);
    }
    assertEquals("", shown());
  }

  @Test
  void isSilentWhereNobodyWatches() {
    try (Progress progress = progress(false)) {
      nanoseconds = 5_000_000_000L;
      progress.accept(100);
    }
    assertEquals("", shown());
  }

  @Test
  void showsHowFarItIsAndWipesTheLine() {
    try (Progress progress = progress(true)) {
      nanoseconds = 1_100_000_000L;
      progress.accept(700);
      nanoseconds += 1_000;
      progress.accept(800); // too soon to be shown
      nanoseconds += 300_000_000L;
      progress.accept(900);
    }
    String line = "simulated 700 of 2000 shots";
    assertTrue(shown().startsWith("\r" + line + "\rsimulated 900"), shown());
    assertTrue(shown().endsWith("\r" + " ".repeat(line.length()) + "\r"), shown());
  }
}
