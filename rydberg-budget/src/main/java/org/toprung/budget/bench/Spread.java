package org.toprung.budget.bench;

import java.util.function.DoubleUnaryOperator;
import java.util.random.RandomGenerator;
import org.apache.commons.math4.legacy.analysis.integration.gauss.GaussIntegrator;
import org.apache.commons.math4.legacy.analysis.integration.gauss.GaussIntegratorFactory;

/**
 * How a number differs from its calibrated value from shot to shot: a Gaussian of given root mean
 * square about zero, or samples that are equally likely, for what has tails.
 *
 * <p>Immutable and thread-safe.
 */
public final class Spread {
  private static final int ORDER = 21;
  private static final double STEEP = 0.05;
  private static final double SETTLED = 1e-4; // of the difference between largest and smallest
  private static final double FARTHEST = 8; // standard deviations
  private static final int MOST_POINTS = 1 << 13;
  private static final double[] POINTS = new double[ORDER];
  private static final double[] WEIGHTS = new double[ORDER];

  static {
    GaussIntegrator rule = new GaussIntegratorFactory().hermite(ORDER);
    for (int i = 0; i < ORDER; i++) {
      // the rule has weight exp(−x²), the normal distribution exp(−x²/2)/√2π
      POINTS[i] = Math.sqrt(2) * rule.getPoint(i);
      WEIGHTS[i] = rule.getWeight(i) / Math.sqrt(Math.PI);
    }
  }

  private final double rms;
  private final double[] samples; // null for a Gaussian

  private Spread(double rms, double[] samples) {
    this.rms = rms;
    this.samples = samples;
  }

  /**
   * A Gaussian about zero.
   *
   * @param rms root mean square; its sign is the sign of what is drawn
   * @return the spread
   * @throws IllegalArgumentException if the value is not finite
   */
  public static Spread gaussian(double rms) {
    if (!(Math.abs(rms) < Double.POSITIVE_INFINITY)) {
      throw new IllegalArgumentException("root mean square " + rms + " must be finite");
    }
    return new Spread(rms, null);
  }

  /**
   * Samples.
   *
   * @param values deviations from the calibrated value, equally likely, at least one; copied
   * @return the spread
   * @throws IllegalArgumentException if there is none or one is not finite
   */
  public static Spread of(double... values) {
    if (values.length == 0) {
      throw new IllegalArgumentException("samples: given none; allowed: at least one");
    }
    double largest = 0;
    for (double value : values) {
      if (!(Math.abs(value) < Double.POSITIVE_INFINITY)) {
        throw new IllegalArgumentException("sample " + value + " must be finite");
      }
      largest = Math.max(largest, Math.abs(value));
    }
    double square = 0; // over that of the largest, so that nothing overflows
    for (double value : values) {
      double part = largest > 0 ? value / largest : 0;
      square += part * part / values.length;
    }
    return new Spread(largest * Math.sqrt(square), values.clone());
  }

  /**
   * Root mean square about the calibrated value.
   *
   * @return the root mean square, at least 0
   */
  public double rms() {
    return Math.abs(rms);
  }

  /**
   * Whether this is a Gaussian.
   *
   * @return false for samples
   */
  public boolean isGaussian() {
    return samples == null;
  }

  /**
   * The samples.
   *
   * @return a copy; empty for a Gaussian
   */
  public double[] samples() {
    return samples == null ? new double[0] : samples.clone();
  }

  /**
   * The same spread in other units or of another size.
   *
   * @param factor what every deviation is multiplied by
   * @return the spread
   * @throws IllegalArgumentException if the result is not finite
   */
  public Spread scaled(double factor) {
    if (samples == null) {
      return gaussian(factor * rms);
    }
    double[] multiplied = samples.clone();
    for (int i = 0; i < multiplied.length; i++) {
      multiplied[i] *= factor;
    }
    return of(multiplied);
  }

  /**
   * Mean of an error over the deviation: 21 points of Gauss and Hermite, exact for polynomials to
   * degree 41, or all samples. Where the points differ by more than {@value #STEEP}, a line may be
   * narrower than their distance: then the trapezoidal rule, which converges faster than any power
   * for a smooth function (Trefethen and Weideman, SIAM Rev. 56, 385 (2014)), is refined until it
   * has settled to {@value #SETTLED} of that difference, and takes over unless it confirms the 21
   * points.
   *
   * @param f the error, a probability
   * @return its mean
   */
  public double average(DoubleUnaryOperator f) {
    double sum = 0;
    if (samples == null) {
      double least = Double.POSITIVE_INFINITY;
      double most = Double.NEGATIVE_INFINITY;
      for (int i = 0; i < ORDER; i++) {
        double value = f.applyAsDouble(rms * POINTS[i]);
        least = Math.min(least, value);
        most = Math.max(most, value);
        sum += WEIGHTS[i] * value;
      }
      return most - least > STEEP ? refined(f, sum, SETTLED * (most - least)) : sum;
    }
    for (double sample : samples) {
      sum += f.applyAsDouble(sample);
    }
    return sum / samples.length;
  }

  private double refined(DoubleUnaryOperator f, double coarse, double tolerance) {
    int points = 32;
    double[] sums = new double[2]; // of weights, of weighted values
    for (int i = 0; i <= points; i++) {
      add(f, FARTHEST * (2.0 * i / points - 1), sums);
    }
    double last = sums[1] / sums[0];
    int quiet = Math.abs(last - coarse) <= tolerance ? 1 : 0;
    boolean same = quiet == 1;
    while (points < MOST_POINTS) {
      for (int i = 0; i < points; i++) {
        add(f, FARTHEST * ((2.0 * i + 1) / points - 1), sums);
      }
      points *= 2;
      double mean = sums[1] / sums[0];
      // twice, since a line between the points is not seen
      quiet = Math.abs(mean - last) <= tolerance ? quiet + 1 : 0;
      same &= quiet > 0;
      last = mean;
      if (quiet == 2) {
        break;
      }
    }
    return same ? coarse : last;
  }

  private void add(DoubleUnaryOperator f, double x, double[] sums) {
    double weight = Math.exp(-0.5 * x * x);
    sums[0] += weight;
    sums[1] += weight * f.applyAsDouble(rms * x);
  }

  /**
   * Draws a deviation.
   *
   * @param random source of random numbers
   * @return a deviation
   */
  public double draw(RandomGenerator random) {
    return samples == null ? rms * random.nextGaussian() : samples[random.nextInt(samples.length)];
  }

  @Override
  public String toString() {
    return samples == null
        ? "Gaussian of rms " + rms()
        : samples.length + " samples of rms " + rms();
  }
}
