/** Alkali atoms and the lasers that drive them from a ground sublevel to a Rydberg sublevel. */
@SuppressWarnings("module") // the budget module is built after this one
module org.toprung.core {
  requires transitive org.toprung.angular;
  requires org.apache.commons.math4.legacy;
  requires org.apache.commons.numbers.gamma;

  exports org.toprung.core.atom;
  exports org.toprung.core.quantity;
  exports org.toprung.core.radial;
  exports org.toprung.core.structure;
  exports org.toprung.core.drive;
  exports org.toprung.core.linear to
      org.toprung.budget;
}
