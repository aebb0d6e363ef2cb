package org.toprung.budget.cause;

import java.util.Arrays;
import org.toprung.budget.dynamics.LadderReaction;

/**
 * The reaction of the whole ladder, for pulses that no effective two-level system describes. A
 * check by simulation then tests how causes compose rather than their formulas.
 */
final class WholeLadderReaction implements Reaction {
  private final LadderReaction ladder;
  private final int steps;

  WholeLadderReaction(LadderReaction ladder, int steps) {
    this.ladder = ladder;
    this.steps = steps;
  }

  private double[] ones() {
    double[] ones = new double[steps];
    Arrays.fill(ones, 1);
    return ones;
  }

  @Override
  public double detuned(double hertz) {
    return ladder.error(ones(), hertz, 1);
  }

  @Override
  public double brightened(int step, double intensity) {
    double[] fields = ones();
    fields[step] = Math.sqrt(intensity);
    return ladder.error(fields, 0, 1);
  }

  @Override
  public double stretched(double factor) {
    return ladder.error(ones(), 0, factor);
  }

  @Override
  public double over(BeamFields positions) {
    double[] relative = new double[steps];
    return positions.average(
        fields -> {
          for (int k = 0; k < steps; k++) {
            relative[k] = fields[k] / Math.sqrt(positions.meanIntensity(k));
          }
          return ladder.error(relative, 0, 1);
        });
  }
}
