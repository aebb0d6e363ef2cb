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
 * Decay rates of levels: spontaneous, and driven by blackbody radiation to all other levels and
 * into the continuum.
 *
 * <p>A = ω³ |⟨‖d‖⟩|² / (3π ε0 ħ c³ (2J+1)) summed over lower levels; blackbody: the same expression
 * times the photon number 1/(e^{ħω/kT} − 1), over levels below and above (Gallagher and Cooke,
 * Phys. Rev. Lett. 42, 835 (1979)). Beyond the levels summed one by one, the line strength per unit
 * of energy, which is continuous across the ionization limit, is continued with the power of ω that
 * it follows at the end of the sum, and integrated; this part is trusted to 20 %.
 */
public final class Lifetimes {
  private static final Map<Species, Lifetimes> SHARED = new ConcurrentHashMap<>();
  private static final int LEVELS = 2000;

  /** Levels above by up to this in n are summed one by one. */
  private static final int REACH = 25;

  /** Levels that must be left above for the continuation. */
  private static final int LEAST_REACH = 10;

  private static final double CONTINUATION_TRUST = 0.2;

  /** The power of ω is −10/3 between neighbours and steeper in the continuum. */
  private static final double STEEPEST = -6;

  private static final double FLATTEST = -2;

  private static final int INTEGRATION_STEPS = 100;

  /** Photon energies in units of kT beyond which there are none. */
  private static final double HARDEST_PHOTON = 40;

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
   * The rate of spontaneous decay to all lower levels: the inverse of the measured lifetime where
   * there is one.
   *
   * @param level the level
   * @return rate in s⁻¹; 0 for the ground level
   * @throws IllegalArgumentException if the level belongs to the core or is not in the catalogue
   */
  public Estimate spontaneousRatePerSecond(Level level) {
    return spontaneous.get(level);
  }

  /**
   * The rate at which blackbody radiation takes the atom out of a level, to other levels or into
   * the continuum.
   *
   * @param level the level, n up to 140
   * @param temperature temperature of the surroundings
   * @return rate in s⁻¹; 0 at 0 K
   * @throws IllegalArgumentException if the level belongs to the core or is not in the catalogue,
   *     or if n is above 140
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
    int last = Math.min(level.n() + REACH, Level.MAXIMUM_N);
    if (last < level.n() + LEAST_REACH) {
      throw new IllegalArgumentException(
          "the blackbody rate of "
              + level
              + " needs the levels above it; n must be at most "
              + (Level.MAXIMUM_N - LEAST_REACH));
    }
    double energy = species.energyHertz(level).value();
    double rate = 0;
    double uncertainty = 0;
    for (Level other : Partners.of(species, level, last)) {
      double frequency = Math.abs(energy - species.energyHertz(other).value());
      Estimate part = rate(level, other, frequency);
      double photons = 1 / Math.expm1(frequency / thermalHertz);
      rate += part.value() * photons;
      uncertainty += part.uncertainty() * photons;
      if (other.n() == last) {
        double beyond = continuation(level, other, thermalHertz);
        rate += beyond;
        uncertainty += CONTINUATION_TRUST * beyond;
      }
    }
    return new Estimate(rate, uncertainty);
  }

  /** The rate into the levels beyond the last one of its series and into the continuum. */
  private double continuation(Level level, Level last, double thermalHertz) {
    double energy = species.energyHertz(level).value();
    Level middle = Level.of((level.n() + last.n()) / 2, last.l(), last.doubledJ());
    double frequency = species.energyHertz(last).value() - energy;
    double density = strengthDensity(level, last);
    double middleFrequency = species.energyHertz(middle).value() - energy;
    double power =
        Math.log(density / strengthDensity(level, middle)) / Math.log(frequency / middleFrequency);
    power = Math.max(STEEPEST, Math.min(FLATTEST, power));
    // the levels end half a level beyond the last one
    double n = species.effectiveN(last) + 0.5;
    double from = -species.rydbergHertz() / (n * n) - energy;
    double step = Math.log(Math.max(2, HARDEST_PHOTON * thermalHertz / from)) / INTEGRATION_STEPS;
    double sum = 0;
    for (int i = 0; i < INTEGRATION_STEPS; i++) {
      double nu = from * Math.exp((i + 0.5) * step);
      sum +=
          density
              * Math.pow(nu / frequency, power)
              * nu
              * nu
              * nu
              * nu
              / Math.expm1(nu / thermalHertz);
    }
    return COEFFICIENT / (level.doubledJ() + 1) * sum * step;
  }

  /** Line strength per Hz of the series of a level, at that level. */
  private double strengthDensity(Level from, Level to) {
    double spacing = 2 * species.rydbergHertz() / Math.pow(species.effectiveN(to), 3);
    return elements.reduced(from, to).strength().value() / spacing;
  }

  private Estimate rate(Level from, Level to, double frequencyHertz) {
    Estimate strength = elements.reduced(from, to).strength();
    double factor =
        COEFFICIENT * frequencyHertz * frequencyHertz * frequencyHertz / (from.doubledJ() + 1);
    return new Estimate(factor * strength.value(), factor * strength.uncertainty());
  }
}
