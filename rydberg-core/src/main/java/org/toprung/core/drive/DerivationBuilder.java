package org.toprung.core.drive;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import org.toprung.angular.SphericalComponents;
import org.toprung.core.atom.Level;
import org.toprung.core.quantity.PhysicalConstants;

/** Follows every path of a drive from its start to its targets. */
final class DerivationBuilder {
  private static final double DIPOLE_UNIT = // e a0/h, Hz/(V/m)
      PhysicalConstants.ATOMIC_DIPOLE / PhysicalConstants.PLANCK;

  private final DriveSetup setup;
  private final LadderBuilder builder;
  private final Ladder ladder;
  private final Map<String, Derivation.Reduced> elements = new LinkedHashMap<>();

  private DerivationBuilder(DriveSetup setup) {
    this.setup = setup;
    this.builder = new LadderBuilder(setup);
    this.ladder = builder.build();
  }

  static Derivation build(DriveSetup setup, Drive drive) {
    if (setup.steps() > 2) {
      throw new IllegalArgumentException(
          "paths are written down for one or two steps, given "
              + setup.steps()
              + ": a strong step between intermediate levels dresses them, and the coupling is no"
              + " sum over paths");
    }
    if (setup.isQuadrupole(0)) {
      throw new IllegalArgumentException("paths are written down for dipole steps alone");
    }
    for (int k = 0; k < setup.steps(); k++) {
      if (setup.isQuadrupole(k)) {
        throw new IllegalArgumentException(
            "the working is written down for dipole steps: step "
                + (k + 1)
                + " is a quadrupole one");
      }
    }
    return new DerivationBuilder(setup).derivation(drive);
  }

  private Derivation derivation(Drive drive) {
    List<Derivation.Light> lights = new ArrayList<>();
    for (int k = 0; k < ladder.steps(); k++) {
      SphericalComponents light = builder.light().polarization(k);
      List<Derivation.Complex> components = new ArrayList<>();
      for (int q = -1; q <= 1; q++) {
        components.add(new Derivation.Complex(light.re(q), light.im(q)));
      }
      lights.add(
          new Derivation.Light(
              k + 1, setup.beam(k).toString(), builder.light().fieldVoltsPerMetre(k), components));
    }
    List<Derivation.Path> paths = new ArrayList<>();
    List<Derivation.Target> targets = new ArrayList<>();
    for (int w : ladder.wanted()) {
      List<Derivation.Path> toTarget = new ArrayList<>(ladder.steps() == 1 ? one(w) : two(w));
      toTarget.sort(
          Comparator.comparingDouble((Derivation.Path p) -> -p.contributionHertz().abs()));
      paths.addAll(toTarget);
      Derivation.Complex sum = new Derivation.Complex(0, 0);
      for (Derivation.Path p : toTarget) {
        sum = sum.plus(p.contributionHertz());
      }
      targets.add(new Derivation.Target(ladder.states().get(w).label(), sum));
    }
    return new Derivation(
        drive.species().name() + ": " + drive.start() + " to " + drive.target(),
        lights,
        new ArrayList<>(elements.values()),
        paths,
        targets,
        drive.rabi().hertz(),
        drive.relativeUncertainty());
  }

  private List<Derivation.Path> one(int target) {
    List<Derivation.Path> paths = new ArrayList<>();
    for (Ladder.Coupling c : ladder.couplings()) {
      if (c.lower() == ladder.start() && c.upper() == target) {
        Derivation.Leg leg = leg(0, builder.product(c.lower()), builder.product(target));
        paths.add(new Derivation.Path(leg.upper(), "", List.of(leg), 0, 0, leg.rabiHertz()));
      }
    }
    return paths;
  }

  private List<Derivation.Path> two(int target) {
    // kept sublevels lie where the levels outside the ladder have moved the start
    double startShift = 0;
    for (int k = 0; k < ladder.steps(); k++) {
      startShift += ladder.farShiftHertz(ladder.start(), k);
    }
    List<Derivation.Path> paths = new ArrayList<>();
    for (Ladder.Coupling first : ladder.couplings()) {
      for (Ladder.Coupling second : ladder.couplings()) {
        if (first.lower() == ladder.start()
            && first.upper() == second.lower()
            && second.upper() == target) {
          Ladder.State middle = ladder.states().get(first.upper());
          paths.add(
              path(
                  target,
                  builder.product(first.upper()),
                  startShift - middle.energyHertz(),
                  middle.decayPerSecond()));
        }
      }
    }
    for (LadderBuilder.PartnerPath p : builder.partnerPaths(ladder.start(), target, 1)) {
      paths.add(path(target, p.middle(), p.awayHertz(), 0));
    }
    return paths;
  }

  private Derivation.Path path(
      int target, ProductState middle, double detuning, double decayPerSecond) {
    Derivation.Leg low = leg(0, builder.product(ladder.start()), middle);
    Derivation.Leg high = leg(1, middle, builder.product(target));
    Derivation.Complex contribution =
        low.rabiHertz()
            .times(high.rabiHertz())
            .over(new Derivation.Complex(2 * detuning, decayPerSecond / (2 * Math.PI)));
    return new Derivation.Path(
        high.upper(), middle.label(), List.of(low, high), detuning, decayPerSecond, contribution);
  }

  private Derivation.Leg leg(int step, ProductState lower, ProductState upper) {
    List<Derivation.AngularTerm> terms = ProductState.angularTerms(lower, upper);
    int q = (upper.doubledM() - lower.doubledM()) / 2;
    SphericalComponents light = builder.light().polarization(step);
    double sum = terms.stream().mapToDouble(Derivation.AngularTerm::value).sum();
    Derivation.Complex angular = new Derivation.Complex(sum * light.re(q), sum * light.im(q));
    double scale =
        builder.light().fieldVoltsPerMetre(step)
            * DIPOLE_UNIT
            * element(upper.level(), lower.level()).element().valueA0();
    return new Derivation.Leg(
        step + 1,
        lower.label(),
        upper.label(),
        upper.level().toString(),
        lower.level().toString(),
        q,
        terms,
        angular,
        angular.times(scale));
  }

  private Derivation.Reduced element(Level upper, Level lower) {
    return elements.computeIfAbsent(
        upper + " " + lower,
        key ->
            new Derivation.Reduced(
                upper.toString(), lower.toString(), builder.light().element(upper, lower)));
  }
}
