package org.toprung.budget;

import java.util.List;
import java.util.Set;
import java.util.TreeSet;
import java.util.concurrent.ExecutorService;
import java.util.function.IntConsumer;
import org.toprung.budget.bench.Bench;
import org.toprung.budget.bench.BenchValue;
import org.toprung.budget.bench.Disturbance;
import org.toprung.budget.cause.ImpureLadders;
import org.toprung.budget.cause.PulseModel;
import org.toprung.budget.dynamics.ShotSimulation;
import org.toprung.core.drive.Ladder;

/** Simulates the pulse of a budget, with some of the disturbances or all of them. */
final class Simulator {
  private final PulseModel model;
  private final Bench bench;
  private final int shots;
  private final long seed;
  private final IntConsumer progress;
  private final ExecutorService executor;
  private long done;

  Simulator(
      Assessment assessment, int shots, long seed, IntConsumer progress, ExecutorService executor) {
    this.model = assessment.model();
    this.bench = assessment.bench();
    this.shots = shots;
    this.seed = seed;
    this.progress = progress;
    this.executor = executor;
  }

  /** Error of the undisturbed pulse. */
  double quiet() {
    return simulation(Set.of()).run(2, seed, shot -> {}, executor).error();
  }

  ShotSimulation.Result run(Set<Disturbance> active) {
    long before = done;
    ShotSimulation.Result result =
        simulation(active)
            .run(
                shots,
                seed,
                shot -> progress.accept((int) Math.min(Integer.MAX_VALUE, before + shot)),
                executor);
    done += shots;
    return result;
  }

  private ShotSimulation simulation(Set<Disturbance> active) {
    List<Ladder> impure = impure(active);
    ShotSimulation simulation =
        ShotSimulation.of(
                model.drive(),
                impure.isEmpty() ? model.calibrated() : model.calibratedAmong(impure.get(0)),
                bench)
            .withDisturbances(active)
            .withMeanFields(model.meanFields())
            .withDecay(
                model.spontaneousPerSecond(),
                bench.environment().map(model::blackbodyPerSecond).orElse(0.0));
    return impure.isEmpty() ? simulation : simulation.withPolarizationVariants(impure);
  }

  private List<Ladder> impure(Set<Disturbance> active) {
    Set<Integer> steps = new TreeSet<>();
    for (Disturbance disturbance : active) {
      boolean is = disturbance.kind() == Disturbance.Kind.POLARIZATION;
      if (is && bench.value(BenchValue.POLARIZATION_IMPURITY, disturbance.step()).orElse(0) > 0) {
        steps.add(disturbance.step());
      }
    }
    if (steps.isEmpty()) {
      return List.of();
    }
    return ImpureLadders.of(
            model.drive(),
            steps,
            k -> bench.value(BenchValue.POLARIZATION_IMPURITY, k).orElseThrow())
        .stream()
        .map(model::adjusted)
        .toList();
  }
}
