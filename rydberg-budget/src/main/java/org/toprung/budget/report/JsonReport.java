package org.toprung.budget.report;

import java.io.IOException;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import org.toprung.budget.Budget;
import org.toprung.budget.CauseCheck;
import org.toprung.budget.CauseEntry;
import org.toprung.budget.Check;
import org.toprung.budget.Sensitivity;
import org.toprung.budget.pulse.PulseProgram;
import org.toprung.core.atom.Level;
import org.toprung.core.drive.PulsePlan;

/**
 * The report for programs: JSON with SI units in the key names. A value that is not finite is never
 * written. Reduced dipole elements are given by their size, since the sign of a single one means
 * nothing without the phases of both wavefunctions.
 *
 * <p>The document is an object with these keys; within a version keys may come but not go, nor
 * change their meaning:
 *
 * <ul>
 *   <li>{@code format}, {@code version}: {@value #FORMAT}, {@value #VERSION}
 *   <li>{@code title}, {@code species}, {@code start}, {@code intermediates}, {@code target}: texts
 *   <li>{@code drive}: field, steps with beams and elements, Rabi frequency, light shifts, other
 *       targets
 *   <li>{@code pulse}: name, goal (transfer, rotation, return or coherence), duration, offsets,
 *       what detunings count from (following, full_power or bare)
 *   <li>{@code response}: {@code undisturbed_error}; {@code knobs}, each with slope and curvature
 *       of the error; {@code seconds_in_states} and {@code leakage} by state; {@code filter}, the
 *       filter functions of each laser's frequency and each beam's relative intensity over {@code
 *       frequency_Hz}, a logarithmic grid about the inverse duration
 *   <li>{@code budget}: {@code total}, its uncertainty, whole and from atomic data and bench values
 *       apart; {@code overlap}, the total minus the sum of all causes; {@code causes}, each with
 *       error, uncertainties, share, {@code fate} (phase, leak, loss, readout or recoverable),
 *       {@code place}, lever and source; {@code not_assessed}; {@code sensitivities}, each with
 *       {@code slope} dE/d(ln value) and what half and twice the value save
 *   <li>{@code check}: simulated total, whether it agrees, and {@code causes}, each alone; empty
 *       where only the total was simulated
 *   <li>{@code warnings}, {@code cautions}: sentences
 * </ul>
 */
public final class JsonReport {
  private static final String FORMAT = "toprung-report";
  private static final int VERSION = 1;

  private final ReportContent content;
  private final Budget budget;

  private JsonReport(ReportContent content) {
    this.content = content;
    this.budget = content.budget();
  }

  /**
   * Renders the report.
   *
   * @param content what to tell about
   * @return a JSON object, ended by a line feed
   * @throws IllegalStateException if a number of the budget is not finite
   */
  public static String render(ReportContent content) {
    return JsonOutput.document(new JsonReport(content)::write);
  }

  private void write(JsonOutput out) throws IOException {
    out.text("format", FORMAT);
    out.integer("version", VERSION);
    out.text("title", content.title());
    out.text("species", budget.drive().species().name());
    out.text("start", budget.drive().start().toString());
    out.texts(
        "intermediates", budget.drive().intermediates().stream().map(Level::toString).toList());
    out.text("target", budget.drive().target().toString());
    out.object("drive", new JsonDrive(budget));
    out.object("pulse", this::pulse);
    out.object("response", new JsonResponse(budget.response()));
    out.object("budget", this::budget);
    out.object("check", this::check);
    out.texts("warnings", content.warnings());
    out.texts("cautions", content.cautions());
  }

  private void pulse(JsonOutput out) throws IOException {
    PulsePlan plan = budget.plan();
    PulseProgram program = budget.program();
    out.text("name", budget.pulse().name());
    out.text("description", budget.pulse().toString());
    out.text("goal", word(budget.pulse().goal()));
    out.number("area_rad", budget.pulse().planAreaRadians());
    out.number("duration_s", program.seconds());
    out.number("rabi_Hz", plan.rabi().hertz());
    out.number("frequency_offset_Hz", plan.frequencyOffset().hertz());
    out.number("deliberate_offset_Hz", budget.pulse().offset().hertz());
    out.text("detuning_reference", word(program.reference()));
    out.numbers("breaks_s", program.breaks());
  }

  private static String word(Enum<?> constant) {
    return constant.name().toLowerCase(Locale.ROOT);
  }

  private void budget(JsonOutput out) throws IOException {
    out.number("total", budget.total());
    out.number("uncertainty", budget.uncertainty());
    out.number("atomic_uncertainty", budget.atomicUncertainty());
    out.number("bench_uncertainty", budget.benchUncertainty());
    out.number("overlap", budget.overlap());
    List<JsonOutput.Part> causes = new ArrayList<>();
    budget.causes().forEach(c -> causes.add(o -> cause(o, c)));
    out.objects("causes", causes);
    out.texts("not_assessed", budget.notAssessed());
    List<JsonOutput.Part> sensitivities = new ArrayList<>();
    content.sensitivities().forEach(s -> sensitivities.add(o -> sensitivity(o, s)));
    out.objects("sensitivities", sensitivities);
  }

  private void cause(JsonOutput out, CauseEntry cause) throws IOException {
    out.text("cause", cause.cause());
    out.number("error", cause.error());
    out.number("uncertainty", cause.uncertainty());
    out.number("atomic_uncertainty", cause.atomicUncertainty());
    out.number("bench_uncertainty", cause.benchUncertainty());
    out.number("share", content.share(cause.error()));
    out.text("fate", cause.fate().kind().word());
    out.text("place", cause.fate().place());
    out.text("lever", cause.lever());
    out.text("source", cause.source());
  }

  private static void sensitivity(JsonOutput out, Sensitivity s) throws IOException {
    out.text("value", s.value());
    out.number("slope", s.slope());
    out.number("saved_by_halving", s.savedByHalving());
    out.number("saved_by_doubling", s.savedByDoubling());
  }

  private void check(JsonOutput out) throws IOException {
    Check check = content.check();
    out.number("total", check.total());
    out.number("standard_error", check.standardError());
    out.truth("agrees", check.agrees());
    out.integer("shots", check.shots());
    out.integer("seed", check.seed());
    List<JsonOutput.Part> causes = new ArrayList<>();
    for (CauseCheck c : check.causes()) {
      causes.add(
          o -> {
            o.text("cause", c.cause());
            o.number("composed", c.composed());
            o.number("simulated", c.simulated());
            o.number("standard_error", c.standardError());
            o.truth("agrees", c.agrees());
          });
    }
    out.objects("causes", causes);
  }
}
