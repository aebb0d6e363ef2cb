package org.toprung.core.drive;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.toprung.angular.Polarization.SIGMA_MINUS;
import static org.toprung.angular.Polarization.SIGMA_PLUS;
import static org.toprung.core.quantity.Frequency.gigahertz;
import static org.toprung.core.quantity.Length.micrometres;
import static org.toprung.core.quantity.MagneticField.gauss;
import static org.toprung.core.quantity.Power.milliwatts;

import java.util.Arrays;
import java.util.List;
import java.util.stream.IntStream;
import net.jqwik.api.Arbitraries;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.EdgeCasesMode;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import net.jqwik.api.constraints.DoubleRange;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.function.Executable;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.toprung.angular.Polarization;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.atom.Sublevel;
import org.toprung.core.quantity.Frequency;
import org.toprung.core.quantity.Intensity;
import org.toprung.core.quantity.Length;
import org.toprung.core.quantity.Power;

class DriveKernelTest {
  private static final double[] AT_FOCUS = {1, 1};

  /** Two-step drives that differ in everything a kernel must hold on to. */
  private enum Scheme {
    STRETCHED(Species.RUBIDIUM_87, 2, 2, "6P3/2", "68S1/2", 0.5, 1.2),
    EVERY_SUBLEVEL(Species.RUBIDIUM_87, 2, 0, "6P3/2", "70S1/2", 0.5, -2.5),
    PARTNER_ELIMINATED(Species.RUBIDIUM_87, 1, 1, "5P3/2", "60D3/2", 1.5, 40),
    PARTNER_KEPT(Species.RUBIDIUM_87, 2, 1, "6P1/2", "50S1/2", -0.5, 400),
    CAESIUM(Species.CAESIUM_133, 4, 3, "7P1/2", "60D3/2", 0.5, -0.9),
    BELOW_BOTH(Species.RUBIDIUM_87, 2, 1, "5P1/2", "80S1/2", 0.5, -900);

    private final Species species;
    private final Sublevel start;
    private final Level middle;
    private final Sublevel target;
    private final double gigahertz;

    Scheme(
        Species species,
        double f,
        double m,
        String middle,
        String target,
        double mJ,
        double gigahertz) {
      this.species = species;
      this.start = Sublevel.hyperfine(species.groundLevel(), f, m);
      this.middle = Level.parse(middle);
      this.target = Sublevel.fine(target, mJ);
      this.gigahertz = gigahertz;
    }

    Drive at(double[] watts, double hertz) {
      boolean stretched = this == STRETCHED;
      Beam lower = Beam.gaussian(Power.ofWatts(watts[0]), micrometres(20));
      Beam upper = Beam.gaussian(Power.ofWatts(watts[1]), micrometres(25));
      return Drive.of(species)
          .from(start)
          .step(
              middle,
              stretched
                  ? lower.polarized(SIGMA_PLUS).along(0, 0, 1)
                  : lower.polarized(Polarization.linearDegrees(25)).along(1, 0, 0.2))
          .step(
              target,
              stretched
                  ? upper.polarized(SIGMA_MINUS).along(0, 0, -1)
                  : upper.polarized(Polarization.ellipticalDegrees(70, 20)).along(-0.5, 0.6, 0.3))
          .detuned(Frequency.ofHertz(hertz))
          .in(gauss(4))
          .resolve();
    }

    Drive nominal() {
      return at(new double[] {0.002, 0.15}, gigahertz * 1e9);
    }
  }

  @Provide
  Arbitrary<Scheme> schemes() {
    return Arbitraries.of(Scheme.values());
  }

  /**
   * Exact: the kernel gives what resolving the drive anew gives, to 10⁻⁹ of each value, or of the
   * parts of a shift where those cancel. The detuning moves by up to a third, which for the larger
   * ones is more than a hundred gigahertz.
   */
  @Property(tries = 350, seed = "11", edgeCases = EdgeCasesMode.MIXIN)
  void equalsResolvingAnew(
      @ForAll("schemes") Scheme scheme,
      @ForAll @DoubleRange(min = 0.05, max = 20) double first,
      @ForAll @DoubleRange(min = 0.05, max = 20) double second,
      @ForAll @DoubleRange(min = 0.7, max = 1.3) double detuning,
      @ForAll @DoubleRange(min = 0.2, max = 1) double factor1,
      @ForAll @DoubleRange(min = 0.2, max = 1) double factor2) {
    DriveKernel kernel = scheme.nominal().kernel();
    double hertz = detuning * scheme.gigahertz * 1e9;
    double[] watts = {0.002 * first, 0.15 * second};
    KernelResult result = kernel.newResult();
    kernel.evaluate(watts, hertz, new double[] {factor1, factor2}, result);
    Drive anew =
        scheme.at(new double[] {watts[0] * factor1 * factor1, watts[1] * factor2 * factor2}, hertz);
    assertSame(anew, result);
    DriveKernel again = anew.kernel();
    KernelResult there = again.newResult();
    again.evaluate(new double[] {again.powerWatts(0), again.powerWatts(1)}, hertz, AT_FOCUS, there);
    assertSame(anew, there);
  }

  private static void assertSame(Drive anew, KernelResult result) {
    assertClose(anew.rabi().hertz(), result.rabiHertz(), 0);
    double start = 0;
    double target = 0;
    for (int k = 0; k < anew.steps().size(); k++) {
      start += Math.abs(anew.startLightShift(k).hertz());
      target += Math.abs(anew.targetLightShift(k).hertz());
    }
    assertClose(anew.startLightShift().hertz(), result.startLightShiftHertz(), start);
    assertClose(anew.targetLightShift().hertz(), result.targetLightShiftHertz(), target);
    assertClose(anew.meanScatteringPerSecond(), result.scatteringPerSecond(), 0);
    assertEquals(
        result.targetLightShiftHertz() - result.startLightShiftHertz(),
        result.frequencyOffsetHertz(),
        0);
  }

  private static void assertClose(double expected, double actual, double scale) {
    assertEquals(expected, actual, 1e-9 * Math.max(scale, Math.abs(expected)));
  }

  /** Every scheme of the property is what its name says. */
  @Test
  void coversKeptAndEliminatedPartners() {
    assertTrue(partner(Scheme.PARTNER_KEPT).kept());
    assertTrue(partner(Scheme.BELOW_BOTH).kept());
    assertTrue(!partner(Scheme.PARTNER_ELIMINATED).kept());
    assertTrue(Scheme.PARTNER_ELIMINATED.nominal().kernel().data().paths().size() > 1);
    assertTrue(Scheme.EVERY_SUBLEVEL.nominal().kernel().data().targets() > 1);
    assertEquals(1, Scheme.STRETCHED.nominal().kernel().data().intermediates().size());
  }

  private static KernelData.Partner partner(Scheme scheme) {
    return scheme.nominal().kernel().data().partners().get(0);
  }

  /**
   * Published: one-photon Rabi frequencies of 237 and 303 MHz at a detuning of 7.8 GHz give 4.6 MHz
   * (Evered et al., Nature 622, 268 (2023)); 60 and 36 MHz at 560 MHz give 1.9 MHz (two-photon
   * arithmetic Ω1Ω2/2Δ). The powers that make those Rabi frequencies are found from the steps.
   */
  @ParameterizedTest
  @CsvSource({"237, 303, 7.8, 4.6, 0.05", "60, 36, 0.56, 1.9, 0.05"})
  void hasPublishedTwoPhotonRabiFrequencies(
      double first, double second, double gigahertz, double expected, double last) {
    Drive drive = Scheme.STRETCHED.at(new double[] {0.002, 0.15}, gigahertz * 1e9);
    DriveKernel kernel = drive.kernel();
    // 6P3/2 F=3 lies 87 MHz above the centre of gravity (from memory): the published detunings are
    // from that level
    double away = -kernel.data().intermediates().get(0).energyHertz();
    double detuning = gigahertz * 1e9 + (gigahertz * 1e9 - away);
    double[] watts = {
      kernel.powerWatts(0) * Math.pow(first * 1e6 / drive.steps().get(0).rabi().hertz(), 2),
      kernel.powerWatts(1) * Math.pow(second * 1e6 / drive.steps().get(1).rabi().hertz(), 2)
    };
    KernelResult result = kernel.newResult();
    kernel.evaluate(watts, detuning, AT_FOCUS, result);
    assertEquals(expected, result.rabiHertz() * 1e-6, last);
    double moved =
        kernel.startFarShiftHertz(0, watts[0], detuning)
            + kernel.startFarShiftHertz(1, watts[1], detuning);
    double closed = first * second / (2 * (1e3 * gigahertz + 1e-6 * moved));
    assertEquals(closed, result.rabiHertz() * 1e-6, 1e-5 * closed);
  }

  /** Closed form: τ = 1/2Ω for a π pulse, and scattering per pulse is rate times length. */
  @Test
  void plansThePulseOfSecondOrder() {
    Drive drive = Scheme.STRETCHED.nominal();
    DriveKernel kernel = drive.kernel();
    KernelResult result = kernel.newResult();
    kernel.evaluate(new double[] {0.002, 0.15}, 1.2e9, AT_FOCUS, result);
    assertEquals(1 / (2 * drive.rabi().hertz()), result.durationSeconds(Math.PI), 1e-15);
    PulsePlan plan = drive.plan(Math.PI);
    double admixture = drive.admixture() * drive.admixture();
    assertEquals(
        plan.duration().seconds(),
        result.durationSeconds(Math.PI),
        4 * admixture * plan.duration().seconds());
    double shifts =
        Math.abs(result.startLightShiftHertz()) + Math.abs(result.targetLightShiftHertz());
    assertEquals(
        plan.frequencyOffset().hertz(), result.frequencyOffsetHertz(), 4 * admixture * shifts);
    assertEquals(
        drive.meanScatteringPerSecond() / (2 * drive.rabi().hertz()),
        result.scatteringPerPulse(Math.PI),
        1e-12);
  }

  /** Ultraviolet ground → nP: no intermediate sublevel, far shifts only. */
  @Property(tries = 10, seed = "12")
  void holdsForASingleStep(@ForAll @DoubleRange(min = 0.01, max = 100) double factor) {
    Drive nominal = singleStep(0.05);
    DriveKernel kernel = nominal.kernel();
    KernelResult result = kernel.newResult();
    kernel.evaluate(new double[] {0.05 * factor}, 0, new double[] {0.9}, result);
    assertSame(singleStep(0.05 * factor * 0.81), result);
    assertEquals(0, result.scatteringPerSecond());
  }

  private static Drive singleStep(double watts) {
    return Drive.of(Species.CAESIUM_133)
        .from(Sublevel.hyperfine("6S1/2", 4, 4))
        .step(
            Sublevel.fine("60P3/2", 1.5),
            Beam.gaussian(Power.ofWatts(watts), micrometres(15))
                .polarized(SIGMA_PLUS)
                .along(0, 0, 1))
        .in(gauss(2))
        .resolve();
  }

  @Test
  void givesTheSameInABatch() {
    DriveKernel kernel = Scheme.EVERY_SUBLEVEL.nominal().kernel();
    int points = 50;
    double[] watts = new double[2 * points];
    double[] factors = new double[2 * points];
    double[] detunings = new double[points];
    for (int p = 0; p < points; p++) {
      watts[2 * p] = 0.001 + 1e-4 * p;
      watts[2 * p + 1] = 0.2 - 1e-3 * p;
      factors[2 * p] = 1 - 0.01 * p;
      factors[2 * p + 1] = 0.5 + 0.01 * p;
      detunings[p] = kernel.detuningHertz() + 1e6 * p;
    }
    KernelTable table = kernel.newTable(points);
    kernel.evaluate(watts, detunings, factors, table);
    assertEquals(points, table.size());
    KernelResult result = kernel.newResult();
    for (int p = 0; p < points; p++) {
      kernel.evaluate(
          Arrays.copyOfRange(watts, 2 * p, 2 * p + 2),
          detunings[p],
          Arrays.copyOfRange(factors, 2 * p, 2 * p + 2),
          result);
      assertEquals(result.rabiHertz(), table.rabiHertz(p), 0);
      assertEquals(result.startLightShiftHertz(), table.startLightShiftHertz(p), 0);
      assertEquals(result.targetLightShiftHertz(), table.targetLightShiftHertz(p), 0);
      assertEquals(result.scatteringPerSecond(), table.scatteringPerSecond(p), 0);
      assertEquals(result.frequencyOffsetHertz(), table.frequencyOffsetHertz(p), 0);
      assertEquals(result.durationSeconds(Math.PI), table.piPulseSeconds(p), 1e-20);
    }
    assertThrows(IndexOutOfBoundsException.class, () -> table.rabiHertz(points));
  }

  /** Many threads over one kernel give the serial answer. */
  @Test
  void servesManyThreadsAtOnce() {
    DriveKernel kernel = Scheme.EVERY_SUBLEVEL.nominal().kernel();
    double[] serial = IntStream.range(0, 2000).mapToDouble(i -> rabi(kernel, i)).toArray();
    double[] parallel =
        IntStream.range(0, 2000).parallel().mapToDouble(i -> rabi(kernel, i)).toArray();
    assertTrue(Arrays.equals(serial, parallel));
  }

  private static double rabi(DriveKernel kernel, int i) {
    KernelResult result = kernel.newResult();
    kernel.evaluate(new double[] {1e-3 + 1e-6 * i, 0.1}, -2.5e9 - 1e5 * i, AT_FOCUS, result);
    return result.rabiHertz();
  }

  /** Exact: a beam of other intensity is one of other power. */
  @Test
  void canExpectOtherIntensities() {
    DriveKernel kernel = Scheme.STRETCHED.nominal().kernel();
    KernelResult before = kernel.newResult();
    double[] watts = {0.002, 0.15};
    kernel.evaluate(watts, 1.2e9, AT_FOCUS, before);
    KernelResult after = kernel.newResult();
    kernel.withIntensitiesScaled(0.9, 1.2).evaluate(watts, 1.2e9, AT_FOCUS, after);
    kernel.evaluate(new double[] {0.002 * 0.9, 0.15 * 1.2}, 1.2e9, AT_FOCUS, before);
    assertEquals(before.rabiHertz(), after.rabiHertz(), 1e-6);
    assertEquals(before.startLightShiftHertz(), after.startLightShiftHertz(), 1e-6);
  }

  @Test
  void isTheSameKernelFromItsNumbers() {
    KernelData data = Scheme.PARTNER_ELIMINATED.nominal().kernel().data();
    assertEquals(data, DriveKernel.of(data).data());
  }

  @Test
  void refusesPointsItCannotAnswer() {
    DriveKernel kernel = Scheme.STRETCHED.nominal().kernel();
    KernelResult result = kernel.newResult();
    double[] watts = {0.002, 0.15};
    for (double bad : new double[] {0, -1, Double.NaN, Double.POSITIVE_INFINITY}) {
      refused(
          "power of beam 2 must be positive and finite, given " + bad,
          () -> kernel.evaluate(new double[] {0.002, bad}, 1.2e9, AT_FOCUS, result));
      refused(
          "field factor of beam 1 must be positive and finite, given " + bad,
          () -> kernel.evaluate(watts, 1.2e9, new double[] {bad, 1}, result));
    }
    refused("NaN", () -> kernel.evaluate(watts, Double.NaN, AT_FOCUS, result));
    refused("needs 2 powers, given 1", () -> kernel.evaluate(new double[1], 0, AT_FOCUS, result));
    refused(
        "needs 2 field factors, given 3", () -> kernel.evaluate(watts, 0, new double[3], result));
    refused("out of reach", () -> kernel.evaluate(watts, 3e12, AT_FOCUS, result));
    refused(
        "is kept sublevel by sublevel, while the kernel was prepared at 1.2E9 Hz with it eliminated",
        () -> kernel.evaluate(watts, 200e9, AT_FOCUS, result));
    KernelResult other = Scheme.EVERY_SUBLEVEL.nominal().kernel().newResult();
    refused("places of the result", () -> kernel.evaluate(watts, 1.2e9, AT_FOCUS, other));
    assertTrue(Double.isNaN(result.rabiHertz()));
    refused("pulse area 0.0 rad", () -> result.durationSeconds(0));
    refused("capacity", () -> kernel.newTable(0));
    KernelTable table = kernel.newTable(2);
    refused(
        "cannot take 3 points",
        () -> kernel.evaluate(new double[6], new double[3], new double[6], table));
    refused(
        "point 1: power of beam 1",
        () ->
            kernel.evaluate(
                new double[] {1, 1, 0, 1},
                new double[] {1e9, 1e9},
                new double[] {1, 1, 1, 1},
                table));
    assertEquals(1, table.size());
    refused("intensity factors", () -> kernel.withIntensitiesScaled(1));
    refused("intensity ratio", () -> kernel.withIntensitiesScaled(1, Double.NaN));
    refused("numbers, not null", () -> DriveKernel.of(null));
    DriveKernel single = singleStep(0.1).kernel();
    refused(
        "a single step has no detuning",
        () -> single.evaluate(new double[] {0.1}, 1, new double[] {1}, single.newResult()));
  }

  /** Exact: off the focus and in a trap it is the same as resolving anew. */
  @Test
  void holdsOffTheFocusAndInATrap() {
    Drive nominal = offFocus(0.002, 1.2e9);
    DriveKernel kernel = nominal.kernel();
    KernelResult result = kernel.newResult();
    kernel.evaluate(new double[] {0.003, 0.15}, 1.2e9, AT_FOCUS, result);
    Drive anew = offFocus(0.003, 1.2e9);
    assertClose(anew.rabi().hertz(), result.rabiHertz(), 0);
    assertClose(anew.startLightShift().hertz(), result.startLightShiftHertz(), 0);
    Drive.TrapLight light = anew.trap().orElseThrow();
    double trap = light.targetShift().hertz() - light.startShift().hertz();
    assertTrue(Math.abs(trap) > 1e6);
    double shifts = anew.targetLightShift().hertz() - anew.startLightShift().hertz();
    assertClose(shifts + trap, result.frequencyOffsetHertz(), 0);
    // the field at the atom depends on the wavelength here, so the detuning has a short leash
    double highest = kernel.highestDetuningHertz();
    assertTrue(highest > 1.2e9 && highest < 1.3e9, () -> "reach " + highest);
    kernel.evaluate(new double[] {0.003, 0.15}, highest, AT_FOCUS, result);
    assertClose(offFocus(0.003, highest).rabi().hertz(), result.rabiHertz(), 0);
    refused(
        "out of reach", () -> kernel.evaluate(new double[] {0.003, 0.15}, 1.3e9, AT_FOCUS, result));
  }

  private static Drive offFocus(double watts, double hertz) {
    return Drive.of(Species.RUBIDIUM_87)
        .from(Sublevel.hyperfine("5S1/2", 2, 2))
        .step(
            Level.parse("6P3/2"),
            Beam.gaussian(Power.ofWatts(watts), micrometres(20))
                .polarized(SIGMA_PLUS)
                .along(0, 0, 1)
                .focusedAt(micrometres(3), micrometres(0), micrometres(120)))
        .step(
            Sublevel.fine("68S1/2", 0.5),
            Beam.gaussian(milliwatts(150), micrometres(25)).polarized(SIGMA_MINUS).along(0, 0, -1))
        .detuned(Frequency.ofHertz(hertz))
        .in(gauss(4))
        .trappedBy(
            Beam.gaussian(milliwatts(5), micrometres(1.5)).polarized(SIGMA_PLUS).along(0, 0, 1),
            Length.ofMetres(850e-9))
        .resolve();
  }

  @Test
  void refusesBeamsWithoutAPower() {
    Beam flat = Beam.flatTop(Intensity.ofWattsPerSquareMetre(1e6));
    Drive drive =
        Drive.of(Species.CAESIUM_133)
            .from(Sublevel.hyperfine("6S1/2", 4, 4))
            .step(Sublevel.fine("60P3/2", 1.5), flat.polarized(SIGMA_PLUS).along(0, 0, 1))
            .in(gauss(2))
            .resolve();
    refused("beam 1 is given as a flat top", drive::kernel);
  }

  /** A step between intermediate levels needs a new elimination for every power. */
  @Test
  void refusesThreeSteps() {
    Beam beam = Beam.gaussian(milliwatts(1), micrometres(30)).polarized(SIGMA_PLUS);
    Drive drive =
        Drive.of(Species.RUBIDIUM_87)
            .from(Sublevel.hyperfine("5S1/2", 2, 2))
            .step(Level.parse("5P3/2"), beam.along(0, 0, 1))
            .step(Level.parse("5D5/2"), beam.along(0, 0, 1))
            .step(Sublevel.fine("60F7/2", 3.5), beam.along(0, 0, 1))
            .detuned(gigahertz(1), gigahertz(1))
            .in(gauss(1))
            .resolve();
    refused("one or two steps, given 3", drive::kernel);
  }

  @Test
  void refusesNumbersThatMakeNoKernel() {
    KernelData d = Scheme.STRETCHED.nominal().kernel().data();
    refused("at least one target, given 0", () -> with(d, d.steps(), 0, d.detuningHertz()));
    refused("one or two steps, given 0", () -> with(d, List.of(), 1, d.detuningHertz()));
    refused("must lie between", () -> with(d, d.steps(), 1, Double.NaN));
  }

  private static KernelData with(
      KernelData d, List<KernelData.Step> steps, int targets, double detuning) {
    return new KernelData(
        d.description(),
        steps,
        detuning,
        d.lowestDetuningHertz(),
        d.highestDetuningHertz(),
        d.farShiftRelativeUncertainty(),
        d.trapShiftHertz(),
        d.partners(),
        targets,
        d.direct(),
        d.intermediates(),
        d.paths());
  }

  private static void refused(String part, Executable call) {
    String message = assertThrows(IllegalArgumentException.class, call).getMessage();
    assertTrue(message.contains(part), message);
  }
}
