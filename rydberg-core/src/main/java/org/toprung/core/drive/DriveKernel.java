package org.toprung.core.drive;

import java.util.Locale;
import org.toprung.core.structure.FarShiftSeries;

/**
 * A resolved drive of one or two steps, prepared for evaluation between shots: Rabi frequency,
 * light shifts, scattering and pulse at new powers, another detuning and with the atom off the
 * middle of the beams.
 *
 * <pre>{@code
 * DriveKernel kernel = drive.kernel();
 * KernelResult result = kernel.newResult();
 * kernel.evaluate(powersWatts, detuningHertz, fieldFactors, result);
 * double length = result.durationSeconds(Math.PI);
 * }</pre>
 *
 * <p>With intensities I<sub>k</sub> relative to nominal, H<sub>is</sub> and H<sub>wi</sub> half the
 * Rabi frequencies from the start s to the intermediate sublevels i and from there to the wanted
 * targets w, and E<sub>i</sub> = E<sub>i</sub>(nominal) − δ − (far-off-resonant shift of the start)
 * after a change δ of the detuning, it works out the sums of {@link Elimination} for two steps,
 *
 * <ul>
 *   <li>c<sub>w</sub> = −Σ<sub>i</sub> H<sub>wi</sub>H<sub>is</sub>/(E<sub>i</sub> −
 *       iγ<sub>i</sub>/4π) + Σ over partner sublevels p that are not kept of
 *       H<sub>wp</sub>H<sub>ps</sub>/(Δ<sub>p</sub> + δ); Ω = 2√(I<sub>1</sub>I<sub>2</sub>
 *       Σ<sub>w</sub>|c<sub>w</sub>|²);
 *   <li>start shift −I<sub>1</sub> Σ<sub>i</sub> E<sub>i</sub>|x<sub>i</sub>|² and scattering
 *       I<sub>1</sub> Σ<sub>i</sub> γ<sub>i</sub>|x<sub>i</sub>|² with x<sub>i</sub> =
 *       H<sub>is</sub>/(E<sub>i</sub> − iγ<sub>i</sub>/4π); those of the target likewise with
 *       I<sub>2</sub> and the superposition Σ c<sub>w</sub>|w⟩ that the light couples to;
 *   <li>plus the far-off-resonant shifts at the new laser frequencies, by {@link FarShiftSeries};
 *       the first laser moves by δ and the second, which closes the ladder, by −δ.
 * </ul>
 *
 * <p>This is what resolving the drive anew gives, to rounding (better than 10<sup>−9</sup> of each
 * value, or of its largest part where parts cancel); nothing is interpolated. The pulse is the one
 * of second order: length area/Ω, offset target shift − start shift. {@link Drive#plan} goes beyond
 * that, by about the square of {@link Drive#admixture()}.
 *
 * <p>Powers, field factors and the detuning of the first step are all that can change.
 * Polarization, direction, field, species or levels need a new drive. The detuning may move within
 * {@link #lowestDetuningHertz()} and {@link #highestDetuningHertz()}, and not across the line where
 * the fine-structure partner of the intermediate level would be treated in another way.
 *
 * <p>Immutable and thread-safe; evaluation allocates nothing and writes only into the result it is
 * given.
 */
public final class DriveKernel {
  private static final double NEGLIGIBLE = 1e-12; // as for the coupling of a resolved drive

  private final KernelData data;
  private final int steps;
  private final int targets;
  private final double[] perWatt; // relative intensity at unit field factor, 1/W
  private final double[] strongest; // Hz
  private final FarShiftSeries.Evaluator[] startFar;
  private final FarShiftSeries.Evaluator[] targetFar;
  private final double[] squaredField; // (V/m)²
  private final double[] partner; // Hz
  private final boolean[] partnerKept;
  private final double[] directRe; // Hz, by target
  private final double[] directIm;
  private final double[] energy; // Hz, by intermediate
  private final double[] halfWidth; // γ/4π, Hz
  private final double[] decay; // 1/s
  private final double[] startRe; // Hz
  private final double[] startIm;
  private final int[] firstLink; // by intermediate, and the end
  private final int[] linkTarget;
  private final double[] linkRe; // Hz
  private final double[] linkIm;
  private final int[] pathTarget;
  private final double[] pathRe; // Hz²
  private final double[] pathIm;
  private final double[] pathAway; // Hz

  private DriveKernel(KernelData data) {
    this.data = data;
    this.steps = data.steps().size();
    this.targets = data.targets();
    this.perWatt = new double[steps];
    this.strongest = new double[steps];
    this.squaredField = new double[steps];
    this.startFar = new FarShiftSeries.Evaluator[steps];
    this.targetFar = new FarShiftSeries.Evaluator[steps];
    for (int k = 0; k < steps; k++) {
      KernelData.Step step = data.steps().get(k);
      perWatt[k] = step.intensityRatio() / step.powerWatts();
      strongest[k] = step.strongestHertz();
      squaredField[k] = step.squaredField();
      startFar[k] = step.start().evaluator();
      targetFar[k] = step.target().evaluator();
    }
    int partners = data.partners().size();
    this.partner = new double[partners];
    this.partnerKept = new boolean[partners];
    for (int p = 0; p < partners; p++) {
      partner[p] = data.partners().get(p).distanceHertz();
      partnerKept[p] = data.partners().get(p).kept();
    }
    this.directRe = new double[targets];
    this.directIm = new double[targets];
    for (KernelData.Link link : data.direct()) {
      directRe[link.target()] += link.re();
      directIm[link.target()] += link.im();
    }
    int n = data.intermediates().size();
    this.energy = new double[n];
    this.halfWidth = new double[n];
    this.decay = new double[n];
    this.startRe = new double[n];
    this.startIm = new double[n];
    this.firstLink = new int[n + 1];
    int links = data.intermediates().stream().mapToInt(i -> i.links().size()).sum();
    this.linkTarget = new int[links];
    this.linkRe = new double[links];
    this.linkIm = new double[links];
    int next = 0;
    for (int i = 0; i < n; i++) {
      KernelData.Intermediate middle = data.intermediates().get(i);
      energy[i] = middle.energyHertz();
      decay[i] = middle.decayPerSecond();
      halfWidth[i] = decay[i] / (4 * Math.PI);
      startRe[i] = middle.startRe();
      startIm[i] = middle.startIm();
      firstLink[i] = next;
      for (KernelData.Link link : middle.links()) {
        linkTarget[next] = link.target();
        linkRe[next] = link.re();
        linkIm[next] = link.im();
        next++;
      }
    }
    firstLink[n] = next;
    int paths = data.paths().size();
    this.pathTarget = new int[paths];
    this.pathRe = new double[paths];
    this.pathIm = new double[paths];
    this.pathAway = new double[paths];
    for (int p = 0; p < paths; p++) {
      KernelData.Path path = data.paths().get(p);
      pathTarget[p] = path.target();
      pathRe[p] = path.productRe();
      pathIm[p] = path.productIm();
      pathAway[p] = path.awayHertz();
    }
  }

  /**
   * The kernel of numbers that were written down.
   *
   * @param data the numbers, as given by {@link #data()}
   * @return the same kernel again
   */
  public static DriveKernel of(KernelData data) {
    if (data == null) {
      throw new IllegalArgumentException("a kernel needs its numbers, not null");
    }
    return new DriveKernel(data);
  }

  /**
   * The numbers behind this kernel.
   *
   * @return the numbers
   */
  public KernelData data() {
    return data;
  }

  /**
   * The number of beams.
   *
   * @return 1 or 2
   */
  public int steps() {
    return steps;
  }

  /**
   * Nominal power of a beam.
   *
   * @param step index of the step, from 0
   * @return the power the drive was described with, W
   */
  public double powerWatts(int step) {
    return data.steps().get(step).powerWatts();
  }

  /**
   * Nominal detuning of the first step.
   *
   * @return the detuning the drive was described with, Hz; 0 for a single step
   */
  public double detuningHertz() {
    return data.detuningHertz();
  }

  /**
   * The lowest detuning of the first step this preparation holds for.
   *
   * @return the detuning, Hz; 0 for a single step
   */
  public double lowestDetuningHertz() {
    return data.lowestDetuningHertz();
  }

  /**
   * The highest detuning of the first step this preparation holds for.
   *
   * @return the detuning, Hz; 0 for a single step
   */
  public double highestDetuningHertz() {
    return data.highestDetuningHertz();
  }

  /**
   * A kernel that expects other intensities at the atom, after a calibration.
   *
   * @param factor intensity over what this kernel expects at the same power, positive, one for each
   *     step
   * @return the corrected kernel
   * @throws IllegalArgumentException if a factor is not positive and finite or their number is
   *     wrong
   */
  public DriveKernel withIntensitiesScaled(double... factor) {
    requireLength(factor.length, steps, "intensity factors");
    return new DriveKernel(data.withIntensitiesScaled(factor));
  }

  /**
   * Begins a calibration of this kernel by measurements, made at the nominal powers and detuning
   * unless it is told otherwise.
   *
   * @return a calibration without measurements
   */
  public Calibration calibration() {
    return Calibration.of(this);
  }

  /** Light shift of the start by levels outside the ladder, from one beam, Hz. */
  double startFarShiftHertz(int step, double powerWatts, double detuningHertz) {
    return farShift(startFar[step], step, powerWatts, detuningHertz);
  }

  /** Light shift of the target by levels outside the ladder, from one beam, Hz. */
  double targetFarShiftHertz(int step, double powerWatts, double detuningHertz) {
    return farShift(targetFar[step], step, powerWatts, detuningHertz);
  }

  private double farShift(
      FarShiftSeries.Evaluator far, int step, double powerWatts, double detuningHertz) {
    double change = detuningHertz - data.detuningHertz();
    double squared = intensity(step, powerWatts, 1) * squaredField[step];
    return squared * far.at(step == 0 ? change : -change);
  }

  /**
   * A result to evaluate into.
   *
   * @return a fresh result, for this kernel and those corrected from it
   */
  public KernelResult newResult() {
    return new KernelResult(targets, energy.length);
  }

  /**
   * A table to evaluate batches into.
   *
   * @param capacity largest number of points, at least 1
   * @return a fresh table, for this kernel and those corrected from it
   * @throws IllegalArgumentException if the capacity is less than 1
   */
  public KernelTable newTable(int capacity) {
    if (capacity < 1) {
      throw new IllegalArgumentException("capacity of a table must be at least 1, not " + capacity);
    }
    return new KernelTable(capacity, newResult());
  }

  /**
   * Evaluates one point.
   *
   * @param powerWatts power of each beam, W, positive
   * @param detuningHertz detuning of the first step, Hz; 0 for a single step
   * @param fieldFactor for each beam the field at the atom over the field in the focus, positive
   * @param into receives the answer; unchanged when the point is refused
   * @throws IllegalArgumentException if a number is not allowed, the detuning is out of reach or on
   *     the other side of the fine-structure rule, the paths to the target cancel, or the result
   *     belongs to another kernel
   */
  public void evaluate(
      double[] powerWatts, double detuningHertz, double[] fieldFactor, KernelResult into) {
    requireLength(powerWatts.length, steps, "powers");
    requireLength(fieldFactor.length, steps, "field factors");
    if (steps == 1) {
      one(intensity(0, powerWatts[0], fieldFactor[0]), detuningHertz, into);
    } else {
      two(
          intensity(0, powerWatts[0], fieldFactor[0]),
          intensity(1, powerWatts[1], fieldFactor[1]),
          detuningHertz,
          into);
    }
  }

  /**
   * Evaluates many points.
   *
   * @param powerWatts power of each beam, W, positive: all beams of the first point, then of the
   *     second and so on
   * @param detuningHertz detuning of the first step for each point, Hz; its length is the number of
   *     points
   * @param fieldFactor field at the atom over the field in the focus, positive, laid out like the
   *     powers
   * @param into receives the answers
   * @throws IllegalArgumentException as for one point; the message names the point
   */
  public void evaluate(
      double[] powerWatts, double[] detuningHertz, double[] fieldFactor, KernelTable into) {
    int points = detuningHertz.length;
    requireLength(powerWatts.length, points * steps, "powers");
    requireLength(fieldFactor.length, points * steps, "field factors");
    if (points > into.capacity()) {
      throw new IllegalArgumentException(
          "a table of capacity " + into.capacity() + " cannot take " + points + " points");
    }
    into.clear();
    for (int p = 0; p < points; p++) {
      try {
        if (steps == 1) {
          one(intensity(0, powerWatts[p], fieldFactor[p]), detuningHertz[p], into.point);
        } else {
          two(
              intensity(0, powerWatts[2 * p], fieldFactor[2 * p]),
              intensity(1, powerWatts[2 * p + 1], fieldFactor[2 * p + 1]),
              detuningHertz[p],
              into.point);
        }
      } catch (IllegalArgumentException e) {
        throw new IllegalArgumentException("point " + p + ": " + e.getMessage(), e);
      }
      into.append();
    }
  }

  /** Intensity at the atom over the nominal one. */
  private double intensity(int step, double powerWatts, double fieldFactor) {
    if (!(powerWatts > 0 && powerWatts < Double.POSITIVE_INFINITY)) {
      throw refused("power of beam " + (step + 1), powerWatts, "W");
    }
    if (!(fieldFactor > 0 && fieldFactor < Double.POSITIVE_INFINITY)) {
      throw refused("field factor of beam " + (step + 1), fieldFactor, "");
    }
    return powerWatts * perWatt[step] * fieldFactor * fieldFactor;
  }

  private void one(double intensity, double detuning, KernelResult into) {
    if (!(detuning == 0)) {
      throw new IllegalArgumentException(
          "a single step has no detuning of its own: give 0 Hz, not " + detuning);
    }
    double norm = 0;
    for (int w = 0; w < targets; w++) {
      norm += directRe[w] * directRe[w] + directIm[w] * directIm[w];
    }
    double squared = intensity * squaredField[0];
    into.set(2 * Math.sqrt(intensity * norm), data.trapShiftHertz());
    into.setStart(squared * startFar[0].at(0), 0, 0);
    into.setTarget(squared * targetFar[0].at(0), 0, 0);
  }

  private void two(double first, double second, double detuning, KernelResult into) {
    requireDetuning(detuning);
    double[] c = into.amplitude;
    double[] inverses = into.inverse;
    requireLength(c.length, 2 * targets, "places of the result");
    requireLength(inverses.length, energy.length, "places of the result");
    double change = detuning - data.detuningHertz();
    double one = first * squaredField[0];
    double two = second * squaredField[1];
    double startFirst = one * startFar[0].at(change);
    double startSecond = two * startFar[1].at(-change);
    double below = change + startFirst + startSecond;
    double startNear = 0;
    double startRate = 0;
    for (int w = 0; w < c.length; w++) {
      c[w] = 0;
    }
    for (int i = 0; i < energy.length; i++) {
      double e = energy[i] - below;
      double inverse = 1 / (e * e + halfWidth[i] * halfWidth[i]);
      inverses[i] = inverse;
      double population = (startRe[i] * startRe[i] + startIm[i] * startIm[i]) * inverse;
      startNear -= e * population;
      startRate += decay[i] * population;
      // −H_is/(E_i − iγ/4π)
      double xRe = -(startRe[i] * e - startIm[i] * halfWidth[i]) * inverse;
      double xIm = -(startRe[i] * halfWidth[i] + startIm[i] * e) * inverse;
      for (int l = firstLink[i]; l < firstLink[i + 1]; l++) {
        int w = 2 * linkTarget[l];
        c[w] += linkRe[l] * xRe - linkIm[l] * xIm;
        c[w + 1] += linkRe[l] * xIm + linkIm[l] * xRe;
      }
    }
    for (int p = 0; p < pathTarget.length; p++) {
      double inverse = 1 / (pathAway[p] + change);
      int w = 2 * pathTarget[p];
      c[w] += pathRe[p] * inverse;
      c[w + 1] += pathIm[p] * inverse;
    }
    double norm = 0;
    for (int w = 0; w < c.length; w++) {
      norm += c[w] * c[w];
    }
    double targetNear = 0;
    double targetRate = 0;
    for (int i = 0; i < energy.length; i++) {
      // Σ_w H_iw c_w = Σ_w conj(H_wi) c_w
      double re = 0;
      double im = 0;
      for (int l = firstLink[i]; l < firstLink[i + 1]; l++) {
        int w = 2 * linkTarget[l];
        re += linkRe[l] * c[w] + linkIm[l] * c[w + 1];
        im += linkRe[l] * c[w + 1] - linkIm[l] * c[w];
      }
      double e = energy[i] - below;
      double population = (re * re + im * im) * inverses[i];
      targetNear -= e * population;
      targetRate += decay[i] * population;
    }
    targetNear /= norm;
    targetRate /= norm;
    double rabi = 2 * Math.sqrt(first * second * norm);
    requireCoupling(rabi, first, second);
    into.set(rabi, data.trapShiftHertz());
    into.setStart(first * startNear + startFirst, startSecond, first * startRate);
    into.setTarget(
        one * targetFar[0].at(change),
        second * targetNear + two * targetFar[1].at(-change),
        second * targetRate);
  }

  private void requireDetuning(double detuning) {
    if (!(detuning >= data.lowestDetuningHertz() && detuning <= data.highestDetuningHertz())) {
      throw new IllegalArgumentException(
          String.format(
              Locale.ROOT,
              "a detuning of %s Hz is out of reach of a kernel prepared at %s Hz, which holds from %s"
                  + " to %s Hz: resolve the drive at the new detuning and prepare a kernel there",
              detuning,
              data.detuningHertz(),
              data.lowestDetuningHertz(),
              data.highestDetuningHertz()));
    }
    for (int p = 0; p < partner.length; p++) {
      if (RotatingFrame.isNear(partner[p], detuning) != partnerKept[p]) {
        throw new IllegalArgumentException(
            String.format(
                Locale.ROOT,
                "at a detuning of %s Hz the fine-structure partner of the intermediate level, %s Hz"
                    + " from it, is %s, while the kernel was prepared at %s Hz with it %s: resolve the"
                    + " drive at the new detuning and prepare a kernel there",
                detuning,
                partner[p],
                partnerKept[p] ? "eliminated" : "kept sublevel by sublevel",
                data.detuningHertz(),
                partnerKept[p] ? "kept sublevel by sublevel" : "eliminated"));
      }
    }
  }

  private void requireCoupling(double rabi, double first, double second) {
    double scale = Math.max(strongest[0] * Math.sqrt(first), strongest[1] * Math.sqrt(second));
    if (!(rabi > NEGLIGIBLE * scale && rabi < Double.POSITIVE_INFINITY)) {
      throw new IllegalArgumentException(
          "the paths from start to target cancel: the effective Rabi frequency is "
              + rabi
              + " Hz where the strongest step has "
              + scale
              + " Hz");
    }
  }

  private static void requireLength(int given, int allowed, String what) {
    if (given != allowed) {
      throw new IllegalArgumentException(
          "a kernel needs " + allowed + " " + what + ", given " + given);
    }
  }

  private static IllegalArgumentException refused(String what, double value, String unit) {
    return new IllegalArgumentException(
        (what + " must be positive and finite, given " + value + " " + unit).strip());
  }

  @Override
  public String toString() {
    return "kernel of " + data.description();
  }
}
