package org.toprung.core.drive;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.toprung.angular.Wigner;
import org.toprung.core.atom.Level;
import org.toprung.core.quantity.PhysicalConstants;
import org.toprung.core.structure.DipoleElements;

/**
 * Photon scattering of the dressed start or target through the intermediate levels, and where it
 * leaves the atom.
 *
 * <p>The dressed state carries the amplitudes x<sub>i</sub> of {@link Elimination} in the
 * intermediate sublevels. It scatters at the rate Σ γ<sub>i</sub>|x<sub>i</sub>|²; emission
 * straight to ground sublevel g adds the amplitudes of all intermediate sublevels of that decay
 * before squaring (Kramers-Heisenberg), ω³e²/(3πε0ħc³) Σ<sub>q</sub> |Σ<sub>i</sub>
 * ⟨g|r<sub>q</sub>|i⟩ x<sub>i</sub>|², since off resonance no sublevel tells the photon which way
 * it came: far from a fine-structure doublet that suppresses scattering to other sublevels. What is
 * left decays through other levels. Reference: Cline, Miller, Matthews and Heinzen, Opt. Lett. 19,
 * 207 (1994).
 *
 * <p>Immutable.
 */
public final class Scattering {

  /**
   * A ground sublevel that scattering leads to.
   *
   * @param sublevel name of the sublevel
   * @param ratePerSecond rate of scattering that ends there, 1/s
   */
  public record Branch(String sublevel, double ratePerSecond) {}

  private final double total;
  private final Map<Level, Double> byLevel;
  private final double toStart;
  private final List<Branch> toOthers;
  private final double direct;

  private Scattering(
      double total,
      Map<Level, Double> byLevel,
      double toStart,
      List<Branch> toOthers,
      double direct) {
    this.total = total;
    this.byLevel = byLevel;
    this.toStart = toStart;
    this.toOthers = toOthers;
    this.direct = direct;
  }

  /**
   * Follows the scattering of a dressed state.
   *
   * @param setup the description of the drive
   * @param ladder its ladder
   * @param amplitude amplitudes of the ladder's states, real and imaginary parts
   * @param laserHertz frequency of the first laser, which the scattered light has, Hz
   */
  static Scattering of(DriveSetup setup, Ladder ladder, double[][] amplitude, double laserHertz) {
    double total = 0;
    Map<Level, Double> byLevel = new LinkedHashMap<>();
    for (int i = 0; i < ladder.size(); i++) {
      Ladder.State s = ladder.states().get(i);
      double population = square(amplitude[0][i]) + square(amplitude[1][i]);
      if (ladder.isIntermediate(i) && population > 0) {
        double rate = s.decayPerSecond() * population;
        total += rate;
        byLevel.merge(s.level(), rate, Double::sum);
      }
    }
    Map<String, ProductState> known = new HashMap<>();
    for (Level level : byLevel.keySet()) {
      ProductState.hyperfine(setup.species(), level, setup.field())
          .forEach(s -> known.put(s.label(), s));
    }
    double toStart = 0;
    double direct = 0;
    List<Branch> toOthers = new ArrayList<>();
    Level ground = setup.species().groundLevel();
    for (ProductState g : ProductState.hyperfine(setup.species(), ground, setup.field())) {
      double rate = 0;
      for (int q = -1; q <= 1; q++) {
        rate += emission(setup, ladder, amplitude, known, g, q);
      }
      rate *= einsteinFactor(laserHertz);
      direct += rate;
      if (g.doubledF() == setup.start().doubledF() && g.doubledM() == setup.start().doubledM()) {
        toStart = rate;
      } else if (rate > 0) {
        toOthers.add(new Branch(g.label(), rate));
      }
    }
    toOthers.sort((a, b) -> Double.compare(b.ratePerSecond(), a.ratePerSecond()));
    return new Scattering(total, byLevel, toStart, List.copyOf(toOthers), direct);
  }

  /** ω³e²a0²/(3πε0ħc³), 1/s for an amplitude of one a0. */
  private static double einsteinFactor(double hertz) {
    double omega = 2 * Math.PI * hertz;
    double c = PhysicalConstants.SPEED_OF_LIGHT;
    return omega
        * omega
        * omega
        * square(PhysicalConstants.ATOMIC_DIPOLE)
        / (3
            * Math.PI
            * PhysicalConstants.VACUUM_PERMITTIVITY
            * PhysicalConstants.REDUCED_PLANCK
            * c
            * c
            * c);
  }

  /** |Σ ⟨g|r_q|i⟩ x_i|², a0². */
  private static double emission(
      DriveSetup setup,
      Ladder ladder,
      double[][] amplitude,
      Map<String, ProductState> known,
      ProductState g,
      int q) {
    double re = 0;
    double im = 0;
    for (int i = 0; i < ladder.size(); i++) {
      Ladder.State s = ladder.states().get(i);
      ProductState upper = ladder.isIntermediate(i) ? known.get(s.label()) : null;
      // only what decays straight to the ground level, by a dipole
      if (upper == null || Math.abs(s.level().l() - g.level().l()) != 1) {
        continue;
      }
      double element = element(setup, g, upper, q);
      re += element * amplitude[0][i];
      im += element * amplitude[1][i];
    }
    return re * re + im * im;
  }

  private static double element(DriveSetup setup, ProductState g, ProductState upper, int q) {
    int tJg = g.level().doubledJ();
    int tJu = upper.level().doubledJ();
    if (g.doubledM() - upper.doubledM() != 2 * q || Math.abs(tJg - tJu) > 2) {
      return 0;
    }
    double sum = 0;
    for (int a = 0; a < g.amplitude().length; a++) {
      for (int b = 0; b < upper.amplitude().length; b++) {
        int tMg = g.doubledMj()[a];
        int tMu = upper.doubledMj()[b];
        if (tMg - tMu == 2 * q) {
          int phase = (tJg - tMg) / 2 % 2 == 0 ? 1 : -1;
          sum +=
              phase
                  * g.amplitude()[a]
                  * upper.amplitude()[b]
                  * Wigner.threeJDoubled(tJg, 2, tJu, -tMg, 2 * q, tMu);
        }
      }
    }
    return sum * DipoleElements.of(setup.species()).reduced(g.level(), upper.level()).valueA0();
  }

  private static double square(double x) {
    return x * x;
  }

  /**
   * Rate of scattering.
   *
   * @return the rate, 1/s
   */
  public double totalPerSecond() {
    return total;
  }

  /**
   * Rate by intermediate level.
   *
   * @param level an intermediate level, named or its fine-structure partner
   * @return the rate, 1/s, if the level takes part
   */
  public Optional<Double> perSecond(Level level) {
    return Optional.ofNullable(byLevel.get(level));
  }

  /**
   * Rate of scattering that ends in the start sublevel: the phase is lost, the population is not.
   *
   * @return the rate, 1/s
   */
  public double toStartPerSecond() {
    return toStart;
  }

  /**
   * Rates of scattering that end in other ground sublevels, largest first: a leak.
   *
   * @return an immutable list
   */
  public List<Branch> toOtherGround() {
    return toOthers;
  }

  /**
   * Rate of scattering that leaves the intermediate level for another than the ground level, from
   * where the atom ends in some ground sublevel later.
   *
   * @return the rate, 1/s, never below zero: measured lifetimes and elements need not add up
   *     exactly
   */
  public double throughOtherLevelsPerSecond() {
    return Math.max(0, total - direct);
  }
}
