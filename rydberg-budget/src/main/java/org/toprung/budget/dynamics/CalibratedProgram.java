package org.toprung.budget.dynamics;

import java.util.Arrays;
import java.util.function.DoubleUnaryOperator;
import java.util.function.Function;
import org.toprung.budget.pulse.FrequencyReference;
import org.toprung.budget.pulse.Pulse;
import org.toprung.budget.pulse.PulseProgram;
import org.toprung.core.drive.Elimination;
import org.toprung.core.drive.Ladder;
import org.toprung.core.drive.LadderResonance;
import org.toprung.core.drive.PulsePlanner;
import org.toprung.core.quantity.Frequency;

/**
 * What is played on a ladder by somebody who has calibrated the pulse there: its length, and the
 * frequency of the last laser.
 *
 * <p>The Rabi frequency Ω(a) of the dressed ladder is not the full one times the product of the
 * field factors a, because light shifts and dressing change with the fields. A pulse that is given
 * by its area gets the length at which 2π∫Ω(a(t))dt is the area that the two-level pulse has; one
 * factor on the Rabi frequency serves all its parts.
 *
 * <p>The last laser is at the resonance of the program's {@link FrequencyReference} plus the
 * program's detuning. Resonance, Rabi frequency and energy of the start depend analytically on the
 * squared field x² of the shaped beams; between full power and darkness they are interpolated
 * between {@value #NODES} Chebyshev nodes in x².
 *
 * <p>Immutable and thread-safe.
 */
public final class CalibratedProgram {
  private static final int NODES = 16;
  private static final int CALIBRATIONS = 12;
  private static final double SAME_AREA = 1e-12;
  private static final int GAUSS_PANELS = 24;
  // Abramowitz and Stegun, table 25.4, n = 4
  private static final double[] GAUSS_X = {0.339981043584856264803, 0.861136311594052575224};
  private static final double[] GAUSS_W = {0.652145154862546142627, 0.347854845137453857373};

  private final Ladder ladder;
  private final Pulse pulse;
  private final PulseProgram program;
  private final Curve curve;
  private final double bareOffset; // Hz
  private final double rabiFactor;

  private CalibratedProgram(Ladder ladder, Pulse pulse, double rabiFactor) {
    this.ladder = ladder;
    this.pulse = pulse;
    this.rabiFactor = rabiFactor;
    this.bareOffset = ladder.states().get(Elimination.of(ladder).strongestWanted()).energyHertz();
    Function<double[], LadderResonance> resonances = PulsePlanner.resonances(ladder);
    double[] ones = new double[ladder.steps()];
    Arrays.fill(ones, 1);
    LadderResonance full = resonances.apply(ones);
    double rabi = full.rabiHertz() * rabiFactor;
    PulseProgram planned = pulse.program(ladder.steps(), Frequency.ofHertz(rabi));
    this.curve = new Curve(resonances, full, planned);
    this.program = pulse.isTwoLevel() ? calibrated(planned, rabi, rabiFactor) : planned;
  }

  /**
   * Calibrates a pulse on a ladder at nominal fields.
   *
   * @param ladder the ladder
   * @param pulse the pulse
   * @return the program
   * @throws IllegalArgumentException if the ladder does not have the steps that the pulse needs, or
   *     its start and target do not couple
   */
  public static CalibratedProgram of(Ladder ladder, Pulse pulse) {
    return of(ladder, pulse, 1);
  }

  /**
   * Calibrates a pulse where the mean Rabi frequency of the shots is not the nominal one.
   *
   * @param ladder the ladder
   * @param pulse the pulse
   * @param rabiFactor mean Rabi frequency of the shots over the nominal one, positive
   * @return the program, longer by 1/rabiFactor where its length follows from its area
   * @throws IllegalArgumentException if the factor is not positive and finite, the ladder does not
   *     have the steps that the pulse needs, or its start and target do not couple
   */
  public static CalibratedProgram of(Ladder ladder, Pulse pulse, double rabiFactor) {
    if (!(rabiFactor > 0 && rabiFactor < Double.POSITIVE_INFINITY)) {
      throw new IllegalArgumentException(
          "factor " + rabiFactor + " on the Rabi frequency must be positive and finite");
    }
    return new CalibratedProgram(ladder, pulse, rabiFactor);
  }

  private PulseProgram calibrated(PulseProgram planned, double rabi, double rabiFactor) {
    PulseProgram faster = pulse.program(ladder.steps(), Frequency.ofHertz(rabi * 1.001));
    if (faster.seconds() == planned.seconds() || curve.isFullPower()) {
      return planned; // fixed length, or nothing but full power
    }
    double wanted = rabi * amplitudeSeconds(planned);
    double factor = 1;
    PulseProgram found = planned;
    for (int i = 0; i < CALIBRATIONS; i++) {
      double ratio = rabiFactor * rabiSeconds(found) / wanted;
      if (Math.abs(ratio - 1) < SAME_AREA) {
        break;
      }
      factor *= ratio;
      found = pulse.program(ladder.steps(), Frequency.ofHertz(rabi * factor));
    }
    return found;
  }

  private static double amplitudeSeconds(PulseProgram program) {
    return integral(program, program::amplitude);
  }

  private double rabiSeconds(PulseProgram program) {
    return integral(program, t -> curve.rabi(actual(program, t)));
  }

  private static double integral(PulseProgram program, DoubleUnaryOperator integrand) {
    double[] breaks = program.breaks();
    double sum = 0;
    for (int i = 0; i + 1 < breaks.length; i++) {
      double length = breaks[i + 1] - breaks[i];
      if (program.isConstant(i)) {
        sum += length * integrand.applyAsDouble(breaks[i] + 0.5 * length);
        continue;
      }
      double half = 0.5 * length / GAUSS_PANELS;
      for (int panel = 0; panel < GAUSS_PANELS; panel++) {
        double middle = breaks[i] + (2 * panel + 1) * half;
        for (int g = 0; g < GAUSS_X.length; g++) {
          sum +=
              half
                  * GAUSS_W[g]
                  * (integrand.applyAsDouble(middle - half * GAUSS_X[g])
                      + integrand.applyAsDouble(middle + half * GAUSS_X[g]));
        }
      }
    }
    return sum;
  }

  private static double[] actual(PulseProgram program, double t) {
    double[] fields = new double[program.steps()];
    for (int k = 0; k < fields.length; k++) {
      fields[k] = program.fieldFactor(k, t);
    }
    return fields;
  }

  /**
   * The ladder that the pulse was calibrated on.
   *
   * @return the ladder
   */
  public Ladder ladder() {
    return ladder;
  }

  /**
   * The pulse.
   *
   * @return the pulse
   */
  public Pulse pulse() {
    return pulse;
  }

  /**
   * What is played.
   *
   * @return the program with its calibrated length
   */
  public PulseProgram program() {
    return program;
  }

  /**
   * Effective Rabi frequency over 2π with every beam at its full nominal power.
   *
   * @return the Rabi frequency, Hz
   */
  public double rabiHertz() {
    return curve.full.rabiHertz();
  }

  /**
   * Mean effective Rabi frequency of the shots over 2π with every beam at full power.
   *
   * @return the Rabi frequency, Hz
   */
  public double meanRabiHertz() {
    return rabiFactor * curve.full.rabiHertz();
  }

  /**
   * Offset of the last laser on the light-shifted resonance at full power, counted from bare
   * N-photon resonance with the target as calculated.
   *
   * @return the offset, Hz
   */
  public double fullPowerOffsetHertz() {
    return curve.full.offsetHertz();
  }

  /**
   * Angle that the program turns by on this ladder, the dressing being taken into account.
   *
   * @return 2π∫Ω dt, rad
   */
  public double areaRadians() {
    return 2 * Math.PI * rabiSeconds(program);
  }

  /**
   * Phase that the light shift gives to the start during the program.
   *
   * @return 2π times the integral of the energy of the start over h, rad
   */
  double startPhaseRadians() {
    return 2 * Math.PI * integral(program, t -> curve.start(actual(program, t)));
  }

  /**
   * Frequency of the last laser: resonance of the reference plus programmed detuning.
   *
   * @param t time within the program and not on one of its breaks, s
   * @return the offset from bare N-photon resonance, Hz
   */
  public double laserOffsetHertz(double t) {
    double detuning = program.detuningHertz(t);
    switch (program.reference()) {
      case FULL_POWER:
        return detuning + curve.full.offsetHertz();
      case BARE:
        return detuning + bareOffset;
      default:
        double[] fields = new double[program.steps()];
        for (int k = 0; k < fields.length; k++) {
          fields[k] = program.programmedFieldFactor(k, t);
        }
        return detuning + curve.offset(fields);
    }
  }

  /** Resonance at any fields of the program; 0 where it does not follow them. */
  double resonanceHertz(double[] fields) {
    return program.reference() == FrequencyReference.FOLLOWING ? curve.offset(fields) : 0;
  }

  /** Resonance over the field of the shaped beams, the others being at full field. */
  private static final class Curve {
    private final LadderResonance full;
    private final boolean[] shaped;
    private final int shapedSteps;
    private final double[] node; // in x²
    private final double[] weight; // barycentric
    private final double[] offset; // Hz
    private final double[] rabi; // Hz, over x to the number of shaped steps
    private final double[] start; // Hz

    Curve(
        Function<double[], LadderResonance> resonances,
        LadderResonance full,
        PulseProgram program) {
      this.full = full;
      this.shaped = new boolean[program.steps()];
      double[] breaks = program.breaks();
      for (int i = 0; i + 1 < breaks.length; i++) {
        for (double x : new double[] {0.2, 0.5, 0.9}) {
          double t = breaks[i] + x * (breaks[i + 1] - breaks[i]);
          for (int k = 0; k < shaped.length; k++) {
            shaped[k] |= program.fieldFactor(k, t) != 1;
          }
        }
      }
      int count = 0;
      for (boolean s : shaped) {
        count += s ? 1 : 0;
      }
      this.shapedSteps = count;
      int nodes = count == 0 || program.reference() == FrequencyReference.BARE ? 0 : NODES;
      this.node = new double[nodes];
      this.weight = new double[nodes];
      this.offset = new double[nodes];
      this.rabi = new double[nodes];
      this.start = new double[nodes];
      for (int j = 0; j < nodes; j++) {
        double angle = Math.PI * (2 * j + 1) / (2.0 * nodes);
        node[j] = 0.5 + 0.5 * Math.cos(angle);
        weight[j] = (j % 2 == 0 ? 1 : -1) * Math.sin(angle);
        double x = Math.sqrt(node[j]);
        double[] fields = new double[shaped.length];
        for (int k = 0; k < fields.length; k++) {
          fields[k] = shaped[k] ? x : 1;
        }
        LadderResonance at = resonances.apply(fields);
        offset[j] = at.offsetHertz();
        rabi[j] = at.rabiHertz() / Math.pow(x, shapedSteps);
        start[j] = at.startHertz();
      }
    }

    boolean isFullPower() {
      return shapedSteps == 0;
    }

    private double field(double[] fields) {
      double x = 1;
      for (int k = 0; k < fields.length; k++) {
        if (shaped[k]) {
          x = fields[k];
        }
      }
      return x;
    }

    double offset(double[] fields) {
      double x = field(fields);
      return x == 1 ? full.offsetHertz() : at(offset, x * x);
    }

    double rabi(double[] fields) {
      double x = field(fields);
      return x == 1 ? full.rabiHertz() : Math.pow(x, shapedSteps) * at(rabi, x * x);
    }

    double start(double[] fields) {
      double x = field(fields);
      return x == 1 ? full.startHertz() : at(start, x * x);
    }

    private double at(double[] values, double u) {
      double above = 0;
      double below = 0;
      for (int j = 0; j < node.length; j++) {
        double distance = u - node[j];
        if (distance == 0) {
          return values[j];
        }
        above += weight[j] / distance * values[j];
        below += weight[j] / distance;
      }
      return above / below;
    }
  }
}
