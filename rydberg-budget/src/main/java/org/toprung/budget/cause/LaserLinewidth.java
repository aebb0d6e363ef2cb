package org.toprung.budget.cause;

/**
 * White frequency noise of one laser, of Lorentzian full width Δν.
 *
 * <p>The optical coherence decays at the rate Γ = πΔν; on resonance the inversion of the driven
 * two-level system obeys z″ + Γz′ + Ω²z = 0, so that after a time τ, with Ω′ = √(Ω² − Γ²/4), 1 − P
 * = ½(1 + z) with z = e<sup>−Γτ/2</sup>(cos Ω′τ + (Γ/2Ω′) sin Ω′τ). For a π pulse and a narrow line
 * this is π²Δν/(4Ω).
 */
final class LaserLinewidth extends Disturbance {
  private final double fwhm; // Hz

  LaserLinewidth(int step, double fwhmHertz) {
    super(
        "Laser linewidth, step " + (step + 1),
        "the linewidth of laser " + (step + 1),
        "Bloch equations with dephasing rate πΔν (Allen and Eberly, Optical Resonance and Two-Level"
            + " Atoms, 1975); narrow-line limit π²Δν/(4Ω)");
    this.fwhm = fwhmHertz;
  }

  @Override
  double error(PulseModel model, double scale) {
    double rabi = model.plan().rabi().radiansPerSecond();
    double tau = model.seconds();
    double decay = Math.PI * scale * fwhm;
    return 0.5 * (inversion(rabi, decay, tau) - Math.cos(rabi * tau));
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
