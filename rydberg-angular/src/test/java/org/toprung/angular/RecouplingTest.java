package org.toprung.angular;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.SplittableRandom;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.constraints.IntRange;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class RecouplingTest {

  private static final HalfInteger HALF = HalfInteger.HALF;
  private static final HalfInteger THREE_HALVES = HalfInteger.ofHalves(3);

  private static HalfInteger h(int doubled) {
    return HalfInteger.ofHalves(doubled);
  }

  private static HalfInteger n(int integer) {
    return HalfInteger.of(integer);
  }

  /**
   * Validation: D. A. Steck, Rubidium 87 D Line Data, tables of relative hyperfine strengths (from
   * memory), I = 3/2; columns: twice J′, F, F′, strength.
   */
  @ParameterizedTest
  @CsvSource({
    "3, 2, 3, 0.7",
    "3, 2, 2, 0.25",
    "3, 2, 1, 0.05",
    "3, 1, 2, 0.4166666666666667",
    "3, 1, 1, 0.4166666666666667",
    "3, 1, 0, 0.16666666666666667",
    "3, 1, 3, 0",
    "1, 2, 2, 0.5",
    "1, 2, 1, 0.5",
    "1, 1, 2, 0.8333333333333334",
    "1, 1, 1, 0.16666666666666667"
  })
  void publishedHyperfineLineStrengths(int tjUpper, int f, int fUpper, double strength) {
    assertEquals(
        strength,
        Recoupling.relativeStrength(HALF, n(f), h(tjUpper), n(fUpper), THREE_HALVES, 1),
        1e-15);
  }

  @Property(seed = "501", tries = 200)
  void relativeStrengthsAddUpToOne(@ForAll @IntRange(min = 0, max = 3) int k, @ForAll long seed) {
    SplittableRandom random = new SplittableRandom(seed);
    int tj = random.nextInt(9);
    int ti = random.nextInt(15);
    int tjPrime = RandomArguments.third(random, tj, 2 * k, 30);
    int tf = RandomArguments.third(random, tj, ti, 60);
    double sum =
        HalfInteger.couplings(h(tjPrime), h(ti))
            .mapToDouble(f -> Recoupling.relativeStrength(h(tj), h(tf), h(tjPrime), f, h(ti), k))
            .sum();
    assertEquals(1, sum, 1e-13);
  }

  /** Cycling amplitude ⟨3/2 3/2|d₊₁|1/2 1/2⟩² = ⟨J′‖d‖J⟩²/4 in the 3j convention. */
  @Test
  void theCyclingTransitionHasAQuarterOfTheSquaredReducedElement() {
    double fine = Recoupling.wignerEckart(THREE_HALVES, THREE_HALVES, 1, 1, HALF, HALF);
    assertEquals(0.5, Math.abs(fine), 1e-15);
    double hyperfine =
        Recoupling.hyperfineElement(THREE_HALVES, THREE_HALVES, n(3), n(3), 1, 1, HALF, n(2), n(2));
    assertEquals(0.25, hyperfine * hyperfine, 1e-15);
    double mixed =
        Recoupling.hyperfineToFine(
            THREE_HALVES, THREE_HALVES, THREE_HALVES, 1, 1, HALF, THREE_HALVES, n(2), n(2));
    assertEquals(0.25, mixed * mixed, 1e-15);
  }

  /** |⟨S½‖r‖P½⟩| = √(2/3) R and |⟨S½‖r‖P3/2⟩| = √(4/3) R with ⟨0‖r‖1⟩ = √3 (0 1 1; 0 0 0) R. */
  @Test
  void fineStructureElementsOfAnSPLine() {
    double orbital = Math.sqrt(3) * Wigner.threeJDoubled(0, 2, 2, 0, 0, 0);
    double half = Recoupling.firstPart(n(0), HALF, HALF, n(1), HALF, 1) * orbital;
    double threeHalves = Recoupling.firstPart(n(0), HALF, HALF, n(1), THREE_HALVES, 1) * orbital;
    assertEquals(Math.sqrt(2.0 / 3), Math.abs(half), 1e-15);
    assertEquals(Math.sqrt(4.0 / 3), Math.abs(threeHalves), 1e-15);
  }

  /** Both reduction formulas against the sum over uncoupled states that they stand for. */
  @Property(seed = "502", tries = 300)
  void reducedElementsAreTheSumOverUncoupledStates(
      @ForAll @IntRange(min = 0, max = 3) int k, @ForAll long seed) {
    SplittableRandom random = new SplittableRandom(seed);
    int t1 = random.nextInt(7);
    int t2 = random.nextInt(8);
    int t1Prime = RandomArguments.third(random, t1, 2 * k, 20);
    int t = RandomArguments.third(random, t1, t2, 40);
    int tPrime = RandomArguments.third(random, t1Prime, t2, 40);
    int tm = RandomArguments.projection(random, t);
    int tmPrime = RandomArguments.projection(random, tPrime);
    int q = (tm - tmPrime) / 2;
    double first = 0;
    double second = 0;
    for (Recoupling.UncoupledTerm bra : Recoupling.uncouple(h(t1), h(t2), h(t), h(tm))) {
      for (Recoupling.UncoupledTerm ket :
          Recoupling.uncouple(h(t1Prime), h(t2), h(tPrime), h(tmPrime))) {
        if (bra.m2().equals(ket.m2())) {
          first +=
              bra.amplitude()
                  * ket.amplitude()
                  * Recoupling.wignerEckart(h(t1), bra.m1(), k, q, h(t1Prime), ket.m1());
        }
      }
    }
    // The same with the parts exchanged.
    for (Recoupling.UncoupledTerm bra : Recoupling.uncouple(h(t2), h(t1), h(t), h(tm))) {
      for (Recoupling.UncoupledTerm ket :
          Recoupling.uncouple(h(t2), h(t1Prime), h(tPrime), h(tmPrime))) {
        if (bra.m1().equals(ket.m1())) {
          second +=
              bra.amplitude()
                  * ket.amplitude()
                  * Recoupling.wignerEckart(h(t1), bra.m2(), k, q, h(t1Prime), ket.m2());
        }
      }
    }
    double outer = Recoupling.wignerEckart(h(t), h(tm), k, q, h(tPrime), h(tmPrime));
    assertEquals(
        first, outer * Recoupling.firstPart(h(t1), h(t2), h(t), h(t1Prime), h(tPrime), k), 1e-14);
    assertEquals(
        second, outer * Recoupling.secondPart(h(t2), h(t1), h(t), h(t1Prime), h(tPrime), k), 1e-14);
    assertEquals(
        first,
        Recoupling.hyperfineElement(
            h(t1), h(t2), h(t), h(tm), k, q, h(t1Prime), h(tPrime), h(tmPrime)),
        1e-14);
  }

  @Property(seed = "503", tries = 200)
  void theWayBackUndoesTheReduction(@ForAll @IntRange(min = 0, max = 2) int k, @ForAll long seed) {
    SplittableRandom random = new SplittableRandom(seed);
    int t1 = random.nextInt(7);
    int t2 = random.nextInt(8);
    int t1Prime = RandomArguments.third(random, t1, 2 * k, 20);
    int t = RandomArguments.third(random, t1, t2, 40);
    int tPrime = RandomArguments.third(random, t1Prime, t2, 40);
    double factor = Recoupling.firstPart(h(t1), h(t2), h(t), h(t1Prime), h(tPrime), k);
    if (factor == 0) {
      assertThrows(
          IllegalArgumentException.class,
          () -> Recoupling.firstPartFromCoupled(1, h(t1), h(t2), h(t), h(t1Prime), h(tPrime), k));
    } else {
      assertEquals(
          5.977,
          Recoupling.firstPartFromCoupled(
              5.977 * factor, h(t1), h(t2), h(t), h(t1Prime), h(tPrime), k),
          1e-14);
    }
  }

  @Test
  void anElementThatVanishesSaysWhy() {
    IllegalArgumentException e =
        assertThrows(
            IllegalArgumentException.class,
            () -> Recoupling.firstPartFromCoupled(0, n(0), HALF, HALF, n(2), THREE_HALVES, 1));
    assertTrue(
        e.getMessage().contains("<(0 1/2) 1/2||T^1||(2 1/2) 3/2>")
            && e.getMessage().contains("must form a triangle"),
        e.getMessage());
    // {2 2 2; 3/2 3/2 3/2} = 0 for no reason of selection.
    IllegalArgumentException accident =
        assertThrows(
            IllegalArgumentException.class,
            () ->
                Recoupling.firstPartFromCoupled(
                    0, THREE_HALVES, THREE_HALVES, n(2), THREE_HALVES, n(2), 2));
    assertTrue(accident.getMessage().contains("6j symbol is zero"), accident.getMessage());
  }

  /** Isotropy: the total strength from any sublevel of F to all of J′ is the same. */
  @Property(seed = "504", tries = 60)
  void summedHyperfineAmplitudesDoNotDependOnTheSublevel(
      @ForAll @IntRange(min = 0, max = 3) int k, @ForAll long seed) {
    SplittableRandom random = new SplittableRandom(seed);
    int tj = random.nextInt(6);
    int ti = random.nextInt(10);
    int tjPrime = RandomArguments.third(random, tj, 2 * k, 20);
    int tf = RandomArguments.third(random, tj, ti, 40);
    for (int tmF = -tf; tmF <= tf; tmF += 2) {
      double coupled = 0;
      double uncoupled = 0;
      for (int q = -k; q <= k; q++) {
        for (int tfPrime = Math.abs(tjPrime - ti); tfPrime <= tjPrime + ti; tfPrime += 2) {
          double a =
              Recoupling.hyperfineElement(
                  h(tjPrime), h(ti), h(tfPrime), h(tmF + 2 * q), k, q, h(tj), h(tf), h(tmF));
          coupled += a * a;
        }
        for (int tmI = -ti; tmI <= ti; tmI += 2) {
          double a =
              Recoupling.hyperfineToFine(
                  h(tjPrime), h(tmF + 2 * q - tmI), h(tmI), k, q, h(tj), h(ti), h(tf), h(tmF));
          uncoupled += a * a;
        }
      }
      assertEquals(1.0 / (tj + 1), coupled, 1e-13);
      assertEquals(1.0 / (tj + 1), uncoupled, 1e-13);
    }
  }

  @Property(seed = "505", tries = 100)
  void hyperfineToFineIsTheUncoupledUpperState(
      @ForAll @IntRange(min = 0, max = 2) int k, @ForAll long seed) {
    SplittableRandom random = new SplittableRandom(seed);
    int tj = random.nextInt(6);
    int ti = random.nextInt(10);
    int tjPrime = RandomArguments.third(random, tj, 2 * k, 20);
    int tf = RandomArguments.third(random, tj, ti, 40);
    int tmF = RandomArguments.projection(random, tf);
    int tmI = RandomArguments.projection(random, ti);
    int q = random.nextInt(2 * k + 1) - k;
    int tmJ = tmF + 2 * q - tmI;
    double sum = 0;
    for (int tfPrime = Math.abs(tjPrime - ti); tfPrime <= tjPrime + ti; tfPrime += 2) {
      sum +=
          Wigner.clebschGordanDoubled(tjPrime, tmJ, ti, tmI, tfPrime, tmF + 2 * q)
              * Recoupling.hyperfineElement(
                  h(tjPrime), h(ti), h(tfPrime), h(tmF + 2 * q), k, q, h(tj), h(tf), h(tmF));
    }
    assertEquals(
        sum,
        Recoupling.hyperfineToFine(h(tjPrime), h(tmJ), h(tmI), k, q, h(tj), h(ti), h(tf), h(tmF)),
        1e-14);
  }

  @Property(seed = "506", tries = 100)
  void uncouplingAndRecouplingIsTheIdentity(@ForAll long seed) {
    SplittableRandom random = new SplittableRandom(seed);
    int t1 = random.nextInt(60);
    int t2 = random.nextInt(60);
    int t = RandomArguments.third(random, t1, t2, 200);
    int tm = RandomArguments.projection(random, t);
    List<Recoupling.UncoupledTerm> terms = Recoupling.uncouple(h(t1), h(t2), h(t), h(tm));
    for (int other = Math.abs(t1 - t2); other <= t1 + t2; other += 2) {
      double overlap = 0;
      for (Recoupling.UncoupledTerm term : terms) {
        assertEquals(h(tm), term.m1().plus(term.m2()));
        overlap +=
            term.amplitude()
                * Wigner.clebschGordan(h(t1), term.m1(), h(t2), term.m2(), h(other), h(tm));
      }
      assertEquals(other == t ? 1 : 0, overlap, 1e-13);
    }
    for (int i = 1; i < terms.size(); i++) {
      assertTrue(terms.get(i - 1).m1().compareTo(terms.get(i).m1()) < 0);
    }
  }

  /** A scalar operator is diagonal: ⟨j m|1|j m⟩ = 1 with ⟨j‖1‖j⟩ = √(2j+1). */
  @Test
  void aScalarIsDiagonal() {
    for (int t = 0; t < 12; t++) {
      assertEquals(
          1, Recoupling.wignerEckart(h(t), h(t), 0, 0, h(t), h(t)) * Math.sqrt(t + 1.0), 1e-15);
    }
  }

  @Test
  void statesThatDoNotExistAndNegativeRanksAreRefused() {
    assertThrows(IllegalArgumentException.class, () -> Recoupling.uncouple(n(1), HALF, n(1), n(0)));
    IllegalArgumentException e =
        assertThrows(
            IllegalArgumentException.class, () -> Recoupling.uncouple(n(1), n(1), n(2), n(3)));
    assertTrue(e.getMessage().contains("|(1 1) 2 3>"), e.getMessage());
    assertThrows(
        IllegalArgumentException.class,
        () -> Recoupling.wignerEckart(n(1), n(0), -1, 0, n(1), n(0)));
    assertThrows(
        IllegalArgumentException.class,
        () -> Recoupling.firstPart(n(1), HALF, HALF, n(1), HALF, -1));
    assertThrows(
        IllegalArgumentException.class,
        () -> Recoupling.secondPart(HALF, n(1), HALF, n(1), HALF, -1));
    assertThrows(
        IllegalArgumentException.class,
        () -> Recoupling.relativeStrength(HALF, n(1), HALF, n(1), HALF, -1));
    assertEquals(0, Recoupling.wignerEckart(n(1), n(1), 1, 0, n(1), n(0)));
  }
}
