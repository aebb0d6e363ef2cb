package org.toprung.core.drive;

import java.util.ArrayList;
import java.util.List;
import java.util.Set;
import java.util.TreeSet;
import java.util.stream.Collectors;
import org.toprung.angular.HalfInteger;

/** Words for a target that the light cannot reach, which name the rule. */
final class Unreachable {
  private final DriveSetup setup;
  private final StepLight light;

  Unreachable(DriveSetup setup, StepLight light) {
    this.setup = setup;
    this.light = light;
  }

  /** Every path is there, but they add up to nothing. */
  IllegalArgumentException cancelled() {
    return new IllegalArgumentException(
        "the paths from "
            + setup.start()
            + " to "
            + setup.target()
            + " through the sublevels of "
            + through()
            + " cancel");
  }

  /** No path at all. */
  IllegalArgumentException noPath() {
    return new IllegalArgumentException(why());
  }

  /** The named intermediate levels, for messages. */
  private String through() {
    List<String> names = new ArrayList<>();
    for (int r = 1; r < setup.steps(); r++) {
      names.add(setup.named(r).toString());
    }
    return names.isEmpty() ? "no level" : String.join(" and ", names);
  }

  private String why() {
    StringBuilder given =
        new StringBuilder("no light path from ")
            .append(setup.start())
            .append(" to ")
            .append(setup.target());
    if (setup.steps() > 1) {
      given.append(" through ").append(through());
    }
    Set<Integer> changes = new TreeSet<>(Set.of(0));
    for (int k = 0; k < setup.steps(); k++) {
      List<Integer> photons = light.photons(k);
      given.append(k == 0 ? ": beam " : ", beam ").append(k + 1).append(" changes m by ");
      given.append(
          photons.stream().map(q -> q > 0 ? "+" + q : "" + q).collect(Collectors.joining(" or ")));
      Set<Integer> sums = new TreeSet<>();
      changes.forEach(sum -> photons.forEach(q -> sums.add(sum + q)));
      changes = sums;
    }
    int tI = setup.species().doubledNuclearSpin();
    int missing = setup.start().doubledM() - setup.target().doubledM();
    if (changes.stream().noneMatch(sum -> Math.abs(missing + 2 * sum) <= tI)) {
      return given
          + ", and the nuclear spin cannot make up the rest (projection sum rule: mF + changes = mJ"
          + " + mI with |mI| at most "
          + HalfInteger.ofHalves(tI)
          + ")";
    }
    return given
        + (setup.steps() == 1
            ? ", and the start has no electron projection from which that leads there (projection rule)"
            : ", and no sublevel in between links these two (projection rule: |m| may not exceed J on"
                + " any rung)");
  }
}
