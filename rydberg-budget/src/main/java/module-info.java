/** Error budgets of Rydberg excitation pulses, composed from causes and checked by simulation. */
module org.toprung.budget {
  requires transitive org.toprung.core;
  requires org.apache.commons.math4.legacy;

  exports org.toprung.budget;
  exports org.toprung.budget.bench;
  exports org.toprung.budget.pulse;
}
