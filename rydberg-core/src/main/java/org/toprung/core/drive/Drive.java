package org.toprung.core.drive;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.atom.Sublevel;
import org.toprung.core.quantity.Frequency;
import org.toprung.core.quantity.Length;
import org.toprung.core.quantity.MagneticField;
import org.toprung.core.quantity.PhysicalConstants;
import org.toprung.core.structure.FarLightShift;
import org.toprung.core.structure.ReducedElement;

/**
 * A resolved drive from a ground sublevel to a Rydberg sublevel by one, two or three photons:
 * couplings, light shifts and what else follows from atom, beams and field before any noise.
 *
 * <pre>{@code
 * Drive drive = Drive.of(Species.RUBIDIUM_87)
 *     .from(Sublevel.hyperfine("5S1/2", 2, 2))
 *     .step(Level.parse("6P3/2"), lowerBeam)
 *     .step(Sublevel.fine("68S1/2", 0.5), upperBeam)
 *     .detuned(gigahertz(1.2))
 *     .in(gauss(4))
 *     .resolve();
 * }</pre>
 *
 * <p>The effective Rabi frequency and the light shifts are the second-order ones of {@link
 * Elimination}, summed coherently over all sublevels of the intermediate level at the given field;
 * they are good to about the square of {@link #admixture()}. {@link #plan} goes beyond second
 * order.
 *
 * <p>Immutable and thread-safe.
 */
public final class Drive {
  private static final double LARGE_ADMIXTURE = 0.1;
  private static final double LARGE_DIVERGENCE = 0.3; // rad; the next order is its square over 4
  private static final double NEGLIGIBLE = 1e-9; // of the wanted Rabi frequency

  /**
   * One resolved step.
   *
   * @param to name of the level or sublevel the step leads to
   * @param wavelength vacuum wavelength of the laser, light shifts not compensated
   * @param rabi root of the summed squares of the couplings over 2π from the start (first step) or
   *     to the target (last step) over the sublevels of the intermediate level
   * @param element reduced dipole element between the two levels; the quadrupole one of a
   *     quadrupole step
   * @param beam the beam that drives it
   */
  public record Step(
      String to, Length wavelength, Frequency rabi, ReducedElement element, Beam beam) {

    /**
     * Relative standard uncertainty of the dipole element, and so of the step's Rabi frequency.
     *
     * @return the relative uncertainty
     */
    public double relativeUncertainty() {
      return element.relativeUncertainty();
    }

    /**
     * Electric field of the beam at the nominal position of the atom.
     *
     * @return the amplitude E0 of E0 cos ωt, V/m
     */
    public double fieldVoltsPerMetre() {
      return beam.fieldVoltsPerMetre(wavelength);
    }

    /**
     * Field of a displaced atom over that at the nominal position.
     *
     * @param x displacement along lab x, m
     * @param y displacement along lab y, m
     * @param z displacement along lab z, m
     * @return the factor on the field; its square is that on the intensity
     * @throws IllegalArgumentException if the displacement is not finite
     */
    public double fieldFactorAt(double x, double y, double z) {
      return beam.fieldFactorAt(x, y, z, wavelength);
    }
  }

  /**
   * A Rydberg sublevel that the light reaches besides the wanted one.
   *
   * @param sublevel name with m<sub>J</sub> and m<sub>I</sub>
   * @param rabi effective Rabi frequency over 2π from the start
   * @param detuning sum of the laser frequencies minus the transition frequency, light shifts left
   *     out, with the lasers on bare resonance with the wanted target
   */
  public record OtherTarget(String sublevel, Frequency rabi, Frequency detuning) {}

  /**
   * Light that shines on the atom without driving it. Its shifts are not part of the drive's light
   * shifts, but of the pulse plan.
   *
   * @param beam the beam
   * @param wavelength its vacuum wavelength
   * @param startShift move of the start's energy over h, positive upwards
   * @param targetShift move of the wanted target's energy over h, positive upwards
   */
  public record TrapLight(
      Beam beam, Length wavelength, Frequency startShift, Frequency targetShift) {}

  /**
   * A line that a weak first laser sees.
   *
   * @param position what to add to the first laser's nominal frequency to be resonant
   * @param rabi coupling to the start over 2π; its square is the strength of the line
   * @param rydbergFraction population of the Rydberg level in the dressed state, 0 to 1
   */
  public record Line(Frequency position, Frequency rabi, double rydbergFraction) {}

  private final DriveSetup setup;
  private final Ladder ladder;
  private final Elimination elimination;
  private final List<Step> steps;
  private final List<OtherTarget> otherTargets;
  private final List<String> warnings;
  private final double[] waveVector; // 1/m
  private final double[][] stepWaveVectors; // 1/m
  private final double magneticSensitivity; // Hz/T
  private final double farShiftUncertainty; // relative
  private final double firstLaser; // Hz
  private final Optional<TrapLight> trap;

  private Drive(DriveSetup setup) {
    this.setup = setup;
    LadderBuilder builder = new LadderBuilder(setup);
    this.ladder = builder.build();
    this.elimination = Elimination.of(ladder);
    int reference = elimination.strongestWanted();
    List<Step> resolved = new ArrayList<>();
    this.stepWaveVectors = new double[setup.steps()][];
    this.waveVector = new double[3];
    for (int k = 0; k < setup.steps(); k++) {
      resolved.add(step(builder, k, reference));
      double number = 2 * Math.PI / resolved.get(k).wavelength().metres();
      stepWaveVectors[k] = setup.beam(k).direction();
      for (int a = 0; a < 3; a++) {
        stepWaveVectors[k][a] *= number;
        waveVector[a] += stepWaveVectors[k][a];
      }
    }
    this.steps = List.copyOf(resolved);
    this.otherTargets = others();
    List<String> doubts = new ArrayList<>(nearResonances());
    for (int k = 0; k < setup.steps(); k++) {
      doubts.addAll(tightFoci(k));
    }
    doubts.addAll(setup.electric().warnings(setup.species(), setup.target(), setup.field()));
    this.trap = setup.trap().map(builder::trapLight);
    trap.ifPresent(
        light -> {
          doubts.addAll(nearTrap(light, setup.start().level(), light.startShift()));
          doubts.addAll(nearTrap(light, setup.target().level(), light.targetShift()));
        });
    this.warnings = List.copyOf(doubts);
    this.magneticSensitivity =
        ladder.states().get(reference).hertzPerTesla()
            - ladder.states().get(ladder.start()).hertzPerTesla();
    this.farShiftUncertainty = builder.farShiftRelativeUncertainty();
    this.firstLaser = builder.frame().laserHertz(0);
  }

  /**
   * Begins the description of a drive.
   *
   * @param species the atom
   * @return an empty description
   */
  public static DriveSetup of(Species species) {
    return DriveSetup.of(species);
  }

  static Drive resolved(DriveSetup setup) {
    return new Drive(setup);
  }

  private Step step(LadderBuilder builder, int k, int reference) {
    boolean last = k == setup.steps() - 1;
    double[] squares = new double[ladder.size()];
    for (Ladder.Coupling c : ladder.couplings()) {
      Ladder.State lower = ladder.states().get(c.lower());
      Ladder.State upper = ladder.states().get(c.upper());
      boolean named = builder.isNamed(lower) && builder.isNamed(upper);
      if (lower.rung() == k && upper.rung() == k + 1 && named) {
        // summed over the far side, at the end that the ladder fixes
        squares[last ? c.upper() : c.lower()] += c.rabiHertz() * c.rabiHertz();
      }
    }
    double sum = 0;
    if (last) {
      sum = squares[reference];
    } else if (k == 0) {
      sum = squares[ladder.start()];
    } else {
      for (double square : squares) {
        sum = Math.max(sum, square);
      }
    }
    return new Step(
        last ? setup.target().toString() : setup.level(k).toString(),
        Length.ofMetres(PhysicalConstants.SPEED_OF_LIGHT / builder.frame().laserHertz(k)),
        Frequency.ofHertz(Math.sqrt(sum)),
        builder.light().element(k),
        setup.beam(k));
  }

  /** Sublevels that only another ground sublevel leads to have no coupling from the start. */
  private List<OtherTarget> others() {
    List<OtherTarget> others = new ArrayList<>();
    double faintest = NEGLIGIBLE * elimination.rabiHertz();
    for (int i = 0; i < ladder.size(); i++) {
      Ladder.State s = ladder.states().get(i);
      boolean other = s.rung() == ladder.steps() && !ladder.isWanted(i);
      if (other && elimination.rabiHertz(i) > faintest) {
        others.add(
            new OtherTarget(
                s.label(),
                Frequency.ofHertz(elimination.rabiHertz(i)),
                Frequency.ofHertz(-s.energyHertz())));
      }
    }
    others.sort((a, b) -> Double.compare(b.rabi().hertz(), a.rabi().hertz()));
    return List.copyOf(others);
  }

  private List<String> tightFoci(int step) {
    List<String> found = new ArrayList<>();
    Length wavelength = steps.get(step).wavelength();
    for (Length waist : setup.beam(step).profile().waists()) {
      double divergence = wavelength.metres() / (Math.PI * waist.metres());
      if (!(divergence <= LARGE_DIVERGENCE)) {
        found.add(
            String.format(
                Locale.ROOT,
                "beam %d is focused so tightly, to a waist of %s at %.4g nm, that it diverges by %.2g"
                    + " rad (should be below %.1g): a Gaussian beam with one polarization is a poor"
                    + " picture of it",
                step + 1,
                waist,
                wavelength.metres() * 1e9,
                divergence,
                LARGE_DIVERGENCE));
      }
    }
    return found;
  }

  /** With a single transition at the distance D a shift S mixes √(S/D) of the other level in. */
  private List<String> nearTrap(TrapLight light, Level level, Frequency shift) {
    double distance =
        FarLightShift.of(setup.species())
            .distanceToResonanceHertz(
                level, PhysicalConstants.SPEED_OF_LIGHT / light.wavelength().metres());
    double amplitude = Math.sqrt(Math.abs(shift.hertz()) / distance);
    if (amplitude <= LARGE_ADMIXTURE) {
      return List.of();
    }
    return List.of(
        String.format(
            Locale.ROOT,
            "the trap light is nearly resonant: it is %.4g MHz from a transition of %s, shifts it by"
                + " %.4g MHz and mixes %.2g of another level's amplitude in (should be below %.1g),"
                + " so its second-order shift is poor",
            distance * 1e-6,
            level,
            shift.hertz() * 1e-6,
            amplitude,
            LARGE_ADMIXTURE));
  }

  private List<String> nearResonances() {
    List<String> found = new ArrayList<>();
    for (int i = 0; i < ladder.size(); i++) {
      double amplitude =
          Math.sqrt(Math.max(elimination.startAdmixture(i), elimination.targetAdmixture(i)));
      if (amplitude > LARGE_ADMIXTURE) {
        Ladder.State s = ladder.states().get(i);
        found.add(
            String.format(
                Locale.ROOT,
                "%s is nearly resonant: the light is %.4g MHz from it and mixes %.2g of its amplitude"
                    + " into start or target (should be below %.1g), so eliminating it is poor",
                s.label(),
                -s.energyHertz() * 1e-6,
                amplitude,
                LARGE_ADMIXTURE));
      }
    }
    return List.copyOf(found);
  }

  /**
   * What the drive was resolved from, for variations on it.
   *
   * @return the description
   */
  public DriveSetup setup() {
    return setup;
  }

  /**
   * The atom.
   *
   * @return the species
   */
  public Species species() {
    return setup.species();
  }

  /**
   * The start sublevel.
   *
   * @return a hyperfine sublevel of the ground level
   */
  public Sublevel start() {
    return setup.start();
  }

  /**
   * The named intermediate levels.
   *
   * @return an immutable list of the levels that the steps before the last lead to
   */
  public List<Level> intermediates() {
    List<Level> levels = new ArrayList<>();
    for (int k = 0; k < setup.steps() - 1; k++) {
      levels.add(setup.level(k));
    }
    return List.copyOf(levels);
  }

  /**
   * The wanted target.
   *
   * @return a Rydberg sublevel
   */
  public Sublevel target() {
    return setup.target();
  }

  /**
   * The magnetic field along lab z.
   *
   * @return the field
   */
  public MagneticField field() {
    return setup.field();
  }

  /**
   * The static electric field.
   *
   * @return a fresh array of three components in the lab frame, V/m
   */
  public double[] electricFieldVoltsPerMetre() {
    StaticField e = setup.electric();
    return new double[] {e.x(), e.y(), e.z()};
  }

  /**
   * Quadratic Stark shift of the wanted target in the static electric field. The wavelength of the
   * last laser has it in already.
   *
   * @return the move of its energy over h, positive upwards
   */
  public Frequency starkShift() {
    return Frequency.ofHertz(
        setup
            .electric()
            .shiftHertz(setup.species(), setup.target().level(), setup.target().doubledM()));
  }

  /**
   * Detuning of a step's laser from its transition.
   *
   * @param step index of the step, from 0; the last step has none of its own
   * @return the detuning, positive when the laser lies above
   */
  public Frequency detuning(int step) {
    return setup.detuning(step);
  }

  /**
   * The steps in order.
   *
   * @return an immutable list of one to three steps
   */
  public List<Step> steps() {
    return steps;
  }

  /**
   * Effective Rabi frequency over 2π between the start and the wanted target.
   *
   * @return the modulus
   */
  public Frequency rabi() {
    return Frequency.ofHertz(elimination.rabiHertz());
  }

  /**
   * Relative standard uncertainty of the effective Rabi frequency, from the dipole elements.
   *
   * @return the relative uncertainty
   */
  public double relativeUncertainty() {
    double square = 0;
    for (Step s : steps) {
      square += s.relativeUncertainty() * s.relativeUncertainty();
    }
    return Math.sqrt(square);
  }

  /**
   * Light shift of the start by all beams, near- and far-resonant.
   *
   * @return the move of its energy over h, positive upwards
   */
  public Frequency startLightShift() {
    return Frequency.ofHertz(elimination.startShiftHertz());
  }

  /**
   * Light shift of the wanted target by all beams, near- and far-resonant.
   *
   * @return the move of its energy over h, positive upwards
   */
  public Frequency targetLightShift() {
    return Frequency.ofHertz(elimination.targetShiftHertz());
  }

  /**
   * Light shift of the start by one beam.
   *
   * @param step index of the step, from 0
   * @return the move of its energy over h, positive upwards
   */
  public Frequency startLightShift(int step) {
    return Frequency.ofHertz(elimination.startShiftHertz(step));
  }

  /**
   * Light shift of the wanted target by one beam.
   *
   * @param step index of the step, from 0
   * @return the move of its energy over h, positive upwards
   */
  public Frequency targetLightShift(int step) {
    return Frequency.ofHertz(elimination.targetShiftHertz(step));
  }

  /**
   * Relative standard uncertainty of the far-off-resonant part of the light shifts.
   *
   * @return the relative uncertainty
   */
  public double farShiftRelativeUncertainty() {
    return farShiftUncertainty;
  }

  /**
   * Rates at which start and target scatter photons through the intermediate levels, averaged: the
   * scattering rate of an atom that spends equal times in both, as during a π pulse.
   *
   * @return the rate, 1/s
   */
  public double meanScatteringPerSecond() {
    return 0.5 * (elimination.startScatteringPerSecond() + elimination.targetScatteringPerSecond());
  }

  /**
   * The trap that shines during the pulse, and what it does.
   *
   * @return the trap, if one was left on
   */
  public Optional<TrapLight> trap() {
    return trap;
  }

  /**
   * The ground sublevel that is not driven, and what the light does to it.
   *
   * @return the idle sublevel, if one was named
   */
  public Optional<GroundLight> idle() {
    return setup.idle().map(this::groundLight);
  }

  /**
   * Photon scattering of the dressed start, and where it leaves the atom.
   *
   * @return rates while the atom is in the start
   */
  public Scattering startScattering() {
    return Scattering.of(setup, ladder, elimination.startFollowing(), firstLaser);
  }

  /**
   * Photon scattering of the dressed target, and where it leaves the atom.
   *
   * @return rates while the atom is in the target
   */
  public Scattering targetScattering() {
    return Scattering.of(setup, ladder, elimination.targetFollowing(), firstLaser);
  }

  /**
   * What the light does to a ground sublevel, such as the idle state of a qubit.
   *
   * @param sublevel a hyperfine sublevel of the ground level
   * @return its light shift and scattering rate; those of the start for the start
   * @throws IllegalArgumentException if the species has no such ground sublevel
   */
  public GroundLight groundLight(Sublevel sublevel) {
    setup.requireGround(sublevel, "sublevel");
    return new LadderBuilder(setup).groundLight(sublevel);
  }

  /**
   * The largest amplitude Ω/2|Δ| of an intermediate sublevel in the dressed start or target.
   *
   * @return the admixture; second-order results are good to about its square
   */
  public double admixture() {
    return elimination.admixture();
  }

  /**
   * Sum of the wave vectors of all beams, which is what the Doppler shift of the ladder counts.
   *
   * @return a fresh array of three components, 1/m (2π over the wavelength)
   */
  public double[] waveVectorPerMetre() {
    return waveVector.clone();
  }

  /**
   * Wave vector of one beam.
   *
   * @param step index of the step, from 0
   * @return a fresh array of three components, 1/m (2π over the wavelength)
   */
  public double[] waveVectorPerMetre(int step) {
    return stepWaveVectors[step].clone();
  }

  /**
   * Doppler shift of the ladder for a moving atom.
   *
   * @param x velocity along lab x, m/s
   * @param y velocity along lab y, m/s
   * @param z velocity along lab z, m/s
   * @return −k·v/2π: the change of the summed laser frequencies as the atom sees them
   */
  public Frequency dopplerShift(double x, double y, double z) {
    return Frequency.ofHertz(
        -(waveVector[0] * x + waveVector[1] * y + waveVector[2] * z) / (2 * Math.PI));
  }

  /**
   * Recoil shift of the ladder: the kinetic energy ħ²|Σk|²/2m that an atom at rest gains, which the
   * lasers have to deliver on top of the energies of the sublevels. Not part of the wavelengths,
   * the detunings and the plan; absent in a trap that is deep in the Lamb-Dicke regime.
   *
   * @return the move of the resonance over h, never negative
   */
  public Frequency recoilShift() {
    double square = 0;
    for (double component : waveVector) {
      square += component * component;
    }
    return Frequency.ofRadiansPerSecond(
        PhysicalConstants.REDUCED_PLANCK * square / (2 * species().massKilograms()));
  }

  /**
   * Derivative of the transition frequency from start to target with the magnetic field.
   *
   * @return d(target − start)/dB over h, Hz/T
   */
  public double magneticSensitivityHertzPerTesla() {
    return magneticSensitivity;
  }

  /**
   * Rydberg sublevels that the light reaches besides the wanted one, strongest first.
   *
   * @return an immutable list
   */
  public List<OtherTarget> otherTargets() {
    return otherTargets;
  }

  /**
   * The lines that the first laser sees when it is weak, with the other steps as strong and as near
   * resonance as they are: exact in everything but the first step (Autler-Townes splitting).
   *
   * @return an immutable list by rising position
   */
  public List<Line> dressedLines() {
    return DressedLines.of(ladder);
  }

  /**
   * What makes the second-order values of this drive doubtful.
   *
   * @return an immutable list of sentences, empty when all is well
   */
  public List<String> warnings() {
    return warnings;
  }

  /**
   * The sublevels and couplings behind this drive.
   *
   * @return the ladder
   */
  public Ladder ladder() {
    return ladder;
  }

  /**
   * The plan of a square pulse at nominal powers, beyond second order where the dressed states of
   * the ladder can be told apart.
   *
   * @param areaRadians Ωt, positive; π for full transfer
   * @return duration and frequency offset
   * @throws IllegalArgumentException if the area is not positive
   */
  public PulsePlan plan(double areaRadians) {
    return PulsePlanner.plan(ladder, areaRadians);
  }

  /**
   * Prepares this drive for evaluation at other powers, detunings and places in the beams.
   *
   * @return a kernel, to be prepared once and used often
   * @throws IllegalArgumentException if the drive has three steps, or a beam is given by its
   *     intensity instead of its power
   */
  public DriveKernel kernel() {
    return DriveKernel.of(KernelBuilder.build(setup, toString()));
  }

  /**
   * How the powers of the beams weigh against each other: slopes of the differential light shift,
   * the ratios that null it and that scatter least, and powers for wanted Rabi frequencies.
   *
   * @return the balance at the detuning of this drive
   * @throws IllegalArgumentException if the drive has three steps, or a beam is given by its
   *     intensity instead of its power
   */
  public PowerBalance powerBalance() {
    return PowerBalance.of(this);
  }

  /**
   * How the effective Rabi frequency comes about, factor by factor, to be checked by hand.
   *
   * @return the working, as data and as text
   * @throws IllegalArgumentException if the drive has three steps or a quadrupole step
   */
  public Derivation derivation() {
    return DerivationBuilder.build(setup, this);
  }

  @Override
  public String toString() {
    StringBuilder text = new StringBuilder(species().name()).append(' ').append(start());
    for (Step s : steps) {
      text.append(" -> ").append(s.to());
    }
    return text.toString();
  }
}
