package org.toprung.budget.report;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import javax.xml.stream.XMLStreamException;
import org.toprung.budget.report.FilterPanel.Curve;
import org.toprung.budget.report.SvgPage.Anchor;
import org.toprung.core.quantity.Frequency;

/**
 * How the pulse filters noise, in SVG: for each noise density of the bench a panel with the filter
 * function of the pulse, the density over it, and the band of frequencies that most of the error
 * comes from. Without a density the filter functions stand alone. All axes are logarithmic; lines
 * differ by their dashes and areas by hatching, so that no colour is needed.
 */
public final class FilterChart {
  private static final double PANEL = 240; // height, px, as all lengths here
  private static final double LABELS = 62; // room for the labels of an upright axis
  private static final double SAMPLE = 36; // length of a line in the legend
  private static final double HATCHING = 9; // line to line
  private static final int MOST_DECADES = 6;
  private static final String[] DASHES = {"none", "9 4", "2 4"};
  private static final String DENSITY_DASH = "10 3 2 3";
  private static final double LINE = Look.TEXT * Look.LEADING;

  private final FilterContent content;
  private final TextBlock title;
  private final TextBlock subtitle;
  private final List<TextBlock> findings = new ArrayList<>();
  private final TextBlock notes;
  private final LogAxis frequencies;
  private final SvgPage page;

  private FilterChart(FilterContent content) throws XMLStreamException {
    this.content = content;
    this.title = TextBlock.title(content.title());
    this.subtitle = TextBlock.of(List.of(content.subtitle()), Look.TEXT, Look.INK);
    this.notes = TextBlock.of(content.notes(), Look.SMALL, Look.FAINT_INK);
    this.frequencies =
        new LogAxis(content.scale(), Look.MARGIN + LABELS, Look.WIDTH - Look.MARGIN - LABELS);
    double height = Look.MARGIN + title.height() + subtitle.height() + Look.GAP;
    for (FilterPanel panel : content.panels()) {
      TextBlock finding = TextBlock.of(List.of(panel.finding()), Look.SMALL, Look.INK);
      findings.add(finding);
      height += panelHeight(finding);
    }
    this.page =
        new SvgPage(
            Look.WIDTH,
            Math.ceil(height + notes.height() + Look.GAP),
            content.title(),
            content.description());
  }

  private static double panelHeight(TextBlock finding) {
    return 2 * LINE
        + Look.GAP
        + PANEL
        + Look.TICK
        + 2 * LINE
        + Look.GAP
        + finding.height()
        + 2 * Look.GAP;
  }

  /**
   * Renders the chart.
   *
   * @param content what to tell about
   * @return an SVG document
   */
  public static String render(ReportContent content) {
    return render(FilterContent.of(content));
  }

  static String render(FilterContent content) {
    try {
      return new FilterChart(content).draw();
    } catch (XMLStreamException e) {
      throw new IllegalStateException("the chart cannot be written: " + e.getMessage(), e);
    }
  }

  private String draw() throws XMLStreamException {
    double y = subtitle.draw(page, title.draw(page, Look.MARGIN)) + Look.GAP;
    for (int i = 0; i < content.panels().size(); i++) {
      panel(content.panels().get(i), findings.get(i), y);
      y += panelHeight(findings.get(i));
    }
    notes.draw(page, y);
    return page.finish();
  }

  private void panel(FilterPanel panel, TextBlock finding, double from) throws XMLStreamException {
    page.text(
        Look.MARGIN,
        from + Look.TEXT,
        Look.TEXT,
        Anchor.START,
        panel.heading(),
        "font-weight",
        "bold",
        "fill",
        Look.INK);
    legend(panel, from + 1.5 * LINE);
    double top = from + 2 * LINE + Look.GAP;
    double bottom = top + PANEL;
    if (panel.band().isPresent()) {
      double left = frequencies.at(panel.band().get().fromHertz());
      double right = frequencies.at(panel.band().get().toHertz());
      hatched(left, top, right - left, PANEL, "band");
    }
    frequencies.drawBelow(
        page, top, bottom, f -> Figures.of(Frequency.ofHertz(f)), "frequency of the noise");
    double rabi = frequencies.at(content.rabiHertz());
    line(SvgPage.to('M', rabi, top) + SvgPage.to('L', rabi, bottom), "rabi", "1.5 3", "1");
    LogAxis left = upright(panel.filters(), top, bottom);
    left.drawUpright(page, frequencies.low(), Anchor.END, FilterChart::power);
    for (int i = 0; i < panel.filters().size(); i++) {
      line(path(panel.filters().get(i), left), "filter", DASHES[i], "1.8");
    }
    if (panel.density().isPresent()) {
      LogAxis right = upright(List.of(panel.density().get()), top, bottom);
      right.drawUpright(page, frequencies.high(), Anchor.START, FilterChart::power);
      line(path(panel.density().get(), right), "density", DENSITY_DASH, "1.8");
    }
    finding.draw(page, bottom + Look.TICK + 2 * LINE + Look.GAP);
  }

  private void legend(FilterPanel panel, double middle) throws XMLStreamException {
    double x = frequencies.low();
    for (int i = 0; i < panel.filters().size(); i++) {
      x = sample(panel.filters().get(i).name(), DASHES[i], x, middle);
    }
    if (panel.density().isPresent()) {
      x = sample(panel.density().get().name(), DENSITY_DASH, x, middle);
    }
    if (panel.band().isPresent()) {
      hatched(x, middle - 6, SAMPLE, 12, "key");
      label("where the error comes from", x + SAMPLE + 6, middle);
    }
  }

  /** A line and its name; gives where the next may begin. */
  private double sample(String name, String dash, double x, double middle)
      throws XMLStreamException {
    line(SvgPage.to('M', x, middle) + SvgPage.to('L', x + SAMPLE, middle), "key", dash, "1.8");
    label(name, x + SAMPLE + 6, middle);
    return x + SAMPLE + 6 + SansSerif.width(name, Look.SMALL) + 2 * Look.GAP;
  }

  private void label(String name, double x, double middle) throws XMLStreamException {
    page.text(
        x, middle + Look.MIDDLE * Look.SMALL, Look.SMALL, Anchor.START, name, "fill", Look.INK);
  }

  private void hatched(double x, double y, double width, double height, String kind)
      throws XMLStreamException {
    page.path(
        Hatch.RISING.path(x, y, width, height, HATCHING)
            + SvgPage.to('M', x, y)
            + SvgPage.to('L', x, y + height)
            + SvgPage.to('M', x + width, y)
            + SvgPage.to('L', x + width, y + height),
        "class",
        kind,
        "stroke",
        Look.LIGHT,
        "stroke-width",
        "1",
        "fill",
        "none");
  }

  private void line(String path, String kind, String dash, String width) throws XMLStreamException {
    page.path(
        path,
        "class",
        kind,
        "stroke",
        Look.INK,
        "stroke-width",
        width,
        "stroke-dasharray",
        dash,
        "fill",
        "none");
  }

  /** A decade may be left empty on top, none is wasted on what hardly matters. */
  private static LogAxis upright(List<Curve> curves, double top, double bottom) {
    double high = curves.stream().mapToDouble(Curve::highest).max().orElse(0);
    double low = curves.stream().mapToDouble(Curve::lowest).min().orElse(0);
    boolean empty = !(high > 0);
    return new LogAxis(
        DecadeScale.spanning(empty ? 0.1 : low, empty ? 1 : high, MOST_DECADES), bottom, top);
  }

  /** Along the curve where it lies above the lower edge. */
  private String path(Curve curve, LogAxis values) {
    StringBuilder path = new StringBuilder();
    double[] hertz = curve.hertz();
    double[] value = curve.values();
    boolean on = false;
    for (int i = 0; i < hertz.length; i++) {
      boolean above = values.scale().reaches(value[i]);
      if (above && !on && i > 0 && value[i - 1] > 0) {
        path.append(to('M', hertz[i - 1], value[i - 1], values));
        on = true;
      }
      if (above || on && value[i] > 0) {
        path.append(to(on ? 'L' : 'M', hertz[i], value[i], values));
      }
      on = above;
    }
    return path.toString();
  }

  private String to(char command, double hertz, double value, LogAxis values) {
    return SvgPage.to(command, frequencies.at(hertz), values.at(value));
  }

  private static String power(double decade) {
    return String.format(Locale.ROOT, "%.0e", decade);
  }
}
