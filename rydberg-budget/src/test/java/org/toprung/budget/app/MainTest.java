package org.toprung.budget.app;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.toprung.budget.ReferenceScenario;

class MainTest {
  @TempDir private Path folder;
  private String scenario;

  @BeforeEach
  void writeScenario() throws IOException {
    scenario = Files.writeString(folder.resolve("lab.toml"), ReferenceScenario.text()).toString();
  }

  private CommandLineRun budget(String... options) {
    String[] args = new String[options.length + 4];
    args[0] = "budget";
    args[1] = scenario;
    args[2] = "--shots";
    args[3] = "40";
    System.arraycopy(options, 0, args, 4, options.length);
    return CommandLineRun.of(args);
  }

  @Test
  void printsTheReportAndNothingElse() {
    CommandLineRun run = budget();
    assertEquals(0, run.status(), run.err());
    assertEquals("", run.err());
    assertTrue(run.out().startsWith("Rubidium reference drive\n"), run.out());
    assertTrue(run.out().contains("40 shots, seed 1"), run.out());
  }

  @Test
  void writesFilesAndSaysWhere() throws IOException {
    Path json = folder.resolve("out.json");
    Path chart = folder.resolve("out.svg");
    CommandLineRun run = budget("--json", json.toString(), "--chart", chart.toString());
    assertEquals(0, run.status(), run.err());
    assertTrue(run.out().contains("JSON written to " + json.toRealPath()), run.out());
    assertTrue(run.out().contains("Chart written to " + chart.toRealPath()), run.out());
    assertTrue(Files.readString(json).startsWith("{"));
    assertTrue(Files.readString(chart).contains("<svg"));
    try (var files = Files.list(folder)) {
      assertEquals(3, files.count(), "temporary files left behind");
    }
  }

  @Test
  void replacesAnOlderFile() throws IOException {
    Path json = Files.writeString(folder.resolve("out.json"), "x".repeat(100_000));
    assertEquals(0, budget("--json", json.toString()).status());
    assertTrue(Files.readString(json).endsWith("}\n"));
  }

  @Test
  void printsTheDerivationWhenAsked() {
    CommandLineRun run = budget("--derivation");
    assertEquals(0, run.status(), run.err());
    assertTrue(run.out().contains("\nCoupling of Rb-87: 5S1/2 F=2 mF=2 to 68S1/2"), run.out());
    assertTrue(run.out().contains("Effective Rabi frequency √(Σ |sum|²) = "), run.out());
    assertTrue(!budget().out().contains("Coupling of"));
  }

  @Test
  void saysWhenThereIsNoDerivation() throws IOException {
    String beam =
        """
        power = "1 mW"
        waist = "30 um"
        polarization = "sigma+"
        direction = [0, 0, 1]
        """;
    String text =
        "atom.species = \"Rb-87\"\nfield.magnetic = \"4 G\"\npulse.kind = \"pi\"\n"
            + "start = {level = \"5S1/2\", F = 2, mF = 2}\n"
            + "[[step]]\nto = \"5P3/2\"\ndetuning = \"1 GHz\"\n"
            + beam
            + "[[step]]\nto = \"5D5/2\"\ndetuning = \"1 GHz\"\n"
            + beam
            + "[[step]]\nto = \"60F7/2\"\nmJ = 3.5\n"
            + beam;
    Path three = Files.writeString(folder.resolve("three.toml"), text);
    CommandLineRun run =
        CommandLineRun.of("budget", three.toString(), "--shots", "2", "--derivation");
    assertEquals(2, run.status(), run.err());
    assertTrue(run.err().contains("--derivation: "), run.err());
    assertTrue(run.err().contains("one or two steps, given 3"), run.err());
    assertEquals("", run.out());
  }

  @Test
  void repeatsItselfForTheSameSeedOnly() {
    String first = budget("--seed", "7").out();
    assertEquals(first, budget("--seed", "7").out());
    assertNotEquals(
        first.replace("seed 7", "seed"), budget("--seed", "8").out().replace("seed 8", "seed"));
  }

  @Test
  void explainsItself() {
    CommandLineRun help = CommandLineRun.of("budget", "--help");
    assertEquals(0, help.status());
    for (String word :
        new String[] {
          "SCENARIO",
          "--json",
          "--markdown",
          "--csv",
          "--chart",
          "--filter-chart",
          "--program",
          "--slice",
          "--total-only",
          "--shots",
          "--seed",
          "--derivation",
          "2000"
        }) {
      assertTrue(help.out().contains(word), word);
    }
    assertEquals(0, CommandLineRun.of("--help").status());
    assertTrue(CommandLineRun.of("--help").out().contains("budget"));
  }

  @Test
  void knowsItsVersionFromTheBuild() {
    CommandLineRun version = CommandLineRun.of("--version");
    assertEquals(0, version.status());
    assertTrue(version.out().strip().matches("Toprung \\d+\\.\\d+\\.\\d+.*"), version.out());
    assertEquals(version.out(), CommandLineRun.of("budget", "--version").out());
  }

  @Test
  void writesEveryOtherFileToo() throws IOException {
    Path markdown = folder.resolve("out.md");
    Path csv = folder.resolve("out.csv");
    Path filter = folder.resolve("filter.svg");
    Path program = folder.resolve("program.csv");
    CommandLineRun run =
        budget(
            "--total-only",
            "--markdown",
            markdown.toString(),
            "--csv",
            csv.toString(),
            "--filter-chart",
            filter.toString(),
            "--program",
            program.toString(),
            "--slice",
            "10 ns");
    assertEquals(0, run.status(), run.err());
    assertTrue(Files.readString(markdown).startsWith("# Rubidium reference drive\n"));
    assertTrue(Files.readString(csv).startsWith("cause,error (probability),"));
    assertTrue(Files.readString(filter).contains("<svg"));
    assertTrue(Files.readString(program).startsWith("begin (s),length (s),field of beam 1"));
    for (Path file : new Path[] {markdown, csv, filter, program}) {
      assertTrue(run.out().contains(" written to " + file.toRealPath()), run.out());
    }
    assertTrue(run.out().contains("not simulated"), run.out());
  }

  @Test
  void comparesTwoScenarios() throws IOException {
    Path after =
        Files.writeString(
            folder.resolve("after.toml"), ReferenceScenario.with("\"10 uK\"", "\"20 uK\""));
    Path markdown = folder.resolve("out.md");
    CommandLineRun run =
        CommandLineRun.of("compare", scenario, after.toString(), "--markdown", markdown.toString());
    assertEquals(0, run.status(), run.err());
    assertEquals("", run.err());
    assertTrue(run.out().startsWith("Two budgets compared\n"), run.out());
    assertTrue(run.out().contains("Doppler shift"), run.out());
    assertTrue(Files.readString(markdown).contains("| Doppler shift |"));
  }
}
