package org.toprung.core.drive;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.toprung.core.quantity.Length.micrometres;
import static org.toprung.core.quantity.Power.milliwatts;

import org.junit.jupiter.api.Test;
import org.toprung.angular.Polarization;

class BeamTest {
  /** Handbook: 1 W/m² has E0 = 27.45 V/m (√(2·376.730 Ω)). */
  @Test
  void hasThePeakFieldOfItsIntensity() {
    Beam beam = Beam.gaussian(milliwatts(Math.PI / 2 * 1e3), micrometres(1e6));
    assertEquals(Math.sqrt(2 * 376.730313), beam.peakFieldVoltsPerMetre(), 1e-5);
  }

  /** Definition of the waist: 1/e² in intensity, 1/e in field, across the beam only. */
  @Test
  void fallsToOneOverEInFieldAtTheWaist() {
    Beam beam =
        Beam.gaussian(milliwatts(1), micrometres(10))
            .polarized(Polarization.linearDegrees(0))
            .along(3, 0, 4);
    assertEquals(1 / Math.E, beam.fieldFactorAt(0, 10e-6, 0), 1e-12);
    assertEquals(1, beam.fieldFactorAt(3e-6, 0, 4e-6), 1e-12);
    assertEquals(1 / Math.E, beam.fieldFactorAt(8e-6, 0, -6e-6), 1e-12);
  }
}
