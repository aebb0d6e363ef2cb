package org.toprung.core.radial;

/** The potential energy of the valence electron for one l and j, in Hartree. */
interface ValencePotential {
  /** Radius in a0 beyond which {@link #energy} is −1/r − α/(2r⁴) + s/r³ to double precision. */
  double coreRadius();

  /** V(r) in Hartree at r in a0. */
  double energy(double r);

  /** Coefficient α of −1/(2r⁴) outside the core. */
  double polarizability();

  /** Coefficient s of 1/r³ outside the core. */
  double spinOrbit();

  /** The Coulomb potential. */
  static ValencePotential coulomb() {
    return new ValencePotential() {
      @Override
      public double coreRadius() {
        return 0;
      }

      @Override
      public double energy(double r) {
        return -1 / r;
      }

      @Override
      public double polarizability() {
        return 0;
      }

      @Override
      public double spinOrbit() {
        return 0;
      }
    };
  }
}
