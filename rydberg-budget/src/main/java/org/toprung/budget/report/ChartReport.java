package org.toprung.budget.report;

import java.awt.BasicStroke;
import java.awt.Color;
import java.awt.Font;
import java.awt.font.FontRenderContext;
import java.io.ByteArrayOutputStream;
import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.util.List;
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
  private static final int LONGEST_TITLE = 90; // characters
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
    List<CauseEntry> causes =
        content.budget().causes().stream().filter(c -> c.error() >= NOTHING).toList();
    int rows = causes.size() + 1;
    double total = Math.max(NOTHING, content.budget().total());
    double right =
        decadeAbove(Math.max(total + content.budget().uncertainty(), content.check().total()));
    double smallest = causes.isEmpty() ? total : causes.get(causes.size() - 1).error();
    this.left = Math.max(decadeBelow(smallest), right * Math.pow(10, -DECADES));
    this.chart = new XYChart(WIDTH, FRAME + ROW * rows, ChartTheme.Matlab);
    chart.setTitle(shortened(content.title()));
    chart.setXAxisTitle(
        "error of one pulse by cause (probability, log scale; line: ± 1 standard"
            + " uncertainty)");
    style(rows, right, causes);
    bar("total", rows, content.budget().total(), content.budget().uncertainty(), TOTAL_COLOR);
    for (int i = 0; i < causes.size(); i++) {
      CauseEntry cause = causes.get(i);
      bar(cause.cause(), causes.size() - i, cause.error(), cause.uncertainty(), BAR_COLOR);
    }
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

  private void style(int rows, double right, List<CauseEntry> causes) {
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
    style.setYAxisMax(rows + 1.0);
    style.setYAxisTickMarkSpacingHint(ROW * 3 / 4);
    style.setyAxisTickLabelsFormattingFunction(y -> rowName(y, rows, causes));
    style.setPlotContentSize(1);
    style.setPlotGridHorizontalLinesVisible(false);
    style.setPlotGridLinesColor(GRID_COLOR);
    style.setPlotGridLinesStroke(new BasicStroke(1));
    style.setPlotTicksMarksVisible(false);
  }

  /** Names the rows, which sit at whole numbers; the labels of other ticks are blank but differ. */
  private static String rowName(double y, int rows, List<CauseEntry> causes) {
    long row = Math.round(y);
    if (Math.abs(y - row) > 1e-6 || row < 1 || row > rows) {
      return " ".repeat(1 + (int) Math.round(10 * Math.abs(y)));
    }
    return row == rows ? "TOTAL" : causes.get((int) (causes.size() - row)).cause();
  }

  private void bar(String name, int row, double error, double uncertainty, Color color) {
    if (error > left) {
      line(name, row, left, error, BAR, color);
    }
    if (error + uncertainty > left) {
      line(
          "± " + name,
          row,
          Math.max(left, error - uncertainty),
          error + uncertainty,
          MARK,
          MARK_COLOR);
    }
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
