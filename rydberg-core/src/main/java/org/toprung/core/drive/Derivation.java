package org.toprung.core.drive;

import java.util.List;
import org.toprung.angular.HalfInteger;
import org.toprung.core.structure.DipoleElement;

/**
 * How the effective Rabi frequency of a drive of one or two steps comes about, as one would write
 * it down to check it by hand.
 *
 * <ol>
 *   <li>Each beam gives a field E and, about the magnetic field, polarization components a(q).
 *   <li>A leg from one sublevel to the next has the Rabi frequency Ω = E (e a0/h) d A with the
 *       reduced element d in a0 and A = a(q) Σ ± c′ c (J′ 1 J; −m′ q m), summed over the nuclear
 *       projections that both sublevels hold, ± being (−1)<sup>J′−m′</sup>.
 *   <li>A path through an intermediate sublevel contributes Ω1Ω2/(2Δ + iγ/2π), Δ being the light
 *       minus the transition, from the start as far-off-resonant levels have moved it, and γ the
 *       decay rate; for sublevels of a partner level that is eliminated γ and that move are left
 *       out. Contributions to the same target add with their signs.
 *   <li>The effective Rabi frequency is the root of the summed squares over the targets, which
 *       differ in their nuclear projection.
 * </ol>
 *
 * <p>Immutable and thread-safe.
 *
 * @param title the coupling in words
 * @param lights the beams, one for each step
 * @param elements the reduced dipole elements that occur
 * @param paths the paths, by target and largest first
 * @param targets the sums of the paths for each target
 * @param rabiHertz effective Rabi frequency over 2π, Hz
 * @param relativeUncertainty relative standard uncertainty of it, from the dipole elements
 */
public record Derivation(
    String title,
    List<Light> lights,
    List<Reduced> elements,
    List<Path> paths,
    List<Target> targets,
    double rabiHertz,
    double relativeUncertainty) {

  /**
   * The light of one step at the atom.
   *
   * @param step number of the step, from 1
   * @param beam the beam in words
   * @param voltsPerMetre field amplitude E of E cos ωt, V/m
   * @param components polarization components about the magnetic field, for q = −1, 0, +1
   */
  public record Light(int step, String beam, double voltsPerMetre, List<Complex> components) {
    /**
     * Copies the list.
     *
     * @param step number of the step
     * @param beam the beam in words
     * @param voltsPerMetre field amplitude, V/m
     * @param components polarization components
     */
    public Light {
      components = List.copyOf(components);
    }
  }

  /**
   * A complex number.
   *
   * @param re real part
   * @param im imaginary part
   */
  public record Complex(double re, double im) {
    /**
     * The modulus.
     *
     * @return √(re² + im²)
     */
    public double abs() {
      return Math.hypot(re, im);
    }

    Complex times(Complex other) {
      return new Complex(re * other.re - im * other.im, re * other.im + im * other.re);
    }

    Complex times(double factor) {
      return new Complex(factor * re, factor * im);
    }

    Complex plus(Complex other) {
      return new Complex(re + other.re, im + other.im);
    }

    Complex over(Complex other) {
      double square = other.re * other.re + other.im * other.im;
      return times(new Complex(other.re / square, -other.im / square));
    }
  }

  /**
   * A reduced dipole element.
   *
   * @param upper name of the upper level
   * @param lower name of the lower level
   * @param element ⟨upper‖r‖lower⟩ with uncertainty, origin and source
   */
  public record Reduced(String upper, String lower, DipoleElement element) {}

  /**
   * What one nuclear projection adds to the angular factor of a leg.
   *
   * @param upperMj projection of J in the upper sublevel
   * @param lowerMj projection of J in the lower sublevel
   * @param mI nuclear projection, of both
   * @param sign (−1) to the power J′ − m′
   * @param upperAmplitude amplitude of |mJ′, mI⟩ in the upper sublevel
   * @param lowerAmplitude amplitude of |mJ, mI⟩ in the lower sublevel
   * @param threeJ the 3j symbol (J′ 1 J; −mJ′ q mJ)
   */
  public record AngularTerm(
      HalfInteger upperMj,
      HalfInteger lowerMj,
      HalfInteger mI,
      int sign,
      double upperAmplitude,
      double lowerAmplitude,
      double threeJ) {
    /**
     * The product of the factors.
     *
     * @return sign · amplitudes · 3j
     */
    public double value() {
      return sign * upperAmplitude * lowerAmplitude * threeJ;
    }
  }

  /**
   * One photon of a path.
   *
   * @param step number of the step, from 1
   * @param lower name of the lower sublevel
   * @param upper name of the upper sublevel
   * @param upperLevel name of the upper level
   * @param lowerLevel name of the lower level
   * @param q change of the projection, −1, 0 or +1
   * @param terms the terms of the angular factor
   * @param angular the angular factor A, light included
   * @param rabiHertz Rabi frequency over 2π with its phase, Hz
   */
  public record Leg(
      int step,
      String lower,
      String upper,
      String upperLevel,
      String lowerLevel,
      int q,
      List<AngularTerm> terms,
      Complex angular,
      Complex rabiHertz) {
    /**
     * Copies the list.
     *
     * @param step number of the step
     * @param lower name of the lower sublevel
     * @param upper name of the upper sublevel
     * @param upperLevel name of the upper level
     * @param lowerLevel name of the lower level
     * @param q change of the projection
     * @param terms the terms of the angular factor
     * @param angular the angular factor A
     * @param rabiHertz Rabi frequency over 2π, Hz
     */
    public Leg {
      terms = List.copyOf(terms);
    }
  }

  /**
   * One path from the start to a target.
   *
   * @param target name of the target sublevel
   * @param via name of the intermediate sublevel; empty for a single step
   * @param legs one leg for each step
   * @param detuningHertz light minus transition of the first leg, Hz; 0 for a single step
   * @param decayPerSecond decay rate that counts, 1/s; 0 for a single step and for eliminated
   *     levels
   * @param contributionHertz what it adds to the Rabi frequency over 2π, Hz
   */
  public record Path(
      String target,
      String via,
      List<Leg> legs,
      double detuningHertz,
      double decayPerSecond,
      Complex contributionHertz) {
    /**
     * Copies the list.
     *
     * @param target name of the target sublevel
     * @param via name of the intermediate sublevel
     * @param legs one leg for each step
     * @param detuningHertz light minus transition, Hz
     * @param decayPerSecond decay rate that counts, 1/s
     * @param contributionHertz what it adds, Hz
     */
    public Path {
      legs = List.copyOf(legs);
    }
  }

  /**
   * The sum of all paths to one target.
   *
   * @param target name of the target sublevel
   * @param sumHertz the sum, Hz
   */
  public record Target(String target, Complex sumHertz) {}

  /**
   * Copies the lists.
   *
   * @param title the coupling in words
   * @param lights the beams
   * @param elements the reduced dipole elements
   * @param paths the paths
   * @param targets the sums for each target
   * @param rabiHertz effective Rabi frequency over 2π, Hz
   * @param relativeUncertainty relative standard uncertainty
   */
  public Derivation {
    lights = List.copyOf(lights);
    elements = List.copyOf(elements);
    paths = List.copyOf(paths);
    targets = List.copyOf(targets);
  }

  /**
   * The working in words and numbers, for people.
   *
   * @return lines ended by line feeds; numbers have seven digits, frequencies are in MHz
   */
  public String text() {
    return DerivationText.of(this);
  }
}
