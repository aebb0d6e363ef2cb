package org.toprung.budget.scenario;

import java.util.List;
import java.util.Optional;
import java.util.function.Function;
import org.toprung.core.drive.Beam;
import org.toprung.core.quantity.Intensity;
import org.toprung.core.quantity.Length;
import org.toprung.core.quantity.Power;

/**
 * Reads the beam of a step: power and waist, or the intensity alone; polarization and direction;
 * and, where they are given, impurity and offset of the focus.
 */
final class Beams {
  static final List<String> KEYS =
      List.of(
          "power",
          "waist",
          "waist_axis",
          "intensity",
          "polarization",
          "impurity",
          "impurity_phase_deg",
          "direction",
          "offset");

  private Beams() {}

  static Beam read(Table step) {
    Beam shaped = shape(step);
    Value polarization = step.required("polarization", "text such as \"sigma+\", or a vector");
    Beam pure = shaped.polarized(Polarizations.read(polarization));
    Beam beam = impurity(step, pure);
    Value direction = step.required("direction", "a vector such as [0, 0, 1]");
    double[] k = vector(direction);
    Beam aimed = direction.guarded(() -> beam.along(k[0], k[1], k[2]));
    // a beam along the field cannot be pi polarized, nor can a vector point along its own beam
    polarization.guarded(aimed::polarizationVector);
    return step.optional("offset").map(v -> offset(v, aimed)).orElse(aimed);
  }

  private static Beam shape(Table step) {
    Optional<Value> intensity = step.optional("intensity");
    if (intensity.isPresent()) {
      for (String other : List.of("power", "waist", "waist_axis")) {
        step.optional(other).ifPresent(v -> refuseWithIntensity(v));
      }
      return positive(
          intensity.get(),
          Intensity::parse,
          Intensity::wattsPerSquareMetre,
          "2 W/cm2",
          Beam::flatTop);
    }
    Value power = step.required("power", "text such as \"2 mW\" (or an intensity instead)");
    Power watts = positive(power, Power::parse, Power::watts, "2 mW", p -> p);
    Value waist = step.required("waist", "text such as \"20 um\"");
    Optional<Value> axis = step.optional("waist_axis");
    if (!waist.isList()) {
      axis.ifPresent(Beams::refuseWithOneWaist);
      return Beam.gaussian(watts, waist(waist));
    }
    List<Value> two = waist.items(2, "text such as \"20 um\", or two such texts");
    Length first = waist(two.get(0));
    Length second = waist(two.get(1));
    Value along = step.required("waist_axis", "the direction of the first waist, as [1, 0, 0]");
    double[] a = vector(along);
    return along.guarded(() -> Beam.elliptical(watts, first, second, a[0], a[1], a[2]));
  }

  private static void refuseWithIntensity(Value value) {
    throw value.refused("nothing beside an intensity, which stands for power and waist");
  }

  private static void refuseWithOneWaist(Value value) {
    throw value.refused("a waist_axis only with two waists");
  }

  private static Length waist(Value value) {
    return positive(value, Length::parse, Length::metres, "20 um", w -> w);
  }

  private static <Q, R> R positive(
      Value value,
      Function<String, Q> parser,
      Function<Q, Double> size,
      String example,
      Function<Q, R> use) {
    Q quantity = value.parsed(parser, example);
    if (!(size.apply(quantity) > 0)) {
      throw value.refused("a value above zero");
    }
    return use.apply(quantity);
  }

  private static Beam impurity(Table step, Beam pure) {
    Optional<Value> fraction = step.optional("impurity");
    Optional<Value> phase = step.optional("impurity_phase_deg");
    if (fraction.isEmpty()) {
      phase.ifPresent(Beams::refuseWithoutImpurity);
      return pure;
    }
    double f = fraction.get().number("a number from 0 to 0.5");
    double degrees = phase.map(v -> v.number("a finite number of degrees")).orElse(0.0);
    return fraction.get().guarded(() -> pure.impure(f, degrees));
  }

  private static void refuseWithoutImpurity(Value value) {
    throw value.refused("an impurity_phase_deg only with an impurity");
  }

  private static Beam offset(Value value, Beam beam) {
    List<Length> at =
        value.items(3, "a list of 3 texts such as \"1 um\", along x, y and z").stream()
            .map(v -> v.parsed(Length::parse, "1 um"))
            .toList();
    return beam.focusedAt(at.get(0), at.get(1), at.get(2));
  }

  private static double[] vector(Value value) {
    return value.items(3, "a vector of three numbers such as [0, 0, 1]").stream()
        .mapToDouble(v -> v.number("a finite number"))
        .toArray();
  }
}
