package org.toprung.budget.scenario;

import java.util.List;
import org.toprung.core.drive.Beam;
import org.toprung.core.quantity.Length;
import org.toprung.core.quantity.Power;

/** Reads the beam of a step. */
final class Beams {
  static final List<String> KEYS = List.of("power", "waist", "polarization", "direction");

  private Beams() {}

  static Beam read(Table step) {
    Value power = step.required("power", "text such as \"2 mW\"");
    Power watts = power.parsed(Power::parse, "2 mW");
    if (!(watts.watts() > 0)) {
      throw power.refused("a power above zero");
    }
    Value waist = step.required("waist", "text such as \"20 um\"");
    Length metres = waist.parsed(Length::parse, "20 um");
    if (!(metres.metres() > 0)) {
      throw waist.refused("a waist above zero");
    }
    Value polarization = step.required("polarization", "text such as \"sigma+\", or a vector");
    Beam beam = Beam.gaussian(watts, metres).polarized(Polarizations.read(polarization));
    Value direction = step.required("direction", "a vector such as [0, 0, 1]");
    List<Value> axes = direction.items(3, "a vector of three numbers such as [0, 0, 1]");
    double[] k = axes.stream().mapToDouble(v -> v.number("a finite number")).toArray();
    Beam aimed = direction.guarded(() -> beam.along(k[0], k[1], k[2]));
    // a beam along the field cannot be pi polarized, nor can a vector point along its own beam
    polarization.guarded(aimed::polarizationVector);
    return aimed;
  }
}
