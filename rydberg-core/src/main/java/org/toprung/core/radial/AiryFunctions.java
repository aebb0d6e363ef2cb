package org.toprung.core.radial;

/**
 * The Airy functions Ai and Bi of a real argument: Maclaurin series (DLMF 9.4) between −7 and 5.5,
 * asymptotic series (DLMF 9.7) outside. Error below 1e-7 of the value or amplitude.
 */
final class AiryFunctions {
  private static final double LOWEST_SERIES = -7;
  private static final double HIGHEST_SERIES = 5.5;
  private static final double AI_ZERO = 0.355028053887817239;
  private static final double MINUS_SLOPE_ZERO = 0.258819403792806798;
  private static final int TERMS = 60;
  private static final int ASYMPTOTIC_TERMS = 12;

  private final double ai;
  private final double bi;

  private AiryFunctions(double ai, double bi) {
    this.ai = ai;
    this.bi = bi;
  }

  /** Both functions at x; Bi may overflow to infinity above x = 100. */
  static AiryFunctions of(double x) {
    if (x < LOWEST_SERIES) {
      return oscillating(-x);
    }
    return x > HIGHEST_SERIES ? exponential(x) : series(x);
  }

  private static AiryFunctions series(double x) {
    double cube = x * x * x;
    double f = 1;
    double g = x;
    double fTerm = 1;
    double gTerm = x;
    for (int k = 1; k < TERMS; k++) {
      fTerm *= cube / ((3.0 * k - 1) * (3.0 * k));
      gTerm *= cube / ((3.0 * k) * (3.0 * k + 1));
      f += fTerm;
      g += gTerm;
    }
    double even = AI_ZERO * f;
    double odd = MINUS_SLOPE_ZERO * g;
    return new AiryFunctions(even - odd, Math.sqrt(3) * (even + odd));
  }

  /** u_k of DLMF 9.7.2 over ζ^k. */
  private static double[] terms(double zeta) {
    double[] u = new double[ASYMPTOTIC_TERMS];
    u[0] = 1;
    for (int k = 1; k < ASYMPTOTIC_TERMS; k++) {
      u[k] = u[k - 1] * (6.0 * k - 5) * (6.0 * k - 1) / (72.0 * k * zeta);
    }
    return u;
  }

  private static AiryFunctions oscillating(double x) {
    double zeta = 2.0 / 3 * x * Math.sqrt(x);
    double[] u = terms(zeta);
    double p = 0;
    double q = 0;
    for (int k = 0; k + 1 < ASYMPTOTIC_TERMS; k += 2) {
      double sign = k % 4 == 0 ? 1 : -1;
      p += sign * u[k];
      q += sign * u[k + 1];
    }
    double size = 1 / (Math.sqrt(Math.PI) * Math.sqrt(Math.sqrt(x)));
    double phase = zeta - Math.PI / 4;
    return new AiryFunctions(
        size * (Math.cos(phase) * p + Math.sin(phase) * q),
        size * (Math.cos(phase) * q - Math.sin(phase) * p));
  }

  private static AiryFunctions exponential(double x) {
    double zeta = 2.0 / 3 * x * Math.sqrt(x);
    double falling = 0;
    double rising = 0;
    double[] u = terms(zeta);
    for (int k = 0; k < ASYMPTOTIC_TERMS; k++) {
      falling += k % 2 == 0 ? u[k] : -u[k];
      rising += u[k];
    }
    double size = 1 / (Math.sqrt(Math.PI) * Math.sqrt(Math.sqrt(x)));
    return new AiryFunctions(size / 2 * Math.exp(-zeta) * falling, size * Math.exp(zeta) * rising);
  }

  double ai() {
    return ai;
  }

  double bi() {
    return bi;
  }
}
