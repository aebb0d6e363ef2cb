package org.toprung.core.structure;

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
 *
 * <p>Uncertainty of the sum: computed elements share one method, so their errors go the same way
 * and are added with the sign of their term, and a twentieth of each is taken as independent;
 * measured elements are independent.
 *
 * <p>Above n = 138 the levels above are out of reach, and the value is continued with the power of
 * n* it has between n = 128 and 138.
 */
public final class StaticPolarizability {
  private static final int SPECIES = 64;
  private static final BoundedCache<Species, StaticPolarizability> SHARED =
      new BoundedCache<>(SPECIES, StaticPolarizability::new);
  private static final int LEVELS = 2000;
  private static final int REACH = 12;
  private static final int LEAST_N = 25;
  private static final int LARGEST_SUMMED_N = Level.MAXIMUM_N - REACH;
  private static final int HIGH_L_MARGIN = 20;

  /** Part of the uncertainty of a computed element that it does not share with the others. */
  private static final double INDEPENDENT_PART = 0.05;

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
   * @throws IllegalArgumentException if the level belongs to the core or is not in the catalogue,
   *     or is degenerate with one of opposite parity, as the excited levels of hydrogen are
   */
  public Estimate scalarHertzPerFieldSquared(Level level) {
    return known.get(level).scalar();
  }

  /**
   * The tensor polarizability.
   *
   * @param level the level
   * @return α_2/h in Hz/(V/m)²; 0 for J = 1/2
   * @throws IllegalArgumentException if the level belongs to the core or is not in the catalogue,
   *     or is degenerate with one of opposite parity, as the excited levels of hydrogen are
   */
  public Estimate tensorHertzPerFieldSquared(Level level) {
    return known.get(level).tensor();
  }

  private Pair evaluate(Level level) {
    species.requireValid(level);
    if (level.n() > LARGEST_SUMMED_N && level.l() < LARGEST_SUMMED_N - HIGH_L_MARGIN) {
      return new Pair(
          HighLevels.continued(species, level, LARGEST_SUMMED_N, l -> known.get(l).scalar()),
          HighLevels.continued(species, level, LARGEST_SUMMED_N, l -> known.get(l).tensor()));
    }
    int doubledJ = level.doubledJ();
    double unit = PhysicalConstants.ATOMIC_POLARIZABILITY_HERTZ;
    Estimate core = species.corePolarizabilityAu();
    Sum mean = new Sum();
    Sum difference = new Sum();
    for (Level other : Partners.of(species, level, Math.max(level.n() + REACH, LEAST_N))) {
      DipoleElement element = elements.reduced(other, level);
      double distance = species.energyHertz(other).value() - species.energyHertz(level).value();
      if (distance == 0) {
        throw new IllegalArgumentException(
            level
                + " of "
                + species
                + " has no polarizability: it is degenerate with "
                + other
                + ", so that it shifts linearly with the field");
      }
      double factor = 2 * SecondOrder.COUPLING_SQUARED / distance;
      // the squared 3j symbols of one q add up to 1/3 over m
      double meanShare = 1.0 / (3 * (doubledJ + 1));
      double stretchedShare = SecondOrder.share(level, doubledJ, other, 0);
      mean.add(factor * meanShare, element);
      difference.add(factor * (stretchedShare - meanShare), element);
    }
    double outside = unit * Math.hypot(core.uncertainty(), SecondOrder.continuumAu(species, level));
    // the tensor factor is 1 at m = J
    return new Pair(
        new Estimate(mean.value + unit * core.value(), Math.hypot(mean.uncertainty(), outside)),
        doubledJ == 1
            ? new Estimate(0, 0)
            : new Estimate(difference.value, difference.uncertainty()));
  }

  /** A sum over levels with its uncertainty. */
  private static final class Sum {
    private double value;
    private double common;
    private double independentSquared;

    void add(double factor, DipoleElement element) {
      Estimate strength = element.strength();
      double error = factor * strength.uncertainty();
      value += factor * strength.value();
      if (element.origin() == DipoleElement.Origin.MEASURED) {
        independentSquared += error * error;
      } else {
        common += error;
        independentSquared += INDEPENDENT_PART * INDEPENDENT_PART * error * error;
      }
    }

    double uncertainty() {
      return Math.sqrt(common * common + independentSquared);
    }
  }
}
