/** Error budgets of Rydberg excitation pulses, composed from causes and checked by simulation. */
module org.toprung.budget {
  requires transitive org.toprung.core;
  requires java.xml;
  requires org.apache.commons.math4.legacy;
  requires org.apache.commons.numbers.gamma;

  // what only scenario files, reports and the command line need
  requires static com.fasterxml.jackson.core;
  requires static com.fasterxml.jackson.databind;
  requires static com.fasterxml.jackson.dataformat.toml;
  requires static info.picocli;

  exports org.toprung.budget;
  exports org.toprung.budget.bench;
  exports org.toprung.budget.pulse;
  exports org.toprung.budget.report;
  exports org.toprung.budget.response;
  exports org.toprung.budget.scenario;

  opens org.toprung.budget.app to
      info.picocli;
}
