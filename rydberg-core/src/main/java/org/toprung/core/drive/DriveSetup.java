package org.toprung.core.drive;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.function.UnaryOperator;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.atom.Sublevel;
import org.toprung.core.quantity.ElectricField;
import org.toprung.core.quantity.Frequency;
import org.toprung.core.quantity.Length;
import org.toprung.core.quantity.MagneticField;
import org.toprung.core.quantity.PhysicalConstants;

/**
 * The description of a drive before it is resolved: start, steps, detuning and field.
 *
 * <p>Immutable: every method gives a copy, so that one description can be the root of many. Nothing
 * is computed before {@link #resolve()}.
 */
public final class DriveSetup {
  private static final int MAX_STEPS = 3;

  /** One step as described: where it leads and the beam that drives it. */
  record Step(Level to, Sublevel target, Beam beam, boolean quadrupole) {
    @Override
    public String toString() {
      return target == null ? to.toString() : target.toString();
    }
  }

  /** Light that shines on the atom without driving it. */
  record Trap(Beam beam, Frequency laser) {}

  private final Species species;
  private final Sublevel start;
  private final List<Step> steps;
  private final List<Frequency> detunings; // one for each step but the last; null until given
  private final Site site;
  private final Trap trap; // null when off during the pulse
  private final Sublevel idle; // null when there is none

  private DriveSetup(
      Species species,
      Sublevel start,
      List<Step> steps,
      List<Frequency> detunings,
      Site site,
      Trap trap,
      Sublevel idle) {
    this.species = species;
    this.start = start;
    this.steps = steps;
    this.detunings = detunings;
    this.site = site;
    this.trap = trap;
    this.idle = idle;
  }

  static DriveSetup of(Species species) {
    if (species == null) {
      throw new IllegalArgumentException("a drive needs a species, not null");
    }
    return new DriveSetup(species, null, List.of(), null, Site.ORIGIN, null, null);
  }

  /**
   * Sets the start.
   *
   * @param sublevel a hyperfine sublevel of the ground level
   * @return a copy with this start
   * @throws IllegalArgumentException if the species has no such sublevel, or it is not one of the
   *     ground level labelled by F and m<sub>F</sub>
   */
  public DriveSetup from(Sublevel sublevel) {
    requireGround(sublevel, "start");
    if (sublevel.equals(idle)) {
      throw new IllegalArgumentException("the start " + sublevel + " is the idle sublevel");
    }
    return new DriveSetup(species, sublevel, steps, detunings, site, trap, idle);
  }

  /** Refuses what is no hyperfine sublevel of the ground level. */
  void requireGround(Sublevel sublevel, String what) {
    species.requireValid(sublevel);
    if (!sublevel.isHyperfine() || !sublevel.level().equals(species.groundLevel())) {
      throw new IllegalArgumentException(
          "the "
              + what
              + " "
              + sublevel
              + " must be a hyperfine sublevel of the ground level "
              + species.groundLevel());
    }
  }

  /**
   * Adds a step to an intermediate level: all its sublevels take part.
   *
   * @param to the intermediate level
   * @param beam the beam that drives the step, with polarization and direction
   * @return a copy with this step
   * @throws IllegalArgumentException if the species has no such level, or the beam cannot have its
   *     polarization
   * @throws IllegalStateException if the beam lacks polarization or direction
   */
  public DriveSetup step(Level to, Beam beam) {
    species.requireValid(to);
    return withStep(new Step(to, null, beam, false));
  }

  /**
   * Adds the last step, to the wanted target.
   *
   * @param target a Rydberg sublevel with its m<sub>J</sub>; the nuclear spin is a spectator
   * @param beam the beam that drives the step, with polarization and direction
   * @return a copy with this step
   * @throws IllegalArgumentException if the species has no such sublevel, it is labelled by F, or
   *     the beam cannot have its polarization
   * @throws IllegalStateException if the beam lacks polarization or direction
   */
  public DriveSetup step(Sublevel target, Beam beam) {
    return withStep(new Step(requireTarget(target).level(), target, beam, false));
  }

  /**
   * Drives the target straight from the ground level by the electric quadrupole of a single beam, S
   * to D.
   *
   * @param target a Rydberg sublevel of a D level with its m<sub>J</sub>
   * @param beam the beam that drives it, with polarization and direction
   * @return a copy with this only step
   * @throws IllegalArgumentException if the species has no such sublevel, it is labelled by F, or
   *     the beam cannot have its polarization
   * @throws IllegalStateException if the beam lacks polarization or direction, or there is a step
   *     already
   */
  public DriveSetup quadrupoleStep(Sublevel target, Beam beam) {
    if (!steps.isEmpty()) {
      throw new IllegalStateException("a quadrupole step is the only one, not after " + steps);
    }
    return withStep(new Step(requireTarget(target).level(), target, beam, true));
  }

  private Sublevel requireTarget(Sublevel target) {
    species.requireValid(target);
    if (target.isHyperfine()) {
      throw new IllegalArgumentException(
          "the target "
              + target
              + " must be given by its mJ: the nuclear spin of a Rydberg level is a spectator");
    }
    return target;
  }

  private DriveSetup withStep(Step step) {
    step.beam().polarizationVector();
    List<Step> longer = new ArrayList<>(steps);
    longer.add(step);
    return new DriveSetup(species, start, List.copyOf(longer), detunings, site, trap, idle);
  }

  /**
   * Changes the beam of one step, for variations on a drive.
   *
   * @param step index of the step, from 0
   * @param change makes the new beam from the old one, as it was described
   * @return a copy with the new beam
   * @throws IllegalArgumentException if there is no such step or the new beam cannot have its
   *     polarization
   * @throws IllegalStateException if the new beam lacks polarization or direction
   */
  public DriveSetup withBeam(int step, UnaryOperator<Beam> change) {
    if (step < 0 || step >= steps.size()) {
      throw new IllegalArgumentException(
          "there is no step " + step + " (counted from 0) among " + steps);
    }
    Step old = steps.get(step);
    Beam changed = change.apply(old.beam());
    changed.polarizationVector();
    List<Step> copy = new ArrayList<>(steps);
    copy.set(step, new Step(old.to(), old.target(), changed, old.quadrupole()));
    return new DriveSetup(species, start, List.copyOf(copy), detunings, site, trap, idle);
  }

  /**
   * Sets the detunings of the lasers from the intermediate levels, one for each step but the last,
   * whose laser closes the ladder. Not needed for a single step.
   *
   * <p>The detuning of a step is the laser's frequency minus the transition frequency of the step,
   * between centres of gravity of hyperfine manifolds; the first step is counted from the start at
   * its own energy in the field. Positive when the laser lies above.
   *
   * @param newDetunings detuning of the first step, and of the second if there are three
   * @return a copy with these detunings
   */
  public DriveSetup detuned(Frequency... newDetunings) {
    return new DriveSetup(species, start, steps, List.of(newDetunings), site, trap, idle);
  }

  /**
   * Sets the magnetic field, which is the quantization axis and lab z.
   *
   * @param newField size of the field, at least 0
   * @return a copy in this field
   * @throws IllegalArgumentException if the field is negative
   */
  public DriveSetup in(MagneticField newField) {
    if (!(newField.tesla() >= 0)) {
      throw new IllegalArgumentException(
          "magnetic field "
              + newField
              + " must be at least 0: it points along lab z by convention");
    }
    return new DriveSetup(species, start, steps, detunings, site.with(newField), trap, idle);
  }

  /**
   * Sets a static electric field, which shifts the Rydberg sublevels: {@link Drive#starkShift()}.
   *
   * @param ex component along lab x
   * @param ey component along lab y
   * @param ez component along lab z, the magnetic field
   * @return a copy in this electric field
   */
  public DriveSetup inElectricField(ElectricField ex, ElectricField ey, ElectricField ez) {
    StaticField newField =
        new StaticField(ex.voltsPerMetre(), ey.voltsPerMetre(), ez.voltsPerMetre());
    return new DriveSetup(species, start, steps, detunings, site.with(newField), trap, idle);
  }

  /**
   * Moves the atom from the lab origin, where the beams are focused unless they say otherwise.
   *
   * @param x position along lab x
   * @param y position along lab y
   * @param z position along lab z
   * @return a copy with the atom there; the beams of the resolved drive count their focus from it
   */
  public DriveSetup atomAt(Length x, Length y, Length z) {
    Site moved = site.at(x.metres(), y.metres(), z.metres());
    return new DriveSetup(species, start, steps, detunings, moved, trap, idle);
  }

  /**
   * Names the ground sublevel that is not driven, such as the other state of a qubit, so that the
   * drive tells what its light does to it.
   *
   * @param sublevel a hyperfine sublevel of the ground level other than the start
   * @return a copy with this idle sublevel
   * @throws IllegalArgumentException if the species has no such ground sublevel, or it is the start
   */
  public DriveSetup idling(Sublevel sublevel) {
    requireGround(sublevel, "idle sublevel");
    if (sublevel.equals(start)) {
      throw new IllegalArgumentException("the idle sublevel " + sublevel + " is the start");
    }
    return new DriveSetup(species, start, steps, detunings, site, trap, sublevel);
  }

  /**
   * Leaves a trap on during the pulse: its light moves the levels, but drives nothing. The lasers
   * keep their frequencies; the pulse plan follows the moved levels.
   *
   * @param beam the trap beam at the atom, with polarization and direction
   * @param wavelength its vacuum wavelength, far from every transition of the ladder
   * @return a copy with this trap
   * @throws IllegalArgumentException if the wavelength is not positive or the beam cannot have its
   *     polarization
   * @throws IllegalStateException if the beam lacks polarization or direction
   */
  public DriveSetup trappedBy(Beam beam, Length wavelength) {
    if (!(wavelength.metres() > 0)) {
      throw new IllegalArgumentException("trap wavelength " + wavelength + " must be positive");
    }
    beam.polarizationVector();
    Frequency laser = Frequency.ofHertz(PhysicalConstants.SPEED_OF_LIGHT / wavelength.metres());
    double limit = -species.energyHertz(species.groundLevel()).value();
    if (!(laser.hertz() < limit)) {
      throw new IllegalArgumentException(
          "trap wavelength "
              + wavelength
              + " must be longer than "
              + Length.ofMetres(PhysicalConstants.SPEED_OF_LIGHT / limit)
              + ", where it ionizes the ground level");
    }
    return new DriveSetup(species, start, steps, detunings, site, new Trap(beam, laser), idle);
  }

  /**
   * Works out couplings, shifts and everything else of the drive.
   *
   * @return the resolved drive
   * @throws IllegalStateException if start, steps, detuning or field is missing
   * @throws IllegalArgumentException if a step is forbidden by a selection rule or the light cannot
   *     reach the target; the message names the rule
   */
  public Drive resolve() {
    requireGiven(start, "a start: call from(...)");
    requireGiven(field(), "a magnetic field: call in(...)");
    boolean climbs = !steps.isEmpty() && steps.size() <= MAX_STEPS;
    for (int k = 0; climbs && k < steps.size(); k++) {
      climbs = steps.get(k).target() == null ^ k == steps.size() - 1;
    }
    if (!climbs) {
      throw new IllegalStateException(
          "a drive has one to three steps, the last to a sublevel, those before to levels, not "
              + steps);
    }
    int given = detunings == null ? 0 : detunings.size();
    if (given != steps.size() - 1) {
      throw new IllegalStateException(
          "a drive of "
              + steps.size()
              + " steps needs a detuning for each step but the last: call detuned(...) with "
              + (steps.size() - 1)
              + " values, not "
              + given);
    }
    return Drive.resolved(this);
  }

  private static void requireGiven(Object value, String what) {
    if (value == null) {
      throw new IllegalStateException("the drive still needs " + what);
    }
  }

  Species species() {
    return species;
  }

  Sublevel start() {
    return start;
  }

  int steps() {
    return steps.size();
  }

  /** The level named for a rung: the ground level, then where each step leads. */
  Level named(int rung) {
    return rung == 0 ? species.groundLevel() : level(rung - 1);
  }

  /** The level a step leads to. */
  Level level(int step) {
    return steps.get(step).to();
  }

  Sublevel target() {
    return steps.get(steps.size() - 1).target();
  }

  /** The beam of a step as the atom sees it: its focus counted from the atom. */
  Beam beam(int step) {
    return site.sees(steps.get(step).beam());
  }

  boolean isQuadrupole(int step) {
    return steps.get(step).quadrupole();
  }

  Frequency detuning(int step) {
    return detunings.get(step);
  }

  MagneticField field() {
    return site.magnetic();
  }

  StaticField electric() {
    return site.electric();
  }

  Optional<Trap> trap() {
    return Optional.ofNullable(trap).map(t -> new Trap(site.sees(t.beam()), t.laser()));
  }

  Optional<Sublevel> idle() {
    return Optional.ofNullable(idle);
  }
}
