package org.toprung.budget.report;

import com.fasterxml.jackson.core.JsonFactory;
import com.fasterxml.jackson.core.JsonGenerator;
import com.fasterxml.jackson.core.util.DefaultIndenter;
import com.fasterxml.jackson.core.util.DefaultPrettyPrinter;
import com.fasterxml.jackson.core.util.Separators;
import java.io.IOException;
import java.io.StringWriter;
import java.io.UncheckedIOException;
import java.util.List;
import org.toprung.budget.Budget;
import org.toprung.budget.CauseEntry;
import org.toprung.budget.Check;
import org.toprung.core.atom.Level;
import org.toprung.core.drive.Beam;
import org.toprung.core.drive.Drive;
import org.toprung.core.drive.GroundLight;
import org.toprung.core.drive.Profile;
import org.toprung.core.drive.PulsePlan;
import org.toprung.core.structure.DipoleElement;
import org.toprung.core.structure.ReducedElement;

/**
 * The report for programs: JSON with SI units in the key names. A value that is not finite is never
 * written. Reduced dipole elements are given by their size, since the sign of a single one means
 * nothing without the phases of both wavefunctions.
 */
public final class JsonReport {
  private final JsonGenerator json;

  private JsonReport(JsonGenerator json) {
    this.json = json;
  }

  /**
   * Renders the report.
   *
   * @param content what to tell about
   * @return a JSON object, ended by a line feed
   * @throws IllegalStateException if a number of the budget is not finite
   */
  public static String render(ReportContent content) {
    StringWriter text = new StringWriter();
    DefaultPrettyPrinter printer =
        new DefaultPrettyPrinter(
            Separators.createDefaultInstance()
                .withObjectFieldValueSpacing(Separators.Spacing.AFTER)
                .withRootSeparator(""));
    printer.indentObjectsWith(new DefaultIndenter("  ", "\n"));
    try (JsonGenerator json = new JsonFactory().createGenerator(text)) {
      json.setPrettyPrinter(printer);
      new JsonReport(json).write(content);
    } catch (IOException e) {
      throw new UncheckedIOException(e);
    }
    return text.append('\n').toString();
  }

  private void write(ReportContent content) throws IOException {
    Budget budget = content.budget();
    json.writeStartObject();
    json.writeStringField("title", content.title());
    json.writeStringField("species", budget.drive().species().name());
    json.writeStringField("start", budget.drive().start().toString());
    strings("intermediates", budget.drive().intermediates().stream().map(Level::toString).toList());
    json.writeStringField("target", budget.drive().target().toString());
    drive(budget);
    pulse(budget);
    budget(content);
    check(content.check());
    strings("warnings", content.warnings());
    strings("cautions", content.cautions());
    json.writeEndObject();
  }

  private void drive(Budget budget) throws IOException {
    Drive drive = budget.drive();
    json.writeObjectFieldStart("drive");
    number("magnetic_field_T", drive.field().tesla());
    vector("electric_field_V_per_m", drive.electricFieldVoltsPerMetre());
    number("stark_shift_Hz", drive.starkShift().hertz());
    number("rabi_Hz", drive.rabi().hertz());
    number("relative_uncertainty", drive.relativeUncertainty());
    json.writeArrayFieldStart("steps");
    for (int k = 0; k < drive.steps().size(); k++) {
      step(drive, k);
    }
    json.writeEndArray();
    number("start_light_shift_Hz", drive.startLightShift().hertz());
    number("target_light_shift_Hz", drive.targetLightShift().hertz());
    if (drive.idle().isPresent()) {
      GroundLight idle = drive.idle().get();
      json.writeObjectFieldStart("idle");
      json.writeStringField("sublevel", idle.sublevel().toString());
      number("light_shift_Hz", idle.shift().hertz());
      number("scattering_per_s", idle.scatteringPerSecond());
      json.writeEndObject();
    }
    if (drive.trap().isPresent()) {
      Drive.TrapLight trap = drive.trap().get();
      json.writeObjectFieldStart("trap");
      number("wavelength_m", trap.wavelength().metres());
      number("start_light_shift_Hz", trap.startShift().hertz());
      number("target_light_shift_Hz", trap.targetShift().hertz());
      json.writeEndObject();
    }
    number("far_light_shift_relative_uncertainty", drive.farShiftRelativeUncertainty());
    number("intermediate_admixture", drive.admixture());
    number("intermediate_scattering_per_pulse", budget.scatteringPerPulse());
    vector("wave_vector_per_m", drive.waveVectorPerMetre());
    number("recoil_shift_Hz", drive.recoilShift().hertz());
    number("magnetic_sensitivity_Hz_per_T", drive.magneticSensitivityHertzPerTesla());
    json.writeArrayFieldStart("other_targets");
    for (Drive.OtherTarget other : drive.otherTargets()) {
      json.writeStartObject();
      json.writeStringField("sublevel", other.sublevel());
      number("rabi_Hz", other.rabi().hertz());
      number("detuning_Hz", other.detuning().hertz());
      json.writeEndObject();
    }
    json.writeEndArray();
    json.writeEndObject();
  }

  private void step(Drive drive, int k) throws IOException {
    Drive.Step step = drive.steps().get(k);
    ReducedElement element = step.element();
    String kind = element instanceof DipoleElement ? "dipole" : "quadrupole";
    String unit = element instanceof DipoleElement ? "ea0" : "ea02";
    json.writeStartObject();
    json.writeStringField("to", step.to());
    number("wavelength_m", step.wavelength().metres());
    if (k < drive.intermediates().size()) {
      number("detuning_Hz", drive.detuning(k).hertz());
    }
    beam(step);
    number("rabi_Hz", step.rabi().hertz());
    number("reduced_" + kind + "_" + unit, element.modulus());
    number(
        "reduced_" + kind + "_uncertainty_" + unit,
        element.modulus() * element.relativeUncertainty());
    json.writeStringField(kind + "_origin", DriveSections.origin(step));
    json.writeStringField(kind + "_source", element.source());
    number("start_light_shift_Hz", drive.startLightShift(k).hertz());
    number("target_light_shift_Hz", drive.targetLightShift(k).hertz());
    json.writeEndObject();
  }

  private void beam(Drive.Step step) throws IOException {
    Beam beam = step.beam();
    if (beam.profile() instanceof Profile.Gaussian round) {
      number("power_W", round.beamPower().watts());
      number("waist_m", round.waist().metres());
    }
    if (beam.profile() instanceof Profile.Elliptical e) {
      number("power_W", e.beamPower().watts());
      vector("waists_m", new double[] {e.firstWaist().metres(), e.secondWaist().metres()});
      vector("waist_axis", new double[] {e.axisX(), e.axisY(), e.axisZ()});
    }
    number("peak_intensity_W_per_m2", beam.profile().peakIntensity().wattsPerSquareMetre());
    vector("focus_m", beam.focusMetres());
    number("field_V_per_m", step.fieldVoltsPerMetre());
    json.writeStringField("polarization", beam.polarization().toString());
    number("impurity", beam.impurity());
    number("impurity_phase_deg", beam.impurityPhaseDegrees());
    vector("direction", beam.direction());
  }

  private void pulse(Budget budget) throws IOException {
    PulsePlan plan = budget.plan();
    json.writeObjectFieldStart("pulse");
    number("area_rad", budget.pulse().planAreaRadians());
    number("duration_s", plan.duration().seconds());
    number("rabi_Hz", plan.rabi().hertz());
    number("frequency_offset_Hz", plan.frequencyOffset().hertz());
    number("deliberate_offset_Hz", budget.pulse().offset().hertz());
    json.writeEndObject();
  }

  private void budget(ReportContent content) throws IOException {
    Budget budget = content.budget();
    json.writeObjectFieldStart("budget");
    number("total", budget.total());
    number("uncertainty", budget.uncertainty());
    json.writeArrayFieldStart("causes");
    for (CauseEntry cause : budget.causes()) {
      json.writeStartObject();
      json.writeStringField("cause", cause.cause());
      number("error", cause.error());
      number("uncertainty", cause.uncertainty());
      number("share", content.share(cause.error()));
      json.writeStringField("lever", cause.lever());
      json.writeStringField("source", cause.source());
      json.writeEndObject();
    }
    json.writeEndArray();
    strings("not_assessed", budget.notAssessed());
    json.writeEndObject();
  }

  private void check(Check check) throws IOException {
    json.writeObjectFieldStart("check");
    number("total", check.total());
    number("standard_error", check.standardError());
    json.writeBooleanField("agrees", check.agrees());
    json.writeNumberField("shots", check.shots());
    json.writeNumberField("seed", check.seed());
    json.writeEndObject();
  }

  private void number(String key, double value) throws IOException {
    json.writeFieldName(key);
    json.writeNumber(finite(key, value));
  }

  private void vector(String key, double[] values) throws IOException {
    json.writeArrayFieldStart(key);
    for (double value : values) {
      json.writeNumber(finite(key, value));
    }
    json.writeEndArray();
  }

  private void strings(String key, List<String> values) throws IOException {
    json.writeArrayFieldStart(key);
    for (String value : values) {
      json.writeString(value);
    }
    json.writeEndArray();
  }

  private static double finite(String key, double value) {
    if (!(Math.abs(value) <= Double.MAX_VALUE)) {
      throw new IllegalStateException("the value of " + key + " is " + value + ", not finite");
    }
    return value + 0.0; // no negative zero
  }
}
