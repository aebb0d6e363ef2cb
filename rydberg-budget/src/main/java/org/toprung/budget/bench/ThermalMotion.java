package org.toprung.budget.bench;

import java.util.List;
import java.util.Optional;
import org.toprung.core.quantity.Frequency;
import org.toprung.core.quantity.PhysicalConstants;
import org.toprung.core.quantity.Temperature;

/**
 * Spread of velocity and position of a trapped atom along the three lab axes.
 *
 * <p>A harmonic oscillator of frequency f at temperature T has Gaussian velocity and position with
 * m σ<sub>v</sub>² = k T<sub>eff</sub> and σ<sub>x</sub> = σ<sub>v</sub>/2πf, where k
 * T<sub>eff</sub> = (hf/2) coth(hf/2kT) tends to kT when hot and to half a quantum in the ground
 * state. Without trap frequencies T<sub>eff</sub> = T and the position is unknown. Reference:
 * Cohen-Tannoudji, Diu and Laloë, Quantum Mechanics, complement L<sub>III</sub> (coth form).
 *
 * <p>Immutable.
 */
public final class ThermalMotion {
  private final double[] velocity; // m/s
  private final double[] position; // m; null when unknown

  private ThermalMotion(double[] velocity, double[] position) {
    this.velocity = velocity;
    this.position = position;
  }

  /**
   * The motion of an atom.
   *
   * @param massKilograms mass of the atom, kg
   * @param temperature temperature, above zero
   * @param trap trap frequencies along x, y and z, if known
   * @return the spreads
   */
  public static ThermalMotion of(
      double massKilograms, Temperature temperature, Optional<List<Frequency>> trap) {
    double thermal = PhysicalConstants.BOLTZMANN * temperature.kelvin();
    double[] velocity = new double[3];
    double[] position = new double[3];
    for (int a = 0; a < 3; a++) {
      double energy = thermal;
      if (trap.isPresent()) {
        double half = 0.5 * PhysicalConstants.PLANCK * trap.get().get(a).hertz();
        energy = half / Math.tanh(half / thermal);
      }
      velocity[a] = Math.sqrt(energy / massKilograms);
      if (trap.isPresent()) {
        position[a] = velocity[a] / trap.get().get(a).radiansPerSecond();
      }
    }
    return new ThermalMotion(velocity, trap.isPresent() ? position : null);
  }

  /**
   * Spread of a velocity component.
   *
   * @param axis 0, 1, 2 for lab x, y, z
   * @return root mean square, m/s
   */
  public double velocityMetresPerSecond(int axis) {
    return velocity[axis];
  }

  /**
   * Whether trap frequencies were given, so that the position is known.
   *
   * @return true if {@link #positionMetres} may be called
   */
  public boolean isTrapped() {
    return position != null;
  }

  /**
   * Spread of a position component.
   *
   * @param axis 0, 1, 2 for lab x, y, z
   * @return root mean square, m
   * @throws IllegalStateException if no trap frequencies were given
   */
  public double positionMetres(int axis) {
    if (position == null) {
      throw new IllegalStateException("the position of an untrapped atom is not known");
    }
    return position[axis];
  }
}
