package org.toprung.core.drive;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.toprung.angular.Polarization.PI;
import static org.toprung.angular.Polarization.SIGMA_MINUS;
import static org.toprung.angular.Polarization.SIGMA_PLUS;
import static org.toprung.core.quantity.Frequency.gigahertz;
import static org.toprung.core.quantity.Frequency.megahertz;
import static org.toprung.core.quantity.Length.micrometres;
import static org.toprung.core.quantity.MagneticField.gauss;
import static org.toprung.core.quantity.Power.milliwatts;

import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.constraints.DoubleRange;
import net.jqwik.api.constraints.IntRange;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.function.Executable;
import org.toprung.angular.Polarization;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.atom.Sublevel;
import org.toprung.core.quantity.Frequency;

class DriveTest {
  private static final Beam LOWER =
      Beam.gaussian(milliwatts(0.2), micrometres(30)).polarized(SIGMA_PLUS).along(0, 0, 1);
  private static final Beam UPPER =
      Beam.gaussian(milliwatts(100), micrometres(30)).polarized(SIGMA_MINUS).along(0, 0, -1);

  private static DriveSetup rubidium(Beam lower, Beam upper, String target, double mJ) {
    return Drive.of(Species.RUBIDIUM_87)
        .from(Sublevel.hyperfine("5S1/2", 2, 2))
        .step(Level.parse("5P3/2"), lower)
        .step(Sublevel.fine(target, mJ), upper)
        .detuned(gigahertz(3))
        .in(gauss(3));
  }

  private static Beam linear(Beam beam, double degrees) {
    return beam.polarized(Polarization.linearDegrees(degrees)).along(1, 0, 0);
  }

  /**
   * Closed form: a single path has Ω = Ω1Ω2/2Δ and shifts Ω1²/4Δ, Ω2²/4Δ; a π pulse scatters
   * (πγ/4|Δ|)(q+1/q), q = Ω2/Ω1 (Saffman and Walker, Phys. Rev. A 72, 022347 (2005)).
   */
  @Test
  void reducesToTheTextbookThreeLevelLadderWhenThereIsOnePath() {
    Drive drive = rubidium(LOWER, UPPER, "60S1/2", 0.5).resolve();
    assertEquals(3, drive.ladder().size());
    Ladder.State middle = middle(drive);
    double detuning = shiftedDetuning(drive);
    double one = drive.steps().get(0).rabi().hertz();
    double two = drive.steps().get(1).rabi().hertz();
    assertEquals(one * two / (2 * detuning), drive.rabi().hertz(), 1e-5 * drive.rabi().hertz());
    int start = drive.ladder().start();
    double near = drive.startLightShift(0).hertz() - drive.ladder().farShiftHertz(start, 0);
    assertEquals(one * one / (4 * detuning), near, 1e-5 * near);
    double q = two / one;
    double gamma = middle.decayPerSecond() / (2 * Math.PI);
    double tau = 1 / (2 * drive.rabi().hertz());
    double expected = Math.PI * gamma / (4 * detuning) * (q + 1 / q);
    assertEquals(expected, drive.meanScatteringPerSecond() * tau, 1e-4 * expected);
  }

  /** Exact: four times the power of one beam doubles the Rabi frequency of its step alone. */
  @Test
  void isVariedByItsBeams() {
    Drive drive = rubidium(LOWER, UPPER, "60S1/2", 0.5).resolve();
    Drive brighter = drive.setup().withBeam(1, beam -> beam.brightened(4)).resolve();
    double one = drive.steps().get(0).rabi().hertz();
    double two = drive.steps().get(1).rabi().hertz();
    assertEquals(one, brighter.steps().get(0).rabi().hertz(), 1e-12 * one);
    assertEquals(2 * two, brighter.steps().get(1).rabi().hertz(), 1e-12 * two);
    assertThrows(IllegalArgumentException.class, () -> drive.setup().withBeam(2, beam -> beam));
  }

  private static Ladder.State middle(Drive drive) {
    return drive.ladder().states().stream().filter(s -> s.rung() == 1).findFirst().orElseThrow();
  }

  /** Detuning from the one intermediate sublevel, with the start where far-off light moves it. */
  private static double shiftedDetuning(Drive drive) {
    int start = drive.ladder().start();
    return drive.ladder().farShiftHertz(start, 0)
        + drive.ladder().farShiftHertz(start, 1)
        - middle(drive).energyHertz();
  }

  /** What the first beam shifts the start by through the intermediate level alone. */
  private static double nearShift(Drive drive) {
    return drive.startLightShift(0).hertz()
        - drive.ladder().farShiftHertz(drive.ladder().start(), 0);
  }

  /** Common practice: 10 cm/s against co-propagating 780 and 480 nm is a third of a megahertz. */
  @Test
  void shiftsAMovingAtomByTheSumOfTheWaveVectors() {
    Drive together = rubidium(LOWER, UPPER.along(0, 0, 1), "60S1/2", 0.5).resolve();
    assertEquals(-0.336e6, together.dopplerShift(0, 0, 0.1).hertz(), 0.003e6);
    assertEquals(0, together.dopplerShift(0.1, 0.1, 0).hertz(), 1e-6);
    Drive against = rubidium(LOWER, UPPER, "60S1/2", 0.5).resolve();
    // 1/480 − 1/780 per nm: the upper beam wins
    assertEquals(0.080e6, against.dopplerShift(0, 0, 0.1).hertz(), 0.002e6);
  }

  /** The transferred power follows √P1P2 and 1/Δ when far detuned. */
  @Property(tries = 15, seed = "3")
  void scalesWithPowersAndDetuning(
      @ForAll @DoubleRange(min = 0.2, max = 5) double first,
      @ForAll @DoubleRange(min = 0.2, max = 5) double second) {
    Drive base = rubidium(LOWER, UPPER, "60S1/2", 0.5).resolve();
    Drive scaled =
        rubidium(
                Beam.gaussian(milliwatts(0.2 * first), micrometres(30))
                    .polarized(SIGMA_PLUS)
                    .along(0, 0, 1),
                Beam.gaussian(milliwatts(100 * second), micrometres(30))
                    .polarized(SIGMA_MINUS)
                    .along(0, 0, -1),
                "60S1/2",
                0.5)
            .resolve();
    double expected = base.rabi().hertz() * shiftedDetuning(base) * Math.sqrt(first * second);
    assertEquals(expected, scaled.rabi().hertz() * shiftedDetuning(scaled), 1e-9 * expected);
    double shift = nearShift(base) * shiftedDetuning(base) * first;
    assertEquals(shift, nearShift(scaled) * shiftedDetuning(scaled), 1e-9 * shift);
  }

  /** Turning the whole apparatus about the field changes no rate. */
  @Property(tries = 12, seed = "5")
  void doesNotCareAboutTheDirectionAcrossTheField(
      @ForAll @DoubleRange(min = 0, max = 6.28) double angle,
      @ForAll @DoubleRange(min = 0, max = 180) double tilt) {
    Drive one = rubidium(linear(LOWER, tilt), linear(UPPER, 30), "60S1/2", 0.5).resolve();
    double x = Math.cos(angle);
    double y = Math.sin(angle);
    Drive turned =
        rubidium(
                linear(LOWER, tilt).along(x, y, 0), linear(UPPER, 30).along(x, y, 0), "60S1/2", 0.5)
            .resolve();
    assertEquals(one.rabi().hertz(), turned.rabi().hertz(), 1e-7 * one.rabi().hertz());
    assertEquals(
        one.startLightShift().hertz(),
        turned.startLightShift().hertz(),
        1e-7 * Math.abs(one.startLightShift().hertz()));
  }

  /**
   * Sum rule: the squared couplings of one start sublevel to a whole level, added over the three
   * polarizations, do not depend on F and mF (Wigner-Eckart and completeness).
   */
  @Property(tries = 10, seed = "9")
  void couplesEveryStartEquallyToAWholeLevelInUnpolarizedLight(
      @ForAll @IntRange(min = -2, max = 2) int m) {
    double reference = firstStepSquaredOverPolarizations(1, 0);
    assertEquals(reference, firstStepSquaredOverPolarizations(2, m), 1e-9 * reference);
  }

  private static double firstStepSquaredOverPolarizations(int f, int m) {
    double sum = 0;
    for (int q = -1; q <= 1; q++) {
      Beam lower =
          q == 0
              ? LOWER.polarized(PI).along(1, 0, 0)
              : LOWER.polarized(q > 0 ? SIGMA_PLUS : SIGMA_MINUS);
      Drive drive =
          Drive.of(Species.RUBIDIUM_87)
              .from(Sublevel.hyperfine("5S1/2", f, m))
              .step(Level.parse("5P3/2"), lower)
              .step(Sublevel.fine("60S1/2", m + q >= 0 ? 0.5 : -0.5), linear(UPPER, 50))
              .detuned(gigahertz(20))
              .in(gauss(3))
              .resolve();
      sum += square(drive.steps().get(0).rabi().hertz());
    }
    return sum;
  }

  private static double square(double x) {
    return x * x;
  }

  @Test
  void reportsEveryTargetThatAnImpurePolarizationReaches() {
    Drive drive = rubidium(linear(LOWER, 40), linear(UPPER, 20), "60S1/2", 0.5).resolve();
    assertFalse(drive.otherTargets().isEmpty());
    Drive.OtherTarget strongest = drive.otherTargets().get(0);
    assertTrue(strongest.rabi().hertz() > 0);
    // the electron flips by 2.8 MHz/G; the nuclear part is below a percent of that
    assertTrue(
        drive.otherTargets().stream()
            .filter(t -> t.sublevel().contains("mJ=-1/2"))
            .allMatch(t -> Math.abs(t.detuning().hertz() - 3 * 2.8025e6) < 0.03e6));
  }

  /** A vanishing detuning is a warning in the result, not a crash. */
  @Test
  void warnsWhenTheIntermediateLevelIsNearlyResonant() {
    for (double mhz : new double[] {0, 30, 266}) {
      Drive drive = rubidium(LOWER, UPPER, "60S1/2", 0.5).detuned(megahertz(mhz)).resolve();
      assertFalse(drive.warnings().isEmpty(), "no warning at " + mhz + " MHz");
      assertTrue(drive.warnings().get(0).contains("5P3/2 F=3 mF=3"), drive.warnings().get(0));
      assertTrue(Double.isFinite(drive.rabi().hertz()));
      assertTrue(Double.isFinite(drive.plan(Math.PI).duration().seconds()));
    }
    assertTrue(rubidium(LOWER, UPPER, "60S1/2", 0.5).resolve().warnings().isEmpty());
  }

  @Test
  void namesTheRuleThatForbidsATarget() {
    String projection =
        refused(() -> rubidium(LOWER, UPPER.polarized(SIGMA_PLUS), "60S1/2", 0.5).resolve());
    assertTrue(projection.contains("projection"), projection);
    assertTrue(projection.contains("+1"), projection);
    String parity = refused(() -> rubidium(LOWER, UPPER, "60P1/2", 0.5).resolve());
    assertTrue(parity.contains("parity"), parity);
    String triangle =
        refused(
            () ->
                Drive.of(Species.RUBIDIUM_87)
                    .from(Sublevel.hyperfine("5S1/2", 2, 2))
                    .step(Level.parse("5P1/2"), LOWER)
                    .step(Sublevel.fine("60D5/2", 0.5), UPPER)
                    .detuned(gigahertz(1))
                    .in(gauss(1))
                    .resolve());
    assertTrue(triangle.contains("triangle"), triangle);
  }

  @Test
  void refusesImpossibleStartsTargetsAndBeams() {
    DriveSetup empty = Drive.of(Species.RUBIDIUM_87);
    assertTrue(refused(() -> empty.from(Sublevel.hyperfine("5S1/2", 3, 0))).contains("F"));
    refused(() -> empty.from(Sublevel.fine("5S1/2", 0.5)));
    refused(() -> empty.from(Sublevel.hyperfine("6S1/2", 2, 0)));
    refused(() -> empty.step(Sublevel.hyperfine("60S1/2", 2, 0), UPPER));
    refused(() -> empty.step(Level.parse("4S1/2"), LOWER));
    assertTrue(refused(() -> empty.step(Level.parse("5P3/2"), LOWER.polarized(PI))).contains("pi"));
    refused(() -> Beam.gaussian(milliwatts(0), micrometres(20)));
    refused(() -> Beam.gaussian(milliwatts(1), micrometres(-20)));
    refused(() -> LOWER.along(0, 0, 0));
    refused(() -> LOWER.along(Double.NaN, 0, 1));
    refused(() -> LOWER.along(Double.POSITIVE_INFINITY, 0, 1));
    refused(() -> empty.in(gauss(-1)));
    refused(() -> rubidium(LOWER, UPPER, "60S1/2", 0.5).resolve().plan(0));
    refused(() -> rubidium(LOWER, UPPER, "60S1/2", 0.5).resolve().plan(Double.NaN));
    refused(
        () -> rubidium(LOWER, UPPER, "60S1/2", 0.5).detuned(Frequency.ofHertz(-1e15)).resolve());
  }

  @Test
  void saysWhatADescriptionStillNeeds() {
    DriveSetup setup = Drive.of(Species.RUBIDIUM_87);
    assertTrue(
        assertThrows(IllegalStateException.class, setup::resolve).getMessage().contains("from"));
    Beam bare = Beam.gaussian(milliwatts(1), micrometres(10));
    assertThrows(IllegalStateException.class, () -> setup.step(Level.parse("5P3/2"), bare));
    assertThrows(
        IllegalStateException.class,
        () -> setup.step(Level.parse("5P3/2"), bare.polarized(SIGMA_PLUS)));
  }

  @Test
  void keepsDescriptionsApart() {
    DriveSetup first = rubidium(LOWER, UPPER, "60S1/2", 0.5);
    DriveSetup second = first.detuned(gigahertz(6));
    assertEquals(3e9, first.resolve().detuning(0).hertz(), 0);
    assertEquals(6e9, second.resolve().detuning(0).hertz(), 0);
  }

  private static String refused(Executable action) {
    return assertThrows(IllegalArgumentException.class, action).getMessage();
  }
}
