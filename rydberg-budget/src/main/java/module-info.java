/** Error budgets of Rydberg excitation pulses. */
module org.toprung.budget {
  requires transitive org.toprung.core;
}
