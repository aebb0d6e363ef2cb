package org.toprung.budget.dynamics;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.toprung.core.quantity.Frequency.megahertz;
import static org.toprung.core.quantity.Length.micrometres;
import static org.toprung.core.quantity.MagneticField.gauss;
import static org.toprung.core.quantity.Power.milliwatts;
import static org.toprung.core.quantity.Time.microseconds;
import static org.toprung.core.quantity.Time.nanoseconds;

import java.util.List;
import java.util.Map;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;
import org.junit.jupiter.params.provider.ValueSource;
import org.toprung.angular.Polarization;
import org.toprung.budget.SchrodingerEquation;
import org.toprung.budget.TestDrives;
import org.toprung.budget.pulse.Pulse;
import org.toprung.budget.response.PulseResponse;
import org.toprung.core.atom.Species;
import org.toprung.core.atom.Sublevel;
import org.toprung.core.drive.Beam;
import org.toprung.core.drive.Drive;
import org.toprung.core.drive.Ladder;

/**
 * The library's effective ladder against the bare one: every state, full fields, nothing
 * eliminated, from the equation in {@link Ladder}'s documentation and its numbers alone, by a
 * Runge-Kutta method of eighth order. What is played (fields and laser frequency) is the input of
 * both.
 */
class BareLadderTest {
  /** Three states, the intermediate one 1.1 GHz off. */
  private static final Drive FAR = TestDrives.rubidium().resolve();

  /** Several hyperfine and Zeeman states on every rung. */
  private static final Drive MANY = TestDrives.impureRubidium().resolve();

  /** Three states with equal Rabi frequencies of 41 MHz, the intermediate one 0.5 MHz off. */
  private static final Drive NEAR =
      TestDrives.rubidium().withBeam(0, b -> b.brightened(0.063)).detuned(megahertz(74)).resolve();

  private static double[] end(Ladder ladder, Pulse pulse, boolean decays, double rydbergDecay) {
    CalibratedProgram played = CalibratedProgram.of(ladder, pulse);
    double[] psi = new double[2 * ladder.size()];
    psi[ladder.start()] = 1;
    return SchrodingerEquation.solve(
        BareLadder.hamiltonian(ladder, played, decays, rydbergDecay),
        played.program().breaks(),
        psi);
  }

  private static double missed(Ladder ladder, double[] psi) {
    int n = ladder.size();
    double found = 0;
    for (int w : ladder.wanted()) {
      found += psi[w] * psi[w] + psi[n + w] * psi[n + w];
    }
    return 1 - found;
  }

  /**
   * Pulses that begin and end without light, so that bare and dressed states are the same there.
   */
  static List<Pulse> transfers() {
    return List.of(
        Pulse.pi().withEdges(nanoseconds(6), nanoseconds(6)),
        Pulse.gaussian(Math.PI),
        Pulse.sineSquared(Math.PI).offsetBy(megahertz(0.5)),
        Pulse.blackman(Math.PI).holdingFrequency(),
        Pulse.chirpedSmoothly(microseconds(1.5), megahertz(12)));
  }

  @ParameterizedTest
  @MethodSource("transfers")
  void eliminatedLadderAgreesWithTheBareOne(Pulse pulse) {
    Ladder ladder = FAR.ladder();
    double error = LadderSystem.of(CalibratedProgram.of(ladder, pulse)).noiseFreeError();
    assertEquals(missed(ladder, end(ladder, pulse, false, 0)), error, 1e-6);
  }

  @Test
  void eliminatedLadderOfManyStatesAgreesWithTheBareOne() {
    Ladder ladder = MANY.ladder();
    Pulse pulse = Pulse.gaussian(Math.PI);
    double error = LadderSystem.of(CalibratedProgram.of(ladder, pulse)).noiseFreeError();
    assertEquals(missed(ladder, end(ladder, pulse, false, 0)), error, 1e-6);
  }

  /** Neighbours of a one-photon target that a smooth pulse is too slow to populate. */
  @Test
  void neighboursThatASmoothPulseLeavesAloneAgreeWithTheBareLadder() {
    Drive drive =
        Drive.of(Species.RUBIDIUM_87)
            .from(Sublevel.hyperfine("5S1/2", 2, 2))
            .step(
                Sublevel.fine("60P3/2", 1.5),
                Beam.gaussian(milliwatts(50), micrometres(15))
                    .polarized(Polarization.linearDegrees(45))
                    .along(0, 1, 0))
            .in(gauss(20))
            .resolve();
    Ladder ladder = drive.ladder();
    for (Pulse pulse : List.of(Pulse.gaussian(Math.PI), Pulse.sineSquared(Math.PI))) {
      LadderSystem system = LadderSystem.of(CalibratedProgram.of(ladder, pulse));
      assertTrue(system.size() < 20, "takes part: " + system.size());
      double expected = missed(ladder, end(ladder, pulse, false, 0));
      assertEquals(expected, system.noiseFreeError(), 1e-6, pulse.name());
    }
  }

  /** What decays is the time spent in each level, to first order. */
  @Test
  void lossIsTheTimeSpentInTheLevels() {
    Ladder ladder = FAR.ladder();
    Pulse pulse = Pulse.gaussian(Math.PI);
    double rydbergDecay = 2e4;
    Map<String, Double> seconds = PulseResponse.ladder(FAR, pulse).secondsInStates();
    double expected = 0;
    for (Ladder.State state : ladder.states()) {
      double rate = state.rung() == ladder.steps() ? rydbergDecay : state.decayPerSecond();
      expected += rate * seconds.get(state.label());
    }
    double[] psi = end(ladder, pulse, true, rydbergDecay);
    double kept = 0;
    for (double x : psi) {
      kept += x * x;
    }
    assertTrue(expected > 1e-3);
    assertEquals(expected, 1 - kept, expected * expected);
  }

  /** With the intermediate state on resonance nothing is eliminated. */
  @Test
  void passageOverAResonantStateAgreesWithTheBareLadder() {
    Ladder ladder = NEAR.ladder();
    for (double width : new double[] {0.15, 2}) {
      Pulse pulse = Pulse.stirap(microseconds(width), microseconds(0.25 * width));
      double error = LadderSystem.of(CalibratedProgram.of(ladder, pulse)).noiseFreeError();
      assertEquals(missed(ladder, end(ladder, pulse, false, 0)), error, 1e-6);
      // adiabatic where the area is large: Bergmann, Theuer and Shore, Rev. Mod. Phys. 70, 1003
      assertEquals(width > 1, error < 1e-3);
    }
  }

  /**
   * Less than two Rabi frequencies off, at 20 MHz so that the states can be told apart at full
   * power, in each beam alone and in the dark, but not everywhere between.
   */
  @ParameterizedTest
  @ValueSource(doubles = {-60, 20, 60, 110})
  void passageNearAResonantStateAgreesWithTheBareLadder(double detuning) {
    Ladder ladder =
        TestDrives.rubidium()
            .withBeam(0, b -> b.brightened(0.2))
            .detuned(megahertz(detuning))
            .resolve()
            .ladder();
    Pulse pulse = Pulse.stirap(microseconds(1), microseconds(0.3));
    double error = LadderSystem.of(CalibratedProgram.of(ladder, pulse)).noiseFreeError();
    assertEquals(missed(ladder, end(ladder, pulse, false, 0)), error, 1e-6);
  }

  /**
   * The passage hardly populates the state that decays, though that lives shorter than it takes.
   */
  @Test
  void passageLosesLittleByDecay() {
    Ladder ladder = NEAR.ladder();
    Pulse pulse = Pulse.stirap(microseconds(2), microseconds(0.5));
    double lost = missed(ladder, end(ladder, pulse, true, 0));
    assertTrue(lost < 0.02 && lost > 1e-5);
    Map<String, Double> seconds = PulseResponse.ladder(NEAR, pulse).secondsInStates();
    Ladder.State middle =
        ladder.states().stream().filter(s -> s.rung() == 1).findFirst().orElseThrow();
    double expected = middle.decayPerSecond() * seconds.get(middle.label());
    assertEquals(expected, lost, 0.15 * expected);
  }

  /** Published limits of three levels, on this test's own path: a check of the reference itself. */
  @Test
  void bareLadderKeepsTheDarkState() {
    double first = 3e6;
    double second = 4e6;
    SchrodingerEquation.Hamiltonian h = threeLevels(first, second, 0);
    double[] dark = {second / 5e6, 0, -first / 5e6, 0, 0, 0};
    double[] psi = SchrodingerEquation.solve(h, new double[] {0, 3e-6}, dark);
    for (int i = 0; i < 6; i++) {
      assertEquals(dark[i], psi[i], 1e-9);
    }
  }

  /** Ω₁Ω₂/2Δ: half a period of it swaps the outer states. */
  @ParameterizedTest
  @ValueSource(doubles = {4e9, -8e9})
  void bareLadderTurnsAtTheTwoPhotonRate(double detuning) {
    double rabi = 1e8;
    SchrodingerEquation.Hamiltonian h = threeLevels(rabi, rabi, detuning);
    double half = Math.abs(detuning) / (rabi * rabi);
    double[] psi =
        SchrodingerEquation.solve(h, new double[] {0, half}, new double[] {1, 0, 0, 0, 0, 0});
    double admixture = Math.pow(rabi / detuning, 2);
    assertEquals(1, psi[2] * psi[2] + psi[5] * psi[5], 2 * admixture);
  }

  /** Autler and Townes: a weak probe finds the doublet at ±Ω/2 and nothing between. */
  @Test
  void bareLadderShowsTheDoublet() {
    double strong = 4e6;
    double weak = 2e4;
    double seconds = 10e-6;
    double[] found = new double[3];
    double[] at = {0, 0.5 * strong, -0.5 * strong};
    for (int i = 0; i < 3; i++) {
      double probe = at[i];
      SchrodingerEquation.Hamiltonian h =
          (t, re, im) -> {
            threeLevels(weak, strong, probe).write(t, re, im);
            re[8] = -probe;
          };
      double[] psi =
          SchrodingerEquation.solve(h, new double[] {0, seconds}, new double[] {1, 0, 0, 0, 0, 0});
      found[i] = 1 - psi[0] * psi[0] - psi[3] * psi[3];
    }
    // on a line of half the strength: (2π·weak·t)²/8
    double line = Math.pow(Math.sin(Math.PI * weak * seconds / Math.sqrt(2)), 2);
    assertEquals(line, found[1], 0.01 * line);
    assertEquals(line, found[2], 0.01 * line);
    assertTrue(found[0] < 1e-3 * line);
  }

  private static SchrodingerEquation.Hamiltonian threeLevels(
      double first, double second, double detuning) {
    return (t, re, im) -> {
      re[1] = 0.5 * first;
      re[3] = 0.5 * first;
      re[4] = -detuning;
      re[5] = 0.5 * second;
      re[7] = 0.5 * second;
    };
  }
}
