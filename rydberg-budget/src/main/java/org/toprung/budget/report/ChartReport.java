package org.toprung.budget.report;

import java.util.List;
import java.util.Locale;
import javax.xml.stream.XMLStreamException;
import org.toprung.budget.report.ChartContent.Kind;
import org.toprung.budget.report.ChartContent.Row;
import org.toprung.budget.report.SvgPage.Anchor;

/**
 * The causes of a budget as a bar chart in SVG, largest on top, below the total and the simulated
 * total. The axis is logarithmic, since errors span decades; whiskers are standard uncertainties,
 * and a diamond is what the simulation finds for a cause alone. Bars are hatched by what becomes of
 * the atom. Causes that a logarithmic axis cannot show are listed below it.
 *
 * <p>Text is text, in whatever sans-serif font the viewer has. Nothing but the Java platform's own
 * XML is needed, neither fonts nor a display.
 */
public final class ChartReport {
  private static final double ROW = 26; // px, as all lengths here
  private static final double BAR = 14;
  private static final double CAP = 4; // half height of the end of a whisker
  private static final double DIAMOND = 5; // half a diagonal
  private static final double HATCHING = 6; // line to line

  private final ChartContent content;
  private final TextBlock title;
  private final TextBlock subtitles;
  private final TextBlock notes;
  private final LogAxis axis;
  private final double top;
  private final double bottom;
  private final SvgPage page;

  private ChartReport(ChartContent content) throws XMLStreamException {
    this.content = content;
    this.title = TextBlock.title(content.title());
    this.subtitles = TextBlock.of(content.subtitles(), Look.TEXT, Look.INK);
    this.notes = TextBlock.of(content.notes(), Look.SMALL, Look.FAINT_INK);
    List<Row> rows = content.rows();
    this.axis =
        new LogAxis(
            content.scale(),
            Look.MARGIN + Look.GAP + widest(rows.stream().map(Row::name).toList()),
            Look.WIDTH - Look.MARGIN - Look.GAP - widest(rows.stream().map(Row::value).toList()));
    this.top = Look.MARGIN + title.height() + subtitles.height() + Look.GAP;
    this.bottom = top + rows.size() * ROW + Look.GAP;
    this.page =
        new SvgPage(
            Look.WIDTH,
            Math.ceil(belowAxis() + notes.height() + Look.GAP),
            content.title(),
            content.description());
  }

  private double belowAxis() {
    return bottom + 2 * Look.TEXT * Look.LEADING + 2 * Look.GAP;
  }

  /**
   * Renders the chart.
   *
   * @param content what to tell about
   * @return an SVG document
   * @throws IllegalStateException if a number of the budget is not finite
   */
  public static String render(ReportContent content) {
    return render(ChartContent.of(content));
  }

  static String render(ChartContent content) {
    try {
      return new ChartReport(content).draw();
    } catch (XMLStreamException e) {
      throw new IllegalStateException("the chart cannot be written: " + e.getMessage(), e);
    }
  }

  private String draw() throws XMLStreamException {
    subtitles.draw(page, title.draw(page, Look.MARGIN));
    axis.drawBelow(
        page, top, bottom, d -> String.format(Locale.ROOT, "%.0e", d), "error (probability)");
    double middle = top + ROW / 2;
    for (Row row : content.rows()) {
      row(row, row.kind() == Kind.CAUSE ? middle + Look.GAP : middle);
      middle += ROW;
    }
    notes.draw(page, belowAxis());
    return page.finish();
  }

  private void row(Row row, double middle) throws XMLStreamException {
    double baseline = middle + Look.MIDDLE * Look.TEXT;
    String weight = row.kind() == Kind.TOTAL ? "bold" : "normal";
    label(axis.low() - Look.GAP, baseline, Anchor.END, row.name(), weight);
    label(axis.high() + Look.GAP, baseline, Anchor.START, row.value(), weight);
    if (content.scale().reaches(row.error())) {
      double length = axis.at(row.error()) - axis.low();
      page.rectangle(axis.low(), middle - BAR / 2, length, BAR, look(row.kind()));
      hatch(row, middle - BAR / 2, length);
    }
    whisker(row, middle);
    diamond(row, middle);
  }

  private void label(double x, double baseline, Anchor anchor, String text, String weight)
      throws XMLStreamException {
    page.text(x, baseline, Look.TEXT, anchor, text, "font-weight", weight, "fill", Look.INK);
  }

  /** Fills that differ in grey too. */
  private static String[] look(Kind kind) {
    return switch (kind) {
      case TOTAL -> new String[] {"class", "total", "fill", Look.DARK};
      case SIMULATED ->
          new String[] {"class", "simulated", "fill", Look.PAPER, "stroke", Look.DARK};
      case CAUSE -> new String[] {"class", "cause", "fill", Look.LIGHT};
    };
  }

  private void hatch(Row row, double y, double length) throws XMLStreamException {
    for (Hatch hatch : row.hatching()) {
      page.path(
          hatch.path(axis.low(), y, length, BAR, HATCHING),
          "class",
          "hatch",
          "stroke",
          Look.DARK,
          "stroke-width",
          "1",
          "fill",
          "none");
    }
  }

  /** A line over the uncertainty, edged in white to be seen on any bar; no cap where it is cut. */
  private void whisker(Row row, double middle) throws XMLStreamException {
    double low = row.error() - row.uncertainty();
    double high = row.error() + row.uncertainty();
    DecadeScale scale = content.scale();
    if (!scale.reaches(high) || !(row.uncertainty() > 0)) {
      return;
    }
    StringBuilder path = new StringBuilder();
    path.append(SvgPage.to('M', axis.at(low), middle))
        .append(SvgPage.to('L', axis.at(high), middle));
    for (double end : new double[] {low, high}) {
      if (scale.fraction(end) > 0 && scale.fraction(end) < 1) {
        path.append(SvgPage.to('M', axis.at(end), middle - CAP))
            .append(SvgPage.to('L', axis.at(end), middle + CAP));
      }
    }
    page.path(path.toString(), "stroke", Look.PAPER, "stroke-width", "3.5", "fill", "none");
    page.path(
        path.toString(),
        "class",
        "whisker",
        "stroke",
        Look.INK,
        "stroke-width",
        "1.5",
        "fill",
        "none");
  }

  /** What the simulation finds for a cause alone; black where it disagrees. */
  private void diamond(Row row, double middle) throws XMLStreamException {
    if (row.alone().isEmpty() || !content.scale().reaches(row.alone().get().simulated())) {
      return;
    }
    double x = axis.at(row.alone().get().simulated());
    page.path(
        SvgPage.to('M', x - DIAMOND, middle)
            + SvgPage.to('L', x, middle - DIAMOND)
            + SvgPage.to('L', x + DIAMOND, middle)
            + SvgPage.to('L', x, middle + DIAMOND)
            + "Z",
        "class",
        "alone",
        "fill",
        row.alone().get().agrees() ? Look.PAPER : Look.INK,
        "stroke",
        Look.INK,
        "stroke-width",
        "1.5");
  }

  /** Every row may be as wide as the bold one. */
  private static double widest(List<String> texts) {
    return texts.stream().mapToDouble(t -> SansSerif.boldWidth(t, Look.TEXT)).max().orElse(0);
  }
}
