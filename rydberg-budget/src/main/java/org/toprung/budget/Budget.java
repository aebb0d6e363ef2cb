package org.toprung.budget;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.HashSet;
import java.util.List;
import java.util.Locale;
import java.util.Set;
import java.util.concurrent.ExecutorService;
import java.util.function.IntConsumer;
import java.util.stream.Stream;
import org.toprung.budget.bench.Bench;
import org.toprung.budget.bench.Disturbance;
import org.toprung.budget.cause.Cause;
import org.toprung.budget.dynamics.ShotSimulation;
import org.toprung.budget.pulse.Pulse;
import org.toprung.budget.pulse.PulseProgram;
import org.toprung.budget.response.Fate;
import org.toprung.budget.response.PulseResponse;
import org.toprung.core.drive.Drive;
import org.toprung.core.drive.PulsePlan;
import org.toprung.core.quantity.Frequency;
import org.toprung.core.quantity.Time;

/**
 * Where the error of a pulse comes from.
 *
 * <pre>{@code
 * Budget budget = Budget.of(drive, Pulse.pi()).on(bench).compose();
 * Check check = budget.check(2000, 1L);
 * }</pre>
 *
 * <p>Disturbances that enter through several doors (a beam's intensity through Rabi frequency and
 * light shift, the position of the atom through all beams) are averaged jointly, so that their
 * covariance counts; different disturbances are independent and composed. {@link #check} tells how
 * good that is.
 *
 * <p>Immutable and thread-safe.
 */
public final class Budget {
  private static final double ALLOWED_DIFFERENCE = 0.1; // of the simulated total
  private static final double ALLOWED_STANDARD_ERRORS = 3;

  private final Drive drive;
  private final Pulse pulse;
  private final Bench bench;
  private final Assessment assessment;
  private final List<CauseEntry> causes;
  private final double atomicUncertainty;
  private final double benchUncertainty;

  Budget(Drive drive, Pulse pulse, Bench bench) {
    bench.requireSteps(drive.steps().size());
    this.drive = drive;
    this.pulse = pulse;
    this.bench = bench;
    this.assessment = Assessment.of(drive, pulse, bench);
    Uncertainties atomic = Uncertainties.atomic(assessment);
    Uncertainties stated = Uncertainties.ofBench(assessment);
    List<CauseEntry> entries = new ArrayList<>();
    for (int i = 0; i < assessment.causes().size(); i++) {
      Cause cause = assessment.causes().get(i);
      entries.add(
          new CauseEntry(
              cause.name(),
              assessment.errors()[i],
              atomic.ofCause(i),
              stated.ofCause(i),
              new Fate(cause.kind(), cause.place(assessment.model())),
              cause.lever(assessment.model()),
              cause.source()));
    }
    entries.sort(Comparator.comparingDouble(CauseEntry::error).reversed());
    this.causes = List.copyOf(entries);
    this.atomicUncertainty = atomic.ofTotal();
    this.benchUncertainty = stated.ofTotal();
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
   * Re-derives the total and every cause by simulation.
   *
   * @param shots number of shots of each simulation, 2 to 100 million
   * @param seed seed of the drawn disturbances; the same seed gives the same bits on any number of
   *     threads
   * @return the simulated total and whether this budget agrees with it
   * @throws IllegalArgumentException if the number of shots is out of range
   */
  public Check check(int shots, long seed) {
    return checking().shots(shots).seed(seed).run();
  }

  /**
   * Begins a check with more choices: progress, an executor, the total only.
   *
   * @return a setup of 2000 shots
   */
  public CheckSetup checking() {
    return CheckSetup.of(this);
  }

  /** Number of simulations a check takes. */
  int simulations(boolean alone) {
    return alone ? 1 + (int) disturbing().count() : 1;
  }

  private Stream<Cause> disturbing() {
    return assessment.causes().stream().filter(c -> !c.disturbances().isEmpty());
  }

  Check check(int shots, long seed, boolean alone, IntConsumer progress, ExecutorService executor) {
    Simulator simulator = new Simulator(assessment, shots, seed, progress, executor);
    Set<Disturbance> all = new HashSet<>();
    assessment.causes().forEach(c -> all.addAll(c.disturbances()));
    ShotSimulation.Result together = simulator.run(all);
    List<CauseCheck> checks = new ArrayList<>();
    if (alone) {
      double quiet = simulator.quiet();
      double undisturbed = 0;
      for (CauseEntry entry : causes) {
        Cause cause = assessment.cause(entry.cause());
        if (cause.disturbances().isEmpty()) {
          undisturbed += entry.error();
        } else {
          ShotSimulation.Result result = simulator.run(cause.disturbances());
          checks.add(
              compared(
                  entry.cause(),
                  entry.error(),
                  result.error() - quiet,
                  result.standardError(),
                  together.error()));
        }
      }
      checks.add(compared("Undisturbed pulse", undisturbed, quiet, 0, together.error()));
    }
    boolean agrees = agree(total(), together.error(), together.standardError(), together.error());
    return new Check(together.error(), together.standardError(), agrees, shots, seed, checks);
  }

  private static CauseCheck compared(
      String cause, double composed, double simulated, double standardError, double total) {
    return new CauseCheck(
        cause,
        composed,
        simulated,
        standardError,
        agree(composed, simulated, standardError, total));
  }

  private static boolean agree(
      double composed, double simulated, double standardError, double total) {
    double difference = Math.abs(composed - simulated);
    return difference <= ALLOWED_DIFFERENCE * total
        || difference <= ALLOWED_STANDARD_ERRORS * standardError;
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
   * Length of the pulse and where to set the laser, for the atom as warm as it is; the pulse's own
   * offset comes on top.
   *
   * @return the plan
   */
  public PulsePlan plan() {
    return assessment.model().plan();
  }

  /**
   * What to play: fields, detuning and phase over time.
   *
   * @return the program
   */
  public PulseProgram program() {
    return assessment.model().program();
  }

  /**
   * Where to set the last laser at a time of the program: the light-shifted resonance that the
   * program counts from plus its detuning.
   *
   * @param time within the program and not on one of its breaks
   * @return what is added to the frequency on bare resonance of the whole ladder
   */
  public Frequency laserOffset(Time time) {
    return Frequency.ofHertz(assessment.model().calibrated().laserOffsetHertz(time.seconds()));
  }

  /**
   * How the pulse reacts to disturbances: filter functions, second-order response, time spent in
   * each level.
   *
   * @return the response that the causes were computed with
   */
  public PulseResponse response() {
    return assessment.model().response();
  }

  /**
   * Probability that the intermediate level scatters a photon during the pulse.
   *
   * @return the probability
   */
  public double scatteringPerPulse() {
    return assessment.model().scatteringPerPulse();
  }

  /**
   * Error of the pulse from all assessed causes.
   *
   * @return 1 − probability of the wanted outcome, at most 1
   */
  public double total() {
    return assessment.total();
  }

  /**
   * What the total differs by from the sum of all causes, because an atom can be lost only once and
   * disturbances can undo each other.
   *
   * @return total minus sum, small and negative where errors are small
   */
  public double overlap() {
    double sum = 0;
    for (double error : assessment.errors()) {
      sum += error;
    }
    return assessment.total() - sum;
  }

  /**
   * Standard uncertainty of the total, atomic values and stated bench values together.
   *
   * @return the uncertainty
   */
  public double uncertainty() {
    return Math.hypot(atomicUncertainty, benchUncertainty);
  }

  /**
   * Standard uncertainty of the total from the atomic values.
   *
   * @return the uncertainty
   */
  public double atomicUncertainty() {
    return atomicUncertainty;
  }

  /**
   * Standard uncertainty of the total from the stated uncertainties of bench values.
   *
   * @return the uncertainty; 0 where none is stated
   */
  public double benchUncertainty() {
    return benchUncertainty;
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
    return assessment.notAssessed();
  }

  /**
   * How the total reacts to every bench value, every power and every detuning, with the pulse
   * planned anew. Computed when asked for: some ten budgets.
   *
   * @return the sensitivities, the most rewarding first
   */
  public List<Sensitivity> sensitivities() {
    return Sensitivities.of(assessment);
  }

  /**
   * The budget in one line.
   *
   * @return pulse, drive, total and uncertainty
   */
  @Override
  public String toString() {
    return String.format(
        Locale.ROOT, "%s on %s: error %.3g ± %.2g", pulse, drive, total(), uncertainty());
  }
}
