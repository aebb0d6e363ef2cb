package org.toprung.core.structure;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Locale;
import org.toprung.angular.HalfInteger;
import org.toprung.core.atom.HyperfineConstants;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.quantity.MagneticField;
import org.toprung.core.quantity.PhysicalConstants;

/**
 * The sublevels of one level at a magnetic field, by exact diagonalization of hyperfine and Zeeman
 * energy in the product basis |m<sub>J</sub>⟩|m<sub>I</sub>⟩.
 *
 * <p>H/h = A I·J + B [3(I·J)² + (3/2) I·J − I(I+1)J(J+1)] / [2I(2I−1)J(2J−1)] + (μ<sub>B</sub>B/h)
 * (g<sub>J</sub>J<sub>z</sub> + g<sub>I</sub>I<sub>z</sub>), with z along the field and the sign of
 * g<sub>I</sub> as written. M = m<sub>J</sub> + m<sub>I</sub> is conserved, so that every M is
 * diagonalized alone.
 *
 * <p>A sublevel is labelled by M and by the F it goes to when the field is turned off slowly:
 * within one M levels do not cross, so the order of the energies is that of zero field. Energies
 * are counted from the centre of gravity of the manifold at zero field. Eigenvectors are real, with
 * the largest component positive.
 *
 * <p>Valid while the field does not mix levels of different J: μ<sub>B</sub>B ≪ fine-structure
 * splitting. References: Arimondo, Inguscio and Violino, Rev. Mod. Phys. 49, 31 (1977); Breit and
 * Rabi, Phys. Rev. 38, 2082 (1931).
 *
 * <p>Immutable and thread-safe.
 */
public final class HyperfineManifold {

  /** One sublevel of the manifold. Immutable. */
  public static final class Eigenstate {
    private final Level level;
    private final int doubledF;
    private final int doubledM;
    private final double energy; // Hz
    private final double slope; // Hz/T
    private final int[] doubledMj;
    private final double[] amplitude;

    private Eigenstate(
        Level level,
        int doubledF,
        int doubledM,
        double energy,
        double slope,
        int[] doubledMj,
        double[] amplitude) {
      this.level = level;
      this.doubledF = doubledF;
      this.doubledM = doubledM;
      this.energy = energy;
      this.slope = slope;
      this.doubledMj = doubledMj;
      this.amplitude = amplitude;
    }

    /**
     * The F that this sublevel goes to at zero field.
     *
     * @return 2F
     */
    public int doubledF() {
      return doubledF;
    }

    /**
     * The conserved projection m<sub>J</sub> + m<sub>I</sub>.
     *
     * @return 2m<sub>F</sub>
     */
    public int doubledM() {
      return doubledM;
    }

    /**
     * Energy over h, from the centre of gravity of the manifold.
     *
     * @return the energy, Hz
     */
    public double energyHertz() {
      return energy;
    }

    /**
     * Derivative of the energy over h with the magnetic field.
     *
     * @return the derivative, Hz/T
     */
    public double hertzPerTesla() {
      return slope;
    }

    /**
     * The number of product states |m<sub>J</sub>⟩|m<sub>I</sub>⟩ in this sublevel.
     *
     * @return the number of components
     */
    public int components() {
      return amplitude.length;
    }

    /**
     * Electronic projection of a component; the nuclear one is M − m<sub>J</sub>.
     *
     * @param component index from 0
     * @return 2m<sub>J</sub>
     */
    public int doubledMj(int component) {
      return doubledMj[component];
    }

    /**
     * Amplitude of a component.
     *
     * @param component index from 0
     * @return the real amplitude
     */
    public double amplitude(int component) {
      return amplitude[component];
    }

    @Override
    public String toString() {
      return String.format(
          Locale.ROOT,
          "%s F=%s mF=%s",
          level,
          HalfInteger.ofHalves(doubledF),
          HalfInteger.ofHalves(doubledM));
    }
  }

  private final List<Eigenstate> states;

  private HyperfineManifold(List<Eigenstate> states) {
    this.states = states;
  }

  /**
   * Diagonalizes the manifold of a level.
   *
   * @param species the atom
   * @param level the level; the catalogue must know its hyperfine constants
   * @param field magnetic field along z
   * @return the sublevels at that field
   * @throws IllegalArgumentException if the level is not one of the species, or no hyperfine
   *     constants are known for it
   */
  public static HyperfineManifold of(Species species, Level level, MagneticField field) {
    species.requireValid(level);
    HyperfineConstants constants = species.hyperfine(level);
    int tI = species.doubledNuclearSpin();
    int tJ = level.doubledJ();
    double bohrTimesField = PhysicalConstants.BOHR_MAGNETON_HERTZ_PER_TESLA * field.tesla();
    double gJ = species.gJ(level);
    double gI = species.gI();
    List<Eigenstate> states = new ArrayList<>();
    for (int tM = -(tI + tJ); tM <= tI + tJ; tM += 2) {
      int[] tMj = projections(tI, tJ, tM);
      double[][] product = spinProduct(tI, tJ, tM, tMj);
      double[][] h = hyperfine(product, constants, tI, tJ);
      for (int i = 0; i < tMj.length; i++) {
        h[i][i] += bohrTimesField * 0.5 * (gJ * tMj[i] + gI * (tM - tMj[i]));
      }
      List<Integer> labels = labels(constants, tI, tJ, tM);
      SymmetricEigen eigen = SymmetricEigen.of(h);
      for (int i = 0; i < tMj.length; i++) {
        double[] amplitude = phased(eigen.vector(i));
        double slope = 0;
        for (int k = 0; k < tMj.length; k++) {
          slope +=
              amplitude[k]
                  * amplitude[k]
                  * (gJ * tMj[k] + gI * (tM - tMj[k]))
                  * 0.5
                  * PhysicalConstants.BOHR_MAGNETON_HERTZ_PER_TESLA;
        }
        states.add(new Eigenstate(level, labels.get(i), tM, eigen.value(i), slope, tMj, amplitude));
      }
    }
    return new HyperfineManifold(List.copyOf(states));
  }

  private static int[] projections(int tI, int tJ, int tM) {
    int low = Math.max(-tJ, tM - tI);
    int high = Math.min(tJ, tM + tI);
    int[] tMj = new int[(high - low) / 2 + 1];
    for (int i = 0; i < tMj.length; i++) {
      tMj[i] = low + 2 * i;
    }
    return tMj;
  }

  /** I·J = I_z J_z + (I₊J₋ + I₋J₊)/2 within one M. */
  private static double[][] spinProduct(int tI, int tJ, int tM, int[] tMj) {
    double[][] m = new double[tMj.length][tMj.length];
    for (int i = 0; i < tMj.length; i++) {
      int tMi = tM - tMj[i];
      m[i][i] = 0.25 * tMj[i] * tMi;
      if (i + 1 < tMj.length) {
        double flip = 0.5 * raising(tJ, tMj[i]) * raising(tI, tMi - 2);
        m[i][i + 1] = flip;
        m[i + 1][i] = flip;
      }
    }
    return m;
  }

  /** √(j(j+1) − m(m+1)) from doubled arguments. */
  private static double raising(int tj, int tm) {
    return 0.5 * Math.sqrt((double) tj * (tj + 2) - (double) tm * (tm + 2));
  }

  private static double[][] hyperfine(
      double[][] product, HyperfineConstants constants, int tI, int tJ) {
    int n = product.length;
    double i = 0.5 * tI;
    double j = 0.5 * tJ;
    boolean quadrupole = constants.bHertz() != 0 && tI >= 2 && tJ >= 2;
    double scale = quadrupole ? constants.bHertz() / (2 * i * (2 * i - 1) * j * (2 * j - 1)) : 0;
    double[][] h = new double[n][n];
    for (int row = 0; row < n; row++) {
      for (int column = 0; column < n; column++) {
        double square = 0;
        for (int k = 0; k < n; k++) {
          square += product[row][k] * product[k][column];
        }
        double shape = 3 * square + 1.5 * product[row][column];
        shape -= row == column ? i * (i + 1) * j * (j + 1) : 0;
        h[row][column] = constants.aHertz() * product[row][column] + scale * shape;
      }
    }
    return h;
  }

  /** 2F of the levels that have this M, in order of their energy at zero field. */
  private static List<Integer> labels(HyperfineConstants constants, int tI, int tJ, int tM) {
    List<Integer> labels = new ArrayList<>();
    for (int tF = Math.max(Math.abs(tI - tJ), Math.abs(tM)); tF <= tI + tJ; tF += 2) {
      labels.add(tF);
    }
    labels.sort(Comparator.comparingDouble(tF -> zeroFieldHertz(constants, tI, tJ, tF)));
    return labels;
  }

  private static double zeroFieldHertz(HyperfineConstants constants, int tI, int tJ, int tF) {
    double i = 0.5 * tI;
    double j = 0.5 * tJ;
    double f = 0.5 * tF;
    double product = 0.5 * (f * (f + 1) - i * (i + 1) - j * (j + 1));
    double energy = constants.aHertz() * product;
    if (constants.bHertz() != 0 && tI >= 2 && tJ >= 2) {
      energy +=
          constants.bHertz()
              * (3 * product * product + 1.5 * product - i * (i + 1) * j * (j + 1))
              / (2 * i * (2 * i - 1) * j * (2 * j - 1));
    }
    return energy;
  }

  private static double[] phased(double[] vector) {
    double largest = 0;
    for (double v : vector) {
      // the margin keeps the sign the same on machines that round differently
      if (Math.abs(v) > Math.abs(largest) * (1 + 1e-9)) {
        largest = v;
      }
    }
    if (largest < 0) {
      for (int k = 0; k < vector.length; k++) {
        vector[k] = -vector[k];
      }
    }
    return vector;
  }

  /**
   * All sublevels, by rising M and, within one M, rising energy.
   *
   * @return an immutable list of (2I+1)(2J+1) sublevels
   */
  public List<Eigenstate> states() {
    return states;
  }

  /**
   * One sublevel by its labels.
   *
   * @param doubledF 2F
   * @param doubledM 2m<sub>F</sub>
   * @return the sublevel
   * @throws IllegalArgumentException if the manifold has no such sublevel
   */
  public Eigenstate state(int doubledF, int doubledM) {
    for (Eigenstate s : states) {
      if (s.doubledF == doubledF && s.doubledM == doubledM) {
        return s;
      }
    }
    throw new IllegalArgumentException(
        String.format(
            Locale.ROOT,
            "no sublevel F=%s mF=%s in %s",
            HalfInteger.ofHalves(doubledF),
            HalfInteger.ofHalves(doubledM),
            states.get(0).level));
  }
}
