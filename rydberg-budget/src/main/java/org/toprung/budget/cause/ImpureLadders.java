package org.toprung.budget.cause;

import java.util.ArrayList;
import java.util.List;
import java.util.Set;
import java.util.function.IntToDoubleFunction;
import org.toprung.core.drive.Drive;
import org.toprung.core.drive.DriveSetup;
import org.toprung.core.drive.Ladder;

/**
 * The ladders of a drive whose beams have some orthogonal polarization of unknown phase in them.
 */
public final class ImpureLadders {
  private static final int PHASES = 4;

  private ImpureLadders() {}

  /**
   * One ladder for each combination of the phases 0, 90, 180 and 270 degrees of the impurities.
   *
   * @param drive the drive with clean beams
   * @param steps indices of the impure beams
   * @param fraction part of the intensity in the orthogonal polarization, by step
   * @return 4^n ladders of n impure beams, all equally likely
   * @throws IllegalArgumentException if a beam has an impurity of its own, which would count twice
   */
  public static List<Ladder> of(Drive drive, Set<Integer> steps, IntToDoubleFunction fraction) {
    List<DriveSetup> setups = List.of(drive.setup());
    for (int step : steps.stream().sorted().toList()) {
      if (drive.steps().get(step).beam().impurity() > 0) {
        throw new IllegalArgumentException(
            "the beam of step "
                + (step + 1)
                + " has an impurity of "
                + drive.steps().get(step).beam().impurity()
                + " of its own; allowed: that or a polarization impurity of the bench, which would"
                + " count it twice");
      }
      List<DriveSetup> more = new ArrayList<>();
      for (DriveSetup setup : setups) {
        for (int p = 0; p < PHASES; p++) {
          double degrees = 360.0 * p / PHASES;
          more.add(setup.withBeam(step, b -> b.impure(fraction.applyAsDouble(step), degrees)));
        }
      }
      setups = more;
    }
    return setups.stream().map(s -> s.resolve().ladder()).toList();
  }
}
