package org.toprung.budget.report;

import java.awt.BasicStroke;
import java.awt.Color;
import java.awt.Font;
import java.awt.font.FontRenderContext;
import java.io.ByteArrayOutputStream;
import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import org.knowm.xchart.VectorGraphicsEncoder;
import org.knowm.xchart.XYChart;
import org.knowm.xchart.XYSeries;
import org.knowm.xchart.style.Styler.ChartTheme;
import org.knowm.xchart.style.XYStyler;
import org.knowm.xchart.style.markers.SeriesMarkers;
import org.toprung.budget.CauseEntry;

/**
 * The causes of a budget as a bar chart in SVG, largest on top, on a logarithmic axis since errors
 * span decades. A dark line across the end of a bar is its uncertainty, one standard deviation to
 * each side. Text is drawn as outlines, so that the chart looks the same everywhere.
 */
public final class ChartReport {
  private static final int WIDTH = 960; // px
  private static final int ROW = 32; // px
  private static final int FRAME = 130; // px for title and axis
  private static final int LONGEST_TITLE = 60; // characters
  private static final float BAR = 16; // px
  private static final float MARK = 3; // px
  private static final double DECADES = 5; // that bars may span
  private static final double NOTHING = 1e-9; // error that is not worth a bar
  private static final Color BAR_COLOR = new Color(0x3B7A8C);
  private static final Color TOTAL_COLOR = new Color(0xB5533C);
  private static final Color MARK_COLOR = new Color(0x1F1F1F);
  private static final Color GRID_COLOR = new Color(0xD5D5D5);

  private final XYChart chart;
  private final double left; // error at the left end of the axis

  private ChartReport(ReportContent content) {
    double total = Math.max(NOTHING, content.budget().total());
    double right = decadeAbove(total + content.budget().uncertainty());
    List<CauseEntry> all = content.budget().causes();
    double smallest =
        all.stream().mapToDouble(CauseEntry::error).filter(e -> e > NOTHING).min().orElse(total);
    this.left =
        Math.min(right / 1000, Math.max(decadeBelow(smallest), right * Math.pow(10, -DECADES)));
    List<CauseEntry> shown = all.stream().filter(c -> c.error() > left).toList();
    int rows = shown.size() + 1;
    this.chart = new XYChart(WIDTH, FRAME + ROW * rows, ChartTheme.Matlab);
    chart.setTitle(shortened(content.title()));
    String axis = "error of one pulse (probability; dark line: ± 1 standard uncertainty)";
    int hidden = all.size() - shown.size();
    chart.setXAxisTitle(
        hidden == 0
            ? axis
            : axis + String.format(Locale.ROOT, "; %d causes below %.0e left out", hidden, left));
    List<String> names = new ArrayList<>(); // from the bottom up
    for (int i = shown.size() - 1; i >= 0; i--) {
      CauseEntry cause = shown.get(i);
      names.add(
          bar(cause.cause(), names.size() + 1, cause.error(), cause.uncertainty(), BAR_COLOR));
    }
    names.add(bar("TOTAL", rows, total, content.budget().uncertainty(), TOTAL_COLOR));
    style(names, right);
  }

  /**
   * Renders the chart.
   *
   * @param content what to tell about
   * @return an SVG document
   * @throws IllegalStateException if this Java cannot measure text
   */
  public static String render(ReportContent content) {
    requireFonts();
    ByteArrayOutputStream bytes = new ByteArrayOutputStream();
    try {
      VectorGraphicsEncoder.saveVectorGraphic(
          new ChartReport(content).chart, bytes, VectorGraphicsEncoder.VectorGraphicsFormat.SVG);
    } catch (IOException e) {
      throw new UncheckedIOException(e);
    }
    return bytes.toString(StandardCharsets.UTF_8);
  }

  /**
   * Makes sure that a chart can be drawn: some minimal systems have a Java but no fonts.
   *
   * @throws IllegalStateException if this Java cannot measure text
   */
  public static void requireFonts() {
    try {
      new Font(Font.SANS_SERIF, Font.PLAIN, 12)
          .getLineMetrics("x", new FontRenderContext(null, true, true));
    } catch (LinkageError | InternalError | RuntimeException e) {
      throw new IllegalStateException(
          "this Java installation has no usable fonts to draw a chart with; install fontconfig and"
              + " a font",
          e);
    }
  }

  private void style(List<String> names, double right) {
    XYStyler style = chart.getStyler();
    style.setLegendVisible(false);
    style.setChartBackgroundColor(Color.WHITE);
    style.setChartTitleFont(new Font(Font.SANS_SERIF, Font.BOLD, 16));
    style.setAxisTitleFont(new Font(Font.SANS_SERIF, Font.PLAIN, 13));
    style.setAxisTickLabelsFont(new Font(Font.SANS_SERIF, Font.PLAIN, 13));
    style.setXAxisLogarithmic(true);
    style.setXAxisLogarithmicDecadeOnly(true);
    style.setXAxisMin(left);
    style.setXAxisMax(right);
    style.setXAxisDecimalPattern("0E0");
    style.setYAxisMin(0.0);
    style.setYAxisMax(names.size() + 1.0);
    style.setYAxisTickMarkSpacingHint(ROW * 3 / 4);
    style.setyAxisTickLabelsFormattingFunction(y -> rowName(y, names));
    style.setPlotContentSize(1);
    style.setPlotGridHorizontalLinesVisible(false);
    style.setPlotGridLinesColor(GRID_COLOR);
    style.setPlotGridLinesStroke(new BasicStroke(1));
    style.setPlotTicksMarksVisible(false);
  }

  /** Names the rows, which sit at whole numbers; the labels of other ticks are blank but differ. */
  private static String rowName(double y, List<String> names) {
    long row = Math.round(y);
    if (Math.abs(y - row) > 1e-6 || row < 1 || row > names.size()) {
      return " ".repeat(1 + (int) Math.round(10 * Math.abs(y)));
    }
    return names.get((int) row - 1);
  }

  /** Draws the bar of a row and its uncertainty; gives the row's label. */
  private String bar(String name, int row, double error, double uncertainty, Color color) {
    line(name, row, left, error, BAR, color);
    double low = Math.max(left, error - uncertainty);
    line("± " + name, row, low, error + uncertainty, MARK, MARK_COLOR);
    return String.format(Locale.ROOT, "%s  %.1e", name, error);
  }

  private void line(String name, int row, double from, double to, float width, Color color) {
    XYSeries series = chart.addSeries(name, new double[] {from, to}, new double[] {row, row});
    series.setMarker(SeriesMarkers.NONE);
    series.setLineStyle(new BasicStroke(width, BasicStroke.CAP_BUTT, BasicStroke.JOIN_MITER));
    series.setLineColor(color);
  }

  private static double decadeAbove(double value) {
    return Math.pow(10, Math.ceil(Math.log10(value)));
  }

  private static double decadeBelow(double value) {
    return Math.pow(10, Math.floor(Math.log10(value)));
  }

  private static String shortened(String title) {
    return title.length() <= LONGEST_TITLE ? title : title.substring(0, LONGEST_TITLE) + "...";
  }
}
