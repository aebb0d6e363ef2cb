package org.toprung.budget.pulse;

import java.util.function.DoubleUnaryOperator;
import org.apache.commons.math4.legacy.analysis.integration.IterativeLegendreGaussIntegrator;

/** Integrals over a program by Commons Math, interval by interval. */
final class Quadrature {
  private Quadrature() {}

  static double integral(PulseProgram program, DoubleUnaryOperator f) {
    double[] breaks = program.breaks();
    double sum = 0;
    for (int i = 0; i + 1 < breaks.length; i++) {
      double from = breaks[i];
      double length = breaks[i + 1] - from;
      // x = sin² removes the root-like beginning of fields
      sum +=
          length
              * new IterativeLegendreGaussIntegrator(24, 1e-12, 1e-14)
                  .integrate(
                      100_000,
                      u ->
                          f.applyAsDouble(from + length * Math.pow(Math.sin(u), 2))
                              * Math.sin(2 * u),
                      1e-7,
                      0.5 * Math.PI - 1e-7);
    }
    return sum;
  }

  static double areaRadians(PulseProgram program, double rabiHertz) {
    return 2 * Math.PI * rabiHertz * integral(program, program::amplitude);
  }
}
