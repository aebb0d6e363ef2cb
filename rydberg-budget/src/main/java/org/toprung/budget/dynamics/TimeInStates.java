package org.toprung.budget.dynamics;

import org.toprung.core.linear.ComplexMatrix;
import org.toprung.core.linear.MatrixExponential;

/**
 * Time-integrated populations of a pulse without noise: Simpson's rule on substeps in which no
 * phase turns by more than {@value #TURN} rad, good to about 1e-5 relative.
 */
final class TimeInStates {
  private static final double TURN = 0.5;
  private static final int MOST_STEPS = 5_000_000;

  private final DrivenSystem system;
  private final double[] seconds;
  private final double[] populations;
  private double[] re;
  private double[] im;
  private double[] nextRe;
  private double[] nextIm;

  private TimeInStates(DrivenSystem system) {
    int p = system.size();
    this.system = system;
    this.seconds = new double[system.labels().size()];
    this.populations = new double[seconds.length];
    this.re = new double[p];
    this.im = new double[p];
    this.nextRe = new double[p];
    this.nextIm = new double[p];
    system.begin(re, im);
  }

  /** Seconds spent in every labelled state. */
  static double[] of(DrivenSystem system) {
    TimeInStates time = new TimeInStates(system);
    int p = system.size();
    double[] hRe = new double[p * p];
    double[] hIm = new double[p * p];
    MatrixExponential exponential = MatrixExponential.ofSize(p);
    ComplexMatrix halfStep = ComplexMatrix.zeros(p, p);
    for (int m = 0; m < system.segments(); m++) {
      system.hamiltonianHertz(m, hRe, hIm);
      double length = system.segmentSeconds(m);
      double spread = spread(hRe, hIm, p);
      double wanted = Math.ceil(2 * Math.PI * spread * length / TURN);
      if (!(wanted <= MOST_STEPS)) {
        throw new ArithmeticException(
            "states that take part lie "
                + spread
                + " Hz apart, which turns too often in "
                + length
                + " s to be followed: more than "
                + MOST_STEPS
                + " steps (light on a resonance, or much too strong?)");
      }
      int steps = (int) Math.max(1, wanted);
      double step = length / steps;
      Propagation.propagator(exponential, p, hRe, hIm, 0.5 * step, halfStep);
      time.segment(m, steps, step, halfStep);
    }
    return time.seconds;
  }

  private void segment(int segment, int steps, double step, ComplexMatrix halfStep) {
    add(segment, step / 6);
    for (int s = 0; s < steps; s++) {
      advance(halfStep);
      add(segment, 4 * step / 6);
      advance(halfStep);
      add(segment, (s == steps - 1 ? 1 : 2) * step / 6);
    }
  }

  private void advance(ComplexMatrix propagator) {
    propagator.multiply(re, im, nextRe, nextIm);
    double[] r = re;
    double[] i = im;
    re = nextRe;
    im = nextIm;
    nextRe = r;
    nextIm = i;
  }

  private void add(int segment, double weight) {
    system.populations(segment, re, im, populations);
    for (int s = 0; s < seconds.length; s++) {
      seconds[s] += weight * populations[s];
    }
  }

  /** Bound on the difference of eigenvalues, Hz. */
  private static double spread(double[] re, double[] im, int p) {
    double low = Double.POSITIVE_INFINITY;
    double high = Double.NEGATIVE_INFINITY;
    for (int i = 0; i < p; i++) {
      double off = 0;
      for (int j = 0; j < p; j++) {
        off += i == j ? 0 : Math.hypot(re[i * p + j], im[i * p + j]);
      }
      low = Math.min(low, re[i * p + i] - off);
      high = Math.max(high, re[i * p + i] + off);
    }
    return high - low;
  }
}
