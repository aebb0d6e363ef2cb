package org.toprung.core.structure;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.toprung.core.quantity.MagneticField.gauss;
import static org.toprung.core.quantity.MagneticField.tesla;

import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.constraints.DoubleRange;
import org.junit.jupiter.api.Test;
import org.toprung.angular.Wigner;
import org.toprung.core.atom.HyperfineConstants;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.quantity.MagneticField;
import org.toprung.core.quantity.PhysicalConstants;

class HyperfineManifoldTest {
  private static final Level RUBIDIUM_GROUND = Level.parse("5S1/2");

  /** Validation: Breit and Rabi, Phys. Rev. 38, 2082 (1931), exact for J = 1/2. */
  @Property(tries = 60, seed = "11")
  void obeysTheBreitRabiFormula(@ForAll @DoubleRange(min = 0, max = 2) double tesla) {
    for (Species species : new Species[] {Species.RUBIDIUM_87, Species.CAESIUM_133}) {
      Level level = species.groundLevel();
      double i = 0.5 * species.doubledNuclearSpin();
      double splitting = species.hyperfine(level).aHertz() * (i + 0.5);
      double magneton = PhysicalConstants.BOHR_MAGNETON_HERTZ_PER_TESLA;
      double x = (species.gJ(level) - species.gI()) * magneton * tesla / splitting;
      HyperfineManifold manifold =
          HyperfineManifold.of(species, level, MagneticField.ofTesla(tesla));
      for (HyperfineManifold.Eigenstate s : manifold.states()) {
        double m = 0.5 * s.doubledM();
        boolean upper = s.doubledF() == species.doubledNuclearSpin() + 1;
        double root = 1 + 4 * m * x / (2 * i + 1) + x * x;
        // the stretched state m = −(I+1/2) is the analytic continuation (1 − x) of the root
        double signedRoot =
            s.doubledM() == -(species.doubledNuclearSpin() + 1)
                ? 1 - x
                : Math.sqrt(Math.max(0, root));
        double expected =
            -splitting / (2 * (2 * i + 1))
                + species.gI() * magneton * m * tesla
                + (upper ? 0.5 : -0.5) * splitting * signedRoot;
        assertEquals(expected, s.energyHertz(), 1e-3 + 1e-12 * Math.abs(expected));
      }
    }
  }

  /** Validation: 6 834.682 610 MHz (Rb-87) and 9 192.631 770 MHz (Cs-133, SI second). */
  @Test
  void hasTheClockSplittings() {
    assertEquals(6834.682610e6, splitting(Species.RUBIDIUM_87), 100);
    assertEquals(9192.631770e6, splitting(Species.CAESIUM_133), 1e-3);
  }

  private static double splitting(Species species) {
    HyperfineManifold m = HyperfineManifold.of(species, species.groundLevel(), gauss(0));
    int tI = species.doubledNuclearSpin();
    return m.state(tI + 1, 0).energyHertz() - m.state(tI - 1, 0).energyHertz();
  }

  /** Exact: the A and B formula of Arimondo, Inguscio and Violino (1977) for each F of J = 3/2. */
  @Test
  void hasTheIntervalsOfAnExcitedLevelAtZeroField() {
    Level level = Level.parse("5P3/2");
    HyperfineConstants c = Species.RUBIDIUM_87.hyperfine(level);
    HyperfineManifold m = HyperfineManifold.of(Species.RUBIDIUM_87, level, gauss(0));
    // F=3: (9/4)A + B/4, F=2: −(3/4)A − (3/4)B, F=1: −(11/4)A + B/4, F=0: −(15/4)A + (5/4)B
    assertEquals(2.25 * c.aHertz() + 0.25 * c.bHertz(), m.state(6, 0).energyHertz(), 1e-3);
    assertEquals(-0.75 * c.aHertz() - 0.75 * c.bHertz(), m.state(4, 0).energyHertz(), 1e-3);
    assertEquals(-2.75 * c.aHertz() + 0.25 * c.bHertz(), m.state(2, 0).energyHertz(), 1e-3);
    assertEquals(-3.75 * c.aHertz() + 1.25 * c.bHertz(), m.state(0, 0).energyHertz(), 1e-3);
  }

  /** Exact: at zero field the eigenvectors are Clebsch-Gordan coefficients, up to a sign. */
  @Test
  void couplesSpinsWithClebschGordanCoefficientsAtZeroField() {
    HyperfineManifold m =
        HyperfineManifold.of(Species.CAESIUM_133, Level.parse("7P3/2"), gauss(1e-9));
    for (HyperfineManifold.Eigenstate s : m.states()) {
      for (int k = 0; k < s.components(); k++) {
        int tMj = s.doubledMj(k);
        double exact =
            Wigner.clebschGordanDoubled(3, tMj, 7, s.doubledM() - tMj, s.doubledF(), s.doubledM());
        assertEquals(Math.abs(exact), Math.abs(s.amplitude(k)), 1e-6);
      }
    }
  }

  /** Validation: g_F = 1/2 for F = 2, 0.70 MHz/G per mF (Rb-87 ground level, common practice). */
  @Test
  void hasTheWeakFieldSlopeOfTheGroundLevel() {
    HyperfineManifold m = HyperfineManifold.of(Species.RUBIDIUM_87, RUBIDIUM_GROUND, gauss(0.01));
    assertEquals(0.70e6, m.state(4, 2).hertzPerTesla() * 1e-4, 0.005e6);
    assertEquals(1.40e6, m.state(4, 4).hertzPerTesla() * 1e-4, 0.005e6);
    assertEquals(-0.70e6, m.state(2, 2).hertzPerTesla() * 1e-4, 0.005e6);
  }

  @Test
  void givesTheDerivativeOfTheEnergy() {
    Level level = Level.parse("6P3/2");
    double step = 1e-6;
    HyperfineManifold low = HyperfineManifold.of(Species.RUBIDIUM_87, level, tesla(0.003 - step));
    HyperfineManifold mid = HyperfineManifold.of(Species.RUBIDIUM_87, level, tesla(0.003));
    HyperfineManifold high = HyperfineManifold.of(Species.RUBIDIUM_87, level, tesla(0.003 + step));
    for (HyperfineManifold.Eigenstate s : mid.states()) {
      double numeric =
          (high.state(s.doubledF(), s.doubledM()).energyHertz()
                  - low.state(s.doubledF(), s.doubledM()).energyHertz())
              / (2 * step);
      assertEquals(numeric, s.hertzPerTesla(), 1e-5 * 1e10);
    }
  }

  @Test
  void countsEverySublevelOnceAndKeepsTheCentreOfGravity() {
    HyperfineManifold m =
        HyperfineManifold.of(Species.CAESIUM_133, Level.parse("7P3/2"), gauss(30));
    assertEquals(32, m.states().size());
    double sum = m.states().stream().mapToDouble(s -> s.energyHertz()).sum();
    assertEquals(0, sum, 1e-2);
    assertTrue(m.states().stream().map(Object::toString).distinct().count() == 32);
  }

  @Test
  void refusesASublevelThatDoesNotExist() {
    HyperfineManifold m = HyperfineManifold.of(Species.RUBIDIUM_87, RUBIDIUM_GROUND, gauss(1));
    IllegalArgumentException e = assertThrows(IllegalArgumentException.class, () -> m.state(6, 0));
    assertTrue(e.getMessage().contains("F=3"), e.getMessage());
  }

  // quadratic shift of the clock transition: Rb-87 575.14 Hz/G² (Bize et al., Europhys. Lett. 45,
  // 558
  // (1999)), Cs 427.45 Hz/G² (common practice of caesium clocks), from the difference of the
  // sublevels
  @org.junit.jupiter.params.ParameterizedTest
  @org.junit.jupiter.params.provider.CsvSource({
    "Rb-87,5S1/2,1,2,575.14",
    "Cs-133,6S1/2,3,4,427.45"
  })
  void clockTransitionsShiftQuadratically(
      String name, String level, int lower, int upper, double hertzPerSquareGauss) {
    double gauss = 0.5;
    double shift =
        clockHertz(name, level, lower, upper, gauss) - clockHertz(name, level, lower, upper, 0);
    assertEquals(hertzPerSquareGauss, shift / (gauss * gauss), 0.1);
  }

  private static double clockHertz(String name, String level, int lower, int upper, double gauss) {
    HyperfineManifold manifold =
        HyperfineManifold.of(Species.parse(name), Level.parse(level), MagneticField.gauss(gauss));
    return manifold.state(2 * upper, 0).energyHertz() - manifold.state(2 * lower, 0).energyHertz();
  }
}
