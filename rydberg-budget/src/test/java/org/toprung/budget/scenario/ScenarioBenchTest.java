package org.toprung.budget.scenario;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.toprung.budget.bench.BenchValue.DRIFT;
import static org.toprung.budget.bench.BenchValue.ELECTRIC_FIELD;
import static org.toprung.budget.bench.BenchValue.INTENSITY_NOISE;
import static org.toprung.budget.bench.BenchValue.LINEWIDTH;
import static org.toprung.budget.bench.BenchValue.MAGNETIC_NOISE;
import static org.toprung.budget.bench.BenchValue.POINTING;
import static org.toprung.budget.bench.BenchValue.TEMPERATURE;
import static org.toprung.budget.bench.BenchValue.TRAP_FREQUENCY;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Arrays;
import java.util.EnumSet;
import java.util.List;
import java.util.stream.Collectors;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.constraints.DoubleRange;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;
import org.toprung.budget.ReferenceScenario;
import org.toprung.budget.bench.Bench;
import org.toprung.budget.bench.BenchEntry;
import org.toprung.budget.bench.BenchValue;

class ScenarioBenchTest {
  @TempDir private Path folder;

  @BeforeEach
  void writeData() throws IOException {
    Files.writeString(folder.resolve("noise.csv"), "# Hz, Hz2/Hz\n10, 4\n1000, 4\n");
    Files.writeString(folder.resolve("power.csv"), "10; 4e-6\n1000; 4e-6\n");
    Files.writeString(folder.resolve("storm.csv"), "1, 1e300\n1000, 1e300\n");
    Files.writeString(folder.resolve("storm.txt"), "1 mG\n1e300 G\n");
    Files.writeString(folder.resolve("far.csv"), "1, 1\n1e300, 1\n");
    Files.writeString(folder.resolve("field.txt"), "1.2 mG\n# later\n-3 mG\n\n0.5 uT\n");
    Files.writeString(folder.resolve("stray.txt"), "3 mV/cm\n0 V/m\n");
    Files.writeString(folder.resolve("drift.txt"), "\uFEFF-1 kHz\r\n2 kHz\r\n");
    Files.writeString(folder.resolve("power.txt"), "0.01\n-2e-2\n");
  }

  /** The reference scenario with another bench. */
  private static String text(String bench) {
    String reference = ReferenceScenario.text();
    return reference.substring(0, reference.indexOf("[bench]")) + "[bench]\n" + bench + "\n";
  }

  private Scenario scenario(String bench) throws IOException {
    return Scenario.read(Files.writeString(folder.resolve("lab.toml"), text(bench)));
  }

  private static Bench parsed(String bench) {
    return Scenario.parse(text(bench), "lab.toml").bench();
  }

  private ScenarioException refused(String bench) {
    return assertThrows(ScenarioException.class, () -> scenario(bench));
  }

  /** Line of [bench], so that the next one is the first line of the bench. */
  private static int header() {
    return (int) text("").lines().count() - 1;
  }

  @Test
  void readsEveryKeyOfTheBench() throws IOException {
    Bench bench =
        scenario(
                """
                temperature = "6 uK"
                trap_frequency = ["80 kHz", "70 kHz", "10 kHz"]
                environment_temperature = "295 K"
                magnetic_noise = "2 mG"
                electric_field = "3 mV/cm"
                linewidth = ["0 Hz", "300 Hz"]
                drift = ["1 kHz", "2 kHz"]
                intensity_noise = [0.004, 0.3]
                pointing = ["1 um", "2 um"]
                polarization_impurity = [0.001, 0.002]
                length_error = 0.01
                frequency_error = "3 kHz"
                trap_intensity_noise = 0.02
                preparation_error = 0.003
                detection_error = 0.004
                frequency_noise_density = ["noise.csv", "none"]
                intensity_noise_density = ["none", "power.csv"]
                motion_during_pulse = true
                """)
            .bench();
    assertEquals(
        EnumSet.allOf(BenchValue.class),
        bench.entries().stream().map(BenchEntry::value).collect(Collectors.toSet()));
    double[] expected = {
      6e-6, 8e4, 7e4, 1e4, 295, 2e-7, 0.3, 0, 300, 1e3, 2e3, 0.004, 0.3, 1e-6, 2e-6, 0.001, 0.002,
      0.01, 3e3, 0.02, 0.003, 0.004, 1, 1
    };
    assertArrayEquals(
        expected,
        bench.entries().stream()
            .mapToDouble(e -> bench.value(e.value(), e.index()).orElseThrow())
            .toArray());
    assertEquals(4, bench.frequencyNoiseDensity(0).orElseThrow().at(100));
    assertTrue(bench.frequencyNoiseDensity(1).isEmpty());
    assertTrue(bench.intensityNoiseDensity(0).isEmpty());
    assertTrue(bench.intensityNoiseDensity(1).isPresent());
    assertTrue(bench.movesDuringPulse());
    assertTrue(bench.entries().stream().allMatch(e -> relative(bench, e) == 0));
    assertFalse(parsed("motion_during_pulse = false").movesDuringPulse());
  }

  private static double relative(Bench bench, BenchEntry entry) {
    return bench.relativeUncertainty(entry.value(), entry.index());
  }

  @ParameterizedTest
  @ValueSource(
      strings = {"6 ± 1.5 uK", "6 +- 1.5 uK", "6±1.5uK", " 6.0 +-1.5 \u00b5K ", "6e0 ± 15e-1 uK"})
  void readsUncertainties(String value) {
    Bench bench = parsed("temperature = \"" + value + "\"");
    assertEquals(6e-6, bench.value(TEMPERATURE, 0).orElseThrow());
    assertEquals(0.25, bench.relativeUncertainty(TEMPERATURE, 0), 1e-15);
  }

  @Test
  void readsUncertaintiesInLists() {
    Bench bench =
        parsed(
            """
            intensity_noise = ["0.004 ± 0.001", 0.01]
            linewidth = ["0 ± 0 Hz", "300 +- 30 Hz"]
            trap_frequency = ["80 kHz", "80 kHz", "10 ± 1 kHz"]
            length_error = "0.01 +- 0.01"
            """);
    assertEquals(0.25, bench.relativeUncertainty(INTENSITY_NOISE, 0), 1e-15);
    assertEquals(0, bench.relativeUncertainty(INTENSITY_NOISE, 1));
    assertEquals(0, bench.relativeUncertainty(LINEWIDTH, 0));
    assertEquals(0.1, bench.relativeUncertainty(LINEWIDTH, 1), 1e-15);
    assertEquals(0.1, bench.relativeUncertainty(TRAP_FREQUENCY, 2), 1e-15);
    assertEquals(1, bench.relativeUncertainty(BenchValue.LENGTH_ERROR, 0));
  }

  @Property(seed = "51", tries = 20)
  void dividesUncertaintiesByTheirNumbers(
      @ForAll @DoubleRange(min = 0.5, max = 50) double number,
      @ForAll @DoubleRange(min = 0, max = 0.5) double spread) {
    Bench bench = parsed("magnetic_noise = \"" + number + " ± " + spread + " mG\"");
    assertEquals(spread / number, bench.relativeUncertainty(MAGNETIC_NOISE, 0), 1e-14);
    assertEquals(number * 1e-7, bench.value(MAGNETIC_NOISE, 0).orElseThrow(), 1e-20);
  }

  @Test
  void readsSamples() throws IOException {
    Bench bench =
        scenario(
                """
                drift = ["0 Hz", "2 kHz"]
                magnetic_noise_samples = "field.txt"
                electric_field_samples = "stray.txt"
                drift_samples = ["drift.txt", "none"]
                intensity_noise_samples = ["none", "power.txt"]
                """)
            .bench();
    assertArrayEquals(
        new double[] {1.2e-7, -3e-7, 5e-7},
        bench.spread(MAGNETIC_NOISE, 0).orElseThrow().samples(),
        1e-21);
    assertArrayEquals(
        new double[] {0.3, 0}, bench.spread(ELECTRIC_FIELD, 0).orElseThrow().samples(), 1e-15);
    assertArrayEquals(new double[] {-1e3, 2e3}, bench.spread(DRIFT, 0).orElseThrow().samples());
    assertEquals(2e3, bench.spread(DRIFT, 1).orElseThrow().rms());
    assertTrue(bench.spread(DRIFT, 1).orElseThrow().isGaussian());
    assertTrue(bench.spread(INTENSITY_NOISE, 0).isEmpty());
    assertArrayEquals(
        new double[] {0.01, -0.02}, bench.spread(INTENSITY_NOISE, 1).orElseThrow().samples());
    assertFalse(bench.isKnown(POINTING));
  }

  @ParameterizedTest(name = "{0}")
  @CsvSource(
      delimiter = '|',
      quoteCharacter = '`',
      textBlock =
          """
          temperature = "6 ± 1"                       | temperature       | no unit        | uK
          temperature = "6 uK ± 1 uK"                 | temperature       | 6 uK ± 1 uK    | "10 ± 1 uK"
          temperature = "6 ± -1 uK"                   | temperature       | 6 ± -1 uK      | "10 ± 1 uK"
          temperature = "± 1 uK"                      | temperature       | ± 1 uK         | "10 ± 1 uK"
          temperature = "1e300 K"                     | temperature       | 1e300 K        | at most 1e+04 K
          environment_temperature = "2e4 K"           | environment_temperature | 20000 K  | at most 1e+04 K
          trap_frequency = ["1 Hz", "1 Hz", "2 THz"]  | trap_frequency[3] | 2 THz          | at most 1e+12 Hz
          pointing = ["0 m", "1e300 m"]               | pointing[2]       | 1e300 m        | at most 1.0 m
          linewidth = ["0 Hz", "1e300 Hz"]            | linewidth[2]      | 1e300 Hz       | at most 1e+12 Hz
          magnetic_noise_samples = "storm.txt"        | magnetic_noise_samples | samples   | at most 1.0 T
          frequency_noise_density = ["storm.csv", "none"] | frequency_noise_density[1] | storm.csv | at most 1.0E12
          intensity_noise_density = ["none", "storm.csv"] | intensity_noise_density[2] | storm.csv | at most 0.5
          frequency_noise_density = ["none", "far.csv"] | frequency_noise_density[2] | 1.0E300 Hz | 1.0E15 Hz
          temperature = "6 ± 1 mG"                    | temperature       | mG             | uK
          temperature = "6 ± 6 uK"                    | temperature       | 1.0            | below 1
          temperature = "0 ± 1 uK"                    | temperature       | 0 K            | above zero
          temperature = ["6 uK"]                      | temperature       | ["6 uK"]       | text such as
          magnetic_noise = "2 ± 3 mG"                 | magnetic_noise    | 1.5            | from 0 to 1
          magnetic_noise = "0 ± 3 mG"                 | magnetic_noise    | 0 ± 3          | allowed: 0
          magnetic_noise = "-2 ± 1 mG"                | magnetic_noise    | -2 mG          | at least zero
          length_error = "0.01 ± 0.001 Hz"            | length_error      | Hz             | without a unit
          length_error = "0.01"                       | length_error      | "0.01"         | number from 0 to 0.5, or a text such as "0.004 ± 0.001"
          length_error = 0.6                          | length_error      | 0.6            | between 0 and 0.5
          length_error = nan                          | length_error      | NaN            | number
          preparation_error = -0.1                    | preparation_error | -0.1           | between 0 and 0.5
          detection_error = true                      | detection_error   | true           | number
          frequency_error = "-1 kHz"                  | frequency_error   | -1 kHz         | at least zero
          trap_intensity_noise = 1                    | trap_intensity_noise | 1           | between 0 and 0.5
          pointing = ["1 um", "-1 um"]                | pointing[2]       | -1 um          | at least zero
          pointing = ["1 um"]                         | pointing          | ["1 um"]       | 2 texts
          polarization_impurity = [0.1, 0.1, 0.1]     | polarization_impurity | [0.1,0.1,0.1] | 2 numbers
          intensity_noise = [0.1, -0.1]               | intensity_noise[2] | -0.1          | between 0 and 0.5
          drift = ["1 kHz", "1 kHz", "1 kHz"]         | drift             | "1 kHz"        | 2 texts
          linewidth = ["1 G", "1 kHz"]                | linewidth[1]      | 1 G            | kHz
          motion_during_pulse = "yes"                 | motion_during_pulse | "yes"        | true or false
          frequency_noise_density = "noise.csv"       | frequency_noise_density | "noise.csv" | 2 names
          frequency_noise_density = ["noise.csv"]     | frequency_noise_density | ["noise.csv"] | one per step
          frequency_noise_density = ["none", 3]       | frequency_noise_density[2] | 3      | name of a file
          frequency_noise_density = ["none", "x.csv"] | frequency_noise_density[2] | x.csv  | no such file
          frequency_noise_density = ["none", "."]     | frequency_noise_density[2] | directory | text file
          frequency_noise_density = ["none", ""]      | frequency_noise_density[2] | ""     | name of a file
          magnetic_noise_samples = "none"             | magnetic_noise_samples | none       | no such file
          magnetic_noise_samples = ["field.txt"]      | magnetic_noise_samples | field.txt  | name of a file
          magnetic_noise_samples = "drift.txt"        | magnetic_noise_samples | drift.txt, line 1 | mG
          drift_samples = ["none", "power.txt"]       | drift_samples[2]  | power.txt, line 1 | kHz
          intensity_noise_samples = ["drift.txt", "none"] | intensity_noise_samples[1] | drift.txt, line 1 | number
          drifts = ["1 kHz", "1 kHz"]                 | drifts            | unknown key    | drift_samples, intensity_noise_samples, motion
          """)
  void refusesBadValuesWithKeyAndLine(String line, String key, String given, String allowed) {
    ScenarioException e = refused("# a comment\n\n" + line);
    String message = e.getMessage();
    assertEquals("bench." + key, e.key().orElseThrow(), message);
    assertEquals(header() + 3, e.line().orElseThrow(), message);
    assertTrue(message.contains("lab.toml:" + (header() + 3) + ": bench." + key + ": "), message);
    assertTrue(message.contains(given) && message.contains(allowed), message);
    assertEquals(1, message.lines().count());
  }

  @ParameterizedTest(name = "{0}: {1}")
  @CsvSource(
      delimiter = '|',
      quoteCharacter = '`',
      textBlock =
          """
          frequency_noise_density = ["none", "bad.txt"] | 10,4\\n5,4       | line 2 | rising
          frequency_noise_density = ["none", "bad.txt"] | 10,4\\n20,-4     | line 2 | at least 0
          frequency_noise_density = ["none", "bad.txt"] | # x\\n10,4\\n10,4 | line 3 | rising
          intensity_noise_density = ["none", "bad.txt"] | 10,4\\n20 Hz,4   | line 2 | two numbers
          intensity_noise_density = ["none", "bad.txt"] | 10,4            | 1 entries | at least 2
          intensity_noise_density = ["none", "bad.txt"] | \\n              | 0 entries | at least 2
          magnetic_noise_samples = "bad.txt"            | 1 mG\\n2         | line 2 | mG
          magnetic_noise_samples = "bad.txt"            | 1 mG\\n\\nnan mG | line 3 | number
          magnetic_noise_samples = "bad.txt"            | # nothing       | no entries | at least one
          electric_field_samples = "bad.txt"            | 1 V/m\\n-1 V/m   | line 2 | at least zero
          intensity_noise_samples = ["none", "bad.txt"] | 0.1\\n0x1p0      | line 2 | finite number
          intensity_noise_samples = ["none", "bad.txt"] | 0.1\\n1e999      | line 2 | finite number
          intensity_noise_samples = ["none", "bad.txt"] | 0.1\\n-1.5       | line 2 | at least -1
          intensity_noise_samples = ["none", "bad.txt"] | 0.7\\n-0.7       | 0.7    | between 0 and 0.5
          """)
  void refusesBadDataWithBothFilesAndLines(String line, String data, String where, String allowed)
      throws IOException {
    Files.writeString(folder.resolve("bad.txt"), data.replace("\\n", "\n"));
    ScenarioException e = refused("\n" + line);
    String message = e.getMessage();
    String key =
        "bench." + line.substring(0, line.indexOf(' ')) + (line.contains("[") ? "[2]" : "");
    assertEquals(key, e.key().orElseThrow(), message);
    assertEquals(header() + 2, e.line().orElseThrow(), message);
    assertTrue(message.contains("bad.txt"), message);
    assertTrue(message.contains(where) && message.contains(allowed), message);
  }

  @Test
  void refusesBinaryData() throws IOException {
    Files.write(folder.resolve("bad.txt"), new byte[] {'1', (byte) 0xC3, 0x28});
    assertTrue(refused("magnetic_noise_samples = \"bad.txt\"").getMessage().contains("UTF-8"));
  }

  @Test
  void refusesWhatWouldCountTwice() {
    ScenarioException laser =
        refused(
            "frequency_noise_density = [\n\"noise.csv\",\n\"noise.csv\"]\nlinewidth = [\"0 Hz\", \"1 Hz\"]");
    assertEquals("bench.frequency_noise_density[2]", laser.key().orElseThrow());
    assertEquals(header() + 3, laser.line().orElseThrow());
    assertTrue(laser.getMessage().contains("laser 2 has a linewidth of 1 Hz"), laser.getMessage());
    ScenarioException field =
        refused("magnetic_noise_samples = \"field.txt\"\nmagnetic_noise = \"1 mG\"");
    assertEquals("bench.magnetic_noise_samples", field.key().orElseThrow());
    assertTrue(field.getMessage().contains("not both"), field.getMessage());
    ScenarioException drift =
        refused("drift = [\"1 Hz\", \"0 Hz\"]\ndrift_samples = [\"drift.txt\", \"none\"]");
    assertEquals("bench.drift_samples[1]", drift.key().orElseThrow());
  }

  /** The line is that of the offending item, wherever the table and its keys stand. */
  @Test
  void findsTheLineOfKeysInOddPlaces() {
    String head = text("").replace("[bench]\n", "");
    List<String> benches =
        List.of(
            "[ \"bench\" ] # here\n'drift' = [ # \"-1 Hz\"\n \"1 Hz\",\n\n \"-1 Hz\" ]",
            "[bench]\ntemperature = \"1 K\"\ndrift = [\"1 Hz\", # first\n # second:\n\"-1 Hz\"]",
            "[bench]\r\n\r\n\r\n\r\ndrift = [\"1 Hz\", \"-1 Hz\"]");
    for (String bench : benches) {
      ScenarioException e =
          assertThrows(ScenarioException.class, () -> Scenario.parse(head + bench, "lab.toml"));
      assertEquals("bench.drift[2]", e.key().orElseThrow(), e.getMessage());
      assertEquals(head.lines().count() + 5, e.line().orElseThrow(), e.getMessage());
    }
    for (String bench :
        List.of("bench.drift = ['1 Hz', '-1 Hz']\n", "bench = {drift = ['1 Hz', '-1 Hz']}\n")) {
      ScenarioException e =
          assertThrows(
              ScenarioException.class,
              () -> Scenario.parse("# first\n" + bench + head, "lab.toml"));
      assertEquals(2, e.line().orElseThrow(), e.getMessage());
    }
  }

  @Test
  void namesEveryKeyThereIs() {
    String message = refused("x = 1").getMessage();
    for (BenchValue value : BenchValue.values()) {
      assertTrue(message.contains(value.key()), value.key());
    }
    assertTrue(
        Arrays.asList(message.split(", "))
            .containsAll(
                List.of("magnetic_noise_samples", "electric_field_samples", "motion_during_pulse")),
        message);
  }
}
