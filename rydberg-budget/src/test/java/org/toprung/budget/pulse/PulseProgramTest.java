package org.toprung.budget.pulse;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.function.DoubleUnaryOperator;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.constraints.DoubleRange;
import net.jqwik.api.constraints.IntRange;
import net.jqwik.api.constraints.Scale;
import org.junit.jupiter.api.Test;
import org.toprung.core.quantity.Frequency;
import org.toprung.core.quantity.Time;

class PulseProgramTest {
  private static final Frequency RABI = Frequency.megahertz(2);

  private static List<Pulse> shapes(double area) {
    return List.of(
        Pulse.square(area), Pulse.gaussian(area), Pulse.blackman(area), Pulse.sineSquared(area));
  }

  private static double jumpAt(DoubleUnaryOperator field, double from, double to, double level) {
    double low = from;
    double high = to;
    for (int i = 0; i < 100; i++) {
      double middle = 0.5 * (low + high);
      boolean below = (field.applyAsDouble(middle) < level) == (field.applyAsDouble(from) < level);
      low = below ? middle : low;
      high = below ? high : middle;
    }
    return low;
  }

  @Test
  void playsTheSquarePiPulseAsOneInterval() {
    PulseProgram program = Pulse.pi().program(2, RABI);
    assertEquals(250e-9, program.seconds(), 1e-20);
    assertArrayEquals(new double[] {0, program.seconds()}, program.breaks());
    assertTrue(program.isConstant(0));
    assertEquals(1, program.amplitude(1e-7));
    assertEquals(0, program.detuningHertz(1e-7));
    assertEquals(0, program.phaseRadians(1e-7));
    assertEquals(FrequencyReference.FOLLOWING, program.reference());
    assertEquals("program of 250 ns for 2 beams, 1 intervals", program.toString());
  }

  /** Closed forms: the mean of sin² is 1/2 and that of the Blackman window 0.42. */
  @Test
  void lastsAsLongAsTheMeanAmplitudeAsks() {
    assertEquals(500e-9, Pulse.sineSquared(Math.PI).program(1, RABI).seconds(), 1e-18);
    assertEquals(250e-9 / 0.42, Pulse.blackman(Math.PI).program(1, RABI).seconds(), 1e-18);
  }

  /** The window is 1 % of a Gaussian high, so that the half height comes where g = 0.505. */
  @Test
  void cutsTheGaussianAtOnePercent() {
    PulseProgram program = Pulse.gaussian(Math.PI).program(1, RABI);
    double half = 0.5 * program.seconds();
    double away = half * Math.sqrt(Math.log(0.505) / Math.log(0.01));
    assertEquals(0.5, program.amplitude(half + away), 1e-14);
    assertEquals(1, program.amplitude(half));
    assertEquals(0, program.amplitude(1e-12 * half), 1e-12);
  }

  @Property(seed = "21", tries = 30)
  void hasTheAreaAskedFor(
      @ForAll @DoubleRange(min = 0.01, max = 30) double area,
      @ForAll @DoubleRange(min = 0.01, max = 50) double megahertz,
      @ForAll @IntRange(min = 1, max = 3) int steps) {
    for (Pulse pulse : shapes(area)) {
      PulseProgram program = pulse.program(steps, Frequency.megahertz(megahertz));
      assertEquals(area, Quadrature.areaRadians(program, megahertz * 1e6), 1e-10 * area);
    }
  }

  /** CORPSE turns by 4π + θ − 4k in all, with sin k = ½ sin θ/2. */
  @Test
  void hasTheAreaOfAllItsParts() {
    Time edge = Time.nanoseconds(4);
    Time wait = Time.nanoseconds(700);
    double k = Math.asin(0.5 * Math.sin(1));
    Map<Pulse, Double> areas =
        Map.of(
            Pulse.ramsey(wait, 1),
            Math.PI,
            Pulse.echo(wait, 1),
            2 * Math.PI,
            Pulse.bb1(2),
            2 + 4 * Math.PI,
            Pulse.corpse(2),
            2 + 4 * Math.PI - 4 * k);
    areas.forEach(
        (pulse, area) -> {
          PulseProgram edged = pulse.withEdges(edge, edge).program(2, RABI);
          PulseProgram plain = pulse.program(2, RABI);
          assertEquals(area, Quadrature.areaRadians(edged, 2e6), 1e-9 * area);
          assertEquals(area, Quadrature.areaRadians(plain, 2e6), 1e-12 * area);
        });
  }

  @Property(seed = "22", tries = 20)
  void keepsTheAreaUnderEdges(
      @ForAll @DoubleRange(min = 0, max = 0.249) @Scale(4) double rise,
      @ForAll @DoubleRange(min = 0, max = 0.249) @Scale(4) double fall,
      @ForAll @DoubleRange(min = 0.5, max = 9) double area,
      @ForAll @IntRange(min = 1, max = 3) int steps) {
    double length = area / (2 * Math.PI * 2e6);
    Pulse pulse =
        Pulse.square(area).withEdges(Time.ofSeconds(rise * length), Time.ofSeconds(fall * length));
    PulseProgram program = pulse.program(steps, RABI);
    assertEquals(area, Quadrature.areaRadians(program, 2e6), 1e-9 * area);
    PulseProgram one = pulse.shapingStep(steps - 1).program(steps, RABI);
    assertEquals(area, Quadrature.areaRadians(one, 2e6), 1e-9 * area);
  }

  /**
   * The worst case: edges meet in a plateau or a gap that is as short as allowed. The product of
   * two tails, 2∫S(−t)S(t − L)dt with L twice the edge, is left over: 8·10⁻⁶ of the area for two
   * beams.
   */
  @Test
  void keepsTheAreaOfEdgesThatMeet() {
    Time edge = Time.nanoseconds(100);
    double[] shortest = {200.1, 244.1, 266.1}; // ns: a gap loses what the steps move outwards
    for (int steps = 1; steps <= 3; steps++) {
      double w = shortest[steps - 1];
      PulseProgram program =
          Pulse.samples(
                  Time.nanoseconds(w),
                  new double[] {1, 0, 1},
                  new double[3],
                  new double[3],
                  Goal.ROTATION)
              .withEdges(edge, edge)
              .program(steps, RABI);
      double area = Quadrature.areaRadians(program, 2e6) / (4 * Math.PI * 2e6 * w * 1e-9);
      assertEquals(1, area, steps == 1 ? 1e-12 : 1e-5);
      double whole = 0.801 * Math.PI; // 200.25 ns
      PulseProgram plateau = Pulse.square(whole).withEdges(edge, edge).program(steps, RABI);
      assertEquals(
          whole, Quadrature.areaRadians(plateau, 2e6), (steps == 1 ? 1e-12 : 2e-6) * whole);
    }
  }

  @Property(seed = "23", tries = 20)
  void keepsTheAreaBetweenSamplesOfAnyHeight(
      @ForAll @DoubleRange(min = 0, max = 1) double first,
      @ForAll @DoubleRange(min = 0.01, max = 1) double second,
      @ForAll @DoubleRange(min = 0, max = 1) double third,
      @ForAll @IntRange(min = 1, max = 3) int steps) {
    double[] amplitude = {first, second, third};
    PulseProgram program =
        Pulse.samples(Time.nanoseconds(100), amplitude, new double[3], new double[3], Goal.ROTATION)
            .withEdges(Time.nanoseconds(20), Time.nanoseconds(10))
            .program(steps, RABI);
    double area = 2 * Math.PI * 0.2 * (first + second + third);
    assertEquals(area, Quadrature.areaRadians(program, 2e6), 1e-9 * area);
    for (int i = 0; i <= 1000; i++) {
      double a = program.amplitude(program.seconds() * i / 1000);
      assertTrue(a >= 0 && a <= 1);
    }
  }

  /** Slices shorter than a step moves, where only the phase changes. */
  @Test
  void movesStepsAcrossChangesOfThePhase() {
    int n = 300;
    double[] amplitude = new double[n];
    double[] phase = new double[n];
    for (int i = 0; i < n; i++) {
      amplitude[i] = i < 100 ? 1 : 0.3;
      phase[i] = 0.01 * i;
    }
    Time edge = Time.nanoseconds(20);
    PulseProgram program =
        Pulse.samples(Time.nanoseconds(1), amplitude, new double[n], phase, Goal.ROTATION)
            .withEdges(edge, edge)
            .program(3, RABI);
    double area = 2 * Math.PI * (0.2 + 0.3 * 0.4);
    assertEquals(area, Quadrature.areaRadians(program, 2e6), 1e-9 * area);
  }

  @Test
  void risesAndFallsInTheTimesGiven() {
    PulseProgram program =
        Pulse.pi()
            .withEdges(Time.nanoseconds(20), Time.nanoseconds(30))
            .shapingStep(1)
            .program(2, RABI);
    double middle = 0.5 * program.seconds();
    DoubleUnaryOperator field = t -> program.fieldFactor(1, t);
    double low = jumpAt(field, 0, middle, 0.1);
    double high = jumpAt(field, 0, middle, 0.9);
    assertEquals(20e-9, high - low, 1e-6 * 20e-9);
    assertEquals(40e-9, 0.5 * (low + high), 1e-16);
    double end = program.seconds();
    assertEquals(
        30e-9, jumpAt(field, middle, end, 0.1) - jumpAt(field, middle, end, 0.9), 1e-6 * 30e-9);
    assertEquals(0, program.amplitude(0), 1e-15);
    assertEquals(0, program.amplitude(end), 1e-15);
    assertEquals(250e-9 + 40e-9 + 60e-9, end, 1e-18);
    assertEquals(1, program.fieldFactor(0, 0));
  }

  @Test
  void marksWhereEdgesBeginAndEnd() {
    Time edge = Time.nanoseconds(20);
    PulseProgram program = Pulse.pi().withEdges(edge, edge).shapingStep(0).program(1, RABI);
    double[] nanoseconds = {0, 40, 80, 250, 290, 330};
    double[] breaks = program.breaks();
    assertEquals(nanoseconds.length, breaks.length);
    for (int i = 0; i < breaks.length; i++) {
      assertEquals(nanoseconds[i] * 1e-9, breaks[i], 1e-17);
    }
    for (int i = 0; i < 5; i++) {
      assertEquals(i == 2, program.isConstant(i));
    }
    assertThrows(IllegalArgumentException.class, () -> program.isConstant(5));
    assertThrows(IllegalArgumentException.class, () -> program.isConstant(-1));
    assertEquals(0, program.programmedFieldFactor(0, 39e-9));
    assertEquals(1, program.programmedFieldFactor(0, 41e-9));
  }

  /**
   * ∫(1 − S²) of a normal distribution function is σ/√π more than ∫(1 − S): the step comes earlier.
   * Cutting the step 5.1σ from its middle makes that 2·10⁻⁶ less.
   */
  @Test
  void movesTheStepOfTwoBeamsOutwards() {
    Time edge = Time.nanoseconds(20);
    PulseProgram program = Pulse.pi().withEdges(edge, edge).program(2, RABI);
    double sigma = 20e-9 / 2.5631031310892007; // 10–90 % of a normal distribution
    double longer = 2 * sigma / Math.sqrt(Math.PI);
    assertEquals(250e-9 + longer + 80e-9, program.seconds(), 3e-6 * longer);
  }

  @Property(seed = "24", tries = 20)
  void multipliesTheFieldsToTheAmplitude(
      @ForAll @IntRange(min = 1, max = 3) int steps,
      @ForAll @DoubleRange(min = 0.001, max = 0.999) @Scale(4) double x) {
    List<Pulse> pulses = new ArrayList<>(shapes(2));
    Time edge = Time.nanoseconds(8);
    for (Pulse pulse : shapes(2)) {
      pulses.add(pulse.shapingStep(steps - 1).withEdges(edge, edge));
      pulses.add(pulse.withEdges(edge, edge));
    }
    pulses.add(Pulse.chirpedSmoothly(Time.microseconds(1), RABI));
    if (steps == 2) {
      pulses.add(Pulse.gaussianStirap(Time.microseconds(1), Time.nanoseconds(300)));
    }
    for (Pulse pulse : pulses) {
      PulseProgram program = pulse.program(steps, RABI);
      double t = x * program.seconds();
      double product = 1;
      for (int k = 0; k < steps; k++) {
        product *= program.fieldFactor(k, t);
      }
      assertEquals(product, program.amplitude(t), 1e-15);
    }
  }

  @Property(seed = "25", tries = 20)
  void scalesWithTheRabiFrequency(
      @ForAll @DoubleRange(min = 0.1, max = 10) double factor,
      @ForAll @DoubleRange(min = 0.01, max = 0.99) double x) {
    for (Pulse pulse : shapes(2)) {
      PulseProgram slow = pulse.program(2, RABI);
      PulseProgram fast = pulse.program(2, Frequency.megahertz(2 * factor));
      assertEquals(slow.seconds(), factor * fast.seconds(), 1e-12 * slow.seconds());
      assertEquals(slow.amplitude(x * slow.seconds()), fast.amplitude(x * fast.seconds()), 1e-12);
    }
  }

  @Test
  void leavesShapesAloneThatBeginAndEndAtZero() {
    Time slow = Time.microseconds(10);
    for (Pulse pulse : shapes(2).subList(1, 4)) {
      PulseProgram plain = pulse.program(2, RABI);
      PulseProgram edged = pulse.withEdges(slow, slow).program(2, RABI);
      assertEquals(plain.seconds(), edged.seconds());
      assertEquals(plain.amplitude(1e-7), edged.amplitude(1e-7));
      assertArrayEquals(plain.breaks(), edged.breaks());
    }
  }

  @Test
  void keepsTheOtherBeamsOnWhereOneIsShaped() {
    PulseProgram program = Pulse.ramsey(Time.microseconds(1), 0.5).shapingStep(1).program(3, RABI);
    double dark = 600e-9;
    assertEquals(1, program.fieldFactor(0, dark));
    assertEquals(0, program.fieldFactor(1, dark));
    assertEquals(1, program.fieldFactor(2, dark));
    assertEquals(0, program.amplitude(dark));
    assertThrows(IllegalArgumentException.class, () -> program.fieldFactor(3, dark));
    assertThrows(IllegalArgumentException.class, () -> program.programmedFieldFactor(-1, dark));
  }

  @Test
  void changesThePhaseInTheDark() {
    PulseProgram program = Pulse.ramsey(Time.microseconds(1), 0.5).program(2, RABI);
    double[] nanoseconds = {0, 125, 625, 1125, 1250};
    double[] breaks = program.breaks();
    assertEquals(nanoseconds.length, breaks.length);
    for (int i = 0; i < breaks.length; i++) {
      assertEquals(nanoseconds[i] * 1e-9, breaks[i], 1e-17);
    }
    assertEquals(0, program.phaseRadians(620e-9));
    assertEquals(0.5, program.phaseRadians(630e-9));
  }

  @Test
  void needsNoBreakWhereNothingChanges() {
    PulseProgram program = Pulse.ramsey(Time.ofSeconds(0), 0).program(2, RABI);
    assertEquals(2, program.breaks().length);
    assertEquals(250e-9, program.seconds(), 1e-20);
  }

  @Test
  void sweepsAroundTheOffset() {
    Frequency sweep = Frequency.megahertz(-40);
    Frequency offset = Frequency.megahertz(3);
    Time duration = Time.microseconds(2);
    PulseProgram linear = Pulse.chirped(duration, sweep).offsetBy(offset).program(2, RABI);
    PulseProgram smooth = Pulse.chirpedSmoothly(duration, sweep).offsetBy(offset).program(2, RABI);
    assertEquals(23e6, linear.detuningHertz(0), 1e-3);
    assertEquals(13e6, linear.detuningHertz(0.5e-6), 1e-3);
    assertEquals(-17e6, linear.detuningHertz(2e-6), 1e-3);
    assertEquals(3e6 + 20e6 * Math.sqrt(0.5), smooth.detuningHertz(0.5e-6), 1e-3);
    assertEquals(0.5, smooth.amplitude(0.5e-6), 1e-12);
    assertEquals(1, linear.amplitude(0.5e-6));
    assertFalse(linear.isConstant(0));
  }

  @Test
  void holdsTheEndsOfASweepDuringEdges() {
    Time edge = Time.nanoseconds(100);
    PulseProgram program =
        Pulse.chirped(Time.microseconds(2), Frequency.megahertz(40))
            .withEdges(edge, edge)
            .shapingStep(0)
            .program(1, RABI);
    assertEquals(-20e6, program.detuningHertz(0.1e-6), 1e-3);
    assertEquals(0, program.detuningHertz(1.2e-6), 1e-3);
    assertEquals(20e6, program.detuningHertz(2.3e-6), 1e-3);
    assertEquals(2.4e-6, program.seconds(), 1e-18);
  }

  @Test
  void saysWhichResonanceItCountsFrom() {
    assertEquals(
        FrequencyReference.FULL_POWER,
        Pulse.gaussian(1).holdingFrequency().program(2, RABI).reference());
    assertEquals(
        FrequencyReference.BARE,
        Pulse.stirap(Time.microseconds(1), Time.nanoseconds(300)).program(2, RABI).reference());
  }

  @Test
  void copiesSamples() {
    double[] amplitude = {0.25, 1};
    double[] detuning = {1e6, -1e6};
    double[] phase = {0, 2};
    Pulse pulse = Pulse.samples(Time.nanoseconds(50), amplitude, detuning, phase, Goal.ROTATION);
    amplitude[0] = 0;
    detuning[0] = 0;
    PulseProgram program = pulse.program(2, RABI);
    assertEquals(0.25, program.amplitude(25e-9));
    assertEquals(0.5, program.fieldFactor(0, 25e-9));
    assertEquals(1e6, program.detuningHertz(25e-9));
    assertEquals(-1e6, program.detuningHertz(75e-9));
    assertEquals(2, program.phaseRadians(75e-9));
    assertEquals(100e-9, program.seconds(), 1e-20);
    program.breaks()[1] = 7;
    assertEquals(50e-9, program.breaks()[1], 1e-20);
  }

  @Test
  void cutsIntoSlicesThatKeepTheArea() {
    for (Pulse pulse : shapes(2)) {
      PulseProgram program = pulse.offsetBy(RABI).program(2, RABI);
      List<Slice> slices = program.slices(Time.nanoseconds(7));
      double area = 0;
      double seconds = 0;
      for (Slice slice : slices) {
        double product = slice.fieldFactors().get(0) * slice.fieldFactors().get(1);
        area += 2 * Math.PI * 2e6 * product * slice.seconds();
        seconds += slice.seconds();
        assertTrue(slice.seconds() <= 7e-9 || slices.size() == 1);
        assertEquals(2e6, slice.detuningHertz());
      }
      assertEquals(2, area, 1e-12);
      assertEquals(program.seconds(), seconds, 1e-18);
    }
  }

  @Test
  void slicesASweepIntoItsMeans() {
    PulseProgram program =
        Pulse.chirpedSmoothly(Time.microseconds(2), Frequency.megahertz(40)).program(1, RABI);
    List<Slice> slices = program.slices(Time.microseconds(0.25));
    assertEquals(8, slices.size());
    // mean of −20 cos πx over the second eighth
    double mean = -20e6 * (Math.sin(Math.PI / 4) - Math.sin(Math.PI / 8)) / (Math.PI / 8);
    assertEquals(mean, slices.get(1).detuningHertz(), 1e-6 * 20e6);
  }

  @Test
  void slicesWhatIsProgrammedNotWhatTheModulatorMakesOfIt() {
    Time edge = Time.nanoseconds(20);
    PulseProgram program =
        Pulse.ramsey(Time.microseconds(1), 1).withEdges(edge, edge).shapingStep(0).program(1, RABI);
    List<Slice> slices = program.slices(Time.nanoseconds(1));
    double[] expected = {0, 1, 0, 0, 1, 0};
    assertEquals(expected.length, slices.size());
    for (int i = 0; i < expected.length; i++) {
      assertEquals(List.of(expected[i]), slices.get(i).fieldFactors());
    }
    assertEquals(40e-9, slices.get(0).seconds(), 1e-18);
    assertEquals(1, slices.get(4).phaseRadians());
  }

  @Test
  void refusesSliceSpacingsOutOfRange() {
    PulseProgram program = Pulse.pi().program(1, RABI);
    for (double seconds : new double[] {0, -1e-9, 1e-15}) {
      Time spacing = Time.ofSeconds(seconds);
      assertThrows(IllegalArgumentException.class, () -> program.slices(spacing));
    }
  }
}
