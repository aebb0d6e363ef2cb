package org.toprung.core.quantity;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.function.DoubleFunction;
import java.util.function.Function;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.constraints.DoubleRange;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

class QuantityTest {
  private static final List<DoubleFunction<?>> FACTORIES =
      List.of(
          Frequency::ofHertz,
          Frequency::ofRadiansPerSecond,
          Frequency::gigahertz,
          Power::ofWatts,
          Intensity::ofWattsPerSquareMetre,
          Length::ofMetres,
          MagneticField::ofTesla,
          ElectricField::ofVoltsPerMetre,
          Temperature::ofKelvin,
          Time::ofSeconds);

  @ParameterizedTest
  @ValueSource(doubles = {Double.NaN, Double.POSITIVE_INFINITY, Double.NEGATIVE_INFINITY})
  void everyQuantityRefusesWhatIsNotFinite(double bad) {
    for (DoubleFunction<?> factory : FACTORIES) {
      var e = assertThrows(IllegalArgumentException.class, () -> factory.apply(bad));
      assertTrue(e.getMessage().contains(Double.toString(bad)), e.getMessage());
    }
  }

  // SI prefixes and 1 G = 1e-4 T are definitions (BIPM SI brochure, 9th edition)
  @ParameterizedTest
  @CsvSource({
    "4 G, 4e-4",
    "4G, 4e-4",
    "-2.5 mG, -2.5e-7",
    "1 T, 1",
    "3 mT, 3e-3",
    "7 uT, 7e-6",
    "7 µT, 7e-6",
    "7 μT, 7e-6",
    "1e2 G, 1e-2",
    ".5 G, 5e-5"
  })
  void magneticFieldReadsAllItsUnits(String text, double tesla) {
    assertEquals(tesla, MagneticField.parse(text).tesla());
  }

  @Test
  void eachClassReadsItsUnits() {
    assertEquals(1.2e9, Frequency.parse("1.2 GHz").hertz());
    assertEquals(2e-3, Power.parse("2 mW").watts());
    assertEquals(2e4, Intensity.parse("2 W/cm2").wattsPerSquareMetre());
    assertEquals(2e7, Intensity.parse("2 kW/cm2").wattsPerSquareMetre());
    assertEquals(2e3, Intensity.parse("2 mW/mm2").wattsPerSquareMetre());
    assertEquals(2, Intensity.parse("2 W/m2").wattsPerSquareMetre());
    assertEquals(20e-6, Length.parse("20 um").metres());
    assertEquals(420.298e-9, Length.parse("420.298 nm").metres());
    assertEquals(0.1, ElectricField.parse("1 mV/cm").voltsPerMetre());
    assertEquals(1e-5, Temperature.parse("10 uK").kelvin());
    assertEquals(3e-7, Time.parse("300 ns").seconds());
  }

  @Test
  void unitFactoriesAgreeWithParse() {
    assertEquals(Frequency.parse("1.2 kHz"), Frequency.kilohertz(1.2));
    assertEquals(Frequency.parse("1.2 MHz"), Frequency.megahertz(1.2));
    assertEquals(Frequency.parse("1.2 THz"), Frequency.terahertz(1.2));
    assertEquals(Power.parse("1.2 uW"), Power.microwatts(1.2));
    assertEquals(Intensity.parse("1.2 W/mm2"), Intensity.wattsPerSquareMillimetre(1.2));
    assertEquals(Intensity.parse("1.2 W/cm2"), Intensity.wattsPerSquareCentimetre(1.2));
    assertEquals(Intensity.parse("1.2 mW/cm2"), Intensity.milliwattsPerSquareCentimetre(1.2));
    assertEquals(Length.parse("1.2 nm"), Length.nanometres(1.2));
    assertEquals(MagneticField.parse("1.2 mG"), MagneticField.milligauss(1.2));
    assertEquals(MagneticField.parse("1.2 G"), MagneticField.gauss(1.2));
    assertEquals(ElectricField.parse("1.2 V/cm"), ElectricField.voltsPerCentimetre(1.2));
    assertEquals(ElectricField.parse("1.2 mV/cm"), ElectricField.millivoltsPerCentimetre(1.2));
    assertEquals(Temperature.parse("1.2 uK"), Temperature.microkelvin(1.2));
    assertEquals(Time.parse("1.2 us"), Time.microseconds(1.2));
  }

  @ParameterizedTest
  @ValueSource(
      strings = {
        "",
        "4",
        "G",
        "4 g",
        "4 Gauss",
        "NaN G",
        "Infinity G",
        "4,0 G",
        "4 G G",
        "1e999 G",
        "0x1 G",
        "4 4 G",
        "--4 G"
      })
  void refusesWhatIsNotANumberAndAUnitAndListsTheUnits(String text) {
    var e = assertThrows(IllegalArgumentException.class, () -> MagneticField.parse(text));
    assertTrue(e.getMessage().contains("magnetic field \"" + text + "\""), e.getMessage());
    assertTrue(e.getMessage().contains("T, mT, G, uT, mG"), e.getMessage());
  }

  @Property(seed = "20261201", tries = 500)
  void printedFormReadsBackExactly(@ForAll @DoubleRange(min = -1e20, max = 1e20) double si) {
    roundTrip(Frequency.ofHertz(si), Frequency::parse);
    roundTrip(Length.ofMetres(si * 1e-20), Length::parse);
    roundTrip(MagneticField.ofTesla(si * 1e-24), MagneticField::parse);
    roundTrip(ElectricField.ofVoltsPerMetre(si), ElectricField::parse);
    roundTrip(Time.ofSeconds(si * 1e-28), Time::parse);
    roundTrip(Intensity.ofWattsPerSquareMetre(si), Intensity::parse);
    roundTrip(Power.ofWatts(si * 1e-15), Power::parse);
    roundTrip(Temperature.ofKelvin(Math.abs(si) * 1e-25), Temperature::parse);
  }

  private static <Q> void roundTrip(Q quantity, Function<String, Q> parse) {
    assertEquals(quantity, parse.apply(quantity.toString()));
  }

  @Property(seed = "20261202", tries = 200)
  void angularFrequencyIsTwoPiTimesOrdinary(
      @ForAll @DoubleRange(min = -1e16, max = 1e16) double hertz) {
    assertEquals(2 * Math.PI * hertz, Frequency.ofHertz(hertz).radiansPerSecond());
    assertEquals(
        hertz, Frequency.ofRadiansPerSecond(2 * Math.PI * hertz).hertz(), Math.abs(hertz) * 4e-16);
  }

  @Test
  void printsTheFittingUnit() {
    assertEquals("4 G", MagneticField.ofTesla(4e-4).toString());
    assertEquals("1.2 GHz", Frequency.ofHertz(1.2e9).toString());
    assertEquals("0 Hz", Frequency.ofHertz(-0.0).toString());
    assertEquals("-20 um", Length.ofMetres(-20e-6).toString());
  }

  @Test
  void equalityAndOrderFollowTheValue() {
    assertEquals(Time.nanoseconds(1000), Time.microseconds(1));
    assertEquals(Time.nanoseconds(1000).hashCode(), Time.microseconds(1).hashCode());
    assertEquals(Time.ofSeconds(0.0), Time.ofSeconds(-0.0));
    assertNotEquals((Object) Time.ofSeconds(1), Length.ofMetres(1));
    assertTrue(Time.nanoseconds(999).compareTo(Time.microseconds(1)) < 0);
  }

  @Test
  void temperatureIsNeverBelowZero() {
    var e = assertThrows(IllegalArgumentException.class, () -> Temperature.parse("-1 mK"));
    assertTrue(e.getMessage().contains("below 0 K"), e.getMessage());
    assertEquals(0, Temperature.ofKelvin(0).kelvin());
  }

  @Test
  void estimateChecksItsPartsAndKnowsItsRelativeSize() {
    assertEquals(0.1, new Estimate(-5, 0.5).relative());
    assertEquals(0, new Estimate(0, 0).relative());
    assertThrows(ArithmeticException.class, () -> new Estimate(0, 1).relative());
    assertThrows(IllegalArgumentException.class, () -> new Estimate(Double.NaN, 0));
    assertThrows(IllegalArgumentException.class, () -> new Estimate(1, -1));
    assertThrows(IllegalArgumentException.class, () -> new Estimate(1, Double.NaN));
    assertThrows(IllegalArgumentException.class, () -> new Estimate(1, Double.POSITIVE_INFINITY));
  }

  // relations between constants that CODATA publishes separately, values from memory
  @Test
  void constantsAgreeWithEachOther() {
    double alpha =
        PhysicalConstants.ELEMENTARY_CHARGE
            * PhysicalConstants.ELEMENTARY_CHARGE
            / (4
                * Math.PI
                * PhysicalConstants.VACUUM_PERMITTIVITY
                * PhysicalConstants.REDUCED_PLANCK
                * PhysicalConstants.SPEED_OF_LIGHT);
    assertEquals(PhysicalConstants.FINE_STRUCTURE, alpha, 3e-10 * alpha);
    double bohr =
        PhysicalConstants.REDUCED_PLANCK
            / (PhysicalConstants.ELECTRON_MASS * PhysicalConstants.SPEED_OF_LIGHT * alpha);
    assertEquals(PhysicalConstants.BOHR_RADIUS, bohr, 1e-9 * bohr);
    double rydberg =
        alpha
            * alpha
            * PhysicalConstants.ELECTRON_MASS
            * PhysicalConstants.SPEED_OF_LIGHT
            * PhysicalConstants.SPEED_OF_LIGHT
            / (2 * PhysicalConstants.PLANCK);
    assertEquals(PhysicalConstants.RYDBERG_HERTZ, rydberg, 1e-9 * rydberg);
    assertEquals(
        PhysicalConstants.ELECTRON_MASS_U,
        PhysicalConstants.ELECTRON_MASS / PhysicalConstants.ATOMIC_MASS_UNIT,
        1e-12);
    assertEquals(
        13.996_244_936e9, PhysicalConstants.BOHR_MAGNETON_HERTZ_PER_TESLA, 13.996e9 * 1e-9);
    // (e a0)^2/E_h = 1.648 777 274 36e-41 C^2 m^2/J
    assertEquals(
        1.648_777_274_36e-41,
        PhysicalConstants.ATOMIC_POLARIZABILITY_HERTZ * PhysicalConstants.PLANCK,
        1.6e-41 * 1e-9);
  }
}
