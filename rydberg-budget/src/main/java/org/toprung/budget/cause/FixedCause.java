package org.toprung.budget.cause;

import java.util.function.Function;
import java.util.function.ToDoubleFunction;

/** A cause that is a property of the pulse itself and whose lever is a change of the drive. */
record FixedCause(
    String name,
    String source,
    ToDoubleFunction<PulseModel> formula,
    Function<PulseModel, String> leverText)
    implements Cause {

  @Override
  public double error(PulseModel model) {
    return formula.applyAsDouble(model);
  }

  @Override
  public String lever(PulseModel model) {
    return leverText.apply(model);
  }
}
