package org.toprung.budget.pulse;

import org.apache.commons.numbers.gamma.Erf;

/**
 * An amplitude over the relative time x from 0 to 1, its greatest value being 1. All but the
 * constant one begin and end at zero.
 */
enum Shape {
  CONSTANT {
    @Override
    double at(double x) {
      return 1;
    }

    @Override
    double integral(double x) {
      return x;
    }
  },
  /**
   * Cut where the Gaussian has fallen to the hundredth part, and that hundredth taken off: (g −
   * p)/(1 − p) with g = exp(−u²), u = (2x − 1)√(ln 100), p = 0.01.
   */
  GAUSSIAN {
    @Override
    double at(double x) {
      double u = (2 * x - 1) * HALF_WINDOW;
      return Math.max(0, (Math.exp(-u * u) - PEDESTAL) / (1 - PEDESTAL));
    }

    @Override
    double integral(double x) {
      double u = (2 * x - 1) * HALF_WINDOW;
      double gauss =
          0.25 * Math.sqrt(Math.PI) / HALF_WINDOW * (Erf.value(u) + Erf.value(HALF_WINDOW));
      return (gauss - PEDESTAL * x) / (1 - PEDESTAL);
    }
  },
  /** 0.42 − 0.5 cos 2πx + 0.08 cos 4πx. */
  BLACKMAN {
    @Override
    double at(double x) {
      double c = Math.cos(2 * Math.PI * x);
      return Math.max(0, 0.34 - 0.5 * c + 0.16 * c * c);
    }

    @Override
    double integral(double x) {
      return 0.42 * x
          - 0.25 / Math.PI * Math.sin(2 * Math.PI * x)
          + 0.02 / Math.PI * Math.sin(4 * Math.PI * x);
    }
  },
  /** sin² πx. */
  SINE_SQUARED {
    @Override
    double at(double x) {
      double s = Math.sin(Math.PI * x);
      return s * s;
    }

    @Override
    double integral(double x) {
      return 0.5 * x - 0.25 / Math.PI * Math.sin(2 * Math.PI * x);
    }
  };

  private static final double PEDESTAL = 0.01;
  private static final double HALF_WINDOW = Math.sqrt(-Math.log(PEDESTAL));

  /** The amplitude at 0 ≤ x ≤ 1. */
  abstract double at(double x);

  /** Its integral from 0 to x. */
  abstract double integral(double x);

  double mean() {
    return integral(1) - integral(0);
  }
}
