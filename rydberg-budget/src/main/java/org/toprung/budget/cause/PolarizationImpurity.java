package org.toprung.budget.cause;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Set;
import org.toprung.budget.bench.Disturbance;
import org.toprung.budget.response.Fate;
import org.toprung.core.drive.Drive;
import org.toprung.core.drive.Ladder;

/**
 * Light of the orthogonal polarization in one beam, coherent with the wanted light but of unknown
 * phase: it changes the Rabi frequency and the light shifts and couples to other sublevels. The
 * error is that of the planned pulse on the ladder with the impure beam, averaged over four phases,
 * minus that on the clean one.
 */
final class PolarizationImpurity implements Cause {
  private final int step;
  private final double fraction;
  private final Lazy<List<Ladder>> impure;
  private final Lazy<List<Ladder>> halfAsImpure;

  PolarizationImpurity(Drive drive, int step, double fraction) {
    this.step = step;
    this.fraction = fraction;
    this.impure = new Lazy<>(() -> ImpureLadders.of(drive, Set.of(step), k -> fraction));
    this.halfAsImpure =
        new Lazy<>(() -> ImpureLadders.of(drive, Set.of(step), k -> 0.5 * fraction));
  }

  @Override
  public String name() {
    return "Polarization impurity, step " + (step + 1);
  }

  @Override
  public String source() {
    return "noise-free propagation of the whole ladder with the impure beam, mean over four phases of"
        + " the impurity";
  }

  @Override
  public Set<Disturbance> disturbances() {
    return Set.of(new Disturbance(Disturbance.Kind.POLARIZATION, step));
  }

  @Override
  public double error(PulseModel model) {
    return error(model, impure.get());
  }

  private static double error(PulseModel model, List<Ladder> ladders) {
    List<Double> errors = new ArrayList<>();
    ladders.forEach(l -> errors.add(model.noiseFreeErrorOf(l)));
    double mean = errors.stream().mapToDouble(Double::doubleValue).average().orElseThrow();
    return mean - model.noiseFreeErrorOf(model.drive().ladder());
  }

  @Override
  public Fate.Kind kind() {
    return Fate.Kind.LEAK;
  }

  @Override
  public String place(PulseModel model) {
    return "other sublevels of the Rydberg and the ground level";
  }

  @Override
  public String lever(PulseModel model) {
    return String.format(
        Locale.ROOT,
        "halve the impurity of %.2g: %.2g remains; a larger field moves other sublevels away",
        fraction,
        error(model, halfAsImpure.get()));
  }
}
