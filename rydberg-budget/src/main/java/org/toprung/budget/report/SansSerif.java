package org.toprung.budget.report;

/**
 * Widths of text in a font that only the viewer knows: upper bounds for the common sans-serif
 * fonts, measured on the widest of them, DejaVu Sans. What is laid out by them does not overlap
 * elsewhere.
 */
final class SansSerif {
  private static final double NARROW = 0.42; // em
  private static final double USUAL = 0.66;
  private static final double CAPITAL = 0.8;
  private static final double WIDE = 1.05;
  private static final double PICTURE = 1.4;
  private static final double BOLD = 1.17; // times regular
  private static final String NARROW_CHARACTERS = " ijlfrtIJ.,:;'|!/\\-()[]`";
  private static final String WIDE_CHARACTERS = "mwMW%@&+=<>~^#";
  private static final int LAST_ASCII = 0x7e;

  private SansSerif() {}

  static double width(String text, double size) {
    return size * text.codePoints().mapToDouble(SansSerif::em).sum();
  }

  static double boldWidth(String text, double size) {
    return BOLD * width(text, size);
  }

  private static double em(int c) {
    if (NARROW_CHARACTERS.indexOf(c) >= 0) {
      return NARROW;
    }
    if (WIDE_CHARACTERS.indexOf(c) >= 0) {
      return WIDE;
    }
    if (c > LAST_ASCII) {
      return Character.isSupplementaryCodePoint(c) ? PICTURE : WIDE;
    }
    return Character.isUpperCase(c) ? CAPITAL : USUAL;
  }
}
