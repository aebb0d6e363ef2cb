package org.toprung.budget.report;

/** Sizes and colours that all charts share; everything differs in grey too. Lengths in pixels. */
final class Look {
  static final double WIDTH = 960;
  static final double MARGIN = 24;
  static final double ROOM = WIDTH - 2 * MARGIN;
  static final double GAP = 12;
  static final double TITLE = 18; // size of text
  static final double TEXT = 13;
  static final double SMALL = 12;
  static final double LEADING = 1.4; // line to line, in sizes
  static final double MIDDLE = 0.36; // baseline below the middle of a line, in sizes
  static final double TICK = 5;
  static final String INK = "#1a1a1a";
  static final String FAINT_INK = "#555555";
  static final String GRID = "#d4d4d4";
  static final String DARK = "#2f4b5c";
  static final String LIGHT = "#8fb3c4";
  static final String PAPER = "#ffffff";

  private Look() {}
}
