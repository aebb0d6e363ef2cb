package org.toprung.budget.report;

import java.io.IOException;
import java.util.ArrayList;
import java.util.List;
import org.toprung.budget.Budget;
import org.toprung.core.drive.Beam;
import org.toprung.core.drive.Drive;
import org.toprung.core.drive.GroundLight;
import org.toprung.core.drive.Profile;
import org.toprung.core.structure.DipoleElement;
import org.toprung.core.structure.ReducedElement;

/** The drive in JSON. */
final class JsonDrive implements JsonOutput.Part {
  private final Budget budget;
  private final Drive drive;

  JsonDrive(Budget budget) {
    this.budget = budget;
    this.drive = budget.drive();
  }

  @Override
  public void write(JsonOutput out) throws IOException {
    out.number("magnetic_field_T", drive.field().tesla());
    out.numbers("electric_field_V_per_m", drive.electricFieldVoltsPerMetre());
    out.number("stark_shift_Hz", drive.starkShift().hertz());
    out.number("rabi_Hz", drive.rabi().hertz());
    out.number("relative_uncertainty", drive.relativeUncertainty());
    List<JsonOutput.Part> steps = new ArrayList<>();
    for (int k = 0; k < drive.steps().size(); k++) {
      int step = k;
      steps.add(o -> step(o, step));
    }
    out.objects("steps", steps);
    out.number("start_light_shift_Hz", drive.startLightShift().hertz());
    out.number("target_light_shift_Hz", drive.targetLightShift().hertz());
    if (drive.idle().isPresent()) {
      GroundLight idle = drive.idle().get();
      out.object(
          "idle",
          o -> {
            o.text("sublevel", idle.sublevel().toString());
            o.number("light_shift_Hz", idle.shift().hertz());
            o.number("scattering_per_s", idle.scatteringPerSecond());
          });
    }
    if (drive.trap().isPresent()) {
      Drive.TrapLight trap = drive.trap().get();
      out.object(
          "trap",
          o -> {
            o.number("wavelength_m", trap.wavelength().metres());
            o.number("start_light_shift_Hz", trap.startShift().hertz());
            o.number("target_light_shift_Hz", trap.targetShift().hertz());
          });
    }
    out.number("far_light_shift_relative_uncertainty", drive.farShiftRelativeUncertainty());
    out.number("intermediate_admixture", drive.admixture());
    out.number("intermediate_scattering_per_pulse", budget.scatteringPerPulse());
    out.numbers("wave_vector_per_m", drive.waveVectorPerMetre());
    out.number("recoil_shift_Hz", drive.recoilShift().hertz());
    out.number("magnetic_sensitivity_Hz_per_T", drive.magneticSensitivityHertzPerTesla());
    List<JsonOutput.Part> others = new ArrayList<>();
    for (Drive.OtherTarget other : drive.otherTargets()) {
      others.add(
          o -> {
            o.text("sublevel", other.sublevel());
            o.number("rabi_Hz", other.rabi().hertz());
            o.number("detuning_Hz", other.detuning().hertz());
          });
    }
    out.objects("other_targets", others);
  }

  private void step(JsonOutput out, int k) throws IOException {
    Drive.Step step = drive.steps().get(k);
    ReducedElement element = step.element();
    String kind = element instanceof DipoleElement ? "dipole" : "quadrupole";
    String unit = element instanceof DipoleElement ? "ea0" : "ea02";
    out.text("to", step.to());
    out.number("wavelength_m", step.wavelength().metres());
    if (k < drive.intermediates().size()) {
      out.number("detuning_Hz", drive.detuning(k).hertz());
    }
    beam(out, step);
    out.number("rabi_Hz", step.rabi().hertz());
    out.number("reduced_" + kind + "_" + unit, element.modulus());
    out.number(
        "reduced_" + kind + "_uncertainty_" + unit,
        element.modulus() * element.relativeUncertainty());
    out.text(kind + "_origin", DriveSections.origin(step));
    out.text(kind + "_source", element.source());
    out.number("start_light_shift_Hz", drive.startLightShift(k).hertz());
    out.number("target_light_shift_Hz", drive.targetLightShift(k).hertz());
  }

  private static void beam(JsonOutput out, Drive.Step step) throws IOException {
    Beam beam = step.beam();
    if (beam.profile() instanceof Profile.Gaussian round) {
      out.number("power_W", round.beamPower().watts());
      out.number("waist_m", round.waist().metres());
    }
    if (beam.profile() instanceof Profile.Elliptical e) {
      out.number("power_W", e.beamPower().watts());
      out.numbers("waists_m", e.firstWaist().metres(), e.secondWaist().metres());
      out.numbers("waist_axis", e.axisX(), e.axisY(), e.axisZ());
    }
    out.number("peak_intensity_W_per_m2", beam.profile().peakIntensity().wattsPerSquareMetre());
    out.numbers("focus_m", beam.focusMetres());
    out.number("field_V_per_m", step.fieldVoltsPerMetre());
    out.text("polarization", beam.polarization().toString());
    out.number("impurity", beam.impurity());
    out.number("impurity_phase_deg", beam.impurityPhaseDegrees());
    out.numbers("direction", beam.direction());
  }
}
