package org.toprung.budget.dynamics;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import org.toprung.budget.bench.Bench;
import org.toprung.budget.bench.BenchValue;
import org.toprung.budget.bench.Disturbance;
import org.toprung.budget.bench.Disturbance.Kind;
import org.toprung.budget.bench.NoiseDensity;
import org.toprung.core.drive.Ladder;

/**
 * What all shots of a simulation have in common: segments, plans, outcomes and noise within a shot.
 *
 * <p>Where noise acts within a shot, no segment is longer than a {@value #FEWEST_SEGMENTS}th of the
 * program, nor than an eighth of the period of the highest frequency that matters: the highest of
 * the tables, but no more than {@value #FASTEST} times the Rabi frequency, above which the atom
 * responds with the inverse square of the frequency and only the mean over a segment counts; and
 * there are no more than about {@value #MOST_SEGMENTS} of them.
 *
 * <p>Immutable and thread-safe.
 */
final class ShotShape {
  private static final int FEWEST_SEGMENTS = 64;
  private static final int MOST_SEGMENTS = 400;
  private static final double FASTEST = 12;
  private static final double SEGMENTS_PER_PERIOD = 8;
  private static final double ACCURACY = 1e-5; // of an amplitude

  private final Timeline timeline;
  private final List<LadderPlan> plans;
  private final Outcomes outcomes;
  private final int start;
  private final int[][] rungs; // active states by rung
  private final double[] seconds;
  private final double[] middles; // s from the middle of the program
  private final int[] kind; // by segment, −1 where the Hamiltonian is used once
  private final int[] kindSegment;
  private final double[] linewidth; // Hz
  private final List<NoiseTones> frequencyTones = new ArrayList<>(); // null where there are none
  private final List<NoiseTones> intensityTones = new ArrayList<>();
  private final boolean phaseNoise;
  private final boolean intensityTrace;
  private final double[][][] operatorRe; // by step and segment
  private final double[][][] operatorIm;

  ShotShape(
      CalibratedProgram calibrated,
      List<Ladder> variants,
      Bench bench,
      Set<Disturbance> active,
      boolean moves) {
    Ladder ladder = calibrated.ladder();
    int steps = ladder.steps();
    this.linewidth = new double[steps];
    double highest = 0;
    for (int k = 0; k < steps; k++) {
      if (active.contains(new Disturbance(Kind.LINEWIDTH, k))) {
        linewidth[k] = bench.value(BenchValue.LINEWIDTH, k).orElse(0);
      }
      Optional<NoiseDensity> frequency = bench.frequencyNoiseDensity(k);
      Optional<NoiseDensity> intensity = bench.intensityNoiseDensity(k);
      boolean hasFrequency =
          frequency.isPresent() && active.contains(new Disturbance(Kind.FREQUENCY_SPECTRUM, k));
      boolean hasIntensity =
          intensity.isPresent() && active.contains(new Disturbance(Kind.INTENSITY_SPECTRUM, k));
      frequencyTones.add(hasFrequency ? new NoiseTones(frequency.get()) : null);
      intensityTones.add(hasIntensity ? new NoiseTones(intensity.get()) : null);
      highest = Math.max(highest, hasFrequency ? frequency.get().highestHertz() : 0);
      highest = Math.max(highest, hasIntensity ? intensity.get().highestHertz() : 0);
    }
    boolean tones = highest > 0;
    this.phaseNoise =
        Arrays.stream(linewidth).anyMatch(w -> w > 0)
            || frequencyTones.stream().anyMatch(t -> t != null);
    this.intensityTrace = moves || intensityTones.stream().anyMatch(t -> t != null);
    double total = calibrated.program().seconds();
    double longest = Double.POSITIVE_INFINITY;
    if (phaseNoise || intensityTrace) {
      double parts = FEWEST_SEGMENTS;
      if (tones) {
        double fastest = Math.min(highest, FASTEST * calibrated.rabiHertz());
        parts = Math.max(parts, SEGMENTS_PER_PERIOD * fastest * total);
      }
      longest = total / Math.min(parts, MOST_SEGMENTS);
    }
    int[] populated = LadderSystem.activeStates(calibrated);
    int smooth = LadderSystem.smoothSteps(calibrated, populated, ACCURACY);
    this.timeline = Timeline.of(calibrated, smooth, longest);
    double accuracy = LadderSystem.accuracyHertz(calibrated, ACCURACY);
    List<LadderPlan> made = new ArrayList<>();
    for (Ladder variant : variants) {
      made.add(LadderPlan.of(calibrated, variant, populated, timeline, accuracy));
    }
    this.plans = List.copyOf(made);
    this.outcomes = LadderSystem.outcomes(calibrated, populated);
    LadderPlan plan = plans.get(0);
    int first = 0;
    while (populated[first] != ladder.start()) {
      first++;
    }
    this.start = first;
    this.rungs = new int[steps + 1][];
    for (int r = 0; r <= steps; r++) {
      List<Integer> on = new ArrayList<>();
      for (int i = 0; i < populated.length; i++) {
        if (plan.terms().rung(populated[i]) == r) {
          on.add(i);
        }
      }
      rungs[r] = on.stream().mapToInt(Integer::intValue).toArray();
    }
    int segments = timeline.segments();
    this.seconds = new double[segments];
    this.middles = new double[segments];
    double at = -0.5 * total;
    for (int m = 0; m < segments; m++) {
      seconds[m] = timeline.seconds(m);
      middles[m] = at + 0.5 * seconds[m];
      at += seconds[m];
    }
    this.kind = new int[segments];
    List<Integer> representatives = new ArrayList<>();
    Map<List<Double>, Integer> known = new HashMap<>();
    for (int m = 0; m < segments; m++) {
      kind[m] = -1;
      if (timeline.isConstant(m)) {
        List<Double> key = List.of((double) timeline.first(m), (double) (float) seconds[m]);
        int number = known.computeIfAbsent(key, k -> known.size());
        if (number == representatives.size()) {
          representatives.add(m);
        }
        kind[m] = number;
      }
    }
    this.kindSegment = representatives.stream().mapToInt(Integer::intValue).toArray();
    this.operatorRe = new double[steps][][];
    this.operatorIm = new double[steps][][];
    if (intensityTrace) {
      operators(plan);
    }
  }

  private void operators(LadderPlan plan) {
    int p = plan.size();
    for (int k = 0; k < operatorRe.length; k++) {
      LadderDerivative derivative = LadderDerivative.byIntensity(plan, k);
      operatorRe[k] = new double[seconds.length][];
      operatorIm[k] = new double[seconds.length][];
      for (int m = 0; m < seconds.length; m++) {
        if (kind[m] >= 0 && kindSegment[kind[m]] < m) {
          operatorRe[k][m] = operatorRe[k][kindSegment[kind[m]]];
          operatorIm[k][m] = operatorIm[k][kindSegment[kind[m]]];
          continue;
        }
        operatorRe[k][m] = new double[p * p];
        operatorIm[k][m] = new double[p * p];
        derivative.segment(m, operatorRe[k][m], operatorIm[k][m]);
      }
    }
  }

  int size() {
    return plans.get(0).size();
  }

  int steps() {
    return linewidth.length;
  }

  Timeline timeline() {
    return timeline;
  }

  List<LadderPlan> plans() {
    return plans;
  }

  Outcomes outcomes() {
    return outcomes;
  }

  void begin(double[] re, double[] im) {
    Arrays.fill(re, 0);
    Arrays.fill(im, 0);
    re[start] = 1;
  }

  int[] onRung(int rung) {
    return rungs[rung];
  }

  /** Lengths of the segments, s; not to be changed. */
  double[] seconds() {
    return seconds;
  }

  double[] middles() {
    return middles;
  }

  int kinds() {
    return kindSegment.length;
  }

  int kind(int segment) {
    return kind[segment];
  }

  int kindSegment(int kindIndex) {
    return kindSegment[kindIndex];
  }

  double kindSeconds(int kindIndex) {
    return seconds[kindSegment[kindIndex]];
  }

  double linewidthHertz(int step) {
    return linewidth[step];
  }

  List<NoiseTones> frequencyTones() {
    return frequencyTones;
  }

  List<NoiseTones> intensityTones() {
    return intensityTones;
  }

  boolean hasPhaseNoise() {
    return phaseNoise;
  }

  boolean hasIntensityTrace() {
    return intensityTrace;
  }

  double[] operatorRe(int step, int segment) {
    return operatorRe[step][segment];
  }

  double[] operatorIm(int step, int segment) {
    return operatorIm[step][segment];
  }
}
