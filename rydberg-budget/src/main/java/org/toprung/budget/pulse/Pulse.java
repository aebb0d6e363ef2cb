package org.toprung.budget.pulse;

import java.math.BigDecimal;
import java.math.MathContext;
import java.math.RoundingMode;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Locale;
import java.util.Objects;
import java.util.OptionalDouble;
import org.toprung.core.quantity.Frequency;
import org.toprung.core.quantity.Time;

/**
 * A pulse of the whole ladder: what is done to the light, and what it is meant to do to the atom.
 *
 * <p>Amplitudes are relative to the effective Rabi frequency Ω with every beam at full power.
 * Pulses given by an area (the angle 2πΩ∫amplitude dt) get their length when {@link #program} is
 * told Ω.
 *
 * <p>Unless {@link #shapingStep} says otherwise every beam is shaped, each field with the amplitude
 * to the power of one over the number of beams, so that the product of the fields is the amplitude.
 *
 * <p>The success of a pulse made for an area is {@link Goal#TRANSFER} where the area is an odd
 * multiple of π and {@link Goal#RETURN} where it is an even one, both to 10⁻⁴ rad, and {@link
 * Goal#ROTATION} otherwise.
 *
 * <p>Immutable and thread-safe.
 */
public final class Pulse {
  private static final int MOST_STEPS = 3;
  private static final double LONGEST_SECONDS = 0.1;
  private static final double SAME_AREA = 1e-4; // rad
  private static final double ROUNDING = 1e-9; // of lengths that are computed from an area

  private final String name;
  private final Goal goal;
  private final double areaRadians; // NaN where there is none
  private final List<List<Part>> fields; // one for all steps together, or one per step
  private final Options options;

  /** What can be changed about any pulse; the shaping step is −1 where every beam is shaped. */
  private record Options(Frequency offset, Edges edges, int shapingStep, boolean holds) {
    static final Options NONE = new Options(Frequency.ofHertz(0), Edges.ABRUPT, -1, false);
  }

  private Pulse(
      String name, Goal goal, double areaRadians, List<List<Part>> fields, Options options) {
    this.name = name;
    this.goal = goal;
    this.areaRadians = areaRadians;
    this.fields = fields;
    this.options = options;
  }

  private static Pulse ofArea(String name, double areaRadians, List<Part> parts) {
    return new Pulse(name, goalOf(areaRadians), areaRadians, List.of(parts), Options.NONE);
  }

  private static Pulse timed(String name, Goal goal, List<Part> parts) {
    return new Pulse(name, goal, Double.NaN, List.of(parts), Options.NONE);
  }

  private static Goal goalOf(double areaRadians) {
    double halfTurns = Math.rint(areaRadians / Math.PI);
    if (halfTurns == 0 || Math.abs(areaRadians - halfTurns * Math.PI) > SAME_AREA) {
      return Goal.ROTATION;
    }
    return halfTurns % 2 == 0 ? Goal.RETURN : Goal.TRANSFER;
  }

  /**
   * The square π pulse: full transfer on the light-shifted resonance.
   *
   * @return a pulse of area π without offset
   */
  public static Pulse pi() {
    return ofArea("pi", Math.PI, List.of(Part.turn(Shape.CONSTANT, Math.PI, 0)));
  }

  /**
   * A pulse at full power.
   *
   * @param areaRadians its area, more than 0 and at most 100π rad
   * @return the pulse
   * @throws IllegalArgumentException if the area is out of range
   */
  public static Pulse square(double areaRadians) {
    return shaped("square", Shape.CONSTANT, areaRadians);
  }

  /**
   * A Gaussian that reaches full power in the middle.
   *
   * <p>It is cut where it has fallen to 1 % on either side, 3.03 standard deviations from the
   * middle, and that pedestal is taken off, (g − 0.01)/0.99, so that it begins and ends at exactly
   * zero.
   *
   * @param areaRadians its area, more than 0 and at most 100π rad
   * @return the pulse
   * @throws IllegalArgumentException if the area is out of range
   */
  public static Pulse gaussian(double areaRadians) {
    return shaped("Gaussian", Shape.GAUSSIAN, areaRadians);
  }

  /**
   * A Blackman window, 0.42 − 0.5 cos 2πx + 0.08 cos 4πx with x from 0 to 1, that reaches full
   * power in the middle.
   *
   * @param areaRadians its area, more than 0 and at most 100π rad
   * @return the pulse
   * @throws IllegalArgumentException if the area is out of range
   */
  public static Pulse blackman(double areaRadians) {
    return shaped("Blackman", Shape.BLACKMAN, areaRadians);
  }

  /**
   * The amplitude sin² πx with x from 0 to 1.
   *
   * @param areaRadians its area, more than 0 and at most 100π rad
   * @return the pulse
   * @throws IllegalArgumentException if the area is out of range
   */
  public static Pulse sineSquared(double areaRadians) {
    return shaped("sine-squared", Shape.SINE_SQUARED, areaRadians);
  }

  private static Pulse shaped(String kind, Shape shape, double areaRadians) {
    requireArea(areaRadians, 100);
    return ofArea(named(kind, areaRadians), areaRadians, List.of(Part.turn(shape, areaRadians, 0)));
  }

  private static String named(String kind, double areaRadians) {
    return String.format(Locale.ROOT, "%s %.5g rad", kind, areaRadians);
  }

  private static void requireArea(double areaRadians, int halfTurns) {
    if (!(areaRadians > 0 && areaRadians <= halfTurns * Math.PI)) {
      throw new IllegalArgumentException(
          "pulse area "
              + areaRadians
              + " rad is out of range: allowed is more than 0 and at most "
              + halfTurns
              + "π rad");
    }
  }

  /**
   * Two square π/2 pulses, the second with another phase.
   *
   * <p>Without disturbance the atom ends in the target with probability cos²(phase/2): at phase 0
   * the two add up to a π pulse. In the dark the phase changes half way, where edges do not reach.
   *
   * @param wait time without light between the two, at least 0
   * @param phaseRadians phase of the second pulse relative to the first
   * @return the pulse
   * @throws IllegalArgumentException if the wait is negative or the phase not finite
   */
  public static Pulse ramsey(Time wait, double phaseRadians) {
    requireAtLeastZero(wait, "wait");
    requirePhase(phaseRadians);
    double half = 0.5 * wait.seconds();
    return timed(
        "Ramsey pair " + wait + " apart",
        Goal.COHERENCE,
        List.of(
            Part.turn(Shape.CONSTANT, 0.5 * Math.PI, 0),
            Part.dark(half, 0),
            Part.dark(half, phaseRadians),
            Part.turn(Shape.CONSTANT, 0.5 * Math.PI, phaseRadians)));
  }

  /**
   * Square π/2, π and π/2 pulses with equal waits between them; the π pulse turns slow detunings
   * round. The last pulse has another phase.
   *
   * <p>Without disturbance the atom ends in the start with probability cos²(phase/2): at phase 0
   * the three add up to a 2π pulse. In the dark the phase changes half way, where edges do not
   * reach.
   *
   * @param halfWait time without light before the π pulse, and as long again after it, at least 0
   * @param phaseRadians phase of the last pulse relative to the others
   * @return the pulse
   * @throws IllegalArgumentException if the wait is negative or the phase not finite
   */
  public static Pulse echo(Time halfWait, double phaseRadians) {
    requireAtLeastZero(halfWait, "half wait");
    requirePhase(phaseRadians);
    double wait = halfWait.seconds();
    return timed(
        "echo of twice " + halfWait,
        Goal.COHERENCE,
        List.of(
            Part.turn(Shape.CONSTANT, 0.5 * Math.PI, 0),
            Part.dark(wait, 0),
            Part.turn(Shape.CONSTANT, Math.PI, 0),
            Part.dark(0.5 * wait, 0),
            Part.dark(0.5 * wait, phaseRadians),
            Part.turn(Shape.CONSTANT, 0.5 * Math.PI, phaseRadians)));
  }

  private static void requirePhase(double phaseRadians) {
    if (!Double.isFinite(phaseRadians)) {
      throw new IllegalArgumentException(
          "phase " + phaseRadians + " rad: allowed is any finite number");
    }
  }

  /**
   * Adiabatic passage at full power with the detuning swept linearly from −sweep/2 to +sweep/2.
   *
   * <p>With ordinary frequencies the passage fails with probability exp(−π²Ω²·duration/|sweep|)
   * (Zener, Proc. R. Soc. A 137, 696 (1932)) as long as |sweep| is much greater than Ω.
   *
   * @param duration length, more than 0
   * @param sweep how far the detuning rises, negative if it falls, not 0
   * @return the pulse
   * @throws IllegalArgumentException if the duration is not positive or the sweep is 0
   */
  public static Pulse chirped(Time duration, Frequency sweep) {
    return chirped("chirp", Shape.CONSTANT, Sweep.LINEAR, duration, sweep);
  }

  /**
   * Adiabatic passage with amplitude sin² πx and detuning −(sweep/2) cos πx, x from 0 to 1.
   *
   * <p>The light rises and falls while the detuning is large and nearly still, so that start and
   * target are the dressed states at the ends for any sweep.
   *
   * @param duration length, more than 0
   * @param sweep how far the detuning rises, negative if it falls, not 0
   * @return the pulse
   * @throws IllegalArgumentException if the duration is not positive or the sweep is 0
   */
  public static Pulse chirpedSmoothly(Time duration, Frequency sweep) {
    return chirped("smooth chirp", Shape.SINE_SQUARED, Sweep.SINE, duration, sweep);
  }

  private static Pulse chirped(
      String kind, Shape shape, Sweep form, Time duration, Frequency sweep) {
    requirePositive(duration, "duration of a chirp");
    if (sweep.hertz() == 0) {
      throw new IllegalArgumentException(
          "a chirp over " + sweep + " crosses no resonance: allowed is any other sweep");
    }
    double half = 0.5 * sweep.hertz();
    return timed(
        kind + " of " + duration + " over " + sweep,
        Goal.TRANSFER,
        List.of(Part.timed(duration.seconds(), shape, form, -half, half)));
  }

  private static void requirePositive(Time time, String what) {
    if (!(time.seconds() > 0)) {
      throw new IllegalArgumentException(what + " " + time + ": allowed is more than 0 s");
    }
  }

  /**
   * Stimulated Raman adiabatic passage over an intermediate level on resonance: the field of the
   * second step (Stokes) comes before that of the first (pump), each with the form sin² πx.
   *
   * <p>Bergmann, Theuer and Shore, Rev. Mod. Phys. 70, 1003 (1998). For drives of two steps only;
   * the amplitude of the program is the product of both fields, as for any pulse.
   *
   * @param width length of each field from zero to zero, more than 0
   * @param delay how much later the pump comes, more than 0 and less than the width
   * @return the pulse
   * @throws IllegalArgumentException if a time is out of range
   */
  public static Pulse stirap(Time width, Time delay) {
    return stirap("STIRAP", Shape.SINE_SQUARED, width, delay);
  }

  /**
   * {@link #stirap} with fields of the form that {@link #gaussian} gives the amplitude.
   *
   * @param width length of each field from zero to zero, 6.07 standard deviations, more than 0
   * @param delay how much later the pump comes, more than 0 and less than the width
   * @return the pulse
   * @throws IllegalArgumentException if a time is out of range
   */
  public static Pulse gaussianStirap(Time width, Time delay) {
    return stirap("Gaussian STIRAP", Shape.GAUSSIAN, width, delay);
  }

  private static Pulse stirap(String kind, Shape shape, Time width, Time delay) {
    requirePositive(width, "width of the fields");
    if (!(delay.seconds() > 0 && delay.seconds() < width.seconds())) {
      throw new IllegalArgumentException(
          "pump "
              + delay
              + " after Stokes: allowed is more than 0 s and less than the width of "
              + width);
    }
    Part field = Part.timed(width.seconds(), shape, Sweep.LINEAR, 0, 0);
    Part dark = Part.dark(delay.seconds(), 0);
    return new Pulse(
        kind + " of " + width + ", delay " + delay,
        Goal.TRANSFER,
        Double.NaN,
        List.of(List.of(dark, field), List.of(field, dark)),
        Options.NONE);
  }

  /**
   * The composite BB1: a square pulse followed by π, 2π and π pulses of phases φ, 3φ and φ with cos
   * φ = −area/4π, which take out errors of the amplitude up to the second order.
   *
   * <p>Wimperis, J. Magn. Reson. A 109, 221 (1994). A relative error ε of the amplitude costs ∝ ε⁶.
   *
   * @param areaRadians angle to turn by, more than 0 and at most 4π rad
   * @return the pulse, of total area 4π more
   * @throws IllegalArgumentException if the area is out of range
   */
  public static Pulse bb1(double areaRadians) {
    requireArea(areaRadians, 4);
    double phase = Math.acos(-areaRadians / (4 * Math.PI));
    return ofArea(
        named("BB1", areaRadians),
        areaRadians,
        List.of(
            Part.turn(Shape.CONSTANT, areaRadians, 0),
            Part.turn(Shape.CONSTANT, Math.PI, phase),
            Part.turn(Shape.CONSTANT, 2 * Math.PI, 3 * phase),
            Part.turn(Shape.CONSTANT, Math.PI, phase)));
  }

  /**
   * The composite CORPSE: square pulses of areas 2π + θ/2 − k, 2π − 2k and θ/2 − k with phases 0, π
   * and 0, θ being the area and sin k = ½ sin θ/2, which take out errors of the detuning in the
   * first order.
   *
   * <p>Cummins, Llewellyn and Jones, Phys. Rev. A 67, 042308 (2003). A detuning δ costs ∝ δ⁴.
   *
   * @param areaRadians angle to turn by, more than 0 and at most 4π rad
   * @return the pulse
   * @throws IllegalArgumentException if the area is out of range
   */
  public static Pulse corpse(double areaRadians) {
    requireArea(areaRadians, 4);
    double half = 0.5 * areaRadians;
    double k = Math.asin(0.5 * Math.sin(half));
    return ofArea(
        named("CORPSE", areaRadians),
        areaRadians,
        List.of(
            Part.turn(Shape.CONSTANT, 2 * Math.PI + half - k, 0),
            Part.turn(Shape.CONSTANT, 2 * Math.PI - 2 * k, Math.PI),
            Part.turn(Shape.CONSTANT, half - k, 0)));
  }

  /**
   * Own settings, each held for the same time, as a waveform generator plays them.
   *
   * @param spacing length of a slice, more than 0
   * @param amplitude effective Rabi frequency over that at full power, 0 to 1, somewhere above 0
   * @param detuningHertz laser minus resonance, Hz, as many
   * @param phaseRadians phase of the ladder's light, rad, as many
   * @param goal what success is
   * @return the pulse; the arrays are copied
   * @throws IllegalArgumentException if the spacing is not positive, the arrays are empty or of
   *     different lengths, or a value is out of range
   */
  public static Pulse samples(
      Time spacing, double[] amplitude, double[] detuningHertz, double[] phaseRadians, Goal goal) {
    Objects.requireNonNull(goal, "goal");
    requirePositive(spacing, "spacing of samples");
    int n = amplitude.length;
    if (n == 0 || detuningHertz.length != n || phaseRadians.length != n) {
      throw new IllegalArgumentException(
          String.format(
              Locale.ROOT,
              "%d amplitudes, %d detunings and %d phases: allowed are equal numbers, at least 1",
              n,
              detuningHertz.length,
              phaseRadians.length));
    }
    List<Part> slices = new ArrayList<>(n);
    boolean dark = true;
    for (int i = 0; i < n; i++) {
      if (!(amplitude[i] >= 0 && amplitude[i] <= 1)) {
        throw new IllegalArgumentException(
            "amplitude " + amplitude[i] + " of sample " + i + ": allowed is 0 to 1");
      }
      if (!(Double.isFinite(detuningHertz[i]) && Double.isFinite(phaseRadians[i]))) {
        throw new IllegalArgumentException(
            String.format(
                Locale.ROOT,
                "detuning %s Hz and phase %s rad of sample %d: allowed are finite numbers",
                detuningHertz[i],
                phaseRadians[i],
                i));
      }
      dark &= amplitude[i] == 0;
      slices.add(Part.slice(spacing.seconds(), amplitude[i], detuningHertz[i], phaseRadians[i]));
    }
    if (dark) {
      throw new IllegalArgumentException(
          "all " + n + " amplitudes are 0: allowed are 0 to 1 with at least one above 0");
    }
    return timed(n + " samples of " + spacing, goal, List.copyOf(slices));
  }

  /**
   * Moves the ladder's laser frequency away from the resonance.
   *
   * @param newOffset laser minus the resonance that the pulse refers to
   * @return a copy with this offset
   */
  public Pulse offsetBy(Frequency newOffset) {
    Objects.requireNonNull(newOffset, "offset");
    return with(new Options(newOffset, options.edges, options.shapingStep, options.holds));
  }

  /**
   * Gives the modulator of each shaped beam a finite speed.
   *
   * <p>Every jump of the programmed field becomes an error-function step. With one shaped beam it
   * is centred on the jump and keeps the area of the amplitude; where several beams share the
   * amplitude the product of their steps has less area than the jump, so that the program moves
   * each jump (outwards, by 0.22 of the rise time for two beams at full power and 0.33 for three)
   * until the area is the one asked for, as calibrating the length does. The program begins two
   * rise times before the first step and ends two fall times after the last, with the fields at
   * zero. Phases still jump, and the detuning is as programmed, with its first and last value
   * before and after. Pulses that begin and end at zero stay as they are.
   *
   * @param rise time in which the field goes from 10 % to 90 % of an upward jump, at least 0
   * @param fall time in which the field goes from 90 % to 10 % of a downward jump, at least 0
   * @return a copy with these edges
   * @throws IllegalArgumentException if a time is negative; {@link #program} refuses edges for
   *     which neighbouring jumps are too close
   */
  public Pulse withEdges(Time rise, Time fall) {
    requireAtLeastZero(rise, "rise time");
    requireAtLeastZero(fall, "fall time");
    Edges edges = new Edges(rise.seconds(), fall.seconds());
    return with(new Options(options.offset, edges, options.shapingStep, options.holds));
  }

  private static void requireAtLeastZero(Time time, String what) {
    if (!(time.seconds() >= 0)) {
      throw new IllegalArgumentException(
          what + " " + time + " is negative: allowed is at least 0 s");
    }
  }

  /**
   * Lets only one beam follow the amplitude; the others stay at full power for the whole program.
   *
   * @param step index of the step whose beam is shaped, 0 to 2
   * @return a copy shaped like this
   * @throws IllegalArgumentException if the step is out of range, or each beam has its own shape
   *     already
   */
  public Pulse shapingStep(int step) {
    if (!(step >= 0 && step < MOST_STEPS)) {
      throw new IllegalArgumentException(
          "no step " + step + " to shape: allowed are 0 to " + (MOST_STEPS - 1));
    }
    requireOneShape("shape step " + step + " alone");
    return with(new Options(options.offset, options.edges, step, options.holds));
  }

  /**
   * Leaves the laser on the light-shifted resonance at full power for the whole program instead of
   * following the resonance as the programmed fields change.
   *
   * @return a copy that holds the frequency
   * @throws IllegalArgumentException if the pulse takes its frequency from the atom without light
   */
  public Pulse holdingFrequency() {
    requireOneShape("hold the frequency at full power");
    return with(new Options(options.offset, options.edges, options.shapingStep, true));
  }

  private void requireOneShape(String what) {
    if (!isTwoLevel()) {
      throw new IllegalArgumentException(
          "a "
              + name
              + " cannot "
              + what
              + ": each of its beams has its own shape, and it counts from the unshifted resonance");
    }
  }

  private Pulse with(Options newOptions) {
    return new Pulse(name, goal, areaRadians, fields, newOptions);
  }

  /**
   * A few words for reports.
   *
   * @return kind and area or parameters
   */
  public String name() {
    return name;
  }

  /**
   * What success is.
   *
   * @return the goal
   */
  public Goal goal() {
    return goal;
  }

  /**
   * Laser minus the resonance that the pulse refers to, by intention.
   *
   * @return the offset
   */
  public Frequency offset() {
    return options.offset;
  }

  /**
   * The angle that the pulse turns by on resonance, where it is made for one.
   *
   * @return the angle, rad; empty for pulses of fixed duration
   */
  public OptionalDouble areaRadians() {
    return Double.isNaN(areaRadians) ? OptionalDouble.empty() : OptionalDouble.of(areaRadians);
  }

  /**
   * Area of the square pulse to plan a drive for when only Rabi frequency and resonance matter.
   *
   * @return the pulse's own {@link #areaRadians}, rad; π where it has none
   */
  public double planAreaRadians() {
    return areaRadians().orElse(Math.PI);
  }

  /**
   * Whether start and target alone describe the pulse, the levels between them being far off.
   *
   * @return false if the pulse needs an intermediate level on resonance
   */
  public boolean isTwoLevel() {
    return fields.size() == 1;
  }

  /**
   * The pulse that sets the {@link Goal}: without offset and edges, following the resonance.
   *
   * @return a copy that is shaped alike
   */
  public Pulse ideal() {
    return with(new Options(Options.NONE.offset, Options.NONE.edges, options.shapingStep, false));
  }

  /**
   * What is played on a given drive.
   *
   * @param steps number of laser steps, 1 to 3
   * @param rabi effective Rabi frequency with every beam at full power, more than 0
   * @return the program
   * @throws IllegalArgumentException if an argument is out of range, if the drive has not the steps
   *     that the pulse needs, if edges are too slow for the time between neighbouring jumps, or if
   *     the pulse takes longer than {@value #LONGEST_SECONDS} s
   */
  public PulseProgram program(int steps, Frequency rabi) {
    requireSteps(steps);
    if (!(rabi.hertz() > 0)) {
      throw new IllegalArgumentException(
          "effective Rabi frequency " + rabi + " is not positive: the pulse has no length");
    }
    boolean together = fields.size() == 1;
    int sharing = together && options.shapingStep < 0 ? steps : 1;
    Track[] tracks = new Track[steps];
    List<Part> parts = null;
    double[] seconds = null;
    for (int k = fields.size() - 1; k >= 0; k--) {
      parts = fields.get(k).stream().filter(p -> p.seconds(rabi.hertz()) > 0).toList();
      seconds = parts.stream().mapToDouble(p -> p.seconds(rabi.hertz())).toArray();
      tracks[k] = Track.of(parts, seconds, sharing, options.edges);
      requireTimeForEdges(tracks[k]);
    }
    double lead = tracks[0].lead();
    double end = lead + tracks[0].rest();
    if (!(end <= LONGEST_SECONDS)) {
      throw new IllegalArgumentException(
          String.format(
              Locale.ROOT,
              "the %s takes %.3g s at a Rabi frequency of %.3g Hz: allowed are up to %s s, longer than"
                  + " any Rydberg level of the library lives",
              name,
              end,
              rabi.hertz(),
              LONGEST_SECONDS));
    }
    if (together) {
      Track shaped = tracks[0].delayedBy(lead);
      Arrays.fill(tracks, options.shapingStep < 0 ? shaped : Track.on());
      if (options.shapingStep >= 0) {
        tracks[options.shapingStep] = shaped;
      }
    }
    Control control = new Control(parts, seconds, lead, options.offset.hertz());
    return new PulseProgram(tracks, control, end, reference());
  }

  private FrequencyReference reference() {
    if (!isTwoLevel()) {
      return FrequencyReference.BARE;
    }
    return options.holds ? FrequencyReference.FULL_POWER : FrequencyReference.FOLLOWING;
  }

  private void requireSteps(int steps) {
    if (!(steps >= 1 && steps <= MOST_STEPS)) {
      throw new IllegalArgumentException(
          "no program for " + steps + " steps: allowed are 1 to " + MOST_STEPS);
    }
    if (!isTwoLevel() && steps != fields.size()) {
      throw new IllegalArgumentException(
          "a " + name + " takes " + fields.size() + " steps, but the drive has " + steps);
    }
    if (options.shapingStep >= steps) {
      throw new IllegalArgumentException(
          "the pulse shapes step index "
              + options.shapingStep
              + ", but the drive has "
              + steps
              + (steps == 1 ? " step" : " steps")
              + ": allowed are 0 to "
              + (steps - 1));
    }
  }

  private void requireTimeForEdges(Track track) {
    double shortest = track.shortestSeconds();
    double needed = options.edges.shortestSeconds();
    if (!(shortest * (1 + ROUNDING) >= needed)) {
      throw new IllegalArgumentException(
          String.format(
              Locale.ROOT,
              "edges of %s (rise) and %s (fall) are too slow for the %s: twice the longer must fit"
                  + " between neighbouring jumps of its amplitude, which are %s apart; allowed are"
                  + " edges of at most %s",
              Time.ofSeconds(options.edges.riseSeconds()),
              Time.ofSeconds(options.edges.fallSeconds()),
              name,
              rounded(shortest),
              rounded(0.5 * shortest)));
    }
  }

  /** Down to three digits. */
  private static Time rounded(double seconds) {
    return Time.ofSeconds(
        new BigDecimal(seconds * (1 + ROUNDING))
            .round(new MathContext(3, RoundingMode.FLOOR))
            .doubleValue());
  }

  /**
   * Name and options.
   *
   * @return the name, and what differs from the plain pulse
   */
  @Override
  public String toString() {
    List<String> words = new ArrayList<>(List.of(name));
    if (options.offset.hertz() != 0) {
      words.add("offset " + options.offset);
    }
    if (!options.edges.isAbrupt()) {
      words.add("rise " + Time.ofSeconds(options.edges.riseSeconds()));
      words.add("fall " + Time.ofSeconds(options.edges.fallSeconds()));
    }
    if (options.shapingStep >= 0) {
      words.add("shaping step " + options.shapingStep);
    }
    if (options.holds) {
      words.add("holding the frequency");
    }
    return String.join(", ", words);
  }
}
