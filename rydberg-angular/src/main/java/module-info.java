/** Angular-momentum algebra: no atoms, no units. */
module org.toprung.angular {
  exports org.toprung.angular;
}
