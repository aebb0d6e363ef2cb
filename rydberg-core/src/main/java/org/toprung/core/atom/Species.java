package org.toprung.core.atom;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.stream.Collectors;
import org.toprung.core.cache.BoundedCache;
import org.toprung.core.quantity.Estimate;
import org.toprung.core.quantity.PhysicalConstants;

/**
 * An isotope with everything the catalogue knows about it. Immutable; one instance for each
 * isotope.
 *
 * <p>Energies: a measured level energy where there is one, else the series E = −R_M/(n − δ)² with δ
 * = Σ δ_2k (n − δ_0)^−2k and R_M = R∞/(1 + m_e/(M − m_e)). For l ≥ 4 without measured series the
 * defect is that of a polarizable core, δ = (3α_c/4)(1 − l(l+1)/(3n²)) / [(l−½) l
 * (l+½)(l+1)(l+3/2)] (for example Gallagher, Rydberg Atoms, Cambridge 1994, chapter 17), to which
 * the fine structure of hydrogen is added. Hydrogen: δ = (α²/2)(1/(j+½) − 3/(4n)), the fine
 * structure to order α² (Bethe and Salpeter, section 14); the Lamb shift is left to the
 * uncertainty.
 *
 * <p>An isotope without an ionization energy of its own gets that of another isotope and the normal
 * mass shift, of which one half counts as uncertainty.
 */
public final class Species {
  private static final List<Datum.Kind> SERIES =
      List.of(
          Datum.Kind.QUANTUM_DEFECT_0,
          Datum.Kind.QUANTUM_DEFECT_2,
          Datum.Kind.QUANTUM_DEFECT_4,
          Datum.Kind.QUANTUM_DEFECT_6,
          Datum.Kind.QUANTUM_DEFECT_8,
          Datum.Kind.QUANTUM_DEFECT_10);

  /** Rubidium 87. */
  public static final Species RUBIDIUM_87 = parse("Rb-87");

  /** Caesium 133. */
  public static final Species CAESIUM_133 = parse("Cs-133");

  /** Lowest l whose electron stays far enough outside the core for the polarization formula. */
  private static final int POLARIZATION_L = 4;

  /** Relative trust in the polarization formula: at l = 4 it meets measured defects to 5 %. */
  private static final double POLARIZATION_TRUST = 0.1;

  /** Part of the normal mass shift that stands for what else distinguishes isotopes. */
  private static final double SPECIFIC_SHIFT = 0.5;

  /** Largest Lamb shift of hydrogen times n³, Hz (1S: 8.17 GHz). */
  private static final double LAMB_HERTZ = 8.2e9;

  private static final int ENERGIES = 5000;

  private final String name;
  private final Catalogue catalogue;
  private final double massKilograms;
  private final int doubledNuclearSpin;
  private final double gI;
  private final Level groundLevel;
  private final boolean hydrogen;
  private final double rydbergHertz;
  private final int[] lowestN;
  private final Estimate corePolarizabilityAu;
  private final BoundedCache<Level, Estimate> energies;
  private final Estimate ionizationHertz;
  private final Map<Level, Estimate> measuredEnergies;
  private final Map<String, List<Datum>> series;
  private final Map<String, List<Level>> hyperfineMembers;

  Species(String name, Catalogue catalogue) {
    this.name = name;
    this.catalogue = catalogue;
    this.massKilograms = require(Datum.Kind.MASS, "").estimate().value();
    this.doubledNuclearSpin =
        Halves.doubled("nuclear spin", require(Datum.Kind.NUCLEAR_SPIN, "").value());
    this.gI = require(Datum.Kind.NUCLEAR_G, "").value();
    this.groundLevel = Level.of((int) require(Datum.Kind.LOWEST_N, "S").value(), 0, 1);
    this.hydrogen = require(Datum.Kind.NUCLEAR_CHARGE, "").value() == 1;
    this.rydbergHertz = rydbergHertz(massKilograms);
    this.lowestN = lowestN();
    this.corePolarizabilityAu = require(Datum.Kind.CORE_POLARIZABILITY, "").estimate();
    this.energies = new BoundedCache<>(ENERGIES, this::energy);
    this.series = new HashMap<>();
    this.hyperfineMembers = new HashMap<>();
    List<Datum> levelEnergies = new ArrayList<>();
    for (Datum datum : catalogue.everything(name)) {
      switch (datum.kind()) {
        case QUANTUM_DEFECT_0 -> series.put(datum.level(), expansion(datum.level()));
        case HYPERFINE_A -> {
          Level level = Level.parse(datum.level());
          hyperfineMembers.computeIfAbsent(level.series(), s -> new ArrayList<>()).add(level);
        }
        case LEVEL_ENERGY -> levelEnergies.add(datum);
        default -> {}
      }
    }
    this.ionizationHertz = ionization();
    this.measuredEnergies = new HashMap<>();
    measuredEnergies.put(
        groundLevel, new Estimate(-ionizationHertz.value(), ionizationHertz.uncertainty()));
    for (Datum datum : levelEnergies) {
      Level level = Level.parse(datum.level());
      if (!measuredEnergies.containsKey(level)) {
        measuredEnergies.put(level, fromLimit(datum));
      }
    }
  }

  /**
   * A measured level counted from the ionization limit. Levels of the element are those of the
   * isotope whose ionization energy is measured; binding energies scale with the reduced mass.
   */
  private Estimate fromLimit(Datum datum) {
    Estimate energy = datum.estimate();
    Estimate limit = ionizationHertz;
    double scale = 1;
    Optional<String> relative = datum.species().equals(name) ? Optional.empty() : reference();
    if (relative.isPresent()) {
      limit = ionization(relative.get()).orElseThrow();
      scale = rydbergHertz / rydbergHertz(mass(relative.get()));
    }
    return new Estimate(
        scale * (energy.value() - limit.value()),
        Math.hypot(energy.uncertainty(), limit.uncertainty()));
  }

  private static double rydbergHertz(double massKilograms) {
    double electron = PhysicalConstants.ELECTRON_MASS;
    return PhysicalConstants.RYDBERG_HERTZ / (1 + electron / (massKilograms - electron));
  }

  private double mass(String isotope) {
    return require(isotope, Datum.Kind.MASS, "").estimate().value();
  }

  /** The isotope that the rows of the element were measured on, if its limit is measured. */
  private Optional<String> reference() {
    Optional<Datum> datum = catalogue.best(name, Datum.Kind.REFERENCE_ISOTOPE, "");
    if (datum.isEmpty()) {
      return Optional.empty();
    }
    String isotope = datum.get().species() + "-" + (int) datum.get().value();
    return ionization(isotope).isPresent() ? Optional.of(isotope) : Optional.empty();
  }

  /**
   * The species of a name, with the values that come with the library.
   *
   * @param name element symbol, hyphen, mass number, for example "Rb-87"; "H" for hydrogen
   * @return the species
   * @throws IllegalArgumentException if the name is not known; the message lists the known ones
   */
  public static Species parse(String name) {
    return Catalogue.bundled().species(name);
  }

  private Datum require(Datum.Kind kind, String level) {
    return require(name, kind, level);
  }

  // no lambdas on the way to the first answer: each costs a cold start half a millisecond
  private Datum require(String isotope, Datum.Kind kind, String level) {
    Optional<Datum> datum = catalogue.best(isotope, kind, level);
    if (datum.isEmpty()) {
      throw Refusal.of("the catalogue has no %s of %s %s", kind, isotope, level);
    }
    return datum.get();
  }

  /** The terms of a series, all from the source of its constant term: fits must not be mixed. */
  private List<Datum> expansion(String seriesName) {
    Datum constant = require(Datum.Kind.QUANTUM_DEFECT_0, seriesName);
    List<Datum> terms = new ArrayList<>();
    for (Datum.Kind kind : SERIES) {
      int known = terms.size();
      for (Datum datum : catalogue.all(name, kind, seriesName)) {
        if (terms.size() == known && isOfTheSameFit(datum, constant)) {
          terms.add(datum);
        }
      }
      if (terms.size() == known) {
        break;
      }
    }
    return List.copyOf(terms);
  }

  private static boolean isOfTheSameFit(Datum one, Datum other) {
    return one.source().equals(other.source())
        && one.species().equals(other.species())
        && file(one).equals(file(other));
  }

  private static String file(Datum datum) {
    return datum.origin().substring(0, datum.origin().lastIndexOf(':'));
  }

  private Estimate ionization() {
    Optional<Estimate> own = ionization(name);
    if (own.isPresent()) {
      return own.get();
    }
    Optional<String> relative = reference();
    if (relative.isPresent()) {
      // the reduced mass scales all energies; the specific mass shift is of the same order
      Estimate measured = ionization(relative.get()).orElseThrow();
      double shift = measured.value() * (rydbergHertz / rydbergHertz(mass(relative.get())) - 1);
      return new Estimate(
          measured.value() + shift, Math.hypot(measured.uncertainty(), SPECIFIC_SHIFT * shift));
    }
    return require(Datum.Kind.IONIZATION_ENERGY, groundLevel.toString()).estimate();
  }

  /** The ionization energy measured for one isotope itself. */
  private Optional<Estimate> ionization(String isotope) {
    String ground = groundLevel.toString();
    Optional<Datum> fromLowest =
        catalogue.best(isotope, Datum.Kind.IONIZATION_ENERGY_FROM_LOWEST_F, ground);
    if (fromLowest.isPresent()) {
      double a = require(isotope, Datum.Kind.HYPERFINE_A, ground).estimate().value();
      double twoI = 2 * require(isotope, Datum.Kind.NUCLEAR_SPIN, "").value();
      // for j = 1/2 and A > 0 the lowest level is F = I - 1/2, (I+1)A/2 below the centre of gravity
      double below = a > 0 ? (twoI + 2) * a / 4 : -twoI * a / 4;
      Estimate measured = fromLowest.get().estimate();
      return Optional.of(new Estimate(measured.value() - below, measured.uncertainty()));
    }
    Optional<Datum> datum = catalogue.best(isotope, Datum.Kind.IONIZATION_ENERGY, ground);
    return datum.isPresent() && datum.get().species().equals(isotope)
        ? Optional.of(datum.get().estimate())
        : Optional.empty();
  }

  /**
   * The name.
   *
   * @return for example "Rb-87"
   */
  public String name() {
    return name;
  }

  /**
   * The mass of the neutral atom.
   *
   * @return mass in kg
   */
  public double massKilograms() {
    return massKilograms;
  }

  /**
   * Twice the nuclear spin.
   *
   * @return 2I
   */
  public int doubledNuclearSpin() {
    return doubledNuclearSpin;
  }

  /**
   * The ground level.
   *
   * @return for example 5S1/2
   */
  public Level groundLevel() {
    return groundLevel;
  }

  /**
   * The Rydberg constant of this isotope, times the speed of light.
   *
   * @return R_M c in Hz
   */
  public double rydbergHertz() {
    return rydbergHertz;
  }

  /**
   * Whether the atom is hydrogen, which has no core.
   *
   * @return true where the nuclear charge is 1
   */
  public boolean isHydrogen() {
    return hydrogen;
  }

  /**
   * Whether the valence electron can be in a level.
   *
   * @param level the level
   * @return false for the shells of the core
   */
  public boolean isValid(Level level) {
    return level.n() >= lowestN(level);
  }

  private int lowestN(Level level) {
    return level.l() < lowestN.length ? lowestN[level.l()] : level.l() + 1;
  }

  private int[] lowestN() {
    int[] lowest = new int[POLARIZATION_L];
    for (int l = 0; l < lowest.length; l++) {
      Optional<Datum> datum = catalogue.best(name, Datum.Kind.LOWEST_N, Level.letter(l));
      lowest[l] = datum.isPresent() ? (int) datum.get().value() : l + 1;
    }
    return lowest;
  }

  /**
   * Refuses levels of the core.
   *
   * @param level the level
   * @return the level
   * @throws IllegalArgumentException if the valence electron cannot be in the level
   */
  public Level requireValid(Level level) {
    if (!isValid(level)) {
      throw Refusal.of(
          "level %s of %s belongs to the core; the lowest level of the series is %d%s",
          level, name, lowestN(level), level.series());
    }
    return level;
  }

  /**
   * Refuses levels of the core, and F that cannot be made from I and j.
   *
   * @param sublevel the sublevel
   * @return the sublevel
   * @throws IllegalArgumentException if the valence electron cannot be in the level, or F is not
   *     one of |I − j| to I + j; the message lists the allowed F
   */
  public Sublevel requireValid(Sublevel sublevel) {
    requireValid(sublevel.level());
    if (sublevel.isHyperfine()) {
      int doubledJ = sublevel.level().doubledJ();
      List<Integer> allowed = new ArrayList<>();
      for (int f = Math.abs(doubledNuclearSpin - doubledJ);
          f <= doubledNuclearSpin + doubledJ;
          f += 2) {
        allowed.add(f);
      }
      if (!allowed.contains(sublevel.doubledF())) {
        throw Refusal.of(
            "F=%s of %s %s cannot occur with nuclear spin %s; allowed F: %s",
            Halves.text(sublevel.doubledF()),
            name,
            sublevel.level(),
            Halves.text(doubledNuclearSpin),
            allowed.stream().map(Halves::text).collect(Collectors.joining(", ")));
      }
    }
    return sublevel;
  }

  /**
   * The energy of the hyperfine centre of gravity of a level.
   *
   * @param level the level
   * @return E/h in Hz from the ionization limit, negative
   * @throws IllegalArgumentException if the level belongs to the core, or neither level nor series
   *     is in the catalogue
   */
  public Estimate energyHertz(Level level) {
    return energies.get(level);
  }

  private Estimate energy(Level level) {
    Estimate measured = measuredEnergies.get(level);
    if (measured != null) {
      return measured;
    }
    return seriesEnergyHertz(level);
  }

  /**
   * The energy that the quantum-defect series gives, even where the level itself is measured.
   *
   * @param level the level
   * @return E/h in Hz from the ionization limit, negative. The uncertainty holds those of the
   *     coefficients, as if independent, and the size of the first term the series leaves out
   * @throws IllegalArgumentException if the level belongs to the core, or its series is not in the
   *     catalogue
   */
  public Estimate seriesEnergyHertz(Level level) {
    Estimate defect = quantumDefect(requireValid(level));
    double effective = level.n() - defect.value();
    double energy = -rydbergHertz / (effective * effective);
    return new Estimate(energy, 2 * Math.abs(energy) / effective * defect.uncertainty());
  }

  private Estimate quantumDefect(Level level) {
    if (isHydrogen()) {
      return new Estimate(fineStructure(level), LAMB_HERTZ / (2 * rydbergHertz));
    }
    List<Datum> terms = series.get(level.series());
    if (terms != null) {
      double inverse = 1 / Math.pow(level.n() - terms.get(0).value(), 2);
      double power = 1;
      double defect = 0;
      double variance = 0;
      for (Datum term : terms) {
        defect += term.value() * power;
        variance += Math.pow(term.uncertainty() * power, 2);
        power *= inverse;
      }
      double omitted = terms.get(terms.size() - 1).value() * power;
      return new Estimate(defect, Math.sqrt(variance + omitted * omitted));
    }
    int l = level.l();
    if (l < POLARIZATION_L) {
      throw Refusal.of(
          "the catalogue has neither an energy nor a quantum defect for %s of %s", level, name);
    }
    double n = level.n();
    double defect =
        0.75
            * corePolarizabilityAu().value()
            * (1 - l * (l + 1) / (3 * n * n))
            / ((l - 0.5) * l * (l + 0.5) * (l + 1) * (l + 1.5));
    return new Estimate(defect + fineStructure(level), POLARIZATION_TRUST * defect);
  }

  /** The defect that stands for the fine structure of hydrogen to order α². */
  private static double fineStructure(Level level) {
    double alpha = PhysicalConstants.FINE_STRUCTURE;
    return alpha * alpha / 2 * (2.0 / (level.doubledJ() + 1) - 0.75 / level.n());
  }

  /**
   * Whether the energy of a level is a measured one.
   *
   * @param level the level
   * @return false where it comes from the series
   */
  public boolean isMeasured(Level level) {
    return measuredEnergies.containsKey(level);
  }

  /**
   * The effective principal quantum number.
   *
   * @param level the level
   * @return n* = √(R_M/|E|)
   * @throws IllegalArgumentException as for {@link #energyHertz}
   */
  public double effectiveN(Level level) {
    return Math.sqrt(-rydbergHertz / energyHertz(level).value());
  }

  /**
   * The coefficients of the quantum-defect series a level belongs to.
   *
   * @param level the level
   * @return the terms from the constant one up; empty where the catalogue has none
   */
  public List<Datum> quantumDefects(Level level) {
    return series.getOrDefault(level.series(), List.of());
  }

  /**
   * The hyperfine constants of a level: measured, or scaled with n*^−3 from the measured member of
   * the same series that is nearest in n.
   *
   * @param level the level
   * @return the constants with their source
   * @throws IllegalArgumentException if the level belongs to the core, or no member of its series
   *     is measured
   */
  public HyperfineConstants hyperfine(Level level) {
    requireValid(level);
    Level member = null;
    for (Level candidate : hyperfineMembers.getOrDefault(level.series(), List.of())) {
      if (member == null
          || Math.abs(candidate.n() - level.n()) < Math.abs(member.n() - level.n())) {
        member = candidate;
      }
    }
    if (member == null) {
      throw Refusal.of(
          "no hyperfine constant of %s is measured for any level of the series %s, so none can be"
              + " given for %s",
          name, level.series(), level);
    }
    Datum a = require(Datum.Kind.HYPERFINE_A, member.toString());
    Optional<Datum> quadrupole = datum(Datum.Kind.HYPERFINE_B, member.toString());
    double b = quadrupole.isPresent() ? quadrupole.get().estimate().value() : 0;
    if (member.equals(level)) {
      return new HyperfineConstants(a.estimate().value(), b, true, a.source());
    }
    double scale = Math.pow(effectiveN(member) / effectiveN(level), 3);
    return new HyperfineConstants(
        a.estimate().value() * scale,
        b * scale,
        false,
        "scaled with n*^-3 from " + member + ": " + a.source());
  }

  /**
   * The electronic g factor of a level: measured, or Landé's with the g factor of the free electron
   * and g_L = 1 − m_e/M.
   *
   * @param level the level
   * @return g_J in H = µB B (g_J m_J + g_I m_I)
   * @throws IllegalArgumentException if the level belongs to the core
   */
  public double gJ(Level level) {
    requireValid(level);
    Optional<Datum> measured = datum(Datum.Kind.ELECTRONIC_G, level.toString());
    return measured.isPresent() ? measured.get().value() : lande(level);
  }

  private double lande(Level level) {
    double j = level.doubledJ() / 2.0;
    double jj = j * (j + 1);
    double ll = level.l() * (level.l() + 1.0);
    double ss = 0.75;
    double gL = 1 - PhysicalConstants.ELECTRON_MASS / massKilograms;
    return (gL * (jj - ss + ll) + PhysicalConstants.ELECTRON_G_FACTOR * (jj + ss - ll)) / (2 * jj);
  }

  /**
   * The nuclear g factor.
   *
   * @return g_I in H = µB B (g_J m_J + g_I m_I); for Rb-87 negative
   */
  public double gI() {
    return gI;
  }

  /**
   * The static dipole polarizability of the ionic core.
   *
   * @return polarizability in atomic units (a0³)
   */
  public Estimate corePolarizabilityAu() {
    return corePolarizabilityAu;
  }

  /**
   * The value in use, by the precedence that {@link Catalogue} describes.
   *
   * @param kind what is asked for
   * @param level the level, series ("S1/2") or pair of levels ("5S1/2-5P1/2", in the order of
   *     {@link Level}); empty for a value of the atom
   * @return the datum, if the catalogue has one
   */
  public Optional<Datum> datum(Datum.Kind kind, String level) {
    return catalogue.best(name, kind, level);
  }

  /**
   * All values of the catalogue that apply to this isotope, also those not in use.
   *
   * @return the data in a fixed order, of each quantity the one in use first
   */
  public List<Datum> data() {
    return catalogue.everything(name);
  }

  /**
   * The name.
   *
   * @return for example "Rb-87"
   */
  @Override
  public String toString() {
    return name;
  }
}
