package org.toprung.core.structure;

import java.util.List;
import java.util.Locale;
import java.util.Optional;
import org.toprung.angular.Wigner;
import org.toprung.core.atom.Datum;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.cache.BoundedCache;
import org.toprung.core.radial.CoulombMethod;
import org.toprung.core.radial.NumerovMethod;
import org.toprung.core.radial.QuasiclassicalMethod;
import org.toprung.core.radial.RadialIntegral;
import org.toprung.core.radial.RadialMethod;

/**
 * Reduced dipole elements between the levels of an atom. Immutable to the outside, thread-safe;
 * known elements are kept in a bounded cache.
 *
 * <p>⟨l‖r‖l′⟩ = (−1)^l √((2l+1)(2l′+1)) (l 1 l′; 0 0 0) R, and
 *
 * <p>⟨l s j‖r‖l′ s j′⟩ = (−1)^{l+s+j′+1} √((2j+1)(2j′+1)) {l j s; j′ l′ 1} ⟨l‖r‖l′⟩
 *
 * <p>(Edmonds, Angular Momentum in Quantum Mechanics, eq. 7.1.7). The sign is that of the computed
 * element; the modulus is the measured one where the catalogue has one.
 *
 * <p>Uncertainty of a computed element: 1 % of its value and, in quadrature, that of the core
 * correction.
 */
public final class DipoleElements {
  private static final int SPECIES = 64;
  private static final BoundedCache<Species, DipoleElements> SHARED =
      new BoundedCache<>(
          SPECIES,
          s ->
              new DipoleElements(
                  s,
                  List.of(NumerovMethod.of(s), CoulombMethod.of(s), QuasiclassicalMethod.of(s)),
                  true));

  private static final int ELEMENTS = 20_000;
  private static final double FLOOR = 0.01;

  private static final String MEASURED = "measured, which goes before every computed value";
  private static final String CALIBRATED =
      "not measured; the core correction is calibrated on a measured member of the series";
  private static final String COMPUTED = "not measured, and no measured member to calibrate on";

  /**
   * The lower level in the order of levels stands first: the mirrored element follows by symmetry.
   */
  private record Pair(Level a, Level b) {
    // by hand: those of a record are slow to start
    @Override
    public boolean equals(Object other) {
      return other instanceof Pair that && that.a.equals(a) && that.b.equals(b);
    }

    @Override
    public int hashCode() {
      return 31 * a.hashCode() + b.hashCode();
    }
  }

  private final Species species;
  private final List<RadialMethod> methods;
  private final boolean measuredPreferred;
  private final BoundedCache<Pair, DipoleElement> elements;

  private DipoleElements(Species species, List<RadialMethod> methods, boolean measuredPreferred) {
    this.species = species;
    this.methods = methods;
    this.measuredPreferred = measuredPreferred;
    this.elements = new BoundedCache<>(ELEMENTS, this::evaluate);
  }

  /**
   * The best elements known: measured ones where there are, else computed ones: from the calibrated
   * model potential, else the potential as it is, else Coulomb waves, else the quasi-classical
   * formula. Each element says in its reason why none before it was taken.
   *
   * @param species the atom
   * @return the elements; one shared instance for each species
   */
  public static DipoleElements of(Species species) {
    return SHARED.get(species);
  }

  /**
   * Elements computed throughout, for comparison with measured ones or between methods.
   *
   * @param species the atom
   * @param method how to compute the radial integrals
   * @return the elements
   */
  public static DipoleElements computed(Species species, RadialMethod method) {
    return new DipoleElements(species, List.of(method), false);
  }

  /**
   * The atom.
   *
   * @return the species
   */
  public Species species() {
    return species;
  }

  /**
   * A reduced dipole element.
   *
   * @param a the level on the left
   * @param b the level on the right
   * @return ⟨a‖r‖b⟩ in a0
   * @throws IllegalArgumentException if a level belongs to the core or is not in the catalogue, or
   *     if the element is forbidden; the message names the rule
   */
  public DipoleElement reduced(Level a, Level b) {
    if (a.compareTo(b) <= 0) {
      return elements.get(new Pair(a, b));
    }
    DipoleElement mirrored = elements.get(new Pair(b, a));
    return (a.doubledJ() - b.doubledJ()) % 4 == 0 ? mirrored : mirrored.negate();
  }

  private DipoleElement evaluate(Pair pair) {
    Level a = species.requireValid(pair.a());
    Level b = species.requireValid(pair.b());
    requireAllowed(a, b);
    StringBuilder refusals = new StringBuilder();
    for (RadialMethod method : methods) {
      try {
        return evaluate(a, b, method, refusals.toString());
      } catch (IllegalArgumentException | ArithmeticException e) {
        if (methods.size() == 1) {
          throw e;
        }
        refusals.append(method.description()).append(": ").append(e.getMessage()).append("; ");
      }
    }
    throw new IllegalArgumentException(
        "no method can compute the element between " + a + " and " + b + ": " + refusals);
  }

  private DipoleElement evaluate(Level a, Level b, RadialMethod method, String refusals) {
    RadialIntegral radial = method.dipole(a, b);
    double angular = angularFactor(a, b);
    double computed = angular * radial.correctedA0();
    Optional<Datum> measured = measuredPreferred ? measured(a, b) : Optional.empty();
    if (measured.isPresent()) {
      var modulus = measured.get().estimate();
      String choice = measured.get().chosenBecause();
      return new DipoleElement(
          Math.copySign(modulus.value(), computed),
          modulus.uncertainty(),
          DipoleElement.Origin.MEASURED,
          measured.get().source(),
          choice.isEmpty() ? MEASURED : choice);
    }
    DipoleElement.Origin origin =
        radial.calibrated() ? DipoleElement.Origin.CALIBRATED : DipoleElement.Origin.COMPUTED;
    return new DipoleElement(
        computed,
        Math.hypot(FLOOR * computed, angular * radial.coreUncertaintyA0()),
        origin,
        method.description(),
        refusals + (radial.calibrated() ? CALIBRATED : COMPUTED));
  }

  private Optional<Datum> measured(Level a, Level b) {
    return species.datum(Datum.Kind.REDUCED_DIPOLE, a + "-" + b);
  }

  private static void requireAllowed(Level a, Level b) {
    if (Math.abs(a.l() - b.l()) != 1) {
      throw forbidden(
          a,
          b,
          String.format(Locale.ROOT, "l must change by 1 (parity), given %d and %d", a.l(), b.l()));
    }
    if (Math.abs(a.doubledJ() - b.doubledJ()) > 2) {
      throw forbidden(
          a,
          b,
          String.format(
              Locale.ROOT,
              "j must change by at most 1 (triangle), given %d/2 and %d/2",
              a.doubledJ(),
              b.doubledJ()));
    }
  }

  private static IllegalArgumentException forbidden(Level a, Level b, String rule) {
    return new IllegalArgumentException(
        "the dipole element between " + a + " and " + b + " is forbidden: " + rule);
  }

  private static double angularFactor(Level a, Level b) {
    int l = a.l();
    int lb = b.l();
    double orbital =
        (l % 2 == 0 ? 1 : -1)
            * Math.sqrt((2 * l + 1.0) * (2 * lb + 1.0))
            * Wigner.threeJDoubled(2 * l, 2, 2 * lb, 0, 0, 0);
    // l + s + j' + 1 with s = 1/2
    int exponent = l + (b.doubledJ() + 3) / 2;
    return (exponent % 2 == 0 ? 1 : -1)
        * Math.sqrt((a.doubledJ() + 1.0) * (b.doubledJ() + 1.0))
        * Wigner.sixJDoubled(2 * l, a.doubledJ(), 1, b.doubledJ(), 2 * lb, 2)
        * orbital;
  }
}
