package org.toprung.budget.report;

import java.util.List;
import java.util.Locale;
import java.util.StringJoiner;
import java.util.function.IntFunction;
import org.toprung.budget.Budget;
import org.toprung.budget.CauseEntry;
import org.toprung.budget.Check;
import org.toprung.core.drive.Drive;
import org.toprung.core.drive.PulsePlan;
import org.toprung.core.quantity.Frequency;
import org.toprung.core.structure.DipoleElement;

/**
 * The report for people: one page of text that fits {@value Page#WIDTH} columns.
 *
 * <p>To keep the table short, levers of causes below 1 % of the total are left out here and causes
 * that hardly exist are only named; {@link JsonReport} has them all.
 */
public final class TextReport {
  private static final double WORTH_A_LEVER = 0.01; // share of the total
  private static final double NEGLIGIBLE = 1e-9; // error not worth a row
  private static final int MOST_TARGETS = 5;
  private static final double FAINTEST_HERTZ = 1; // Rabi frequency of a target worth a line
  private static final double TESLA_PER_GAUSS = 1e-4;
  private static final int CAUSE_COLUMNS = 28;
  private static final int ERROR_COLUMNS = 8;
  private static final int SHARE_COLUMNS = 8;

  private final Page page = new Page();
  private final ReportContent content;
  private final Budget budget;
  private final Drive drive;

  private TextReport(ReportContent content) {
    this.content = content;
    this.budget = content.budget();
    this.drive = budget.drive();
  }

  /**
   * Renders the report.
   *
   * @param content what to tell about
   * @return lines of at most {@value Page#WIDTH} columns, each ended by a line feed
   */
  public static String render(ReportContent content) {
    return new TextReport(content).render();
  }

  private String render() {
    page.title(content.title());
    result();
    plan();
    drive();
    for (int k = 0; k < drive.steps().size(); k++) {
      step(k);
    }
    ladder();
    causes();
    check();
    list("Not assessed, so not in the total", budget.notAssessed());
    list("WARNINGS", content.warnings());
    list("CAUTION", content.cautions());
    return page.toString();
  }

  /** What a reader in a hurry needs. */
  private void result() {
    page.heading("Result");
    page.value(
        "error of one pulse",
        "("
            + Figures.measured(100 * budget.total(), 100 * budget.uncertainty())
            + ") %, which is 1 - probability of the wanted outcome");
    CauseEntry largest = budget.causes().get(0);
    page.value(
        "largest cause", largest.cause() + ", " + share(largest) + " of the sum of all causes");
    page.value(
        "simulation",
        content.check().agrees() ? "agrees with the total" : "DISAGREES with the total, see below");
  }

  private void drive() {
    page.heading("Drive");
    page.value("ladder", drive.toString());
    page.value("magnetic field", drive.field() + " along z");
    double[] e = drive.electricFieldVoltsPerMetre();
    if (e[0] != 0 || e[1] != 0 || e[2] != 0) {
      page.value(
          "electric field",
          Figures.vector(e)
              + " V/m, shifts the target by "
              + Figures.signed(drive.starkShift())
              + " (in its wavelength already)");
    }
  }

  private void step(int k) {
    Drive.Step step = drive.steps().get(k);
    page.heading("Step " + (k + 1) + " to " + step.to());
    page.value("laser", Figures.nanometres(step.wavelength()) + " (vacuum)");
    if (k < drive.intermediates().size()) {
      String from =
          k == 0
              ? " from the centre of gravity of "
              : " from the transition " + drive.steps().get(k - 1).to() + " to ";
      page.value("detuning", Figures.signed(drive.detuning(k)) + from + step.to());
    }
    page.value("beam", BeamText.of(step));
    page.value("Rabi frequency", Figures.of(step.rabi()));
    page.value(
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
    page.heading("Whole ladder");
    page.value(
        "Rabi frequency",
        Figures.of(drive.rabi())
            + " ± "
            + Figures.percent(drive.relativeUncertainty())
            + ", to lowest order");
    page.value(
        "light shift of start",
        Figures.signed(drive.startLightShift()) + byBeam(drive::startLightShift));
    page.value(
        "light shift of target",
        Figures.signed(drive.targetLightShift()) + byBeam(drive::targetLightShift));
    drive
        .idle()
        .ifPresent(
            idle ->
                page.value(
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
                page.value(
                    "trap light",
                    String.format(
                        Locale.ROOT,
                        "%s, shifts start by %s and target by %s; in the frequency offset",
                        Figures.nanometres(trap.wavelength()),
                        Figures.signed(trap.startShift()),
                        Figures.signed(trap.targetShift()))));
    if (!drive.intermediates().isEmpty()) {
      page.value(
          "intermediate scattering",
          "probability " + Figures.probability(budget.scatteringPerPulse()) + " per pulse");
    }
    double[] k = drive.waveVectorPerMetre();
    double length = Math.sqrt(k[0] * k[0] + k[1] * k[1] + k[2] * k[2]);
    page.value(
        "summed wave vector",
        String.format(
            Locale.ROOT,
            "(%s, %s, %s) 1/um: %s of Doppler shift per m/s along it",
            Figures.number(k[0] * 1e-6, 4),
            Figures.number(k[1] * 1e-6, 4),
            Figures.number(k[2] * 1e-6, 4),
            Figures.of(Frequency.ofHertz(length / (2 * Math.PI)))));
    page.value(
        "recoil shift",
        Figures.signed(drive.recoilShift()) + ", not in the wavelengths or the frequency offset");
    page.value(
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
      page.value(
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
      page.value("", "and " + (others.size() - MOST_TARGETS) + " weaker ones");
    }
  }

  private void plan() {
    PulsePlan plan = budget.plan();
    page.heading("Pulse");
    page.value("duration", Figures.of(plan.duration()));
    page.value("Rabi frequency", Figures.of(plan.rabi()) + ", which the duration follows from");
    page.value(
        "frequency offset",
        Figures.signed(plan.frequencyOffset())
            + " added to the last laser puts the ladder on its light-shifted resonance");
    if (budget.pulse().offset().hertz() != 0) {
      page.value(
          "deliberate offset", Figures.signed(budget.pulse().offset()) + " from that resonance");
    }
  }

  private void causes() {
    page.heading(
        "Error budget (probabilities; ±: one standard uncertainty, from the atomic values)");
    page.hanging(row("cause", "error", "±", "share"), "lever");
    StringJoiner negligible = new StringJoiner("; ");
    for (CauseEntry cause : budget.causes()) {
      if (Math.max(Math.abs(cause.error()), cause.uncertainty()) < NEGLIGIBLE) {
        negligible.add(cause.cause());
        continue;
      }
      page.hanging(
          row(
              cause.cause(),
              Figures.probability(cause.error()),
              Figures.uncertainty(cause.uncertainty()),
              share(cause)),
          content.share(cause.error()) >= WORTH_A_LEVER ? cause.lever() : "");
    }
    if (negligible.length() > 0) {
      page.value(String.format(Locale.ROOT, "below %.0e each", NEGLIGIBLE), negligible.toString());
    }
    page.hanging(
        row(
            "TOTAL",
            Figures.probability(budget.total()),
            Figures.uncertainty(budget.uncertainty()),
            ""),
        "");
  }

  private String share(CauseEntry cause) {
    return String.format(Locale.ROOT, "%.1f %%", 100 * content.share(cause.error()));
  }

  private static String row(String cause, String error, String uncertainty, String share) {
    return "  "
        + Page.padded(cause, CAUSE_COLUMNS)
        + Page.right(error, ERROR_COLUMNS)
        + "  "
        + Page.right(uncertainty, ERROR_COLUMNS)
        + Page.right(share, SHARE_COLUMNS)
        + "   ";
  }

  private void check() {
    Check check = content.check();
    page.heading("Check by simulation of the whole ladder");
    page.value(
        "simulated total",
        String.format(
            Locale.ROOT,
            "%s ± %s (one standard error; %d shots, seed %d)",
            Figures.probability(check.total()),
            Figures.uncertainty(check.standardError()),
            check.shots(),
            check.seed()));
    double difference = budget.total() - check.total();
    page.value(
        check.agrees() ? "agrees" : "DISAGREES",
        String.format(
            Locale.ROOT,
            "the total of the causes is %s %s; agreement is 10 %% or three standard errors",
            Figures.probability(Math.abs(difference)),
            difference < 0 ? "smaller" : "larger"));
  }

  private void list(String heading, List<String> sentences) {
    if (!sentences.isEmpty()) {
      page.heading(heading);
      sentences.forEach(page::bullet);
    }
  }
}
