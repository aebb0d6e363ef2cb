package org.toprung.budget.pulse;

/** The resonance that {@link PulseProgram#detuningHertz} counts from. */
public enum FrequencyReference {
  /** The light-shifted resonance at the programmed fields of the moment. */
  FOLLOWING,
  /** The light-shifted resonance with every beam at full power, whatever the fields are now. */
  FULL_POWER,
  /** The resonance of the atom without any light. */
  BARE
}
