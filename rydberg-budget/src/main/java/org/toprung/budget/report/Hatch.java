package org.toprung.budget.report;

/** Parallel lines that fill a rectangle, to tell areas apart without colour. */
enum Hatch {
  /** Lines that rise to the right. */
  RISING(1),
  /** Lines that fall to the right. */
  FALLING(-1),
  /** Upright lines. */
  UPRIGHT(0);

  private final int slope;

  Hatch(int slope) {
    this.slope = slope;
  }

  /** SVG commands of the lines, upright or at 45 degrees, clipped to the rectangle. */
  String path(double x, double y, double width, double height, double spacing) {
    StringBuilder path = new StringBuilder();
    if (slope == 0) {
      for (double u = spacing / 2; u < width; u += spacing) {
        path.append(SvgPage.to('M', x + u, y)).append(SvgPage.to('L', x + u, y + height));
      }
      return path.toString();
    }
    // a line u − v = shift of the rectangle's own coordinates, v upwards for rising lines
    for (double shift = spacing / 2 - height; shift < width; shift += spacing) {
      double from = Math.max(0, shift);
      double to = Math.min(width, shift + height);
      if (from < to) {
        path.append(SvgPage.to('M', x + from, v(y, height, from - shift)))
            .append(SvgPage.to('L', x + to, v(y, height, to - shift)));
      }
    }
    return path.toString();
  }

  private double v(double y, double height, double along) {
    return slope > 0 ? y + height - along : y + along;
  }
}
