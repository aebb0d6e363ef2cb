package org.toprung.budget.report;

import org.toprung.core.drive.Beam;
import org.toprung.core.drive.Drive;
import org.toprung.core.drive.Profile;

/** A beam in words. */
final class BeamText {
  private BeamText() {}

  /** Shape, polarization and direction; impurity and focus where they are not trivial. */
  static String of(Drive.Step step) {
    Beam beam = step.beam();
    StringBuilder text = new StringBuilder(light(beam.profile()));
    text.append(", ").append(Figures.shortened(beam.polarization().toString()));
    if (beam.impurity() > 0) {
      text.append(" with ").append(Figures.percent(beam.impurity())).append(" orthogonal to it");
      if (beam.impurityPhaseDegrees() != 0) {
        text.append(" at ").append(Figures.number(beam.impurityPhaseDegrees(), 3)).append(" deg");
      }
    }
    text.append(", along ").append(Figures.vector(beam.direction()));
    double[] focus = beam.focusMetres();
    if (focus[0] != 0 || focus[1] != 0 || focus[2] != 0) {
      text.append(", focus at ")
          .append(Figures.vector(1e6 * focus[0], 1e6 * focus[1], 1e6 * focus[2]))
          .append(" um from the atom, ")
          .append(Figures.percent(step.fieldVoltsPerMetre() / beam.peakFieldVoltsPerMetre()))
          .append(" of the peak field there");
    }
    return text.toString();
  }

  private static String light(Profile profile) {
    if (profile instanceof Profile.Gaussian round) {
      return Figures.of(round.beamPower()) + ", waist " + Figures.of(round.waist());
    }
    if (profile instanceof Profile.Elliptical e) {
      return Figures.of(e.beamPower())
          + ", waists "
          + Figures.of(e.firstWaist())
          + " along "
          + Figures.vector(e.axisX(), e.axisY(), e.axisZ())
          + " and "
          + Figures.of(e.secondWaist());
    }
    return "flat top of " + Figures.of(profile.peakIntensity());
  }
}
