package org.toprung.budget.dynamics;

import java.util.Arrays;
import java.util.List;
import org.toprung.budget.pulse.FrequencyReference;
import org.toprung.budget.pulse.Goal;
import org.toprung.budget.pulse.Pulse;
import org.toprung.budget.pulse.PulseProgram;
import org.toprung.core.quantity.Frequency;

/**
 * A pulse on the effective two-level system of start s and target t.
 *
 * <p>H/h = −δ|t⟩⟨t| + (Ω/2)(e<sup>−iφ</sup>|t⟩⟨s| + h.c.) with everything in Hz, Ω(t) the effective
 * Rabi frequency at full power times the program's amplitude, and δ(t) the program's detuning minus
 * what the beams move the resonance beyond what the program's reference accounts for, Σ<sub>k</sub>
 * (I<sub>k</sub> a<sub>k</sub>² − r<sub>k</sub>) shift<sub>k</sub>: a<sub>k</sub> the field factor,
 * I<sub>k</sub> the relative intensity, r<sub>k</sub> the squared programmed field factor, 1 or 0
 * for a laser that follows the shifted resonance, stays on the one at full power, or on the bare
 * one.
 *
 * <p>The energy that the beams give to both levels alike, as they do to the start, turns the phase
 * of a returning start against an idling state; what the beams do at their nominal intensity and in
 * the planned time is part of the plan, so that only the rest counts.
 *
 * <p>A stretch without change is one segment and exact; what changes smoothly is cut into steps of
 * the fourth-order Magnus expansion at two Gauss points, doubled in number until the final state is
 * good to {@value #ACCURACY}, at the nominal setting and at one well away from it. The propagators
 * are closed: exp(−½iΘ·σ) = cos(Θ/2) − i sin(Θ/2) Θ·σ/Θ.
 *
 * <p>References: Magnus, Commun. Pure Appl. Math. 7, 649 (1954); Blanes, Casas, Oteo and Ros, Phys.
 * Rep. 470, 151 (2009), section 5.
 *
 * <p>Immutable and thread-safe.
 */
public final class TwoLevelSystem implements DrivenSystem {
  private static final double ACCURACY = 1e-9;
  private static final int FIRST_STEPS = 4;
  private static final int MOST_STEPS = 1 << 17;
  private static final double GAUSS = Math.sqrt(3) / 6;

  /** −(√3 π/6)·h B₁×B₂ is what two points do to each other in the mean field of a step. */
  private static final double MAGNUS = Math.sqrt(3) * Math.PI / 6;

  private static final List<String> LABELS = List.of("start", "target");

  private final int steps;
  private final double rabi; // Hz
  private final double[] shift; // Hz at full power, by step
  private final double[] startShift; // of the start alone, Hz at full power, by step
  private final double[] startTurns; // ∫ a² dt times the shift of the start, by step
  private final double[] seconds; // by segment
  private final boolean[] constant; // by segment
  private final double[] nominal; // relative intensities of 1
  private final double[] amplitude; // by segment and point; both points alike where constant
  private final double[] cosine; // of the phase
  private final double[] sine;
  private final double[] detuning; // Hz, with the reference's shift added
  private final double[] intensity; // a², [point × steps + step]
  private final Goal goal;
  private final double wRe0; // the one vector of the goal, start and target
  private final double wIm0;
  private final double wRe1;
  private final double wIm1;

  /** How far each beam at full power moves the resonance, and the start alone, Hz. */
  private record Shifts(double[] resonance, double[] start) {}

  private TwoLevelSystem(
      PulseProgram program, double rabi, Shifts shifts, int cuts, Goal goal, double[] wanted) {
    this.steps = program.steps();
    this.rabi = rabi;
    this.shift = shifts.resonance();
    this.startShift = shifts.start();
    this.startTurns = new double[steps];
    this.goal = goal;
    this.wRe0 = wanted[0];
    this.wIm0 = wanted[1];
    this.wRe1 = wanted[2];
    this.wIm1 = wanted[3];
    double[] breaks = program.breaks();
    int count = 0;
    for (int i = 0; i + 1 < breaks.length; i++) {
      count += program.isConstant(i) ? 1 : cuts;
    }
    this.seconds = new double[count];
    this.constant = new boolean[count];
    this.nominal = ones(steps);
    this.amplitude = new double[2 * count];
    this.cosine = new double[2 * count];
    this.sine = new double[2 * count];
    this.detuning = new double[2 * count];
    this.intensity = new double[2 * count * steps];
    int m = 0;
    for (int i = 0; i + 1 < breaks.length; i++) {
      boolean still = program.isConstant(i);
      int pieces = still ? 1 : cuts;
      double h = (breaks[i + 1] - breaks[i]) / pieces;
      for (int c = 0; c < pieces; c++) {
        seconds[m] = h;
        constant[m] = still;
        double middle = breaks[i] + (c + 0.5) * h;
        sample(program, 2 * m, still ? middle : middle - GAUSS * h);
        sample(program, 2 * m + 1, still ? middle : middle + GAUSS * h);
        for (int k = 0; k < steps; k++) {
          startTurns[k] += h * meanIntensity(m, k) * startShift[k];
        }
        m++;
      }
    }
  }

  private void sample(PulseProgram program, int at, double t) {
    amplitude[at] = program.amplitude(t);
    double phase = program.phaseRadians(t);
    cosine[at] = Math.cos(phase);
    sine[at] = Math.sin(phase);
    double sum = program.detuningHertz(t);
    for (int k = 0; k < steps; k++) {
      double field = program.fieldFactor(k, t);
      intensity[at * steps + k] = field * field;
      sum += reference(program, k, t) * shift[k];
    }
    detuning[at] = sum;
  }

  private double meanIntensity(int segment, int step) {
    return 0.5
        * (intensity[2 * segment * steps + step] + intensity[(2 * segment + 1) * steps + step]);
  }

  private static double reference(PulseProgram program, int step, double t) {
    if (program.reference() == FrequencyReference.FOLLOWING) {
      double field = program.programmedFieldFactor(step, t);
      return field * field;
    }
    return program.reference() == FrequencyReference.FULL_POWER ? 1 : 0;
  }

  /**
   * Prepares a pulse whose start the light does not shift.
   *
   * @param pulse the pulse
   * @param steps number of lasers, 1 to 3
   * @param rabiHertz effective Rabi frequency at full power over 2π, positive, Hz
   * @param shiftHertz how far each beam at full power moves the resonance (target minus start), one
   *     for each step, Hz
   * @return the system
   * @throws IllegalArgumentException if the pulse needs more than two levels, the Rabi frequency is
   *     not positive and finite, or the shifts are not one finite number for each step
   * @throws ArithmeticException if the program changes too fast to be followed in {@value
   *     #MOST_STEPS} steps between two breaks
   */
  public static TwoLevelSystem of(Pulse pulse, int steps, double rabiHertz, double[] shiftHertz) {
    return of(pulse, steps, rabiHertz, shiftHertz, new double[shiftHertz.length]);
  }

  /**
   * Prepares a pulse.
   *
   * @param pulse the pulse
   * @param steps number of lasers, 1 to 3
   * @param rabiHertz effective Rabi frequency at full power over 2π, positive, Hz
   * @param shiftHertz how far each beam at full power moves the resonance (target minus start), one
   *     for each step, Hz
   * @param startShiftHertz how far each beam at full power moves the start alone, one for each
   *     step, Hz; it matters only to a pulse that has to return with a phase
   * @return the system
   * @throws IllegalArgumentException if the pulse needs more than two levels, the Rabi frequency is
   *     not positive and finite, or the shifts are not one finite number for each step
   * @throws ArithmeticException if the program changes too fast to be followed in {@value
   *     #MOST_STEPS} steps between two breaks
   */
  public static TwoLevelSystem of(
      Pulse pulse, int steps, double rabiHertz, double[] shiftHertz, double[] startShiftHertz) {
    if (!pulse.isTwoLevel()) {
      throw new IllegalArgumentException(
          pulse.name() + " drives more than two levels: it needs the ladder");
    }
    if (!(rabiHertz > 0 && rabiHertz < Double.POSITIVE_INFINITY)) {
      throw new IllegalArgumentException(
          "the Rabi frequency must be positive and finite, not " + rabiHertz + " Hz");
    }
    requireShifts(steps, shiftHertz);
    requireShifts(steps, startShiftHertz);
    double[] wanted = wanted(pulse, steps, rabiHertz);
    PulseProgram program = pulse.program(steps, Frequency.ofHertz(rabiHertz));
    Shifts shifts = new Shifts(shiftHertz.clone(), startShiftHertz.clone());
    return refined(program, rabiHertz, shifts, pulse.goal(), wanted);
  }

  private static void requireShifts(int steps, double[] hertz) {
    if (hertz.length != steps || !Arrays.stream(hertz).allMatch(Double::isFinite)) {
      throw new IllegalArgumentException(
          "one finite light shift for each of "
              + steps
              + " steps is needed, not "
              + Arrays.toString(hertz)
              + " Hz");
    }
  }

  /** What the pulse's goal projects on. */
  private static double[] wanted(Pulse pulse, int steps, double rabiHertz) {
    if (pulse.goal() == Goal.TRANSFER) {
      return new double[] {0, 0, 1, 0};
    }
    double[] end = idealEnd(pulse, steps, rabiHertz);
    if (pulse.goal() == Goal.RETURN) {
      double size = 2 * Math.hypot(end[0], end[1]);
      return new double[] {end[0] / size, end[1] / size, 0, 0};
    }
    return end;
  }

  /**
   * Final state of the ideal pulse in the resonant system: real and imaginary part of the start's
   * amplitude, then of the target's.
   */
  static double[] idealEnd(Pulse pulse, int steps, double rabiHertz) {
    PulseProgram ideal = pulse.ideal().program(steps, Frequency.ofHertz(rabiHertz));
    Shifts none = new Shifts(new double[steps], new double[steps]);
    return refined(ideal, rabiHertz, none, pulse.goal(), new double[4]).end(1, 0, ones(steps), 1);
  }

  private static TwoLevelSystem refined(
      PulseProgram program, double rabiHertz, Shifts shifts, Goal goal, double[] wanted) {
    TwoLevelSystem coarse =
        new TwoLevelSystem(program, rabiHertz, shifts, FIRST_STEPS, goal, wanted);
    if (allConstant(program)) {
      return coarse;
    }
    for (int cuts = 2 * FIRST_STEPS; cuts <= MOST_STEPS; cuts *= 2) {
      TwoLevelSystem fine = new TwoLevelSystem(program, rabiHertz, shifts, cuts, goal, wanted);
      // the error of the finer one is a sixteenth of what separates them
      if (coarse.distance(fine) < 16 * ACCURACY) {
        return fine;
      }
      coarse = fine;
    }
    throw new ArithmeticException(
        "the pulse changes too fast to be followed: not converged to "
            + ACCURACY
            + " in "
            + MOST_STEPS
            + " steps between two breaks");
  }

  private static boolean allConstant(PulseProgram program) {
    for (int i = 0; i + 1 < program.breaks().length; i++) {
      if (!program.isConstant(i)) {
        return false;
      }
    }
    return true;
  }

  private double distance(TwoLevelSystem finer) {
    double[] full = ones(steps);
    double[] off = Arrays.stream(full).map(x -> 1.1 * x).toArray();
    double largest = 0;
    double[][] mine = {end(1, 0, full, 1), end(1.1, 0.3 * rabi, off, 1)};
    double[][] theirs = {finer.end(1, 0, full, 1), finer.end(1.1, 0.3 * rabi, off, 1)};
    for (int c = 0; c < mine.length; c++) {
      for (int i = 0; i < 4; i++) {
        largest = Math.max(largest, Math.abs(mine[c][i] - theirs[c][i]));
      }
    }
    return largest;
  }

  private static double[] ones(int n) {
    double[] out = new double[n];
    Arrays.fill(out, 1);
    return out;
  }

  /**
   * Error of the pulse with settings that stay the same during it. Allocates nothing but a few
   * numbers of workspace.
   *
   * @param rabiFactor factor on the effective Rabi frequency
   * @param detuningHertz what is added to the detuning, laser minus resonance, Hz
   * @param relativeIntensity intensity of every beam over the nominal one, which moves its light
   *     shift alone; left unchanged
   * @return 1 − success by the pulse's goal
   */
  public double error(double rabiFactor, double detuningHertz, double[] relativeIntensity) {
    return error(end(rabiFactor, detuningHertz, relativeIntensity, 1));
  }

  /**
   * Error of the pulse when it takes longer than planned, with everything that is programmed.
   *
   * @param factor length over the planned one, at least 0
   * @return 1 − success by the pulse's goal
   */
  public double stretchedError(double factor) {
    return error(end(1, 0, nominal, factor));
  }

  private double error(double[] psi) {
    double sRe = psi[0];
    double sIm = psi[1];
    double tRe = psi[2];
    double tIm = psi[3];
    if (goal == Goal.TRANSFER) {
      return sRe * sRe + sIm * sIm;
    }
    if (goal == Goal.RETURN) {
      double x = 0.5 + wRe0 * sRe + wIm0 * sIm;
      double y = wRe0 * sIm - wIm0 * sRe;
      return 1 - x * x - y * y;
    }
    // by the state orthogonal to w, (−w_t*, w_s*), so that small errors keep their digits
    double re = -wRe1 * sRe + wIm1 * sIm + wRe0 * tRe - wIm0 * tIm;
    double im = -wRe1 * sIm - wIm1 * sRe + wRe0 * tIm + wIm0 * tRe;
    return re * re + im * im;
  }

  /**
   * The state at the end, {start re, start im, target re, target im}, with all times multiplied by
   * a factor.
   */
  private double[] end(
      double rabiFactor, double detuningHertz, double[] relativeIntensity, double stretch) {
    double[] early = new double[3];
    double[] late = new double[3];
    double sRe = 1;
    double sIm = 0;
    double tRe = 0;
    double tIm = 0;
    double turns = 0; // ∫ δ dt
    for (int m = 0; m < seconds.length; m++) {
      double h = stretch * seconds[m];
      turns += h * field(m, h, rabiFactor, detuningHertz, relativeIntensity, early, late);
      double size = Math.sqrt(early[0] * early[0] + early[1] * early[1] + early[2] * early[2]);
      double angle = Math.PI * size * h;
      double cos = Math.cos(angle);
      double sinc = size > 0 ? Math.sin(angle) / size : 0;
      double x = sinc * early[0];
      double y = sinc * early[1];
      double z = sinc * early[2];
      // cos − i(xσx + yσy + zσz), start first
      double aRe = cos * sRe + z * sIm + x * tIm - y * tRe;
      double aIm = cos * sIm - z * sRe - x * tRe - y * tIm;
      double bRe = cos * tRe - z * tIm + x * sIm + y * sRe;
      double bIm = cos * tIm + z * tRe - x * sRe + y * sIm;
      sRe = aRe;
      sIm = aIm;
      tRe = bRe;
      tIm = bIm;
    }
    // the mean energy −δ/2 of both states, and what moves them alike beyond the plan
    for (int k = 0; k < steps; k++) {
      turns -= 2 * (stretch * relativeIntensity[k] - 1) * startTurns[k];
    }
    double cos = Math.cos(Math.PI * turns);
    double sin = Math.sin(Math.PI * turns);
    return new double[] {
      cos * sRe - sin * sIm, cos * sIm + sin * sRe, cos * tRe - sin * tIm, cos * tIm + sin * tRe
    };
  }

  /**
   * The effective field B of a segment, H/h = ½B·σ − δ/2, written to {@code early}.
   *
   * @return the mean detuning δ
   */
  private double field(
      int m,
      double h,
      double rabiFactor,
      double detuningHertz,
      double[] relativeIntensity,
      double[] early,
      double[] late) {
    point(2 * m, rabiFactor, detuningHertz, relativeIntensity, early);
    if (constant[m]) {
      return early[2];
    }
    point(2 * m + 1, rabiFactor, detuningHertz, relativeIntensity, late);
    double k = MAGNUS * h;
    double x = early[1] * late[2] - early[2] * late[1];
    double y = early[2] * late[0] - early[0] * late[2];
    double z = early[0] * late[1] - early[1] * late[0];
    double mean = 0.5 * (early[2] + late[2]);
    early[0] = 0.5 * (early[0] + late[0]) - k * x;
    early[1] = 0.5 * (early[1] + late[1]) - k * y;
    early[2] = mean - k * z;
    return mean;
  }

  private void point(
      int p, double rabiFactor, double detuningHertz, double[] relativeIntensity, double[] out) {
    double omega = rabi * rabiFactor * amplitude[p];
    double sum = detuning[p] + detuningHertz;
    for (int k = 0; k < steps; k++) {
      sum -= relativeIntensity[k] * intensity[p * steps + k] * shift[k];
    }
    out[0] = omega * cosine[p];
    out[1] = -omega * sine[p];
    out[2] = sum;
  }

  @Override
  public int size() {
    return 2;
  }

  @Override
  public int steps() {
    return steps;
  }

  @Override
  public int segments() {
    return seconds.length;
  }

  @Override
  public double segmentSeconds(int segment) {
    return seconds[segment];
  }

  @Override
  public void hamiltonianHertz(int segment, double[] re, double[] im) {
    double[] b = new double[3];
    double mean = field(segment, seconds[segment], 1, 0, nominal, b, new double[3]);
    write(b, mean, re, im);
  }

  private static void write(double[] field, double meanDetuning, double[] re, double[] im) {
    re[0] = 0.5 * (field[2] - meanDetuning);
    re[1] = 0.5 * field[0];
    re[2] = re[1];
    re[3] = -0.5 * (field[2] + meanDetuning);
    im[0] = 0;
    im[1] = -0.5 * field[1];
    im[2] = -im[1];
    im[3] = 0;
  }

  /**
   * Writes the derivative of {@link #hamiltonianHertz}: each point's field changes by a factor
   * along the coupling and by its own number of Hz in detuning.
   */
  private void derivative(
      int m, double coupling, double earlyDetuning, double lateDetuning, double[] re, double[] im) {
    double[] b = new double[3];
    point(2 * m, 1, 0, nominal, b);
    double[] d = {coupling * b[0], coupling * b[1], earlyDetuning};
    if (constant[m]) {
      write(d, earlyDetuning, re, im);
      return;
    }
    double[] c = new double[3];
    point(2 * m + 1, 1, 0, nominal, c);
    double[] e = {coupling * c[0], coupling * c[1], lateDetuning};
    double k = MAGNUS * seconds[m];
    double[] sum = new double[3];
    for (int i = 0; i < 3; i++) {
      int j = (i + 1) % 3;
      int l = (i + 2) % 3;
      double cross = d[j] * c[l] - d[l] * c[j] + b[j] * e[l] - b[l] * e[j];
      sum[i] = 0.5 * (d[i] + e[i]) - k * cross;
    }
    write(sum, 0.5 * (earlyDetuning + lateDetuning), re, im);
  }

  @Override
  public void frequencyOperator(int step, int segment, double[] re, double[] im) {
    derivative(segment, 0, 1, 1, re, im);
  }

  @Override
  public void intensityOperator(int step, int segment, double[] re, double[] im) {
    derivative(
        segment,
        0.5,
        -intensity[2 * segment * steps + step] * shift[step],
        -intensity[(2 * segment + 1) * steps + step] * shift[step],
        re,
        im);
    double common = meanIntensity(segment, step) * startShift[step];
    re[0] += common;
    re[3] += common;
  }

  @Override
  public void intensityCurvature(int step, int otherStep, int segment, double[] re, double[] im) {
    derivative(segment, step == otherStep ? -0.25 : 0.25, 0, 0, re, im);
  }

  /**
   * Derivative of the Hamiltonian by the relative effective Rabi frequency, light shifts unchanged.
   *
   * @param segment index from 0
   * @param re receives the real parts, Hz
   * @param im receives the imaginary parts, Hz
   */
  public void amplitudeOperator(int segment, double[] re, double[] im) {
    derivative(segment, 1, 0, 0, re, im);
  }

  @Override
  public void begin(double[] re, double[] im) {
    re[0] = 1;
    re[1] = 0;
    im[0] = 0;
    im[1] = 0;
  }

  @Override
  public int outcomes() {
    return 1;
  }

  @Override
  public void outcome(int outcome, double[] re, double[] im) {
    re[0] = wRe0;
    im[0] = wIm0;
    re[1] = wRe1;
    im[1] = wIm1;
  }

  @Override
  public double idleAmplitude() {
    return goal == Goal.RETURN ? 0.5 : 0;
  }

  @Override
  public List<String> labels() {
    return LABELS;
  }

  @Override
  public boolean takesPart(int label) {
    return true;
  }

  @Override
  public void populations(int segment, double[] re, double[] im, double[] out) {
    for (int i = 0; i < 2; i++) {
      out[i] = re[i] * re[i] + im[i] * im[i];
    }
  }
}
