package org.toprung.budget.cause;

import java.util.function.ToDoubleFunction;

/**
 * A Gaussian quasi-static error of the detuning alone. To lowest order 1 − P = δ²/Ω² for a π pulse.
 */
final class DetuningNoise extends Disturbance {
  private final ToDoubleFunction<PulseModel> spreadHertz;

  DetuningNoise(
      String name, String strength, String source, ToDoubleFunction<PulseModel> spreadHertz) {
    super(name, strength, source);
    this.spreadHertz = spreadHertz;
  }

  @Override
  double error(PulseModel model, double scale) {
    double spread = scale * spreadHertz.applyAsDouble(model);
    return NormalAverage.of(x -> model.twoLevelError(1, model.offsetHertz() + spread * x))
        - model.baseline();
  }
}
