package org.toprung.budget.dynamics;

import java.util.Arrays;
import java.util.List;
import java.util.SplittableRandom;
import org.toprung.core.linear.ComplexMatrix;
import org.toprung.core.linear.MatrixExponential;

/**
 * Plays one shot after another. Stretches of constant Hamiltonian that come several times have
 * their propagator computed once a shot; noise within a shot acts between the segments (Strang
 * splitting): phases of the lasers as rotations of the rungs above them, intensities through the
 * derivative of the effective Hamiltonian. One instance per thread.
 */
final class ShotPropagator {
  private static final int MOST_TERMS = 12;

  private final ShotShape shape;
  private final ShotDraw draw;
  private final ShotDraw.Shot shot;
  private final EffectiveLadder[] ladders;
  private final Propagation propagation;
  private final MatrixExponential exponential;
  private final ComplexMatrix[] propagators; // by kind of segment
  private final double[] hRe;
  private final double[] hIm;
  private double[] re;
  private double[] im;
  private double[] nextRe;
  private double[] nextIm;
  private final double[] termRe;
  private final double[] termIm;
  private final double[][] kicks; // rad, by laser and boundary
  private final double[][] intensity; // relative change, by beam and segment
  private final double[] work;
  private final ToneTrace[] frequencyTraces;
  private final ToneTrace[] intensityTraces;

  ShotPropagator(ShotShape shape, ShotDraw draw) {
    int p = shape.size();
    int segments = shape.timeline().segments();
    int steps = shape.steps();
    this.shape = shape;
    this.draw = draw;
    this.shot = new ShotDraw.Shot(steps);
    this.ladders = shape.plans().stream().map(EffectiveLadder::new).toArray(EffectiveLadder[]::new);
    this.propagation = new Propagation(p);
    this.exponential = MatrixExponential.ofSize(p);
    this.propagators = new ComplexMatrix[shape.kinds()];
    for (int i = 0; i < propagators.length; i++) {
      propagators[i] = ComplexMatrix.zeros(p, p);
    }
    this.hRe = new double[p * p];
    this.hIm = new double[p * p];
    this.re = new double[p];
    this.im = new double[p];
    this.nextRe = new double[p];
    this.nextIm = new double[p];
    this.termRe = new double[p];
    this.termIm = new double[p];
    this.kicks = new double[steps][segments + 1];
    this.intensity = new double[steps][segments];
    this.work = new double[segments];
    this.frequencyTraces = traces(shape.frequencyTones());
    this.intensityTraces = traces(shape.intensityTones());
  }

  private ToneTrace[] traces(List<NoiseTones> tones) {
    ToneTrace[] traces = new ToneTrace[tones.size()];
    for (int k = 0; k < traces.length; k++) {
      traces[k] = tones.get(k) == null ? null : new ToneTrace(tones.get(k), shape.seconds());
    }
    return traces;
  }

  double error(SplittableRandom random) {
    draw.draw(random, shot);
    EffectiveLadder ladder = ladders[shot.variant];
    ladder.load(shot.setting);
    for (int kind = 0; kind < propagators.length; kind++) {
      ladder.segment(shape.kindSegment(kind), hRe, hIm);
      Propagation.propagator(
          exponential,
          shape.size(),
          hRe,
          hIm,
          shape.kindSeconds(kind) * shot.lengthFactor,
          propagators[kind]);
    }
    if (shape.hasPhaseNoise()) {
      drawKicks(random);
    }
    if (shape.hasIntensityTrace()) {
      drawIntensities(random);
    }
    shape.begin(re, im);
    int segments = shape.timeline().segments();
    for (int m = 0; m < segments; m++) {
      if (shape.hasPhaseNoise()) {
        kick(m);
      }
      double seconds = shape.timeline().seconds(m) * shot.lengthFactor;
      if (shape.hasIntensityTrace()) {
        intensityKick(m, 0.5 * seconds);
      }
      int kind = shape.kind(m);
      if (kind >= 0) {
        propagators[kind].multiply(re, im, nextRe, nextIm);
        swap();
      } else {
        ladder.segment(m, hRe, hIm);
        propagation.advance(hRe, hIm, seconds, re, im);
      }
      if (shape.hasIntensityTrace()) {
        intensityKick(m, 0.5 * seconds);
      }
    }
    if (shape.hasPhaseNoise()) {
      kick(segments);
    }
    return shape.outcomes().error(re, im);
  }

  private void swap() {
    double[] r = re;
    double[] i = im;
    re = nextRe;
    im = nextIm;
    nextRe = r;
    nextIm = i;
  }

  private void drawKicks(SplittableRandom random) {
    double[] seconds = shape.seconds();
    int segments = seconds.length;
    for (int k = 0; k < kicks.length; k++) {
      double width = shape.linewidthHertz(k);
      for (int b = 0; b <= segments; b++) {
        if (width == 0) {
          kicks[k][b] = 0;
          continue;
        }
        double before = b == 0 ? 0 : seconds[b - 1];
        double after = b == segments ? 0 : seconds[b];
        // a random walk of variance 2πΔν per second
        kicks[k][b] = Math.sqrt(Math.PI * width * (before + after)) * random.nextGaussian();
      }
      if (frequencyTraces[k] != null) {
        frequencyTraces[k].drawPhaseKicks(random, work, kicks[k]);
      }
    }
  }

  private void drawIntensities(SplittableRandom random) {
    double[] middles = shape.middles();
    for (int k = 0; k < intensity.length; k++) {
      if (intensityTraces[k] != null) {
        intensityTraces[k].drawMeans(random, intensity[k]);
      } else {
        Arrays.fill(intensity[k], 0);
      }
      if (draw.moves()) {
        for (int m = 0; m < middles.length; m++) {
          double change = draw.relativeIntensityChange(k, shot, middles[m]);
          intensity[k][m] = (1 + intensity[k][m]) * (1 + change) - 1;
        }
      }
    }
  }

  private void kick(int boundary) {
    double phase = 0;
    for (int rung = 1; rung <= kicks.length; rung++) {
      phase += kicks[rung - 1][boundary];
      int[] states = shape.onRung(rung);
      if (phase == 0 || states.length == 0) {
        continue;
      }
      double cos = Math.cos(phase);
      double sin = Math.sin(phase);
      for (int i : states) {
        double r = re[i];
        re[i] = r * cos - im[i] * sin;
        im[i] = r * sin + im[i] * cos;
      }
    }
  }

  /** exp(−2πi Σ δI O t) on the state, by its series. */
  private void intensityKick(int segment, double seconds) {
    int p = re.length;
    System.arraycopy(re, 0, termRe, 0, p);
    System.arraycopy(im, 0, termIm, 0, p);
    for (int order = 1; order <= MOST_TERMS; order++) {
      Arrays.fill(nextRe, 0);
      Arrays.fill(nextIm, 0);
      for (int k = 0; k < intensity.length; k++) {
        double factor = 2 * Math.PI * seconds * intensity[k][segment] / order;
        if (factor == 0) {
          continue;
        }
        double[] oRe = shape.operatorRe(k, segment);
        double[] oIm = shape.operatorIm(k, segment);
        for (int i = 0; i < p; i++) {
          double sumRe = 0;
          double sumIm = 0;
          int row = i * p;
          for (int j = 0; j < p; j++) {
            sumRe += oRe[row + j] * termRe[j] - oIm[row + j] * termIm[j];
            sumIm += oRe[row + j] * termIm[j] + oIm[row + j] * termRe[j];
          }
          nextRe[i] += factor * sumIm;
          nextIm[i] -= factor * sumRe;
        }
      }
      double square = 0;
      for (int i = 0; i < p; i++) {
        termRe[i] = nextRe[i];
        termIm[i] = nextIm[i];
        re[i] += nextRe[i];
        im[i] += nextIm[i];
        square += nextRe[i] * nextRe[i] + nextIm[i] * nextIm[i];
      }
      if (square < 1e-24) {
        return;
      }
    }
  }
}
