package org.toprung.budget.cause;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import org.toprung.budget.bench.Bench;
import org.toprung.budget.bench.ThermalMotion;
import org.toprung.core.drive.Drive;
import org.toprung.core.quantity.Temperature;

/**
 * The causes that apply to a drive on a bench, and those that cannot be assessed for want of a
 * value.
 *
 * <p>Immutable.
 */
public final class Causes {
  private static final String STATIC_DETUNING =
      "exact square-pulse response over a Gaussian detuning; 1 − P = δ²/Ω² when small";

  private static final String MORE_DETUNINGS =
      "larger detunings from the intermediate levels, with the power that keeps the Rabi frequency";

  private final List<Cause> assessed = new ArrayList<>();
  private final List<String> notAssessed = new ArrayList<>();

  private Causes() {}

  /**
   * Collects the causes.
   *
   * @param drive the drive
   * @param bench the disturbances
   * @return the causes
   */
  public static Causes of(Drive drive, Bench bench) {
    Causes causes = new Causes();
    causes.addScattering(drive);
    causes.addLoss(bench);
    causes.addMotion(drive, bench);
    causes.addFields(drive, bench);
    causes.addLasers(drive, bench);
    causes.addPulse();
    if (drive.trap().isPresent()) {
      causes.notAssessed.add(
          "Trap light: its scattering and its noise; its mean shifts are in the frequency offset");
    }
    return causes;
  }

  private void addScattering(Drive drive) {
    int levels = drive.intermediates().size();
    if (levels == 0) {
      return;
    }
    assessed.add(
        new FixedCause(
            "Intermediate scattering",
            "γΣΩ²/4Δ² of start and target, half the pulse each (Saffman and Walker, Phys. Rev. A 72,"
                + " 022347 (2005)), summed over sublevels",
            PulseModel::scatteringPerPulse,
            m -> levels == 1 ? moreDetuning(m) : MORE_DETUNINGS));
  }

  private static String moreDetuning(PulseModel model) {
    return String.format(
        Locale.ROOT,
        "double the detuning at twice the power in both beams: about %.2g remains at the same Rabi"
            + " frequency; bring the step Rabi frequencies closer",
        0.5 * model.scatteringPerPulse());
  }

  private void addLoss(Bench bench) {
    assessed.add(
        new FixedCause(
            "Rydberg decay, spontaneous",
            "Γτ/2 with Γ by sum over states",
            m -> lost(m.spontaneousPerSecond(), m),
            m -> shorter(lost(m.spontaneousPerSecond(), m), "or a higher level")));
    if (bench.environment().isPresent()) {
      Temperature t = bench.environment().get();
      Temperature half = Temperature.ofKelvin(0.5 * t.kelvin());
      assessed.add(
          new FixedCause(
              "Rydberg decay, blackbody",
              "Γτ/2 with Γ by sum over states in thermal radiation at " + t,
              m -> lost(m.blackbodyPerSecond(t), m),
              m ->
                  String.format(
                      Locale.ROOT,
                      "cool the surroundings to %s: %.2g remains",
                      half,
                      lost(m.blackbodyPerSecond(half), m))));
    } else {
      notAssessed.add("Rydberg decay, blackbody: no environment temperature");
    }
  }

  /** Loss of an upper state that is populated half the time of a π pulse. */
  private static double lost(double ratePerSecond, PulseModel model) {
    return -Math.expm1(-0.5 * ratePerSecond * model.seconds());
  }

  private static String shorter(double error, String alternative) {
    return String.format(
        Locale.ROOT, "double the Rabi frequency: %.2g remains; %s", 0.5 * error, alternative);
  }

  private void addMotion(Drive drive, Bench bench) {
    if (bench.temperature().isEmpty()) {
      notAssessed.add("Doppler shift: no temperature");
      notAssessed.add("Position in the beams: no temperature");
      return;
    }
    ThermalMotion motion =
        ThermalMotion.of(
            drive.species().massKilograms(), bench.temperature().get(), bench.trapFrequencies());
    assessed.add(
        new DetuningNoise(
            "Doppler shift",
            "the thermal velocity (a quarter of the temperature), or the summed wave vector",
            STATIC_DETUNING + "; δ = k·v, thermal velocity with the zero-point floor",
            m -> dopplerSpread(drive, motion)));
    if (motion.isTrapped()) {
      assessed.add(new PositionInBeams(motion));
    } else {
      notAssessed.add("Position in the beams: no trap frequencies");
    }
  }

  private static double dopplerSpread(Drive drive, ThermalMotion motion) {
    double square = 0;
    double[] k = drive.waveVectorPerMetre();
    for (int a = 0; a < 3; a++) {
      double shift = k[a] * motion.velocityMetresPerSecond(a) / (2 * Math.PI);
      square += shift * shift;
    }
    return Math.sqrt(square);
  }

  private void addFields(Drive drive, Bench bench) {
    bench
        .magneticNoise()
        .ifPresentOrElse(
            b ->
                assessed.add(
                    new DetuningNoise(
                        "Magnetic field noise",
                        "the magnetic noise",
                        STATIC_DETUNING + "; δ = (dν/dB) δB",
                        m -> drive.magneticSensitivityHertzPerTesla() * b.tesla())),
            () -> notAssessed.add("Magnetic field noise: no magnetic noise"));
    bench
        .electricField()
        .ifPresentOrElse(
            e -> assessed.add(new StrayElectricField(e.voltsPerMetre())),
            () -> notAssessed.add("Electric field: no residual electric field"));
  }

  private void addLasers(Drive drive, Bench bench) {
    for (int k = 0; k < drive.steps().size(); k++) {
      int step = k;
      String suffix = ", step " + (step + 1);
      bench
          .intensityNoise()
          .ifPresentOrElse(
              list -> assessed.add(new IntensityNoise(step, list.get(step))),
              () -> notAssessed.add("Intensity noise" + suffix + ": no intensity noise"));
      bench
          .linewidths()
          .ifPresentOrElse(
              list -> assessed.add(new LaserLinewidth(step, list.get(step).hertz())),
              () -> notAssessed.add("Laser linewidth" + suffix + ": no linewidth"));
      bench
          .drifts()
          .ifPresentOrElse(
              list ->
                  assessed.add(
                      new DetuningNoise(
                          "Laser drift" + suffix,
                          "the slow frequency error of laser " + (step + 1),
                          STATIC_DETUNING,
                          m -> list.get(step).hertz())),
              () -> notAssessed.add("Laser drift" + suffix + ": no drift"));
    }
  }

  private void addPulse() {
    assessed.add(
        new FixedCause(
            "Other Rydberg sublevels",
            "noise-free propagation of the whole ladder",
            m -> m.noiseFree().otherRydberg(),
            m -> "purer polarization, or a larger field to move them away"));
    assessed.add(
        new FixedCause(
            "Other ground sublevels",
            "noise-free propagation of the whole ladder",
            m -> m.noiseFree().otherGround(),
            m -> "purer polarization of the first beam, a stretched start, or more detuning"));
    assessed.add(
        new FixedCause(
            "Rotation error",
            "what noise-free propagation of the whole ladder leaves untransferred on resonance",
            m -> m.noiseFree().missed(),
            m ->
                "more detuning of the intermediate level, or a start that reaches one target only"));
    assessed.add(
        new FixedCause(
            "Offset from resonance",
            "exact square-pulse response to the pulse's own offset",
            PulseModel::baseline,
            m -> "set the pulse offset to zero"));
    notAssessed.add("Residual intermediate population: needs the rise time of the pulse edges");
  }

  /**
   * The causes that can be assessed.
   *
   * @return an immutable list
   */
  public List<Cause> assessed() {
    return List.copyOf(assessed);
  }

  /**
   * What cannot be assessed, and which value is missing.
   *
   * @return an immutable list of sentences
   */
  public List<String> notAssessed() {
    return List.copyOf(notAssessed);
  }
}
