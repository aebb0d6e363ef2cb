package org.toprung.budget.response;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.toprung.core.quantity.Frequency.kilohertz;
import static org.toprung.core.quantity.Frequency.megahertz;
import static org.toprung.core.quantity.Time.microseconds;
import static org.toprung.core.quantity.Time.nanoseconds;

import java.util.List;
import java.util.Map;
import java.util.SplittableRandom;
import java.util.stream.IntStream;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.constraints.DoubleRange;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;
import org.junit.jupiter.params.provider.ValueSource;
import org.toprung.budget.PlayedProgram;
import org.toprung.budget.bench.NoiseDensity;
import org.toprung.budget.dynamics.TwoLevelSystem;
import org.toprung.budget.pulse.Goal;
import org.toprung.budget.pulse.Pulse;
import org.toprung.core.quantity.Frequency;

class PulseResponseTest {
  private static final double RABI = 1e6; // Hz
  private static final Frequency FULL = Frequency.ofHertz(RABI);
  private static final double OMEGA = 2 * Math.PI * RABI; // rad/s

  /** Resonant, one axis, no light shift. */
  static List<Pulse> plain() {
    return List.of(
        Pulse.pi(),
        Pulse.square(Math.PI / 2),
        Pulse.square(0.3),
        Pulse.gaussian(Math.PI),
        Pulse.blackman(Math.PI / 2),
        Pulse.sineSquared(3 * Math.PI),
        Pulse.pi().withEdges(nanoseconds(60), nanoseconds(40)),
        Pulse.ramsey(microseconds(3), 0),
        Pulse.echo(microseconds(2), 0));
  }

  static List<Pulse> any() {
    return List.of(
        Pulse.pi(),
        Pulse.pi().offsetBy(kilohertz(100)),
        Pulse.pi().withEdges(nanoseconds(50), nanoseconds(80)).holdingFrequency(),
        Pulse.square(2 * Math.PI),
        Pulse.square(2 * Math.PI).offsetBy(kilohertz(60)),
        Pulse.gaussian(Math.PI).holdingFrequency(),
        Pulse.sineSquared(Math.PI).shapingStep(0).holdingFrequency(),
        Pulse.ramsey(microseconds(3), 0.7),
        Pulse.echo(microseconds(2), 0.3),
        Pulse.chirped(microseconds(2), megahertz(5)),
        Pulse.chirpedSmoothly(microseconds(3), megahertz(-4)),
        Pulse.bb1(Math.PI),
        Pulse.corpse(Math.PI / 2));
  }

  static List<Pulse> some() {
    return List.of(
        Pulse.pi().offsetBy(kilohertz(100)),
        Pulse.square(2 * Math.PI),
        Pulse.ramsey(microseconds(3), 0.7),
        Pulse.chirped(microseconds(2), megahertz(5)),
        Pulse.corpse(Math.PI / 2));
  }

  /** Validation: closed forms of turns about one axis. */
  @ParameterizedTest
  @MethodSource("plain")
  void filtersFollowTheSineOfTheAngle(Pulse pulse) {
    PulseResponse response = PulseResponse.twoLevel(pulse, 1, FULL);
    double rounding = 1e-9 / (RABI * RABI); // of an echo, whose filter starts at zero
    for (double f : new double[] {0, 1e4, 1.7e5, 6.1e5, 2.2e6, 7e6}) {
      double expected =
          4 * Math.PI * Math.PI * ClosedForms.power(pulse, RABI, a -> 0.5 * Math.sin(a), f);
      assertEquals(expected, response.frequencyFilter(f), 1e-6 * expected + rounding, "at " + f);
    }
  }

  @ParameterizedTest
  @MethodSource("plain")
  void intensityTurnsTheAngle(Pulse pulse) {
    PulseResponse response = PulseResponse.twoLevel(pulse, 1, FULL);
    double[] breaks = pulse.program(1, FULL).breaks();
    boolean still =
        IntStream.range(0, breaks.length - 1).allMatch(i -> pulse.program(1, FULL).isConstant(i));
    for (double f : new double[] {0, 1.7e5, 6.1e5, 2.2e6}) {
      // Ω goes with the root of the intensity; the angle's error is half an amplitude
      double expected = 0.25 * 0.25 * ClosedForms.ratePower(pulse, RABI, f);
      // an operator that changes smoothly is constant within a step of the propagation, whose
      // sampling shows where little of the filter is left: 9e-5, and 1.1e-3 above 2Ω
      double sampling = f < 2 * RABI ? 1e-4 : 1.2e-3;
      assertEquals(
          expected,
          response.intensityFilter(0, f),
          (still ? 1e-6 : sampling) * expected + 1e-9,
          "at " + f);
    }
  }

  /** Validation: the closed form of the square π pulse, also far beyond its lobes. */
  @ParameterizedTest
  @ValueSource(doubles = {0, 3e5, 5.1e5, 1.3e6, 1e7, 1.01e8, 1e9})
  void squarePiPulseHoldsAtHighFrequencies(double f) {
    PulseResponse response = PulseResponse.twoLevel(Pulse.pi(), 1, FULL);
    double w = 2 * Math.PI * f;
    double expected =
        Math.pow(Math.PI * OMEGA / (OMEGA * OMEGA - w * w), 2)
            * (2 + 2 * Math.cos(w * Math.PI / OMEGA));
    double rounding = 1e-10 * Math.pow(Math.PI * OMEGA / (OMEGA * OMEGA + w * w), 2);
    // the slopes at the ends decide at the highest, where the interpolation is good to 4e-6
    assertEquals(expected, response.frequencyFilter(f), 5e-6 * expected + rounding);
  }

  /** Validation: half the turn in the dark target, and the phase of the start against idling. */
  @ParameterizedTest
  @ValueSource(doubles = {0, 2.1e5, 9e5, 3.3e6})
  void fullTurnLosesPopulationAndPhase(double f) {
    Pulse pulse = Pulse.square(2 * Math.PI);
    PulseResponse response = PulseResponse.twoLevel(pulse, 1, FULL);
    double population = ClosedForms.power(pulse, RABI, a -> 0.5 * Math.sin(a), f);
    double phase = ClosedForms.power(pulse, RABI, a -> Math.pow(Math.sin(0.5 * a), 2), f);
    double expected = 4 * Math.PI * Math.PI * (0.5 * population + 0.25 * phase);
    assertEquals(expected, response.frequencyFilter(f), 1e-6 * expected + 1e-21);
  }

  @Test
  void squarePiPulseHasItsKnownResponse() {
    PulseResponse response = PulseResponse.twoLevel(Pulse.pi(), 2, FULL);
    assertEquals(0, response.error(), 1e-25);
    assertEquals(Math.PI * Math.PI / 4, response.errorPerSquaredAmplitude(), 1e-9);
    assertEquals(1 / (RABI * RABI), response.errorPerSquaredHertz(), 1e-9 / (RABI * RABI));
    assertEquals(0, response.crossPerHertz(), 1e-9 / RABI);
    assertEquals(0, response.slopePerAmplitude(), 1e-12);
    assertEquals(0, response.slopePerHertz(), 1e-12 / RABI);
    // Lorentzian line of full width Δν: density Δν/π, error π²Δν/(4Ω)
    assertEquals(
        Math.PI * Math.PI / (4 * OMEGA), response.whiteFrequencyNoise(0) / Math.PI, 1e-8 / OMEGA);
    assertEquals(0.25 / RABI, response.secondsInStates().get("target"), 1e-9 / RABI);
    assertEquals(0.5 / RABI, response.seconds(), 1e-16);
    assertEquals(Map.of(), response.leakage());
  }

  /** Validation: white noise as random kicks of the phase, shot by shot. */
  @Test
  void whiteNoiseAgreesWithTrajectories() {
    double linewidth = 2e3; // Hz
    PulseResponse response = PulseResponse.twoLevel(Pulse.pi(), 1, FULL);
    int kicks = 100;
    double dt = response.seconds() / kicks;
    SplittableRandom random = new SplittableRandom(11);
    int shots = 20_000;
    double sum = 0;
    double square = 0;
    for (int shot = 0; shot < shots; shot++) {
      double[] bloch = {0, 0, 1};
      for (int k = 0; k < kicks; k++) {
        double half = 0.5 * OMEGA * dt;
        turn(bloch, 1, 2, half);
        turn(bloch, 0, 1, Math.sqrt(2 * Math.PI * linewidth * dt) * random.nextGaussian());
        turn(bloch, 1, 2, half);
      }
      double missed = 0.5 * (1 + bloch[2]);
      sum += missed;
      square += missed * missed;
    }
    double mean = sum / shots;
    double deviation = Math.sqrt((square / shots - mean * mean) / shots);
    double expected = response.whiteFrequencyNoise(0) * linewidth / Math.PI;
    assertTrue(deviation < 0.02 * expected);
    assertEquals(expected, mean, 3 * deviation);
  }

  private static void turn(double[] v, int i, int j, double angle) {
    double x = v[i];
    v[i] = x * Math.cos(angle) - v[j] * Math.sin(angle);
    v[j] = v[j] * Math.cos(angle) + x * Math.sin(angle);
  }

  /** Validation: differences of the exact error. */
  @ParameterizedTest
  @MethodSource("any")
  void quasiStaticResponseIsTheDerivativeOfTheError(Pulse pulse) {
    double[] shift = {2e5, -3e5};
    TwoLevelSystem system = TwoLevelSystem.of(pulse, 2, RABI, shift);
    PulseResponse response =
        PulseResponse.twoLevel(
            pulse, 2, FULL, Frequency.ofHertz(shift[0]), Frequency.ofHertz(shift[1]));
    List<Knob> knobs =
        List.of(
            Knob.amplitude(),
            Knob.frequency(0),
            Knob.frequency(1),
            Knob.intensity(0),
            Knob.intensity(1));
    assertEquals(knobs, response.knobs());
    double[] unit = {1, RABI, RABI, 1, 1};
    assertEquals(system.error(1, 0, new double[] {1, 1}), response.error(), 1e-11);
    for (int a = 0; a < knobs.size(); a++) {
      double expected = slope(system, a);
      assertEquals(expected, response.slope(knobs.get(a)) * unit[a], 3e-6, "slope " + knobs.get(a));
      for (int b = 0; b <= a; b++) {
        double bent = curvature(system, a, b);
        double found = response.curvature(knobs.get(a), knobs.get(b)) * unit[a] * unit[b];
        assertEquals(bent, found, 2e-3 + 1e-3 * Math.abs(bent), knobs.get(a) + ", " + knobs.get(b));
      }
    }
  }

  private static double error(TwoLevelSystem system, double[] x) {
    double[] intensity = {1 + x[3], 1 + x[4]};
    double factor = (1 + x[0]) * Math.sqrt(intensity[0] * intensity[1]);
    return system.error(factor, (x[1] + x[2]) * RABI, intensity);
  }

  /** Richardson's extrapolation of the central difference. */
  private static double slope(TwoLevelSystem system, int a) {
    return (4 * slope(system, a, 1e-3) - slope(system, a, 2e-3)) / 3;
  }

  private static double slope(TwoLevelSystem system, int a, double h) {
    double[] x = new double[5];
    x[a] = h;
    double up = error(system, x);
    x[a] = -h;
    return (up - error(system, x)) / (2 * h);
  }

  private static double curvature(TwoLevelSystem system, int a, int b) {
    return (4 * curvature(system, a, b, 1e-3) - curvature(system, a, b, 2e-3)) / 3;
  }

  private static double curvature(TwoLevelSystem system, int a, int b, double h) {
    double sum = 0;
    for (int s = -1; s <= 1; s += 2) {
      for (int t = -1; t <= 1; t += 2) {
        double[] x = new double[5];
        x[a] += 0.5 * s * h;
        x[b] += 0.5 * t * h;
        sum += s * t * error(system, x);
      }
    }
    return sum / (h * h);
  }

  /**
   * Validation: a weak tone of every phase in the equation of motion, which squares what a filter
   * does; good for pulses that are not perfect without it.
   */
  @ParameterizedTest
  @MethodSource("any")
  void filtersAreWhatAWeakToneDoes(Pulse pulse) {
    double[] shift = {2e5};
    PulseResponse response = PulseResponse.twoLevel(pulse, 1, FULL, Frequency.ofHertz(shift[0]));
    double[] ideal = new PlayedProgram(pulse.ideal(), RABI, 0).end();
    double still = error(pulse, new PlayedProgram(pulse, RABI, shift).end(), ideal);
    assertEquals(still, response.error(), 1e-8);
    for (double f : new double[] {0.7e5, 8.3e5}) {
      double tone = 6e3; // Hz
      double depth = 1e-2;
      double frequency = 0;
      double intensity = 0;
      int phases = 4;
      for (int p = 0; p < phases; p++) {
        double phase = 2 * Math.PI * (p + 0.3) / phases;
        double[] end =
            new PlayedProgram(pulse, RABI, shift)
                .detunedBy(t -> tone * Math.cos(2 * Math.PI * f * t + phase))
                .end();
        frequency += (error(pulse, end, ideal) - still) / phases;
        end =
            new PlayedProgram(pulse, RABI, shift)
                .times(t -> Math.sqrt(1 + depth * Math.cos(2 * Math.PI * f * t + phase)))
                .shiftedBy(t -> 1 + depth * Math.cos(2 * Math.PI * f * t + phase))
                .end();
        intensity += (error(pulse, end, ideal) - still) / phases;
      }
      double expected = frequency / (0.5 * tone * tone);
      double scale = 1 / (RABI * RABI);
      assertEquals(
          expected / scale,
          response.frequencyFilter(f) / scale,
          2e-3 + 2e-3 * Math.abs(expected / scale));
      expected = intensity / (0.5 * depth * depth);
      assertEquals(expected, response.intensityFilter(0, f), 1e-3 + 2e-3 * Math.abs(expected));
    }
  }

  private static double error(Pulse pulse, double[] end, double[] ideal) {
    if (pulse.goal() == Goal.TRANSFER) {
      return end[0] * end[0] + end[2] * end[2];
    }
    double re = ideal[0] * end[0] + ideal[2] * end[2];
    double im = ideal[0] * end[2] - ideal[2] * end[0];
    if (pulse.goal() == Goal.RETURN) {
      double size = Math.hypot(ideal[0], ideal[2]);
      return 1 - 0.25 * (Math.pow(1 + re / size, 2) + Math.pow(im / size, 2));
    }
    re += ideal[1] * end[1] + ideal[3] * end[3];
    im += ideal[1] * end[3] - ideal[3] * end[1];
    return 1 - re * re - im * im;
  }

  @Property(seed = "17", tries = 60)
  void filtersOfPerfectPulsesAreNotNegative(
      @ForAll @DoubleRange(min = 3, max = 9) double decade,
      @ForAll @DoubleRange(min = 0.05, max = 6.28) double area) {
    double f = Math.pow(10, decade);
    PulseResponse response = PulseResponse.twoLevel(Pulse.square(area), 1, FULL);
    assertTrue(response.frequencyFilter(f) >= -1e-18 / (RABI * RABI));
    assertTrue(response.intensityFilter(0, f) >= -1e-18);
  }

  @ParameterizedTest
  @MethodSource("any")
  void filterAtZeroIsTheStaticResponse(Pulse pulse) {
    PulseResponse response = PulseResponse.twoLevel(pulse, 1, FULL, kilohertz(150));
    double scale = 1 / (RABI * RABI);
    assertEquals(
        response.errorPerSquaredHertz() / scale, response.frequencyFilter(0) / scale, 1e-9);
    assertEquals(
        0.5 * response.curvature(Knob.intensity(0), Knob.intensity(0)),
        response.intensityFilter(0, 0),
        1e-9);
  }

  /** Parseval: the area under the filter is the time-domain response to white noise. */
  @ParameterizedTest
  @MethodSource("some")
  void whiteNoiseIsTheAreaOfTheFilter(Pulse pulse) {
    PulseResponse response = PulseResponse.twoLevel(pulse, 1, FULL);
    double area = response.whiteFrequencyNoise(0);
    double[] missing = new double[2];
    for (int i = 0; i < 2; i++) {
      double high = i == 0 ? 1e7 : 1e8;
      NoiseDensity white = NoiseDensity.of(new double[] {1, high}, new double[] {1, 1});
      NoiseError noise = response.frequencyNoise(0, white);
      missing[i] = Math.abs(area - noise.error());
      assertEquals(missing[i], (noise.shareBelow() + noise.shareAbove()) * area, 2e-5 * area);
      assertTrue(noise.numericalError() < 1e-4 * area);
    }
    // the tail falls at least like 1/f²; at the lower end 1 Hz is missing
    assertTrue(missing[0] < 6e-3 * area);
    assertTrue(missing[1] < 0.101 * missing[0] + 2e-5 * area);
  }

  /** Validation: brute force over the closed form of the square pulse with a servo bump. */
  @Test
  void servoBumpAddsWhatTheClosedFormSays() {
    double[] hertz = PulseResponse.logGrid(1e3, 2e7, 600);
    double[] density = new double[hertz.length];
    for (int i = 0; i < hertz.length; i++) {
      density[i] = 20 + 400 / (1 + Math.pow((hertz[i] - 6e5) / 5e4, 2));
    }
    NoiseDensity table = NoiseDensity.of(hertz, density);
    NoiseError found = PulseResponse.twoLevel(Pulse.pi(), 1, FULL).frequencyNoise(0, table);
    double sum = 0;
    int n = 400_000;
    double h = (2e7 - 1e3) / n;
    for (int i = 0; i < n; i++) {
      double f = 1e3 + (i + 0.5) * h;
      double w = 2 * Math.PI * f;
      double form =
          Math.pow(Math.PI * OMEGA / (OMEGA * OMEGA - w * w), 2)
              * (2 + 2 * Math.cos(w * Math.PI / OMEGA));
      sum += h * form * table.at(f);
    }
    assertEquals(sum, found.error(), 1e-5 * sum);
    assertTrue(found.numericalError() < 1e-4 * sum);
    // F(0)·1 kHz of the area 1/(4·RABI)·π²/… below the table
    double below =
        1e3 / (RABI * RABI) / PulseResponse.twoLevel(Pulse.pi(), 1, FULL).whiteFrequencyNoise(0);
    assertEquals(below, found.shareBelow(), 1e-4 * below);
  }

  @Test
  void tellsHowMuchOfTheFilterATableDoesNotReach() {
    PulseResponse ramsey = PulseResponse.twoLevel(Pulse.ramsey(microseconds(50), 0), 1, FULL);
    NoiseDensity slow = NoiseDensity.of(new double[] {1, 10}, new double[] {5, 5});
    NoiseDensity fast = NoiseDensity.of(new double[] {1e6, 1e7}, new double[] {5, 5});
    assertTrue(ramsey.frequencyNoise(0, slow).shareAbove() > 0.99);
    assertTrue(ramsey.frequencyNoise(0, fast).shareBelow() > 0.99);
  }

  @Test
  void refusesKnobsAndFrequenciesItDoesNotKnow() {
    PulseResponse response = PulseResponse.twoLevel(Pulse.pi(), 2, FULL);
    assertThrows(IllegalArgumentException.class, () -> response.slope(Knob.intensity(2)));
    assertThrows(IllegalArgumentException.class, () -> response.frequencyFilter(2, 1e3));
    assertThrows(IllegalArgumentException.class, () -> response.frequencyFilter(-1));
    assertThrows(IllegalArgumentException.class, () -> response.frequencyFilter(Double.NaN));
    assertThrows(IllegalArgumentException.class, () -> Knob.frequency(-1));
    assertThrows(
        IllegalArgumentException.class,
        () -> PulseResponse.twoLevel(Pulse.pi(), 2, FULL, kilohertz(1)));
    assertThrows(IllegalArgumentException.class, () -> PulseResponse.logGrid(0, 1, 5));
    assertThrows(IllegalArgumentException.class, () -> PulseResponse.logGrid(1, Double.NaN, 5));
    assertThrows(IllegalArgumentException.class, () -> PulseResponse.logGrid(1, 2, 1));
  }
}
