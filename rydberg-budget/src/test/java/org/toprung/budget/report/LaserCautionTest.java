package org.toprung.budget.report;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.toprung.budget.ReferenceScenario;
import org.toprung.budget.scenario.Scenario;

/** Limits of the laser classes: common practice, from memory. */
class LaserCautionTest {

  @ParameterizedTest
  @CsvSource({
    "480e-9, 0.004, ''",
    "480e-9, 0.006, class 3B",
    "480e-9, 0.6, class 4",
    "1013e-9, 0.004, class 3B",
    "1013e-9, 0.6, class 4",
    "780e-9, 0.002, class 3B",
    "780e-9, 5e-6, ''",
    "350e-9, 0.002, class 3B",
    "350e-9, 0.002, ultraviolet",
    "297e-9, 0.01, class 4",
  })
  void countsBeamsByPowerAndWavelength(double metres, double watts, String expected) {
    String range = LaserCaution.range(metres, watts);
    assertTrue(expected.isEmpty() ? range.isEmpty() : range.contains(expected), range);
  }

  @Test
  void refersToTheStandardAndTheOfficerWhereABeamIsHazardous() {
    List<String> cautions =
        LaserCaution.of(Scenario.parse(ReferenceScenario.text(), "s.toml").drive());
    // 2 mW of visible light needs none, 150 mW in the infrared does
    assertEquals(2, cautions.size());
    assertTrue(cautions.get(0).startsWith("Laser beam 2, 150 mW"), cautions.get(0));
    assertTrue(cautions.get(1).contains("IEC 60825-1"));
    assertTrue(cautions.get(1).contains("laser safety officer"));
  }
}
