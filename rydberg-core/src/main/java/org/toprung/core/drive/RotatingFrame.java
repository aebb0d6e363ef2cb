package org.toprung.core.drive;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.quantity.Length;
import org.toprung.core.quantity.PhysicalConstants;

/**
 * The frame that rotates with the lasers: their frequencies, and how far they are from the levels
 * named for the rungs. Energies are over h, of levels as centres of gravity. Immutable.
 */
final class RotatingFrame {
  private static final double NEAR_FACTOR = 30;

  private final DriveSetup setup;
  private final Species species;
  private final int steps;
  private final double startEnergy; // Hz from the centre of gravity of the ground level
  private final double[] detuning; // Hz by rung, of the lasers up to it from the named level
  private final double[] laser; // Hz by step

  RotatingFrame(DriveSetup setup) {
    this.setup = setup;
    this.species = setup.species();
    this.steps = setup.steps();
    this.startEnergy =
        ProductState.hyperfine(species, setup.named(0), setup.field()).stream()
            .filter(this::isStart)
            .findFirst()
            .orElseThrow()
            .energyHertz();
    this.detuning = new double[steps + 1];
    for (int r = 1; r < steps; r++) {
      detuning[r] = detuning[r - 1] + setup.detuning(r - 1).hertz();
    }
    this.laser = lasers();
  }

  boolean isStart(ProductState s) {
    return s.doubledF() == setup.start().doubledF() && s.doubledM() == setup.start().doubledM();
  }

  double startEnergyHertz() {
    return startEnergy;
  }

  double laserHertz(int step) {
    return laser[step];
  }

  double detuningHertz(int rung) {
    return detuning[rung];
  }

  private double[] lasers() {
    double[] frequencies = new double[steps];
    double left = transition(setup.named(0), setup.named(steps)) - startEnergy + fieldShift();
    for (int k = 0; k < steps - 1; k++) {
      frequencies[k] = transition(setup.named(k), setup.named(k + 1)) + setup.detuning(k).hertz();
      if (k == 0) {
        frequencies[0] -= startEnergy;
      }
      left -= frequencies[k];
    }
    frequencies[steps - 1] = left;
    for (int k = 0; k < steps; k++) {
      if (!(frequencies[k] > 0)) {
        throw new IllegalArgumentException(
            String.format(
                Locale.ROOT,
                "step %d from %s to %s does not climb: at %s its laser would need %.6g THz, not a"
                    + " positive frequency",
                k + 1,
                setup.named(k),
                setup.named(k + 1),
                detunings(),
                frequencies[k] * 1e-12));
      }
    }
    return frequencies;
  }

  private String detunings() {
    List<String> given = new ArrayList<>();
    for (int k = 0; k < steps - 1; k++) {
      given.add(setup.detuning(k).toString());
    }
    return given.isEmpty() ? "no detuning" : "a detuning of " + String.join(" and ", given);
  }

  static Length wavelength(double laserHertz) {
    return Length.ofMetres(PhysicalConstants.SPEED_OF_LIGHT / laserHertz);
  }

  double transition(Level from, Level to) {
    return species.energyHertz(to).value() - species.energyHertz(from).value();
  }

  /** Electronic Zeeman shift and Stark shift of the wanted target, Hz. */
  double fieldShift() {
    double zeeman =
        0.5
            * setup.target().doubledM()
            * species.gJ(setup.named(steps))
            * PhysicalConstants.BOHR_MAGNETON_HERTZ_PER_TESLA
            * setup.field().tesla();
    return zeeman + stark(setup.named(steps), setup.target().doubledM());
  }

  double stark(Level level, int doubledMj) {
    return setup.electric().shiftHertz(species, level, doubledMj);
  }

  /** The named level itself, or a partner that the lasers are not much farther from. */
  boolean isNear(Level level, int rung) {
    return level.equals(setup.named(rung))
        || isNear(transition(setup.named(rung), level), detuning[rung]);
  }

  /** Whether lasers at a detuning from a level are near its partner at a distance from it, Hz. */
  static boolean isNear(double partnerHertz, double detuningHertz) {
    return Math.abs(detuningHertz - partnerHertz) < NEAR_FACTOR * Math.abs(detuningHertz);
  }

  static List<Level> fineStructure(Level level) {
    if (level.l() == 0) {
      return List.of(level);
    }
    return List.of(
        Level.of(level.n(), level.l(), 2 * level.l() - 1),
        Level.of(level.n(), level.l(), 2 * level.l() + 1));
  }
}
