package org.toprung.core.drive;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.toprung.core.quantity.ElectricField.millivoltsPerCentimetre;
import static org.toprung.core.quantity.Frequency.gigahertz;
import static org.toprung.core.quantity.Length.micrometres;
import static org.toprung.core.quantity.MagneticField.gauss;
import static org.toprung.core.quantity.Power.milliwatts;

import java.util.List;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.constraints.DoubleRange;
import org.junit.jupiter.api.Test;
import org.toprung.angular.Polarization;
import org.toprung.angular.Rotation;
import org.toprung.angular.Wigner;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.atom.Sublevel;
import org.toprung.core.quantity.ElectricField;
import org.toprung.core.quantity.Intensity;
import org.toprung.core.quantity.Length;
import org.toprung.core.quantity.PhysicalConstants;
import org.toprung.core.structure.StarkShift;
import org.toprung.core.structure.StaticPolarizability;

/** Drives with beams of any shape and place, and fields of any direction. */
class GeometryTest {
  private static final Beam LOWER =
      Beam.gaussian(milliwatts(0.2), micrometres(30))
          .polarized(Polarization.SIGMA_PLUS)
          .along(0, 0, 1);
  private static final Beam UPPER =
      Beam.gaussian(milliwatts(100), micrometres(30))
          .polarized(Polarization.SIGMA_MINUS)
          .along(0, 0, -1);
  private static final Length ZERO = micrometres(0);
  private static final ElectricField NONE = ElectricField.ofVoltsPerMetre(0);

  private static DriveSetup rubidium(Beam lower, Beam upper, String target, double mJ) {
    return Drive.of(Species.RUBIDIUM_87)
        .from(Sublevel.hyperfine("5S1/2", 2, 2))
        .step(Level.parse("5P3/2"), lower)
        .step(Sublevel.fine(target, mJ), upper)
        .detuned(gigahertz(3))
        .in(gauss(3));
  }

  private static DriveSetup rubidium() {
    return rubidium(LOWER, UPPER, "60S1/2", 0.5);
  }

  private static void close(double expected, double actual, double relative) {
    assertEquals(expected, actual, relative * Math.abs(expected));
  }

  /** Definition of the waist: at one waist from the axis the field, and so Ω, has fallen to 1/e. */
  @Test
  void drivesWithTheFieldAtTheAtomNotInTheFocus() {
    Drive centred = rubidium().resolve();
    Beam off = LOWER.focusedAt(ZERO, micrometres(30), ZERO);
    Drive shifted = rubidium(off, UPPER, "60S1/2", 0.5).resolve();
    Drive.Step step = shifted.steps().get(0);
    close(centred.steps().get(0).rabi().hertz() / Math.E, step.rabi().hertz(), 1e-9);
    close(centred.steps().get(1).rabi().hertz(), shifted.steps().get(1).rabi().hertz(), 1e-9);
    // the shift of the start by far levels moves the intermediate detuning by a few parts in 1e8
    close(centred.rabi().hertz() / Math.E, shifted.rabi().hertz(), 1e-6);
    double e2 = Math.exp(-2);
    close(e2 * farShift(centred, 0), farShift(shifted, 0), 1e-9);
    close(farShift(centred, 1), farShift(shifted, 1), 1e-9);
    close(LOWER.peakFieldVoltsPerMetre() / Math.E, step.fieldVoltsPerMetre(), 1e-12);
    assertEquals(1, step.fieldFactorAt(0, 0, 0));
    close(Math.E, step.fieldFactorAt(0, 30e-6, 0), 1e-12);
  }

  private static double farShift(Drive drive, int step) {
    return drive.ladder().farShiftHertz(drive.ladder().start(), step);
  }

  /** Definition of the Rayleigh range, at the wavelength of the step. */
  @Test
  void defocusesByTheWavelengthOfTheStep() {
    Drive centred = rubidium().resolve();
    double range = Math.PI * 9e-10 / centred.steps().get(1).wavelength().metres();
    Beam ahead = UPPER.focusedAt(ZERO, ZERO, Length.ofMetres(range));
    Drive shifted = rubidium(LOWER, ahead, "60S1/2", 0.5).resolve();
    double rabi = shifted.steps().get(1).rabi().hertz();
    close(centred.steps().get(1).rabi().hertz() * Math.sqrt(0.5), rabi, 1e-9);
  }

  /** Moving the atom one way is moving every beam the other way. */
  @Test
  void movesTheAtomAgainstTheBeams() {
    Drive atom = rubidium().atomAt(micrometres(5), micrometres(-8), micrometres(300)).resolve();
    Length x = micrometres(-5);
    Length y = micrometres(8);
    Length z = micrometres(-300);
    Drive beams =
        rubidium(LOWER.focusedAt(x, y, z), UPPER.focusedAt(x, y, z), "60S1/2", 0.5).resolve();
    assertEquals(beams.rabi().hertz(), atom.rabi().hertz(), 1e-9 * atom.rabi().hertz());
    assertTrue(atom.rabi().hertz() < 0.95 * rubidium().resolve().rabi().hertz());
    assertArrayEquals(new double[] {-5e-6, 8e-6, -3e-4}, atom.steps().get(0).beam().focusMetres());
  }

  /** An intensity given directly is the peak intensity 2P/πw² of a Gaussian beam. */
  @Test
  void takesAnIntensityInsteadOfPowerAndWaist() {
    double i0 = 2 * 0.2e-3 / (Math.PI * 9e-10);
    Beam flat =
        Beam.flatTop(Intensity.ofWattsPerSquareMetre(i0))
            .polarized(Polarization.SIGMA_PLUS)
            .along(0, 0, 1);
    close(
        rubidium().resolve().rabi().hertz(),
        rubidium(flat, UPPER, "60S1/2", 0.5).resolve().rabi().hertz(),
        1e-9);
  }

  @Test
  void refusesABeamThatMissesTheAtom() {
    Beam off = UPPER.focusedAt(ZERO, micrometres(200), ZERO);
    DriveSetup setup = rubidium(LOWER, off, "60S1/2", 0.5);
    String message = assertThrows(IllegalArgumentException.class, setup::resolve).getMessage();
    assertTrue(message.contains("beam 2 misses the atom"), message);
    assertTrue(message.contains("200"), message);
  }

  /** Definition of the divergence λ/πw: 780 nm reach 0.3 rad at 0.83 um. */
  @Test
  void warnsOfTightFoci() {
    Beam tight =
        Beam.elliptical(milliwatts(1e-4), micrometres(0.8), micrometres(0.9), 1, 0, 0)
            .polarized(Polarization.SIGMA_PLUS)
            .along(0, 0, 1);
    List<String> warnings = rubidium(tight, UPPER, "60S1/2", 0.5).resolve().warnings();
    assertEquals(1, warnings.size(), warnings.toString());
    assertTrue(warnings.get(0).contains("beam 1"), warnings.get(0));
    assertTrue(warnings.get(0).contains("800 nm"), warnings.get(0));
  }

  /** The trap light, too, is that at the atom: 1/e² of the intensity at its waist. */
  @Test
  void shiftsByTheTrapLightAtTheAtom() {
    Beam trap =
        Beam.gaussian(milliwatts(5), micrometres(20))
            .polarized(Polarization.linearDegrees(0))
            .along(0, 1, 0);
    Length wavelength = Length.nanometres(850);
    Drive centred = rubidium().trappedBy(trap, wavelength).resolve();
    Drive off =
        rubidium().trappedBy(trap, wavelength).atomAt(micrometres(20), ZERO, ZERO).resolve();
    double expected = Math.exp(-2) * centred.trap().orElseThrow().startShift().hertz();
    close(expected, off.trap().orElseThrow().startShift().hertz(), 1e-9);
  }

  /** σ− light in a fraction f of the lower beam takes √(1−f) of the field from the σ+ path. */
  @Test
  void takesTheImpurityFromTheWantedPath() {
    Drive clean = rubidium().resolve();
    Drive impure = rubidium(LOWER.impure(0.04), UPPER, "60S1/2", 0.5).resolve();
    close(Math.sqrt(0.96) * clean.rabi().hertz(), impure.rabi().hertz(), 1e-4);
    assertTrue(clean.otherTargets().isEmpty());
    assertTrue(impure.otherTargets().size() > 0);
    // the light the impurity adds reaches other targets with √f of the field
    double other = impure.otherTargets().get(0).rabi().hertz();
    double stronger =
        rubidium(LOWER.impure(0.16), UPPER, "60S1/2", 0.5)
            .resolve()
            .otherTargets()
            .get(0)
            .rabi()
            .hertz();
    close(2 * other, stronger, 1e-5); // the clean light is weaker, and so is its shift
  }

  /**
   * Published: the recoil frequency of Rb-87 on the D2 line is 3.771 kHz and the wave number 2π ·
   * 12816.5 /cm (Steck, Rubidium 87 D Line Data); the two-photon recoil follows Σk².
   */
  @Test
  void recoilsByTheSquareOfTheSummedWaveVector() {
    for (double direction : new double[] {1, -1}) {
      Drive drive = rubidium(LOWER, UPPER.along(0, 0, direction), "60S1/2", 0.5).resolve();
      double d2 = 2 * Math.PI * 12816.5e2;
      double ratio = drive.waveVectorPerMetre()[2] / d2;
      close(3.771e3 * ratio * ratio, drive.recoilShift().hertz(), 3e-4);
    }
  }

  /**
   * Measured polarizability of Rb nS, O'Sullivan and Stoicheff, Phys. Rev. A 31, 2718 (1985), from
   * memory: 2.202e-9 n*⁶ + 5.53e-11 n*⁷ MHz/(V/cm)²; shift −½αE².
   */
  @Test
  void shiftsTheTargetAndTheLastLaserInAnElectricField() {
    Drive without = rubidium().resolve();
    Drive with = rubidium().inElectricField(NONE, NONE, millivoltsPerCentimetre(100)).resolve();
    double n = Species.RUBIDIUM_87.effectiveN(Level.parse("60S1/2"));
    double alpha = 2.202e-9 * Math.pow(n, 6) + 5.53e-11 * Math.pow(n, 7);
    close(-0.5 * alpha * 0.01 * 1e6, with.starkShift().hertz(), 0.03);
    assertEquals(0, without.starkShift().hertz());
    assertArrayEquals(new double[] {0, 0, 10}, with.electricFieldVoltsPerMetre());
    double c = PhysicalConstants.SPEED_OF_LIGHT;
    double moved =
        c / with.steps().get(1).wavelength().metres()
            - c / without.steps().get(1).wavelength().metres();
    assertEquals(with.starkShift().hertz(), moved, 1); // rounding of a 600 THz frequency
    assertEquals(
        without.steps().get(0).wavelength().metres(), with.steps().get(0).wavelength().metres());
    close(without.rabi().hertz(), with.rabi().hertz(), 1e-6);
    assertEquals(List.of(), with.warnings());
  }

  /** Every other target moves by its own shift against the wanted one. */
  @Test
  void movesOtherTargetsByTheirOwnShift() {
    Beam lower = LOWER.polarized(Polarization.linearDegrees(30)).along(1, 0, 0);
    Beam upper = UPPER.polarized(Polarization.linearDegrees(70)).along(1, 0, 0);
    DriveSetup setup = rubidium(lower, upper, "50D5/2", 2.5);
    Drive without = setup.resolve();
    Drive with = setup.inElectricField(NONE, NONE, millivoltsPerCentimetre(40)).resolve();
    StaticPolarizability alpha = StaticPolarizability.of(Species.RUBIDIUM_87);
    double tensor = alpha.tensorHertzPerFieldSquared(Level.parse("50D5/2")).value();
    // (3m² − J(J+1))/J(2J−1) is 1 at m = 5/2 and −4/5 at 1/2
    double expected = -0.5 * tensor * 16 * (1 - (-0.8));
    double before = detuning(without, "50D5/2 mJ=1/2 mI=3/2");
    double after = detuning(with, "50D5/2 mJ=1/2 mI=3/2");
    close(expected, after - before, 1e-6);
    Drive fine = setup.inElectricField(NONE, NONE, NONE).resolve();
    assertEquals(before, detuning(fine, "50D5/2 mJ=1/2 mI=3/2"));
    double scalarOther = alpha.scalarHertzPerFieldSquared(Level.parse("50D3/2")).value();
    double tensorOther = alpha.tensorHertzPerFieldSquared(Level.parse("50D3/2")).value();
    double scalar = alpha.scalarHertzPerFieldSquared(Level.parse("50D5/2")).value();
    double partner = -0.5 * 16 * (scalar + tensor - (scalarOther + tensorOther));
    close(
        partner,
        detuning(with, "50D3/2 mJ=3/2 mI=3/2") - detuning(without, "50D3/2 mJ=3/2 mI=3/2"),
        1e-4);
  }

  private static double detuning(Drive drive, String sublevel) {
    return drive.otherTargets().stream()
        .filter(t -> t.sublevel().equals(sublevel))
        .findFirst()
        .orElseThrow(() -> new AssertionError(sublevel + " not in " + drive.otherTargets()))
        .detuning()
        .hertz();
  }

  /**
   * Exact: with one level at the distance D and the coupling V the shift is √(D²/4 + V²) − D/2, so
   * that a tenth of D is 10 % short of V²/D; the warning begins there.
   */
  @Test
  void warnsInTheLinearStarkRegime() {
    StarkShift stark = StarkShift.of(Species.RUBIDIUM_87, Sublevel.fine("60S1/2", 0.5));
    // 60S is 0.49 of the spacing 2Ry/n*³ from 59P and 60P, below the middle
    double n = Species.RUBIDIUM_87.effectiveN(Level.parse("60S1/2"));
    double spacing = 2 * PhysicalConstants.RYDBERG_HERTZ / (n * n * n);
    double distance = stark.distanceToOtherParityHertz();
    assertTrue(distance > 0.4 * spacing && distance < 0.5 * spacing, distance + " of " + spacing);
    double atLimit = Math.sqrt(0.1 * distance / -stark.hertz(0, 0, 1)); // V/m
    DriveSetup setup = rubidium();
    assertEquals(List.of(), inField(setup, 0.99 * atLimit).warnings());
    List<String> warnings = inField(setup, 1.01 * atLimit).warnings();
    assertEquals(1, warnings.size(), warnings.toString());
    assertTrue(warnings.get(0).contains("linear Stark regime"), warnings.get(0));
    assertTrue(warnings.get(0).contains("60S1/2 mJ=1/2"), warnings.get(0));
  }

  private static Drive inField(DriveSetup setup, double voltsPerMetre) {
    return setup
        .inElectricField(NONE, NONE, ElectricField.ofVoltsPerMetre(voltsPerMetre))
        .resolve();
  }

  /**
   * Wigner-Eckart: the tensor part is a rank-2 operator, so a field at the angle β to z couples m
   * with m + q by d²<sub>q0</sub>(β) and a 3j symbol, against the stretched diagonal element of a
   * field along z; d²<sub>20</sub>(90°) = √6/4, d²<sub>10</sub>(45°) = −√(3/8).
   */
  @Test
  void warnsWhereTheElectricFieldMixesSublevels() {
    Level level = Level.parse("60D5/2");
    double alpha2 =
        StaticPolarizability.of(Species.RUBIDIUM_87).tensorHertzPerFieldSquared(level).value();
    double stretched = Math.abs(Wigner.threeJDoubled(5, 4, 5, -5, 0, 5));
    double zeeman = // Hz between neighbours
        Species.RUBIDIUM_87.gJ(level) * PhysicalConstants.BOHR_MAGNETON_HERTZ_PER_TESLA * 3e-4;
    double two =
        0.5 * alpha2 * Math.sqrt(6) / 4 * Wigner.threeJDoubled(5, 4, 5, -5, 4, 1) / stretched;
    // the diagonal part across the field is −½ of that along it: 1 and −4/5 at m = 5/2 and 1/2
    double apart = 0.25 * alpha2 * (1 + 0.8);
    double across = Math.sqrt(0.1 * 2 * zeeman / (Math.abs(two) - 0.1 * apart));
    assertEquals(0, mixings(0.99 * across, 0, "1/2"));
    assertEquals(1, mixings(1.01 * across, 0, "1/2"));
    assertEquals(0, mixings(1.01 * across, 0, "3/2"));
    double one =
        0.5 * alpha2 * Math.sqrt(3.0 / 8) * Wigner.threeJDoubled(5, 4, 5, -5, 2, 3) / stretched;
    // P2(cos 45°) = 1/4 of the diagonal part: 1 and −1/5 at m = 5/2 and 3/2
    double apartOne = -0.125 * alpha2 * (1 + 0.2);
    double oblique = Math.sqrt(0.05 * zeeman / (Math.abs(one) - 0.1 * apartOne));
    assertEquals(0, mixings(0.99 * oblique, 0.99 * oblique, "3/2"));
    assertEquals(1, mixings(1.01 * oblique, 1.01 * oblique, "3/2"));
    assertEquals(0, mixings(0, across, "1/2") + mixings(0, across, "3/2"));
    ElectricField e = ElectricField.ofVoltsPerMetre(across);
    assertEquals(List.of(), rubidium().inElectricField(e, NONE, e).resolve().warnings());
  }

  /** Number of warnings that a field in the x-z plane mixes mJ = 5/2 with another sublevel. */
  private static long mixings(double ex, double ez, String other) {
    Beam upper = UPPER.polarized(Polarization.SIGMA_PLUS).along(0, 0, 1);
    return rubidium(LOWER, upper, "60D5/2", 2.5)
        .inElectricField(ElectricField.ofVoltsPerMetre(ex), NONE, ElectricField.ofVoltsPerMetre(ez))
        .resolve()
        .warnings()
        .stream()
        .filter(w -> w.contains("couples 60D5/2 mJ=5/2 with mJ=" + other))
        .count();
  }

  /** Exact: a shift counted from a field is a difference of shifts, linear in a small change. */
  @Test
  void countsAChangeOfFieldFromTheFieldThatIsThere() {
    StarkShift stark = StarkShift.of(Species.RUBIDIUM_87, Sublevel.fine("60D5/2", 1.5));
    StarkShift about = stark.about(3, -2, 5);
    assertEquals(0, about.hertz(0, 0, 0));
    close(stark.hertz(3.5, -2.1, 5.2) - stark.hertz(3, -2, 5), about.hertz(0.5, -0.1, 0.2), 1e-12);
    assertEquals(stark.relativeUncertainty(), about.relativeUncertainty());
  }

  /** Rotating every beam, polarization and field together changes nothing that can be measured. */
  @Property(tries = 12, seed = "61")
  void doesNotCareHowTheApparatusIsTurned(
      @ForAll @DoubleRange(min = -3, max = 3) double alpha,
      @ForAll @DoubleRange(min = 0, max = 3) double beta,
      @ForAll @DoubleRange(min = -3, max = 3) double gamma,
      @ForAll @DoubleRange(min = -40, max = 40) double ellipticity) {
    Beam lower =
        Beam.elliptical(milliwatts(0.2), micrometres(20), micrometres(40), 0, 1, 0)
            .polarized(Polarization.ellipticalDegrees(40, ellipticity))
            .impure(0.03, 50)
            .along(1, 0, 0.7)
            .focusedAt(micrometres(4), micrometres(7), micrometres(-100));
    Beam upper = UPPER.polarized(Polarization.linearDegrees(20)).along(-1, 0.3, 0.2);
    double[] e = {2, 1, -3};
    Drive straight = setup(lower, upper, e).resolve();
    Rotation turn = Rotation.ofEulerRadians(alpha, beta, gamma);
    double[] b = turn.appliedTo(0, 0, 1);
    ApparatusFrame frame = ApparatusFrame.withFieldAlong(2 * b[0], 2 * b[1], 2 * b[2]);
    double[] turnedField = turn.appliedTo(e[0], e[1], e[2]);
    Drive turned =
        setup(
                frame.toLab(lower.rotatedBy(turn)),
                frame.toLab(upper.rotatedBy(turn)),
                frame.toLab(turnedField[0], turnedField[1], turnedField[2]))
            .resolve();
    close(straight.rabi().hertz(), turned.rabi().hertz(), 1e-7);
    close(straight.startLightShift().hertz(), turned.startLightShift().hertz(), 1e-7);
    close(straight.targetLightShift().hertz(), turned.targetLightShift().hertz(), 1e-7);
    close(straight.starkShift().hertz(), turned.starkShift().hertz(), 1e-9);
    close(straight.meanScatteringPerSecond(), turned.meanScatteringPerSecond(), 1e-7);
    close(straight.recoilShift().hertz(), turned.recoilShift().hertz(), 1e-9);
    close(straight.admixture(), turned.admixture(), 1e-7);
    assertEquals(straight.otherTargets().size(), turned.otherTargets().size());
    for (int i = 0; i < 5; i++) {
      close(
          straight.otherTargets().get(i).rabi().hertz(),
          turned.otherTargets().get(i).rabi().hertz(),
          1e-7);
    }
    double[] k = turned.waveVectorPerMetre();
    double[] apparatus = frame.fromLab(k[0], k[1], k[2]);
    double[] s = straight.waveVectorPerMetre();
    assertArrayEquals(turn.appliedTo(s[0], s[1], s[2]), apparatus, 1);
  }

  private static DriveSetup setup(Beam lower, Beam upper, double[] e) {
    return rubidium(lower, upper, "50D5/2", 1.5)
        .inElectricField(
            ElectricField.ofVoltsPerMetre(e[0]),
            ElectricField.ofVoltsPerMetre(e[1]),
            ElectricField.ofVoltsPerMetre(e[2]));
  }

  /** With the field along x, light that is linear along x drives Δm = 0, as π does. */
  @Test
  void knowsPiLightByTheDirectionOfTheField() {
    ApparatusFrame frame = ApparatusFrame.withFieldAlong(0.5, 0, 0);
    // along apparatus z, where linear 0° is along x
    Beam beam = LOWER.polarized(Polarization.linearDegrees(0)).along(0, 0, 1);
    var a = frame.toLab(beam).polarizationVector().componentsAbout(0, 0, 1);
    assertEquals(1, a.power(0), 1e-14);
    // circular about z: half of it is linear along the field
    var c = frame.toLab(LOWER).polarizationVector().componentsAbout(0, 0, 1);
    assertEquals(0.5, c.power(0), 1e-14);
    assertEquals(0.25, c.power(1), 1e-14);
    assertArrayEquals(new double[] {0, 0, 1}, frame.toLab(1, 0, 0), 1e-15);
    ApparatusFrame straight = ApparatusFrame.withFieldAlong(0, 0, 3);
    assertArrayEquals(new double[] {1, 2, 3}, straight.toLab(1, 2, 3), 1e-15);
  }

  @Test
  void refusesFieldsWithoutDirection() {
    for (double bad : new double[] {0, Double.NaN, Double.POSITIVE_INFINITY}) {
      assertThrows(IllegalArgumentException.class, () -> ApparatusFrame.withFieldAlong(0, bad, 0));
    }
    assertThrows(
        IllegalStateException.class,
        () ->
            ApparatusFrame.withFieldAlong(1, 0, 0)
                .toLab(Beam.gaussian(milliwatts(1), micrometres(1))));
  }
}
