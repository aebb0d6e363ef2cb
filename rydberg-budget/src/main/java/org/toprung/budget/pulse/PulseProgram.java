package org.toprung.budget.pulse;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import org.toprung.core.quantity.Time;

/**
 * What a sequencer plays during a pulse: fields, detuning and phase over time.
 *
 * <p>In ordinary frequencies, with Ω the effective Rabi frequency at full power times {@link
 * #amplitude}, δ the {@link #detuningHertz} plus whatever the resonance has moved against the
 * {@link #reference}, and φ the {@link #phaseRadians}, the effective two-level system of start s
 * and target t is H/h = −δ|t⟩⟨t| + (Ω/2)(e^(−iφ)|t⟩⟨s| + h.c.).
 *
 * <p>Everything is smooth strictly between neighbouring {@link #breaks}; ask only there and only
 * within the program.
 *
 * <p>Immutable and thread-safe.
 */
public final class PulseProgram {
  private static final int MOST_SLICES = 1_000_000;

  private final Track[] tracks; // per step
  private final Control control;
  private final double seconds;
  private final FrequencyReference reference;
  private final double[] breaks;
  private final double[] programmedBreaks;

  PulseProgram(Track[] tracks, Control control, double seconds, FrequencyReference reference) {
    this.tracks = tracks;
    this.control = control;
    this.seconds = seconds;
    this.reference = reference;
    List<Double> programmed = new ArrayList<>(control.breaks());
    for (Track track : tracks) {
      programmed.addAll(track.programmedBreaks());
    }
    this.programmedBreaks = sorted(programmed, seconds);
    for (Track track : tracks) {
      programmed.addAll(track.edgeBreaks());
    }
    this.breaks = sorted(programmed, seconds);
  }

  /** From 0 to the end, without repetitions. */
  private static double[] sorted(List<Double> times, double end) {
    double[] all = times.stream().mapToDouble(Double::doubleValue).sorted().toArray();
    double[] kept = new double[all.length + 2];
    int n = 1;
    double least = 1e-12 * end;
    for (double t : all) {
      if (t > kept[n - 1] + least && t < end - least) {
        kept[n++] = t;
      }
    }
    kept[n++] = end;
    return Arrays.copyOf(kept, n);
  }

  /**
   * Length of the program, edges included.
   *
   * @return the length, s
   */
  public double seconds() {
    return seconds;
  }

  /**
   * Number of laser steps.
   *
   * @return the number of steps
   */
  public int steps() {
    return tracks.length;
  }

  /**
   * Where anything jumps or has a kink.
   *
   * @return ascending times, s, from 0 to {@link #seconds()}, both included; a copy
   */
  public double[] breaks() {
    return breaks.clone();
  }

  /**
   * Whether all fields, detuning and phase are constant between two neighbouring breaks.
   *
   * @param interval index of the earlier break
   * @return true if they are
   * @throws IllegalArgumentException if there is no such interval
   */
  public boolean isConstant(int interval) {
    if (!(interval >= 0 && interval < breaks.length - 1)) {
      throw new IllegalArgumentException(
          "no interval " + interval + ": allowed are 0 to " + (breaks.length - 2));
    }
    return isConstantAt(0.5 * (breaks[interval] + breaks[interval + 1]));
  }

  private boolean isConstantAt(double t) {
    for (Track track : tracks) {
      if (!track.isConstantAt(t)) {
        return false;
      }
    }
    return control.isConstantAt(t);
  }

  /**
   * Effective Rabi frequency over that at full power: the product of the field factors.
   *
   * @param t time, s
   * @return the amplitude, at least 0
   */
  public double amplitude(double t) {
    double product = 1;
    double field = 1;
    for (int k = 0; k < tracks.length; k++) {
      field = k > 0 && tracks[k] == tracks[k - 1] ? field : tracks[k].actual(t);
      product *= field;
    }
    return product;
  }

  /**
   * Field of a beam over its full field, with the edges of the modulator.
   *
   * @param step index of the step, from 0
   * @param t time, s
   * @return the factor, at least 0
   * @throws IllegalArgumentException if there is no such step
   */
  public double fieldFactor(int step, double t) {
    return track(step).actual(t);
  }

  /**
   * Field of a beam over its full field as programmed, without edges.
   *
   * @param step index of the step, from 0
   * @param t time, s
   * @return the factor, at least 0
   * @throws IllegalArgumentException if there is no such step
   */
  public double programmedFieldFactor(int step, double t) {
    return track(step).programmed(t);
  }

  private Track track(int step) {
    if (!(step >= 0 && step < tracks.length)) {
      throw new IllegalArgumentException(
          "no step " + step + ": allowed are 0 to " + (tracks.length - 1));
    }
    return tracks[step];
  }

  /**
   * Intended detuning: laser minus resonance of the {@link #reference}, with the pulse's offset.
   *
   * @param t time, s
   * @return the detuning, Hz
   */
  public double detuningHertz(double t) {
    return control.detuning(t);
  }

  /**
   * Phase of the ladder's light.
   *
   * @param t time, s
   * @return the phase, rad
   */
  public double phaseRadians(double t) {
    return control.phase(t);
  }

  /**
   * What the detuning counts from.
   *
   * @return the reference
   */
  public FrequencyReference reference() {
    return reference;
  }

  /**
   * The program in constant slices for a waveform generator: what is programmed, without edges.
   *
   * <p>A stretch without change is one slice; what changes smoothly is cut into equal slices. A
   * slice plays the mean amplitude (of each beam on its own where they are shaped differently) and
   * the mean detuning, so that areas and phases are kept exactly.
   *
   * @param spacing greatest length of a slice where anything changes
   * @return the slices in order; their lengths add up to {@link #seconds()}
   * @throws IllegalArgumentException if the spacing is not positive, or so short that there would
   *     be more than a million slices
   */
  public List<Slice> slices(Time spacing) {
    double most = spacing.seconds();
    if (!(most > 0 && seconds / most <= MOST_SLICES)) {
      throw new IllegalArgumentException(
          "slice spacing "
              + spacing
              + " does not cut a program of "
              + Time.ofSeconds(seconds)
              + " into slices: allowed is more than 0 and at most "
              + MOST_SLICES
              + " slices");
    }
    List<Slice> slices = new ArrayList<>();
    for (int i = 0; i + 1 < programmedBreaks.length; i++) {
      double from = programmedBreaks[i];
      double length = programmedBreaks[i + 1] - from;
      int count = isProgramConstantAt(from + 0.5 * length) ? 1 : (int) Math.ceil(length / most);
      for (int c = 0; c < count; c++) {
        slices.add(slice(from + length * c / count, from + length * (c + 1) / count));
      }
    }
    return List.copyOf(slices);
  }

  private boolean isProgramConstantAt(double t) {
    for (Track track : tracks) {
      if (!track.isProgramConstantAt(t)) {
        return false;
      }
    }
    return control.isConstantAt(t);
  }

  private Slice slice(double from, double to) {
    List<Double> fields = new ArrayList<>();
    for (Track track : tracks) {
      fields.add(track.programmedMean(from, to));
    }
    return new Slice(
        to - from, fields, control.meanDetuning(from, to), control.phase(0.5 * (from + to)));
  }

  /**
   * Length and number of intervals, for logs.
   *
   * @return a short text
   */
  @Override
  public String toString() {
    return "program of "
        + Time.ofSeconds(seconds)
        + " for "
        + tracks.length
        + (tracks.length == 1 ? " beam, " : " beams, ")
        + (breaks.length - 1)
        + " intervals";
  }
}
