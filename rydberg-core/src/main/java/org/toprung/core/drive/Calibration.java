package org.toprung.core.drive;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import org.toprung.core.quantity.Frequency;

/**
 * Measurements that tell how much light is really at the atom.
 *
 * <pre>{@code
 * CalibrationResult found = kernel.calibration()
 *     .rabi(megahertz(1.71), kilohertz(8))
 *     .differentialLightShift(megahertz(-0.42), kilohertz(15))
 *     .solve();
 * DriveKernel corrected = found.kernel();
 * }</pre>
 *
 * <p>Unknown are the ratios r<sub>k</sub> of actual to expected intensity, one for each beam. The
 * model is {@link DriveKernel}: Ω = Ω0 √(Π r<sub>k</sub>), a light shift Σ
 * r<sub>k</sub>S<sub>k</sub>, or r<sub>k</sub>S<sub>k</sub> with one beam alone. The ratios are
 * those of least squares of (model − measured)/uncertainty, found by Gauss-Newton steps in ln r
 * with backtracking, from the expected intensities; where several ratios fit equally well (a
 * product and a sum do not always fix two numbers), these are the ones nearest to what was
 * expected. Reference: Nocedal and Wright, Numerical Optimization (2006), section 10.3.
 *
 * <p>Immutable: every method gives a copy.
 */
public final class Calibration {
  private static final int ITERATIONS = 200;
  private static final double FARTHEST = 7; // of ln r: a thousand times off is no calibration
  private static final double CONVERGED = 1e-12; // of ln r
  private static final double INDEPENDENT = 1e-10; // least 1 − cos² between sensitivities

  private enum Kind {
    RABI("Rabi frequency"),
    START("start light shift"),
    TARGET("target light shift"),
    DIFFERENTIAL("differential light shift");

    private final String text;

    Kind(String text) {
      this.text = text;
    }
  }

  /** One measured number; step −1 for all beams together. */
  private record Measurement(Kind kind, int step, double hertz, double uncertaintyHertz) {
    @Override
    public String toString() {
      return kind.text + (step < 0 ? "" : " of beam " + (step + 1) + " alone");
    }
  }

  private final DriveKernel kernel;
  private final double[] watts;
  private final double detuning; // Hz
  private final List<Measurement> measurements;

  private Calibration(
      DriveKernel kernel, double[] watts, double detuning, List<Measurement> measurements) {
    this.kernel = kernel;
    this.watts = watts;
    this.detuning = detuning;
    this.measurements = measurements;
  }

  static Calibration of(DriveKernel kernel) {
    double[] watts = new double[kernel.steps()];
    for (int k = 0; k < watts.length; k++) {
      watts[k] = kernel.powerWatts(k);
    }
    return new Calibration(kernel, watts, kernel.detuningHertz(), List.of());
  }

  /**
   * Says where the measurements were made, if not at the nominal powers and detuning.
   *
   * @param detuningHertz detuning of the first step, Hz; 0 for a single step
   * @param powerWatts power of each beam, W, positive
   * @return a copy
   * @throws IllegalArgumentException if the kernel cannot be evaluated there
   */
  public Calibration at(double detuningHertz, double... powerWatts) {
    double[] ones = new double[powerWatts.length];
    Arrays.fill(ones, 1);
    kernel.evaluate(powerWatts, detuningHertz, ones, kernel.newResult());
    return new Calibration(kernel, powerWatts.clone(), detuningHertz, measurements);
  }

  /**
   * Adds a measured effective Rabi frequency over 2π.
   *
   * @param measured the value, positive
   * @param uncertainty one standard deviation, positive
   * @return a copy with this measurement
   * @throws IllegalArgumentException if value or uncertainty is not positive
   */
  public Calibration rabi(Frequency measured, Frequency uncertainty) {
    if (!(measured.hertz() > 0)) {
      throw new IllegalArgumentException("Rabi frequency " + measured + " must be positive");
    }
    return with(Kind.RABI, -1, measured, uncertainty);
  }

  /**
   * Adds a measured light shift of the start by all beams.
   *
   * @param measured the move of its energy over h, positive upwards
   * @param uncertainty one standard deviation, positive
   * @return a copy with this measurement
   * @throws IllegalArgumentException if the uncertainty is not positive
   */
  public Calibration startLightShift(Frequency measured, Frequency uncertainty) {
    return with(Kind.START, -1, measured, uncertainty);
  }

  /**
   * Adds a measured light shift of the start by one beam alone.
   *
   * @param step index of the step, from 0
   * @param measured the move of its energy over h, positive upwards
   * @param uncertainty one standard deviation, positive
   * @return a copy with this measurement
   * @throws IllegalArgumentException if the uncertainty is not positive or there is no such step
   */
  public Calibration startLightShift(int step, Frequency measured, Frequency uncertainty) {
    return with(Kind.START, requireStep(step), measured, uncertainty);
  }

  /**
   * Adds a measured light shift of the target by all beams.
   *
   * @param measured the move of its energy over h, positive upwards
   * @param uncertainty one standard deviation, positive
   * @return a copy with this measurement
   * @throws IllegalArgumentException if the uncertainty is not positive
   */
  public Calibration targetLightShift(Frequency measured, Frequency uncertainty) {
    return with(Kind.TARGET, -1, measured, uncertainty);
  }

  /**
   * Adds a measured differential light shift, target minus start, by all beams: the move of the
   * resonance, which is also the frequency offset that was found to be right.
   *
   * @param measured the shift, positive where the resonance moves up
   * @param uncertainty one standard deviation, positive
   * @return a copy with this measurement
   * @throws IllegalArgumentException if the uncertainty is not positive
   */
  public Calibration differentialLightShift(Frequency measured, Frequency uncertainty) {
    return with(Kind.DIFFERENTIAL, -1, measured, uncertainty);
  }

  private int requireStep(int step) {
    if (!(step >= 0 && step < watts.length)) {
      throw new IllegalArgumentException(
          "step " + step + " must be from 0 to " + (watts.length - 1));
    }
    return step;
  }

  private Calibration with(Kind kind, int step, Frequency measured, Frequency uncertainty) {
    if (!(uncertainty.hertz() > 0)) {
      throw new IllegalArgumentException(
          "uncertainty " + uncertainty + " of a measured " + kind.text + " must be positive");
    }
    List<Measurement> more = new ArrayList<>(measurements);
    more.add(new Measurement(kind, step, measured.hertz(), uncertainty.hertz()));
    return new Calibration(kernel, watts, detuning, List.copyOf(more));
  }

  /**
   * Finds the intensities that fit best.
   *
   * @return intensity ratios with their uncertainties, and a corrected kernel
   * @throws IllegalArgumentException if the measurements do not fix the intensity of every beam;
   *     the message says what is missing
   * @throws ArithmeticException if no intensities within a factor of a thousand fit; the message
   *     gives the number of iterations
   */
  public CalibrationResult solve() {
    if (measurements.size() < watts.length) {
      throw new IllegalArgumentException(
          watts.length
              + " intensities need at least as many measurements, given "
              + measurements
              + "; missing: "
              + missing());
    }
    Model model = new Model(kernel, watts, detuning);
    double[] u = new double[watts.length];
    undetermined(normal(model, u))
        .ifPresent(
            why -> {
              throw new IllegalArgumentException(
                  why + ", given " + measurements + "; missing: " + missing());
            });
    double misfit = misfit(model, u);
    for (int iteration = 0; iteration < ITERATIONS; iteration++) {
      double[][] normal = normal(model, u);
      if (undetermined(normal).isPresent() || !(largest(u) < FARTHEST)) {
        throw noFit(iteration, misfit);
      }
      double[] step = times(inverse(normal), gradient(model, u));
      double length = largest(step);
      double damping = Math.min(1, 1 / length);
      double[] next = moved(u, step, damping);
      double nextMisfit = misfit(model, next);
      while (nextMisfit > misfit && damping * length > CONVERGED) {
        damping /= 2;
        next = moved(u, step, damping);
        nextMisfit = misfit(model, next);
      }
      if (!(damping * length > CONVERGED)) {
        return result(model, u, misfit);
      }
      u = next;
      misfit = nextMisfit;
    }
    throw noFit(ITERATIONS, misfit);
  }

  private static double largest(double[] u) {
    return Arrays.stream(u).map(Math::abs).max().orElseThrow();
  }

  private ArithmeticException noFit(int iterations, double misfit) {
    return new ArithmeticException(
        String.format(
            Locale.ROOT,
            "no intensities were found to fit %s within %d iterations: misfit %.3g",
            measurements,
            iterations,
            misfit));
  }

  private String missing() {
    boolean rabi = measurements.stream().anyMatch(m -> m.kind == Kind.RABI);
    return rabi
        ? "a light shift, since a Rabi frequency alone gives the product of the intensities"
        : "a Rabi frequency, or another light shift";
  }

  private static double[] moved(double[] u, double[] step, double factor) {
    double[] moved = u.clone();
    for (int k = 0; k < u.length; k++) {
      moved[k] += factor * step[k];
    }
    return moved;
  }

  private double misfit(Model model, double[] u) {
    double sum = 0;
    for (Measurement m : measurements) {
      double off = (model.value(m, u) - m.hertz) / m.uncertaintyHertz;
      sum += off * off;
    }
    return sum;
  }

  private double[] gradient(Model model, double[] u) {
    double[] gradient = new double[u.length];
    for (Measurement m : measurements) {
      double off = (m.hertz - model.value(m, u)) / m.uncertaintyHertz;
      double[] slope = model.slope(m, u);
      for (int k = 0; k < u.length; k++) {
        gradient[k] += off * slope[k] / m.uncertaintyHertz;
      }
    }
    return gradient;
  }

  /** JᵀJ of the weighted measurements over ln r. */
  private double[][] normal(Model model, double[] u) {
    int n = u.length;
    double[][] normal = new double[n][n];
    for (Measurement m : measurements) {
      double[] slope = model.slope(m, u);
      double weight = 1 / (m.uncertaintyHertz * m.uncertaintyHertz);
      for (int i = 0; i < n; i++) {
        for (int j = 0; j < n; j++) {
          normal[i][j] += weight * slope[i] * slope[j];
        }
      }
    }
    return normal;
  }

  /** Why a matrix has no inverse to speak of, if so. */
  private static Optional<String> undetermined(double[][] normal) {
    for (int k = 0; k < normal.length; k++) {
      if (!(normal[k][k] > 0)) {
        return Optional.of("nothing that was measured depends on the intensity of beam " + (k + 1));
      }
    }
    if (normal.length == 2 && !(determinant(normal) > INDEPENDENT * normal[0][0] * normal[1][1])) {
      return Optional.of("the measurements fix one combination of the two intensities only");
    }
    return Optional.empty();
  }

  private static double determinant(double[][] a) {
    return a[0][0] * a[1][1] - a[0][1] * a[1][0];
  }

  /** Inverse of a matrix of one or two rows: the covariance of ln r. */
  private static double[][] inverse(double[][] a) {
    if (a.length == 1) {
      return new double[][] {{1 / a[0][0]}};
    }
    double d = determinant(a);
    return new double[][] {{a[1][1] / d, -a[0][1] / d}, {-a[1][0] / d, a[0][0] / d}};
  }

  private static double[] times(double[][] a, double[] v) {
    double[] product = new double[v.length];
    for (int i = 0; i < v.length; i++) {
      for (int j = 0; j < v.length; j++) {
        product[i] += a[i][j] * v[j];
      }
    }
    return product;
  }

  private CalibrationResult result(Model model, double[] u, double misfit) {
    int n = u.length;
    double[][] covariance = inverse(normal(model, u));
    double[] elements = new double[n]; // variance of ln r
    for (int p = 0; p < model.parameters(); p++) {
      double[] gradient = new double[n];
      for (Measurement m : measurements) {
        double[] slope = model.slope(m, u);
        double change = model.elementSlope(m, u, p) * model.elementUncertainty(p);
        for (int k = 0; k < n; k++) {
          gradient[k] += slope[k] * change / (m.uncertaintyHertz * m.uncertaintyHertz);
        }
      }
      double[] moved = times(covariance, gradient);
      for (int k = 0; k < n; k++) {
        elements[k] += moved[k] * moved[k];
      }
    }
    double[] ratio = new double[n];
    List<CalibrationResult.Intensity> intensities = new ArrayList<>();
    for (int k = 0; k < n; k++) {
      ratio[k] = Math.exp(u[k]);
      intensities.add(
          new CalibrationResult.Intensity(
              ratio[k], ratio[k] * Math.sqrt(covariance[k][k]), ratio[k] * Math.sqrt(elements[k])));
    }
    return new CalibrationResult(
        intensities, misfit, measurements.size() - n, kernel.withIntensitiesScaled(ratio));
  }

  /** The kernel at the point of the measurements, as a function of the logarithms of the ratios. */
  private static final class Model {
    private static final double STEP = 1e-4; // of ln r; derivatives are good to its square
    private static final double DARK = 1e-12; // power of a beam that is off

    private final DriveKernel kernel;
    private final double[] watts;
    private final double detuning; // Hz
    private final double[] ones;
    private final KernelResult result;

    Model(DriveKernel kernel, double[] watts, double detuning) {
      this.kernel = kernel;
      this.watts = watts;
      this.detuning = detuning;
      this.ones = new double[watts.length];
      Arrays.fill(ones, 1);
      this.result = kernel.newResult();
    }

    private double[] powers(Measurement m, double[] u) {
      double[] powers = new double[watts.length];
      for (int k = 0; k < powers.length; k++) {
        powers[k] = watts[k] * (m.step < 0 || m.step == k ? Math.exp(u[k]) : DARK);
      }
      return powers;
    }

    double value(Measurement m, double[] u) {
      kernel.evaluate(powers(m, u), detuning, ones, result);
      return switch (m.kind) {
        case RABI -> result.rabiHertz();
        case START -> result.startLightShiftHertz();
        case TARGET -> result.targetLightShiftHertz();
        case DIFFERENTIAL -> result.targetLightShiftHertz() - result.startLightShiftHertz();
      };
    }

    /** Derivative with ln r. */
    double[] slope(Measurement m, double[] u) {
      double[] slope = new double[watts.length];
      for (int k = 0; k < slope.length; k++) {
        if (m.step < 0 || m.step == k) {
          double[] moved = u.clone();
          moved[k] = u[k] + STEP;
          double above = value(m, moved);
          moved[k] = u[k] - STEP;
          slope[k] = (above - value(m, moved)) / (2 * STEP);
        }
      }
      return slope;
    }

    int parameters() {
      return watts.length + 1;
    }

    /** Relative uncertainty: elements by step, then the far shifts. */
    double elementUncertainty(int parameter) {
      return parameter < watts.length
          ? kernel.data().steps().get(parameter).relativeUncertainty()
          : kernel.data().farShiftRelativeUncertainty();
    }

    /** Derivative with the logarithm of the element of a step, or of all far shifts. */
    double elementSlope(Measurement m, double[] u, int parameter) {
      if (m.kind == Kind.RABI) {
        return parameter < watts.length ? value(m, u) : 0;
      }
      double[] powers = powers(m, u);
      kernel.evaluate(powers, detuning, ones, result);
      double sum = 0;
      for (int k = 0; k < watts.length; k++) {
        double startFar = kernel.startFarShiftHertz(k, powers[k], detuning);
        double targetFar = kernel.targetFarShiftHertz(k, powers[k], detuning);
        double far = pick(m.kind, startFar, targetFar);
        double all = pick(m.kind, result.startLightShiftHertz(k), result.targetLightShiftHertz(k));
        if (parameter == watts.length) {
          sum += far;
        } else if (parameter == k) {
          sum += 2 * (all - far);
        }
      }
      return sum;
    }

    private static double pick(Kind kind, double start, double target) {
      return switch (kind) {
        case START -> start;
        case TARGET -> target;
        case DIFFERENTIAL -> target - start;
        case RABI -> throw new IllegalStateException("a Rabi frequency is no shift");
      };
    }
  }
}
