package org.toprung.core.structure;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.TreeMap;
import org.toprung.core.atom.Catalogue;
import org.toprung.core.atom.Datum;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.quantity.Estimate;
import org.toprung.core.quantity.PhysicalConstants;
import org.toprung.core.radial.NumerovMethod;

/**
 * Ties the values of a catalogue together: what can be said in two ways is said in both, and the
 * difference counted in standard deviations, the worst first. Immutable.
 *
 * <p>Rows of an element are checked once, on the isotope they were measured on.
 */
public final class Audit {
  /** What is compared with what. */
  public enum Check {
    /** A measured lifetime with the sum over dipole elements. */
    LIFETIME("lifetime from elements"),
    /** The quantum-defect series with a measured level. */
    SERIES("series at a measured level"),
    /** The eigenvalue of the valence-electron potential with the level, as effective n. */
    POTENTIAL("n* of the potential"),
    /** The Rydberg constant that follows from the mass with the published one. */
    MASS("Rydberg constant from mass"),
    /** The mass with the mass number in the name. */
    MASS_NUMBER("mass number from mass"),
    /** The difference of two levels with the published splitting. */
    FINE_STRUCTURE("splitting from levels"),
    /** A/g_I of an isotope with that of another one of the element; they differ by under 1 %. */
    HYPERFINE("A/g_I of two isotopes"),
    /** A value that was not chosen with the one in use. */
    ALTERNATIVE("value in use");

    private final String description;

    Check(String description) {
      this.description = description;
    }

    /**
     * What the first number of a finding is.
     *
     * @return a few words
     */
    public String description() {
      return description;
    }
  }

  /**
   * One comparison.
   *
   * @param species the isotope
   * @param check what is compared
   * @param subject the level or pair of levels, or empty
   * @param derived the number that follows from other rows, in {@code unit}
   * @param reference the number it is compared with, in {@code unit}
   * @param uncertainty one standard deviation of the difference, positive, in {@code unit}
   * @param unit the unit
   * @param origin where the reference stands: file and line
   */
  public record Finding(
      String species,
      Check check,
      String subject,
      double derived,
      double reference,
      double uncertainty,
      String unit,
      String origin) {
    /**
     * The difference in standard deviations.
     *
     * @return not negative
     */
    public double sigmas() {
      return Math.abs(derived - reference) / uncertainty;
    }

    /**
     * The difference relative to the reference.
     *
     * @return relative difference, not negative
     */
    public double relative() {
      return Math.abs((derived - reference) / reference);
    }
  }

  /** What the authors of the potential left between eigenvalues and levels, in n*. */
  private static final double POTENTIAL_TRUST = 0.003;

  /** Hyperfine anomalies of alkali atoms are below this part of A (Arimondo et al. 1977). */
  private static final double ANOMALY = 0.005;

  /** Mass defects are below 0.1 u. */
  private static final double MASS_DEFECT = 0.1;

  private static final int[] ABOVE_LOWEST = {0, 1, 4};
  private static final int HIGHEST_CHECKED_L = 3;
  private static final double CM = PhysicalConstants.HERTZ_PER_RECIPROCAL_CENTIMETRE;

  private final List<Finding> findings;

  private Audit(List<Finding> findings) {
    this.findings = findings;
  }

  /**
   * Audits a catalogue.
   *
   * @param catalogue the catalogue
   * @return the findings
   */
  public static Audit of(Catalogue catalogue) {
    List<Finding> findings = new ArrayList<>();
    Map<String, Species> first = new TreeMap<>();
    for (String name : catalogue.isotopes()) {
      Species species = catalogue.species(name);
      for (Datum datum : species.data()) {
        if (isCheckedHere(species, datum)) {
          check(species, datum, findings);
        }
      }
      if (isReference(species)) {
        potential(species, findings);
      }
      String element = element(name);
      Species other = first.putIfAbsent(element, species);
      if (other != null) {
        hyperfine(species, other, findings);
      }
    }
    findings.sort(Comparator.comparingDouble(Finding::sigmas).reversed());
    return new Audit(List.copyOf(findings));
  }

  /**
   * The comparisons.
   *
   * @return an immutable list, the worst first
   */
  public List<Finding> findings() {
    return findings;
  }

  private static String element(String isotope) {
    return isotope.split("-")[0];
  }

  private static boolean isReference(Species species) {
    return species
        .datum(Datum.Kind.REFERENCE_ISOTOPE, "")
        .map(d -> species.name().equals(d.species() + "-" + (int) d.value()))
        .orElse(true);
  }

  private static boolean isCheckedHere(Species species, Datum datum) {
    return datum.species().equals(species.name()) || isReference(species);
  }

  private static void check(Species species, Datum datum, List<Finding> findings) {
    Datum inUse = species.datum(datum.kind(), datum.level()).orElseThrow();
    if (!inUse.equals(datum)) {
      alternative(species, inUse, datum, findings);
      return;
    }
    switch (datum.kind()) {
      case LIFETIME -> lifetime(species, datum, findings);
      case LEVEL_ENERGY -> series(species, datum, findings);
      case RYDBERG_CONSTANT -> {
        double published = datum.estimate().value() / CM;
        add(
            findings,
            species,
            Check.MASS,
            datum,
            species.rydbergHertz() / CM,
            published,
            datum.estimate().uncertainty() / CM,
            "cm-1");
      }
      case MASS -> {
        int dash = species.name().indexOf('-');
        double number = dash < 0 ? 1 : Double.parseDouble(species.name().substring(dash + 1));
        add(findings, species, Check.MASS_NUMBER, datum, datum.value(), number, MASS_DEFECT, "u");
      }
      case FINE_SPLITTING -> fineStructure(species, datum, findings);
      default -> {}
    }
  }

  private static void alternative(
      Species species, Datum inUse, Datum datum, List<Finding> findings) {
    double scale = datum.estimate().value() / datum.value();
    double uncertainty =
        Math.hypot(inUse.estimate().uncertainty(), datum.estimate().uncertainty()) / scale;
    // later coefficients of a series have no meaning alone
    boolean comparable =
        !datum.kind().name().startsWith("QUANTUM_DEFECT") || datum.kind().name().endsWith("_0");
    if (uncertainty > 0 && comparable) {
      add(
          findings,
          species,
          Check.ALTERNATIVE,
          datum,
          inUse.estimate().value() / scale,
          datum.value(),
          uncertainty,
          datum.unit());
    }
  }

  private static void lifetime(Species species, Datum datum, List<Finding> findings) {
    Level level = Level.parse(datum.level());
    Estimate rate = Lifetimes.of(species).computedSpontaneous(level);
    if (!(rate.value() > 0)) {
      return; // metastable: no element to compare with
    }
    double nanoseconds = 1e9 / rate.value();
    double measured = datum.estimate().value() * 1e9;
    add(
        findings,
        species,
        Check.LIFETIME,
        datum,
        nanoseconds,
        measured,
        Math.hypot(rate.relative() * nanoseconds, datum.estimate().uncertainty() * 1e9),
        "ns");
  }

  private static void series(Species species, Datum datum, List<Finding> findings) {
    Level level = Level.parse(datum.level());
    if (species.isHydrogen() || species.quantumDefects(level).isEmpty()) {
      return;
    }
    Estimate series = species.seriesEnergyHertz(level);
    Estimate measured = species.energyHertz(level);
    add(
        findings,
        species,
        Check.SERIES,
        datum,
        series.value() / CM,
        measured.value() / CM,
        Math.hypot(series.uncertainty(), measured.uncertainty()) / CM,
        "cm-1");
  }

  private static void fineStructure(Species species, Datum datum, List<Finding> findings) {
    String shell = datum.level();
    Level some =
        Level.parse(shell + (shell.endsWith("P") ? "1/2" : shell.endsWith("D") ? "3/2" : "5/2"));
    Estimate lower = species.energyHertz(some);
    Estimate upper = species.energyHertz(Level.of(some.n(), some.l(), some.doubledJ() + 2));
    // both are counted from the same limit, whose uncertainty drops out of the difference
    double limit = species.energyHertz(species.groundLevel()).uncertainty();
    double levels =
        Math.hypot(without(limit, upper.uncertainty()), without(limit, lower.uncertainty()));
    add(
        findings,
        species,
        Check.FINE_STRUCTURE,
        datum,
        (upper.value() - lower.value()) / 1e6,
        datum.estimate().value() / 1e6,
        Math.hypot(levels, datum.estimate().uncertainty()) / 1e6,
        "MHz");
  }

  private static double without(double part, double whole) {
    return Math.sqrt(Math.max(0, whole * whole - part * part));
  }

  private static void potential(Species species, List<Finding> findings) {
    Optional<Datum> parameter = species.datum(Datum.Kind.POTENTIAL_A1, "S");
    if (parameter.isEmpty()) {
      return;
    }
    NumerovMethod method = NumerovMethod.uncalibrated(species);
    for (int l = 0; l <= HIGHEST_CHECKED_L; l++) {
      for (int doubledJ = Math.max(1, 2 * l - 1); doubledJ <= 2 * l + 1; doubledJ += 2) {
        int lowest = l + 1;
        while (!species.isValid(Level.of(lowest, l, doubledJ))) {
          lowest++;
        }
        for (int above : ABOVE_LOWEST) {
          Level level = Level.of(lowest + above, l, doubledJ);
          double measured = species.effectiveN(level);
          findings.add(
              new Finding(
                  species.name(),
                  Check.POTENTIAL,
                  level.toString(),
                  method.eigenvalueEffectiveN(level),
                  measured,
                  POTENTIAL_TRUST,
                  "1",
                  parameter.get().origin()));
        }
      }
    }
  }

  private static void hyperfine(Species species, Species other, List<Finding> findings) {
    for (Datum datum : species.data()) {
      if (datum.kind() != Datum.Kind.HYPERFINE_A) {
        continue;
      }
      Optional<Datum> counterpart = other.datum(Datum.Kind.HYPERFINE_A, datum.level());
      if (counterpart.isPresent() && datum.equals(inUse(species, datum))) {
        double derived = counterpart.get().value() * species.gI() / other.gI();
        double relative =
            Math.hypot(
                ANOMALY,
                Math.hypot(
                    datum.uncertainty() / datum.value(),
                    counterpart.get().uncertainty() / counterpart.get().value()));
        add(
            findings,
            species,
            Check.HYPERFINE,
            datum,
            derived,
            datum.value(),
            relative * Math.abs(datum.value()),
            datum.unit());
      }
    }
  }

  private static Datum inUse(Species species, Datum datum) {
    return species.datum(datum.kind(), datum.level()).orElseThrow();
  }

  private static void add(
      List<Finding> findings,
      Species species,
      Check check,
      Datum datum,
      double derived,
      double reference,
      double uncertainty,
      String unit) {
    findings.add(
        new Finding(
            species.name(),
            check,
            datum.level(),
            derived,
            reference,
            uncertainty,
            unit,
            datum.origin()));
  }
}
