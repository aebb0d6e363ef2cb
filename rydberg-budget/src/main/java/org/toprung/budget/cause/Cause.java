package org.toprung.budget.cause;

import java.util.Set;
import org.toprung.budget.bench.Disturbance;
import org.toprung.budget.response.Fate;

/** One cause of error of a pulse. Implementations are immutable. */
public interface Cause {
  /**
   * Name for people.
   *
   * @return the name
   */
  String name();

  /**
   * What the error rests on: the formula or method, and where it is published.
   *
   * @return the source
   */
  String source();

  /**
   * What a simulation has to switch on to see this cause; empty for a property of the undisturbed
   * pulse.
   *
   * @return an immutable set
   */
  Set<Disturbance> disturbances();

  /**
   * What the cause adds to the error of the pulse.
   *
   * @param model the pulse
   * @return the error, a probability; it may be slightly negative where a disturbance happens to
   *     undo an intended offset
   */
  double error(PulseModel model);

  /**
   * What sort of error it is.
   *
   * @return the kind
   */
  Fate.Kind kind();

  /**
   * Where the atom is when it went wrong this way.
   *
   * @param model the pulse
   * @return levels or sublevels, for people
   */
  String place(PulseModel model);

  /**
   * What to change, and what it buys.
   *
   * @param model the pulse
   * @return a sentence
   */
  String lever(PulseModel model);
}
