package org.toprung.budget.cause;

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
   * What the cause adds to the error of the pulse.
   *
   * @param model the pulse
   * @return the error, a probability; it may be slightly negative where a disturbance happens to
   *     undo an intended offset
   */
  double error(PulseModel model);

  /**
   * What to change, and what it buys.
   *
   * @param model the pulse
   * @return a sentence
   */
  String lever(PulseModel model);
}
