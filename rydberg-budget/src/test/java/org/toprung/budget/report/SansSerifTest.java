package org.toprung.budget.report;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class SansSerifTest {

  /**
   * Widths of DejaVu Sans 2.37, regular and bold, in em: advances of its glyphs, read from the font
   * files. Bounds must hold and not waste much.
   */
  @ParameterizedTest
  @CsvSource({
    "0123456789, 6.36, 6.96",
    "mmMMWW, 5.65, 6.28",
    "HHDDOO, 4.62, 5.03",
    "rrfftt, 2.31, 2.81",
    "aegnou, 3.74, 4.18",
    "±→, 1.68, 1.68",
  })
  void boundsTheWidestCommonFont(String text, double regular, double bold) {
    assertTrue(SansSerif.width(text, 1) >= regular, text);
    assertTrue(SansSerif.boldWidth(text, 1) >= bold, text);
    assertTrue(SansSerif.width(text, 1) <= 1.3 * regular, text);
  }

  @ParameterizedTest
  @CsvSource({"some text, 13", "'', 10"})
  void growsWithTheSize(String text, double size) {
    assertEquals(2 * SansSerif.width(text, size), SansSerif.width(text, 2 * size), 1e-12);
  }
}
