package org.toprung.core.drive;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import org.toprung.angular.HalfInteger;
import org.toprung.angular.Wigner;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.quantity.MagneticField;
import org.toprung.core.quantity.PhysicalConstants;
import org.toprung.core.structure.HyperfineManifold;

/**
 * A sublevel of any rung as a superposition of |m<sub>J</sub>⟩|m<sub>I</sub>⟩, with what the ladder
 * needs to know of it. Energies are over h, from the centre of gravity of the level.
 */
record ProductState(
    Level level,
    String label,
    int doubledF, // 0 when uncoupled
    int doubledM,
    int[] doubledMj,
    double[] amplitude,
    double energyHertz,
    double hertzPerTesla) {

  /** The hyperfine and Zeeman eigenstates of a low level. */
  static List<ProductState> hyperfine(Species species, Level level, MagneticField field) {
    List<ProductState> states = new ArrayList<>();
    for (HyperfineManifold.Eigenstate e : HyperfineManifold.of(species, level, field).states()) {
      states.add(of(level, e));
    }
    return states;
  }

  private static ProductState of(Level level, HyperfineManifold.Eigenstate e) {
    int[] tMj = new int[e.components()];
    double[] amplitude = new double[e.components()];
    for (int c = 0; c < tMj.length; c++) {
      tMj[c] = e.doubledMj(c);
      amplitude[c] = e.amplitude(c);
    }
    return new ProductState(
        level,
        e.toString(),
        e.doubledF(),
        e.doubledM(),
        tMj,
        amplitude,
        e.energyHertz(),
        e.hertzPerTesla());
  }

  /** The uncoupled sublevels of a level without hyperfine structure. */
  static List<ProductState> uncoupled(Species species, Level level, MagneticField field) {
    List<ProductState> states = new ArrayList<>();
    int tI = species.doubledNuclearSpin();
    for (int tMj = -level.doubledJ(); tMj <= level.doubledJ(); tMj += 2) {
      for (int tMi = -tI; tMi <= tI; tMi += 2) {
        double slope =
            0.5
                * (species.gJ(level) * tMj + species.gI() * tMi)
                * PhysicalConstants.BOHR_MAGNETON_HERTZ_PER_TESLA;
        String label =
            String.format(
                Locale.ROOT,
                "%s mJ=%s mI=%s",
                level,
                HalfInteger.ofHalves(tMj),
                HalfInteger.ofHalves(tMi));
        states.add(
            new ProductState(
                level,
                label,
                0,
                tMj + tMi,
                new int[] {tMj},
                new double[] {1},
                slope * field.tesla(),
                slope));
      }
    }
    return states;
  }

  /**
   * The angular part Σ<sub>q</sub> a<sub>q</sub> ⟨upper|T<sub>q</sub>|lower⟩ / ⟨J'‖T‖J⟩ of an
   * absorption, by the Wigner-Eckart theorem with the nuclear spin a spectator: real and imaginary
   * part.
   */
  static double[] angular(ProductState lower, ProductState upper, LightTensor light) {
    int tq = upper.doubledM - lower.doubledM;
    int tk = 2 * light.rank();
    if (Math.abs(tq) > tk) {
      return new double[2];
    }
    int tJu = upper.level.doubledJ();
    int tJl = lower.level.doubledJ();
    double sum = 0;
    for (int u = 0; u < upper.doubledMj.length; u++) {
      for (int l = 0; l < lower.doubledMj.length; l++) {
        int tMu = upper.doubledMj[u];
        int tMl = lower.doubledMj[l];
        if (tMu - tMl == tq) {
          int phase = (tJu - tMu) / 2 % 2 == 0 ? 1 : -1;
          sum +=
              phase
                  * upper.amplitude[u]
                  * lower.amplitude[l]
                  * Wigner.threeJDoubled(tJu, tk, tJl, -tMu, tq, tMl);
        }
      }
    }
    return new double[] {sum * light.re(tq / 2), sum * light.im(tq / 2)};
  }

  /**
   * The terms of {@link #angular} before the light's amplitude, one for each nuclear projection.
   */
  static List<Derivation.AngularTerm> angularTerms(ProductState lower, ProductState upper) {
    List<Derivation.AngularTerm> terms = new ArrayList<>();
    int tq = upper.doubledM - lower.doubledM;
    int tJu = upper.level.doubledJ();
    int tJl = lower.level.doubledJ();
    for (int u = 0; u < upper.doubledMj.length; u++) {
      for (int l = 0; l < lower.doubledMj.length; l++) {
        int tMu = upper.doubledMj[u];
        int tMl = lower.doubledMj[l];
        if (Math.abs(tq) <= 2 && tMu - tMl == tq) {
          terms.add(
              new Derivation.AngularTerm(
                  HalfInteger.ofHalves(tMu),
                  HalfInteger.ofHalves(tMl),
                  HalfInteger.ofHalves(upper.doubledM - tMu),
                  (tJu - tMu) / 2 % 2 == 0 ? 1 : -1,
                  upper.amplitude[u],
                  lower.amplitude[l],
                  Wigner.threeJDoubled(tJu, 2, tJl, -tMu, tq, tMl)));
        }
      }
    }
    return terms;
  }
}
