package org.toprung.core.radial;

import org.toprung.core.atom.Species;

class WkbMethodTest extends RadialMethodContract {
  @Override
  RadialMethod method(Species species) {
    return WkbMethod.of(species);
  }

  @Override
  double neighbourAccuracy() {
    return 3e-3;
  }
}
