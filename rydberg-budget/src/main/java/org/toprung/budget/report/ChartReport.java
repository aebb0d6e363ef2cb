package org.toprung.budget.report;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import javax.xml.stream.XMLStreamException;
import org.toprung.budget.report.ChartContent.Kind;
import org.toprung.budget.report.ChartContent.Row;
import org.toprung.budget.report.SvgPage.Anchor;

/**
 * The causes of a budget as a bar chart in SVG, largest on top, below the total and the simulated
 * total. The axis is logarithmic, since errors span decades; whiskers are standard uncertainties.
 * Causes that a logarithmic axis cannot show are listed below it.
 *
 * <p>Text is text, in whatever sans-serif font the viewer has. Nothing but the Java platform's own
 * XML is needed, neither fonts nor a display.
 */
public final class ChartReport {
  private static final double WIDTH = 960; // px, as all lengths here
  private static final double MARGIN = 24;
  private static final double ROOM = WIDTH - 2 * MARGIN;
  private static final double GAP = 12;
  private static final double TITLE = 18; // size of text
  private static final double TEXT = 13;
  private static final double SMALL = 12;
  private static final double LEADING = 1.4; // line to line, in sizes
  private static final double MIDDLE = 0.36; // baseline below the middle of a line, in sizes
  private static final double ROW = 26;
  private static final double BAR = 14;
  private static final double CAP = 4; // half height of the end of a whisker
  private static final double TICK = 5;
  private static final int LONGEST_TITLE = 2; // lines
  private static final String INK = "#1a1a1a";
  private static final String FAINT_INK = "#555555";
  private static final String GRID = "#d4d4d4";
  private static final String CAUSE_FILL = "#8fb3c4";
  private static final String TOTAL_FILL = "#2f4b5c";

  private final ChartContent content;
  private final List<String> title;
  private final List<String> subtitles = new ArrayList<>();
  private final List<String> notes = new ArrayList<>();
  private final double left; // of the axis
  private final double right;
  private final double top;
  private final double bottom;
  private final SvgPage page;

  private ChartReport(ChartContent content) throws XMLStreamException {
    this.content = content;
    this.title =
        Lines.wrapped(content.title(), ROOM, LONGEST_TITLE, s -> SansSerif.boldWidth(s, TITLE));
    content.subtitles().forEach(s -> subtitles.addAll(wrapped(s, TEXT)));
    content.notes().forEach(s -> notes.addAll(wrapped(s, SMALL)));
    List<Row> rows = content.rows();
    this.left = MARGIN + GAP + widest(rows.stream().map(Row::name).toList());
    this.right = WIDTH - MARGIN - GAP - widest(rows.stream().map(Row::value).toList());
    this.top = MARGIN + title.size() * TITLE * LEADING + subtitles.size() * TEXT * LEADING + GAP;
    this.bottom = top + rows.size() * ROW + GAP;
    double height = bottom + 2 * TEXT * LEADING + 2 * GAP + notes.size() * SMALL * LEADING + GAP;
    this.page = new SvgPage(WIDTH, Math.ceil(height), content.title(), content.description());
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
    double y = lines(title, MARGIN, TITLE, "font-weight", "bold", "fill", INK);
    lines(subtitles, y, TEXT, "fill", INK);
    axis();
    double middle = top + ROW / 2;
    for (Row row : content.rows()) {
      row(row, row.kind() == Kind.CAUSE ? middle + GAP : middle);
      middle += ROW;
    }
    lines(notes, bottom + 2 * TEXT * LEADING + 2 * GAP, SMALL, "fill", FAINT_INK);
    return page.finish();
  }

  /** Writes lines one below the other; gives where the next would be. */
  private double lines(List<String> lines, double from, double size, String... style)
      throws XMLStreamException {
    double y = from;
    for (String line : lines) {
      page.text(MARGIN, y + size, size, Anchor.START, line, style);
      y += size * LEADING;
    }
    return y;
  }

  private void axis() throws XMLStreamException {
    StringBuilder grid = new StringBuilder();
    StringBuilder ticks = new StringBuilder();
    DecadeScale scale = content.scale();
    for (int exponent = scale.first(); exponent <= scale.last(); exponent++) {
      double decade = Math.pow(10, exponent);
      grid.append(SvgPage.to('M', x(decade), top)).append(SvgPage.to('L', x(decade), bottom));
      for (int digit = 2; digit <= 9 && exponent < scale.last(); digit++) {
        double x = x(digit * decade);
        ticks.append(SvgPage.to('M', x, bottom)).append(SvgPage.to('L', x, bottom + TICK));
      }
      page.text(
          x(decade),
          bottom + TICK + TEXT * LEADING,
          TEXT,
          Anchor.MIDDLE,
          String.format(Locale.ROOT, "%.0e", decade),
          "fill",
          INK);
    }
    page.path(grid.toString(), "stroke", GRID, "stroke-width", "1");
    ticks.append(SvgPage.to('M', left, bottom)).append(SvgPage.to('L', right, bottom));
    page.path(ticks.toString(), "stroke", INK, "stroke-width", "1");
    page.text(
        (left + right) / 2,
        bottom + TICK + 2 * TEXT * LEADING,
        TEXT,
        Anchor.MIDDLE,
        "error (probability)",
        "fill",
        INK);
  }

  private void row(Row row, double middle) throws XMLStreamException {
    double baseline = middle + MIDDLE * TEXT;
    String weight = row.kind() == Kind.TOTAL ? "bold" : "normal";
    page.text(
        left - GAP, baseline, TEXT, Anchor.END, row.name(), "font-weight", weight, "fill", INK);
    page.text(
        right + GAP, baseline, TEXT, Anchor.START, row.value(), "font-weight", weight, "fill", INK);
    if (content.scale().reaches(row.error())) {
      double length = x(row.error()) - left;
      page.rectangle(left, middle - BAR / 2, length, BAR, look(row.kind()));
    }
    whisker(row, middle);
  }

  /** Fills that differ in grey too. */
  private static String[] look(Kind kind) {
    return switch (kind) {
      case TOTAL -> new String[] {"class", "total", "fill", TOTAL_FILL};
      case SIMULATED ->
          new String[] {"class", "simulated", "fill", "#ffffff", "stroke", TOTAL_FILL};
      case CAUSE -> new String[] {"class", "cause", "fill", CAUSE_FILL};
    };
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
    path.append(SvgPage.to('M', x(low), middle)).append(SvgPage.to('L', x(high), middle));
    for (double end : new double[] {low, high}) {
      if (scale.fraction(end) > 0 && scale.fraction(end) < 1) {
        path.append(SvgPage.to('M', x(end), middle - CAP))
            .append(SvgPage.to('L', x(end), middle + CAP));
      }
    }
    page.path(path.toString(), "stroke", "#ffffff", "stroke-width", "3.5", "fill", "none");
    page.path(
        path.toString(), "class", "whisker", "stroke", INK, "stroke-width", "1.5", "fill", "none");
  }

  private double x(double value) {
    return left + content.scale().fraction(value) * (right - left);
  }

  private static List<String> wrapped(String text, double size) {
    return Lines.wrapped(text, ROOM, s -> SansSerif.width(s, size));
  }

  /** Every row may be as wide as the bold one. */
  private static double widest(List<String> texts) {
    return texts.stream().mapToDouble(t -> SansSerif.boldWidth(t, TEXT)).max().orElse(0);
  }
}
