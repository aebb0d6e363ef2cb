package org.toprung.budget.response;

import java.util.ArrayList;
import java.util.List;
import java.util.function.DoubleUnaryOperator;

/**
 * ∫ S(f) F(f) df of a tabulated density and a filter function.
 *
 * <p>The filter is costly and smooth on the scale 1/τ of its lobes, the density cheap and with a
 * kink at every row of its table. So the filter is sampled on panels of its own, {@value #POINTS}
 * Gauss points each: from 0 half a lobe, 1/(2τ), wide up to at most {@value #MOST_HALF_LOBES} half
 * lobes, beyond that by a factor {@value #TAIL_RATIO} each, where it is averaged over one lobe. The
 * product of its interpolation and the density is then integrated between all edges of both, by
 * Gauss's rule on intervals that double at most.
 */
final class FilterIntegral {
  private static final int POINTS = 6;
  private static final int MOST_HALF_LOBES = 4000;
  private static final int PANEL_SWEEPS = 4_000_000; // panels of the pulse × frequencies
  private static final double TAIL_RATIO = 1.25;
  private static final int TAIL_SAMPLES = 8;
  private static final double LARGEST_RATIO = 2;

  /** Nodes and weights of Gauss and Legendre's rule on −1..1; Abramowitz and Stegun, table 25.4. */
  private static final double[] NODE = {
    -0.932469514203152,
    -0.661209386466265,
    -0.238619186083197,
    0.238619186083197,
    0.661209386466265,
    0.932469514203152
  };

  private static final double[] WEIGHT = {
    0.171324492379170,
    0.360761573048139,
    0.467913934572691,
    0.467913934572691,
    0.360761573048139,
    0.171324492379170
  };

  private static final double[] BARYCENTRIC = barycentric();

  private FilterIntegral() {}

  private static double[] barycentric() {
    double[] w = new double[POINTS];
    for (int i = 0; i < POINTS; i++) {
      w[i] = 1;
      for (int j = 0; j < POINTS; j++) {
        if (j != i) {
          w[i] /= NODE[i] - NODE[j];
        }
      }
    }
    return w;
  }

  /** The filter on one panel. */
  private record Panel(double from, double to, double[] values) {
    double at(double f) {
      double x = (2 * f - from - to) / (to - from);
      double top = 0;
      double bottom = 0;
      for (int i = 0; i < POINTS; i++) {
        double d = x - NODE[i];
        if (d == 0) {
          return values[i];
        }
        top += BARYCENTRIC[i] / d * values[i];
        bottom += BARYCENTRIC[i] / d;
      }
      return top / bottom;
    }
  }

  private record Sums(double error, double below, double inside) {}

  /**
   * Integrates.
   *
   * @param filter F(f)
   * @param constant its limit for f → ∞, which does not count in the shares
   * @param area ∫ (F − constant) df over all f
   * @param seconds length of the pulse
   * @param sweep panels of the pulse that one value of the filter costs
   * @param density S(f)
   * @param table frequencies of the rows, rising, Hz
   */
  static NoiseError of(
      DoubleUnaryOperator filter,
      double constant,
      double area,
      double seconds,
      int sweep,
      DoubleUnaryOperator density,
      double[] table) {
    double high = table[table.length - 1];
    double halfLobe = 0.5 / seconds;
    int affordable = Math.max(200, PANEL_SWEEPS / (sweep * POINTS));
    int halfLobes =
        (int) Math.min(Math.ceil(high / halfLobe), Math.min(MOST_HALF_LOBES, affordable));
    Sums fine = sums(panels(filter, halfLobe, halfLobes, high, seconds), constant, density, table);
    Sums coarse =
        sums(
            panels(filter, 2 * halfLobe, (halfLobes + 1) / 2, high, seconds),
            constant,
            density,
            table);
    double above = area - fine.below() - fine.inside();
    return new NoiseError(
        fine.error(),
        Math.abs(fine.error() - coarse.error()),
        share(fine.below(), area),
        share(above, area));
  }

  /** Positive even where the filter is not, past the lobes of an imperfect pulse. */
  private static double share(double part, double area) {
    return area == 0 ? 0 : Math.abs(part / area);
  }

  private static List<Panel> panels(
      DoubleUnaryOperator filter, double width, int count, double high, double seconds) {
    List<Panel> out = new ArrayList<>();
    double to = 0;
    for (int i = 0; i < count && to < high; i++) {
      double from = to;
      to = Math.min(high, (i + 1) * width);
      double[] values = new double[POINTS];
      for (int k = 0; k < POINTS; k++) {
        values[k] = filter.applyAsDouble(point(from, to, k));
      }
      out.add(new Panel(from, to, values));
    }
    while (to < high) {
      double from = to;
      to = Math.min(high, from * TAIL_RATIO);
      double[] values = new double[POINTS];
      for (int k = 0; k < POINTS; k++) {
        for (int s = 0; s < TAIL_SAMPLES; s++) {
          double shift = (s - 0.5 * (TAIL_SAMPLES - 1)) / (TAIL_SAMPLES * seconds);
          values[k] += filter.applyAsDouble(point(from, to, k) + shift) / TAIL_SAMPLES;
        }
      }
      out.add(new Panel(from, to, values));
    }
    return out;
  }

  private static double point(double from, double to, int k) {
    return 0.5 * (from + to) + 0.5 * (to - from) * NODE[k];
  }

  private static Sums sums(
      List<Panel> panels, double constant, DoubleUnaryOperator density, double[] table) {
    double error = 0;
    double below = 0;
    double inside = 0;
    int row = 0;
    for (Panel panel : panels) {
      double from = panel.from();
      while (from < panel.to()) {
        while (row < table.length && table[row] <= from) {
          row++;
        }
        double to = row < table.length ? Math.min(table[row], panel.to()) : panel.to();
        boolean outside = from < table[0];
        if (!outside) {
          to = Math.min(to, LARGEST_RATIO * from);
        }
        double half = 0.5 * (to - from);
        for (int k = 0; k < POINTS; k++) {
          double f = point(from, to, k);
          double value = panel.at(f);
          double part = half * WEIGHT[k] * (value - constant);
          if (outside) {
            below += part;
          } else {
            inside += part;
            error += half * WEIGHT[k] * value * density.applyAsDouble(f);
          }
        }
        from = to;
      }
    }
    return new Sums(error, below, inside);
  }
}
