package org.toprung.core.radial;

import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.cache.BoundedCache;
import org.toprung.core.quantity.PhysicalConstants;

/**
 * Radial integrals with Coulomb waves at the measured effective quantum number (Bates and Damgaard,
 * Phil. Trans. R. Soc. A 242, 101 (1949); Seaton, Rep. Prog. Phys. 46, 167 (1983)): exact outside
 * the core, and for hydrogen throughout; of the core it knows only the quantum defect.
 *
 * <p>Range: effective quantum number above l and at most {@value #HIGHEST_NU}, l to {@value
 * #HIGHEST_L}. Integrals of hydrogen are exact to 1e-11. At non-integer ν an integral of a power
 * below −2l depends on the inner cut and means little.
 *
 * <p>Immutable to the outside; waves are kept in a bounded cache.
 */
public final class CoulombMethod implements WaveMethod {
  /** Largest l. */
  public static final int HIGHEST_L = 20;

  /** Largest effective quantum number. */
  public static final int HIGHEST_NU = 151;

  private static final int WAVES = 200;

  private final Species species;
  private final double lengthScale;
  private final BoundedCache<Level, CoulombWave> waves = new BoundedCache<>(WAVES, this::wave);

  private CoulombMethod(Species species) {
    this.species = species;
    this.lengthScale =
        species != null && species.isHydrogen()
            ? PhysicalConstants.RYDBERG_HERTZ / species.rydbergHertz()
            : 1;
  }

  /**
   * The method for an atom.
   *
   * @param species the atom; for hydrogen ν = n, and lengths are enlarged by the reduced mass
   * @return the method
   */
  public static CoulombMethod of(Species species) {
    return new CoulombMethod(species);
  }

  /**
   * The method for hydrogen with an infinitely heavy nucleus, nonrelativistic; j has no influence.
   *
   * @return the method
   */
  public static CoulombMethod hydrogen() {
    return new CoulombMethod(null);
  }

  @Override
  public String description() {
    return "Coulomb waves at the measured quantum defect";
  }

  /**
   * {@inheritDoc}
   *
   * @throws IllegalArgumentException if a level belongs to the core, l is above {@value
   *     #HIGHEST_L}, or the effective quantum number is not above l
   */
  @Override
  public RadialIntegral dipole(Level a, Level b) {
    return new RadialIntegral(power(a, b, 1), 0, 0, false);
  }

  @Override
  public double power(Level a, Level b, int k) {
    WaveMethod.requirePower(a, b, k);
    return Math.pow(lengthScale, k) * waves.get(a).power(waves.get(b), k);
  }

  @Override
  public Wavefunction wavefunction(Level level) {
    return waves.get(level).table(lengthScale);
  }

  private CoulombWave wave(Level level) {
    return CoulombWave.of(level.n(), level.l(), effectiveN(species, level));
  }

  /** ν of a level, refused where a Coulomb wave cannot describe it. */
  static double effectiveN(Species species, Level level) {
    double nu = species == null || species.isHydrogen() ? level.n() : species.effectiveN(level);
    if (!(level.l() <= HIGHEST_L && nu > level.l() && nu <= HIGHEST_NU)) {
      throw new IllegalArgumentException(
          "a Coulomb wave needs l of at most "
              + HIGHEST_L
              + " and an effective quantum number above l and at most "
              + HIGHEST_NU
              + "; "
              + level
              + " has "
              + nu);
    }
    return nu;
  }
}
