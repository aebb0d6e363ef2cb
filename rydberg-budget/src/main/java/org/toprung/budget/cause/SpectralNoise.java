package org.toprung.budget.cause;

import java.util.function.ToDoubleFunction;
import org.toprung.budget.bench.Disturbance;

/**
 * Noise with a spectrum, weighed with the filter function of the pulse.
 *
 * <p>To second order the mean error is E₂ = ∫S(f)F(f)df. Noise that turns the state by many small
 * independent angles washes the outcome out, towards ½: the error is taken as ½(1 −
 * e<sup>−2E₂</sup>), which is E₂ while that is small, and exact for white noise whose kicks are
 * small.
 */
final class SpectralNoise extends Halvable {
  private final ToDoubleFunction<PulseModel> secondOrder;

  SpectralNoise(
      String name,
      String strength,
      String source,
      Disturbance disturbance,
      ToDoubleFunction<PulseModel> secondOrder) {
    super(name, strength, source, disturbance);
    this.secondOrder = secondOrder;
  }

  /** An amplitude that is halved quarters the density. */
  @Override
  double error(PulseModel model, double scale) {
    return -0.5 * Math.expm1(-2 * scale * scale * secondOrder.applyAsDouble(model));
  }
}
