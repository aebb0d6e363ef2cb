package org.toprung.core.structure;

import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.atom.Sublevel;
import org.toprung.core.quantity.Estimate;

/**
 * Quadratic Stark shift of a sublevel |J, m⟩ in a static electric field of any direction.
 *
 * <p>ΔE/h = −½ [α₀E² + α₂ (3m² − J(J+1))/(J(2J−1)) · (3E<sub>z</sub>² − E²)/2], with z the
 * quantization axis and no tensor part for J = ½. Diagonal in m, which holds while the shift is
 * small against the Zeeman splitting; quadratic, which holds while it is small against the distance
 * to the next level of other parity. Reference: Khadjavi, Lurio and Happer, Phys. Rev. 167, 128
 * (1968).
 *
 * <p>Immutable and thread-safe.
 */
public final class StarkShift {
  private static final int REACH = 6; // in n, beyond the nearest level of any defect

  private final double scalar; // Hz/(V/m)²
  private final double tensor; // Hz/(V/m)², with the factor of m
  private final double relativeUncertainty;
  private final Species species;
  private final Level level;
  private final double[] bias; // V/m; shifts are counted from it

  private StarkShift(
      double scalar,
      double tensor,
      double relativeUncertainty,
      Species species,
      Level level,
      double[] bias) {
    this.scalar = scalar;
    this.tensor = tensor;
    this.relativeUncertainty = relativeUncertainty;
    this.species = species;
    this.level = level;
    this.bias = bias;
  }

  /**
   * The shift of one sublevel.
   *
   * @param species the atom
   * @param sublevel a sublevel given by its m<sub>J</sub>
   * @return its shift as a function of the field
   * @throws IllegalArgumentException if the species has no such sublevel or it is labelled by F
   */
  public static StarkShift of(Species species, Sublevel sublevel) {
    species.requireValid(sublevel);
    if (sublevel.isHyperfine()) {
      throw new IllegalArgumentException(
          "the Stark shift is known for a sublevel given by its mJ, not for " + sublevel);
    }
    Level level = sublevel.level();
    StaticPolarizability polarizability = StaticPolarizability.of(species);
    Estimate alpha0 = polarizability.scalarHertzPerFieldSquared(level);
    double alpha2 = 0;
    double j = 0.5 * level.doubledJ();
    if (j > 0.5) {
      double m = 0.5 * sublevel.doubledM();
      alpha2 =
          polarizability.tensorHertzPerFieldSquared(level).value()
              * (3 * m * m - j * (j + 1))
              / (j * (2 * j - 1));
    }
    return new StarkShift(alpha0.value(), alpha2, alpha0.relative(), species, level, new double[3]);
  }

  /**
   * The shift that a change of field makes in a field that is there already.
   *
   * @param ex component of the field along lab x, V/m
   * @param ey component of the field along lab y, V/m
   * @param ez component of the field along lab z, the quantization axis, V/m
   * @return the shift as a function of what is added to this field, zero where nothing is
   */
  public StarkShift about(double ex, double ey, double ez) {
    return new StarkShift(
        scalar, tensor, relativeUncertainty, species, level, new double[] {ex, ey, ez});
  }

  /**
   * The shift in a field.
   *
   * @param ex component along lab x, V/m
   * @param ey component along lab y, V/m
   * @param ez component along lab z, the quantization axis, V/m
   * @return the shift over h, positive upwards, Hz
   */
  public double hertz(double ex, double ey, double ez) {
    return total(bias[0] + ex, bias[1] + ey, bias[2] + ez) - total(bias[0], bias[1], bias[2]);
  }

  private double total(double ex, double ey, double ez) {
    double square = ex * ex + ey * ey + ez * ez;
    return -0.5 * (scalar * square + tensor * 0.5 * (3 * ez * ez - square));
  }

  /**
   * Relative standard uncertainty of the shift, that of the scalar polarizability.
   *
   * @return the relative uncertainty
   */
  public double relativeUncertainty() {
    return relativeUncertainty;
  }

  /**
   * Distance to the nearest level that a dipole couples with this one. With a single such level at
   * the distance D a shift S is quadratic to about S/D of itself: exactly, it is √(D²/4 + SD) −
   * D/2.
   *
   * @return the distance, Hz, positive
   */
  public double distanceToOtherParityHertz() {
    double energy = species.energyHertz(level).value();
    return Partners.of(species, level, level.n() + REACH).stream()
        .mapToDouble(other -> Math.abs(species.energyHertz(other).value() - energy))
        .min()
        .orElseThrow();
  }
}
