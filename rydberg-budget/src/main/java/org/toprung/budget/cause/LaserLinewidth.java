package org.toprung.budget.cause;

import org.toprung.budget.bench.Disturbance;

/**
 * White frequency noise of one laser, of Lorentzian full width Δν: a one-sided density of Δν/π.
 *
 * <p>Square pulse on resonance: the optical coherence decays at the rate Γ = πΔν, and the inversion
 * of the driven two-level system obeys z″ + Γz′ + Ω²z = 0, so that after a time τ, with Ω′ = √(Ω² −
 * Γ²/4), 1 − P = ½(1 + z) with z = e<sup>−Γτ/2</sup>(cos Ω′τ + (Γ/2Ω′) sin Ω′τ). For a π pulse and
 * a narrow line this is π²Δν/(4Ω).
 *
 * <p>Any other pulse: E₂ = (Δν/π)∫F(f)df over the filter function of the pulse, which kicks turn
 * into ½(1 − e<sup>−2E₂</sup>).
 */
final class LaserLinewidth extends Halvable {
  private final int step;
  private final double fwhm; // Hz

  LaserLinewidth(int step, double fwhmHertz) {
    super(
        "Laser linewidth, step " + (step + 1),
        "the linewidth of laser " + (step + 1),
        "Bloch equations with dephasing rate πΔν (Allen and Eberly, Optical Resonance and Two-Level"
            + " Atoms, 1975) for a square π pulse, π²Δν/(4Ω) for a narrow line; else the integral of"
            + " the filter function of the pulse times Δν/π",
        new Disturbance(Disturbance.Kind.LINEWIDTH, step));
    this.step = step;
    this.fwhm = fwhmHertz;
  }

  @Override
  double error(PulseModel model, double scale) {
    double width = scale * fwhm;
    if (model.isPlainTransfer()) {
      double rabi = model.plan().rabi().radiansPerSecond();
      double tau = model.seconds();
      return 0.5 * (inversion(rabi, Math.PI * width, tau) - Math.cos(rabi * tau));
    }
    double secondOrder = width / Math.PI * model.response().whiteFrequencyNoise(step);
    return -0.5 * Math.expm1(-2 * secondOrder);
  }

  private static double inversion(double rabi, double decay, double tau) {
    double half = 0.5 * decay;
    double square = rabi * rabi - half * half;
    double damping = Math.exp(-half * tau);
    if (square > 0) {
      double w = Math.sqrt(square);
      return damping * (Math.cos(w * tau) + half / w * Math.sin(w * tau));
    }
    double w = Math.sqrt(-square);
    double sinc = w > 0 ? Math.sinh(w * tau) / w : tau;
    return damping * (Math.cosh(w * tau) + half * sinc);
  }
}
