package org.toprung.core.drive;

import java.util.List;
import java.util.Locale;
import java.util.stream.IntStream;
import org.toprung.angular.SphericalComponents;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.quantity.PhysicalConstants;
import org.toprung.core.structure.DipoleElement;
import org.toprung.core.structure.DipoleElements;
import org.toprung.core.structure.QuadrupoleElements;
import org.toprung.core.structure.ReducedElement;

/** The light of every step at the atom, and the Rabi frequencies it drives. Immutable. */
final class StepLight {
  /** Parts of the light or of a coupling below this fraction do not count. */
  static final double NEGLIGIBLE = 1e-12;

  private static final double DIPOLE_UNIT = // e a0/h, Hz/(V/m)
      PhysicalConstants.ATOMIC_DIPOLE / PhysicalConstants.PLANCK;

  private final DriveSetup setup;
  private final RotatingFrame frame;
  private final Species species;
  private final DipoleElements dipoles;
  private final double[] field; // V/m by step
  private final SphericalComponents[] light;
  private final LightTensor[] tensor;

  StepLight(DriveSetup setup, RotatingFrame frame) {
    this.setup = setup;
    this.frame = frame;
    this.species = setup.species();
    this.dipoles = DipoleElements.of(species);
    int steps = setup.steps();
    this.field = new double[steps];
    this.light = new SphericalComponents[steps];
    this.tensor = new LightTensor[steps];
    for (int k = 0; k < steps; k++) {
      light[k] = setup.beam(k).polarizationVector().componentsAbout(0, 0, 1);
      tensor[k] =
          setup.isQuadrupole(k)
              ? LightTensor.quadrupole(light[k], setup.beam(k).direction())
              : LightTensor.dipole(light[k]);
      field[k] = fieldAtAtom(k);
    }
  }

  double fieldVoltsPerMetre(int step) {
    return field[step];
  }

  SphericalComponents polarization(int step) {
    return light[step];
  }

  /** By how much the light of a step may change J. */
  int rank(int step) {
    return tensor[step].rank();
  }

  private double fieldAtAtom(int step) {
    Beam beam = setup.beam(step);
    double atAtom = beam.fieldVoltsPerMetre(RotatingFrame.wavelength(frame.laserHertz(step)));
    if (!(atAtom > NEGLIGIBLE * beam.peakFieldVoltsPerMetre())) {
      double[] f = beam.focusMetres();
      throw new IllegalArgumentException(
          String.format(
              Locale.ROOT,
              "beam %d misses the atom: focused at (%.6g, %.6g, %.6g) um from it, it has %.2g of its"
                  + " peak field there (allowed: more than %.0e)",
              step + 1,
              f[0] * 1e6,
              f[1] * 1e6,
              f[2] * 1e6,
              atAtom / beam.peakFieldVoltsPerMetre(),
              NEGLIGIBLE));
    }
    return atAtom;
  }

  /** The reduced element of a step between named levels. */
  ReducedElement element(int step) {
    return element(setup, step);
  }

  /**
   * The reduced element of a step between named levels.
   *
   * @throws IllegalArgumentException if the step is forbidden; the message names the rule
   */
  static ReducedElement element(DriveSetup setup, int step) {
    Level upper = setup.named(step + 1);
    Level lower = setup.named(step);
    return setup.isQuadrupole(step)
        ? QuadrupoleElements.of(setup.species()).reduced(upper, lower)
        : DipoleElements.of(setup.species()).reduced(upper, lower);
  }

  /** The reduced element between two levels. */
  DipoleElement element(Level upper, Level lower) {
    return dipoles.reduced(upper, lower);
  }

  /** Complex Rabi frequency over 2π, Hz; zero where J forbids. */
  double[] rabi(ProductState lower, ProductState upper, int step) {
    int change = Math.abs(lower.level().doubledJ() - upper.level().doubledJ());
    if (change > 2 * tensor[step].rank()) {
      return new double[2];
    }
    double[] angular = ProductState.angular(lower, upper, tensor[step]);
    if (angular[0] == 0 && angular[1] == 0) {
      return angular;
    }
    double scale = field[step] * transitionHertz(upper.level(), lower.level(), step);
    return new double[] {scale * angular[0], scale * angular[1]};
  }

  /**
   * What multiplies field and angular factor: (e/h)⟨‖r‖⟩ for a dipole, (e k/2h)⟨‖r²C²‖⟩ for a
   * quadrupole, Hz/(V/m).
   */
  private double transitionHertz(Level upper, Level lower, int step) {
    if (!setup.isQuadrupole(step)) {
      return DIPOLE_UNIT * dipoles.reduced(upper, lower).valueA0();
    }
    double waveNumber = 2 * Math.PI * frame.laserHertz(step) / PhysicalConstants.SPEED_OF_LIGHT;
    return DIPOLE_UNIT
        * 0.5
        * waveNumber
        * PhysicalConstants.BOHR_RADIUS
        * QuadrupoleElements.of(species).reduced(upper, lower).valueA0Squared();
  }

  /** By how much the light of a step changes m. */
  List<Integer> photons(int step) {
    int rank = tensor[step].rank();
    return IntStream.rangeClosed(-rank, rank)
        .filter(q -> tensor[step].power(q) > NEGLIGIBLE)
        .boxed()
        .toList();
  }
}
