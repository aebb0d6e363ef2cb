package org.toprung.budget.pulse;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.OptionalDouble;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.function.Executable;
import org.toprung.core.quantity.Frequency;
import org.toprung.core.quantity.Time;

class PulseTest {
  private static final Frequency RABI = Frequency.megahertz(2);
  private static final Time SHORT = Time.nanoseconds(10);

  private static void refused(String part, Executable call) {
    String message = assertThrows(IllegalArgumentException.class, call).getMessage();
    assertTrue(message.contains(part), message);
    assertTrue(message.contains("allowed") || message.contains("steps"), message);
  }

  @Test
  void knowsWhatSuccessIsFromTheArea() {
    assertEquals(Goal.TRANSFER, Pulse.pi().goal());
    assertEquals(Goal.TRANSFER, Pulse.square(3.1416).goal());
    assertEquals(Goal.TRANSFER, Pulse.gaussian(3 * Math.PI).goal());
    assertEquals(Goal.RETURN, Pulse.square(6.2832).goal());
    assertEquals(Goal.RETURN, Pulse.bb1(2 * Math.PI).goal());
    assertEquals(Goal.ROTATION, Pulse.square(Math.PI / 2).goal());
    assertEquals(Goal.ROTATION, Pulse.square(3.15).goal());
    assertEquals(Goal.ROTATION, Pulse.square(1e-5).goal());
    assertEquals(Goal.ROTATION, Pulse.corpse(1).goal());
    assertEquals(Goal.COHERENCE, Pulse.ramsey(SHORT, 0).goal());
    assertEquals(Goal.COHERENCE, Pulse.echo(SHORT, 0).goal());
    assertEquals(Goal.TRANSFER, Pulse.chirped(SHORT, RABI).goal());
    assertEquals(Goal.TRANSFER, Pulse.stirap(RABI_TIME, SHORT).goal());
  }

  private static final Time RABI_TIME = Time.microseconds(1);

  @Test
  void namesItself() {
    assertEquals("pi", Pulse.pi().name());
    assertEquals("square 1.5708 rad", Pulse.square(Math.PI / 2).name());
    assertEquals("Ramsey pair 10 ns apart", Pulse.ramsey(SHORT, 0).name());
    assertEquals("echo of twice 10 ns", Pulse.echo(SHORT, 0).name());
    assertEquals("chirp of 10 ns over 2 MHz", Pulse.chirped(SHORT, RABI).name());
    assertEquals("STIRAP of 1 us, delay 10 ns", Pulse.stirap(RABI_TIME, SHORT).name());
    assertEquals(
        "pi, offset 2 MHz, rise 10 ns, fall 0 s, shaping step 1, holding the frequency",
        Pulse.pi()
            .offsetBy(RABI)
            .withEdges(SHORT, Time.ofSeconds(0))
            .shapingStep(1)
            .holdingFrequency()
            .toString());
  }

  @Test
  void isIdealWithoutOffsetEdgesAndHeldFrequency() {
    Pulse pulse =
        Pulse.pi().offsetBy(RABI).withEdges(SHORT, SHORT).holdingFrequency().shapingStep(1);
    assertEquals("pi, shaping step 1", pulse.ideal().toString());
    assertEquals(RABI, pulse.offset());
    assertEquals(0, pulse.ideal().offset().hertz());
  }

  @Test
  void tellsTheAreaOfPulsesThatHaveOne() {
    assertEquals(OptionalDouble.of(1), Pulse.corpse(1).areaRadians());
    assertEquals(1, Pulse.blackman(1).planAreaRadians());
    assertEquals(OptionalDouble.empty(), Pulse.chirped(SHORT, RABI).areaRadians());
    assertEquals(Math.PI, Pulse.chirped(SHORT, RABI).planAreaRadians());
  }

  @Test
  void needsTheIntermediateLevelOnlyForStirap() {
    assertTrue(Pulse.ramsey(SHORT, 0).isTwoLevel());
    assertFalse(Pulse.stirap(RABI_TIME, SHORT).isTwoLevel());
  }

  @Test
  void refusesAreasOutOfRange() {
    for (double area : new double[] {0, -1, Double.NaN, Double.POSITIVE_INFINITY, 315}) {
      refused(Double.toString(area), () -> Pulse.square(area));
      refused(Double.toString(area), () -> Pulse.gaussian(area));
      refused(Double.toString(area), () -> Pulse.blackman(area));
      refused(Double.toString(area), () -> Pulse.sineSquared(area));
      refused(Double.toString(area), () -> Pulse.bb1(area));
      refused(Double.toString(area), () -> Pulse.corpse(area));
    }
    refused("12.6", () -> Pulse.bb1(12.6));
    refused("12.6", () -> Pulse.corpse(12.6));
  }

  @Test
  void refusesTimesPhasesAndSweepsOutOfRange() {
    Time none = Time.ofSeconds(0);
    Time negative = Time.nanoseconds(-1);
    refused("-1 ns", () -> Pulse.ramsey(negative, 0));
    refused("NaN", () -> Pulse.ramsey(none, Double.NaN));
    refused("-1 ns", () -> Pulse.echo(negative, 0));
    refused("Infinity", () -> Pulse.echo(none, Double.POSITIVE_INFINITY));
    refused("0 s", () -> Pulse.chirped(none, RABI));
    refused("0 Hz", () -> Pulse.chirpedSmoothly(SHORT, Frequency.ofHertz(0)));
    refused("0 s", () -> Pulse.stirap(none, SHORT));
    refused("0 s", () -> Pulse.stirap(SHORT, none));
    refused("10 ns", () -> Pulse.gaussianStirap(SHORT, SHORT));
    refused("rise time -1 ns", () -> Pulse.pi().withEdges(negative, none));
    refused("fall time -1 ns", () -> Pulse.pi().withEdges(none, negative));
  }

  @Test
  void refusesSamplesThatCannotBePlayed() {
    double[] one = {1};
    double[] zero = {0};
    double[] none = {};
    Goal goal = Goal.TRANSFER;
    refused("0 s", () -> Pulse.samples(Time.ofSeconds(0), one, zero, zero, goal));
    refused("0 amplitudes", () -> Pulse.samples(SHORT, none, none, none, goal));
    refused("1 detunings and 0 phases", () -> Pulse.samples(SHORT, one, zero, none, goal));
    refused("all 1 amplitudes", () -> Pulse.samples(SHORT, zero, zero, zero, goal));
    for (double bad : new double[] {-0.1, 1.1, Double.NaN}) {
      refused(bad + " of sample 0", () -> Pulse.samples(SHORT, new double[] {bad}, one, one, goal));
    }
    double[] nan = {Double.NaN};
    refused("NaN Hz", () -> Pulse.samples(SHORT, one, nan, zero, goal));
    refused("NaN rad", () -> Pulse.samples(SHORT, one, zero, nan, goal));
    assertThrows(NullPointerException.class, () -> Pulse.samples(SHORT, one, zero, zero, null));
  }

  @Test
  void refusesStepsThatThePulseCannotUse() {
    refused("-1", () -> Pulse.pi().shapingStep(-1));
    refused("3", () -> Pulse.pi().shapingStep(3));
    refused("step index 1", () -> Pulse.pi().shapingStep(1).program(1, RABI));
    refused("4 steps", () -> Pulse.pi().program(4, RABI));
    refused("0 steps", () -> Pulse.pi().program(0, RABI));
    Pulse stirap = Pulse.stirap(RABI_TIME, SHORT);
    refused("takes 2 steps, but the drive has 3", () -> stirap.program(3, RABI));
    refused("takes 2 steps, but the drive has 1", () -> stirap.program(1, RABI));
  }

  @Test
  void refusesOneShapeWhereEachBeamHasItsOwn() {
    Pulse stirap = Pulse.stirap(RABI_TIME, SHORT);
    assertThrows(IllegalArgumentException.class, () -> stirap.shapingStep(0));
    assertThrows(IllegalArgumentException.class, stirap::holdingFrequency);
  }

  @Test
  void refusesRabiFrequenciesOutOfRange() {
    for (double hertz : new double[] {0, -1e6}) {
      assertThrows(
          IllegalArgumentException.class, () -> Pulse.pi().program(2, Frequency.ofHertz(hertz)));
    }
  }

  @Test
  void refusesEdgesThatEatThePlateau() {
    Time slow = Time.nanoseconds(126);
    String message =
        assertThrows(
                IllegalArgumentException.class,
                () -> Pulse.pi().withEdges(SHORT, slow).shapingStep(0).program(1, RABI))
            .getMessage();
    assertTrue(message.contains("126 ns (fall)") && message.contains("at most 125 ns"), message);
    Pulse.pi().withEdges(SHORT, Time.nanoseconds(125)).shapingStep(0).program(1, RABI);
    // the gap counts as well
    assertThrows(
        IllegalArgumentException.class,
        () -> Pulse.ramsey(SHORT, 0).withEdges(SHORT, SHORT).program(1, RABI));
  }
}
