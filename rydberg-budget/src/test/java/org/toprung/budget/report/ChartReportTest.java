package org.toprung.budget.report;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Locale;
import java.util.stream.IntStream;
import org.junit.jupiter.api.Test;
import org.toprung.budget.CauseEntry;
import org.toprung.budget.Check;
import org.toprung.budget.report.ChartContent.Kind;
import org.toprung.budget.report.ChartContent.Row;
import org.toprung.budget.response.Fate;
import org.w3c.dom.Element;

class ChartReportTest {
  private static final Check CHECK = new Check(0.02, 0.0004, true, 400, 3, List.of());

  private static CauseEntry cause(String name, double error, double uncertainty) {
    return new CauseEntry(
        name, error, uncertainty, 0, new Fate(Fate.Kind.PHASE, "place"), "lever", "source");
  }

  private static ChartContent content(String title, double total, CauseEntry... causes) {
    return ChartContent.of(
        title,
        "pulse",
        new Row(Kind.TOTAL, "Total", total, total / 10),
        CHECK,
        List.of(causes),
        List.of("Something: no value"));
  }

  private static ChartDocument drawn(ChartContent content) {
    return ChartDocument.of(ChartReport.render(content));
  }

  private static ChartContent thirteenCauses() {
    return content(
        "A title with <, & and \"quotes\" that goes on. ".repeat(9),
        0.021,
        IntStream.range(0, 13)
            .mapToObj(i -> cause("Cause WWW number " + i, 0.02 * Math.pow(0.5, i), 1e-4))
            .toArray(CauseEntry[]::new));
  }

  private static List<ChartContent> contents() {
    return List.of(
        ChartContent.of(SampleReport.reference()),
        ChartContent.of(SampleReport.wide()),
        thirteenCauses(),
        content("everything is zero", 0, cause("none", 0, 0)),
        content("everything is lost", 1, cause("all", 1, 0.5)));
  }

  @Test
  void saysItsSizeTitleAndContentToViewersAndReaders() {
    for (ChartContent content : contents()) {
      ChartDocument svg = drawn(content);
      assertEquals("svg", svg.root().getLocalName());
      assertEquals("http://www.w3.org/2000/svg", svg.root().getNamespaceURI());
      assertEquals(
          "0 0 " + svg.root().getAttribute("width") + " " + svg.root().getAttribute("height"),
          svg.root().getAttribute("viewBox"));
      assertEquals(content.title(), svg.all("title").get(0).getTextContent());
      String description = svg.all("desc").get(0).getTextContent();
      for (Row row : content.rows()) {
        assertTrue(description.contains(row.name() + ": " + row.value()), description);
      }
    }
  }

  @Test
  void labelsEveryRowWithNameAndValue() {
    for (ChartContent content : contents()) {
      List<String> texts =
          drawn(content).all("text").stream().map(Element::getTextContent).toList();
      for (Row row : content.rows()) {
        assertTrue(texts.contains(row.name()), row.name());
        assertTrue(texts.contains(row.value()), row.value());
      }
      assertTrue(texts.contains("error (probability)"));
    }
  }

  /** No cause of a real budget is lost: it has a row or is named below the axis. */
  @Test
  void tellsEveryCauseAndWhatIsNotAssessed() {
    for (ReportContent report : List.of(SampleReport.reference(), SampleReport.wide())) {
      String text = drawn(ChartContent.of(report)).joinedText();
      report.budget().causes().forEach(c -> assertTrue(text.contains(c.cause()), c.cause()));
      report.budget().notAssessed().forEach(s -> assertTrue(text.contains(s), s));
    }
  }

  @Test
  void ranksBarsFromTheTopDown() {
    for (ChartContent content : contents()) {
      List<Element> bars = drawn(content).all("cause");
      assertEquals(
          content.rows().stream().filter(r -> r.kind() == Kind.CAUSE).count(), bars.size());
      for (int i = 1; i < bars.size(); i++) {
        assertTrue(
            ChartDocument.number(bars.get(i - 1), "y") < ChartDocument.number(bars.get(i), "y"));
        assertTrue(
            ChartDocument.number(bars.get(i - 1), "width")
                >= ChartDocument.number(bars.get(i), "width"));
      }
    }
  }

  /** A factor of ten is the same length everywhere, read off the axis' own labels. */
  @Test
  void drawsBarsToTheLogarithmOfTheError() {
    ChartContent content = thirteenCauses();
    ChartDocument svg = drawn(content);
    double lower = svg.xOf("1e-06");
    double upper = svg.xOf("1e-01");
    List<Row> rows = content.rows().subList(2, content.rows().size());
    List<Element> bars = svg.all("cause");
    for (int i = 0; i < rows.size(); i++) {
      double end =
          ChartDocument.number(bars.get(i), "x") + ChartDocument.number(bars.get(i), "width");
      double expected = lower + (upper - lower) * (Math.log10(rows.get(i).error()) + 6) / 5;
      assertEquals(expected, end, 0.02, rows.get(i).name()); // coordinates have two decimals
    }
    assertEquals(1, svg.all("total").size());
    assertEquals(1, svg.all("simulated").size());
  }

  /** A whisker that is cut has no cap; one that is not has two. */
  @Test
  void cutsWhiskersAtTheEndOfTheAxis() {
    ChartDocument svg =
        drawn(content("t", 0.02, cause("inside", 1e-2, 1e-3), cause("cut", 1e-5, 1e-5)));
    List<Element> whiskers = svg.all("whisker");
    assertEquals(3, whiskers.get(2).getAttribute("d").split("M").length - 1);
    assertEquals(2, whiskers.get(3).getAttribute("d").split("M").length - 1);
  }

  @Test
  void listsWhatALogarithmicAxisCannotShow() {
    ChartDocument svg =
        drawn(
            content(
                "t",
                0.02,
                cause("large", 0.02, 1e-3),
                cause("tiny", 1e-8, 0),
                cause("absent", 0, 0),
                cause("helpful", -2e-3, 1e-4)));
    assertEquals(1, svg.all("cause").size());
    String text = svg.joinedText();
    assertTrue(
        text.contains("Too small to draw, at most 1e-06: tiny (1.00e-08); absent (0)."), text);
    assertTrue(
        text.contains("Negative, so not drawn; lessening the total: helpful (-2.00e-03)."), text);
  }

  @Test
  void keepsTextApartAndOnThePage() {
    for (ChartContent content : contents()) {
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
  void writesNoLengthThatIsNotANumberWhateverTheLocale() {
    Locale before = Locale.getDefault();
    try {
      for (ChartContent content : contents()) {
        Locale.setDefault(Locale.ROOT);
        String svg = ChartReport.render(content);
        assertFalse(svg.contains("NaN") || svg.contains("Infinity"), svg);
        Locale.setDefault(Locale.forLanguageTag("ar-EG-u-nu-arab"));
        assertEquals(svg, ChartReport.render(content));
      }
    } finally {
      Locale.setDefault(before);
    }
  }

  @Test
  void replacesCharactersThatXmlCannotHold() {
    String svg = ChartReport.render(content("a\u0001b\ud800c \ud83d\ude80 ]]>", 0.02));
    assertEquals(
        "a\ufffdb\ufffdc \ud83d\ude80 ]]>",
        ChartDocument.of(svg).all("title").get(0).getTextContent());
  }

  @Test
  void neverHidesADisagreement() {
    ReportContent sample = SampleReport.reference();
    Check bad = new Check(0.5, 0.001, false, 40, 1, List.of());
    ReportContent report = SampleReport.with(sample, bad);
    String text = ChartDocument.of(ChartReport.render(report)).joinedText();
    assertTrue(text.contains("DISAGREES with the total"), text);
  }

  @Test
  void refusesWhatIsNotFinite() {
    ReportContent sample = SampleReport.reference();
    Check broken = new Check(0.1, Double.NaN, true, 40, 1, List.of());
    ReportContent report = SampleReport.with(sample, broken);
    IllegalStateException e =
        assertThrows(IllegalStateException.class, () -> ChartReport.render(report));
    assertTrue(e.getMessage().contains("Simulated total is 0.1 ± NaN"), e.getMessage());
  }

  @Test
  void marksWhatTheSimulationFindsForACauseAlone() {
    ReportContent content = SampleReport.checked(SampleReport.reference(), true, "Doppler shift");
    ChartDocument svg = ChartDocument.of(ChartReport.render(content));
    List<Element> marks = svg.all("alone");
    assertEquals(svg.all("cause").size(), marks.size());
    long black = marks.stream().filter(m -> m.getAttribute("fill").equals(Look.INK)).count();
    assertEquals(1, black);
    String text = svg.joinedText();
    assertTrue(text.contains("DISAGREES with these causes alone: Doppler shift."), text);
    assertTrue(text.contains("Diamonds:"), text);
  }

  /** What becomes of the atom can be told without colour. */
  @Test
  void hatchesBarsByWhatBecomesOfTheAtom() {
    CauseEntry[] causes = new CauseEntry[Fate.Kind.values().length];
    for (Fate.Kind kind : Fate.Kind.values()) {
      causes[kind.ordinal()] =
          new CauseEntry(kind.word(), 0.01, 0, 0, new Fate(kind, "place"), "lever", "source");
    }
    ChartDocument svg = drawn(content("t", 0.04, causes));
    assertEquals(5, svg.all("cause").size());
    assertEquals(5, svg.all("hatch").size()); // none, one, one, one and two
    String text = svg.joinedText();
    for (Fate.Kind kind : Fate.Kind.values()) {
      assertTrue(
          text.contains("lines: " + kind.word()) || text.contains("plain: " + kind.word()), text);
    }
  }

  /** Every line of a hatching lies in its rectangle, upright or at 45 degrees. */
  @Test
  void hatchesWithinTheBar() {
    for (Hatch hatch : Hatch.values()) {
      String path = hatch.path(10, 20, 37, 14, 6);
      List<double[]> points = new ArrayList<>();
      for (String command : path.substring(1).split("[ML]")) {
        String[] xy = command.split(" ");
        points.add(new double[] {Double.parseDouble(xy[0]), Double.parseDouble(xy[1])});
      }
      assertTrue(points.size() > 10);
      for (int i = 0; i < points.size(); i += 2) {
        double[] a = points.get(i);
        double[] b = points.get(i + 1);
        boolean upright = hatch == Hatch.UPRIGHT;
        assertTrue(a[0] >= 10 && b[0] <= 47 && (upright ? a[0] == b[0] : a[0] < b[0]));
        assertTrue(Math.min(a[1], b[1]) >= 20 && Math.max(a[1], b[1]) <= 34);
        if (upright) {
          assertEquals(14, b[1] - a[1], 0.011);
        } else {
          assertEquals(b[0] - a[0], (hatch == Hatch.RISING ? -1 : 1) * (b[1] - a[1]), 0.011);
        }
      }
    }
  }
}
