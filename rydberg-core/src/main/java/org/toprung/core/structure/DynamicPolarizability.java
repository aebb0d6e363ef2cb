package org.toprung.core.structure;

import java.util.Set;
import org.toprung.angular.PolarizationVector;
import org.toprung.angular.SphericalComponents;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.quantity.Estimate;
import org.toprung.core.quantity.Frequency;
import org.toprung.core.quantity.PhysicalConstants;

/**
 * Polarizabilities of fine-structure levels in light of any frequency, in atomic units.
 *
 * <p>Convention: the shift of |J m⟩ in the field E0 cos ωt is
 *
 * <p>ΔE = −(E0²/4) [α_0 + ξ α_1 m/(2J) + (3|ε_z|² − 1)/2 · α_2 (3m² − J(J+1))/(J(2J−1))],
 *
 * <p>ξ = |ε_+|² − |ε_−|² the degree of circular polarization about the axis of m, positive where σ+
 * light raises m on absorption (for example Le Kien, Schneeweiss and Rauschenbeutel, Eur. Phys. J.
 * D 67, 92 (2013)). At ω → 0 scalar and tensor part are the static ones and the vector part
 * vanishes. Above the ionization threshold of a level the part of the free electron, −1/ω² in
 * atomic units, is included. Close to a resonance the numbers diverge: there the hyperfine
 * structure matters, which is not resolved here.
 *
 * <p>They are read off {@link FarLightShift}, with its treatment of core and continuum. Immutable,
 * thread-safe.
 */
public final class DynamicPolarizability {
  private static final SphericalComponents PI =
      PolarizationVector.of(0, 0, 0, 0, 1, 0).componentsAbout(0, 0, 1);
  private static final SphericalComponents SIGMA_PLUS =
      PolarizationVector.of(Math.sqrt(0.5), 0, 0, Math.sqrt(0.5), 0, 0).componentsAbout(0, 0, 1);

  private final FarLightShift shifts;

  private DynamicPolarizability(FarLightShift shifts) {
    this.shifts = shifts;
  }

  /**
   * The polarizabilities of an atom.
   *
   * @param species the atom
   * @return the polarizabilities
   */
  public static DynamicPolarizability of(Species species) {
    return new DynamicPolarizability(FarLightShift.of(species));
  }

  /**
   * The scalar part.
   *
   * @param level the level
   * @param light frequency of the light, positive
   * @return α_0 in atomic units (e a0)²/E_h
   * @throws IllegalArgumentException if the level belongs to the core or is not in the catalogue,
   *     or the frequency is not positive
   */
  public Estimate scalarAu(Level level, Frequency light) {
    int states = level.doubledJ() + 1;
    double sum = 0;
    double uncertainty = 0;
    for (int m = -level.doubledJ(); m <= level.doubledJ(); m += 2) {
      Estimate one = polarizabilityAu(level, m, light, PI);
      sum += one.value();
      uncertainty += one.uncertainty();
    }
    return new Estimate(sum / states, uncertainty / states);
  }

  /**
   * The vector part.
   *
   * @param level the level
   * @param light frequency of the light, positive
   * @return α_1 in atomic units
   * @throws IllegalArgumentException as for {@link #scalarAu}
   */
  public Estimate vectorAu(Level level, Frequency light) {
    Estimate up = polarizabilityAu(level, level.doubledJ(), light, SIGMA_PLUS);
    Estimate down = polarizabilityAu(level, -level.doubledJ(), light, SIGMA_PLUS);
    return difference(up, down);
  }

  /**
   * The tensor part.
   *
   * @param level the level
   * @param light frequency of the light, positive
   * @return α_2 in atomic units; 0 for J = 1/2
   * @throws IllegalArgumentException as for {@link #scalarAu}
   */
  public Estimate tensorAu(Level level, Frequency light) {
    Estimate scalar = scalarAu(level, light);
    if (level.doubledJ() == 1) {
      return new Estimate(0, 0);
    }
    return difference(polarizabilityAu(level, level.doubledJ(), light, PI), scalar);
  }

  private static Estimate difference(Estimate a, Estimate b) {
    return new Estimate(a.value() - b.value(), Math.hypot(a.uncertainty(), b.uncertainty()));
  }

  private Estimate polarizabilityAu(
      Level level, int doubledM, Frequency light, SphericalComponents polarization) {
    Estimate shift =
        shifts.hertzPerFieldSquared(level, doubledM, light.hertz(), polarization, Set.of());
    double unit = 4 / PhysicalConstants.ATOMIC_POLARIZABILITY_HERTZ;
    return new Estimate(-unit * shift.value(), unit * shift.uncertainty());
  }
}
