package org.toprung.budget.report;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import java.util.function.DoubleUnaryOperator;
import java.util.stream.DoubleStream;
import org.toprung.budget.Budget;
import org.toprung.budget.bench.Bench;
import org.toprung.budget.bench.NoiseDensity;
import org.toprung.budget.report.FilterPanel.Band;
import org.toprung.budget.report.FilterPanel.Curve;
import org.toprung.budget.response.NoiseError;
import org.toprung.budget.response.PulseResponse;
import org.toprung.core.quantity.Frequency;

/**
 * What a filter chart shows: a panel for each noise density of the bench; without any, how the
 * pulse filters noise of all lasers and beams.
 *
 * @param title names the scenario
 * @param subtitle what is played
 * @param scale frequencies, Hz, the same in all panels
 * @param rabiHertz effective Rabi frequency at full power
 * @param panels at least one
 * @param notes how to read the panels, in sentences
 */
record FilterContent(
    String title,
    String subtitle,
    DecadeScale scale,
    double rabiHertz,
    List<FilterPanel> panels,
    List<String> notes) {
  private static final int POINTS = 800;
  private static final int MOST_DECADES = 10;
  private static final double OUTSIDE = 0.1; // of the error, beyond either end of a band
  private static final double WORTH_TELLING = 0.005; // share of the area of a filter
  private static final String FREQUENCY_UNIT = "1/Hz²";

  static FilterContent of(ReportContent content) {
    Budget budget = content.budget();
    Bench bench = budget.bench();
    PulseResponse response = budget.response();
    List<NoiseDensity> densities = new ArrayList<>();
    for (int k = 0; k < response.steps(); k++) {
      bench.frequencyNoiseDensity(k).ifPresent(densities::add);
      bench.intensityNoiseDensity(k).ifPresent(densities::add);
    }
    DecadeScale scale = scale(response, densities);
    double[] grid = PulseResponse.logGrid(scale.lowest(), Math.pow(10, scale.last()), POINTS);
    List<FilterPanel> panels = new ArrayList<>();
    for (int k = 0; k < response.steps(); k++) {
      int step = k;
      bench
          .frequencyNoiseDensity(k)
          .ifPresent(
              d ->
                  panels.add(
                      panel(
                          "Frequency noise of laser " + (step + 1),
                          new String[] {FREQUENCY_UNIT, "Hz²/Hz"},
                          f -> response.frequencyFilter(step, f),
                          d,
                          response.frequencyNoise(step, d),
                          grid)));
      bench
          .intensityNoiseDensity(k)
          .ifPresent(
              d ->
                  panels.add(
                      panel(
                          "Relative intensity noise of beam " + (step + 1),
                          new String[] {"no unit", "1/Hz"},
                          f -> response.intensityFilter(step, f),
                          d,
                          response.intensityNoise(step, d),
                          grid)));
    }
    if (panels.isEmpty()) {
      panels.addAll(withoutNoise(response, grid));
    }
    return new FilterContent(
        content.title(),
        budget.drive() + ", " + budget.pulse() + " of " + Figures.of(budget.plan().duration()),
        scale,
        budget.plan().rabi().hertz(),
        List.copyOf(panels),
        notes(densities.isEmpty()));
  }

  /** Frequencies of all tables, and those about the inverse duration at least. */
  private static DecadeScale scale(PulseResponse response, List<NoiseDensity> densities) {
    double unit = 1 / response.seconds();
    double low = densities.isEmpty() ? 0.01 * unit : 0.1 * unit;
    double high = densities.isEmpty() ? 10 * unit : 3 * unit;
    for (NoiseDensity density : densities) {
      low = Math.min(low, density.lowestHertz());
      high = Math.max(high, density.highestHertz());
    }
    return DecadeScale.spanning(low, high, MOST_DECADES);
  }

  private static FilterPanel panel(
      String heading,
      String[] units,
      DoubleUnaryOperator filter,
      NoiseDensity density,
      NoiseError error,
      double[] grid) {
    double[] fine =
        DoubleStream.concat(DoubleStream.of(grid), DoubleStream.of(density.frequencies()))
            .filter(f -> f >= grid[0])
            .sorted()
            .distinct()
            .toArray();
    Curve noise =
        new Curve("noise density (right, " + units[1] + ")", fine, values(density::at, fine));
    Optional<Band> band = band(fine, filter, density);
    return new FilterPanel(
        heading,
        List.of(new Curve("filter function (left, " + units[0] + ")", grid, values(filter, grid))),
        Optional.of(noise),
        band,
        finding(error, band));
  }

  private static String finding(NoiseError error, Optional<Band> band) {
    StringBuilder text = new StringBuilder("Error ").append(Figures.probability(error.error()));
    band.ifPresent(
        b ->
            text.append(", four fifths of it from ")
                .append(Figures.of(Frequency.ofHertz(b.fromHertz())))
                .append(" to ")
                .append(Figures.of(Frequency.ofHertz(b.toHertz()))));
    if (Math.max(error.shareBelow(), error.shareAbove()) < WORTH_TELLING) {
      return text.append("; the table covers what the pulse reacts to.").toString();
    }
    return text.append("; of what the pulse reacts to the table leaves out ")
        .append(Figures.share(error.shareBelow()))
        .append(" below and ")
        .append(Figures.share(error.shareAbove()))
        .append(" above.")
        .toString();
  }

  /** Where the running integral of density times filter goes through a tenth and nine tenths. */
  private static Optional<Band> band(
      double[] hertz, DoubleUnaryOperator filter, NoiseDensity density) {
    double[] running = new double[hertz.length];
    double before = density.at(hertz[0]) * filter.applyAsDouble(hertz[0]);
    for (int i = 1; i < hertz.length; i++) {
      double now = density.at(hertz[i]) * filter.applyAsDouble(hertz[i]);
      running[i] = running[i - 1] + 0.5 * (now + before) * (hertz[i] - hertz[i - 1]);
      before = now;
    }
    double whole = running[hertz.length - 1];
    if (!(whole > 0)) {
      return Optional.empty();
    }
    return Optional.of(
        new Band(
            reached(hertz, running, OUTSIDE * whole),
            reached(hertz, running, (1 - OUTSIDE) * whole)));
  }

  private static double reached(double[] hertz, double[] running, double level) {
    int i = 1;
    while (running[i] < level) {
      i++;
    }
    double part = (level - running[i - 1]) / (running[i] - running[i - 1]);
    return hertz[i - 1] + part * (hertz[i] - hertz[i - 1]);
  }

  private static double[] values(DoubleUnaryOperator function, double[] hertz) {
    return Arrays.stream(hertz).map(f -> Math.max(0, function.applyAsDouble(f))).toArray();
  }

  private static List<FilterPanel> withoutNoise(PulseResponse response, double[] grid) {
    List<Curve> lasers = new ArrayList<>();
    List<Curve> beams = new ArrayList<>();
    for (int k = 0; k < response.steps(); k++) {
      int step = k;
      lasers.add(
          new Curve(
              "laser " + (k + 1), grid, values(f -> response.frequencyFilter(step, f), grid)));
      beams.add(
          new Curve("beam " + (k + 1), grid, values(f -> response.intensityFilter(step, f), grid)));
    }
    return List.of(
        new FilterPanel(
            "Filter of frequency noise (" + FREQUENCY_UNIT + ")",
            merged(lasers),
            Optional.empty(),
            Optional.empty(),
            "Times the density in Hz²/Hz, integrated over the frequency, this is the error."),
        new FilterPanel(
            "Filter of relative intensity noise (no unit)",
            merged(beams),
            Optional.empty(),
            Optional.empty(),
            "Times the density in 1/Hz, integrated over the frequency, this is the error."));
  }

  /** The curves with those that look alike drawn once. */
  private static List<Curve> merged(List<Curve> curves) {
    List<Curve> different = new ArrayList<>();
    for (Curve curve : curves) {
      int same = 0;
      while (same < different.size() && !different.get(same).looksLike(curve)) {
        same++;
      }
      if (same == different.size()) {
        different.add(curve);
      } else {
        Curve first = different.get(same);
        different.set(same, first.renamed(first.name() + " and " + curve.name()));
      }
    }
    return List.copyOf(different);
  }

  private static List<String> notes(boolean withoutDensity) {
    List<String> notes = new ArrayList<>();
    notes.add(
        "One-sided densities. The error is the integral of density times filter function over the"
            + " frequency; the dotted upright line is the Rabi frequency at full power.");
    notes.add(
        withoutDensity
            ? "The scenario gives no noise density, so the filter stands alone."
            : "Hatched: the frequencies from which four fifths of that error come, a tenth below"
                + " and a tenth above.");
    return notes;
  }

  /** The whole chart in words. */
  String description() {
    StringBuilder text = new StringBuilder("How the pulse filters noise, by frequency. ");
    text.append(subtitle).append('.');
    panels.forEach(p -> text.append(' ').append(p.heading()).append(": ").append(p.finding()));
    notes.forEach(n -> text.append(' ').append(n));
    return text.toString();
  }
}
