package org.toprung.core.structure;

import java.util.List;
import java.util.Locale;
import java.util.Set;
import java.util.stream.IntStream;
import org.toprung.angular.SphericalComponents;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.cache.BoundedCache;
import org.toprung.core.quantity.Estimate;
import org.toprung.core.quantity.PhysicalConstants;

/**
 * Light shifts of fine-structure sublevels by all levels that are far from resonance.
 *
 * <p>For a field E(t) = E0 cos ωt of unit polarization ε = Σ a_q e_q the shift of |a m⟩ is
 *
 * <p>ΔE = −(E0²/4) Σ_k [A_k/(E_k − E_a − ħω) + B_k/(E_k − E_a + ħω)],
 *
 * <p>A_k = Σ_q |a_q|² |⟨k m+q|d_q|a m⟩|² (absorbing first), B_k = Σ_q |a_q|² |⟨k m−q|d_−q|a m⟩|²
 * (emitting first); the nuclear spin is a spectator. The polarizability of the core adds −α_c
 * E0²/4, taken static. Terms that would mix different m are left out: this is the diagonal shift.
 *
 * <p><b>Above the ionization threshold of the level</b>, where a laser photon could free the
 * electron, the sum over the continuum is done by closure: with Σ(A_k − B_k) = 0 and the
 * Thomas-Reiche-Kuhn sum rule the same expression is
 *
 * <p>ΔE = e²E0²/(4mω²) + (E0²/4) Σ_k (ω_k/ω)² [A_k/(ħω − ħω_k) − B_k/(ħω + ħω_k)], ħω_k = E_k −
 * E_a:
 *
 * <p>the energy of a free electron in the field, and a sum that low-lying levels dominate.
 *
 * <p><b>Near levels</b> are those the caller treats without perturbation theory: of them the
 * resonant term (the first of an upper level, the second of a lower one) is left out, the other is
 * kept.
 *
 * <p>Uncertainty: that of the elements; 5 % of the core part; without closure a part for the
 * continuum, as for {@link StaticPolarizability}.
 */
public final class FarLightShift {
  private static final int SPECIES = 64;
  private static final BoundedCache<Species, FarLightShift> SHARED =
      new BoundedCache<>(SPECIES, FarLightShift::new);

  /** Largest n of the levels summed; higher ones weigh as n^−3 and belong to the remainder. */
  private static final int LARGEST_N = 25;

  private static final double CORE_TRUST = 0.05;

  private static final int SUBLEVELS = 500;

  private record Sublevel(Level level, int doubledMj) {
    // by hand: those of a record are slow to start
    @Override
    public boolean equals(Object other) {
      return other instanceof Sublevel that
          && that.level.equals(level)
          && that.doubledMj == doubledMj;
    }

    @Override
    public int hashCode() {
      return 31 * level.hashCode() + doubledMj;
    }
  }

  /** A level of the sum; shares are those of r_−1, r_0, r_+1 acting on the sublevel. */
  private record Term(Level other, double distanceHertz, Estimate strength, double[] shares) {
    double absorbing(SphericalComponents light) {
      return light.power(-1) * shares[0] + light.power(0) * shares[1] + light.power(1) * shares[2];
    }

    double emitting(SphericalComponents light) {
      return light.power(-1) * shares[2] + light.power(0) * shares[1] + light.power(1) * shares[0];
    }
  }

  private final Species species;
  private final DipoleElements elements;
  private final BoundedCache<Sublevel, List<Term>> terms;

  private FarLightShift(Species species) {
    this.species = species;
    this.elements = DipoleElements.of(species);
    this.terms = new BoundedCache<>(SUBLEVELS, this::terms);
  }

  /**
   * The light shifts of an atom.
   *
   * @param species the atom
   * @return the light shifts; one shared instance for each species
   */
  public static FarLightShift of(Species species) {
    return SHARED.get(species);
  }

  /**
   * The shift of a sublevel divided by the square of the field amplitude.
   *
   * @param level the level
   * @param doubledMj twice the projection of its j on the axis of the polarization components
   * @param laserFrequencyHertz frequency of the light in Hz, positive
   * @param polarization components of the unit polarization vector about the axis of mJ
   * @param nearLevels levels whose resonant term is left out
   * @return shift/h in Hz/(V/m)², to be multiplied by E0²; positive where the level moves up
   * @throws IllegalArgumentException if the level belongs to the core or is not in the catalogue,
   *     the projection is none of the level, or the frequency is not positive and finite or exactly
   *     that of a transition to a level that is not near
   */
  public Estimate hertzPerFieldSquared(
      Level level,
      int doubledMj,
      double laserFrequencyHertz,
      SphericalComponents polarization,
      Set<Level> nearLevels) {
    species.requireValid(level);
    SecondOrder.requireProjection(level, doubledMj);
    if (!(laserFrequencyHertz > 0 && laserFrequencyHertz < Double.POSITIVE_INFINITY)) {
      throw new IllegalArgumentException(
          String.format(
              Locale.ROOT,
              "laser frequency must be positive and finite, given %s Hz",
              laserFrequencyHertz));
    }
    boolean closure = laserFrequencyHertz > thresholdHertz(level);
    double coreAu = species.corePolarizabilityAu().value();
    double unit = PhysicalConstants.ATOMIC_POLARIZABILITY_HERTZ / 4;
    double shift = -unit * coreAu;
    double freeElectronAu = Math.pow(PhysicalConstants.HARTREE_HERTZ / laserFrequencyHertz, 2);
    double uncertainty = unit * CORE_TRUST * coreAu;
    if (closure) {
      shift += unit * freeElectronAu;
    } else {
      uncertainty += unit * SecondOrder.continuumAu(species, level);
    }
    for (Term term : terms.get(new Sublevel(level, doubledMj))) {
      double absorbing = term.absorbing(polarization);
      double emitting = term.emitting(polarization);
      boolean near = nearLevels.contains(term.other());
      if (!near && Math.abs(term.distanceHertz()) == laserFrequencyHertz) {
        throw new IllegalArgumentException(
            "light of "
                + laserFrequencyHertz
                + " Hz is on the resonance of "
                + level
                + " with "
                + term.other()
                + ", where there is no second-order shift");
      }
      double sum =
          closure
              ? remainder(absorbing, emitting, term.distanceHertz(), laserFrequencyHertz, near)
              : direct(absorbing, emitting, term.distanceHertz(), laserFrequencyHertz, near);
      double factor = SecondOrder.COUPLING_SQUARED / 4 * sum;
      shift += factor * term.strength().value();
      uncertainty += Math.abs(factor) * term.strength().uncertainty();
    }
    return new Estimate(shift, uncertainty);
  }

  /**
   * The same shift for a superposition of sublevels of one level, as a function of the laser
   * frequency.
   *
   * @param level the level
   * @param doubledMj twice the projections of its j, one for each member of the superposition
   * @param weight squared amplitudes of the members, of the same length, which sum to 1
   * @param laserFrequencyHertz frequency of the light in Hz that the series is made for, positive
   * @param polarization components of the unit polarization vector about the axis of mJ
   * @param nearLevels levels whose resonant term is left out
   * @return the shift as a function of the laser frequency near the given one
   * @throws IllegalArgumentException as for {@link #hertzPerFieldSquared}, or if the arrays differ
   *     in length
   */
  public FarShiftSeries series(
      Level level,
      int[] doubledMj,
      double[] weight,
      double laserFrequencyHertz,
      SphericalComponents polarization,
      Set<Level> nearLevels) {
    species.requireValid(level);
    if (doubledMj.length != weight.length) {
      throw new IllegalArgumentException(
          "a superposition needs a weight for each projection: given "
              + weight.length
              + " weights of "
              + doubledMj.length
              + " projections");
    }
    boolean closure = laserFrequencyHertz > thresholdHertz(level);
    FarShiftSeries.Gatherer sum = new FarShiftSeries.Gatherer(laserFrequencyHertz, closure);
    double unit = PhysicalConstants.ATOMIC_POLARIZABILITY_HERTZ / 4;
    for (int c = 0; c < doubledMj.length; c++) {
      SecondOrder.requireProjection(level, doubledMj[c]);
      sum.constant(-weight[c] * unit * species.corePolarizabilityAu().value());
      if (closure) {
        sum.linear(weight[c] * unit * Math.pow(PhysicalConstants.HARTREE_HERTZ, 2), 0);
      }
      for (Term term : terms.get(new Sublevel(level, doubledMj[c]))) {
        boolean near = nearLevels.contains(term.other());
        gather(sum, term, weight[c], polarization, closure, near);
      }
    }
    return sum.gathered();
  }

  /** The terms of {@link #direct} and {@link #remainder} by their poles. */
  private static void gather(
      FarShiftSeries.Gatherer sum,
      Term term,
      double weight,
      SphericalComponents polarization,
      boolean closure,
      boolean near) {
    double scale = weight * SecondOrder.COUPLING_SQUARED / 4 * term.strength().value();
    double absorbing = scale * term.absorbing(polarization);
    double emitting = scale * term.emitting(polarization);
    double distance = term.distanceHertz();
    double squared = closure ? distance * distance : 1;
    boolean leaveAbsorbing = near && distance > 0;
    boolean leaveEmitting = near && distance <= 0;
    if (!leaveAbsorbing) {
      sum.pole(distance, -absorbing * squared);
    } else if (closure) {
      sum.linear(-absorbing * distance, -absorbing);
    }
    if (!leaveEmitting) {
      sum.pole(-distance, emitting * squared);
    } else if (closure) {
      sum.linear(-emitting * distance, emitting);
    }
  }

  /**
   * The laser frequency that frees the electron of a level: above it the sum over states is closed
   * over the continuum.
   *
   * @param level a level of the atom
   * @return its binding energy over h, Hz
   */
  public double thresholdHertz(Level level) {
    return -species.energyHertz(level).value();
  }

  /**
   * How far light is from the nearest transition of a level; second order wants the shift to be
   * much smaller than that.
   *
   * @param level the level
   * @param laserFrequencyHertz frequency of the light in Hz
   * @return the distance, Hz, at least 0
   * @throws IllegalArgumentException if the level belongs to the core or is not in the catalogue
   */
  public double distanceToResonanceHertz(Level level, double laserFrequencyHertz) {
    species.requireValid(level);
    double energy = species.energyHertz(level).value();
    return Partners.of(species, level, LARGEST_N).stream()
        .mapToDouble(other -> Math.abs(species.energyHertz(other).value() - energy))
        .map(transition -> Math.abs(transition - laserFrequencyHertz))
        .min()
        .orElseThrow();
  }

  private List<Term> terms(Sublevel sublevel) {
    Level level = sublevel.level();
    double energy = species.energyHertz(level).value();
    return Partners.of(species, level, LARGEST_N).stream()
        .map(
            other ->
                new Term(
                    other,
                    species.energyHertz(other).value() - energy,
                    elements.reduced(other, level).strength(),
                    IntStream.rangeClosed(-1, 1)
                        .mapToDouble(q -> SecondOrder.share(level, sublevel.doubledMj(), other, q))
                        .toArray()))
        .toList();
  }

  /** The two terms of a level, with the sign of a shift, in 1/Hz. */
  private static double direct(
      double absorbing, double emitting, double distance, double laser, boolean near) {
    double first = near && distance > 0 ? 0 : absorbing / (distance - laser);
    double second = near && distance <= 0 ? 0 : emitting / (distance + laser);
    return -(first + second);
  }

  /** What a level adds to the free-electron shift, in 1/Hz. */
  private static double remainder(
      double absorbing, double emitting, double distance, double laser, boolean near) {
    double ratio = distance / laser;
    // taking the resonant term out of the closed sum leaves these finite expressions
    double first =
        near && distance > 0
            ? -absorbing * (distance + laser) / (laser * laser)
            : absorbing * ratio * ratio / (laser - distance);
    double second =
        near && distance <= 0
            ? emitting * (laser - distance) / (laser * laser)
            : -emitting * ratio * ratio / (laser + distance);
    return first + second;
  }
}
