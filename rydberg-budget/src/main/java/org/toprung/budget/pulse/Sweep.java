package org.toprung.budget.pulse;

/** How a frequency goes from 0 to 1 over the relative time x from 0 to 1. */
enum Sweep {
  LINEAR {
    @Override
    double at(double x) {
      return x;
    }

    @Override
    double integral(double x) {
      return 0.5 * x * x;
    }
  },
  /** (1 − cos πx)/2. */
  SINE {
    @Override
    double at(double x) {
      return 0.5 - 0.5 * Math.cos(Math.PI * x);
    }

    @Override
    double integral(double x) {
      return 0.5 * x - 0.5 / Math.PI * Math.sin(Math.PI * x);
    }
  };

  abstract double at(double x);

  /** Integral from 0 to x. */
  abstract double integral(double x);
}
