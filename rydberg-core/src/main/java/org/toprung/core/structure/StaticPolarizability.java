package org.toprung.core.structure;

import java.util.List;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.cache.BoundedCache;
import org.toprung.core.quantity.Estimate;
import org.toprung.core.quantity.PhysicalConstants;

/**
 * Static electric polarizabilities of fine-structure levels by sums over states.
 *
 * <p>Convention: shift/h = −½ α(m) E², α(m) = α_0 + α_2 (3m² − J(J+1))/(J(2J−1)), for a static
 * field along the axis of m (for example Mitroy, Safronova and Clark, J. Phys. B 43, 202001
 * (2010)). α(m) = 2 Σ |⟨k m|ez|a m⟩|²/(E_k − E_a), plus the polarizability of the core. The fine
 * structure is resolved, hyperfine structure is not. The field must be so weak that the shift is
 * small against the distance to the next level.
 *
 * <p>The continuum is left out. In its place stands an uncertainty of 1 atomic unit for the ground
 * level and of a tenth of 1/E² (E the binding energy, atomic units) for others, which is nothing
 * against the polarizability of Rydberg levels.
 */
public final class StaticPolarizability {
  private static final int SPECIES = 64;
  private static final BoundedCache<Species, StaticPolarizability> SHARED =
      new BoundedCache<>(SPECIES, StaticPolarizability::new);
  private static final int LEVELS = 2000;
  private static final int REACH = 12;
  private static final int LEAST_N = 25;

  private record Pair(Estimate scalar, Estimate tensor) {}

  private final Species species;
  private final DipoleElements elements;
  private final BoundedCache<Level, Pair> known;

  private StaticPolarizability(Species species) {
    this.species = species;
    this.elements = DipoleElements.of(species);
    this.known = new BoundedCache<>(LEVELS, this::evaluate);
  }

  /**
   * The polarizabilities of an atom.
   *
   * @param species the atom
   * @return the polarizabilities; one shared instance for each species
   */
  public static StaticPolarizability of(Species species) {
    return SHARED.get(species);
  }

  /**
   * The scalar polarizability.
   *
   * @param level the level
   * @return α_0/h in Hz/(V/m)²
   * @throws IllegalArgumentException if the level belongs to the core or is not in the catalogue
   */
  public Estimate scalarHertzPerFieldSquared(Level level) {
    return known.get(level).scalar();
  }

  /**
   * The tensor polarizability.
   *
   * @param level the level
   * @return α_2/h in Hz/(V/m)²; 0 for J = 1/2
   * @throws IllegalArgumentException if the level belongs to the core or is not in the catalogue
   */
  public Estimate tensorHertzPerFieldSquared(Level level) {
    return known.get(level).tensor();
  }

  private Pair evaluate(Level level) {
    species.requireValid(level);
    List<Level> partners = Partners.of(species, level, Math.max(level.n() + REACH, LEAST_N));
    int doubledJ = level.doubledJ();
    double core = species.corePolarizabilityAu().value();
    double unit = PhysicalConstants.ATOMIC_POLARIZABILITY_HERTZ;
    double mean = unit * core;
    double meanError =
        unit
            * Math.hypot(
                species.corePolarizabilityAu().uncertainty(),
                SecondOrder.continuumAu(species, level));
    double stretched = mean;
    double differenceError = 0;
    for (Level other : partners) {
      Estimate strength = elements.reduced(other, level).strength();
      double factor =
          2
              * SecondOrder.COUPLING_SQUARED
              / (species.energyHertz(other).value() - species.energyHertz(level).value());
      // the squared 3j symbols of one q add up to 1/3 over m
      double meanShare = 1.0 / (3 * (doubledJ + 1));
      double stretchedShare = SecondOrder.share(level, doubledJ, other, 0);
      mean += factor * strength.value() * meanShare;
      stretched += factor * strength.value() * stretchedShare;
      meanError += Math.abs(factor) * strength.uncertainty() * meanShare;
      differenceError += Math.abs(factor * (stretchedShare - meanShare)) * strength.uncertainty();
    }
    // the tensor factor is 1 at m = J
    return new Pair(
        new Estimate(mean, meanError),
        doubledJ == 1 ? new Estimate(0, 0) : new Estimate(stretched - mean, differenceError));
  }
}
