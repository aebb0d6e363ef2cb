package org.toprung.budget.report;

import java.util.function.DoubleFunction;
import javax.xml.stream.XMLStreamException;
import org.toprung.budget.report.SvgPage.Anchor;

/**
 * A logarithmic axis on a page.
 *
 * @param scale its decades
 * @param low where it begins, px
 * @param high where it ends, px
 */
record LogAxis(DecadeScale scale, double low, double high) {

  /** Place of a value, px; the nearer end for what lies beyond. */
  double at(double value) {
    return low + scale.fraction(value) * (high - low);
  }

  /** Draws grid lines up to a height, and ticks and labels below. */
  void drawBelow(SvgPage page, double top, double bottom, DoubleFunction<String> label, String name)
      throws XMLStreamException {
    StringBuilder grid = new StringBuilder();
    StringBuilder ticks = new StringBuilder();
    for (int exponent = scale.first(); exponent <= scale.last(); exponent++) {
      double decade = Math.pow(10, exponent);
      grid.append(SvgPage.to('M', at(decade), top)).append(SvgPage.to('L', at(decade), bottom));
      for (int digit = 2; digit <= 9 && exponent < scale.last(); digit++) {
        double x = at(digit * decade);
        ticks.append(SvgPage.to('M', x, bottom)).append(SvgPage.to('L', x, bottom + Look.TICK));
      }
      page.text(
          at(decade),
          bottom + Look.TICK + Look.TEXT * Look.LEADING,
          Look.TEXT,
          Anchor.MIDDLE,
          label.apply(decade),
          "fill",
          Look.INK);
    }
    page.path(grid.toString(), "stroke", Look.GRID, "stroke-width", "1");
    ticks.append(SvgPage.to('M', low, bottom)).append(SvgPage.to('L', high, bottom));
    page.path(ticks.toString(), "stroke", Look.INK, "stroke-width", "1");
    page.text(
        (low + high) / 2,
        bottom + Look.TICK + 2 * Look.TEXT * Look.LEADING,
        Look.TEXT,
        Anchor.MIDDLE,
        name,
        "fill",
        Look.INK);
  }

  /** Draws an upright axis with ticks and labels on its outer side. */
  void drawUpright(SvgPage page, double x, Anchor anchor, DoubleFunction<String> label)
      throws XMLStreamException {
    double outwards = anchor == Anchor.END ? -1 : 1;
    StringBuilder ticks = new StringBuilder();
    ticks.append(SvgPage.to('M', x, low)).append(SvgPage.to('L', x, high));
    for (int exponent = scale.first(); exponent <= scale.last(); exponent++) {
      double y = at(Math.pow(10, exponent));
      ticks.append(SvgPage.to('M', x, y)).append(SvgPage.to('L', x + outwards * Look.TICK, y));
      page.text(
          x + outwards * (Look.TICK + 3),
          y + Look.MIDDLE * Look.SMALL,
          Look.SMALL,
          anchor,
          label.apply(Math.pow(10, exponent)),
          "fill",
          Look.INK);
    }
    page.path(ticks.toString(), "stroke", Look.INK, "stroke-width", "1", "fill", "none");
  }
}
