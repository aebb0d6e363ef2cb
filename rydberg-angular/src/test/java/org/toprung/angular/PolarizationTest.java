package org.toprung.angular;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class PolarizationTest {

  @ParameterizedTest
  @ValueSource(doubles = {1, -1, 25, -1e-300})
  void sigmaAlongTheAxisIsOneComponentWhicheverWayTheBeamRuns(double kz) {
    SphericalComponents plus =
        Polarization.SIGMA_PLUS.resolvedFor(0, 0, kz).componentsAbout(0, 0, 1);
    assertEquals(1, plus.re(1), 2e-16);
    assertEquals(0, plus.im(1), 1e-30);
    assertEquals(0, plus.power(0) + plus.power(-1), 1e-30);
    SphericalComponents minus =
        Polarization.SIGMA_MINUS.resolvedFor(0, 0, kz).componentsAbout(0, 0, 1);
    assertEquals(1, minus.re(-1), 2e-16);
    assertEquals(0, minus.im(-1), 1e-30);
    assertEquals(0, minus.power(0) + minus.power(1), 1e-30);
  }

  @Test
  void piIsTheZeroComponentForABeamAcrossTheAxis() {
    SphericalComponents pi = Polarization.PI.resolvedFor(3, 4, 0).componentsAbout(0, 0, 2);
    assertEquals(1, pi.re(0), 2e-16);
    assertEquals(0, pi.power(1) + pi.power(-1), 1e-30);
  }

  @Test
  void aBeamAlongTheAxisCannotBePiPolarized() {
    IllegalArgumentException e =
        assertThrows(IllegalArgumentException.class, () -> Polarization.PI.resolvedFor(0, 0, -1));
    assertTrue(
        e.getMessage().contains("a beam along the axis cannot be pi polarized"), e.getMessage());
  }

  @Test
  void aBeamAcrossTheAxisCannotBeSigmaPolarized() {
    IllegalArgumentException e =
        assertThrows(
            IllegalArgumentException.class, () -> Polarization.SIGMA_PLUS.resolvedFor(1, 0, 0));
    assertTrue(e.getMessage().contains("sigma+ needs a beam along"), e.getMessage());
  }

  @ParameterizedTest
  @ValueSource(
      strings = {
        "sigma+",
        "sigma-",
        "pi",
        "linear 30.0 deg",
        "elliptical -12.5 deg 45.0 deg",
        "vector (0.6, 0.0) (0.0, -0.8) (0.0, 0.0)"
      })
  void textAndBackIsTheIdentity(String text) {
    Polarization p = Polarization.parse(text);
    assertEquals(text, p.toString());
    assertEquals(p, Polarization.parse(p.toString()));
  }
}
