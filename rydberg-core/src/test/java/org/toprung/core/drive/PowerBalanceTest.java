package org.toprung.core.drive;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertInstanceOf;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.toprung.angular.Polarization.SIGMA_MINUS;
import static org.toprung.angular.Polarization.SIGMA_PLUS;
import static org.toprung.core.quantity.Frequency.gigahertz;
import static org.toprung.core.quantity.Frequency.hertz;
import static org.toprung.core.quantity.Frequency.megahertz;
import static org.toprung.core.quantity.Length.micrometres;
import static org.toprung.core.quantity.MagneticField.gauss;
import static org.toprung.core.quantity.Power.milliwatts;

import java.util.List;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.constraints.DoubleRange;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.function.Executable;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.atom.Sublevel;
import org.toprung.core.quantity.Power;

class PowerBalanceTest {
  private static final Drive DRIVE = drive(1.2, milliwatts(2), milliwatts(150));

  private static Drive drive(double gigahertz, Power first, Power second) {
    return Drive.of(Species.RUBIDIUM_87)
        .from(Sublevel.hyperfine("5S1/2", 2, 2))
        .step(
            Level.parse("6P3/2"),
            Beam.gaussian(first, micrometres(20)).polarized(SIGMA_PLUS).along(0, 0, 1))
        .step(
            Sublevel.fine("68S1/2", 0.5),
            Beam.gaussian(second, micrometres(25)).polarized(SIGMA_MINUS).along(0, 0, -1))
        .detuned(gigahertz(gigahertz))
        .in(gauss(4))
        .resolve();
  }

  private static Drive at(List<Power> powers) {
    return drive(1.2, powers.get(0), powers.get(1));
  }

  private static double q(Drive drive) {
    return drive.steps().get(1).rabi().hertz() / drive.steps().get(0).rabi().hertz();
  }

  private static PowerRatio.Found found(PowerRatio ratio) {
    return assertInstanceOf(PowerRatio.Found.class, ratio);
  }

  /**
   * Closed form: near-resonant shifts Ω1²/4Δ and Ω2²/4Δ cancel at q = Ω2/Ω1 = 1 (Saffman and
   * Walker, Phys. Rev. A 72, 022347 (2005)). Far-off-resonant ones of F in all move that to q² = 1
   * − 4ΔF/Ω1²: at 1.2 GHz the infrared beam, which moves the ground level down and the target up,
   * halves q; nearer to resonance q tends to 1.
   */
  @ParameterizedTest
  @CsvSource({"1.2, 0.5", "0.13, 0.1"})
  void nullsTheDifferentialShift(double gigahertz, double awayFromOne) {
    Drive drive = drive(gigahertz, milliwatts(2), milliwatts(150));
    PowerRatio.Found nulling = found(drive.powerBalance().nullsDifferentialShift());
    List<Power> powers = nulling.powers();
    Drive balanced = drive(gigahertz, powers.get(0), powers.get(1));
    double shift = balanced.targetLightShift().hertz() - balanced.startLightShift().hertz();
    assertEquals(0, shift, 1e-6 * Math.abs(balanced.startLightShift().hertz()));
    assertEquals(drive.rabi().hertz(), balanced.rabi().hertz(), 1e-9 * drive.rabi().hertz());
    assertEquals(
        nulling.secondOverFirst(),
        powers.get(1).watts() / powers.get(0).watts(),
        1e-9 * nulling.secondOverFirst());
    Ladder ladder = balanced.ladder();
    double detuning =
        -ladder.states().stream()
            .filter(x -> x.rung() == 1)
            .findFirst()
            .orElseThrow()
            .energyHertz();
    double far = 0;
    for (int k = 0; k < 2; k++) {
      double start = ladder.farShiftHertz(ladder.start(), k);
      detuning += start;
      far += ladder.farShiftHertz(ladder.wanted()[0], k) - start;
    }
    double one = balanced.steps().get(0).rabi().hertz();
    assertEquals(Math.sqrt(1 - 4 * detuning * far / (one * one)), q(balanced), 1e-3);
    assertEquals(1, q(balanced), awayFromOne);
  }

  /** Closed form: (πγ/4|Δ|)(q + 1/q) is least at q = 1. */
  @Test
  void scattersLeastAtEqualRabiFrequencies() {
    PowerRatio.Found least = found(DRIVE.powerBalance().minimizesScattering());
    Drive best = at(least.powers());
    assertEquals(1, q(best), 1e-4);
    assertEquals(DRIVE.rabi().hertz(), best.rabi().hertz(), 1e-9 * DRIVE.rabi().hertz());
    for (double off : new double[] {0.8, 1.25}) {
      Drive other =
          at(
              List.of(
                  Power.ofWatts(least.powers().get(0).watts() * off),
                  Power.ofWatts(least.powers().get(1).watts() / off)));
      assertTrue(other.meanScatteringPerSecond() > best.meanScatteringPerSecond());
    }
  }

  /** Exact: slopes are differences, here of drives resolved anew. */
  @Test
  void hasTheSlopesOfTheDifferentialShift() {
    PowerBalance balance = DRIVE.powerBalance();
    double slope = balance.differentialShiftHertzPerWatt(0);
    double difference = differential(2.02, 150) - differential(1.98, 150);
    assertEquals(difference / 0.04e-3, slope, 1e-7 * Math.abs(slope));
    slope = balance.differentialShiftHertzPerWatt(1);
    difference = differential(2, 151) - differential(2, 149);
    assertEquals(difference / 2e-3, slope, 1e-7 * Math.abs(slope));
    assertThrows(IndexOutOfBoundsException.class, () -> balance.differentialShiftHertzPerWatt(2));
  }

  private static double differential(double firstMilliwatts, double secondMilliwatts) {
    Drive drive = drive(1.2, milliwatts(firstMilliwatts), milliwatts(secondMilliwatts));
    return drive.targetLightShift().hertz() - drive.startLightShift().hertz();
  }

  /**
   * Below resonance the second beam's near-resonant shift of the target is downward; 60 GHz off it
   * is outdone by the upward far-off-resonant one.
   */
  @Test
  void saysWhenNoRatioNullsTheShift() {
    PowerBalance balance = drive(-60, milliwatts(2), milliwatts(150)).powerBalance();
    PowerRatio.None none =
        assertInstanceOf(PowerRatio.None.class, balance.nullsDifferentialShift());
    assertTrue(none.reason().contains("the same way"), none.reason());
    assertTrue(balance.differentialShiftHertzPerWatt(0) > 0);
    assertTrue(balance.differentialShiftHertzPerWatt(1) > 0);
  }

  @Test
  void knowsPowersForEqualStepRabiFrequencies() {
    Drive equal = at(DRIVE.powerBalance().powersForEqualStepRabi());
    assertEquals(1, q(equal), 1e-9);
    assertEquals(DRIVE.rabi().hertz(), equal.rabi().hertz(), 1e-9 * DRIVE.rabi().hertz());
    Drive fixed = at(DRIVE.powerBalance().powersForStepRabi(megahertz(50)));
    assertEquals(50e6, fixed.steps().get(0).rabi().hertz(), 1e-2);
    assertEquals(50e6, fixed.steps().get(1).rabi().hertz(), 1e-2);
  }

  /** Exact: the powers have the wanted Rabi frequency, within limits, or it is out of reach. */
  @Property(tries = 60, seed = "31")
  void findsPowersWithinLimits(
      @ForAll @DoubleRange(min = 0.1, max = 5) double wanted,
      @ForAll @DoubleRange(min = 0.1, max = 10) double first,
      @ForAll @DoubleRange(min = 0.1, max = 10) double second) {
    Power[] limits = {milliwatts(2 * first), milliwatts(150 * second)};
    double rabi = wanted * DRIVE.rabi().hertz();
    PowerPlan plan = DRIVE.powerBalance().powersForRabi(hertz(rabi), limits);
    Drive planned = at(plan.powers());
    assertEquals(planned.rabi().hertz(), plan.rabi().hertz(), 1e-9 * rabi);
    if (plan instanceof PowerPlan.Reached) {
      assertEquals(rabi, plan.rabi().hertz(), 1e-9 * rabi);
      boolean free = true;
      for (int k = 0; k < 2; k++) {
        double share = plan.powers().get(k).watts() / limits[k].watts();
        assertTrue(share <= 1);
        free &= share < 1;
      }
      if (free) {
        assertEquals(1, q(planned), 1e-9);
      }
    } else {
      assertTrue(rabi > plan.rabi().hertz());
      assertEquals(List.of(limits), plan.powers());
    }
  }

  @Test
  void balancesNothingForASingleBeam() {
    PowerBalance balance = singleStep().powerBalance();
    assertInstanceOf(PowerRatio.None.class, balance.nullsDifferentialShift());
    assertInstanceOf(PowerRatio.None.class, balance.minimizesScattering());
    assertEquals(List.of(milliwatts(50)), balance.powersForEqualStepRabi());
    double rabi = singleStep().rabi().hertz();
    assertEquals(
        0.2,
        balance.powersForRabi(hertz(2 * rabi), milliwatts(500)).powers().get(0).watts(),
        1e-12);
    PowerPlan much = balance.powersForRabi(hertz(4 * rabi), milliwatts(450));
    assertInstanceOf(PowerPlan.OutOfReach.class, much);
    assertEquals(3 * rabi, much.rabi().hertz(), 1e-9 * rabi);
  }

  private static Drive singleStep() {
    return Drive.of(Species.CAESIUM_133)
        .from(Sublevel.hyperfine("6S1/2", 4, 4))
        .step(
            Sublevel.fine("60P3/2", 1.5),
            Beam.gaussian(milliwatts(50), micrometres(15)).polarized(SIGMA_PLUS).along(0, 0, 1))
        .in(gauss(2))
        .resolve();
  }

  @Test
  void refusesWhatMakesNoPlan() {
    PowerBalance balance = DRIVE.powerBalance();
    refused("Rabi frequency 0 Hz", () -> balance.powersForStepRabi(hertz(0)));
    refused(
        "Rabi frequency -1 Hz",
        () -> balance.powersForRabi(hertz(-1), milliwatts(1), milliwatts(1)));
    refused("each of 2 beams, given 1", () -> balance.powersForRabi(hertz(1), milliwatts(1)));
    refused(
        "power limit 0 W of beam 2",
        () -> balance.powersForRabi(hertz(1), milliwatts(1), milliwatts(0)));
    Beam beam = Beam.gaussian(milliwatts(1), micrometres(30)).polarized(SIGMA_PLUS).along(0, 0, 1);
    Drive three =
        Drive.of(Species.RUBIDIUM_87)
            .from(Sublevel.hyperfine("5S1/2", 2, 2))
            .step(Level.parse("5P3/2"), beam)
            .step(Level.parse("5D5/2"), beam)
            .step(Sublevel.fine("60F7/2", 3.5), beam)
            .detuned(gigahertz(1), gigahertz(1))
            .in(gauss(1))
            .resolve();
    refused("one or two steps, given 3", three::powerBalance);
  }

  private static void refused(String part, Executable call) {
    String message = assertThrows(IllegalArgumentException.class, call).getMessage();
    assertTrue(message.contains(part), message);
  }
}
