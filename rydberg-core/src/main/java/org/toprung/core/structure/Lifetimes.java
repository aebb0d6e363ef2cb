package org.toprung.core.structure;

import java.util.Map;
import java.util.Optional;
import java.util.concurrent.ConcurrentHashMap;
import org.toprung.core.atom.Datum;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.cache.BoundedCache;
import org.toprung.core.quantity.Estimate;
import org.toprung.core.quantity.PhysicalConstants;
import org.toprung.core.quantity.Temperature;

/**
 * Decay rates of levels: spontaneous, and driven by blackbody radiation to other bound levels (in and
 * out of which the atom leaves the level). Ionization by blackbody radiation is left out; it adds a few
 * per cent to the blackbody rate at room temperature (Beterov, Ryabtsev, Tretyakov and Entin, Phys.
 * Rev. A 79, 052504 (2009)).
 *
 * <p>A = ω³ |⟨‖d‖⟩|² / (3π ε0 ħ c³ (2J+1)) summed over lower levels; blackbody: the same expression
 * times the photon number 1/(e^{ħω/kT} − 1), over levels below and above.
 */
public final class Lifetimes {
  private static final Map<Species, Lifetimes> SHARED = new ConcurrentHashMap<>();
  private static final int LEVELS = 2000;

  /** Levels above by more than this in n take less than 1 % of the blackbody rate. */
  private static final int REACH = 25;

  /** Rate coefficient, (e a0)² (2π)³ / (3π ε0 ħ c³) in s⁻¹ per Hz³ a0². */
  private static final double COEFFICIENT =
      Math.pow(PhysicalConstants.ATOMIC_DIPOLE, 2)
          * Math.pow(2 * Math.PI / PhysicalConstants.SPEED_OF_LIGHT, 3)
          / (3
              * Math.PI
              * PhysicalConstants.VACUUM_PERMITTIVITY
              * PhysicalConstants.REDUCED_PLANCK);

  private record Warm(Level level, Temperature temperature) {}

  private final Species species;
  private final DipoleElements elements;
  private final BoundedCache<Level, Estimate> spontaneous;
  private final BoundedCache<Warm, Estimate> blackbody;

  private Lifetimes(Species species) {
    this.species = species;
    this.elements = DipoleElements.of(species);
    this.spontaneous = new BoundedCache<>(LEVELS, this::spontaneous);
    this.blackbody = new BoundedCache<>(LEVELS, this::blackbody);
  }

  /**
   * The lifetimes of an atom.
   *
   * @param species the atom
   * @return the lifetimes; one shared instance for each species
   */
  public static Lifetimes of(Species species) {
    return SHARED.computeIfAbsent(species, Lifetimes::new);
  }

  /**
   * The rate of spontaneous decay to all lower levels: the inverse of the measured lifetime where there
   * is one.
   *
   * @param level the level
   * @return rate in s⁻¹; 0 for the ground level
   * @throws IllegalArgumentException if the level belongs to the core or is not in the catalogue
   */
  public Estimate spontaneousRatePerSecond(Level level) {
    return spontaneous.get(level);
  }

  /**
   * The rate at which blackbody radiation moves the atom to other bound levels.
   *
   * @param level the level
   * @param temperature temperature of the surroundings
   * @return rate in s⁻¹; 0 at 0 K. For n above 125 the levels beyond n = 150 are missing; their part
   *     is counted in the uncertainty
   * @throws IllegalArgumentException if the level belongs to the core or is not in the catalogue
   */
  public Estimate blackbodyRatePerSecond(Level level, Temperature temperature) {
    return blackbody.get(new Warm(level, temperature));
  }

  private Estimate spontaneous(Level level) {
    species.requireValid(level);
    Optional<Datum> measured = species.datum(Datum.Kind.LIFETIME, level.toString());
    if (measured.isPresent()) {
      Estimate lifetime = measured.get().estimate();
      return new Estimate(1 / lifetime.value(), lifetime.relative() / lifetime.value());
    }
    return computedSpontaneous(level);
  }

  /** The sum over lower levels, also where a lifetime is measured. */
  Estimate computedSpontaneous(Level level) {
    double energy = species.energyHertz(level).value();
    double rate = 0;
    double uncertainty = 0;
    // a level lower in energy can have a larger n by the few units that quantum defects differ
    for (Level lower : Partners.of(species, level, level.n() + species.groundLevel().n())) {
      double frequency = energy - species.energyHertz(lower).value();
      if (frequency > 0) {
        Estimate part = rate(level, lower, frequency);
        rate += part.value();
        // errors of one model go the same way: they add up
        uncertainty += part.uncertainty();
      }
    }
    return new Estimate(rate, uncertainty);
  }

  private Estimate blackbody(Warm warm) {
    Level level = species.requireValid(warm.level());
    double thermalHertz =
        PhysicalConstants.BOLTZMANN / PhysicalConstants.PLANCK * warm.temperature().kelvin();
    if (thermalHertz == 0) {
      return new Estimate(0, 0);
    }
    double energy = species.energyHertz(level).value();
    double rate = 0;
    double uncertainty = 0;
    int missing = level.n() + REACH - Level.MAXIMUM_N;
    for (Level other : Partners.of(species, level, level.n() + REACH)) {
      double frequency = Math.abs(energy - species.energyHertz(other).value());
      Estimate part = rate(level, other, frequency);
      double photons = 1 / Math.expm1(frequency / thermalHertz);
      rate += part.value() * photons;
      uncertainty += part.uncertainty() * photons;
      // what lies as far above as the grid of levels no longer reaches has its mirror below
      if (level.n() - other.n() > REACH - missing && level.n() - other.n() <= REACH) {
        uncertainty += part.value() * photons;
      }
    }
    return new Estimate(rate, uncertainty);
  }

  private Estimate rate(Level from, Level to, double frequencyHertz) {
    Estimate strength = elements.reduced(from, to).strength();
    double factor =
        COEFFICIENT * frequencyHertz * frequencyHertz * frequencyHertz / (from.doubledJ() + 1);
    return new Estimate(factor * strength.value(), factor * strength.uncertainty());
  }
}
