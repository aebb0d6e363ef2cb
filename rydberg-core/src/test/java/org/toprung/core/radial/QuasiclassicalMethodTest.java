package org.toprung.core.radial;

import org.toprung.core.atom.Species;

class QuasiclassicalMethodTest extends RadialMethodContract {
  @Override
  RadialMethod method(Species species) {
    return QuasiclassicalMethod.of(species);
  }

  @Override
  double neighbourAccuracy() {
    return 2e-3;
  }

  /** The mean orbit of such different levels still changes with n: measured 4 %. */
  @Override
  double scalingAccuracy() {
    return 0.05;
  }
}
