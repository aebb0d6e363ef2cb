package org.toprung.budget.report;

import com.fasterxml.jackson.core.JsonFactory;
import com.fasterxml.jackson.core.JsonGenerator;
import java.io.IOException;
import java.io.StringWriter;
import java.io.UncheckedIOException;
import java.util.List;
import java.util.Locale;
import org.toprung.core.drive.DriveKernel;
import org.toprung.core.drive.KernelData;
import org.toprung.core.drive.ShotPlan;
import org.toprung.core.structure.FarShiftSeries;

/**
 * Kernels and plans as small JSON documents, to be logged with a shot and read again.
 *
 * <p>A document names its format and version first. Numbers are written so that they come back
 * exactly; units are in the key names. A kernel is written down by its numbers, not by the atom and
 * the beams they came from: years later it answers as it did, whatever has been learned about the
 * atom since. Reading refuses other formats and versions, missing and unknown keys, and numbers
 * that make no kernel or plan.
 *
 * <p>Needs the optional Jackson dependencies, as {@link JsonReport} does.
 */
public final class DriveDocument {
  private static final String KERNEL = "toprung-kernel";
  private static final String PLAN = "toprung-plan";
  private static final int VERSION = 1;

  private final JsonGenerator json;

  private DriveDocument(JsonGenerator json) {
    this.json = json;
  }

  private interface Part {
    void write(DriveDocument document) throws IOException;
  }

  /**
   * Writes a kernel down.
   *
   * @param kernel the kernel
   * @return a JSON object on one line
   */
  public static String render(DriveKernel kernel) {
    return document(KERNEL, document -> document.kernel(kernel.data()));
  }

  /**
   * Writes a plan down.
   *
   * @param plan the plan
   * @return a JSON object on one line
   */
  public static String render(ShotPlan plan) {
    return document(PLAN, document -> document.plan(plan));
  }

  /**
   * Reads a kernel.
   *
   * @param json what {@link #render(DriveKernel)} wrote
   * @return the same kernel
   * @throws IllegalArgumentException if the text is no such document; the message names the key
   */
  public static DriveKernel parseKernel(String json) {
    JsonRecord document = opened(json, KERNEL);
    KernelData data =
        new KernelData(
            document.text("description"),
            document.records("steps", DriveDocument::readStep),
            document.number("detuning_Hz"),
            document.number("lowest_detuning_Hz"),
            document.number("highest_detuning_Hz"),
            document.number("far_shift_relative_uncertainty"),
            document.number("trap_shift_Hz"),
            document.records(
                "partners", r -> new KernelData.Partner(r.number("distance_Hz"), r.truth("kept"))),
            document.integer("targets"),
            document.records("direct", DriveDocument::readLink),
            document.records(
                "intermediates",
                r ->
                    new KernelData.Intermediate(
                        r.number("energy_Hz"),
                        r.number("decay_per_s"),
                        r.number("start_re_Hz"),
                        r.number("start_im_Hz"),
                        r.records("links", DriveDocument::readLink))),
            document.records(
                "paths",
                r ->
                    new KernelData.Path(
                        r.integer("target"),
                        r.number("re_Hz2"),
                        r.number("im_Hz2"),
                        r.number("away_Hz"))));
    document.requireNothingLeft();
    return DriveKernel.of(data);
  }

  /**
   * Reads a plan.
   *
   * @param json what {@link #render(ShotPlan)} wrote
   * @return an equal plan
   * @throws IllegalArgumentException if the text is no such document; the message names the key
   */
  public static ShotPlan parsePlan(String json) {
    JsonRecord document = opened(json, PLAN);
    ShotPlan plan =
        new ShotPlan(
            document.text("description"),
            document.numbers("power_W"),
            document.number("detuning_Hz"),
            document.numbers("field_factor"),
            document.number("area_rad"),
            document.number("rabi_Hz"),
            document.number("start_light_shift_Hz"),
            document.number("target_light_shift_Hz"),
            document.number("scattering_per_s"),
            document.number("duration_s"),
            document.number("frequency_offset_Hz"));
    document.requireNothingLeft();
    return plan;
  }

  private static JsonRecord opened(String json, String format) {
    JsonRecord document = JsonRecord.parse(json);
    String given = document.text("format");
    if (!given.equals(format)) {
      throw new IllegalArgumentException("format: given " + given + "; allowed: " + format);
    }
    int version = document.integer("version");
    if (version != VERSION) {
      throw new IllegalArgumentException(
          String.format(Locale.ROOT, "version: given %d; allowed: %d", version, VERSION));
    }
    return document;
  }

  private static KernelData.Step readStep(JsonRecord r) {
    return new KernelData.Step(
        r.number("power_W"),
        r.number("intensity_ratio"),
        r.number("squared_field_V2_per_m2"),
        r.number("strongest_Hz"),
        r.number("relative_uncertainty"),
        r.record("start_shift", DriveDocument::readSeries),
        r.record("target_shift", DriveDocument::readSeries));
  }

  private static FarShiftSeries readSeries(JsonRecord r) {
    return new FarShiftSeries(
        r.number("centre_Hz"),
        r.truth("closure"),
        r.number("constant"),
        r.numbers("coefficients"),
        r.records(
            "poles", p -> new FarShiftSeries.Pole(p.number("distance_Hz"), p.number("residue"))));
  }

  private static KernelData.Link readLink(JsonRecord r) {
    return new KernelData.Link(r.integer("target"), r.number("re_Hz"), r.number("im_Hz"));
  }

  private static String document(String format, Part body) {
    StringWriter text = new StringWriter();
    try (JsonGenerator json = new JsonFactory().createGenerator(text)) {
      json.writeStartObject();
      json.writeStringField("format", format);
      json.writeNumberField("version", VERSION);
      body.write(new DriveDocument(json));
      json.writeEndObject();
    } catch (IOException e) {
      throw new UncheckedIOException(e);
    }
    return text.toString();
  }

  private void plan(ShotPlan plan) throws IOException {
    json.writeStringField("description", plan.description());
    numbers("power_W", plan.powersWatts());
    json.writeNumberField("detuning_Hz", plan.detuningHertz());
    numbers("field_factor", plan.fieldFactors());
    json.writeNumberField("area_rad", plan.areaRadians());
    json.writeNumberField("rabi_Hz", plan.rabiHertz());
    json.writeNumberField("start_light_shift_Hz", plan.startLightShiftHertz());
    json.writeNumberField("target_light_shift_Hz", plan.targetLightShiftHertz());
    json.writeNumberField("scattering_per_s", plan.scatteringPerSecond());
    json.writeNumberField("duration_s", plan.durationSeconds());
    json.writeNumberField("frequency_offset_Hz", plan.frequencyOffsetHertz());
  }

  private void kernel(KernelData data) throws IOException {
    json.writeStringField("description", data.description());
    json.writeArrayFieldStart("steps");
    for (KernelData.Step step : data.steps()) {
      step(step);
    }
    json.writeEndArray();
    json.writeNumberField("detuning_Hz", data.detuningHertz());
    json.writeNumberField("lowest_detuning_Hz", data.lowestDetuningHertz());
    json.writeNumberField("highest_detuning_Hz", data.highestDetuningHertz());
    json.writeNumberField("far_shift_relative_uncertainty", data.farShiftRelativeUncertainty());
    json.writeNumberField("trap_shift_Hz", data.trapShiftHertz());
    json.writeArrayFieldStart("partners");
    for (KernelData.Partner partner : data.partners()) {
      json.writeStartObject();
      json.writeNumberField("distance_Hz", partner.distanceHertz());
      json.writeBooleanField("kept", partner.kept());
      json.writeEndObject();
    }
    json.writeEndArray();
    json.writeNumberField("targets", data.targets());
    links("direct", data.direct());
    json.writeArrayFieldStart("intermediates");
    for (KernelData.Intermediate i : data.intermediates()) {
      json.writeStartObject();
      json.writeNumberField("energy_Hz", i.energyHertz());
      json.writeNumberField("decay_per_s", i.decayPerSecond());
      json.writeNumberField("start_re_Hz", i.startRe());
      json.writeNumberField("start_im_Hz", i.startIm());
      links("links", i.links());
      json.writeEndObject();
    }
    json.writeEndArray();
    json.writeArrayFieldStart("paths");
    for (KernelData.Path path : data.paths()) {
      json.writeStartObject();
      json.writeNumberField("target", path.target());
      json.writeNumberField("re_Hz2", path.productRe());
      json.writeNumberField("im_Hz2", path.productIm());
      json.writeNumberField("away_Hz", path.awayHertz());
      json.writeEndObject();
    }
    json.writeEndArray();
  }

  private void step(KernelData.Step step) throws IOException {
    json.writeStartObject();
    json.writeNumberField("power_W", step.powerWatts());
    json.writeNumberField("intensity_ratio", step.intensityRatio());
    json.writeNumberField("squared_field_V2_per_m2", step.squaredField());
    json.writeNumberField("strongest_Hz", step.strongestHertz());
    json.writeNumberField("relative_uncertainty", step.relativeUncertainty());
    series("start_shift", step.start());
    series("target_shift", step.target());
    json.writeEndObject();
  }

  private void series(String key, FarShiftSeries series) throws IOException {
    json.writeObjectFieldStart(key);
    json.writeNumberField("centre_Hz", series.centreHertz());
    json.writeBooleanField("closure", series.closure());
    json.writeNumberField("constant", series.constant());
    numbers("coefficients", series.coefficients());
    json.writeArrayFieldStart("poles");
    for (FarShiftSeries.Pole pole : series.poles()) {
      json.writeStartObject();
      json.writeNumberField("distance_Hz", pole.distanceHertz());
      json.writeNumberField("residue", pole.residue());
      json.writeEndObject();
    }
    json.writeEndArray();
    json.writeEndObject();
  }

  private void links(String key, List<KernelData.Link> links) throws IOException {
    json.writeArrayFieldStart(key);
    for (KernelData.Link link : links) {
      json.writeStartObject();
      json.writeNumberField("target", link.target());
      json.writeNumberField("re_Hz", link.re());
      json.writeNumberField("im_Hz", link.im());
      json.writeEndObject();
    }
    json.writeEndArray();
  }

  private void numbers(String key, List<Double> values) throws IOException {
    json.writeArrayFieldStart(key);
    for (double value : values) {
      json.writeNumber(value);
    }
    json.writeEndArray();
  }
}
