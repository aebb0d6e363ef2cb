package org.toprung.budget.report;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import org.toprung.core.drive.Drive;
import org.toprung.core.drive.Profile;
import org.toprung.core.quantity.Length;
import org.toprung.core.quantity.Power;

/**
 * A short caution about beams in the hazardous laser classes.
 *
 * <p>For continuous visible light the class 3B range of IEC 60825-1 begins at 5 mW and class 4 at
 * 0.5 W. Outside the visible, where no blink protects the eye, class 3B begins at lower powers that
 * depend on wavelength and geometry: in the infrared the lowest of them, that at 700 nm, is taken,
 * and every ultraviolet beam below class 4 is counted as 3B; below 315 nm class 4 begins lower too,
 * so every such beam is counted as class 4. A beam known by its intensity alone is counted as class
 * 4. The limits are common practice. This is a reminder, not a classification.
 */
final class LaserCaution {
  private static final double CLASS_3B_WATTS = 0.005;
  private static final double INFRARED_CLASS_3B_WATTS = 0.0019;
  private static final double CLASS_4_WATTS = 0.5;
  private static final double MIDDLE_ULTRAVIOLET_METRES = 315e-9;
  private static final double VISIBLE_FROM_METRES = 400e-9;
  private static final double VISIBLE_TO_METRES = 700e-9;

  private LaserCaution() {}

  /** Sentences about the beams that need one; none where no beam does. */
  static List<String> of(Drive drive) {
    List<String> cautions = new ArrayList<>();
    for (int k = 0; k < drive.steps().size(); k++) {
      Drive.Step step = drive.steps().get(k);
      about("Laser beam " + (k + 1), step.beam().profile(), step.wavelength())
          .ifPresent(cautions::add);
    }
    drive
        .trap()
        .flatMap(t -> about("Trap beam", t.beam().profile(), t.wavelength()))
        .ifPresent(cautions::add);
    if (!cautions.isEmpty()) {
      cautions.add(
          "These are powers at the atoms; more leaves the laser. Laser work follows IEC 60825-1,"
              + " local rules and the laser safety officer.");
    }
    return cautions;
  }

  private static Optional<String> about(String beam, Profile profile, Length wavelength) {
    // of a beam known by its intensity alone the worst is assumed
    double watts = profile.power().map(Power::watts).orElse(Double.POSITIVE_INFINITY);
    String found = range(wavelength.metres(), watts);
    if (found.isEmpty()) {
      return Optional.empty();
    }
    String size =
        profile
            .power()
            .map(Figures::of)
            .orElse(Figures.of(profile.peakIntensity()) + " of unknown power");
    return Optional.of(
        String.format(
            Locale.ROOT, "%s, %s at %s: %s.", beam, size, Figures.nanometres(wavelength), found));
  }

  /** The range a beam counts in, or nothing where it needs no caution. */
  static String range(double metres, double watts) {
    if (metres < MIDDLE_ULTRAVIOLET_METRES) {
      return "ultraviolet, treat as class 4 (its limits are lower here), eyes and skin at risk";
    }
    if (watts > CLASS_4_WATTS) {
      return "class 4 range, " + kind(metres) + "eyes, skin and fire";
    }
    if (kind(metres).isEmpty()) {
      return watts > CLASS_3B_WATTS ? "class 3B range, eyes at risk" : "";
    }
    if (metres > VISIBLE_TO_METRES && watts <= INFRARED_CLASS_3B_WATTS) {
      return "";
    }
    return "class 3B range (invisible light reaches it below 5 mW), "
        + kind(metres)
        + "eyes at risk";
  }

  private static String kind(double metres) {
    if (metres < VISIBLE_FROM_METRES) {
      return "ultraviolet, ";
    }
    return metres > VISIBLE_TO_METRES ? "invisible infrared, " : "";
  }
}
