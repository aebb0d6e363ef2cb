package org.toprung.budget.cause;

import java.util.Set;
import java.util.function.Function;
import java.util.function.ToDoubleFunction;
import org.toprung.budget.bench.Disturbance;
import org.toprung.budget.response.Fate;

/** A cause with a formula of its own whose lever is a change of the drive. */
record FixedCause(
    String name,
    String source,
    Set<Disturbance> disturbances,
    ToDoubleFunction<PulseModel> formula,
    Fate.Kind kind,
    Function<PulseModel, String> placeOf,
    Function<PulseModel, String> leverText)
    implements Cause {

  @Override
  public double error(PulseModel model) {
    return formula.applyAsDouble(model);
  }

  @Override
  public String place(PulseModel model) {
    return placeOf.apply(model);
  }

  @Override
  public String lever(PulseModel model) {
    return leverText.apply(model);
  }
}
