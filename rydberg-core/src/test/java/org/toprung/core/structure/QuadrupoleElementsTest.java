package org.toprung.core.structure;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.junit.jupiter.api.Test;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;

class QuadrupoleElementsTest {

  private static double modulus(Species species, String a, String b) {
    return QuadrupoleElements.of(species).reduced(Level.parse(a), Level.parse(b)).modulus();
  }

  /**
   * Exact: hydrogen 1s-3d, ∫ R10 R32 r⁴ dr = 8·720·(3/4)⁷/(81√30) = 1.7331 a0², and the squares
   * over both j of the upper level add up to 2 R² ⟨0‖C²‖2⟩² for two spin states.
   */
  @Test
  void isExactInHydrogen() {
    double radial = 8 * 720 * Math.pow(0.75, 7) / (81 * Math.sqrt(30));
    Species hydrogen = Species.parse("H");
    double three = modulus(hydrogen, "3D3/2", "1S1/2");
    double five = modulus(hydrogen, "3D5/2", "1S1/2");
    // the proton's mass stretches every length by 1 + m_e/M
    double stretched = radial * Math.pow(1 + 5.4462e-4, 2);
    double expected = 2 * stretched * stretched;
    assertEquals(expected, three * three + five * five, 1e-5 * expected);
    assertEquals(Math.sqrt(1.5), five / three, 1e-5);
  }

  /**
   * Published, from memory: A(3d → 1s, E2) of hydrogen is 594 s⁻¹; A = 1.1199e18 S/(λ⁵ (2j+1)) with
   * λ in ångström (NIST handbook of line strengths).
   */
  @Test
  void givesTheQuadrupoleDecayOfHydrogen() {
    double five = modulus(Species.parse("H"), "3D5/2", "1S1/2");
    double rate = 1.1199e18 * five * five / (Math.pow(1025.72, 5) * 6);
    assertEquals(594, rate, 3);
  }

  /** Published many-body values, from memory: Cs 6S-5D3/2 33.3 and 6S-5D5/2 41.2 to 41.6 e a0². */
  @Test
  void liesNearPublishedElementsOfCaesium() {
    assertEquals(33.4, modulus(Species.CAESIUM_133, "6S1/2", "5D3/2"), 0.06 * 33.4);
    assertEquals(41.4, modulus(Species.CAESIUM_133, "6S1/2", "5D5/2"), 0.06 * 41.4);
  }

  /** Elements to a Rydberg series fall as n*^(−3/2). */
  @Test
  void fallsWithThePrincipalQuantumNumber() {
    double low = modulus(Species.RUBIDIUM_87, "5S1/2", "50D5/2");
    double high = modulus(Species.RUBIDIUM_87, "5S1/2", "100D5/2");
    double expected = Math.pow((100 - 1.346) / (50 - 1.346), 1.5);
    assertEquals(expected, low / high, 0.01 * expected);
  }

  @Test
  void namesTheRuleThatForbids() {
    QuadrupoleElements elements = QuadrupoleElements.of(Species.RUBIDIUM_87);
    for (String[] pair :
        new String[][] {
          {"5S1/2", "6P1/2"}, {"5S1/2", "6S1/2"}, {"5P1/2", "6P1/2"}, {"5S1/2", "10F5/2"}
        }) {
      String message =
          assertThrows(
                  IllegalArgumentException.class,
                  () -> elements.reduced(Level.parse(pair[0]), Level.parse(pair[1])))
              .getMessage();
      assertTrue(message.contains("triangle"), message);
    }
  }
}
