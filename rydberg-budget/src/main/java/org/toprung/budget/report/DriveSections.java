package org.toprung.budget.report;

import java.util.List;
import java.util.Locale;
import java.util.StringJoiner;
import java.util.function.IntFunction;
import org.toprung.budget.Budget;
import org.toprung.core.drive.Drive;
import org.toprung.core.quantity.Frequency;
import org.toprung.core.structure.DipoleElement;

/** What is driven: fields, each step, and the ladder as a whole. */
final class DriveSections {
  private static final int MOST_TARGETS = 5;
  private static final double FAINTEST_HERTZ = 1; // Rabi frequency of a target worth a line
  private static final double TESLA_PER_GAUSS = 1e-4;

  private final Outline.Writer out;
  private final Budget budget;
  private final Drive drive;

  private DriveSections(Outline.Writer out, Budget budget) {
    this.out = out;
    this.budget = budget;
    this.drive = budget.drive();
  }

  static void add(Outline.Writer out, Budget budget) {
    DriveSections sections = new DriveSections(out, budget);
    sections.drive();
    for (int k = 0; k < budget.drive().steps().size(); k++) {
      sections.step(k);
    }
    sections.ladder();
  }

  private void drive() {
    out.section("Drive");
    out.fact("ladder", drive.toString());
    out.fact(
        "magnetic field",
        Figures.number(drive.field().tesla() / TESLA_PER_GAUSS, 6) + " G along z");
    double[] e = drive.electricFieldVoltsPerMetre();
    if (e[0] != 0 || e[1] != 0 || e[2] != 0) {
      out.fact(
          "electric field",
          Figures.vector(e)
              + " V/m, shifts the target by "
              + Figures.signed(drive.starkShift())
              + " (in its wavelength already)");
    }
  }

  private void step(int k) {
    Drive.Step step = drive.steps().get(k);
    out.section("Step " + (k + 1) + " to " + step.to());
    out.fact("laser", Figures.nanometres(step.wavelength()) + " (vacuum)");
    if (k < drive.intermediates().size()) {
      String from =
          k == 0
              ? " from the centre of gravity of "
              : " from the transition " + drive.steps().get(k - 1).to() + " to ";
      out.fact("detuning", Figures.signed(drive.detuning(k)) + from + step.to());
    }
    out.fact("beam", BeamText.of(step));
    out.fact("Rabi frequency", Figures.of(step.rabi()));
    out.fact(
        step.element() instanceof DipoleElement ? "reduced dipole element" : "reduced quadrupole",
        String.format(
            Locale.ROOT,
            "(%s) %s, %s: %s",
            Figures.measured(
                step.element().modulus(),
                step.element().modulus() * step.element().relativeUncertainty()),
            step.element().unit(),
            origin(step),
            step.element().source()));
  }

  static String origin(Drive.Step step) {
    return step.element().origin().name().toLowerCase(Locale.ROOT);
  }

  private void ladder() {
    out.section("Whole ladder");
    out.fact(
        "Rabi frequency",
        Figures.of(drive.rabi())
            + " ± "
            + Figures.percent(drive.relativeUncertainty())
            + ", to lowest order");
    out.fact(
        "light shift of start",
        Figures.signed(drive.startLightShift()) + byBeam(drive::startLightShift));
    out.fact(
        "light shift of target",
        Figures.signed(drive.targetLightShift()) + byBeam(drive::targetLightShift));
    drive
        .idle()
        .ifPresent(
            idle ->
                out.fact(
                    "light shift of idle",
                    String.format(
                        Locale.ROOT,
                        "%s (%s); it scatters %s photons per second",
                        Figures.signed(idle.shift()),
                        idle.sublevel(),
                        Figures.number(idle.scatteringPerSecond(), 3))));
    drive
        .trap()
        .ifPresent(
            trap ->
                out.fact(
                    "trap light",
                    String.format(
                        Locale.ROOT,
                        "%s, shifts start by %s and target by %s; in the frequency offset",
                        Figures.nanometres(trap.wavelength()),
                        Figures.signed(trap.startShift()),
                        Figures.signed(trap.targetShift()))));
    if (!drive.intermediates().isEmpty()) {
      out.fact(
          "intermediate scattering",
          "probability " + Figures.probability(budget.scatteringPerPulse()) + " per pulse");
    }
    double[] k = drive.waveVectorPerMetre();
    double length = Math.sqrt(k[0] * k[0] + k[1] * k[1] + k[2] * k[2]);
    out.fact(
        "summed wave vector",
        String.format(
            Locale.ROOT,
            "(%s, %s, %s) 1/um: %s of Doppler shift per m/s along it",
            Figures.number(k[0] * 1e-6, 4),
            Figures.number(k[1] * 1e-6, 4),
            Figures.number(k[2] * 1e-6, 4),
            Figures.of(Frequency.ofHertz(length / (2 * Math.PI)))));
    out.fact(
        "recoil shift",
        Figures.signed(drive.recoilShift()) + ", not in the wavelengths or the frequency offset");
    out.fact(
        "magnetic sensitivity",
        Figures.signed(
                Frequency.ofHertz(drive.magneticSensitivityHertzPerTesla() * TESLA_PER_GAUSS))
            + " per gauss (target minus start)");
    otherTargets();
  }

  /** What each beam adds, where there is more than one. */
  private String byBeam(IntFunction<Frequency> shift) {
    if (drive.steps().size() == 1) {
      return "";
    }
    StringJoiner parts = new StringJoiner(", ", " (", ")");
    for (int k = 0; k < drive.steps().size(); k++) {
      parts.add(Figures.signed(shift.apply(k)) + " by beam " + (k + 1));
    }
    return parts.toString();
  }

  private void otherTargets() {
    List<Drive.OtherTarget> others =
        drive.otherTargets().stream().filter(t -> t.rabi().hertz() > FAINTEST_HERTZ).toList();
    String label = "also coupled";
    for (Drive.OtherTarget other : others.subList(0, Math.min(MOST_TARGETS, others.size()))) {
      out.fact(
          label,
          String.format(
              Locale.ROOT,
              "%s: Rabi frequency %s, detuned by %s",
              other.sublevel(),
              Figures.of(other.rabi()),
              Figures.signed(other.detuning())));
      label = "";
    }
    if (others.size() > MOST_TARGETS) {
      out.fact("", "and " + (others.size() - MOST_TARGETS) + " weaker ones");
    }
  }
}
