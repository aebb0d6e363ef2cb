package org.toprung.core.atom;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.constraints.IntRange;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

class LevelTest {
  @Test
  void readsAndPrintsQuantumNumbers() {
    Level level = Level.parse("6P3/2");
    assertEquals(6, level.n());
    assertEquals(1, level.l());
    assertEquals(3, level.doubledJ());
    assertEquals("6P3/2", level.toString());
    assertEquals("P3/2", level.series());
    assertEquals(Level.of(6, 1, 3), level);
    assertEquals(Level.of(6, 1, 3).hashCode(), level.hashCode());
    assertTrue(level.compareTo(Level.parse("6D3/2")) < 0);
  }

  @Property(seed = "20261203", tries = 300)
  void everyLevelReadsBack(
      @ForAll @IntRange(min = 1, max = 150) int n, @ForAll @IntRange(min = 0, max = 149) int l) {
    if (l < n) {
      Level level = Level.of(n, l, 2 * l + 1);
      assertEquals(level, Level.parse(level.toString()));
    }
  }

  @ParameterizedTest
  @CsvSource({
    "0S1/2, 1 to 150",
    "151S1/2, 1 to 150",
    "2D3/2, 0 to n-1=1",
    "6P5/2, 1/2 or 3/2",
    "6P2/2, 1/2 or 3/2",
    "6S3/2, must be 1/2",
    "6J3/2, the letters are SPDF"
  })
  void impossibleNumbersAreRefusedWithTheAllowedOnes(String text, String allowed) {
    var e = assertThrows(IllegalArgumentException.class, () -> Level.parse(text));
    assertTrue(e.getMessage().contains(allowed), e.getMessage());
    assertTrue(e.getMessage().contains(text), e.getMessage());
  }

  @ParameterizedTest
  @ValueSource(
      strings = {
        "",
        "6",
        "6P",
        "6p3/2",
        "P3/2",
        "6P3",
        "6P1.5",
        " 6P3/2",
        "6P3/2 ",
        "6P-1/2",
        "-6P3/2",
        "99999999999P3/2",
        "6P3/4"
      })
  void otherTextIsRefusedWithAnExample(String text) {
    var e = assertThrows(IllegalArgumentException.class, () -> Level.parse(text));
    assertTrue(e.getMessage().contains("for example 6P3/2"), e.getMessage());
  }

  @Test
  void sublevelsKnowTheirNumbers() {
    Sublevel start = Sublevel.hyperfine("5S1/2", 2, -2);
    assertTrue(start.isHyperfine());
    assertEquals(4, start.doubledF());
    assertEquals(-4, start.doubledM());
    assertEquals("5S1/2 F=2 mF=-2", start.toString());
    Sublevel target = Sublevel.fine("68S1/2", 0.5);
    assertFalse(target.isHyperfine());
    assertEquals(1, target.doubledM());
    assertEquals("68S1/2 mJ=1/2", target.toString());
    assertEquals(Sublevel.fine(Level.parse("68S1/2"), 0.5), target);
    assertEquals("4S1/2 F=9/2 mF=-7/2", Sublevel.hyperfine("4S1/2", 4.5, -3.5).toString());
    assertThrows(IllegalStateException.class, target::doubledF);
  }

  @ParameterizedTest
  @CsvSource({"2,3", "2,0.5", "-1,0", "2.2,0", "2,NaN", "NaN,0", "Infinity,0", "2,-2.5"})
  void impossibleHyperfineNumbersAreRefused(double f, double m) {
    assertThrows(IllegalArgumentException.class, () -> Sublevel.hyperfine("5S1/2", f, m));
  }

  @ParameterizedTest
  @ValueSource(doubles = {0, 1.5, 1, -0.25, Double.NaN})
  void impossibleFineProjectionsAreRefused(double m) {
    var e = assertThrows(IllegalArgumentException.class, () -> Sublevel.fine("5S1/2", m));
    assertTrue(e.getMessage().contains("5S1/2"), e.getMessage());
  }
}
