package org.toprung.core.radial;

import java.util.ArrayList;
import java.util.List;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;

/** One dipole integral by all radial methods. Immutable. */
public final class RadialComparison {
  /**
   * What one method says.
   *
   * @param method the method
   * @param integral its integral; null where the method cannot describe the levels
   * @param refusal why it cannot; empty where it can
   */
  public record Entry(String method, RadialIntegral integral, String refusal) {
    /**
     * Whether the method has an integral.
     *
     * @return false where it refused
     */
    public boolean isKnown() {
      return integral != null;
    }
  }

  private final List<Entry> entries;
  private final double spread;

  private RadialComparison(List<Entry> entries, double spread) {
    this.entries = entries;
    this.spread = spread;
  }

  /**
   * Asks all methods for one integral: model potential calibrated and not, Coulomb waves,
   * quasi-classical formula, WKB.
   *
   * @param species the atom
   * @param a one level
   * @param b the other level; its l differs by 1
   * @return the answers, the most trusted first
   * @throws IllegalArgumentException if a level belongs to the core or is not in the catalogue, l
   *     does not differ by 1, or no method can describe the pair
   */
  public static RadialComparison of(Species species, Level a, Level b) {
    species.requireValid(a);
    species.requireValid(b);
    if (Math.abs(a.l() - b.l()) != 1) {
      throw new IllegalArgumentException(
          "a dipole couples levels whose l differs by 1, given " + a + " and " + b);
    }
    List<RadialMethod> methods =
        List.of(
            NumerovMethod.of(species),
            NumerovMethod.uncalibrated(species),
            CoulombMethod.of(species),
            QuasiclassicalMethod.of(species),
            WkbMethod.of(species));
    List<Entry> entries = new ArrayList<>();
    double low = Double.POSITIVE_INFINITY;
    double high = Double.NEGATIVE_INFINITY;
    double best = Double.NaN;
    for (RadialMethod method : methods) {
      try {
        RadialIntegral integral = method.dipole(a, b);
        double value = integral.correctedA0();
        entries.add(new Entry(method.description(), integral, ""));
        low = Math.min(low, value);
        high = Math.max(high, value);
        best = Double.isNaN(best) ? value : best;
      } catch (IllegalArgumentException | ArithmeticException e) {
        entries.add(new Entry(method.description(), null, e.getMessage()));
      }
    }
    if (Double.isNaN(best)) {
      throw new IllegalArgumentException(
          "no radial method can describe " + a + " and " + b + ": " + entries.get(0).refusal());
    }
    return new RadialComparison(List.copyOf(entries), (high - low) / Math.abs(best));
  }

  /**
   * The answers.
   *
   * @return one entry for each method, the most trusted first
   */
  public List<Entry> entries() {
    return entries;
  }

  /**
   * Largest minus smallest integral over the modulus of the most trusted one.
   *
   * @return the relative spread
   */
  public double relativeSpread() {
    return spread;
  }
}
