package org.toprung.core.radial;

import java.util.Locale;
import java.util.function.ToDoubleFunction;
import org.toprung.core.atom.Datum;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.cache.BoundedCache;
import org.toprung.core.quantity.PhysicalConstants;

/**
 * Radial integrals by Numerov integration at measured energies: in the Coulomb potential for
 * hydrogen, and for an alkali atom in the l-dependent model potential of Marinescu, Sadeghpour and
 * Dalgarno, Phys. Rev. A 49, 982 (1994), with spin-orbit energy.
 *
 * <p><b>Core polarization.</b> The valence electron induces a dipole in the core, so the operator
 * is r − α_c r/(r² + r_c²)^{3/2} (Hameed, Herzenberg and James, J. Phys. B 1, 822 (1968); Hameed,
 * J. Phys. B 5, 746 (1972)). Without it the elements from the ground level to the second resonance
 * come out 25 to 45 % high. The cutoff radius r_c of P_j is calibrated so that the highest measured
 * element from the ground level to nP_j is met: near threshold the inner part of a wave no longer
 * changes with n, so this member says most about higher n. Pairs of S and P_j take that radius,
 * other pairs the larger of both levels, since the core is polarized as a dipole where both waves
 * are outside it; for l ≠ 1 the radius is that of the potential.
 *
 * <p>Uncertainty of the correction: 5 % where it is calibrated (from the second resonance the D
 * lines of Rb and Cs are then met to 0.4 %, where it is 7 %); elsewhere one half, or what the
 * smaller of the two radii would change if that is more.
 *
 * <p><b>Accuracy.</b> Hydrogen: two grids and Richardson extrapolation, relative error below 1e-10
 * to n = 100. Alkali atoms: a quarter of the step changes elements to n = 150 by 2e-7 at most, or
 * 1e-9 n² where they are small by cancellation; by 5e-5 where the inner cut of a low F level
 * matters. All this is far below the error of the model.
 *
 * <p>Immutable to the outside; waves are kept in a bounded cache.
 */
public final class NumerovMethod implements WaveMethod {
  private static final double STEP = 0.02;

  /** Parts of the core correction that are its uncertainty. */
  private static final double CALIBRATED_PART = 0.05;

  private static final double COMPUTED_PART = 0.5;

  private static final int WAVES = 400;
  private static final int SOLVERS = 48;

  /** Beyond this radius, in a0, a cutoff would switch the correction off where it matters. */
  private static final double LARGEST_CUTOFF = 5;

  private static final double CUTOFF_STEP = 0.5;
  private static final double CUTOFF_TOLERANCE = 1e-12;
  private static final double ELEMENT_TOLERANCE = 1e-11;
  private static final int ITERATIONS = 60;

  private record SolverKey(int l, int doubledJ) {
    // by hand: those of a record are slow to start
    @Override
    public boolean equals(Object other) {
      return other instanceof SolverKey that && that.l == l && that.doubledJ == doubledJ;
    }

    @Override
    public int hashCode() {
      return 31 * l + doubledJ;
    }
  }

  private final String description;
  private final BoundedCache<Level, RadialWave> waves;
  private final double lengthScale;
  private final NumerovMethod refined;
  private final Species species;
  private final BoundedCache<Level, Double> eigenvalues =
      new BoundedCache<>(WAVES, this::eigenvalue);
  private final BoundedCache<Integer, Double> potentialCutoffs;
  private final BoundedCache<Integer, Double> calibrations;

  private NumerovMethod(
      String description,
      ToDoubleFunction<Level> effectiveN,
      Species species,
      boolean calibrate,
      double step,
      double lengthScale,
      NumerovMethod refined) {
    this.description = description;
    this.species = species;
    this.lengthScale = lengthScale;
    this.refined = refined;
    BoundedCache<SolverKey, NumerovSolver> solvers =
        new BoundedCache<>(
            SOLVERS,
            key ->
                new NumerovSolver(
                    species == null
                        ? ValencePotential.coulomb()
                        : new ModelPotential(species, key.l(), key.doubledJ()),
                    key.l(),
                    step));
    this.waves =
        new BoundedCache<>(
            WAVES,
            level ->
                solvers
                    .get(new SolverKey(level.l(), level.doubledJ()))
                    .solve(level.n(), effectiveN.applyAsDouble(level)));
    this.potentialCutoffs =
        new BoundedCache<>(
            ModelPotential.HIGHEST_L + 1, l -> ModelPotential.cutoffRadius(species, l));
    // one entry for j = 1/2 and one for 3/2; NaN where nothing is measured
    this.calibrations =
        new BoundedCache<>(2, doubledJ -> calibrate ? calibrated(doubledJ) : Double.NaN);
  }

  /**
   * The method for an atom.
   *
   * @param species the atom; for hydrogen the integrals are those of {@link #hydrogen()}, enlarged
   *     by the reduced mass
   * @return the method, with the core correction calibrated where an element is measured
   */
  public static NumerovMethod of(Species species) {
    if (species.isHydrogen()) {
      return hydrogen(PhysicalConstants.RYDBERG_HERTZ / species.rydbergHertz());
    }
    return new NumerovMethod(
        "model potential, Numerov", species::effectiveN, species, true, STEP, 1, null);
  }

  /**
   * The method for an alkali atom without use of any measured element.
   *
   * @param species the atom
   * @return the method, with the cutoff radii of the potential in the core correction
   */
  public static NumerovMethod uncalibrated(Species species) {
    if (species.isHydrogen()) {
      return hydrogen(PhysicalConstants.RYDBERG_HERTZ / species.rydbergHertz());
    }
    return new NumerovMethod(
        "model potential, Numerov, uncalibrated",
        species::effectiveN,
        species,
        false,
        STEP,
        1,
        null);
  }

  /**
   * The method for an alkali atom at the eigenvalues of its potential instead of the measured
   * energies, uncalibrated. The waves are regular at the nucleus.
   *
   * @param species the atom
   * @return the method
   */
  public static NumerovMethod atEigenvalues(Species species) {
    NumerovMethod measured = uncalibrated(species);
    return species.isHydrogen()
        ? measured
        : new NumerovMethod(
            "model potential at its eigenvalues, Numerov",
            measured::eigenvalueEffectiveN,
            species,
            false,
            STEP,
            1,
            null);
  }

  /**
   * The method for hydrogen with an infinitely heavy nucleus, nonrelativistic; j has no influence.
   *
   * @return the method
   */
  public static NumerovMethod hydrogen() {
    return hydrogen(1);
  }

  private static NumerovMethod hydrogen(double lengthScale) {
    NumerovMethod fine =
        new NumerovMethod("hydrogen, Numerov", Level::n, null, false, STEP / 2, lengthScale, null);
    return new NumerovMethod(fine.description, Level::n, null, false, STEP, lengthScale, fine);
  }

  @Override
  public String description() {
    return description;
  }

  @Override
  public RadialIntegral dipole(Level a, Level b) {
    double bare = waves.get(a).dipole(waves.get(b));
    if (species == null) {
      // the error of the Numerov recursion is h⁴ + O(h⁶)
      double fine = refined == null ? bare : refined.waves.get(a).dipole(refined.waves.get(b));
      return new RadialIntegral(lengthScale * (fine + (fine - bare) / 15), 0, 0, false);
    }
    double cutoffA = cutoff(a);
    double cutoffB = cutoff(b);
    if (a.l() + b.l() == 1) {
      Level p = a.l() == 1 ? a : b;
      boolean calibrated = calibration(p) > 0;
      double correction = correction(a, b, a.l() == 1 ? cutoffA : cutoffB);
      double part = calibrated ? CALIBRATED_PART : COMPUTED_PART;
      return new RadialIntegral(bare, correction, part * Math.abs(correction), calibrated);
    }
    double correction = correction(a, b, Math.max(cutoffA, cutoffB));
    double other = correction(a, b, Math.min(cutoffA, cutoffB));
    double spread = Math.max(COMPUTED_PART * Math.abs(correction), Math.abs(correction - other));
    return new RadialIntegral(bare, correction, spread, false);
  }

  @Override
  public double power(Level a, Level b, int k) {
    WaveMethod.requirePower(a, b, k);
    double coarse = waves.get(a).power(waves.get(b), k);
    if (refined == null) {
      return Math.pow(lengthScale, k) * coarse;
    }
    double fine = refined.waves.get(a).power(refined.waves.get(b), k);
    return Math.pow(lengthScale, k) * (fine + (fine - coarse) / 15);
  }

  @Override
  public Wavefunction wavefunction(Level level) {
    return waves.get(level).table(lengthScale);
  }

  /**
   * Where the potential itself has the level, as a check of its parameters.
   *
   * @param level the level
   * @return the effective quantum number √(−1/2E) of the eigenvalue with the nodes of the level; n
   *     for hydrogen
   * @throws IllegalArgumentException if the level belongs to the core or is not in the catalogue
   * @throws ArithmeticException if the potential has no such state near the measured level
   */
  public double eigenvalueEffectiveN(Level level) {
    if (species == null) {
      return level.n();
    }
    return eigenvalues.get(level);
  }

  private double eigenvalue(Level level) {
    double measured = species.effectiveN(level);
    return PotentialEigenvalue.effectiveN(
        new ModelPotential(species, level.l(), level.doubledJ()), level.n(), level.l(), measured);
  }

  /** The cutoff radius of a level in a0. */
  private double cutoff(Level level) {
    double calibrated = level.l() == 1 ? calibration(level) : Double.NaN;
    return calibrated > 0 ? calibrated : potentialCutoff(level.l());
  }

  private double calibration(Level p) {
    return calibrations.get(p.doubledJ());
  }

  private double correction(Level a, Level b, double cutoff) {
    return -species.corePolarizabilityAu().value()
        * waves.get(a).corePolarization(waves.get(b), cutoff);
  }

  private double potentialCutoff(int l) {
    return potentialCutoffs.get(Math.min(l, ModelPotential.HIGHEST_L));
  }

  /**
   * The cutoff radius at which the highest measured element from the ground level to nP_j is met,
   * the largest there is; NaN where no element is measured or none can meet it.
   */
  private double calibrated(int doubledJ) {
    Level ground = species.groundLevel();
    Level highest = null;
    double target = Double.NaN;
    for (int n = ground.n(); n <= Level.MAXIMUM_N; n++) {
      Level p = Level.of(n, 1, doubledJ);
      var measured = species.datum(Datum.Kind.REDUCED_DIPOLE, ground + "-" + p);
      if (measured.isPresent()) {
        highest = p;
        // ⟨S1/2‖r‖P_j⟩² = (2j+1)/3 R²
        target = measured.get().estimate().value() / Math.sqrt((doubledJ + 1) / 3.0);
      }
    }
    if (highest == null) {
      return Double.NaN;
    }
    double bare = waves.get(ground).dipole(waves.get(highest));
    double high = LARGEST_CUTOFF;
    double above = excess(ground, highest, bare, target, high);
    double low = high;
    double below = above;
    while (low > CUTOFF_STEP && below > 0) {
      high = low;
      above = below;
      low -= CUTOFF_STEP;
      below = excess(ground, highest, bare, target, low);
    }
    if (!(above > 0 && below <= 0)) {
      return Double.NaN;
    }
    // regula falsi, Illinois variant
    double middle = low;
    for (int i = 0; i < ITERATIONS && high - low > CUTOFF_TOLERANCE; i++) {
      middle = (low * above - high * below) / (above - below);
      double value = excess(ground, highest, bare, target, middle);
      if (Math.abs(value) <= ELEMENT_TOLERANCE * target) {
        break;
      }
      if (value > 0) {
        high = middle;
        above = value;
        below /= 2;
      } else {
        low = middle;
        below = value;
        above /= 2;
      }
    }
    return middle;
  }

  private double excess(Level a, Level b, double bare, double target, double cutoff) {
    return Math.abs(bare + correction(a, b, cutoff)) - target;
  }

  /**
   * What the method is.
   *
   * @return the description
   */
  @Override
  public String toString() {
    return species == null
        ? description
        : String.format(Locale.ROOT, "%s, %s", description, species);
  }
}
