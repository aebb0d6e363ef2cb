package org.toprung.core.radial;

import org.toprung.core.atom.Species;

class EigenvalueContractTest extends RadialMethodContract {
  @Override
  RadialMethod method(Species species) {
    return NumerovMethod.atEigenvalues(species);
  }

  @Override
  double neighbourAccuracy() {
    return 1e-9;
  }

  /** Defects of the potential are off by up to 0.006, which the small 80D-80F element shows. */
  @Override
  double rydbergAccuracy() {
    return 0.05;
  }
}
