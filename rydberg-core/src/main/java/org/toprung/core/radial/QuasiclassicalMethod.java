package org.toprung.core.radial;

import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;

/**
 * Dipole integrals by the quasi-classical closed formula: the Fourier component of the Kepler
 * motion at the non-integer harmonic s = ν_b − ν_a.
 *
 * <p>With both waves written from the outer turning point, P = √(2/(πν³ṙ)) cos(∫p dr − π/4), and
 * the phase difference taken to first order in ν and l, the integral is (1/π)∫_0^π r cos(sM − Δl φ)
 * dM, M and φ the mean and true anomaly from the aphelion. In terms of Anger functions at z = −es:
 *
 * <p>R = (−1)^{n_a−l_a+n_b−l_b} ν_c⁵/((ν_aν_b)^{3/2} s) { J′_s(z) − (1−e) sin(πs)/π + Δl
 * (√(1−e²)/e) [sin(πs)/(πs) − J_s(z)] }
 *
 * <p>with ν_c³ = 2ν_a²ν_b²/(ν_a+ν_b), which makes the harmonic s the exact energy difference, e² =
 * 1 − (l_c/ν_c)², l_c = (l_a+l_b+1)/2 (D'yachkov and Pankratov, J. Phys. B 27, 461 (1994);
 * Kaulakys, J. Phys. B 28, 4963 (1995); for integer s Naccache, J. Phys. B 5, 1308 (1972)). For s →
 * 0 it is 3ν_c² e/2.
 *
 * <p>It holds for ν ≫ l between levels that are close, |s| ≪ ν, and knows the core through the
 * quantum defects only. From the ground level it can be wrong by a factor of two.
 *
 * <p>Immutable and thread-safe.
 */
public final class QuasiclassicalMethod implements RadialMethod {
  private static final double COINCIDENT = 1e-7;

  private final Species species;

  private QuasiclassicalMethod(Species species) {
    this.species = species;
  }

  /**
   * The method for an atom.
   *
   * @param species the atom
   * @return the method
   */
  public static QuasiclassicalMethod of(Species species) {
    return new QuasiclassicalMethod(species);
  }

  @Override
  public String description() {
    return "quasi-classical, Anger functions";
  }

  /**
   * {@inheritDoc}
   *
   * @throws IllegalArgumentException if a level belongs to the core, or l does not differ by 1, or
   *     the classical orbit of the mean of both levels does not exist
   */
  @Override
  public RadialIntegral dipole(Level a, Level b) {
    if (Math.abs(a.l() - b.l()) != 1) {
      throw new IllegalArgumentException(
          "the quasi-classical formula is for l that differ by 1, given " + a + " and " + b);
    }
    double nuA = species.effectiveN(a);
    double nuB = species.effectiveN(b);
    double s = nuB - nuA;
    double nuC = Math.cbrt(2 * nuA * nuA * nuB * nuB / (nuA + nuB));
    double root = (a.l() + b.l() + 1) / (2 * nuC);
    if (!(root < 1)) {
      throw new IllegalArgumentException(
          "no classical orbit between " + a + " and " + b + ": l + 1/2 exceeds the effective n");
    }
    double e = Math.sqrt(1 - root * root);
    double motion;
    if (Math.abs(s) < COINCIDENT) {
      motion = 1.5 * e;
    } else {
      AngerFunction anger = AngerFunction.of(s, -e * s);
      double sinc = Math.sin(Math.PI * s) / (Math.PI * s);
      motion =
          anger.derivative() / s
              - (1 - e) * sinc
              + (b.l() - a.l()) * root / (e * s) * (sinc - anger.value());
    }
    double sign = (a.n() - a.l() + b.n() - b.l()) % 2 == 0 ? 1 : -1;
    double size = Math.pow(nuC, 5) / Math.pow(nuA * nuB, 1.5);
    return new RadialIntegral(sign * size * motion, 0, 0, false);
  }
}
