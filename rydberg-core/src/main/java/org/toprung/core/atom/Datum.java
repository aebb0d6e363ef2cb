package org.toprung.core.atom;

import org.toprung.core.quantity.Estimate;
import org.toprung.core.quantity.PhysicalConstants;

/**
 * One value of the catalogue, as published, with where it comes from.
 *
 * @param species the isotope ("Rb-87") or, for what all isotopes share, the element ("Rb")
 * @param kind what is measured
 * @param level the level, series or pair of levels it belongs to; empty where it belongs to the
 *     atom
 * @param value the value in {@code unit}
 * @param uncertainty one standard deviation in {@code unit}, not negative
 * @param unit the unit of the published value
 * @param source the publication
 * @param fromMemory whether the number was written down from memory of the source, not copied from
 *     it
 */
public record Datum(
    String species,
    Kind kind,
    String level,
    double value,
    double uncertainty,
    String unit,
    String source,
    boolean fromMemory) {

  /** What a datum can be about, and the unit {@link Datum#estimate()} answers in. */
  public enum Kind {
    /** Mass of the neutral atom, kg. */
    MASS,
    /** Nuclear spin I. */
    NUCLEAR_SPIN,
    /** Nuclear g factor g_I in H = µB B (g_J m_J + g_I m_I). */
    NUCLEAR_G,
    /** Electronic g factor g_J of a level. */
    ELECTRONIC_G,
    /** Charge number of the nucleus. */
    NUCLEAR_CHARGE,
    /** Smallest n of the valence electron for a letter of l; l + 1 where there is no row. */
    LOWEST_N,
    /** Ionization energy from the hyperfine centre of gravity of the ground level, Hz. */
    IONIZATION_ENERGY,
    /** Ionization energy from the lowest hyperfine level of the ground level, Hz. */
    IONIZATION_ENERGY_FROM_LOWEST_F,
    /** Energy of a level above the ground level, centre of gravity to centre of gravity, Hz. */
    LEVEL_ENERGY,
    /** Constant term of the quantum defect of a series. */
    QUANTUM_DEFECT_0,
    /** Coefficient of (n − δ0)^−2 in the quantum defect of a series. */
    QUANTUM_DEFECT_2,
    /** Coefficient of (n − δ0)^−4. */
    QUANTUM_DEFECT_4,
    /** Coefficient of (n − δ0)^−6. */
    QUANTUM_DEFECT_6,
    /** Coefficient of (n − δ0)^−8. */
    QUANTUM_DEFECT_8,
    /** Coefficient of (n − δ0)^−10. */
    QUANTUM_DEFECT_10,
    /** Magnetic dipole hyperfine constant A, Hz. */
    HYPERFINE_A,
    /** Electric quadrupole hyperfine constant B, Hz. */
    HYPERFINE_B,
    /** Modulus of the reduced dipole element of a pair of levels, in a0. */
    REDUCED_DIPOLE,
    /** Radiative lifetime at zero temperature, s. */
    LIFETIME,
    /** Static dipole polarizability of the ionic core, atomic units. */
    CORE_POLARIZABILITY,
    /** Parameter a1 of the valence-electron potential, atomic units. */
    POTENTIAL_A1,
    /** Parameter a2 of the valence-electron potential, atomic units. */
    POTENTIAL_A2,
    /** Parameter a3 of the valence-electron potential, atomic units. */
    POTENTIAL_A3,
    /** Parameter a4 of the valence-electron potential, atomic units. */
    POTENTIAL_A4,
    /** Cutoff radius of the core polarization in the valence-electron potential, a0. */
    POTENTIAL_RC
  }

  /**
   * Checks the parts.
   *
   * @param species isotope or element
   * @param kind what is measured
   * @param level level, series or pair of levels, or empty
   * @param value the value in {@code unit}
   * @param uncertainty one standard deviation in {@code unit}
   * @param unit the unit
   * @param source the publication
   * @param fromMemory whether it was written down from memory
   * @throws IllegalArgumentException if the value or uncertainty is no possible one, or the unit is
   *     unknown
   */
  public Datum {
    new Estimate(value, uncertainty);
    scale(unit);
  }

  /**
   * The value in the unit that {@link Kind} names, whatever unit it was published in.
   *
   * @return value and uncertainty
   */
  public Estimate estimate() {
    double scale = scale(unit);
    return new Estimate(value * scale, uncertainty * scale);
  }

  private static double scale(String unit) {
    return switch (unit) {
      case "1", "au", "a0" -> 1;
      case "u" -> PhysicalConstants.ATOMIC_MASS_UNIT;
      case "MHz" -> 1e6;
      case "THz" -> 1e12;
      case "cm-1" -> PhysicalConstants.HERTZ_PER_RECIPROCAL_CENTIMETRE;
      case "ns" -> 1e-9;
      default ->
          throw Refusal.of(
              "unit \"%s\" is unknown; allowed: 1, au, a0, u, MHz, THz, cm-1, ns", unit);
    };
  }
}
