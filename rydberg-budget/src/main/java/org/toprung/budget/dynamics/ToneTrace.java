package org.toprung.budget.dynamics;

import java.util.Arrays;
import java.util.random.RandomGenerator;

/**
 * Traces of tones over the segments of a pulse: means over each segment, by rotating a complex
 * number from segment to segment, with the factor sin(x)/x that the mean over a segment leaves of a
 * tone. One instance per thread.
 */
final class ToneTrace {
  private final NoiseTones tones;
  private final double[] seconds;
  private final double[] hertz;
  private final double[] cosine;
  private final double[] sine;
  private final double total;

  /**
   * A workspace.
   *
   * @param tones what to draw
   * @param seconds lengths of the segments
   */
  ToneTrace(NoiseTones tones, double[] seconds) {
    this.tones = tones;
    this.seconds = seconds;
    this.hertz = new double[tones.count()];
    this.cosine = new double[tones.count()];
    this.sine = new double[tones.count()];
    this.total = Arrays.stream(seconds).sum();
  }

  /** Draws a trace and writes its mean over every segment. */
  void drawMeans(RandomGenerator random, double[] means) {
    tones.draw(random, hertz, cosine, sine);
    Arrays.fill(means, 0);
    for (int i = 0; i < hertz.length; i++) {
      if (cosine[i] != 0 || sine[i] != 0) {
        add(2 * Math.PI * hertz[i], cosine[i], sine[i], means);
      }
    }
  }

  /**
   * Draws a frequency trace and adds, for every boundary between segments and both ends, the step
   * of the mean phase.
   *
   * @param random source
   * @param work length segments
   * @param kicks length segments + 1, rad; added to
   */
  void drawPhaseKicks(RandomGenerator random, double[] work, double[] kicks) {
    tones.draw(random, hertz, cosine, sine);
    Arrays.fill(work, 0);
    double end = 0;
    for (int i = 0; i < hertz.length; i++) {
      if (cosine[i] == 0 && sine[i] == 0) {
        continue;
      }
      // the integral of 2π(a cos + b sin) is (a sin − b cos + b)/f
      double f = hertz[i];
      add(2 * Math.PI * f, -sine[i] / f, cosine[i] / f, work);
      double angle = 2 * Math.PI * f * total;
      double half = Math.sin(0.5 * angle);
      end += (cosine[i] * Math.sin(angle) + 2 * sine[i] * half * half) / f;
      for (int m = 0; m < work.length; m++) {
        work[m] += sine[i] / f;
      }
    }
    kicks[0] += work[0];
    for (int m = 1; m < work.length; m++) {
      kicks[m] += work[m] - work[m - 1];
    }
    kicks[work.length] += end - work[work.length - 1];
  }

  /** Adds the means of a cos ωt + b sin ωt. */
  private void add(double omega, double a, double b, double[] means) {
    double h = Double.NaN;
    double stepCos = 1;
    double stepSin = 0;
    double reduction = 1;
    double cos = 1; // at the beginning of the segment
    double sin = 0;
    double halfCos = 1;
    double halfSin = 0;
    for (int m = 0; m < means.length; m++) {
      if (seconds[m] != h) {
        h = seconds[m];
        double half = 0.5 * omega * h;
        halfCos = Math.cos(half);
        halfSin = Math.sin(half);
        stepCos = halfCos * halfCos - halfSin * halfSin;
        stepSin = 2 * halfSin * halfCos;
        reduction = half < 1e-4 ? 1 - half * half / 6 : halfSin / half;
      }
      double middleCos = cos * halfCos - sin * halfSin;
      double middleSin = sin * halfCos + cos * halfSin;
      means[m] += reduction * (a * middleCos + b * middleSin);
      double next = cos * stepCos - sin * stepSin;
      sin = sin * stepCos + cos * stepSin;
      cos = next;
    }
  }
}
