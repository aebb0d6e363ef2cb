package org.toprung.budget.report;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.toprung.core.quantity.Frequency.gigahertz;
import static org.toprung.core.quantity.Length.micrometres;
import static org.toprung.core.quantity.MagneticField.gauss;
import static org.toprung.core.quantity.Power.milliwatts;

import java.util.regex.Pattern;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.constraints.DoubleRange;
import net.jqwik.api.constraints.Scale;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.function.Executable;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.toprung.angular.Polarization;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.atom.Sublevel;
import org.toprung.core.drive.Beam;
import org.toprung.core.drive.Drive;
import org.toprung.core.drive.DriveKernel;
import org.toprung.core.drive.ShotPlan;

class DriveDocumentTest {
  private static final DriveKernel KERNEL = drive(1.2, 25, 70).kernel();
  private static final double[] WATTS = {0.002, 0.15};
  private static final double[] FACTORS = {1, 0.98};

  private static Drive drive(double gigahertz, double lower, double upper) {
    return Drive.of(Species.RUBIDIUM_87)
        .from(Sublevel.hyperfine("5S1/2", 2, 1))
        .step(
            Level.parse("6P3/2"),
            Beam.gaussian(milliwatts(2), micrometres(20))
                .polarized(Polarization.linearDegrees(lower))
                .along(1, 0, 0))
        .step(
            Sublevel.fine("68S1/2", 0.5),
            Beam.gaussian(milliwatts(150), micrometres(25))
                .polarized(Polarization.linearDegrees(upper))
                .along(-1, 0, 0))
        .detuned(gigahertz(gigahertz))
        .in(gauss(4))
        .resolve();
  }

  /** Exact: a kernel comes back with the same numbers, and answers the same to the last bit. */
  @Property(tries = 40, seed = "41")
  void givesKernelsBackExactly(
      @ForAll @DoubleRange(min = 0.5, max = 60) double gigahertz,
      @ForAll @DoubleRange(min = 5, max = 85) double lower,
      @ForAll @DoubleRange(min = 5, max = 85) double upper,
      @ForAll @DoubleRange(min = 0.1, max = 10) double ratio) {
    DriveKernel kernel =
        drive(gigahertz, lower, upper).kernel().withIntensitiesScaled(ratio, 1 / ratio);
    DriveKernel back = DriveDocument.parseKernel(DriveDocument.render(kernel));
    assertEquals(kernel.data(), back.data());
    double detuning = gigahertz * 1e9 + 1e7;
    assertEquals(
        ShotPlan.of(kernel, WATTS, detuning, FACTORS, 3),
        ShotPlan.of(back, WATTS, detuning, FACTORS, 3));
  }

  @Property(tries = 60, seed = "42")
  void givesPlansBackExactly(
      @ForAll @DoubleRange(min = 1e-6, max = 1) @Scale(9) double first,
      @ForAll @DoubleRange(min = 1e-6, max = 1) @Scale(9) double second,
      @ForAll @DoubleRange(min = 0.1, max = 1) double factor,
      @ForAll @DoubleRange(min = 0.1, max = 10) double area) {
    ShotPlan plan =
        ShotPlan.of(KERNEL, new double[] {first, second}, 1.3e9, new double[] {factor, 1}, area);
    assertEquals(plan, DriveDocument.parsePlan(DriveDocument.render(plan)));
  }

  @Test
  void givesSingleStepsBack() {
    DriveKernel kernel =
        Drive.of(Species.CAESIUM_133)
            .from(Sublevel.hyperfine("6S1/2", 4, 4))
            .step(
                Sublevel.fine("60P3/2", 1.5),
                Beam.gaussian(milliwatts(50), micrometres(15))
                    .polarized(Polarization.SIGMA_PLUS)
                    .along(0, 0, 1))
            .in(gauss(2))
            .resolve()
            .kernel();
    assertEquals(kernel.data(), DriveDocument.parseKernel(DriveDocument.render(kernel)).data());
  }

  @Test
  void isSmallAndSaysWhatItIs() {
    String plan = DriveDocument.render(plan());
    assertTrue(plan.startsWith("{\"format\":\"toprung-plan\",\"version\":1,"), plan);
    assertTrue(plan.length() < 1000, () -> "characters: " + plan.length());
    String kernel = DriveDocument.render(KERNEL);
    assertTrue(kernel.startsWith("{\"format\":\"toprung-kernel\",\"version\":1,"), kernel);
    assertTrue(kernel.length() < 12_000, () -> "characters: " + kernel.length());
  }

  private static ShotPlan plan() {
    return ShotPlan.of(KERNEL, WATTS, 1.2e9, FACTORS, Math.PI);
  }

  @ParameterizedTest(name = "{0} -> {1}")
  @CsvSource(
      delimiter = '|',
      quoteCharacter = '`',
      value = {
        "\"version\":1          | \"version\":2       | version: given 2; allowed: 1",
        "\"version\":1          | \"version\":\"1\"   | version: given \"1\"; allowed: an integer",
        "\"version\":1          | \"version\":1.5     | version: given 1.5; allowed: an integer",
        "\"version\":1          | \"odd\":1           | missing key version",
        "toprung-plan           | toprung-kernel      | format: given toprung-kernel; allowed: toprung-plan",
        "\"detuning_Hz\":       | \"detune\":         | missing key detuning_Hz",
        "\"version\":1          | \"version\":1,\"x\":1 | unknown key x",
        "\"version\":1          | \"version\":1,\"version\":1 | each key once",
        "\"detuning_Hz\":1.2E9  | \"detuning_Hz\":\"a\" | detuning_Hz: given \"a\"; allowed: a finite number",
        "\"detuning_Hz\":1.2E9  | \"detuning_Hz\":NaN | line 1",
        "\"detuning_Hz\":1.2E9  | \"detuning_Hz\":1e999 | detuning_Hz: given",
        "\"power_W\":[0.002     | \"power_W\":[true   | power_W[0]: given true; allowed: a finite number",
        "\"power_W\":[0.002,0.15] | \"power_W\":0.002 | power_W: given 0.002; allowed: an array",
        "\"power_W\":[0.002,0.15] | \"power_W\":[0.002] | one power and one field factor for each beam",
        "\"area_rad\":3         | \"area_rad\":-3     | must be positive",
      })
  void refusesPlansThatAreNone(String part, String instead, String message) {
    String good = DriveDocument.render(plan());
    assertTrue(good.contains(part), part);
    refused(message, () -> DriveDocument.parsePlan(good.replace(part, instead)));
  }

  @ParameterizedTest(name = "{0} -> {1}")
  @CsvSource(
      delimiter = '|',
      quoteCharacter = '`',
      value = {
        "\"version\":1      | \"version\":0       | version: given 0; allowed: 1",
        "\"kept\":false     | \"kept\":0          | partners[0].kept: given 0; allowed: true or false",
        "\"targets\":4      | \"targets\":1       | must be from 0 to 0",
        "\"power_W\":0.002  | \"power_W\":0       | power in W must be positive",
        "\"closure\":false  | \"closure\":false,\"y\":1 | unknown key steps[0].start_shift.y",
        "\"steps\":[        | \"steps\":[7,       | steps[0].: given 7; allowed: a JSON object",
      })
  void refusesKernelsThatAreNone(String part, String instead, String message) {
    String good = DriveDocument.render(KERNEL);
    assertTrue(good.contains(part), part);
    refused(message, () -> DriveDocument.parseKernel(good.replaceFirst(quoted(part), instead)));
  }

  private static String quoted(String text) {
    return Pattern.quote(text);
  }

  @Test
  void refusesWhatIsNoJsonObject() {
    refused("the document: given [1]", () -> DriveDocument.parsePlan("[1]"));
    refused("valid JSON", () -> DriveDocument.parsePlan("{"));
    refused("valid JSON", () -> DriveDocument.parsePlan(DriveDocument.render(plan()) + "}"));
    refused("given", () -> DriveDocument.parsePlan(""));
  }

  private static void refused(String part, Executable call) {
    String message = assertThrows(IllegalArgumentException.class, call).getMessage();
    assertTrue(message.contains(part), message);
  }
}
