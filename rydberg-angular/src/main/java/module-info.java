/** Angular-momentum algebra: no atoms, no units. */
module org.toprung.angular {
  requires org.apache.commons.numbers.core;

  exports org.toprung.angular;
}
