package org.toprung.budget.cause;

import java.util.Arrays;
import org.toprung.budget.dynamics.TwoLevelSystem;

/**
 * The reaction of the effective two-level system: Rabi frequency as the product of the fields,
 * light shifts as their squares.
 */
final class TwoLevelReaction implements Reaction {
  private final TwoLevelSystem system;
  private final double[] ones;

  TwoLevelReaction(TwoLevelSystem system) {
    this.system = system;
    this.ones = new double[system.steps()];
    Arrays.fill(ones, 1);
  }

  @Override
  public double detuned(double hertz) {
    return system.error(1, hertz, ones);
  }

  @Override
  public double brightened(int step, double intensity) {
    double[] intensities = ones.clone();
    intensities[step] = intensity;
    return system.error(Math.sqrt(intensity), 0, intensities);
  }

  @Override
  public double stretched(double factor) {
    return system.stretchedError(factor);
  }

  @Override
  public double over(BeamFields positions) {
    double[] intensities = new double[ones.length];
    return positions.average(
        fields -> {
          for (int k = 0; k < intensities.length; k++) {
            intensities[k] = fields[k] * fields[k] / positions.meanIntensity(k);
          }
          double rabi = BeamFields.product(fields) / positions.meanProduct();
          return system.error(rabi, 0, intensities);
        });
  }
}
