package org.toprung.budget.cause;

import java.util.Locale;
import java.util.Set;
import org.toprung.budget.bench.Disturbance;
import org.toprung.budget.response.Fate;

/**
 * A random disturbance with a strength that can be halved.
 *
 * <p>The lever is always the same question, what remains at half the strength, so it is answered
 * here.
 */
abstract class Halvable implements Cause {
  private final String name;
  private final String source;
  private final String strength; // what to halve, "the rms magnetic noise"
  private final Set<Disturbance> disturbances;

  Halvable(String name, String strength, String source, Disturbance disturbance) {
    this.name = name;
    this.strength = strength;
    this.source = source;
    this.disturbances = Set.of(disturbance);
  }

  @Override
  public final String name() {
    return name;
  }

  @Override
  public final String source() {
    return source;
  }

  @Override
  public final Set<Disturbance> disturbances() {
    return disturbances;
  }

  @Override
  public final double error(PulseModel model) {
    return error(model, 1);
  }

  /** Error when the disturbance is {@code scale} times as strong. */
  abstract double error(PulseModel model, double scale);

  @Override
  public final Fate.Kind kind() {
    return Fate.Kind.PHASE;
  }

  @Override
  public final String place(PulseModel model) {
    return "start and target";
  }

  @Override
  public final String lever(PulseModel model) {
    return String.format(Locale.ROOT, "halve %s: %.2g remains", strength, error(model, 0.5));
  }
}
