package org.toprung.core.drive;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.toprung.angular.Polarization.SIGMA_MINUS;
import static org.toprung.angular.Polarization.SIGMA_PLUS;
import static org.toprung.core.quantity.Frequency.gigahertz;
import static org.toprung.core.quantity.Length.micrometres;
import static org.toprung.core.quantity.MagneticField.gauss;
import static org.toprung.core.quantity.Power.milliwatts;

import java.io.BufferedReader;
import java.io.IOException;
import java.io.InputStreamReader;
import java.nio.charset.StandardCharsets;
import java.util.HashMap;
import java.util.Map;
import org.apache.commons.math4.legacy.linear.Array2DRowRealMatrix;
import org.apache.commons.math4.legacy.linear.EigenDecomposition;
import org.junit.jupiter.api.Test;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.atom.Sublevel;

/**
 * Validation of a whole drive against {@code drive_example.csv}, worked out elsewhere by full
 * diagonalization (NumPy/SymPy), to 2 %, and against the exact eigenvalues of its own Hamiltonian.
 */
class DriveReferenceTest {
  private static final Drive DRIVE =
      Drive.of(Species.RUBIDIUM_87)
          .from(Sublevel.hyperfine("5S1/2", 2, 2))
          .step(
              Level.parse("6P3/2"),
              Beam.gaussian(milliwatts(2), micrometres(20)).polarized(SIGMA_PLUS).along(0, 0, 1))
          .step(
              Sublevel.fine("68S1/2", 0.5),
              Beam.gaussian(milliwatts(150), micrometres(25))
                  .polarized(SIGMA_MINUS)
                  .along(0, 0, -1))
          .detuned(gigahertz(1.2))
          .in(gauss(4))
          .resolve();

  private static Map<String, Double> reference() throws IOException {
    Map<String, Double> values = new HashMap<>();
    try (BufferedReader in =
        new BufferedReader(
            new InputStreamReader(
                DriveReferenceTest.class.getResourceAsStream("drive_example.csv"),
                StandardCharsets.UTF_8))) {
      in.lines()
          .filter(line -> !line.startsWith("#") && !line.startsWith("quantity"))
          .map(line -> line.split(","))
          .forEach(cells -> values.put(cells[0], Double.parseDouble(cells[1])));
    }
    return values;
  }

  @Test
  void hasTheRabiFrequenciesOfTheWorkedExample() throws IOException {
    Map<String, Double> reference = reference();
    within2Percent(reference.get("step1_rabi"), DRIVE.steps().get(0).rabi().hertz() * 1e-6);
    within2Percent(reference.get("step2_rabi"), DRIVE.steps().get(1).rabi().hertz() * 1e-6);
    within2Percent(reference.get("effective_rabi"), DRIVE.rabi().hertz() * 1e-6);
  }

  /** The example has the shifts of the 6P3/2 manifold alone, so the far ones are taken off. */
  @Test
  void hasTheLightShiftsOfTheWorkedExample() throws IOException {
    Map<String, Double> reference = reference();
    Ladder ladder = DRIVE.ladder();
    double farStart =
        ladder.farShiftHertz(ladder.start(), 0) + ladder.farShiftHertz(ladder.start(), 1);
    int wanted = ladder.wanted()[0];
    double farTarget = ladder.farShiftHertz(wanted, 0) + ladder.farShiftHertz(wanted, 1);
    within2Percent(
        reference.get("start_light_shift"), (DRIVE.startLightShift().hertz() - farStart) * 1e-6);
    within2Percent(
        reference.get("target_light_shift"), (DRIVE.targetLightShift().hertz() - farTarget) * 1e-6);
  }

  @Test
  void hasTheScatteringOfTheWorkedExample() throws IOException {
    double tau = 1 / (2 * DRIVE.rabi().hertz());
    within2Percent(
        reference().get("scattering_probability_pi_pulse"), DRIVE.meanScatteringPerSecond() * tau);
  }

  private static void within2Percent(double expected, double actual) {
    assertEquals(expected, actual, 0.02 * Math.abs(expected));
  }

  /**
   * Exact: on the light-shifted resonance the two eigenvalues that belong to start and target are
   * one Rabi frequency apart. Commons Math diagonalizes the real symmetric Hamiltonian; 1 % is the
   * target for second order, 10⁻⁶ for the plan.
   */
  @Test
  void agreesWithFullDiagonalization() {
    PulsePlan plan = DRIVE.plan(Math.PI);
    double splitting = splitting(plan.frequencyOffset().hertz());
    assertEquals(splitting, plan.rabi().hertz(), 1e-6 * splitting);
    assertEquals(splitting, DRIVE.rabi().hertz(), 0.01 * splitting);
    // the splitting √(δ² + Ω(δ)²) is smallest at δ = −ΩΩ′, and Ω ∝ (1/Δ + 1/(Δ+δ))/2 puts that at
    // Ω²/2Δ
    double step = 1e5;
    double before = splitting(plan.frequencyOffset().hertz() - step);
    double after = splitting(plan.frequencyOffset().hertz() + step);
    assertTrue(before > splitting && after > splitting);
    double minimum = 0.5 * step * (before - after) / (before - 2 * splitting + after);
    assertEquals(splitting * splitting / (2 * 1.13e9), Math.abs(minimum), 0.1 * Math.abs(minimum));
  }

  private static double splitting(double offset) {
    Ladder ladder = DRIVE.ladder();
    int n = ladder.size();
    double[] re = new double[n * n];
    double[] im = new double[n * n];
    ladder.hamiltonianHertz(LadderSetting.nominal(2).withLaserOffset(1, offset), re, im);
    Array2DRowRealMatrix h = new Array2DRowRealMatrix(n, n);
    for (int i = 0; i < n; i++) {
      for (int j = 0; j < n; j++) {
        h.setEntry(i, j, re[i * n + j]);
        assertEquals(0, im[i * n + j], 0);
      }
    }
    EigenDecomposition eigen = new EigenDecomposition(h);
    // the pair with the largest weight on start and target
    int first = -1;
    int second = -1;
    double[] weight = new double[n];
    for (int k = 0; k < n; k++) {
      double s = eigen.getV().getEntry(ladder.start(), k);
      double t = eigen.getV().getEntry(ladder.wanted()[0], k);
      weight[k] = s * s + t * t;
      if (first < 0 || weight[k] > weight[first]) {
        second = first;
        first = k;
      } else if (second < 0 || weight[k] > weight[second]) {
        second = k;
      }
    }
    return Math.abs(eigen.getRealEigenvalue(first) - eigen.getRealEigenvalue(second));
  }

  /** Validation: vacuum wavelengths near 420.3 nm and 1013 nm (common practice). */
  @Test
  void hasTheWavelengthsOfTheTrade() {
    assertEquals(420.3e-9, DRIVE.steps().get(0).wavelength().metres(), 0.1e-9);
    assertEquals(1013e-9, DRIVE.steps().get(1).wavelength().metres(), 1.5e-9);
  }

  /** A stretched start and an mJ = 1/2 target have the same slope to the nuclear part. */
  @Test
  void hardlyMovesWithTheFieldBetweenStretchedStates() {
    double magneton = 1.4e10; // Hz/T
    assertTrue(Math.abs(DRIVE.magneticSensitivityHertzPerTesla()) < 0.01 * magneton);
  }

  @Test
  void namesNoOtherTargetBetweenStretchedStates() {
    assertEquals(0, DRIVE.otherTargets().size());
    assertEquals(1, DRIVE.ladder().wanted().length);
    assertEquals(
        "68S1/2 mJ=1/2 mI=3/2", DRIVE.ladder().states().get(DRIVE.ladder().wanted()[0]).label());
  }
}
