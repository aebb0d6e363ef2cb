package org.toprung.budget.pulse;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.junit.jupiter.api.Test;
import org.toprung.core.quantity.Frequency;

class PulseTest {
  private static final Frequency RABI = Frequency.megahertz(2);

  @Test
  void playsTheSquarePiPulseAsOneInterval() {
    PulseProgram program = Pulse.pi().program(2, RABI);
    assertEquals(250e-9, program.seconds(), 1e-20);
    assertArrayEquals(new double[] {0, program.seconds()}, program.breaks());
    assertTrue(program.isConstant(0));
    assertEquals(1, program.amplitude(1e-7));
    assertEquals(0, program.detuningHertz(1e-7));
    assertEquals(0, program.phaseRadians(1e-7));
    assertEquals(FrequencyReference.FOLLOWING, program.reference());
  }

  @Test
  void refusesAreasAndRabiFrequenciesOutOfRange() {
    for (double area : new double[] {0, -1, Double.NaN, Double.POSITIVE_INFINITY, 315}) {
      assertThrows(IllegalArgumentException.class, () -> Pulse.square(area));
    }
    for (double hertz : new double[] {0, -1e6}) {
      Frequency rabi = Frequency.ofHertz(hertz);
      assertThrows(IllegalArgumentException.class, () -> Pulse.pi().program(2, rabi));
    }
  }
}
