package org.toprung.budget.scenario;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.constraints.DoubleRange;
import net.jqwik.api.constraints.IntRange;
import net.jqwik.api.constraints.Scale;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;
import org.toprung.angular.Polarization;
import org.toprung.budget.Budget;
import org.toprung.budget.ReferenceScenario;
import org.toprung.budget.bench.BenchValue;
import org.toprung.budget.report.JsonReport;
import org.toprung.budget.report.ReportContent;
import org.toprung.budget.report.TextReport;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.atom.Sublevel;
import org.toprung.core.drive.Beam;
import org.toprung.core.drive.Drive;
import org.toprung.core.drive.Profile;
import org.toprung.core.quantity.ElectricField;
import org.toprung.core.quantity.Frequency;
import org.toprung.core.quantity.Intensity;
import org.toprung.core.quantity.Length;
import org.toprung.core.quantity.MagneticField;
import org.toprung.core.quantity.Power;
import org.toprung.core.quantity.Temperature;

class ScenarioTest {
  private static Scenario parse(String text) {
    return Scenario.parse(text, "some.toml");
  }

  @Test
  void readsEveryValueOfTheReference() {
    Scenario s = parse(ReferenceScenario.text());
    Drive drive = s.drive();
    assertEquals("Rubidium reference drive", s.title());
    assertEquals(Species.RUBIDIUM_87, drive.species());
    assertEquals(MagneticField.gauss(4), drive.field());
    assertEquals(Sublevel.hyperfine("5S1/2", 2, 2), drive.start());
    assertEquals(List.of(Level.parse("6P3/2")), drive.intermediates());
    assertEquals(Sublevel.fine("68S1/2", 0.5), drive.target());
    assertEquals(Frequency.gigahertz(1.2), drive.detuning(0));
    Beam first = drive.steps().get(0).beam();
    assertEquals(Power.milliwatts(2), first.power());
    assertEquals(Length.micrometres(20), first.waist());
    assertEquals(Polarization.SIGMA_PLUS, first.polarization());
    assertArrayEquals(new double[] {0, 0, 1}, first.direction());
    Beam second = drive.steps().get(1).beam();
    assertEquals(Power.milliwatts(150), second.power());
    assertEquals(Length.micrometres(25), second.waist());
    assertEquals(Polarization.SIGMA_MINUS, second.polarization());
    assertArrayEquals(new double[] {0, 0, -1}, second.direction());
    assertEquals(Math.PI, s.pulse().planAreaRadians());
    assertEquals(Frequency.hertz(0), s.pulse().offset());
    assertEquals(Temperature.microkelvin(10), s.bench().temperature().orElseThrow());
    assertEquals(
        List.of(Frequency.kilohertz(80), Frequency.kilohertz(80), Frequency.kilohertz(15)),
        s.bench().trapFrequencies().orElseThrow());
    assertEquals(Temperature.kelvin(300), s.bench().environment().orElseThrow());
    assertEquals(MagneticField.milligauss(2), s.bench().magneticNoise().orElseThrow());
    assertEquals(ElectricField.millivoltsPerCentimetre(5), s.bench().electricField().orElseThrow());
    assertEquals(
        List.of(Frequency.hertz(500), Frequency.hertz(500)), s.bench().linewidths().orElseThrow());
    assertEquals(
        List.of(Frequency.kilohertz(2), Frequency.kilohertz(2)), s.bench().drifts().orElseThrow());
    assertEquals(List.of(0.005, 0.005), s.bench().intensityNoise().orElseThrow());
  }

  /** A longer lifetime of the intermediate level of one's own scatters less. */
  @Test
  void laysAFileOfOwnValuesOverTheLibrary(@TempDir Path folder) throws Exception {
    Files.writeString(
        folder.resolve("own.csv"),
        "species,quantity,level,value,uncertainty,unit,source,memory,chosen_because\n"
            + "Rb,lifetime,6P3/2,236,3,ns,\"Twice the published one, for a test\",no,\n");
    String key = "species = \"Rb-87\"";
    Path file =
        Files.writeString(
            folder.resolve("s.toml"), ReferenceScenario.with(key, key + "\nvalues = \"own.csv\""));
    double own = Scenario.read(file).drive().meanScatteringPerSecond();
    double library = parse(ReferenceScenario.text()).drive().meanScatteringPerSecond();
    assertEquals(118.0 / 236, own / library, 1e-3);
    Files.writeString(file, ReferenceScenario.with(key, key + "\nvalues = \"missing.csv\""));
    ScenarioException e = assertThrows(ScenarioException.class, () -> Scenario.read(file));
    assertEquals("atom.values", e.key().orElseThrow());
    assertTrue(e.getMessage().contains("missing.csv"), e.getMessage());
  }

  @Test
  void readsAnIdleSublevelAndATrap() {
    Scenario s =
        parse(
            ReferenceScenario.with(
                "[pulse]",
                """
                [idle]
                F = 1
                mF = 0
                [trap]
                wavelength = "852 nm"
                power = "3 mW"
                waist = "1 um"
                polarization = "pi"
                direction = [1, 0, 0]
                [pulse]"""));
    assertEquals(Sublevel.hyperfine("5S1/2", 1, 0), s.drive().idle().orElseThrow().sublevel());
    Drive.TrapLight trap = s.drive().trap().orElseThrow();
    assertEquals(Length.nanometres(852).metres(), trap.wavelength().metres(), 1e-18);
    // red of the D lines: the ground level goes down, the nearly free electron up
    assertTrue(trap.startShift().hertz() < -1e6 && trap.targetShift().hertz() > 1e5);
    String text = TextReport.render(report(s));
    assertTrue(text.contains("light shift of idle"), text);
    assertTrue(text.contains("Trap beam, 3 mW at 852"), text);
    String json = JsonReport.render(report(s));
    assertTrue(json.contains("\"idle\"") && json.contains("\"trap\""), json);
  }

  private static ReportContent report(Scenario s) {
    Budget budget = s.budget();
    return new ReportContent(s.title(), budget, budget.check(10, 1));
  }

  static String oneStep() {
    return """
            [atom]
            species = "Cs-133"
            [field]
            magnetic = "5 G"
            [start]
            level = "6S1/2"
            F = 4
            mF = 4
            [[step]]
            to = "60P3/2"
            mJ = 1.5
            power = "60 mW"
            waist = "20 um"
            polarization = "sigma+"
            direction = [0, 0, 1]
            [pulse]
            kind = "pi"
            """;
  }

  @Test
  void readsOneStepAndThree() {
    Scenario one = parse(oneStep());
    Scenario quadrupole =
        parse(oneStep().replace("60P3/2", "60D5/2").replace("mJ", "multipole = \"E2\"\nmJ"));
    String json = JsonReport.render(report(quadrupole));
    assertTrue(json.contains("reduced_quadrupole_ea02"), json);
    assertTrue(TextReport.render(report(quadrupole)).contains("reduced quadrupole"));
    assertEquals(1, one.drive().steps().size());
    assertTrue(one.drive().intermediates().isEmpty());
    assertTrue(TextReport.render(report(one)).contains("60P3/2"));
    String middle =
        """
        [[step]]
        to = "6S1/2"
        detuning = "-2 GHz"
        power = "5 mW"
        waist = "80 um"
        polarization = "sigma-"
        direction = [0, 0, 1]
        """;
    String last = ReferenceScenario.with("68S1/2", "68P3/2").replace("mJ = 0.5", "mJ = 1.5");
    int second = last.indexOf("[[step]]", last.indexOf("[[step]]") + 1);
    Scenario three =
        parse(
            (last.substring(0, second) + middle + last.substring(second))
                .replace(
                    "polarization = \"sigma-\"\ndirection = [0, 0, -1]",
                    "polarization = \"sigma+\"\ndirection = [0, 0, -1]")
                .replaceAll("(?m)^(linewidth|drift|intensity_noise).*$", "")
                .replace("6P3/2", "5P3/2"));
    assertEquals(3, three.drive().steps().size());
    assertEquals(Frequency.gigahertz(-2), three.drive().detuning(1));
  }

  /** What is described in text gives the same drive as what is described in Java. */
  @Test
  void agreesWithTheSameDriveBuiltInJava() {
    Drive built =
        Drive.of(Species.RUBIDIUM_87)
            .from(Sublevel.hyperfine("5S1/2", 2, 2))
            .step(
                Level.parse("6P3/2"),
                Beam.gaussian(Power.milliwatts(2), Length.micrometres(20))
                    .polarized(Polarization.SIGMA_PLUS)
                    .along(0, 0, 1))
            .step(
                Sublevel.fine("68S1/2", 0.5),
                Beam.gaussian(Power.milliwatts(150), Length.micrometres(25))
                    .polarized(Polarization.SIGMA_MINUS)
                    .along(0, 0, -1))
            .detuned(Frequency.gigahertz(1.2))
            .in(MagneticField.gauss(4))
            .resolve();
    assertEquals(built.rabi(), parse(ReferenceScenario.text()).drive().rabi());
  }

  @Property(seed = "11", tries = 12)
  void readsBackWhatQuantitiesPrint(
      @ForAll @DoubleRange(min = 1e-6, max = 2) @Scale(9) double watts,
      @ForAll @DoubleRange(min = 1e-6, max = 1e-3) @Scale(12) double metres,
      @ForAll @DoubleRange(min = 1e8, max = 9e9) double detuning,
      @ForAll @DoubleRange(min = 0, max = 0.01) @Scale(9) double tesla,
      @ForAll @IntRange(min = 10, max = 120) int n) {
    String text =
        ReferenceScenario.text()
            .replace("\"2 mW\"", quoted(Power.ofWatts(watts)))
            .replace("\"20 um\"", quoted(Length.ofMetres(metres)))
            .replace("\"1.2 GHz\"", quoted(Frequency.ofHertz(detuning)))
            .replace("\"4 G\"", quoted(MagneticField.ofTesla(tesla)))
            .replace("\"68S1/2\"", "\"" + n + "S1/2\"");
    Drive drive = parse(text).drive();
    assertEquals(watts, drive.steps().get(0).beam().power().watts());
    assertEquals(metres, drive.steps().get(0).beam().waist().metres());
    assertEquals(detuning, drive.detuning(0).hertz());
    assertEquals(tesla, drive.field().tesla());
    assertEquals(n, drive.target().level().n());
  }

  private static String quoted(Object quantity) {
    return "\"" + quantity + "\"";
  }

  /** σ+ about z is the vector (x + iy)/√2, whichever length it is given with. */
  @ParameterizedTest
  @ValueSource(strings = {"[[1, 0], [0, 1], [0, 0]]", "[[0, 3], [-3, 0], 0]"})
  void takesPolarizationVectorsOfAnyLengthAndPhase(String vector) {
    Drive named = parse(ReferenceScenario.text()).drive();
    Drive given = parse(ReferenceScenario.with("\"sigma+\" ", vector + " ")).drive();
    assertEquals(named.rabi().hertz(), given.rabi().hertz(), 1e-9 * named.rabi().hertz());
  }

  @Test
  void takesRealPolarizationVectors() {
    Drive vector = parse(ReferenceScenario.with("\"sigma+\" ", "[2, 0, 0] ")).drive();
    Drive angle = parse(ReferenceScenario.with("\"sigma+\" ", "\"linear 0 deg\" ")).drive();
    assertEquals(angle.rabi().hertz(), vector.rabi().hertz(), 1e-9 * angle.rabi().hertz());
  }

  @Test
  void takesDirectionsOfAnyLength() {
    Scenario s = parse(ReferenceScenario.with("direction = [0, 0, 1]", "direction = [0, 0, 7.5]"));
    assertArrayEquals(new double[] {0, 0, 1}, s.drive().steps().get(0).beam().direction());
  }

  @Test
  void readsEllipticalBeamsWithTheirFocus() {
    String text =
        ReferenceScenario.with(
            "waist = \"20 um\"",
            "waist = [\"20 um\", \"30 um\"]\nwaist_axis = [0, 2, 0]\n"
                + "offset = [\"1 um\", \"-2 um\", \"0.1 mm\"]");
    Beam beam = parse(text).drive().steps().get(0).beam();
    assertEquals(
        new Profile.Elliptical(
            Power.milliwatts(2), Length.micrometres(20), Length.micrometres(30), 0, 1, 0),
        beam.profile());
    assertArrayEquals(new double[] {1e-6, -2e-6, 1e-4}, beam.focusMetres());
  }

  @Test
  void readsAnIntensityInsteadOfPowerAndWaist() {
    String text =
        ReferenceScenario.with("power = \"2 mW\"", "intensity = \"300 W/cm2\"")
            .replace("waist = \"20 um\"", "");
    assertEquals(
        new Profile.FlatTop(Intensity.wattsPerSquareCentimetre(300)),
        parse(text).drive().steps().get(0).beam().profile());
  }

  @Test
  void readsTheImpurityOfAPolarization() {
    String key = "polarization = \"sigma+\"";
    Beam beam =
        parse(ReferenceScenario.with(key, "impurity = 0.01\nimpurity_phase_deg = -90\n" + key))
            .drive()
            .steps()
            .get(0)
            .beam();
    assertEquals(0.01, beam.impurity());
    assertEquals(-90, beam.impurityPhaseDegrees());
    assertEquals(Polarization.SIGMA_PLUS, beam.polarization());
    Beam plain =
        parse(ReferenceScenario.with(key, "impurity = 0.02\n" + key)).drive().steps().get(0).beam();
    assertEquals(0.02, plain.impurity());
    assertEquals(0, plain.impurityPhaseDegrees());
  }

  @Test
  void readsTheElectricField() {
    String key = "magnetic = \"4 G\"";
    String text =
        ReferenceScenario.with(key, key + "\nelectric = [\"1 V/m\", \"0 V/m\", \"20 mV/cm\"]");
    assertArrayEquals(new double[] {1, 0, 2}, parse(text).drive().electricFieldVoltsPerMetre());
    assertArrayEquals(
        new double[3], parse(ReferenceScenario.text()).drive().electricFieldVoltsPerMetre());
  }

  /** The commented keys of the example are read as they stand there. */
  @Test
  void readsTheOptionalKeysOfTheExample() throws Exception {
    String text =
        Files.readString(Path.of("examples", "rubidium-two-photon.toml"))
            .replaceFirst("waist = \"25 um\"", "")
            .replaceAll("(?m)^# (?!intensity|values|.*(csv|txt))(?=[a-zF]+[_a-zF]* = |\\[)", "");
    Scenario scenario = parse(text);
    Drive drive = scenario.drive();
    Beam beam = drive.steps().get(0).beam();
    assertEquals(2, beam.profile().waists().size());
    assertEquals(0.01, beam.impurity());
    assertEquals(90, beam.impurityPhaseDegrees());
    assertArrayEquals(new double[] {1e-6, 0, 0}, beam.focusMetres());
    assertArrayEquals(new double[] {0, 0, 10}, drive.electricFieldVoltsPerMetre());
    assertTrue(text.contains("# intensity = \"2 W/cm2\""));
    assertEquals(Sublevel.hyperfine("5S1/2", 1, 0), drive.idle().orElseThrow().sublevel());
    assertEquals(Power.milliwatts(3), drive.trap().orElseThrow().beam().power());
    assertEquals(
        "pi, rise 20 ns, fall 20 ns, shaping step 0, holding the frequency",
        scenario.pulse().toString());
    assertTrue(scenario.bench().movesDuringPulse());
    for (BenchValue value : BenchValue.values()) {
      assertEquals(!value.key().endsWith("density"), scenario.bench().isKnown(value), value.key());
    }
  }

  /** Each kind is listed with its keys, in words that can be copied. */
  @Test
  void readsTheOtherPulsesOfTheExample(@TempDir Path folder) throws Exception {
    String text = Files.readString(Path.of("examples", "rubidium-two-photon.toml"));
    Files.writeString(folder.resolve("own-pulse.csv"), "0.5, 2e3, 0\n");
    List<String> kinds =
        text.lines().filter(l -> l.startsWith("#   kind = ")).map(l -> l.substring(4)).toList();
    assertEquals(11, kinds.size());
    for (String kind : kinds) {
      String keys = kind.replaceAll(" \\(.*", "").replaceFirst("\" +", "\"\n").replace(", ", "\n");
      Path file =
          Files.writeString(
              folder.resolve("s.toml"), text.replaceFirst("(?m)^kind = \"pi\"", keys + " "));
      String name = kind.split("\"")[1];
      String said = Scenario.read(file).pulse().name().toLowerCase(Locale.ROOT);
      assertTrue(said.contains(name), said);
    }
  }

  @Test
  void readsTheOffsetOfThePulse() {
    Scenario s =
        parse(ReferenceScenario.with("kind = \"pi\"", "kind = \"pi\"\noffset = \"-10 kHz\""));
    assertEquals(Frequency.kilohertz(-10), s.pulse().offset());
  }

  @Test
  void knowsNothingOfABenchThatIsNotDescribed() {
    String text = ReferenceScenario.text();
    Scenario s = parse(text.substring(0, text.indexOf("[bench]")));
    assertTrue(s.bench().temperature().isEmpty());
    assertTrue(s.bench().trapFrequencies().isEmpty());
    assertTrue(s.bench().environment().isEmpty());
    assertTrue(s.bench().magneticNoise().isEmpty());
    assertTrue(s.bench().electricField().isEmpty());
    assertTrue(s.bench().linewidths().isEmpty());
    assertTrue(s.bench().drifts().isEmpty());
    assertTrue(s.bench().intensityNoise().isEmpty());
  }

  @ParameterizedTest
  @ValueSource(
      strings = {
        "temperature",
        "trap_frequency",
        "environment_temperature",
        "magnetic_noise",
        "electric_field",
        "linewidth",
        "drift",
        "intensity_noise"
      })
  void needsNoSingleValueOfTheBench(String key) {
    String text =
        ReferenceScenario.text()
            .lines()
            .filter(line -> !line.startsWith(key + " "))
            .reduce("", (a, b) -> a + b + "\n");
    assertTrue(text.length() < ReferenceScenario.text().length());
    assertEquals("Rubidium reference drive", parse(text).title());
  }

  @Test
  void isCalledLikeItsFileWithoutATitle() {
    String text = ReferenceScenario.with("title = \"Rubidium reference drive\"", "");
    assertEquals("monday", Scenario.parse(text, "/bench/monday.toml").title());
  }

  @Test
  void saysInTheExceptionWhichFileAndKeyAreToBlame() {
    ScenarioException e =
        assertThrows(
            ScenarioException.class,
            () -> parse(ReferenceScenario.with("waist = \"25 um\"", "waist = \"25 ly\"")));
    assertEquals("some.toml", e.file());
    assertEquals(Optional.of("step[2].waist"), e.key());
    long line =
        ReferenceScenario.text().lines().takeWhile(l -> !l.startsWith("waist = \"25")).count() + 1;
    assertEquals(line, e.line().orElseThrow());
    assertTrue(e.getMessage().startsWith("some.toml:" + line + ": step[2].waist "), e.getMessage());
  }

  @Test
  void blamesNoKeyWhereTheFileIsNotToml() {
    ScenarioException e =
        assertThrows(ScenarioException.class, () -> parse("title = \"a\"\nnot toml\n"));
    assertEquals(Optional.empty(), e.key());
    assertEquals(2, e.line().orElseThrow());
    assertTrue(e.getMessage().startsWith("some.toml:2: "), e.getMessage());
  }

  @Test
  void takesFilesThatBeginWithAByteOrderMark(@TempDir Path folder) throws Exception {
    Path file = Files.writeString(folder.resolve("s.toml"), "\uFEFF" + ReferenceScenario.text());
    assertEquals("Rubidium reference drive", Scenario.read(file).title());
  }

  @ParameterizedTest
  @ValueSource(
      strings = {"rubidium-two-photon.toml", "caesium-two-photon.toml", "caesium-blackman.toml"})
  void readsTheShippedExamples(String name) {
    Scenario s = Scenario.read(Path.of("examples", name));
    assertTrue(s.drive().rabi().hertz() > 1e5, String.format(Locale.ROOT, "%s", s.drive().rabi()));
    assertEquals(List.of(), s.drive().warnings());
    assertTrue(s.bench().temperature().isPresent());
  }
}
