package org.toprung.budget.cause;

import static org.toprung.budget.bench.Disturbance.Kind.BLACKBODY;
import static org.toprung.budget.bench.Disturbance.Kind.DETECTION;
import static org.toprung.budget.bench.Disturbance.Kind.DOPPLER;
import static org.toprung.budget.bench.Disturbance.Kind.DRIFT;
import static org.toprung.budget.bench.Disturbance.Kind.FREQUENCY_SPECTRUM;
import static org.toprung.budget.bench.Disturbance.Kind.INTENSITY_SPECTRUM;
import static org.toprung.budget.bench.Disturbance.Kind.LASER_FREQUENCY;
import static org.toprung.budget.bench.Disturbance.Kind.MAGNETIC_FIELD;
import static org.toprung.budget.bench.Disturbance.Kind.PREPARATION;
import static org.toprung.budget.bench.Disturbance.Kind.SCATTERING;
import static org.toprung.budget.bench.Disturbance.Kind.SPONTANEOUS_DECAY;
import static org.toprung.budget.bench.Disturbance.Kind.TRAP_INTENSITY;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Set;
import org.toprung.budget.bench.Bench;
import org.toprung.budget.bench.BenchValue;
import org.toprung.budget.bench.Disturbance;
import org.toprung.budget.bench.NoiseDensity;
import org.toprung.budget.bench.Spread;
import org.toprung.budget.bench.ThermalMotion;
import org.toprung.budget.response.Fate;
import org.toprung.core.drive.Drive;
import org.toprung.core.quantity.Temperature;

/**
 * The causes that apply to a pulse on a bench, and those that cannot be assessed for want of a
 * value.
 *
 * <p>Immutable.
 */
public final class Causes {
  private static final String STATIC_DETUNING =
      "exact response of the pulse, averaged over the detuning; 1 − P = δ²/Ω² for a square π pulse";

  private static final String MORE_DETUNINGS =
      "larger detunings from the intermediate levels, with the power that keeps the Rabi frequency";

  private static final String FILTER =
      "∫S(f)F(f)df with the filter function of the pulse, second-order perturbation theory (Green"
          + " et al., New J. Phys. 15, 095004 (2013))";

  private static final String PROPAGATION = "noise-free propagation of the whole ladder";

  private final Drive drive;
  private final Bench bench;
  private final List<Cause> assessed = new ArrayList<>();
  private final List<String> notAssessed = new ArrayList<>();

  private Causes(Drive drive, Bench bench) {
    this.drive = drive;
    this.bench = bench;
  }

  /**
   * Collects the causes.
   *
   * @param model the pulse
   * @param bench the disturbances
   * @return the causes
   */
  public static Causes of(PulseModel model, Bench bench) {
    Causes causes = new Causes(model.drive(), bench);
    causes.addScattering();
    causes.addLoss();
    causes.addMotion();
    causes.addFields();
    for (int k = 0; k < model.drive().steps().size(); k++) {
      causes.addIntensity(k);
      causes.addFrequency(k);
      causes.addPolarization(k);
    }
    causes.addSettings();
    causes.addPulse(model);
    causes.addTrap();
    causes.addGiven();
    return causes;
  }

  private void addScattering() {
    int levels = drive.intermediates().size();
    if (levels == 0) {
      return;
    }
    assessed.add(
        new FixedCause(
            "Intermediate scattering",
            "natural decay times the time spent in the intermediate sublevels; (πγ/4|Δ|)(q + 1/q)"
                + " for a two-photon π pulse (Saffman and Walker, Phys. Rev. A 72, 022347 (2005))",
            only(SCATTERING),
            PulseModel::scatteringError,
            Fate.Kind.LOSS,
            m -> Destinations.ofScattering(drive),
            m -> levels == 1 ? moreDetuning(m) : MORE_DETUNINGS));
  }

  private static Set<Disturbance> only(Disturbance.Kind kind) {
    return Set.of(new Disturbance(kind, Disturbance.COMMON));
  }

  private static String moreDetuning(PulseModel model) {
    return String.format(
        Locale.ROOT,
        "double the detuning at twice the power in both beams: about %.2g remains at the same Rabi"
            + " frequency; bring the step Rabi frequencies closer",
        0.5 * model.scatteringError());
  }

  private void addLoss() {
    assessed.add(
        new FixedCause(
            "Rydberg decay, spontaneous",
            "decay rate by sum over states times the time spent in the Rydberg level; Γτ/2 for a π"
                + " pulse",
            only(SPONTANEOUS_DECAY),
            m -> m.decayError(m.spontaneousPerSecond()),
            Fate.Kind.LOSS,
            m -> Destinations.ofDecay(drive),
            m ->
                String.format(
                    Locale.ROOT,
                    "%s: %.2g remains; or a higher level",
                    // a length that follows from the area alone
                    m.pulse().areaRadians().isPresent()
                        ? "double the Rabi frequency"
                        : "spend half the time in the Rydberg level",
                    0.5 * m.decayError(m.spontaneousPerSecond()))));
    if (bench.environment().isEmpty()) {
      notAssessed.add("Rydberg decay, blackbody: no environment temperature");
      return;
    }
    Temperature t = bench.environment().get();
    Temperature half = Temperature.ofKelvin(0.5 * t.kelvin());
    assessed.add(
        new FixedCause(
            "Rydberg decay, blackbody",
            "rate by sum over states in thermal radiation at "
                + t
                + " times the time spent in the Rydberg level",
            only(BLACKBODY),
            m -> m.decayError(m.blackbodyPerSecond(t)),
            Fate.Kind.LOSS,
            m -> Destinations.ofBlackbody(drive, t),
            m ->
                String.format(
                    Locale.ROOT,
                    "cool the surroundings to %s: %.2g remains",
                    half,
                    m.decayError(m.blackbodyPerSecond(half)))));
  }

  private void addMotion() {
    Optional<ThermalMotion> motion = BeamFields.motion(drive, bench);
    motion.ifPresentOrElse(
        moving ->
            assessed.add(
                new DetuningNoise(
                    "Doppler shift",
                    "the thermal velocity (a quarter of the temperature), or the summed wave vector",
                    STATIC_DETUNING + "; δ = k·v, thermal velocity with the zero-point floor",
                    new Disturbance(DOPPLER, Disturbance.COMMON),
                    m -> Spread.gaussian(dopplerSpread(moving)))),
        () -> notAssessed.add("Doppler shift: no temperature"));
    boolean pointing = bench.isKnown(BenchValue.POINTING);
    boolean trapped = motion.isPresent() && motion.get().isTrapped();
    if (trapped || pointing) {
      assessed.add(new PositionInBeams(BeamFields.of(drive, bench)));
    }
    if (!trapped) {
      String missing = motion.isPresent() ? "no trap frequencies" : "no temperature";
      notAssessed.add(
          pointing
              ? "Position in the beams: pointing alone, " + missing
              : "Position in the beams: " + missing);
    } else if (!pointing) {
      notAssessed.add("Position in the beams: thermal spread alone, no pointing");
    }
    if (bench.movesDuringPulse()) {
      notAssessed.add(
          (trapped || pointing) && motion.isPresent()
              ? "Motion during the pulse: not composed, the check by simulation alone plays it"
              : "Motion during the pulse: needs a temperature, and trap frequencies or a pointing");
    }
  }

  private double dopplerSpread(ThermalMotion motion) {
    double square = 0;
    double[] k = drive.waveVectorPerMetre();
    for (int a = 0; a < 3; a++) {
      double shift = k[a] * motion.velocityMetresPerSecond(a) / (2 * Math.PI);
      square += shift * shift;
    }
    return Math.sqrt(square);
  }

  private void addFields() {
    bench
        .spread(BenchValue.MAGNETIC_NOISE, 0)
        .ifPresentOrElse(
            tesla ->
                assessed.add(
                    new DetuningNoise(
                        "Magnetic field noise",
                        "the magnetic noise",
                        STATIC_DETUNING + "; δ = (dν/dB) δB",
                        new Disturbance(MAGNETIC_FIELD, Disturbance.COMMON),
                        m -> tesla.scaled(-drive.magneticSensitivityHertzPerTesla()))),
            () -> notAssessed.add("Magnetic field noise: no magnetic noise"));
    bench
        .spread(BenchValue.ELECTRIC_FIELD, 0)
        .ifPresentOrElse(
            field -> assessed.add(new StrayElectricField(field)),
            () -> notAssessed.add("Electric field: no residual electric field"));
  }

  private void addIntensity(int step) {
    bench
        .spread(BenchValue.INTENSITY_NOISE, step)
        .ifPresentOrElse(
            relative -> assessed.add(new IntensityNoise(step, relative)),
            () -> missing("Intensity noise", step, "no intensity noise"));
    bench
        .intensityNoiseDensity(step)
        .ifPresentOrElse(
            density ->
                assessed.add(
                    new SpectralNoise(
                        named("Intensity noise spectrum", step),
                        "the intensity noise of step " + (step + 1) + " at all frequencies",
                        FILTER,
                        new Disturbance(INTENSITY_SPECTRUM, step),
                        m -> m.response().intensityNoise(step, density).error())),
            () -> missing("Intensity noise spectrum", step, "no intensity noise density"));
  }

  private void addFrequency(int step) {
    OptionalDouble linewidth = bench.value(BenchValue.LINEWIDTH, step);
    Optional<NoiseDensity> density = bench.frequencyNoiseDensity(step);
    if (linewidth.isPresent() && (density.isEmpty() || linewidth.getAsDouble() > 0)) {
      assessed.add(new LaserLinewidth(step, linewidth.getAsDouble()));
    }
    density.ifPresent(
        d ->
            assessed.add(
                new SpectralNoise(
                    named("Frequency noise spectrum", step),
                    "the frequency noise of laser " + (step + 1) + " at all frequencies",
                    FILTER,
                    new Disturbance(FREQUENCY_SPECTRUM, step),
                    m -> m.response().frequencyNoise(step, d).error())));
    if (linewidth.isEmpty() && density.isEmpty()) {
      missing("Laser frequency noise", step, "no linewidth and no frequency noise density");
    }
    bench
        .spread(BenchValue.DRIFT, step)
        .ifPresentOrElse(
            hertz ->
                assessed.add(
                    new DetuningNoise(
                        named("Laser drift", step),
                        "the slow frequency error of laser " + (step + 1),
                        STATIC_DETUNING,
                        new Disturbance(DRIFT, step),
                        m -> hertz)),
            () -> missing("Laser drift", step, "no drift"));
  }

  private void addPolarization(int step) {
    OptionalDouble fraction = bench.value(BenchValue.POLARIZATION_IMPURITY, step);
    if (fraction.isPresent()) {
      assessed.add(new PolarizationImpurity(drive, step, fraction.getAsDouble()));
    } else if (drive.steps().get(step).beam().impurity() == 0) {
      missing("Polarization impurity", step, "no polarization impurity");
    }
  }

  private static String named(String cause, int step) {
    return cause + ", step " + (step + 1);
  }

  private void missing(String cause, int step, String what) {
    notAssessed.add(named(cause, step) + ": " + what);
  }

  private void addSettings() {
    bench
        .spread(BenchValue.LENGTH_ERROR, 0)
        .ifPresentOrElse(
            relative -> assessed.add(new PulseLengthError(relative)),
            () -> notAssessed.add("Miscalibrated length: no length error"));
    bench
        .spread(BenchValue.FREQUENCY_ERROR, 0)
        .ifPresentOrElse(
            hertz ->
                assessed.add(
                    new DetuningNoise(
                        "Miscalibrated frequency",
                        "the error of the laser frequency",
                        STATIC_DETUNING,
                        new Disturbance(LASER_FREQUENCY, Disturbance.COMMON),
                        m -> hertz)),
            () -> notAssessed.add("Miscalibrated frequency: no frequency error"));
  }

  private void addPulse(PulseModel model) {
    assessed.add(
        new FixedCause(
            "Other Rydberg sublevels",
            PROPAGATION,
            Set.of(),
            m -> m.noiseFree().otherRydberg(),
            Fate.Kind.LEAK,
            m -> Destinations.ofLeak(m, drive.steps().size()),
            m -> "purer polarization, or a larger field to move them away"));
    assessed.add(
        new FixedCause(
            "Other ground sublevels",
            PROPAGATION,
            Set.of(),
            m -> m.noiseFree().otherGround(),
            Fate.Kind.LEAK,
            m -> Destinations.ofLeak(m, 0),
            m -> "purer polarization of the first beam, a stretched start, or more detuning"));
    assessed.add(
        new FixedCause(
            "Rotation error",
            "what noise-free propagation of the whole ladder leaves undone on resonance",
            Set.of(),
            m -> m.noiseFree().missed(),
            Fate.Kind.RECOVERABLE,
            m -> "start and target",
            m ->
                "more detuning of the intermediate level, a start that reaches one target only, or a"
                    + " slower pulse"));
    if (model.pulse().offset().hertz() != 0) {
      assessed.add(
          new FixedCause(
              "Offset from resonance",
              "exact response of the pulse to its own offset",
              Set.of(),
              PulseModel::offsetError,
              Fate.Kind.RECOVERABLE,
              m -> "start and target",
              m -> "set the pulse offset to zero"));
    }
    if (drive.intermediates().isEmpty()) {
      return;
    }
    if (model.residualIntermediate().isPresent()) {
      assessed.add(
          new FixedCause(
              "Residual intermediate population",
              "first-order non-adiabatic amplitude ∫(dω/dt) exp(2πiΔt) dt over the pulse as it is"
                  + " played",
              Set.of(),
              m -> m.residualIntermediate().orElse(0),
              Fate.Kind.LOSS,
              m -> Destinations.ofScattering(drive),
              m -> "slower edges, or more detuning of the intermediate level"));
    } else {
      notAssessed.add("Residual intermediate population: needs the rise time of the pulse edges");
    }
  }

  private void addTrap() {
    if (drive.trap().isEmpty()) {
      return;
    }
    Drive.TrapLight trap = drive.trap().get();
    double shift = trap.targetShift().hertz() - trap.startShift().hertz();
    bench
        .spread(BenchValue.TRAP_INTENSITY_NOISE, 0)
        .ifPresentOrElse(
            relative ->
                assessed.add(
                    new DetuningNoise(
                        "Trap intensity noise",
                        "the rms intensity noise of the trap",
                        STATIC_DETUNING + "; δ = differential light shift of the trap × δI/I",
                        new Disturbance(TRAP_INTENSITY, Disturbance.COMMON),
                        m -> relative.scaled(-shift))),
            () -> notAssessed.add("Trap intensity noise: no trap intensity noise"));
    notAssessed.add(
        "Trap light: its scattering; its mean shifts are in the frequency offset of the plan");
  }

  private void addGiven() {
    given(
        BenchValue.PREPARATION_ERROR,
        "State preparation",
        PREPARATION,
        "other sublevels of the ground level, or no atom",
        "better optical pumping");
    given(
        BenchValue.DETECTION_ERROR,
        "State detection",
        DETECTION,
        "start and target, read as the other",
        "a longer or cleaner detection");
  }

  private void given(
      BenchValue value, String name, Disturbance.Kind kind, String place, String lever) {
    OptionalDouble probability = bench.value(value, 0);
    if (probability.isEmpty()) {
      notAssessed.add(name + ": no " + value.words());
      return;
    }
    assessed.add(
        new FixedCause(
            name,
            "given, measured on the apparatus",
            only(kind),
            m -> probability.getAsDouble(),
            kind == DETECTION ? Fate.Kind.READOUT : Fate.Kind.LEAK,
            m -> place,
            m -> lever));
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
