package org.toprung.core.atom;

import java.util.Locale;
import org.toprung.core.quantity.Estimate;
import org.toprung.core.quantity.PhysicalConstants;

/**
 * One value of the catalogue, as published, with where it comes from.
 *
 * @param species the isotope ("Rb-87") or, for what all isotopes share, the element ("Rb")
 * @param kind what is measured
 * @param level the level, series or pair of levels it belongs to, of a pair the level of smaller n
 *     (then l, then j) first; empty where it belongs to the atom
 * @param value the value in {@code unit}
 * @param uncertainty one standard deviation in {@code unit}, not negative
 * @param unit the unit of the published value
 * @param source the publication
 * @param fromMemory whether the number was written down from memory of the source, not copied from
 *     it
 * @param chosenBecause why this value is used and not another one of the same quantity; empty where
 *     there is none or this one is not used
 * @param origin the file and line it was read from, for example "rubidium.csv:55"
 */
public record Datum(
    String species,
    Kind kind,
    String level,
    double value,
    double uncertainty,
    String unit,
    String source,
    boolean fromMemory,
    String chosenBecause,
    String origin) {

  /** What the column level must hold. */
  private enum Form {
    ATOM("nothing"),
    LEVEL("a level, for example 5P3/2"),
    PAIR("two levels, for example 5S1/2-5P3/2"),
    SHELL("n and the letter of l, for example 5P"),
    SERIES("a series, for example P3/2"),
    LETTER("the letter of l: S, P, D or F");

    private static final String LETTERS = "SPDF";

    private final String description;

    Form(String description) {
      this.description = description;
    }

    /**
     * A cell of this form as it is looked up: levels as they print, the lower of a pair first; null
     * where it has another form. An impossible level in it is refused with its own message.
     */
    private String canonical(String cell) {
      return switch (this) {
        case ATOM -> cell.isEmpty() ? cell : null;
        case LEVEL -> Level.parse(cell).toString();
        case PAIR -> {
          int dash = cell.indexOf('-');
          if (dash <= 0) {
            yield null;
          }
          Level one = Level.parse(cell.substring(0, dash));
          Level other = Level.parse(cell.substring(dash + 1));
          yield one.compareTo(other) <= 0 ? one + "-" + other : other + "-" + one;
        }
        case SHELL -> {
          int last = cell.length() - 1;
          int l = last > 0 ? LETTERS.indexOf(cell.charAt(last)) : -1;
          yield l >= 0 ? Level.parse(cell + (2 * l + 1) + "/2").n() + cell.substring(last) : null;
        }
        case SERIES -> Level.parse(Level.MAXIMUM_N + cell).series();
        case LETTER -> cell.length() == 1 && LETTERS.contains(cell) ? cell : null;
      };
    }
  }

  /** What can be measured in which units. */
  private enum Unit {
    PURE("1"),
    ATOMIC("au, a0"),
    MASS("u"),
    FREQUENCY("MHz, THz, cm-1"),
    TIME("ns");

    private final String allowed;

    Unit(String allowed) {
      this.allowed = allowed;
    }

    /** Size of a unit in the unit of the kind, NaN if it is not allowed. */
    private double scale(String unit) {
      return switch (this) {
        case PURE -> unit.equals("1") ? 1 : Double.NaN;
        case ATOMIC -> unit.equals("au") || unit.equals("a0") ? 1 : Double.NaN;
        case MASS -> unit.equals("u") ? PhysicalConstants.ATOMIC_MASS_UNIT : Double.NaN;
        case TIME -> unit.equals("ns") ? 1e-9 : Double.NaN;
        case FREQUENCY ->
            switch (unit) {
              case "MHz" -> 1e6;
              case "THz" -> 1e12;
              case "cm-1" -> PhysicalConstants.HERTZ_PER_RECIPROCAL_CENTIMETRE;
              default -> Double.NaN;
            };
      };
    }
  }

  /** What a datum can be about, and the unit {@link Datum#estimate()} answers in. */
  public enum Kind {
    /** Mass of the neutral atom, kg. */
    MASS(Form.ATOM, Unit.MASS, true),
    /** Nuclear spin I. */
    NUCLEAR_SPIN(Form.ATOM, Unit.PURE, true),
    /** Nuclear g factor g_I in H = µB B (g_J m_J + g_I m_I). */
    NUCLEAR_G(Form.ATOM, Unit.PURE, false),
    /** Electronic g factor g_J of a level. */
    ELECTRONIC_G(Form.LEVEL, Unit.PURE, false),
    /** Charge number of the nucleus. */
    NUCLEAR_CHARGE(Form.ATOM, Unit.PURE, true),
    /** Published Rydberg constant of the isotope, times the speed of light, Hz. */
    RYDBERG_CONSTANT(Form.ATOM, Unit.FREQUENCY, true),
    /** Published fine-structure splitting of a shell, upper j minus lower j, Hz. */
    FINE_SPLITTING(Form.SHELL, Unit.FREQUENCY, false),
    /** Smallest n of the valence electron for a letter of l; l + 1 where there is no row. */
    LOWEST_N(Form.LETTER, Unit.PURE, true),
    /** Mass number of the isotope on which the rows of an element were measured. */
    REFERENCE_ISOTOPE(Form.ATOM, Unit.PURE, true),
    /** Ionization energy from the hyperfine centre of gravity of the ground level, Hz. */
    IONIZATION_ENERGY(Form.LEVEL, Unit.FREQUENCY, true),
    /** Ionization energy from the lowest hyperfine level of the ground level, Hz. */
    IONIZATION_ENERGY_FROM_LOWEST_F(Form.LEVEL, Unit.FREQUENCY, true),
    /** Energy of a level above the ground level, centre of gravity to centre of gravity, Hz. */
    LEVEL_ENERGY(Form.LEVEL, Unit.FREQUENCY, true),
    /** Constant term of the quantum defect of a series. */
    QUANTUM_DEFECT_0(Form.SERIES, Unit.PURE, false),
    /** Coefficient of (n − δ0)^−2 in the quantum defect of a series. */
    QUANTUM_DEFECT_2(Form.SERIES, Unit.PURE, false),
    /** Coefficient of (n − δ0)^−4. */
    QUANTUM_DEFECT_4(Form.SERIES, Unit.PURE, false),
    /** Coefficient of (n − δ0)^−6. */
    QUANTUM_DEFECT_6(Form.SERIES, Unit.PURE, false),
    /** Coefficient of (n − δ0)^−8. */
    QUANTUM_DEFECT_8(Form.SERIES, Unit.PURE, false),
    /** Coefficient of (n − δ0)^−10. */
    QUANTUM_DEFECT_10(Form.SERIES, Unit.PURE, false),
    /** Magnetic dipole hyperfine constant A, Hz. */
    HYPERFINE_A(Form.LEVEL, Unit.FREQUENCY, false),
    /** Electric quadrupole hyperfine constant B, Hz. */
    HYPERFINE_B(Form.LEVEL, Unit.FREQUENCY, false),
    /** Modulus of the reduced dipole element of a pair of levels, in a0. */
    REDUCED_DIPOLE(Form.PAIR, Unit.ATOMIC, true),
    /** Radiative lifetime at zero temperature, s. */
    LIFETIME(Form.LEVEL, Unit.TIME, true),
    /** Static dipole polarizability of the ionic core, atomic units. */
    CORE_POLARIZABILITY(Form.ATOM, Unit.ATOMIC, false),
    /** Parameter a1 of the valence-electron potential, atomic units. */
    POTENTIAL_A1(Form.LETTER, Unit.ATOMIC, true),
    /** Parameter a2 of the valence-electron potential, atomic units. */
    POTENTIAL_A2(Form.LETTER, Unit.ATOMIC, true),
    /** Parameter a3 of the valence-electron potential, atomic units. */
    POTENTIAL_A3(Form.LETTER, Unit.ATOMIC, false),
    /** Parameter a4 of the valence-electron potential, atomic units. */
    POTENTIAL_A4(Form.LETTER, Unit.ATOMIC, false),
    /** Cutoff radius of the core polarization in the valence-electron potential, a0. */
    POTENTIAL_RC(Form.LETTER, Unit.ATOMIC, true);

    private final Form form;
    private final Unit unit;
    private final boolean positive;

    Kind(Form form, Unit unit, boolean positive) {
      this.form = form;
      this.unit = unit;
      this.positive = positive;
    }

    /** Whether this is a coefficient of a series beyond its constant term. */
    boolean isHigherCoefficient() {
      return compareTo(QUANTUM_DEFECT_0) > 0 && compareTo(QUANTUM_DEFECT_10) <= 0;
    }
  }

  /**
   * Checks the parts.
   *
   * @param species isotope or element
   * @param kind what is measured
   * @param level level, series or pair of levels in either order, or empty
   * @param value the value in {@code unit}
   * @param uncertainty one standard deviation in {@code unit}
   * @param unit the unit
   * @param source the publication
   * @param fromMemory whether it was written down from memory
   * @param chosenBecause why it is preferred, or empty
   * @param origin file and line
   * @throws IllegalArgumentException if the value or uncertainty is no possible one, or level or
   *     unit do not fit the kind
   */
  public Datum {
    new Estimate(value, uncertainty);
    if (!(kind.unit.scale(unit) > 0)) {
      throw Refusal.of(
          "unit \"%s\" of %s is not known; allowed: %s", unit, name(kind), kind.unit.allowed);
    }
    String canonical = kind.form.canonical(level);
    if (canonical == null) {
      throw Refusal.of(
          "level of %s must be %s, given \"%s\"", name(kind), kind.form.description, level);
    }
    level = canonical;
    if (kind.positive && !(value > 0)) {
      throw Refusal.of("value of %s must be positive, given %s", name(kind), value);
    }
  }

  private static String name(Kind kind) {
    return kind.name().toLowerCase(Locale.ROOT);
  }

  /**
   * The value in the unit that {@link Kind} names, whatever unit it was published in.
   *
   * @return value and uncertainty
   */
  public Estimate estimate() {
    double scale = kind.unit.scale(unit);
    return new Estimate(value * scale, uncertainty * scale);
  }
}
