package org.toprung.core.radial;

import org.toprung.core.atom.Species;

class NumerovContractTest extends RadialMethodContract {
  @Override
  RadialMethod method(Species species) {
    return NumerovMethod.of(species);
  }

  @Override
  double neighbourAccuracy() {
    return 1e-9;
  }
}
