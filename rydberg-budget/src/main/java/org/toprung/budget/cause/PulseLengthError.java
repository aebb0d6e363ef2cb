package org.toprung.budget.cause;

import org.toprung.budget.bench.Disturbance;
import org.toprung.budget.bench.Spread;

/**
 * A pulse that is too long or too short for its Rabi frequency: jitter of the clock and what the
 * calibration of the area leaves. Stretching a pulse by 1 + x is the same as scaling its whole
 * Hamiltonian by that factor; (πx/2)² for a square π pulse.
 */
final class PulseLengthError extends Halvable {
  private final Spread relative;

  PulseLengthError(Spread relative) {
    super(
        "Miscalibrated length",
        "the error of the pulse length",
        "exact response to a stretched pulse, averaged over its spread; (πx/2)² for a square π pulse",
        new Disturbance(Disturbance.Kind.PULSE_LENGTH, Disturbance.COMMON));
    this.relative = relative;
  }

  @Override
  double error(PulseModel model, double scale) {
    return relative.scaled(scale).average(x -> model.reaction().stretched(1 + x))
        - model.baseline();
  }
}
