package org.toprung.budget;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.toprung.angular.Polarization.SIGMA_MINUS;
import static org.toprung.angular.Polarization.SIGMA_PLUS;
import static org.toprung.core.quantity.Frequency.gigahertz;
import static org.toprung.core.quantity.Length.micrometres;
import static org.toprung.core.quantity.MagneticField.gauss;
import static org.toprung.core.quantity.Power.milliwatts;
import static org.toprung.core.quantity.Temperature.kelvin;
import static org.toprung.core.quantity.Temperature.microkelvin;

import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.toprung.budget.bench.Bench;
import org.toprung.budget.pulse.Pulse;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.atom.Sublevel;
import org.toprung.core.drive.Beam;
import org.toprung.core.drive.Drive;

/** The README's code is this test's code, so it compiles and runs. */
class ReadmeTest {
  private static final Path README = Path.of("..", "README.md");
  private static final Path SELF =
      Path.of("src", "test", "java", "org", "toprung", "budget", "ReadmeTest.java");

  @Test
  void runsTheSnippet() {
    // snippet
    Drive drive =
        Drive.of(Species.RUBIDIUM_87)
            .from(Sublevel.hyperfine("5S1/2", 2, 2))
            .step(
                Level.parse("6P3/2"),
                Beam.gaussian(milliwatts(2), micrometres(20)).polarized(SIGMA_PLUS).along(0, 0, 1))
            .step(
                Sublevel.fine("68S1/2", 0.5),
                Beam.gaussian(milliwatts(150), micrometres(25))
                    .polarized(SIGMA_MINUS)
                    .along(0, 0, -1))
            .detuned(gigahertz(1.2))
            .in(gauss(4))
            .resolve();
    Bench bench = Bench.unknown().withTemperature(microkelvin(10)).withEnvironment(kelvin(300));
    Budget budget = Budget.of(drive, Pulse.pi()).on(bench).compose();
    Check check = budget.check(2000, 1);
    // end of snippet
    assertEquals(3.02e6, drive.rabi().hertz(), 0.06e6);
    assertTrue(budget.plan().duration().seconds() < 1e-6);
    assertTrue(check.agrees());
  }

  @Test
  void isTheSnippetOfTheReadme() throws IOException {
    String readme = Files.readString(README, StandardCharsets.UTF_8);
    int begin = readme.indexOf("```java\n") + "```java\n".length();
    String shown = readme.substring(begin, readme.indexOf("```", begin));
    String self = Files.readString(SELF, StandardCharsets.UTF_8);
    int from = self.indexOf("// snippet\n") + "// snippet\n".length();
    String run = self.substring(from, self.indexOf("// end of snippet"));
    assertEquals(run.replaceAll("\\s+", ""), shown.replaceAll("\\s+", ""));
  }

  /** The first two fenced blocks are the two commands, each one line. */
  @Test
  void showsTheTwoCommandsFirst() throws IOException {
    List<List<String>> blocks = new ArrayList<>();
    List<String> open = null;
    for (String line : Files.readAllLines(README, StandardCharsets.UTF_8)) {
      if (line.startsWith("```")) {
        if (open == null) {
          open = new ArrayList<>();
        } else {
          blocks.add(open);
          open = null;
        }
      } else if (open != null) {
        open.add(line);
      }
    }
    assertEquals(1, blocks.get(0).size());
    assertTrue(blocks.get(0).get(0).contains("java -jar"), blocks.get(0).get(0));
    assertEquals(List.of("mvn verify"), blocks.get(1));
  }
}
