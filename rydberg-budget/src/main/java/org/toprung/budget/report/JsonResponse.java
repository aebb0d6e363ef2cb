package org.toprung.budget.report;

import java.io.IOException;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import org.toprung.budget.response.Knob;
import org.toprung.budget.response.PulseResponse;

/** How the pulse reacts, in JSON: derivatives, filter functions, time in each level. */
final class JsonResponse implements JsonOutput.Part {
  private static final double LOWEST = 1e-2; // frequencies, over 1/duration
  private static final double HIGHEST = 1e2;
  private static final int FREQUENCIES = 81;

  private final PulseResponse response;

  JsonResponse(PulseResponse response) {
    this.response = response;
  }

  @Override
  public void write(JsonOutput out) throws IOException {
    out.number("undisturbed_error", response.error());
    List<JsonOutput.Part> knobs = new ArrayList<>();
    for (Knob knob : response.knobs()) {
      String unit = knob.kind() == Knob.Kind.FREQUENCY ? "_per_Hz" : "";
      String squared = knob.kind() == Knob.Kind.FREQUENCY ? "_per_Hz2" : "";
      knobs.add(
          o -> {
            o.text("knob", knob.toString());
            o.number("slope" + unit, response.slope(knob));
            o.number("curvature" + squared, response.curvature(knob, knob));
          });
    }
    out.objects("knobs", knobs);
    out.object("seconds_in_states", o -> all(o, response.secondsInStates()));
    out.object("leakage", o -> all(o, response.leakage()));
    double unit = 1 / response.seconds();
    double[] grid = PulseResponse.logGrid(LOWEST * unit, HIGHEST * unit, FREQUENCIES);
    out.object(
        "filter",
        o -> {
          o.numbers("frequency_Hz", grid);
          for (int k = 0; k < response.steps(); k++) {
            double[] frequency = new double[grid.length];
            double[] intensity = new double[grid.length];
            for (int i = 0; i < grid.length; i++) {
              frequency[i] = response.frequencyFilter(k, grid[i]);
              intensity[i] = response.intensityFilter(k, grid[i]);
            }
            o.numbers("laser_frequency_" + (k + 1) + "_per_Hz2", frequency);
            o.numbers("beam_intensity_" + (k + 1), intensity);
          }
        });
  }

  private static void all(JsonOutput out, Map<String, Double> values) throws IOException {
    for (Map.Entry<String, Double> entry : values.entrySet()) {
      out.number(entry.getKey(), entry.getValue());
    }
  }
}
