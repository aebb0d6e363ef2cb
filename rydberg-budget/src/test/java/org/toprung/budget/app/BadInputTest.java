package org.toprung.budget.app;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;
import org.toprung.budget.ReferenceScenario;

/** Bad input, case by case, as a user of the command line meets it. */
class BadInputTest {
  @TempDir private Path folder;

  /** Runs a scenario and expects one line that names the file and each of the parts. */
  private void refuses(String scenario, String... parts) throws IOException {
    Path file = Files.writeString(folder.resolve("lab.toml"), scenario);
    refusesFile(file, parts);
    assertEquals(List.of("lab.toml"), namesIn(folder), "files left behind");
  }

  private void refusesFile(Path file, String... parts) {
    CommandLineRun run =
        CommandLineRun.of(
            "budget",
            file.toString(),
            "--shots",
            "2",
            "--json",
            folder.resolve("out.json").toString(),
            "--chart",
            folder.resolve("out.svg").toString());
    assertEquals(2, run.status(), run.err());
    assertEquals("", run.out());
    assertEquals(1, run.errLines().size(), run.err());
    assertTrue(run.err().contains(file.getFileName().toString()), run.err());
    for (String part : parts) {
      assertTrue(run.err().contains(part), () -> "no " + part + " in: " + run.err());
    }
  }

  private static List<String> namesIn(Path folder) throws IOException {
    try (Stream<Path> files = Files.list(folder)) {
      return files.map(f -> f.getFileName().toString()).sorted().toList();
    }
  }

  @ParameterizedTest(name = "{1} instead of {0}")
  @CsvSource(
      delimiter = '|',
      quoteCharacter = '`',
      textBlock =
          """
          # what the file says     | instead             | key               | given             | allowed
          species = "Rb-87"        | species = "Rb-88"   | atom.species      | Rb-88             | Cs-133, H, K-39
          species = "Rb-87"        | species = 87        | atom.species      | 87                | "Rb-87"
          magnetic = "4 G"         | magnetic = "4 oz"   | field.magnetic    | oz                | mT, G
          magnetic = "4 G"         | magnetic = "4"      | field.magnetic    | "4"               | mT, G
          magnetic = "4 G"         | magnetic = "-4 G"   | field.magnetic    | -4 G              | at least 0
          magnetic = "4 G"         | magnetic = 4        | field.magnetic    | given 4           | "4 G"
          magnetic = "4 G"         | magnetic = "NaN G"  | field.magnetic    | NaN               | a number
          level = "5S1/2"          | level = "4S1/2"     | start.level       | 4S1/2             | 5S1/2
          level = "5S1/2"          | level = "6S1/2"     | start.level       | 6S1/2             | 5S1/2
          level = "5S1/2"          | level = "5P3/2"     | start.level       | 5P3/2             | 5S1/2
          level = "5S1/2"          | level = "5s"        | start.level       | 5s                | 6P3/2
          F = 2                    | F = 3               | start.F           | F=3               | 1, 2
          F = 2                    | F = 1.3             | start.F           | 1.3               | half-integer
          F = 2                    | F = "2"             | start.F           | "2"               | half-integer
          mF = 2                   | mF = 3              | start.mF          | given 3           | -2 to 2
          mF = 2                   | mF = 0.5            | start.mF          | given 1/2         | steps of 1
          mF = 2                   | mF = nan            | start.mF          | NaN               | half-integer
          mF = 2                   | mF = inf            | start.mF          | Infinity          | half-integer
          to = "6P3/2"             | to = "4P3/2"        | step[1].to        | 4P3/2             | 5P3/2
          to = "6P3/2"             | to = "6P5/2"        | step[1].to        | 5/2               | 1/2 or 3/2
          to = "6P3/2"             | to = 6              | step[1].to        | given 6           | "6P3/2"
          to = "68S1/2"            | to = "151S1/2"      | step[2].to        | 151               | 150
          to = "68S1/2"            | to = "68S3/2"       | step[2].to        | 3/2               | 1/2
          mJ = 0.5                 | mJ = 1.5            | step[2].mJ        | given 3/2         | -1/2 to 1/2
          mJ = 0.5                 | mJ = 0              | step[2].mJ        | given 0           | -1/2 to 1/2
          mJ = 0.5                 | mJ = 0.5\\nmultipole = "E2" | step[2].multipole | "E2"    | for a single step
          mJ = 0.5                 | mJ = 0.5\\nmultipole = "M1" | step[2].multipole | "M1"    | "E1"
          power = "2 mW"           | power = "0 W"       | step[1].power     | "0 W"             | above zero
          power = "2 mW"           | power = "-2 mW"     | step[1].power     | "-2 mW"           | above zero
          power = "2 mW"           | power = "inf mW"    | step[1].power     | inf               | a number
          power = "150 mW"         | power = "150 hp"    | step[2].power     | hp                | mW
          waist = "20 um"          | waist = "0 um"      | step[1].waist     | "0 um"            | above zero
          waist = "25 um"          | waist = "-25 um"    | step[2].waist     | "-25 um"          | above zero
          detuning = "1.2 GHz"     | detuning = "fast"   | step[1].detuning  | fast              | GHz
          detuning = "1.2 GHz"     | detuning = "900 THz"| step              | 900 THz           | positive frequency
          polarization = "sigma+"  | polarization = "up" | step[1].polarization | up             | sigma+, sigma-, pi
          polarization = "sigma+"  | polarization = "pi" | step[1].polarization | pi             | perpendicular
          polarization = "sigma+"  | polarization = [0, 0, 1] | step[1].polarization | (1.0, 0.0) | perpendicular
          polarization = "sigma+"  | polarization = [0, 0, 0] | step[1].polarization | 0.0       | not zero
          polarization = "sigma+"  | polarization = [1, 0] | step[1].polarization | [1,0]        | [[re, im]
          polarization = "sigma+"  | polarization = [1, "i", 0] | step[1].polarization[2] | "i"  | [re, im]
          polarization = "sigma+"  | polarization = [1, [0, nan], 0] | step[1].polarization[2][2] | NaN | finite
          direction = [0, 0, 1]    | direction = [0, 0, 0] | step[1].direction | 0.0             | not zero
          direction = [0, 0, 1]    | direction = [0, 1]  | step[1].direction | [0,1]             | three numbers
          direction = [0, 0, 1]    | direction = [0, 0, inf] | step[1].direction[3] | Infinity   | finite
          waist = "20 um"          | waist = ["20 um", "30 um"] | step[1].waist_axis | is missing   | [1, 0, 0]
          waist = "20 um"          | waist = ["20 um"]   | step[1].waist     | ["20 um"]         | two such texts
          waist = "20 um"          | waist = ["20 um", "0 um"] | step[1].waist[2] | "0 um"        | above zero
          waist = "20 um"          | waist = ["-1 um", "2 um"] | step[1].waist[1] | "-1 um"       | above zero
          waist = "20 um"          | waist = 20          | step[1].waist     | given 20          | "20 um"
          waist = "20 um"          | waist = "20 um"\\nwaist_axis = [1, 0, 0] | step[1].waist_axis | [1,0,0] | two waists
          waist = "20 um"          | waist = ["20 um", "30 um"]\\nwaist_axis = [0, 0, 0] | step[1].waist_axis | 0.0 | not zero
          waist = "20 um"          | waist = ["20 um", "30 um"]\\nwaist_axis = [0, nan, 0] | step[1].waist_axis[2] | NaN | finite
          waist = "20 um"          | waist = ["20 um", "30 um"]\\nwaist_axis = [1, 0, 1] | step[1].direction | [0,0,1] | across the beam
          waist = "20 um"          | waist = ["20 um", "30 um"]\\nwaist_axis = [1, 0] | step[1].waist_axis | [1,0] | three numbers
          waist = "20 um"          | intensity = "2 W/cm2" | step[1].power   | "2 mW"            | nothing beside
          power = "2 mW"           | intensity = "2 W/cm2" | step[1].waist   | "20 um"           | nothing beside
          power = "2 mW"\\nwaist = "20 um" | intensity = "0 W/cm2" | step[1].intensity | "0 W/cm2" | above zero
          power = "2 mW"\\nwaist = "20 um" | intensity = "2 mW" | step[1].intensity | mW           | W/cm2
          direction = [0, 0, 1]    | direction = [0, 0, 1]\\noffset = ["1 um", "0 um"] | step[1].offset | ["1 um","0 um"] | 3 texts
          direction = [0, 0, 1]    | direction = [0, 0, 1]\\noffset = ["1 um", "0 um", 3] | step[1].offset[3] | given 3 | "1 um"
          direction = [0, 0, 1]    | direction = [0, 0, 1]\\noffset = ["1 um", "0 um", "nan um"] | step[1].offset[3] | nan | a number
          direction = [0, 0, 1]    | direction = [0, 0, 1]\\noffset = ["1 mm", "0 um", "0 um"] | step | beam 1 misses | allowed
          direction = [0, 0, 1]    | direction = [0, 0, 1]\\nimpurity = 0.6 | step[1].impurity | 0.6 | from 0 to 0.5
          direction = [0, 0, 1]    | direction = [0, 0, 1]\\nimpurity = -0.1 | step[1].impurity | -0.1 | from 0 to 0.5
          direction = [0, 0, 1]    | direction = [0, 0, 1]\\nimpurity = nan | step[1].impurity | NaN | from 0 to 0.5
          direction = [0, 0, 1]    | direction = [0, 0, 1]\\nimpurity = "1 %" | step[1].impurity | 1 % | from 0 to 0.5
          direction = [0, 0, 1]    | direction = [0, 0, 1]\\nimpurity_phase_deg = 90 | step[1].impurity_phase_deg | given 90 | only with an impurity
          direction = [0, 0, 1]    | direction = [0, 0, 1]\\nimpurity = 0.1\\nimpurity_phase_deg = inf | step[1].impurity_phase_deg | Infinity | degrees
          magnetic = "4 G"         | magnetic = "4 G"\\nelectric = "10 V/m" | field.electric | "10 V/m" | 3 texts
          magnetic = "4 G"         | magnetic = "4 G"\\nelectric = ["0 V/m", "0 V/m", "1 G"] | field.electric[3] | 1 G | V/cm
          kind = "pi"              | kind = "half"       | pulse.kind        | half              | "pi"
          temperature = "10 uK"    | temperature = "0 K" | bench.temperature | 0 K               | above zero
          temperature = "10 uK"    | temperature = "-9 uK" | bench.temperature | "-9 uK"         | not be below 0
          ["80 kHz", "80 kHz", "15 kHz"] | ["80 kHz"]    | bench.trap_frequency | ["80 kHz"]     | 3 texts
          "15 kHz"                 | "0 kHz"             | bench.trap_frequency | "0 kHz"        | above zero
          "300 K"                  | "300 C"             | bench.environment_temperature | C     | mK
          "2 mG"                   | "-2 mG"             | bench.magnetic_noise | -2 mG          | at least zero
          "5 mV/cm"                | "-5 mV/cm"          | bench.electric_field | -5 mV/cm       | at least zero
          linewidth = ["500 Hz",   | linewidth = [       | bench.linewidth   | ["500 Hz"]        | 2 texts
          linewidth = ["500 Hz",   | linewidth = [500,   | bench.linewidth[1] | 500              | "500 Hz"
          drift = ["2 kHz",        | drift = ["-2 kHz",  | bench.drift[1]    | -2 kHz            | at least zero
          [0.005, 0.005]           | [0.005]             | bench.intensity_noise | [0.005]       | 2 numbers
          [0.005, 0.005]           | [0.005, 0.7]        | bench.intensity_noise | 0.7           | between 0 and 0.5
          [0.005, 0.005]           | [0.005, "1 %"]      | bench.intensity_noise[2] | 1 %        | 0 to 0.5
          """)
  void refusesImpossibleValues(String old, String instead, String key, String given, String allowed)
      throws IOException {
    String text = ReferenceScenario.with(lines(old), lines(instead));
    refuses(text, key, given, allowed);
    // of what replaces one line the line is known
    String name = key.substring(key.lastIndexOf('.') + 1).replaceAll("\\[.*", "");
    boolean isOneLine = instead.startsWith(name + " =") && !instead.contains("\\n");
    refuses(text, "lab.toml:" + (isOneLine ? lineOf(lines(old)) + ": " : ""));
  }

  private static long lineOf(String part) {
    String text = ReferenceScenario.text();
    return text.substring(0, text.indexOf(part)).lines().count() + 1;
  }

  private static String lines(String text) {
    return text.replace("\\n", "\n");
  }

  @ParameterizedTest(name = "without {0}")
  @CsvSource(
      delimiter = '|',
      quoteCharacter = '`',
      textBlock =
          """
          species = "Rb-87"        | atom.species
          magnetic = "4 G"         | field.magnetic
          level = "5S1/2"          | start.level
          F = 2                    | start.F
          mF = 2                   | start.mF
          to = "6P3/2"             | step[1].to
          detuning = "1.2 GHz"     | step[1].detuning
          power = "2 mW"           | step[1].power
          waist = "20 um"          | step[1].waist
          polarization = "sigma+"  | step[1].polarization
          direction = [0, 0, 1]    | step[1].direction
          mJ = 0.5                 | step[2].mJ
          kind = "pi"              | pulse.kind
          """)
  void refusesMissingValues(String line, String key) throws IOException {
    refuses(ReferenceScenario.with(line, ""), key, "is missing", "allowed: ");
  }

  @ParameterizedTest
  @ValueSource(strings = {"[atom]", "[field]", "[start]", "[pulse]"})
  void refusesMissingTables(String header) throws IOException {
    String text = ReferenceScenario.text();
    int from = text.indexOf(header);
    int to = text.indexOf("\n[", from);
    String name = header.substring(1, header.length() - 1);
    refuses(text.substring(0, from) + text.substring(to + 1), name, "is missing", "allowed: ");
  }

  @ParameterizedTest
  @CsvSource(
      delimiter = '|',
      quoteCharacter = '`',
      textBlock =
          """
          title = "Rub | tittle = "Rub           | tittle              | title, atom, field
          species =    | isotope =               | atom.isotope        | species
          waist = "20  | radius = "20            | step[1].radius      | to, detuning, power, waist
          mJ = 0.5     | detuning = "1 GHz"      | step[2].detuning    | to, mJ, multipole
          kind =       | form =                  | pulse.form          | kind, offset
          kind = "pi"  | kind = "pi"\\narea_rad = 3 | pulse.area_rad | kind, offset, rise
          drift =      | drifts =                | bench.drifts        | linewidth, drift, intensity_noise
          [bench]      | [lab]                   | lab                 | pulse, bench
          """)
  void refusesUnknownKeys(String old, String instead, String key, String allowed)
      throws IOException {
    String text = ReferenceScenario.with(old, lines(instead));
    refuses(text, "lab.toml:", ": " + key, "key", "allowed: ", allowed);
  }

  @Test
  void refusesAnotherNumberOfSteps() throws IOException {
    refuses(
        ReferenceScenario.with(
            "[pulse]", "[[step]]\nto = \"7S1/2\"\n[[step]]\nto = \"8P1/2\"\n[pulse]"),
        "step",
        "given 4",
        "allowed: 1 to 3");
  }

  @Test
  void refusesStepsThatBreakASelectionRule() throws IOException {
    refuses(ReferenceScenario.with("6P3/2", "6D3/2"), "step", "5S1/2", "6D3/2", "parity");
    refuses(ReferenceScenario.with("68S1/2", "68P1/2"), "step", "6P3/2", "68P1/2", "parity");
    String toF = ReferenceScenario.with("68S1/2", "68D5/2").replace("6P3/2", "6P1/2");
    refuses(toF, "step", "6P1/2", "68D5/2", "triangle");
  }

  @Test
  void refusesPolarizationsThatCannotReachTheTarget() throws IOException {
    refuses(
        ReferenceScenario.with("\"sigma-\"\n", "\"sigma+\"\n"),
        "step",
        "5S1/2 F=2 mF=2",
        "68S1/2 mJ=1/2",
        "rule");
  }

  @ParameterizedTest
  @CsvSource(
      delimiter = '|',
      quoteCharacter = '`',
      textBlock =
          """
          kind = "pi" | kind = "pi"\\nkind = "pi" | Duplicate
          [bench]     | [atom]                    | redefined
          [atom]      | [atom                     | .toml:
          F = 2       | F =                       | .toml:8:
          """)
  void refusesOverlappingOrUnreadableToml(String old, String instead, String complaint)
      throws IOException {
    refuses(
        ReferenceScenario.with(old, instead.replace("\\n", "\n")),
        "lab.toml:",
        complaint,
        "allowed: ");
  }

  @Test
  void refusesTextThatWouldBreakTheLine() throws IOException {
    refuses(
        ReferenceScenario.with("\"Rubidium reference drive\"", "\"\"\"two\nlines\"\"\""),
        "title",
        "two\\nlines",
        "one line of text");
    refuses(ReferenceScenario.with("Rb-87", "Rb\\u001b[31m"), "atom.species", "Cs-133");
    refuses(ReferenceScenario.with("Rb-87", "Rb\\n87"), "atom.species", "Cs-133");
  }

  @Test
  void refusesFilesThatCannotBeRead() throws IOException {
    refusesFile(folder.resolve("missing.toml"), "no such file");
    refusesFile(Files.createDirectory(folder.resolve("folder.toml")), "directory");
    byte[] noise = {'t', '=', '"', (byte) 0xC3, (byte) 0x28, '"'};
    refusesFile(Files.write(folder.resolve("noise.toml"), noise), "UTF-8");
    refusesFile(Files.write(folder.resolve("large.toml"), new byte[2_000_000]), "too large");
    refusesFile(Files.createFile(folder.resolve("empty.toml")), "atom", "missing");
  }

  @Test
  void refusesOutputsThatCannotBeWrittenBeforeAnythingRuns() throws IOException {
    Path scenario = Files.writeString(folder.resolve("lab.toml"), ReferenceScenario.text());
    Path noFolder = folder.resolve("nowhere").resolve("out.json");
    Path inFile = scenario.resolve("out.json");
    for (Path output : List.of(noFolder, folder, inFile, scenario)) {
      CommandLineRun run =
          CommandLineRun.of("budget", scenario.toString(), "--json", output.toString());
      assertEquals(2, run.status());
      assertEquals("", run.out());
      assertEquals(1, run.errLines().size(), run.err());
      assertTrue(run.err().contains("--json: given " + output), run.err());
      assertTrue(run.err().contains("allowed: "), run.err());
    }
    assertEquals(List.of("lab.toml"), namesIn(folder));
    assertEquals(ReferenceScenario.text(), Files.readString(scenario));
  }

  @ParameterizedTest
  @CsvSource({
    "--json, --chart, a.svg",
    "--markdown, --csv, a",
    "--chart, --filter-chart, a.svg",
    "--csv, --program, a.csv",
    "--json, --markdown, a",
  })
  void refusesTheSameFileForTwoOutputs(String first, String second, String name)
      throws IOException {
    Path scenario = Files.writeString(folder.resolve("lab.toml"), ReferenceScenario.text());
    String output = folder.resolve(name).toString();
    CommandLineRun run =
        CommandLineRun.of("budget", scenario.toString(), first, output, second, output);
    assertEquals(2, run.status());
    assertEquals("", run.out());
    assertEquals(1, run.errLines().size(), run.err());
    assertTrue(run.err().contains(first) && run.err().contains(second), run.err());
    assertFalse(Files.exists(Path.of(output)));
  }

  @ParameterizedTest
  @ValueSource(strings = {"--json", "--markdown", "--csv"})
  void refusesToReplaceTheScenario(String option) throws IOException {
    Path scenario = Files.writeString(folder.resolve("lab.toml"), ReferenceScenario.text());
    CommandLineRun run =
        CommandLineRun.of("budget", scenario.toString(), option, scenario.toString());
    assertEquals(2, run.status());
    assertTrue(run.err().contains("the scenario is read from"), run.err());
    assertEquals(ReferenceScenario.text(), Files.readString(scenario));
  }

  @ParameterizedTest
  @ValueSource(strings = {"0 s", "-1 ns", "1e-15 s"})
  void refusesSlicesThatDoNotFitThePulse(String slice) throws IOException {
    Path scenario = Files.writeString(folder.resolve("lab.toml"), ReferenceScenario.text());
    String output = folder.resolve("out.csv").toString();
    CommandLineRun run =
        CommandLineRun.of("budget", scenario.toString(), "--program", output, "--slice", slice);
    assertEquals(2, run.status());
    assertEquals("", run.out());
    assertEquals(1, run.errLines().size(), run.err());
    assertTrue(run.err().contains("--slice") && run.err().contains("allowed"), run.err());
    assertFalse(Files.exists(Path.of(output)));
  }

  @Test
  void refusesToCompareWithWhatIsNoScenario() throws IOException {
    Path good = Files.writeString(folder.resolve("lab.toml"), ReferenceScenario.text());
    Path bad = Files.writeString(folder.resolve("bad.toml"), ReferenceScenario.with("Rb-87", "X"));
    for (String[] files :
        new String[][] {{good.toString(), bad.toString()}, {bad.toString(), good.toString()}}) {
      CommandLineRun run = CommandLineRun.of("compare", files[0], files[1]);
      assertEquals(2, run.status());
      assertEquals("", run.out());
      assertEquals(1, run.errLines().size(), run.err());
      assertTrue(run.err().contains("bad.toml"), run.err());
    }
    assertEquals(2, CommandLineRun.of("compare", good.toString()).status());
    for (Path taken : List.of(good, bad)) {
      CommandLineRun run =
          CommandLineRun.of(
              "compare", good.toString(), good.toString(), "--markdown", folder.toString());
      assertEquals(2, run.status());
      assertTrue(run.err().contains("--markdown: given"), run.err());
      assertTrue(Files.size(taken) > 0);
    }
    CommandLineRun over =
        CommandLineRun.of(
            "compare", good.toString(), good.toString(), "--markdown", good.toString());
    assertEquals(2, over.status());
    assertTrue(over.err().contains("the scenario is read from"), over.err());
    assertEquals(ReferenceScenario.text(), Files.readString(good));
  }

  @ParameterizedTest
  @CsvSource({
    "--shots 1, --shots, from 2 to",
    "--shots few, --shots, given few; allowed: a whole number from 2 to",
    "--seed 1.5, --seed, 1.5",
    "--chart a.png, a.png, .svg",
    "--filter-chart a.png, a.png, .svg",
    "--program a.txt, a.txt, .csv",
    "--slice 2 --program a.csv, given 2, its unit",
    "--slice 2ns, --slice, --program",
    "--total-only=maybe, --total-only, maybe",
    "--json, --json, FILE",
    "--colour, --colour, --help",
  })
  void refusesOptionsItDoesNotUnderstand(String options, String named, String help) {
    String[] args = ("budget lab.toml " + options).split(" ");
    CommandLineRun run = CommandLineRun.of(args);
    assertEquals(2, run.status());
    assertEquals(1, run.errLines().size(), run.err());
    assertTrue(run.err().contains(named) && run.err().contains(help), run.err());
  }

  @Test
  void refusesToRunWithoutACommandOrScenario() {
    assertEquals(2, CommandLineRun.of().status());
    assertEquals(1, CommandLineRun.of().errLines().size());
    assertEquals(2, CommandLineRun.of("budget").status());
    assertEquals(1, CommandLineRun.of("budget").errLines().size());
  }

  @Test
  void keepsTheFilesThatTheScenarioNames() throws IOException {
    String table = "1, 100\n1e7, 100\n";
    Path noise = Files.writeString(folder.resolve("noise.csv"), table);
    String bench = "[bench]\nfrequency_noise_density = [\"noise.csv\", \"none\"]\n";
    String text = ReferenceScenario.text();
    Path file =
        Files.writeString(
            folder.resolve("lab.toml"), text.substring(0, text.indexOf("[bench]")) + bench);
    String[][] commands = {
      {"budget", file.toString(), "--csv", noise.toString()},
      {"compare", file.toString(), file.toString(), "--markdown", noise.toString()}
    };
    for (String[] command : commands) {
      CommandLineRun run = CommandLineRun.of(command);
      assertEquals(2, run.status(), run.err());
      assertTrue(run.err().contains("noise.csv, which the scenario is read from"), run.err());
    }
    assertEquals(table, Files.readString(noise));
  }
}
