package org.toprung.core.quantity;

/**
 * Constants of nature in SI and the sizes of the atomic units.
 *
 * <p>Exact values are those of the SI of 2019. Measured ones are the CODATA 2018 adjustment
 * (Tiesinga, Mohr, Newell and Taylor, Rev. Mod. Phys. 93, 025010 (2021),
 * doi:10.1103/RevModPhys.93.025010). Those that follow from others are computed here, so that they
 * agree to the last digit.
 */
public final class PhysicalConstants {
  /** Speed of light in vacuum, m/s (exact). */
  public static final double SPEED_OF_LIGHT = 299_792_458.0;

  /** Planck constant, J s (exact). */
  public static final double PLANCK = 6.626_070_15e-34;

  /** Reduced Planck constant, J s. */
  public static final double REDUCED_PLANCK = PLANCK / (2 * Math.PI);

  /** Elementary charge, C (exact). */
  public static final double ELEMENTARY_CHARGE = 1.602_176_634e-19;

  /** Boltzmann constant, J/K (exact). */
  public static final double BOLTZMANN = 1.380_649e-23;

  /** Electron mass, kg. */
  public static final double ELECTRON_MASS = 9.109_383_7015e-31;

  /** Atomic mass unit, kg. */
  public static final double ATOMIC_MASS_UNIT = 1.660_539_066_60e-27;

  /** Electron mass in atomic mass units. */
  public static final double ELECTRON_MASS_U = 5.485_799_090_65e-4;

  /** Fine-structure constant. */
  public static final double FINE_STRUCTURE = 7.297_352_5693e-3;

  /** Vacuum electric permittivity, F/m. */
  public static final double VACUUM_PERMITTIVITY = 8.854_187_8128e-12;

  /** Rydberg constant for infinite nuclear mass times the speed of light, Hz. */
  public static final double RYDBERG_HERTZ = 3.289_841_960_2508e15;

  /** Bohr radius, m: the atomic unit of length. */
  public static final double BOHR_RADIUS = 5.291_772_109_03e-11;

  /** Hartree energy divided by the Planck constant, Hz: twice {@link #RYDBERG_HERTZ}. */
  public static final double HARTREE_HERTZ = 2 * RYDBERG_HERTZ;

  /** Hartree energy, J. */
  public static final double HARTREE = HARTREE_HERTZ * PLANCK;

  /** Atomic unit of time ħ/E_h, s. */
  public static final double ATOMIC_TIME = 1 / (2 * Math.PI * HARTREE_HERTZ);

  /** Atomic unit of the electric dipole moment e a0, C m. */
  public static final double ATOMIC_DIPOLE = ELEMENTARY_CHARGE * BOHR_RADIUS;

  /** Atomic unit of the electric field E_h/(e a0), V/m. */
  public static final double ATOMIC_FIELD = HARTREE / ATOMIC_DIPOLE;

  /**
   * Atomic unit of the polarizability divided by the Planck constant, (e a0)²/(E_h h) in Hz/(V/m)².
   */
  public static final double ATOMIC_POLARIZABILITY_HERTZ =
      HARTREE_HERTZ / (ATOMIC_FIELD * ATOMIC_FIELD);

  /** Bohr magneton divided by the Planck constant, Hz/T. */
  public static final double BOHR_MAGNETON_HERTZ_PER_TESLA =
      ELEMENTARY_CHARGE / (4 * Math.PI * ELECTRON_MASS);

  /**
   * Electron spin g factor in the convention H = µB g_S s·B (positive): the magnitude of the CODATA
   * value.
   */
  public static final double ELECTRON_G_FACTOR = 2.002_319_304_362_56;

  /** Frequency of one reciprocal centimetre, Hz (exact). */
  public static final double HERTZ_PER_RECIPROCAL_CENTIMETRE = SPEED_OF_LIGHT * 100;

  private PhysicalConstants() {}
}
