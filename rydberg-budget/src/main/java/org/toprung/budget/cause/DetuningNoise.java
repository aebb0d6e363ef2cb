package org.toprung.budget.cause;

import java.util.function.Function;
import org.toprung.budget.bench.Disturbance;
import org.toprung.budget.bench.Spread;

/**
 * A quasi-static error of the detuning alone, averaged over its distribution. To lowest order 1 − P
 * = δ²/Ω² for a square π pulse.
 */
final class DetuningNoise extends Halvable {
  private final Function<PulseModel, Spread> hertz;

  DetuningNoise(
      String name,
      String strength,
      String source,
      Disturbance disturbance,
      Function<PulseModel, Spread> hertz) {
    super(name, strength, source, disturbance);
    this.hertz = hertz;
  }

  @Override
  double error(PulseModel model, double scale) {
    return hertz.apply(model).scaled(scale).average(model.reaction()::detuned) - model.baseline();
  }
}
