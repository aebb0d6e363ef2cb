package org.toprung.budget;

import java.util.ArrayList;
import java.util.List;
import java.util.function.IntConsumer;
import org.toprung.budget.bench.Bench;
import org.toprung.budget.cause.Cause;
import org.toprung.budget.cause.Causes;
import org.toprung.budget.cause.PulseModel;
import org.toprung.budget.dynamics.CalibratedProgram;
import org.toprung.budget.dynamics.ShotSimulation;
import org.toprung.budget.pulse.Pulse;
import org.toprung.core.drive.Drive;
import org.toprung.core.drive.PulsePlan;

/**
 * Where the error of a pulse comes from.
 *
 * <pre>{@code
 * Budget budget = Budget.of(drive, Pulse.pi()).on(bench).compose();
 * Check check = budget.check(2000, 1L);
 * }</pre>
 *
 * <p>The causes are independent disturbances, so that to lowest order their errors add; the sum is
 * the total. Good while the total is small (below about 5 %); {@link #check} tells.
 *
 * <p>Immutable and thread-safe.
 */
public final class Budget {
  private static final double ALLOWED_DIFFERENCE = 0.1; // of the simulated total
  private static final double ALLOWED_STANDARD_ERRORS = 3;
  private static final int MOST_SHOTS = 100_000_000;

  private final Drive drive;
  private final Pulse pulse;
  private final Bench bench;
  private final PulseModel model;
  private final List<CauseEntry> causes;
  private final List<String> notAssessed;
  private final double total;
  private final double uncertainty;

  Budget(Drive drive, Pulse pulse, Bench bench) {
    bench.requireSteps(drive.steps().size());
    this.drive = drive;
    this.pulse = pulse;
    this.bench = bench;
    this.model = PulseModel.of(drive, pulse);
    Causes found = Causes.of(drive, bench);
    List<PulseModel> variations = model.variations();
    double[] totalChange = new double[variations.size()];
    List<CauseEntry> entries = new ArrayList<>();
    double sum = 0;
    for (Cause cause : found.assessed()) {
      double error = cause.error(model);
      double squares = 0;
      for (int v = 0; v < totalChange.length; v++) {
        double change = cause.error(variations.get(v)) - error;
        totalChange[v] += change;
        squares += change * change;
      }
      entries.add(
          new CauseEntry(
              cause.name(), error, Math.sqrt(squares), cause.lever(model), cause.source()));
      sum += error;
    }
    double squares = 0;
    for (double change : totalChange) {
      squares += change * change;
    }
    entries.sort((a, b) -> Double.compare(b.error(), a.error()));
    this.causes = List.copyOf(entries);
    this.notAssessed = found.notAssessed();
    this.total = Math.min(1, sum);
    this.uncertainty = Math.sqrt(squares);
  }

  /**
   * Begins a budget.
   *
   * @param drive the resolved drive
   * @param pulse the pulse
   * @return a setup on a bench nothing is known of
   */
  public static BudgetSetup of(Drive drive, Pulse pulse) {
    return new BudgetSetup(drive, pulse, Bench.unknown());
  }

  /**
   * Re-derives the total by simulation.
   *
   * @param shots number of shots, 2 to 100 million
   * @param seed seed of the drawn disturbances; the same seed gives the same result on any machine
   *     with the same arithmetic, whatever its number of processors
   * @return the simulated total and whether this budget agrees with it
   * @throws IllegalArgumentException if the number of shots is out of range
   */
  public Check check(int shots, long seed) {
    return check(shots, seed, done -> {});
  }

  /**
   * Re-derives the total by simulation and reports progress.
   *
   * @param shots number of shots, 2 to 100 million
   * @param seed seed of the drawn disturbances
   * @param progress told the number of shots done so far, from any thread
   * @return the simulated total and whether this budget agrees with it
   * @throws IllegalArgumentException if the number of shots is out of range
   */
  public Check check(int shots, long seed, IntConsumer progress) {
    if (shots < 2 || shots > MOST_SHOTS) {
      throw new IllegalArgumentException(
          "a check takes 2 to " + MOST_SHOTS + " shots, not " + shots);
    }
    ShotSimulation.Result result =
        ShotSimulation.of(drive, CalibratedProgram.of(drive.ladder(), pulse), bench)
            .withDecay(
                model.spontaneousPerSecond(),
                bench.environment().map(model::blackbodyPerSecond).orElse(0.0))
            .run(shots, seed, progress);
    double difference = Math.abs(total - result.error());
    boolean agrees =
        difference <= ALLOWED_DIFFERENCE * result.error()
            || difference <= ALLOWED_STANDARD_ERRORS * result.standardError();
    return new Check(result.error(), result.standardError(), agrees, shots, seed);
  }

  /**
   * The drive.
   *
   * @return the drive
   */
  public Drive drive() {
    return drive;
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
   * The disturbances.
   *
   * @return the bench
   */
  public Bench bench() {
    return bench;
  }

  /**
   * Length of the pulse and where to set the laser; the pulse's own offset comes on top.
   *
   * @return the plan
   */
  public PulsePlan plan() {
    return model.plan();
  }

  /**
   * Probability that the intermediate level scatters a photon during the pulse.
   *
   * @return the probability
   */
  public double scatteringPerPulse() {
    return model.scatteringPerPulse();
  }

  /**
   * Error of the pulse from all assessed causes.
   *
   * @return 1 − probability of the wanted outcome, at most 1
   */
  public double total() {
    return total;
  }

  /**
   * Standard uncertainty of the total from the atomic values.
   *
   * @return the uncertainty
   */
  public double uncertainty() {
    return uncertainty;
  }

  /**
   * The causes, largest first.
   *
   * @return an immutable list
   */
  public List<CauseEntry> causes() {
    return causes;
  }

  /**
   * What could not be assessed, and which value is missing.
   *
   * @return an immutable list of sentences
   */
  public List<String> notAssessed() {
    return notAssessed;
  }
}
