package org.toprung.budget.app;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class AuditCommandTest {
  private static final String HEADER =
      "species,quantity,level,value,uncertainty,unit,source,memory,chosen_because\n";

  @TempDir private Path folder;

  @Test
  void printsTheWorstComparisonsFirst() {
    CommandLineRun run = CommandLineRun.of("audit", "--rows", "5");
    assertEquals(0, run.status(), run.err());
    assertEquals("", run.err());
    String[] lines = run.out().split("\\R");
    assertEquals(8, lines.length, run.out());
    assertTrue(lines[0].endsWith("Worst first."), lines[0]);
    assertTrue(lines[3].contains("6S1/2-7P3/2"), lines[3]);
  }

  @Test
  void valuesOfTheUserAreAuditedToo() throws IOException {
    Path own =
        Files.writeString(
            folder.resolve("own.csv"), HEADER + "K,lifetime,4P1/2,30,0.05,ns,My own bench,no,\n");
    CommandLineRun run = CommandLineRun.of("audit", "--rows", "3", "--values", own.toString());
    assertEquals(0, run.status(), run.err());
    assertTrue(run.out().contains("own.csv:2"), run.out());
  }

  @Test
  void badInputIsOneLineWithFileAndRow() throws IOException {
    Path own = Files.writeString(folder.resolve("own.csv"), HEADER + "K,lifetime,4P1/2\n");
    CommandLineRun run = CommandLineRun.of("audit", "--values", own.toString());
    assertEquals(2, run.status());
    assertEquals(1, run.errLines().size(), run.err());
    assertTrue(run.err().contains("own.csv:2: row must have 9 columns"), run.err());
    assertEquals(2, CommandLineRun.of("audit", "--values", "missing.csv").status());
    assertEquals(2, CommandLineRun.of("audit", "--rows", "0").status());
  }
}
