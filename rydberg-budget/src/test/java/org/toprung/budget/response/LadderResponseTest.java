package org.toprung.budget.response;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;
import org.toprung.angular.Polarization;
import org.toprung.budget.TestDrives;
import org.toprung.budget.dynamics.CalibratedProgram;
import org.toprung.budget.pulse.Pulse;
import org.toprung.core.atom.Species;
import org.toprung.core.atom.Sublevel;
import org.toprung.core.drive.Beam;
import org.toprung.core.drive.Drive;
import org.toprung.core.quantity.Frequency;
import org.toprung.core.quantity.Length;
import org.toprung.core.quantity.MagneticField;
import org.toprung.core.quantity.Power;
import org.toprung.core.quantity.Time;

class LadderResponseTest {
  private static final Drive DRIVE = TestDrives.rubidium().resolve();

  static List<Pulse> pulses() {
    return List.of(
        Pulse.pi(),
        Pulse.square(2 * Math.PI),
        Pulse.gaussian(Math.PI),
        Pulse.ramsey(Time.ofSeconds(2e-6), 0),
        Pulse.bb1(Math.PI));
  }

  /** A three-level ladder far off resonance reacts as the two levels it was reduced to. */
  @ParameterizedTest
  @MethodSource("pulses")
  void farDetunedLadderReactsAsTwoLevels(Pulse pulse) {
    PulseResponse ladder = PulseResponse.ladder(DRIVE, pulse);
    // the Rabi frequency of the dressed states: the eliminated one would move the lobes by 1 %
    Frequency rabi = Frequency.ofHertz(CalibratedProgram.of(DRIVE.ladder(), pulse).rabiHertz());
    PulseResponse levels = PulseResponse.twoLevel(pulse, 2, rabi);
    assertEquals(levels.error(), ladder.error(), 1e-6);
    // differences of the order of the admixture of the intermediate state, 1 %
    double curvature = levels.errorPerSquaredHertz();
    assertEquals(curvature, ladder.errorPerSquaredHertz(), 0.02 * curvature + 1e-17);
    double scale = 4 / Math.pow(DRIVE.rabi().hertz(), 2);
    for (double f : new double[] {1e4, 4e5, 1.7e6, 5e6}) {
      double expected = levels.frequencyFilter(f);
      assertEquals(expected, ladder.frequencyFilter(f), 0.02 * expected + 1e-3 * scale);
    }
    double white = levels.whiteFrequencyNoise(1);
    assertEquals(white, ladder.whiteFrequencyNoise(1), 0.02 * white);
  }

  /** The response knows each beam's light shift: the exact system with its own numbers. */
  @Test
  void intensityMovesAmplitudeAndResonanceTogether() {
    PulseResponse ladder = PulseResponse.ladder(DRIVE, Pulse.pi());
    double[] shifts = new double[2];
    for (int k = 0; k < 2; k++) {
      shifts[k] = DRIVE.targetLightShift(k).hertz() - DRIVE.startLightShift(k).hertz();
    }
    PulseResponse levels =
        PulseResponse.twoLevel(
            Pulse.pi(),
            2,
            DRIVE.rabi(),
            Frequency.ofHertz(shifts[0]),
            Frequency.ofHertz(shifts[1]));
    for (int k = 0; k < 2; k++) {
      for (double f : new double[] {0, 5e5, 2e6}) {
        double expected = levels.intensityFilter(k, f);
        assertEquals(expected, ladder.intensityFilter(k, f), 0.05 * expected);
      }
    }
  }

  @Test
  void tellsWhereTheAtomSpendsItsTime() {
    PulseResponse ladder = PulseResponse.ladder(DRIVE, Pulse.pi());
    double total =
        ladder.secondsInStates().values().stream().mapToDouble(Double::doubleValue).sum();
    assertEquals(ladder.seconds(), total, 1e-6 * ladder.seconds());
    assertTrue(ladder.leakage().values().stream().allMatch(p -> p < 0.02));
    assertThrows(IllegalArgumentException.class, ladder::errorPerSquaredAmplitude);
  }

  @Test
  void treatsLadderOfManySublevels() {
    Drive many = TestDrives.impureRubidium().resolve();
    PulseResponse response = PulseResponse.ladder(many, Pulse.pi());
    double leaked = response.leakage().values().stream().mapToDouble(Double::doubleValue).sum();
    assertTrue(leaked > 0 && leaked <= response.error() + 1e-2);
    assertTrue(response.frequencyFilter(0, 1e5) > 0);
  }

  /** Exact to first order in the couplings to the neighbours. */
  @Test
  void leavesTheAmplitudesOfFirstOrderInNeighbours() {
    Drive drive =
        Drive.of(Species.RUBIDIUM_87)
            .from(Sublevel.hyperfine("5S1/2", 2, 2))
            .step(
                Sublevel.fine("60P3/2", 1.5),
                Beam.gaussian(Power.milliwatts(20), Length.micrometres(20))
                    .polarized(Polarization.linearDegrees(45))
                    .along(0, 1, 0))
            .in(MagneticField.gauss(20))
            .resolve();
    PulseResponse response = PulseResponse.ladder(drive, Pulse.pi());
    double rabi = 0.5 / response.seconds();
    int strong = 0;
    for (Drive.OtherTarget other : drive.otherTargets()) {
      double expected =
          Math.sqrt(ClosedForms.neighbour(rabi, other.rabi().hertz(), -other.detuning().hertz()));
      if (expected > 1e-3) {
        double found = response.leakAmplitudes().get(other.sublevel());
        assertEquals(expected, found, 0.05 * expected, other.toString());
        assertEquals(found * found, response.leakage().get(other.sublevel()), 1e-15);
        strong++;
      }
    }
    assertTrue(strong > 0);
  }
}
