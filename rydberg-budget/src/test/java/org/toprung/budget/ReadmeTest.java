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
import java.util.concurrent.CompletableFuture;
import org.junit.jupiter.api.Test;
import org.toprung.budget.bench.Bench;
import org.toprung.budget.bench.BenchValue;
import org.toprung.budget.bench.NoiseDensity;
import org.toprung.budget.pulse.Pulse;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.atom.Sublevel;
import org.toprung.core.drive.Beam;
import org.toprung.core.drive.Drive;
import org.toprung.core.drive.DriveKernel;
import org.toprung.core.drive.KernelResult;

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
    // snippet
    Pulse smooth = Pulse.blackman(Math.PI).shapingStep(0);
    NoiseDensity servo = NoiseDensity.parse("1e4 2e3\n5e5 4e4\n5e6 1e3", "laser 1, Hz and Hz^2/Hz");
    Bench noisy =
        bench
            .withFrequencyNoiseDensity(0, servo)
            .withIntensityNoise(0.005, 0.005)
            .knownTo(BenchValue.INTENSITY_NOISE, 0, 0.3);
    Budget after = Budget.of(drive, smooth).on(noisy).compose();
    List<Sensitivity> first = after.sensitivities();
    BudgetComparison moved = BudgetComparison.between(budget, after);
    CompletableFuture<Check> later = after.checking().shots(500).start();
    // end of snippet
    // snippet
    DriveKernel kernel = drive.kernel();
    KernelResult result = kernel.newResult();
    kernel.evaluate(new double[] {0.0021, 0.149}, 1.2e9, new double[] {1, 1}, result);
    double pulseSeconds = result.durationSeconds(Math.PI);
    // end of snippet
    assertEquals(0.5 / result.rabiHertz(), pulseSeconds, 1e-12 * pulseSeconds);
    assertEquals(3.02e6, drive.rabi().hertz(), 0.06e6);
    assertTrue(budget.plan().duration().seconds() < 1e-6);
    assertTrue(check.agrees());
    assertEquals(
        first.get(0).best(), first.stream().mapToDouble(Sensitivity::best).max().orElse(0));
    assertEquals(after.total(), moved.after());
    assertTrue(after.benchUncertainty() > 0);
    assertTrue(later.join().agrees());
  }

  @Test
  void holdsTheSnippetsOfTheReadme() throws IOException {
    List<String> shown = parts(README, "```java\n", "```");
    List<String> run = parts(SELF, "    // snippet\n", "    // end of snippet");
    assertEquals(3, shown.size());
    assertEquals(shown, run);
  }

  /** What stands between two marks, without white space. */
  private static List<String> parts(Path file, String begin, String end) throws IOException {
    String text = Files.readString(file, StandardCharsets.UTF_8);
    List<String> parts = new ArrayList<>();
    int from = text.indexOf(begin);
    while (from >= 0) {
      int start = from + begin.length();
      int stop = text.indexOf(end, start);
      parts.add(text.substring(start, stop).replaceAll("\\s+", ""));
      from = text.indexOf(begin, stop);
    }
    return parts;
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
