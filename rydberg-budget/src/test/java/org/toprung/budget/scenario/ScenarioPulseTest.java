package org.toprung.budget.scenario;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Locale;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.Arguments;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.MethodSource;
import org.toprung.budget.ReferenceScenario;
import org.toprung.budget.pulse.FrequencyReference;
import org.toprung.budget.pulse.Goal;
import org.toprung.budget.pulse.Pulse;
import org.toprung.budget.pulse.PulseProgram;
import org.toprung.core.quantity.Frequency;
import org.toprung.core.quantity.Time;

class ScenarioPulseTest {
  private static final Frequency RABI = Frequency.megahertz(1);

  @TempDir private Path folder;

  private Scenario scenario(String pulse) throws IOException {
    String text = ReferenceScenario.with("kind = \"pi\"", pulse);
    return Scenario.read(Files.writeString(folder.resolve("lab.toml"), text));
  }

  private Pulse pulse(String pulse) throws IOException {
    return scenario(pulse).pulse();
  }

  private static int header() {
    String text = ReferenceScenario.text();
    return (int) text.substring(0, text.indexOf("[pulse]")).lines().count() + 1;
  }

  static Stream<Arguments> kinds() {
    Time two = Time.microseconds(2);
    Frequency sweep = Frequency.megahertz(-20);
    return Stream.of(
        Arguments.of("kind = \"pi\"", Pulse.pi()),
        Arguments.of("kind = \"square\"", Pulse.square(Math.PI)),
        Arguments.of("kind = \"square\"\narea_rad = 1.5", Pulse.square(1.5)),
        Arguments.of("kind = \"gaussian\"", Pulse.gaussian(Math.PI)),
        Arguments.of("kind = \"gaussian\"\narea_rad = 2", Pulse.gaussian(2)),
        Arguments.of("kind = \"blackman\"\narea_rad = 6", Pulse.blackman(6)),
        Arguments.of("kind = \"sine-squared\"\narea_rad = 3", Pulse.sineSquared(3)),
        Arguments.of("kind = \"bb1\"", Pulse.bb1(Math.PI)),
        Arguments.of("kind = \"bb1\"\narea_rad = 1", Pulse.bb1(1)),
        Arguments.of("kind = \"corpse\"\narea_rad = 1.25", Pulse.corpse(1.25)),
        Arguments.of("kind = \"ramsey\"\nwait = \"2 us\"", Pulse.ramsey(two, 0)),
        Arguments.of("kind = \"ramsey\"\nwait = \"2 us\"\nphase_rad = 0.5", Pulse.ramsey(two, 0.5)),
        Arguments.of("kind = \"echo\"\nhalf_wait = \"2 us\"\nphase_rad = -1", Pulse.echo(two, -1)),
        Arguments.of(
            "kind = \"chirp\"\nduration = \"2 us\"\nsweep = \"-20 MHz\"",
            Pulse.chirped(two, sweep)),
        Arguments.of(
            "kind = \"chirp\"\nduration = \"2 us\"\nsweep = \"-20 MHz\"\nsmooth = true",
            Pulse.chirpedSmoothly(two, sweep)),
        Arguments.of(
            "kind = \"stirap\"\nwidth = \"2 us\"\ndelay = \"600 ns\"",
            Pulse.stirap(two, Time.nanoseconds(600))),
        Arguments.of(
            "kind = \"stirap\"\nwidth = \"2 us\"\ndelay = \"600 ns\"\nshape = \"sine-squared\"",
            Pulse.stirap(two, Time.nanoseconds(600))),
        Arguments.of(
            "kind = \"stirap\"\nwidth = \"2 us\"\ndelay = \"600 ns\"\nshape = \"gaussian\"",
            Pulse.gaussianStirap(two, Time.nanoseconds(600))));
  }

  @ParameterizedTest(name = "{0}")
  @MethodSource("kinds")
  void readsEveryKind(String text, Pulse expected) throws IOException {
    samePulse(expected, pulse(text));
    Pulse offset = pulse(text + "\noffset = \"-10 kHz\"");
    samePulse(expected.offsetBy(Frequency.kilohertz(-10)), offset);
  }

  /** Alike in name, goal and in everything that is played. */
  private static void samePulse(Pulse expected, Pulse read) {
    assertEquals(expected.toString(), read.toString());
    assertEquals(expected.goal(), read.goal());
    assertEquals(expected.areaRadians(), read.areaRadians());
    PulseProgram a = expected.program(2, RABI);
    PulseProgram b = read.program(2, RABI);
    assertEquals(a.reference(), b.reference());
    assertArrayEquals(a.breaks(), b.breaks());
    double[] breaks = a.breaks();
    for (int i = 0; i + 1 < breaks.length; i++) {
      for (double x : new double[] {0.1, 0.37, 0.8}) {
        double t = breaks[i] + x * (breaks[i + 1] - breaks[i]);
        assertEquals(a.fieldFactor(0, t), b.fieldFactor(0, t));
        assertEquals(a.fieldFactor(1, t), b.fieldFactor(1, t));
        assertEquals(a.detuningHertz(t), b.detuningHertz(t));
        assertEquals(a.phaseRadians(t), b.phaseRadians(t));
      }
    }
  }

  @Test
  void readsWhatAnyPulseMayHave() throws IOException {
    Pulse read =
        pulse(
            """
            kind = "square"
            area_rad = 6.283185307
            rise = "20 ns"
            fall = "30 ns"
            shaped_step = 1
            hold_frequency = true
            offset = "5 kHz"
            """);
    samePulse(
        Pulse.square(6.283185307)
            .withEdges(Time.nanoseconds(20), Time.nanoseconds(30))
            .shapingStep(0)
            .holdingFrequency()
            .offsetBy(Frequency.kilohertz(5)),
        read);
    assertEquals(FrequencyReference.FULL_POWER, read.program(2, RABI).reference());
    samePulse(Pulse.pi(), pulse("kind = \"pi\"\nhold_frequency = false"));
    samePulse(Pulse.pi().shapingStep(1), pulse("kind = \"pi\"\nshaped_step = 2.0"));
  }

  @Test
  void readsSamples() throws IOException {
    Files.writeString(
        folder.resolve("own.csv"), "# amplitude, Hz, rad\n0.5, 1e3, 0\n1 -2e3 0.5\n\n0; 0; 0\n");
    String text = "kind = \"samples\"\nspacing = \"10 ns\"\nfile = \"own.csv\"\ngoal = ";
    samePulse(
        Pulse.samples(
            Time.nanoseconds(10),
            new double[] {0.5, 1, 0},
            new double[] {1e3, -2e3, 0},
            new double[] {0, 0.5, 0},
            Goal.ROTATION),
        pulse(text + "\"rotation\""));
    for (Goal goal : Goal.values()) {
      assertEquals(goal, pulse(text + "\"" + goal.name().toLowerCase(Locale.ROOT) + "\"").goal());
    }
  }

  @ParameterizedTest(name = "{0}")
  @CsvSource(
      delimiter = '|',
      quoteCharacter = '`',
      textBlock =
          """
          # the last line of the pulse is at fault
          kind = "half"                                      | kind       | "half"    | "pi", "square", "gaussian"
          kind = 1                                           | kind       | given 1   | "samples"
          kind = "pi"\\narea_rad = 3                          | area_rad   | of kind "pi" | kind, offset, rise, fall
          kind = "square"\\nwait = "1 us"                     | wait       | of kind "square" | kind, area_rad, offset
          kind = "ramsey"\\nwait = "1 us"\\nhalf_wait = "1 us" | half_wait  | of kind "ramsey" | wait, phase_rad
          kind = "square"\\narea_rad = 0                      | area_rad   | 0         | more than 0
          kind = "square"\\narea_rad = nan                    | area_rad   | NaN       | radians
          kind = "square"\\narea_rad = "pi"                   | area_rad   | "pi"      | radians
          kind = "bb1"\\narea_rad = 13                        | area_rad   | 13        | at most 4
          kind = "ramsey"\\nwait = "-1 us"                    | wait       | -1 us     | at least 0
          wait = "1 s"\\nkind = "ramsey"                     | kind       | takes 1.00 s | up to 0.1 s
          half_wait = "1e300 s"\\nkind = "echo"              | kind       | echo of twice | up to 0.1 s
          sweep = "1 MHz"\\nduration = "1e9 s"\\nkind = "chirp" | kind     | takes 1.00e+09 s | up to 0.1 s
          width = "9 s"\\ndelay = "1 us"\\nkind = "stirap"   | kind       | "stirap"  | up to 0.1 s
          kind = "ramsey"\\nwait = "1 us"\\nphase_rad = inf    | phase_rad  | Infinity  | finite
          kind = "echo"\\nhalf_wait = 1                       | half_wait  | given 1   | "2 us"
          kind = "chirp"\\nsweep = "1 MHz"\\nduration = "0 s"  | duration   | "0 s"     | above zero
          kind = "chirp"\\nduration = "1 us"\\nsweep = "0 Hz"  | sweep      | 0 Hz      | any other sweep
          kind = "chirp"\\nduration = "1 us"\\nsweep = "1 us"  | sweep      | 1 us      | MHz
          kind = "chirp"\\nduration = "1 us"\\nsweep = "1 MHz"\\nsmooth = 1 | smooth | given 1 | true or false
          kind = "stirap"\\nwidth = "1 us"\\ndelay = "1 us"    | delay      | 1 us      | less than the width
          kind = "stirap"\\ndelay = "1 us"\\nwidth = "0 us"    | width      | "0 us"    | above zero
          kind = "stirap"\\nwidth = "2 us"\\ndelay = "1 us"\\nshape = "box" | shape | "box" | "gaussian"
          kind = "stirap"\\nwidth = "2 us"\\ndelay = "1 us"\\nhold_frequency = true | hold_frequency | STIRAP | unshifted
          kind = "stirap"\\nwidth = "2 us"\\ndelay = "1 us"\\nshaped_step = 1 | shaped_step | STIRAP | own shape
          kind = "pi"\\noffset = 10                           | offset     | given 10  | "10 kHz"
          kind = "pi"\\nfall = "10 ns"\\nrise = "-1 ns"        | rise       | "-1 ns"   | at least zero
          kind = "pi"\\nrise = "10 ns"\\nfall = "-1 ns"        | fall       | "-1 ns"   | at least zero
          kind = "pi"\\nfall = "10 ns"\\nrise = "10 us"        | rise       | 10 us     | at most
          kind = "pi"\\nshaped_step = 0                       | shaped_step | given 0  | from 1 to 2
          kind = "pi"\\nshaped_step = 3                       | shaped_step | given 3  | from 1 to 2
          kind = "pi"\\nshaped_step = 1.5                     | shaped_step | 1.5      | whole number
          kind = "pi"\\nhold_frequency = "yes"                | hold_frequency | "yes" | true or false
          kind = "samples"\\nspacing = "1 ns"\\ngoal = "more"  | goal       | "more"    | "transfer", "rotation"
          kind = "samples"\\nspacing = "0 ns"                 | spacing    | "0 ns"    | above zero
          kind = "samples"\\nspacing = "1 ns"\\ngoal = "return"\\nfile = "no.csv" | file | no.csv | no such file
          """)
  void refusesBadPulsesWithKeyAndLine(String pulse, String key, String given, String allowed) {
    String text = pulse.replace("\\n", "\n");
    ScenarioException e = assertThrows(ScenarioException.class, () -> scenario(text));
    String message = e.getMessage();
    assertEquals("pulse." + key, e.key().orElseThrow(), message);
    assertEquals(header() + text.lines().count(), e.line().orElseThrow(), message);
    assertTrue(message.contains(given) && message.contains(allowed), message);
  }

  @ParameterizedTest
  @CsvSource({
    "ramsey, wait",
    "echo, half_wait",
    "chirp, duration",
    "stirap, width",
    "samples, spacing"
  })
  void refusesKindsWithoutWhatTheyNeed(String kind, String key) {
    ScenarioException e =
        assertThrows(ScenarioException.class, () -> scenario("kind = \"" + kind + "\""));
    assertEquals("pulse." + key, e.key().orElseThrow());
    assertTrue(e.line().isEmpty());
    assertTrue(e.getMessage().contains("lab.toml: pulse." + key + ": is missing"), e.getMessage());
    ScenarioException rise =
        assertThrows(ScenarioException.class, () -> scenario("kind = \"pi\"\nfall = \"1 ns\""));
    assertEquals("pulse.rise", rise.key().orElseThrow());
  }

  @ParameterizedTest
  @CsvSource(
      delimiter = '|',
      textBlock =
          """
          1,0,0\\n1,0         | line 2 | three numbers
          1,0,0\\n# x\\n2,0,0  | line 3 | from 0 to 1
          1,0,0\\n-0.1,0,0    | line 2 | from 0 to 1
          1,0,0\\n1,nan,0     | line 2 | finite
          1,0,0\\n1,1 kHz,0   | line 2 | three numbers
          amplitude,Hz,rad   | line 1 | finite
          0,0,0\\n0,0,0       | amplitudes are 0 | above 0
          # nothing          | no entries | at least one
          """)
  void refusesBadSamplesWithFileAndLine(String data, String where, String allowed)
      throws IOException {
    Files.writeString(folder.resolve("own.csv"), data.replace("\\n", "\n"));
    ScenarioException e =
        assertThrows(
            ScenarioException.class,
            () ->
                scenario(
                    "kind = \"samples\"\nspacing = \"10 ns\"\nfile = \"own.csv\"\n"
                        + "goal = \"transfer\""));
    assertEquals("pulse.file", e.key().orElseThrow());
    assertEquals(header() + 3, e.line().orElseThrow());
    String message = e.getMessage();
    assertTrue(message.contains("own.csv"), message);
    assertTrue(message.contains(where) && message.contains(allowed), message);
  }

  @Test
  void refusesStirapOverOneStep() {
    String text =
        ScenarioTest.oneStep().replace("\"pi\"", "\"stirap\"\nwidth = \"2 us\"\ndelay = \"1 us\"");
    ScenarioException e =
        assertThrows(ScenarioException.class, () -> Scenario.parse(text, "one.toml"));
    assertTrue(
        e.getMessage().startsWith("one.toml:17: pulse.kind: given \"stirap\"; allowed: "),
        e.getMessage());
  }
}
