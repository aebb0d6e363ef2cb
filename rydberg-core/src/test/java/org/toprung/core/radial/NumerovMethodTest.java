package org.toprung.core.radial;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.stream.IntStream;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.constraints.IntRange;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvFileSource;
import org.junit.jupiter.params.provider.CsvSource;
import org.toprung.core.atom.Datum;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;

class NumerovMethodTest {
  private static final Species RB = Species.RUBIDIUM_87;
  private static final Species CS = Species.CAESIUM_133;
  private static final NumerovMethod HYDROGEN = NumerovMethod.hydrogen();
  private static final NumerovMethod RB_METHOD = NumerovMethod.of(RB);
  private static final NumerovMethod CS_METHOD = NumerovMethod.of(CS);

  private static double hydrogen(int n, int l, int n2, int l2) {
    return HYDROGEN.dipole(Level.of(n, l, 2 * l + 1), Level.of(n2, l2, 2 * l2 + 1)).bareA0();
  }

  private static NumerovMethod method(Species species) {
    return species == RB ? RB_METHOD : CS_METHOD;
  }

  // validation: closed-form integrals, mpmath with 60 digits; worst measured deviation 1.8e-11
  @ParameterizedTest
  @CsvFileSource(resources = "hydrogen_radial.csv", useHeadersInDisplayName = true)
  void hydrogenIntegralsMeetTheExactOnes(int n, int l, int n2, int l2, double exact) {
    assertEquals(exact, hydrogen(n, l, n2, l2), 5e-11 * Math.abs(exact));
    assertEquals(exact, hydrogen(n2, l2, n, l), 5e-11 * Math.abs(exact));
  }

  // exact: within a shell R(nl, n l-1) = (3/2) n sqrt(n² - l²), negative with waves positive near
  // r = 0 (Bethe and Salpeter, Quantum Mechanics of One- and Two-Electron Atoms, section 63)
  @Property(seed = "20261205", tries = 60)
  void hydrogenIntegralsWithinAShellFollowTheClosedForm(
      @ForAll @IntRange(min = 2, max = 100) int n, @ForAll @IntRange(min = 1, max = 99) int l) {
    if (l < n) {
      double exact = -1.5 * n * Math.sqrt((double) n * n - (double) l * l);
      assertEquals(exact, hydrogen(n, l, n, l - 1), 1e-9 * Math.abs(exact));
    }
  }

  // exact sum rule: Σ_n' over bound and continuum of (E' - E) R² for l -> l+1 and l-1; the bound
  // oscillator strengths of 1s sum to 0.5650 (Bethe and Salpeter, section 63, table 14)
  @Test
  void boundOscillatorStrengthsOfTheHydrogenGroundStateAddUp() {
    double sum = 0;
    double last = 0;
    for (int n = 2; n <= 100; n++) {
      double r = hydrogen(1, 0, n, 1);
      last = 2.0 / 3 * 0.5 * (1 - 1.0 / (n * (double) n)) * r * r;
      sum += last;
    }
    // beyond n the terms fall as n^-3: half of n times the last one
    sum += last * (100 / 2.0 - 0.5);
    assertEquals(0.5650, sum, 1e-4);
  }

  @ParameterizedTest
  @CsvSource({"Rb-87", "Cs-133"})
  void wavesHaveTheNodesOfTheirLevel(String name) {
    Species species = Species.parse(name);
    for (int l = 0; l <= 6; l++) {
      for (int doubledJ = Math.max(1, 2 * l - 1); doubledJ <= 2 * l + 1; doubledJ += 2) {
        NumerovSolver solver = new NumerovSolver(new ModelPotential(species, l, doubledJ), l, 0.02);
        for (int n = l + 1; n <= Level.MAXIMUM_N; n += n < 12 ? 1 : 23) {
          Level level = Level.of(n, l, doubledJ);
          if (species.isValid(level)) {
            RadialWave wave = solver.solve(n, species.effectiveN(level));
            assertEquals(n - l - 1, wave.nodes(), level.toString());
          }
        }
      }
    }
  }

  @Test
  void wavesAtAnEnergyThatBelongsToAnotherLevelAreRefused() {
    NumerovSolver solver = new NumerovSolver(ValencePotential.coulomb(), 0, 0.02);
    var e = assertThrows(ArithmeticException.class, () -> solver.solve(10, 8.0));
    assertTrue(e.getMessage().contains("7 nodes instead of 9"), e.getMessage());
  }

  // regression of the numerics: a quarter of the step changes nothing that matters; target 1e-7 at
  // n =
  // 100. Where positive and negative parts cancel (60P-60D, 100P-100D) that is 1e-9 of n²; the
  // inner
  // cut of the F level lies on the grid, inside the core
  @ParameterizedTest
  @CsvSource({
    "5S1/2,5P1/2,1e-7",
    "5S1/2,30P1/2,2e-7",
    "5P3/2,50S1/2,2e-8",
    "5P3/2,50D5/2,2e-8",
    "60P3/2,60S1/2,2e-8",
    "100S1/2,100P3/2,2e-8",
    "150S1/2,150P1/2,2e-8",
    "60P3/2,60D5/2,1e-6",
    "100P3/2,100D5/2,1e-6",
    "4D5/2,60F7/2,6e-5"
  })
  void stepIsFineEnough(String left, String right, double within) {
    double coarse = dipole(left, right, 0.02);
    assertEquals(coarse, dipole(left, right, 0.005), within * Math.abs(coarse));
  }

  private static double dipole(String left, String right, double step) {
    return wave(left, step).dipole(wave(right, step));
  }

  private static RadialWave wave(String text, double step) {
    Level level = Level.parse(text);
    ModelPotential potential = new ModelPotential(RB, level.l(), level.doubledJ());
    return new NumerovSolver(potential, level.l(), step).solve(level.n(), RB.effectiveN(level));
  }

  @Test
  void wavesAreNormalizedAndOrthogonal() {
    NumerovSolver solver = new NumerovSolver(ValencePotential.coulomb(), 1, 0.01);
    List<RadialWave> waves = IntStream.of(2, 3, 10, 40).mapToObj(n -> solver.solve(n, n)).toList();
    // <r> = (3n² - l(l+1))/2 of hydrogen, exact
    assertEquals((3 * 40 * 40 - 2) / 2.0, waves.get(3).dipole(waves.get(3)), 1e-4);
    assertEquals((3 * 4 - 2) / 2.0, waves.get(0).dipole(waves.get(0)), 1e-7);
  }

  // validation, uncalibrated: D lines within 3 % and second resonances within 12 % of the measured
  // elements (targets); measured deviations 0.6 % and 2.3 %
  @ParameterizedTest
  @CsvSource({
    "Rb-87,5P1/2,0.03",
    "Rb-87,5P3/2,0.03",
    "Rb-87,6P1/2,0.12",
    "Rb-87,6P3/2,0.12",
    "Cs-133,6P1/2,0.03",
    "Cs-133,6P3/2,0.03",
    "Cs-133,7P1/2,0.12",
    "Cs-133,7P3/2,0.12"
  })
  void resonanceLinesComeOutWithoutAnyMeasuredElement(String name, String p, double within) {
    Species species = Species.parse(name);
    RadialIntegral integral =
        NumerovMethod.uncalibrated(species).dipole(species.groundLevel(), Level.parse(p));
    assertFalse(integral.calibrated());
    assertEquals(1, ratioToMeasured(species, p, integral), within);
  }

  // validation: calibrated on the second resonance alone, the D lines follow to half a per cent
  @ParameterizedTest
  @CsvSource({"Rb-87,5P1/2", "Rb-87,5P3/2", "Cs-133,6P1/2", "Cs-133,6P3/2"})
  void calibrationOnTheSecondResonancePredictsTheFirst(String name, String p) {
    Species species = Species.parse(name);
    RadialIntegral integral = method(species).dipole(species.groundLevel(), Level.parse(p));
    assertTrue(integral.calibrated());
    assertEquals(1, ratioToMeasured(species, p, integral), 0.005);
  }

  @ParameterizedTest
  @CsvSource({"Rb-87,6P1/2", "Rb-87,6P3/2", "Cs-133,7P1/2", "Cs-133,7P3/2"})
  void calibrationMeetsTheMemberItIsMadeOn(String name, String p) {
    Species species = Species.parse(name);
    RadialIntegral integral = method(species).dipole(species.groundLevel(), Level.parse(p));
    assertEquals(1, ratioToMeasured(species, p, integral), 1e-9);
  }

  private static double ratioToMeasured(Species species, String p, RadialIntegral integral) {
    Level level = Level.parse(p);
    double measured =
        species
            .datum(Datum.Kind.REDUCED_DIPOLE, species.groundLevel() + "-" + p)
            .orElseThrow()
            .value();
    // |<S1/2||r||Pj>| = R sqrt((2j+1)/3)
    return Math.abs(integral.correctedA0()) * Math.sqrt((level.doubledJ() + 1) / 3.0) / measured;
  }

  // Raimond et al., J. Phys. B 11, L765 (1978), and O et al., J. Opt. Soc. Am. 71, 1072 (1981): the
  // ratio rises monotonically to above a thousand; target above 300 at n = 30, measured 720
  @Test
  void doubletRatioOfCaesiumRisesMonotonicallyWithoutChangeOfSign() {
    double previous = 0;
    double sign = 0;
    for (int n = 7; n <= 120; n++) {
      double half = CS_METHOD.dipole(CS.groundLevel(), Level.of(n, 1, 1)).correctedA0();
      double threeHalves = CS_METHOD.dipole(CS.groundLevel(), Level.of(n, 1, 3)).correctedA0();
      double ratio = 2 * threeHalves * threeHalves / (half * half);
      assertTrue(ratio > previous, "n = " + n + ": " + ratio + " after " + previous);
      assertTrue(sign == 0 || sign == Math.signum(half), "n = " + n);
      previous = ratio;
      sign = Math.signum(half);
      if (n == 30) {
        assertTrue(ratio > 300, "ratio " + ratio);
      }
    }
  }

  // no zero of the element and no jump: its size times n*^1.5 falls ever more slowly to a constant,
  // from step to step by 31 % at n = 8 to below 1e-3 at n = 150 (measured)
  @ParameterizedTest
  @CsvSource({"1", "3"})
  void elementsFromTheGroundLevelOfRubidiumAreSmoothAndOfOneSign(int doubledJ) {
    double previous = 0;
    double ratio = 0.65;
    for (int n = 7; n <= 150; n++) {
      Level p = Level.of(n, 1, doubledJ);
      double reduced =
          RB_METHOD.dipole(RB.groundLevel(), p).correctedA0() * Math.pow(RB.effectiveN(p), 1.5);
      if (previous != 0) {
        double step = reduced / previous;
        assertTrue(step > ratio - 1e-3 && step < 1, "n = " + n + ": " + step + ", " + ratio);
        ratio = step;
      }
      previous = reduced;
    }
    assertTrue(ratio > 0.999, "" + ratio);
  }

  // Saffman, Walker and Molmer, Rev. Mod. Phys. 82, 2313 (2010), from memory: 0.014 (50/n)^1.5 a0
  // for 5P3/2 to nS, target 2 %. For 5P3/2 to nD5/2 a one-channel calculation with the same
  // potential gives 0.0249 at n = 50, target 2 %; the 0.024 of the review lies 5 %
  // below
  @ParameterizedTest
  @CsvSource({"40", "50", "60", "80", "100"})
  void elementsFromTheFirstExcitedLevelToHighLevelsMeetPublishedOnes(int n) {
    Level p = Level.parse("5P3/2");
    double scale = Math.pow(50.0 / n, 1.5);
    double s = RB_METHOD.dipole(p, Level.of(n, 0, 1)).correctedA0();
    double d = RB_METHOD.dipole(p, Level.of(n, 2, 5)).correctedA0();
    // the power law in n instead of n* = n - 3.13 (n - 1.35 for D) is itself off by some per cent
    double sScale = Math.pow((50 - 3.1312) / (n - 3.1312), 1.5);
    double dScale = Math.pow((50 - 1.3463) / (n - 1.3463), 1.5);
    assertEquals(0.014 * sScale, Math.abs(s), 0.02 * 0.014 * sScale);
    assertEquals(0.0249 * dScale, Math.abs(d), 0.02 * 0.0249 * dScale);
    assertEquals(0.024 * scale, Math.abs(d), 0.09 * 0.024 * scale);
  }

  // quantum-defect theory: per unit energy the element is constant, so R n*^1.5 is (Seaton, Rep.
  // Prog. Phys. 46, 167 (1983))
  @Property(seed = "20261206", tries = 20)
  void elementsToHighLevelsScaleWithTheInverseThreeHalvesPower(
      @ForAll @IntRange(min = 40, max = 110) int n) {
    Level p = Level.parse("6P3/2");
    Level near = Level.of(n, 0, 1);
    Level far = Level.of(n + 30, 0, 1);
    double first = RB_METHOD.dipole(p, near).correctedA0() * Math.pow(RB.effectiveN(near), 1.5);
    double second = RB_METHOD.dipole(p, far).correctedA0() * Math.pow(RB.effectiveN(far), 1.5);
    assertEquals(first, second, 0.01 * Math.abs(first));
  }

  // audit of the rows of the potential: its eigenvalue, found by integrating outward, must lie at
  // the measured level. Marinescu et al. 1994 fitted it to the levels of each l; measured
  // differences of the quantum defects 0.0002 (S) to 0.007 (P of caesium)
  @ParameterizedTest
  @CsvSource({
    "Rb-87,8S1/2",
    "Rb-87,8P1/2",
    "Rb-87,8P3/2",
    "Rb-87,8D3/2",
    "Rb-87,8D5/2",
    "Cs-133,9S1/2",
    "Cs-133,9P1/2",
    "Cs-133,9P3/2",
    "Cs-133,9D3/2",
    "Cs-133,9D5/2"
  })
  void eigenvaluesOfThePotentialMeetTheLevels(String name, String text) {
    Species species = Species.parse(name);
    Level level = Level.parse(text);
    ModelPotential potential = new ModelPotential(species, level.l(), level.doubledJ());
    double measured = species.effectiveN(level);
    double low = measured - 0.3;
    double high = measured + 0.3;
    double sign = divergence(potential, level.l(), low);
    assertTrue(sign * divergence(potential, level.l(), high) < 0);
    while (high - low > 1e-7) {
      double middle = (low + high) / 2;
      if (sign * divergence(potential, level.l(), middle) > 0) {
        low = middle;
      } else {
        high = middle;
      }
    }
    assertEquals(measured, low, 0.008, name + text);
  }

  /**
   * The sign with which the regular solution leaves towards infinity; it flips at an eigenvalue.
   */
  private static double divergence(ModelPotential potential, int l, double effectiveN) {
    double h = 0.004;
    double previous = 0;
    double f = 0;
    double y = Math.pow(h, 2 * l + 1.5);
    double fHere = f(potential, l, effectiveN, h, h);
    for (int i = 1; i * h < 14; i++) {
      double fNext = f(potential, l, effectiveN, (i + 1) * h, h);
      double next =
          i == 1 ? Math.pow(2 * h, 2 * l + 1.5) : ((12 - 10 * fHere) * y - f * previous) / fNext;
      previous = y;
      y = next;
      f = fHere;
      fHere = fNext;
    }
    return Math.signum(y);
  }

  private static double f(ModelPotential potential, int l, double effectiveN, double x, double h) {
    double x2 = x * x;
    double g =
        8 * x2 * (potential.energy(x2) + 0.5 / (effectiveN * effectiveN))
            + (2 * l + 0.5) * (2 * l + 1.5) / x2;
    return 1 - h * h / 12 * g;
  }

  @Test
  void theIntegralIsSymmetric() {
    RadialIntegral one = RB_METHOD.dipole(Level.parse("6P3/2"), Level.parse("68S1/2"));
    RadialIntegral two = RB_METHOD.dipole(Level.parse("68S1/2"), Level.parse("6P3/2"));
    assertEquals(one, two);
    assertEquals(one.correctedA0(), one.bareA0() + one.coreCorrectionA0());
    assertEquals(0, HYDROGEN.dipole(Level.parse("1S1/2"), Level.parse("2P1/2")).coreCorrectionA0());
    assertTrue(RB_METHOD.toString().contains("Rb-87"));
  }

  @Test
  void concurrentUseGivesTheSerialAnswer() {
    List<Level> levels = IntStream.range(20, 60).mapToObj(n -> Level.of(n, 1, 3)).toList();
    NumerovMethod shared = NumerovMethod.of(RB);
    List<RadialIntegral> parallel =
        levels.parallelStream().map(p -> shared.dipole(RB.groundLevel(), p)).toList();
    List<RadialIntegral> serial =
        levels.stream().map(p -> RB_METHOD.dipole(RB.groundLevel(), p)).toList();
    assertEquals(serial, parallel);
  }

  @Test
  void levelsOfTheCoreAreRefused() {
    assertThrows(
        IllegalArgumentException.class,
        () -> RB_METHOD.dipole(Level.parse("4S1/2"), Level.parse("5P1/2")));
  }
}
