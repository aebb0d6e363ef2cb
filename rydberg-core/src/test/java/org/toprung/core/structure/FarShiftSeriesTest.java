package org.toprung.core.structure;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Set;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.constraints.DoubleRange;
import net.jqwik.api.constraints.IntRange;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.function.Executable;
import org.toprung.angular.Polarization;
import org.toprung.angular.SphericalComponents;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;

class FarShiftSeriesTest {
  private static final FarLightShift SHIFTS = FarLightShift.of(Species.RUBIDIUM_87);
  private static final List<Level> LEVELS =
      List.of(Level.parse("5S1/2"), Level.parse("68S1/2"), Level.parse("60D5/2"));

  private static SphericalComponents light() {
    return Polarization.ellipticalDegrees(30, 15).resolvedFor(1, 0.2, 0.1).componentsAbout(0, 0, 1);
  }

  /**
   * Exact: the series is the sum over states itself, for infrared to blue light, below and above
   * the ionization threshold, with and without near levels.
   */
  @Property(tries = 200, seed = "51")
  void equalsTheSumOverStates(
      @ForAll @IntRange(max = 2) int index,
      @ForAll @DoubleRange(min = 200, max = 750) double terahertz,
      @ForAll @DoubleRange(min = -2, max = 2) double offset,
      @ForAll @DoubleRange(min = 0, max = 1) double weight,
      @ForAll boolean near) {
    Level level = LEVELS.get(index);
    Set<Level> nearLevels = near ? Set.of(Level.parse("6P3/2"), Level.parse("5P1/2")) : Set.of();
    double laser = terahertz * 1e12;
    double moved = laser + offset * 1e12;
    FarShiftSeries series =
        SHIFTS.series(
            level,
            new int[] {-1, 1},
            new double[] {weight, 1 - weight},
            laser,
            light(),
            nearLevels);
    double lower = SHIFTS.hertzPerFieldSquared(level, -1, moved, light(), nearLevels).value();
    double upper = SHIFTS.hertzPerFieldSquared(level, 1, moved, light(), nearLevels).value();
    double expected = weight * lower + (1 - weight) * upper;
    // where terms of both signs cancel, their size counts: about that of a hundred atomic units
    double scale = Math.max(Math.abs(expected), 1e-6);
    assertEquals(expected, series.hertzPerFieldSquared(offset * 1e12), 1e-11 * scale);
  }

  @Test
  void refusesOffsetsBeyondItsReach() {
    FarShiftSeries series =
        SHIFTS.series(LEVELS.get(0), new int[] {1}, new double[] {1}, 3e14, light(), Set.of());
    refused("within", () -> series.hertzPerFieldSquared(2.1e12));
    refused("within", () -> series.hertzPerFieldSquared(Double.NaN));
  }

  @Test
  void refusesNumbersThatAreNone() {
    Level ground = LEVELS.get(0);
    refused(
        "given 2 weights of 1 projections",
        () -> SHIFTS.series(ground, new int[] {1}, new double[2], 3e14, light(), Set.of()));
    refused(
        "positive and finite",
        () -> SHIFTS.series(ground, new int[] {1}, new double[] {1}, 0, light(), Set.of()));
    refused(
        "must be odd",
        () -> SHIFTS.series(ground, new int[] {3}, new double[] {1}, 3e14, light(), Set.of()));
    refused("at least one", () -> new FarShiftSeries(1, false, 0, List.of(), List.of()));
    refused("finite", () -> new FarShiftSeries(1, false, Double.NaN, List.of(1.0), List.of()));
    refused(
        "finite",
        () ->
            new FarShiftSeries(
                1, false, 0, List.of(1.0), List.of(new FarShiftSeries.Pole(Double.NaN, 1))));
  }

  private static void refused(String part, Executable call) {
    String message = assertThrows(IllegalArgumentException.class, call).getMessage();
    assertTrue(message.contains(part), message);
  }
}
