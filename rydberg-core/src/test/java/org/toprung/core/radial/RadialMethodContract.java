package org.toprung.core.radial;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.stream.IntStream;
import org.junit.jupiter.api.Test;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.quantity.PhysicalConstants;

/** What every radial method must do; each implementation has a subclass. */
abstract class RadialMethodContract {
  /** The method for an atom. */
  abstract RadialMethod method(Species species);

  /** Largest relative deviation from the exact hydrogen integrals between neighbours at n ≥ 10. */
  abstract double neighbourAccuracy();

  /** Relative deviation from n*^-3/2 of elements from the ground level between n = 90 and 140. */
  double scalingAccuracy() {
    return 0.01;
  }

  /** Relative deviation from the model potential between neighbouring Rydberg levels. */
  double rydbergAccuracy() {
    return 3e-3;
  }

  // validation: exact polynomial integration
  @Test
  final void hydrogenNeighboursMeetTheExactIntegrals() {
    RadialMethod hydrogen = method(Species.parse("H"));
    double mass = PhysicalConstants.RYDBERG_HERTZ / Species.parse("H").rydbergHertz();
    int[][] pairs = {
      {10, 0, 10, 1}, {10, 0, 11, 1}, {12, 1, 13, 0}, {20, 3, 21, 4}, {20, 5, 20, 4}, {40, 2, 41, 3}
    };
    for (int[] p : pairs) {
      Level a = Level.of(p[0], p[1], 2 * p[1] + 1);
      Level b = Level.of(p[2], p[3], 2 * p[3] + 1);
      double exact = mass * ExactHydrogen.power(p[0], p[1], p[2], p[3], 1);
      assertEquals(
          exact,
          hydrogen.dipole(a, b).correctedA0(),
          neighbourAccuracy() * Math.abs(exact),
          a + " " + b);
    }
  }

  @Test
  final void theIntegralIsSymmetric() {
    RadialMethod rb = method(Species.RUBIDIUM_87);
    for (String[] pair :
        new String[][] {{"60S1/2", "60P3/2"}, {"6P3/2", "68S1/2"}, {"30D5/2", "29F7/2"}}) {
      double one = rb.dipole(Level.parse(pair[0]), Level.parse(pair[1])).correctedA0();
      double two = rb.dipole(Level.parse(pair[1]), Level.parse(pair[0])).correctedA0();
      assertEquals(one, two, 1e-12 * Math.abs(one), pair[0]);
    }
  }

  // quantum-defect theory: elements to high levels scale with n*^-3/2 (Seaton, Rep. Prog. Phys. 46,
  // 167 (1983)), also from the ground level and also where the size is wrong
  @Test
  final void elementsToHighLevelsScaleWithTheInverseThreeHalvesPower() {
    Species species = Species.RUBIDIUM_87;
    RadialMethod rb = method(species);
    Level far = Level.of(140, 1, 3);
    Level near = Level.of(90, 1, 3);
    double ratio =
        rb.dipole(species.groundLevel(), near).correctedA0()
            / rb.dipole(species.groundLevel(), far).correctedA0();
    assertEquals(
        Math.pow(species.effectiveN(far) / species.effectiveN(near), 1.5),
        ratio,
        scalingAccuracy() * ratio);
  }

  // between neighbouring Rydberg levels of low l all methods see the same Coulomb field; measured
  // against the model potential 3e-5
  @Test
  final void neighbouringRydbergLevelsAgreeWithTheModelPotential() {
    for (String name : List.of("Li-7", "Na-23", "K-39", "Rb-85", "Cs-133")) {
      Species species = Species.parse(name);
      RadialMethod method = method(species);
      RadialMethod reference = NumerovMethod.uncalibrated(species);
      for (String[] pair :
          new String[][] {{"60S1/2", "60P3/2"}, {"60P1/2", "59D3/2"}, {"80D5/2", "80F7/2"}}) {
        Level a = Level.parse(pair[0]);
        Level b = Level.parse(pair[1]);
        double expected = reference.dipole(a, b).correctedA0();
        assertEquals(
            expected,
            method.dipole(a, b).correctedA0(),
            rydbergAccuracy() * Math.abs(expected),
            name + a + b);
      }
    }
  }

  @Test
  final void everythingToTheLargestNIsFinite() {
    for (String name : List.of("H", "Li-6", "Na-23", "K-40", "Rb-87", "Cs-133")) {
      RadialMethod method = method(Species.parse(name));
      for (int l = 0; l < 20; l += 3) {
        for (int n = 25; n <= 150; n += 25) {
          double value =
              method
                  .dipole(Level.of(n, l, 2 * l + 1), Level.of(150, l + 1, 2 * l + 3))
                  .correctedA0();
          assertTrue(Math.abs(value) > 0 && Math.abs(value) < 4e4, name + n + "," + l);
        }
      }
    }
  }

  @Test
  final void levelsOfTheCoreAreRefusedAndTheMethodSaysWhatItIs() {
    RadialMethod method = method(Species.RUBIDIUM_87);
    assertThrows(
        IllegalArgumentException.class,
        () -> method.dipole(Level.parse("4S1/2"), Level.parse("5P1/2")));
    assertFalse(method.description().isBlank());
  }

  @Test
  final void concurrentUseGivesTheSerialAnswer() {
    Species species = Species.RUBIDIUM_87;
    RadialMethod shared = method(species);
    RadialMethod own = method(species);
    List<Level> levels = IntStream.range(20, 50).mapToObj(n -> Level.of(n, 1, 3)).toList();
    List<RadialIntegral> parallel =
        levels.parallelStream().map(p -> shared.dipole(species.groundLevel(), p)).toList();
    assertEquals(levels.stream().map(p -> own.dipole(species.groundLevel(), p)).toList(), parallel);
  }
}
