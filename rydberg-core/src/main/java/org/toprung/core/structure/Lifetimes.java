package org.toprung.core.structure;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import org.toprung.core.atom.Datum;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.cache.BoundedCache;
import org.toprung.core.quantity.Estimate;
import org.toprung.core.quantity.PhysicalConstants;
import org.toprung.core.quantity.Temperature;

/**
 * Decay rates of levels: spontaneous, driven by blackbody radiation to other bound levels, and by
 * blackbody radiation into the continuum.
 *
 * <p>A = ω³ |⟨‖d‖⟩|² / (3π ε0 ħ c³ (2J+1)) summed over lower levels; blackbody: the same expression
 * times the photon number 1/(e^{ħω/kT} − 1), over levels below and above (Gallagher and Cooke,
 * Phys. Rev. Lett. 42, 835 (1979)). Beyond the levels summed one by one, the line strength per unit
 * of energy, which is continuous across the ionization limit, is continued with the power of ω that
 * it follows at the end of the sum, and integrated; this part is trusted to 20 %. Above n = 140 the
 * levels above are out of reach, and the rate is continued with the power of n* it has between n =
 * 130 and 140.
 */
public final class Lifetimes {
  private static final int SPECIES = 64;
  private static final BoundedCache<Species, Lifetimes> SHARED =
      new BoundedCache<>(SPECIES, Lifetimes::new);
  private static final int LEVELS = 2000;

  /** Levels above by up to this in n are summed one by one. */
  private static final int REACH = 25;

  /** Above this n too few levels are left above for the continuation. */
  private static final int LARGEST_SUMMED_N = Level.MAXIMUM_N - 10;

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

  private record Warm(Level level, Temperature temperature) {
    // by hand: those of a record are slow to start
    @Override
    public boolean equals(Object other) {
      return other instanceof Warm that
          && that.level.equals(level)
          && that.temperature.equals(temperature);
    }

    @Override
    public int hashCode() {
      return 31 * level.hashCode() + temperature.hashCode();
    }
  }

  private record Blackbody(Estimate depopulation, Estimate ionization) {}

  private final Species species;
  private final DipoleElements elements;
  private final BoundedCache<Level, Estimate> spontaneous;
  private final BoundedCache<Warm, Blackbody> blackbody;

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
    return SHARED.get(species);
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
   * The rate at which blackbody radiation takes the atom from a level to other bound levels, the
   * quantity that is published as the blackbody depopulation rate.
   *
   * @param level the level
   * @param temperature temperature of the surroundings
   * @return rate in s⁻¹; 0 at 0 K
   * @throws IllegalArgumentException if the level belongs to the core or is not in the catalogue
   */
  public Estimate blackbodyRatePerSecond(Level level, Temperature temperature) {
    return blackbody.get(new Warm(level, temperature)).depopulation();
  }

  /**
   * The rate at which blackbody radiation ionizes the atom.
   *
   * @param level the level
   * @param temperature temperature of the surroundings
   * @return rate in s⁻¹; 0 at 0 K
   * @throws IllegalArgumentException if the level belongs to the core or is not in the catalogue
   */
  public Estimate blackbodyIonizationRatePerSecond(Level level, Temperature temperature) {
    return blackbody.get(new Warm(level, temperature)).ionization();
  }

  /**
   * One way out of a level.
   *
   * @param to the level the atom goes to
   * @param spontaneousPerSecond rate of spontaneous decay in s⁻¹; 0 to higher levels
   * @param blackbodyPerSecond rate driven by blackbody radiation in s⁻¹
   */
  public record Channel(Level to, Estimate spontaneousPerSecond, Estimate blackbodyPerSecond) {
    /**
     * Both rates together.
     *
     * @return the sum in s⁻¹
     */
    public double totalPerSecond() {
      return spontaneousPerSecond.value() + blackbodyPerSecond.value();
    }
  }

  /**
   * The rates to single levels, from the dipole elements also where a lifetime is measured.
   *
   * @param level the level
   * @param temperature temperature of the surroundings
   * @return the channels to all lower levels and, above 0 K, to those up to 25 in n above, as far
   *     as n = 150; the fastest first
   * @throws IllegalArgumentException if the level belongs to the core or is not in the catalogue
   */
  public List<Channel> channels(Level level, Temperature temperature) {
    species.requireValid(level);
    double thermalHertz = thermalHertz(temperature);
    double energy = species.energyHertz(level).value();
    int last = Math.max(level.n() + REACH, level.n() + species.groundLevel().n());
    List<Channel> channels = new ArrayList<>();
    for (Level other : Partners.of(species, level, last)) {
      double difference = energy - species.energyHertz(other).value();
      Estimate part = rate(level, other, Math.abs(difference));
      double photons = photons(Math.abs(difference), thermalHertz);
      Estimate blackbody = new Estimate(part.value() * photons, part.uncertainty() * photons);
      if (difference > 0 || photons > 0) {
        channels.add(new Channel(other, difference > 0 ? part : new Estimate(0, 0), blackbody));
      }
    }
    channels.sort(Comparator.comparingDouble(Channel::totalPerSecond).reversed());
    return List.copyOf(channels);
  }

  /**
   * The lifetime with all ways out: spontaneous decay, blackbody radiation to other levels and into
   * the continuum.
   *
   * @param level the level, not the ground level
   * @param temperature temperature of the surroundings
   * @return lifetime in s
   * @throws IllegalArgumentException if the level is the ground level, belongs to the core or is
   *     not in the catalogue, or nothing takes the atom out of it at that temperature
   */
  public Estimate lifetimeSeconds(Level level, Temperature temperature) {
    if (level.equals(species.groundLevel())) {
      throw new IllegalArgumentException(level + " is the ground level and does not decay");
    }
    Estimate cold = spontaneousRatePerSecond(level);
    Estimate warm = blackbodyRatePerSecond(level, temperature);
    Estimate ionization = blackbodyIonizationRatePerSecond(level, temperature);
    double rate = cold.value() + warm.value() + ionization.value();
    if (!(rate > 0)) {
      throw new IllegalArgumentException(
          level
              + " of "
              + species
              + " has no lifetime at "
              + temperature
              + ": no dipole transition leads to a lower level, and none is measured");
    }
    double uncertainty = cold.uncertainty() + warm.uncertainty() + ionization.uncertainty();
    return new Estimate(1 / rate, uncertainty / (rate * rate));
  }

  private static double thermalHertz(Temperature temperature) {
    return PhysicalConstants.BOLTZMANN / PhysicalConstants.PLANCK * temperature.kelvin();
  }

  /**
   * Photons of a mode; 0 at 0 K, and at frequency 0, where the rate vanishes although they do not.
   */
  private static double photons(double frequencyHertz, double thermalHertz) {
    return thermalHertz > 0 && frequencyHertz > 0
        ? 1 / Math.expm1(frequencyHertz / thermalHertz)
        : 0;
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

  private Blackbody blackbody(Warm warm) {
    Level level = species.requireValid(warm.level());
    if (level.n() > LARGEST_SUMMED_N) {
      return new Blackbody(
          HighLevels.continued(
              species, level, LARGEST_SUMMED_N, l -> blackbodyRatePerSecond(l, warm.temperature())),
          HighLevels.continued(
              species,
              level,
              LARGEST_SUMMED_N,
              l -> blackbodyIonizationRatePerSecond(l, warm.temperature())));
    }
    double thermalHertz = thermalHertz(warm.temperature());
    if (thermalHertz == 0) {
      return new Blackbody(new Estimate(0, 0), new Estimate(0, 0));
    }
    int last = Math.min(level.n() + REACH, Level.MAXIMUM_N);
    double energy = species.energyHertz(level).value();
    double rate = 0;
    double uncertainty = 0;
    double ionization = 0;
    for (Level other : Partners.of(species, level, last)) {
      double frequency = Math.abs(energy - species.energyHertz(other).value());
      Estimate part = rate(level, other, frequency);
      double photons = photons(frequency, thermalHertz);
      rate += part.value() * photons;
      uncertainty += part.uncertainty() * photons;
      if (other.n() == last) {
        StrengthDensity beyond = density(level, other);
        // the levels end half a level beyond the last one
        double n = species.effectiveN(other) + 0.5;
        double end = -species.rydbergHertz() / (n * n) - energy;
        double bound = beyond.rate(end, -energy, thermalHertz);
        rate += bound;
        uncertainty += CONTINUATION_TRUST * bound;
        double hardest = Math.max(-2 * energy, HARDEST_PHOTON * thermalHertz);
        ionization += beyond.rate(-energy, hardest, thermalHertz);
      }
    }
    return new Blackbody(
        new Estimate(rate, uncertainty), new Estimate(ionization, CONTINUATION_TRUST * ionization));
  }

  /**
   * The line strength per Hz from a level into one of its series, s(ν) = s0 (ν/ν0)^p near and
   * beyond the ionization limit.
   */
  private record StrengthDensity(double s0, double nu0, double power, double degeneracy) {
    /** The blackbody rate into all photon energies between two, in s⁻¹. */
    double rate(double from, double to, double thermalHertz) {
      double step = Math.log(to / from) / INTEGRATION_STEPS;
      double sum = 0;
      for (int i = 0; i < INTEGRATION_STEPS; i++) {
        double nu = from * Math.exp((i + 0.5) * step);
        sum += Math.pow(nu / nu0, power) * Math.pow(nu, 4) / Math.expm1(nu / thermalHertz);
      }
      return COEFFICIENT / degeneracy * s0 * sum * step;
    }
  }

  private StrengthDensity density(Level level, Level last) {
    double energy = species.energyHertz(level).value();
    Level middle = Level.of((level.n() + last.n()) / 2, last.l(), last.doubledJ());
    double nu0 = species.energyHertz(last).value() - energy;
    double s0 = strengthDensity(level, last);
    double power =
        Math.log(s0 / strengthDensity(level, middle))
            / Math.log(nu0 / (species.energyHertz(middle).value() - energy));
    return new StrengthDensity(
        s0, nu0, Math.max(STEEPEST, Math.min(FLATTEST, power)), level.doubledJ() + 1);
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
