package org.toprung.budget.pulse;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Locale;
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
  private static final double SAME_AREA = 1e-4; // rad

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
   * Moves the ladder's laser frequency away from the resonance.
   *
   * @param newOffset laser minus the resonance that the pulse refers to
   * @return a copy with this offset
   */
  public Pulse offsetBy(Frequency newOffset) {
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
   *     that the pulse needs, or if edges are too slow for the time between neighbouring jumps
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
    if (!(shortest >= needed)) {
      throw new IllegalArgumentException(
          String.format(
              Locale.ROOT,
              "edges of %s (rise) and %s (fall) are too slow for the %s: twice the longer must fit"
                  + " between neighbouring jumps of its amplitude, which are %s apart; allowed are"
                  + " edges of at most %s",
              Time.ofSeconds(options.edges.riseSeconds()),
              Time.ofSeconds(options.edges.fallSeconds()),
              name,
              Time.ofSeconds(shortest),
              Time.ofSeconds(0.5 * shortest)));
    }
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
