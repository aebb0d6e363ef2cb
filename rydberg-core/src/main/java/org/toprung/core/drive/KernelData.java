package org.toprung.core.drive;

import java.util.List;
import java.util.Locale;
import org.toprung.core.structure.FarShiftSeries;

/**
 * The numbers a {@link DriveKernel} works with, and nothing else: enough to write it down and to
 * have the same kernel again without atom, beams or catalogue.
 *
 * <p>Couplings are halves of Rabi frequencies over 2π, at nominal power, in Hz; energies are over h
 * in the rotating frame of {@link Ladder}, at the nominal detuning, in Hz. Immutable.
 *
 * @param description the ladder in words
 * @param steps one entry for each beam, one or two
 * @param detuningHertz nominal detuning of the first step, Hz; 0 for a single step
 * @param lowestDetuningHertz lower end of the range the numbers hold for, Hz
 * @param highestDetuningHertz upper end of the range the numbers hold for, Hz
 * @param farShiftRelativeUncertainty relative standard uncertainty of the far-off-resonant shifts,
 *     at least 0
 * @param trapShiftHertz light shift of the target minus that of the start by a trap, Hz; 0 without
 * @param partners fine-structure partners of the intermediate level; none for a single step
 * @param targets number of wanted targets: one for each nuclear projection
 * @param direct couplings from the start straight to the targets, of a single step
 * @param intermediates the intermediate sublevels that are kept
 * @param paths ways through intermediate sublevels that are not kept
 */
public record KernelData(
    String description,
    List<Step> steps,
    double detuningHertz,
    double lowestDetuningHertz,
    double highestDetuningHertz,
    double farShiftRelativeUncertainty,
    double trapShiftHertz,
    List<Partner> partners,
    int targets,
    List<Link> direct,
    List<Intermediate> intermediates,
    List<Path> paths) {

  private static final int MOST_STEPS = 2;

  /**
   * A beam and the far-off-resonant light shifts it makes.
   *
   * @param powerWatts nominal power, W, positive
   * @param intensityRatio intensity at the atom over the one expected at that power, positive; 1
   *     before a calibration
   * @param squaredField E0² at the nominal power and a ratio of 1, (V/m)², positive
   * @param strongestHertz the largest Rabi frequency over 2π of the step between kept sublevels at
   *     nominal power, Hz
   * @param start shift of the start
   * @param target shift of the target
   */
  public record Step(
      double powerWatts,
      double intensityRatio,
      double squaredField,
      double strongestHertz,
      double relativeUncertainty,
      FarShiftSeries start,
      FarShiftSeries target) {
    /**
     * Checks the numbers.
     *
     * @param powerWatts nominal power, W
     * @param intensityRatio intensity over the expected one
     * @param squaredField E0², (V/m)²
     * @param strongestHertz the largest coupling, Hz
     * @param relativeUncertainty uncertainty of the dipole element
     * @param start shift of the start
     * @param target shift of the target
     * @throws IllegalArgumentException if a number is not positive and finite, or a series is
     *     missing
     */
    public Step {
      requirePositive(powerWatts, "power in W");
      requirePositive(intensityRatio, "intensity ratio");
      requirePositive(squaredField, "squared field in (V/m)²");
      requireNotNegative(strongestHertz, "strongest coupling in Hz");
      requireNotNegative(relativeUncertainty, "uncertainty of the dipole element");
      if (start == null || target == null) {
        throw new IllegalArgumentException("a step needs the light shifts of start and target");
      }
    }
  }

  /**
   * A fine-structure partner of the intermediate level.
   *
   * @param distanceHertz its distance from the named level, Hz
   * @param kept whether its sublevels are among the intermediates
   */
  public record Partner(double distanceHertz, boolean kept) {}

  /**
   * A coupling to a wanted target.
   *
   * @param target number of the target, from 0
   * @param re real part of ⟨target|H|·⟩/h, Hz
   * @param im imaginary part of ⟨target|H|·⟩/h, Hz
   */
  public record Link(int target, double re, double im) {}

  /**
   * An intermediate sublevel that is kept.
   *
   * @param energyHertz energy, Hz
   * @param decayPerSecond natural decay rate, 1/s, at least 0
   * @param startRe real part of ⟨·|H|start⟩/h, Hz
   * @param startIm imaginary part of ⟨·|H|start⟩/h, Hz
   * @param links couplings to the targets
   */
  public record Intermediate(
      double energyHertz, double decayPerSecond, double startRe, double startIm, List<Link> links) {
    /**
     * Copies the list.
     *
     * @param energyHertz energy, Hz
     * @param decayPerSecond natural decay rate, 1/s
     * @param startRe real part, Hz
     * @param startIm imaginary part, Hz
     * @param links couplings to the targets
     */
    public Intermediate {
      links = List.copyOf(links);
    }
  }

  /**
   * A way from the start to a target through a sublevel that is not kept.
   *
   * @param target number of the target, from 0
   * @param productRe real part of the product of both couplings, Hz²
   * @param productIm imaginary part of the product of both couplings, Hz²
   * @param awayHertz light minus transition at the nominal detuning, Hz
   */
  public record Path(int target, double productRe, double productIm, double awayHertz) {}

  /**
   * Checks the parts.
   *
   * @param description the ladder in words
   * @param steps one or two
   * @param detuningHertz nominal detuning, Hz
   * @param lowestDetuningHertz lower end of the range, Hz
   * @param highestDetuningHertz upper end of the range, Hz
   * @param farShiftRelativeUncertainty uncertainty of the far-off-resonant shifts
   * @param trapShiftHertz differential shift by a trap, Hz
   * @param partners fine-structure partners
   * @param targets number of wanted targets, at least 1
   * @param direct couplings of a single step
   * @param intermediates intermediate sublevels that are kept
   * @param paths ways through those that are not
   * @throws IllegalArgumentException if there are not one or two steps, no target, a number that is
   *     not finite, a target out of range, or the nominal detuning lies outside the range
   */
  public KernelData {
    steps = List.copyOf(steps);
    partners = List.copyOf(partners);
    direct = List.copyOf(direct);
    intermediates = List.copyOf(intermediates);
    paths = List.copyOf(paths);
    if (description == null) {
      throw new IllegalArgumentException("a kernel needs a description, not null");
    }
    if (steps.isEmpty() || steps.size() > MOST_STEPS) {
      throw new IllegalArgumentException("a kernel has one or two steps, given " + steps.size());
    }
    if (targets < 1) {
      throw new IllegalArgumentException("a kernel needs at least one target, given " + targets);
    }
    if (!(lowestDetuningHertz <= detuningHertz && detuningHertz <= highestDetuningHertz)) {
      throw new IllegalArgumentException(
          String.format(
              Locale.ROOT,
              "nominal detuning %s Hz must lie between %s and %s Hz",
              detuningHertz,
              lowestDetuningHertz,
              highestDetuningHertz));
    }
    requireNotNegative(farShiftRelativeUncertainty, "uncertainty of the far-off-resonant shifts");
    double sum = trapShiftHertz + lowestDetuningHertz + highestDetuningHertz;
    for (Partner partner : partners) {
      sum += partner.distanceHertz();
    }
    for (Link link : direct) {
      sum += checked(link, targets);
    }
    for (Intermediate i : intermediates) {
      sum += i.energyHertz() + i.startRe() + i.startIm();
      requirePositive(i.decayPerSecond(), "decay rate of an intermediate sublevel in 1/s");
      for (Link link : i.links()) {
        sum += checked(link, targets);
      }
    }
    for (Path path : paths) {
      sum += checked(new Link(path.target(), path.productRe(), path.productIm()), targets);
      sum += path.awayHertz();
    }
    if (!(Math.abs(sum) < Double.POSITIVE_INFINITY)) {
      throw new IllegalArgumentException("the numbers of a kernel must be finite, given " + sum);
    }
  }

  private static double checked(Link link, int targets) {
    if (!(link.target() >= 0 && link.target() < targets)) {
      throw new IllegalArgumentException(
          "target " + link.target() + " of a coupling must be from 0 to " + (targets - 1));
    }
    return link.re() + link.im();
  }

  private static void requireNotNegative(double value, String what) {
    if (!(value >= 0 && value < Double.POSITIVE_INFINITY)) {
      throw new IllegalArgumentException(what + " must be at least 0 and finite, given " + value);
    }
  }

  private static void requirePositive(double value, String what) {
    if (!(value > 0 && value < Double.POSITIVE_INFINITY)) {
      throw new IllegalArgumentException(what + " must be positive and finite, given " + value);
    }
  }

  /** The same numbers with the intensity at the atom multiplied, one factor for each step. */
  KernelData withIntensitiesScaled(double... factor) {
    Step[] scaled = new Step[steps.size()];
    for (int k = 0; k < scaled.length; k++) {
      Step s = steps.get(k);
      scaled[k] =
          new Step(
              s.powerWatts(),
              s.intensityRatio() * factor[k],
              s.squaredField(),
              s.strongestHertz(),
              s.relativeUncertainty(),
              s.start(),
              s.target());
    }
    return new KernelData(
        description,
        List.of(scaled),
        detuningHertz,
        lowestDetuningHertz,
        highestDetuningHertz,
        farShiftRelativeUncertainty,
        trapShiftHertz,
        partners,
        targets,
        direct,
        intermediates,
        paths);
  }
}
