package org.toprung.budget.report;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import com.fasterxml.jackson.databind.JsonNode;
import com.fasterxml.jackson.databind.ObjectMapper;
import java.io.IOException;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;
import org.toprung.budget.Budget;
import org.toprung.budget.CauseEntry;
import org.toprung.budget.Check;
import org.toprung.core.drive.Drive;

class JsonReportTest {

  private static JsonNode parsed(ReportContent content) throws IOException {
    return new ObjectMapper().readTree(JsonReport.render(content));
  }

  @ParameterizedTest
  @ValueSource(
      strings = {
        "/drive/rabi_Hz",
        "/drive/steps/0/wavelength_m",
        "/drive/steps/1/rabi_Hz",
        "/drive/steps/1/reduced_dipole_ea0",
        "/drive/start_light_shift_Hz",
        "/drive/target_light_shift_Hz",
        "/drive/intermediate_scattering_per_pulse",
        "/drive/wave_vector_per_m/2",
        "/drive/magnetic_sensitivity_Hz_per_T",
        "/drive/relative_uncertainty",
        "/drive/other_targets/0/rabi_Hz",
        "/drive/other_targets/0/detuning_Hz",
        "/pulse/duration_s",
        "/pulse/frequency_offset_Hz",
        "/budget/total",
        "/version",
        "/pulse/breaks_s/1",
        "/response/undisturbed_error",
        "/response/knobs/0/curvature",
        "/response/knobs/1/curvature_per_Hz2",
        "/response/seconds_in_states/target",
        "/response/filter/frequency_Hz/80",
        "/response/filter/laser_frequency_2_per_Hz2/80",
        "/response/filter/beam_intensity_1/80",
        "/budget/uncertainty",
        "/budget/atomic_uncertainty",
        "/budget/bench_uncertainty",
        "/budget/overlap",
        "/budget/causes/0/atomic_uncertainty",
        "/budget/causes/0/bench_uncertainty",
        "/budget/sensitivities/0/slope",
        "/budget/sensitivities/0/saved_by_halving",
        "/budget/sensitivities/0/saved_by_doubling",
        "/check/causes/0/composed",
        "/check/causes/0/simulated",
        "/check/causes/0/standard_error",
        "/budget/causes/0/error",
        "/budget/causes/0/uncertainty",
        "/check/total",
        "/check/standard_error",
        "/check/shots",
        "/check/seed"
      })
  void hasTheNumbersThatProgramsRelyOn(String path) throws IOException {
    JsonNode value = parsed(SampleReport.wide()).at(path);
    assertTrue(value.isNumber() && Double.isFinite(value.doubleValue()), path + ": " + value);
  }

  @ParameterizedTest
  @ValueSource(
      strings = {
        "/format",
        "/title",
        "/pulse/name",
        "/pulse/goal",
        "/pulse/detuning_reference",
        "/budget/causes/0/fate",
        "/budget/causes/0/place",
        "/budget/sensitivities/0/value",
        "/check/causes/0/cause",
        "/species",
        "/start",
        "/target",
        "/drive/steps/0/to",
        "/drive/steps/0/dipole_origin",
        "/drive/other_targets/0/sublevel",
        "/budget/causes/0/cause",
        "/budget/causes/0/lever",
        "/budget/causes/0/source",
        "/budget/not_assessed/0",
        "/cautions/0"
      })
  void hasTheTextsThatProgramsRelyOn(String path) throws IOException {
    JsonNode value = parsed(SampleReport.wide()).at(path);
    assertTrue(value.isTextual() && !value.textValue().isBlank(), path + ": " + value);
  }

  @Test
  void carriesTheValuesOfTheBudget() throws IOException {
    ReportContent content = SampleReport.reference();
    Budget budget = content.budget();
    Drive drive = budget.drive();
    JsonNode json = parsed(content);
    assertEquals(drive.rabi().hertz(), json.at("/drive/rabi_Hz").doubleValue());
    assertEquals(
        drive.steps().get(0).wavelength().metres(),
        json.at("/drive/steps/0/wavelength_m").doubleValue());
    assertEquals("68S1/2 mJ=1/2", json.at("/drive/steps/1/to").textValue());
    assertEquals(
        drive.startLightShift().hertz(), json.at("/drive/start_light_shift_Hz").doubleValue());
    assertEquals(
        drive.targetLightShift().hertz(), json.at("/drive/target_light_shift_Hz").doubleValue());
    assertEquals(3, json.at("/drive/wave_vector_per_m").size());
    assertEquals(budget.plan().duration().seconds(), json.at("/pulse/duration_s").doubleValue());
    assertEquals(budget.total(), json.at("/budget/total").doubleValue());
    assertEquals(budget.causes().size(), json.at("/budget/causes").size());
    for (int i = 0; i < budget.causes().size(); i++) {
      CauseEntry cause = budget.causes().get(i);
      assertEquals(cause.cause(), json.at("/budget/causes/" + i + "/cause").textValue());
      assertEquals(cause.error(), json.at("/budget/causes/" + i + "/error").doubleValue());
    }
    assertEquals(content.check().agrees(), json.at("/check/agrees").booleanValue());
    assertTrue(json.at("/check/agrees").isBoolean());
  }

  /** SI units stand in the names of all keys whose value has one. */
  @Test
  void namesAUnitInEveryKeyOfTheDrive() throws IOException {
    List<String> pure =
        List.of(
            "relative_uncertainty",
            "far_light_shift_relative_uncertainty",
            "intermediate_admixture",
            "intermediate_scattering_per_pulse");
    parsed(SampleReport.reference())
        .at("/drive")
        .properties()
        .forEach(
            field -> {
              boolean number = field.getValue().isNumber();
              boolean unit = field.getKey().matches(".*_(Hz|T|Hz_per_T|per_m|m|s|W|V_per_m)");
              assertFalse(number && !unit && !pure.contains(field.getKey()), field.getKey());
            });
  }

  @Test
  void carriesShapeAndPlaceOfBeamsAndTheElectricField() throws IOException {
    ReportContent content = SampleReport.shaped();
    Drive drive = content.budget().drive();
    JsonNode json = parsed(content).at("/drive");
    JsonNode first = json.at("/steps/0");
    assertEquals(2e-3, first.at("/power_W").doubleValue());
    assertEquals(30e-6, first.at("/waists_m/1").doubleValue());
    assertEquals(1, first.at("/waist_axis/1").doubleValue());
    assertTrue(first.at("/waist_m").isMissingNode());
    assertEquals(5e-6, first.at("/focus_m/1").doubleValue());
    assertEquals(0.002, first.at("/impurity").doubleValue());
    assertEquals(45, first.at("/impurity_phase_deg").doubleValue());
    JsonNode second = json.at("/steps/1");
    assertTrue(second.at("/power_W").isMissingNode());
    assertEquals(1.5e8, second.at("/peak_intensity_W_per_m2").doubleValue());
    assertEquals(
        drive.steps().get(1).fieldVoltsPerMetre(), second.at("/field_V_per_m").doubleValue());
    assertEquals(5, json.at("/electric_field_V_per_m/2").doubleValue());
    assertEquals(drive.starkShift().hertz(), json.at("/stark_shift_Hz").doubleValue());
    assertEquals(drive.recoilShift().hertz(), json.at("/recoil_shift_Hz").doubleValue());
  }

  @Test
  void neverWritesWhatIsNotANumber() {
    ReportContent sample = SampleReport.reference();
    Check broken = new Check(0.1, Double.NaN, true, 40, 1, List.of());
    ReportContent content = SampleReport.with(sample, broken);
    IllegalStateException e =
        assertThrows(IllegalStateException.class, () -> JsonReport.render(content));
    assertTrue(e.getMessage().contains("standard_error"), e.getMessage());
  }

  /** At low frequencies the filter of a resonance is half its curvature: exact. */
  @Test
  void writesFiltersThatEndInTheStaticResponse() throws IOException {
    JsonNode response = parsed(SampleReport.reference()).at("/response");
    double filter = response.at("/filter/laser_frequency_1_per_Hz2/0").doubleValue();
    double curvature = response.at("/knobs/1/curvature_per_Hz2").doubleValue();
    assertEquals(0.5 * curvature, filter, 1e-3 * filter);
    assertEquals(81, response.at("/filter/frequency_Hz").size());
  }

  @Test
  void carriesSensitivitiesAndChecksOfSingleCauses() throws IOException {
    ReportContent content = SampleReport.checked(SampleReport.noisy(), true, "Doppler shift");
    JsonNode json = parsed(content);
    assertEquals(content.sensitivities().size(), json.at("/budget/sensitivities").size());
    assertEquals(content.budget().causes().size() + 1, json.at("/check/causes").size());
    for (JsonNode cause : json.at("/check/causes")) {
      boolean objects = cause.at("/cause").textValue().equals("Doppler shift");
      assertEquals(!objects, cause.at("/agrees").booleanValue(), cause.toString());
    }
    assertEquals("Gaussian 3.1416 rad", json.at("/pulse/name").textValue());
    assertEquals(content.budget().overlap(), json.at("/budget/overlap").doubleValue());
  }
}
