/** Alkali atoms and the lasers that drive them from a ground sublevel to a Rydberg sublevel. */
module org.toprung.core {
  requires transitive org.toprung.angular;

  exports org.toprung.core.atom;
  exports org.toprung.core.quantity;
  exports org.toprung.core.radial;
  exports org.toprung.core.structure;
}
