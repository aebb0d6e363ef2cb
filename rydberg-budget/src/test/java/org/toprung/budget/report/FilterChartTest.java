package org.toprung.budget.report;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Locale;
import java.util.stream.Collectors;
import org.junit.jupiter.api.Test;
import org.toprung.budget.report.FilterPanel.Curve;
import org.w3c.dom.Element;

class FilterChartTest {

  private static ChartDocument drawn(ReportContent content) {
    return ChartDocument.of(FilterChart.render(content));
  }

  @Test
  void hasAPanelForEachDensityOfTheBench() {
    FilterContent content = FilterContent.of(SampleReport.noisy());
    assertEquals(
        List.of("Frequency noise of laser 1", "Relative intensity noise of beam 2"),
        content.panels().stream().map(FilterPanel::heading).collect(Collectors.toList()));
    ChartDocument svg = drawn(SampleReport.noisy());
    assertEquals(2, svg.all("filter").size());
    assertEquals(2, svg.all("density").size());
    assertEquals(2, svg.all("band").size());
    assertEquals(2, svg.all("rabi").size());
    String text = svg.joinedText();
    for (FilterPanel panel : content.panels()) {
      assertTrue(text.contains(panel.heading()), text);
    }
  }

  @Test
  void showsTheFilterAloneWithoutADensity() {
    FilterContent content = FilterContent.of(SampleReport.reference());
    assertEquals(2, content.panels().size());
    // both lasers move the same resonance, and so are filtered alike; their beams are not
    assertEquals(
        List.of("laser 1 and laser 2"),
        content.panels().get(0).filters().stream().map(Curve::name).toList());
    assertEquals(
        List.of("beam 1", "beam 2"),
        content.panels().get(1).filters().stream().map(Curve::name).toList());
    ChartDocument svg = drawn(SampleReport.reference());
    assertEquals(3, svg.all("filter").size());
    assertEquals(0, svg.all("density").size());
    assertTrue(svg.joinedText().contains("gives no noise density"), svg.joinedText());
  }

  /** Readable without colour: curves of a panel differ by their dashes. */
  @Test
  void tellsCurvesApartByTheirDashes() {
    for (ReportContent content : List.of(SampleReport.reference(), SampleReport.noisy())) {
      List<Element> keys =
          drawn(content).all("key").stream()
              .filter(k -> k.hasAttribute("stroke-dasharray"))
              .toList();
      for (int i = 1; i < keys.size(); i++) {
        if (keys.get(i)
            .getAttribute("d")
            .split(" ")[1]
            .equals(keys.get(i - 1).getAttribute("d").split(" ")[1])) {
          assertFalse(
              keys.get(i)
                  .getAttribute("stroke-dasharray")
                  .equals(keys.get(i - 1).getAttribute("stroke-dasharray")));
        }
      }
    }
  }

  /** By the exact integral of a narrow table that the filter hardly changes across. */
  @Test
  void findsTheBandThatTheErrorComesFrom() {
    FilterPanel panel = FilterContent.of(SampleReport.noisy()).panels().get(0);
    double from = panel.band().orElseThrow().fromHertz();
    double to = panel.band().orElseThrow().toHertz();
    Curve filter = panel.filters().get(0);
    double[] f = filter.hertz();
    double inside = 0;
    double whole = 0;
    // midpoint rule on a linear grid, unlike the logarithmic one of the panel
    int n = 400_000;
    int at = 0;
    double low = SampleReport.FREQUENCY_NOISE.lowestHertz();
    double step = (SampleReport.FREQUENCY_NOISE.highestHertz() - low) / n;
    for (int i = 0; i < n; i++) {
      double x = low + (i + 0.5) * step;
      while (f[at + 1] < x) {
        at++;
      }
      double part = (x - f[at]) / (f[at + 1] - f[at]);
      double value =
          ((1 - part) * filter.values()[at] + part * filter.values()[at + 1])
              * SampleReport.FREQUENCY_NOISE.at(x);
      whole += value;
      inside += x >= from && x <= to ? value : 0;
    }
    assertEquals(0.8, inside / whole, 0.005);
  }

  /** A factor of ten is the same length everywhere, and curves lie within their panel. */
  @Test
  void drawsTheFilterToItsLogarithm() {
    ReportContent report = SampleReport.reference();
    FilterContent content = FilterContent.of(report);
    String path = drawn(report).all("filter").get(0).getAttribute("d");
    double[] first = point(path.substring(1, path.indexOf('L')));
    Curve curve = content.panels().get(0).filters().get(0);
    DecadeScale scale = DecadeScale.spanning(curve.lowest(), curve.highest(), 6);
    double middle = first[1];
    double top = 0;
    for (ChartDocument.Box box : drawn(report).textBoxes()) {
      if (box.text().equals(String.format(Locale.ROOT, "%.0e", Math.pow(10, scale.last())))) {
        top = box.top();
        break;
      }
    }
    double height = 240.0 / (scale.last() - scale.first());
    double below = (scale.last() - Math.log10(curve.values()[0])) * height;
    assertEquals(below, middle - top, 9); // labels are centred on their decade
  }

  private static double[] point(String text) {
    String[] parts = text.trim().split(" ");
    return new double[] {Double.parseDouble(parts[0]), Double.parseDouble(parts[1])};
  }

  @Test
  void keepsTextApartAndOnThePage() {
    for (ReportContent content : SampleReport.all()) {
      ChartDocument svg = drawn(content);
      List<ChartDocument.Box> boxes = new ArrayList<>(svg.textBoxes());
      boxes.sort(Comparator.comparingDouble(ChartDocument.Box::top));
      for (int i = 0; i < boxes.size(); i++) {
        assertTrue(boxes.get(i).isWithin(svg.root()), boxes.get(i).text());
        for (int j = 0; j < i; j++) {
          assertFalse(
              boxes.get(i).meets(boxes.get(j)), boxes.get(i).text() + " / " + boxes.get(j).text());
        }
      }
    }
  }

  @Test
  void saysInItsDescriptionWhatThePanelsFind() {
    String description = drawn(SampleReport.noisy()).all("desc").get(0).getTextContent();
    for (FilterPanel panel : FilterContent.of(SampleReport.noisy()).panels()) {
      assertTrue(description.contains(panel.heading() + ": " + panel.finding()), description);
    }
    String error =
        Figures.probability(
            SampleReport.noisy()
                .budget()
                .response()
                .frequencyNoise(0, SampleReport.FREQUENCY_NOISE)
                .error());
    assertTrue(description.contains("Error " + error), description);
  }

  @Test
  void writesNoLengthThatIsNotANumberWhateverTheLocale() {
    Locale before = Locale.getDefault();
    try {
      for (ReportContent content : SampleReport.all()) {
        Locale.setDefault(Locale.ROOT);
        String svg = FilterChart.render(content);
        assertFalse(svg.contains("NaN") || svg.contains("Infinity"), svg);
        Locale.setDefault(Locale.forLanguageTag("ar-EG-u-nu-arab"));
        assertEquals(svg, FilterChart.render(content));
      }
    } finally {
      Locale.setDefault(before);
    }
  }
}
