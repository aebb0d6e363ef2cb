package org.toprung.budget;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.toprung.core.quantity.Frequency.hertz;
import static org.toprung.core.quantity.Frequency.kilohertz;
import static org.toprung.core.quantity.Length.micrometres;
import static org.toprung.core.quantity.MagneticField.milligauss;
import static org.toprung.core.quantity.Temperature.kelvin;
import static org.toprung.core.quantity.Temperature.microkelvin;

import java.util.ArrayList;
import java.util.Collections;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Random;
import java.util.concurrent.ForkJoinPool;
import net.jqwik.api.Arbitraries;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import net.jqwik.api.constraints.DoubleRange;
import net.jqwik.api.constraints.IntRange;
import net.jqwik.api.constraints.Size;
import org.toprung.angular.Polarization;
import org.toprung.budget.bench.Bench;
import org.toprung.budget.bench.BenchEntry;
import org.toprung.budget.bench.BenchValue;
import org.toprung.budget.bench.NoiseDensity;
import org.toprung.budget.pulse.Pulse;
import org.toprung.budget.response.Fate;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.atom.Sublevel;
import org.toprung.core.drive.Beam;
import org.toprung.core.drive.Drive;
import org.toprung.core.quantity.ElectricField;
import org.toprung.core.quantity.Frequency;
import org.toprung.core.quantity.MagneticField;
import org.toprung.core.quantity.Power;
import org.toprung.core.quantity.Time;

/** What holds for every budget. */
class BudgetLawsTest {
  /** Perfect without noise, as one path leads up; the magnetic field moves the target. */
  private static final Drive CAESIUM =
      Drive.of(Species.CAESIUM_133)
          .from(Sublevel.hyperfine("6S1/2", 4, 4))
          .step(Level.parse("7P3/2"), beam(4).along(0, 0, 1))
          .step(Sublevel.fine("62D5/2", 2.5), beam(120).along(0, 0, -1))
          .detuned(Frequency.gigahertz(-1.8))
          .in(MagneticField.gauss(6))
          .resolve();

  private static Beam beam(double power) {
    return Beam.gaussian(Power.milliwatts(power), micrometres(30))
        .polarized(Polarization.SIGMA_PLUS);
  }

  private static final NoiseDensity FREQUENCY =
      NoiseDensity.of(new double[] {1e3, 1e5, 4e6}, new double[] {1e4, 1e3, 2e3});
  private static final NoiseDensity INTENSITY =
      NoiseDensity.of(new double[] {1e3, 1e6}, new double[] {1e-9, 1e-10});

  /** Each value alone, by the cause it makes. */
  private static Map<String, Bench> disturbances() {
    Bench none = Bench.unknown();
    Map<String, Bench> all = new LinkedHashMap<>();
    all.put("Doppler shift", none.withTemperature(microkelvin(20)));
    all.put("Position in the beams", none.withPointing(micrometres(4), micrometres(4)));
    all.put("Magnetic field noise", none.withMagneticNoise(milligauss(30)));
    all.put("Electric field", none.withElectricField(ElectricField.ofVoltsPerMetre(1)));
    all.put("Laser drift, step 1", none.withDrifts(kilohertz(40), hertz(0)));
    all.put("Intensity noise, step 1", none.withIntensityNoise(0.02, 0));
    all.put("Intensity noise, step 2", none.withIntensityNoise(0, 0.02));
    all.put("Laser linewidth, step 2", none.withLinewidths(hertz(0), kilohertz(2)));
    all.put("Frequency noise spectrum, step 1", none.withFrequencyNoiseDensity(0, FREQUENCY));
    all.put("Intensity noise spectrum, step 2", none.withIntensityNoiseDensity(1, INTENSITY));
    all.put("Miscalibrated length", none.withLengthError(0.01));
    all.put("Miscalibrated frequency", none.withFrequencyError(kilohertz(40)));
    all.put("Polarization impurity, step 1", none.withPolarizationImpurity(0.01, 0));
    all.put("State preparation", none.withPreparationError(0.01));
    all.put("State detection", none.withDetectionError(0.01));
    all.put("Rydberg decay, blackbody", none.withEnvironment(kelvin(300)));
    return all;
  }

  @Provide
  Arbitrary<String> causes() {
    return Arbitraries.of(disturbances().keySet());
  }

  @Provide
  Arbitrary<Pulse> pulses() {
    return Arbitraries.of(
        Pulse.pi(),
        Pulse.square(Math.PI / 2),
        Pulse.sineSquared(Math.PI),
        Pulse.bb1(Math.PI),
        Pulse.ramsey(Time.ofSeconds(3e-7), 0.4));
  }

  private static Bench scaled(Bench bench, double factor) {
    Bench scaled = bench;
    for (BenchEntry entry : bench.entries()) {
      if (entry.value() != BenchValue.ENVIRONMENT_TEMPERATURE || factor > 0) {
        scaled = scaled.scaled(entry.value(), entry.index(), factor);
      }
    }
    return scaled;
  }

  private static double error(Pulse pulse, Bench bench, String cause) {
    return Budget.of(CAESIUM, pulse).on(bench).compose().causes().stream()
        .filter(c -> c.cause().equals(cause))
        .findFirst()
        .orElseThrow()
        .error();
  }

  /** More of a disturbance is never better for a pulse on resonance. */
  @Property(tries = 30, seed = "61")
  void growsWithEachDisturbance(
      @ForAll("causes") String cause,
      @ForAll("pulses") Pulse pulse,
      @ForAll @DoubleRange(min = 0.1, max = 0.9) double part) {
    Bench full = disturbances().get(cause);
    double weak = error(pulse, scaled(full, part), cause);
    double strong = error(pulse, full, cause);
    assertTrue(weak >= -1e-15, cause + " of " + pulse + ": " + weak);
    assertTrue(weak <= strong, cause + " of " + pulse + ": " + weak + " and " + strong);
  }

  /**
   * A weak disturbance counts by its square; what is given as a probability or a variance by
   * itself.
   */
  @Property(tries = 40, seed = "62")
  void countsWeakDisturbancesByTheirSquare(@ForAll("causes") String cause) {
    if (List.of("Rydberg", "Position", "Polarization").stream().anyMatch(cause::startsWith)) {
      // not a root mean square; of fourth order in the middle of a beam; a leak that goes with the
      // impurity and a light shift whose error goes with its square
      return;
    }
    // given as probabilities or by the variance: of a random phase for a
    // linewidth, of a velocity for a temperature
    boolean linear =
        List.of("State", "Laser linewidth", "Doppler").stream().anyMatch(cause::startsWith);
    double power = linear ? 1 : 2;
    if (cause.equals("Electric field")) {
      power = 4; // the Stark shift is itself a square
    }
    Bench full = scaled(disturbances().get(cause), 0.1);
    double ratio = error(Pulse.pi(), full, cause) / error(Pulse.pi(), scaled(full, 0.5), cause);
    assertEquals(Math.pow(2, power), ratio, 0.02 * Math.pow(2, power), cause);
  }

  /** Exact: nothing disturbed, nothing lost. */
  @Property(tries = 25, seed = "63")
  void isZeroWithoutTheDisturbance(@ForAll("causes") String cause, @ForAll("pulses") Pulse pulse) {
    if (cause.startsWith("Doppler") || cause.startsWith("Rydberg")) {
      return; // no absolute zero
    }
    assertEquals(0, error(pulse, scaled(disturbances().get(cause), 0), cause), 1e-14, cause);
  }

  /** Adding what was not assessed can only reveal more error. */
  @Property(tries = 6, seed = "64")
  void neverLosesErrorByKnowingMore(
      @ForAll @Size(min = 1, max = 10) List<@IntRange(min = 0, max = 15) Integer> order,
      @ForAll("pulses") Pulse pulse) {
    List<Bench> single = new ArrayList<>(disturbances().values());
    Bench known = Bench.unknown();
    double total = Budget.of(CAESIUM, pulse).on(known).compose().total();
    for (int index : order) {
      Bench more = merged(known, index);
      double next = Budget.of(CAESIUM, pulse).on(more).compose().total();
      assertTrue(next >= total - 1e-15, next + " after " + total + " with " + single.get(index));
      known = more;
      total = next;
    }
  }

  private static Bench merged(Bench bench, int index) {
    return switch (index) {
      case 0 -> bench.withTemperature(microkelvin(20));
      case 1 -> bench.withPointing(micrometres(4), micrometres(4));
      case 2 -> bench.withMagneticNoise(milligauss(30));
      case 3 -> bench.withElectricField(ElectricField.ofVoltsPerMetre(1));
      case 4 -> bench.withDrifts(kilohertz(40), hertz(0));
      case 5, 6 -> bench.withIntensityNoise(0.02, 0.02);
      case 7 -> bench.withLinewidths(hertz(0), kilohertz(2));
      case 8 -> bench.withFrequencyNoiseDensity(0, FREQUENCY);
      case 9 -> bench.withIntensityNoiseDensity(1, INTENSITY);
      case 10 -> bench.withLengthError(0.01);
      case 11 -> bench.withFrequencyError(kilohertz(40));
      case 12 -> bench.withPolarizationImpurity(0.01, 0);
      case 13 -> bench.withPreparationError(0.01);
      case 14 -> bench.withDetectionError(0.01);
      default -> bench.withEnvironment(kelvin(300));
    };
  }

  /** Exact: what is promised for half and double a value is what a budget then says. */
  @Property(tries = 2, seed = "68")
  void keepsThePromisesOfItsSensitivities(@ForAll("pulses") Pulse pulse) {
    Bench bench = TestDrives.bench().withPointing(micrometres(2), micrometres(1));
    Budget budget = Budget.of(CAESIUM, pulse).on(bench).compose();
    List<Sensitivity> found = budget.sensitivities();
    for (BenchEntry entry : bench.entries()) {
      Sensitivity said =
          found.stream().filter(s -> s.value().equals(entry.name())).findFirst().orElseThrow();
      for (double factor : new double[] {0.5, 2}) {
        Bench changed = bench.scaled(entry.value(), entry.index(), factor);
        double saved = budget.total() - Budget.of(CAESIUM, pulse).on(changed).compose().total();
        double promised = factor < 1 ? said.savedByHalving() : said.savedByDoubling();
        assertEquals(saved, promised, 1e-13, entry.name());
      }
    }
    for (String value : new String[] {"power, step 1", "power, step 2", "detuning, step 1"}) {
      assertTrue(found.stream().anyMatch(s -> s.value().equals(value) && s.slope() != 0), value);
    }
    Drive brighter = CAESIUM.setup().withBeam(1, b -> b.brightened(2)).resolve();
    double saved = budget.total() - Budget.of(brighter, pulse).on(bench).compose().total();
    Sensitivity power =
        found.stream().filter(s -> s.value().equals("power, step 2")).findFirst().orElseThrow();
    assertEquals(saved, power.savedByDoubling(), 1e-13);
  }

  /** Exact: the total does not know the order of its causes, and no cause lowers it. */
  @Property(tries = 200, seed = "65")
  void composesInAnyOrder(
      @ForAll @Size(min = 1, max = 12) List<@DoubleRange(min = 0, max = 0.6) Double> errors,
      @ForAll long shuffle) {
    List<Composition.Part> parts = new ArrayList<>();
    double before = 0;
    for (int i = 0; i < errors.size(); i++) {
      Fate.Kind kind = Fate.Kind.values()[i % Fate.Kind.values().length];
      parts.add(new Composition.Part(kind, errors.get(i)));
      double total = Composition.total(parts);
      assertTrue(total >= before - 1e-15 && total <= 1, total + " after " + before);
      before = total;
    }
    Collections.shuffle(parts, new Random(shuffle));
    assertEquals(before, Composition.total(parts), 1e-15);
    double sum = errors.stream().mapToDouble(Double::doubleValue).sum();
    assertTrue(before <= sum + 1e-15);
    assertTrue(before >= sum - sum * sum, "overlap is of second order: " + before + " of " + sum);
  }

  /** Exact: the resonance and the area are planned to all orders. */
  @Property(tries = 5, seed = "66")
  void isPerfectWithEverythingOff(@ForAll("pulses") Pulse pulse) {
    Drive stretched = TestDrives.rubidium().resolve();
    Check check = Budget.of(stretched, pulse).on(TestDrives.bench()).compose().check(2, 1);
    CauseCheck quiet = check.causes().get(check.causes().size() - 1);
    assertEquals("Undisturbed pulse", quiet.cause());
    assertEquals(0, quiet.simulated(), 1e-9);
  }

  @Property(tries = 4, seed = "67")
  void givesTheSameBitsOnAnyNumberOfThreads(@ForAll("pulses") Pulse pulse, @ForAll long seed) {
    Budget budget = Budget.of(CAESIUM, pulse).on(TestDrives.bench()).compose();
    ForkJoinPool one = new ForkJoinPool(1);
    ForkJoinPool eight = new ForkJoinPool(8);
    try {
      CheckSetup setup = budget.checking().shots(230).seed(seed).totalOnly();
      assertEquals(setup.on(one).run(), setup.on(eight).run());
    } finally {
      one.shutdown();
      eight.shutdown();
    }
  }
}
