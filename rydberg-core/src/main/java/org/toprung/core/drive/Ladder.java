package org.toprung.core.drive;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import org.toprung.core.atom.Level;
import org.toprung.core.linear.Decoupling;

/**
 * The driven sublevels and their couplings in the frame that rotates with the lasers: the numbers
 * behind a resolved {@link Drive}, from which everything else is computed.
 *
 * <p>Every sublevel sits on a rung: 0 for the ground manifold, then one rung for each step, the
 * last for the Rydberg level. Its energy here is its energy over h minus the photon energies that
 * lead up to its rung, with the start at zero and the lasers on bare N-photon resonance with the
 * wanted target, so that an intermediate sublevel lies at minus its detuning. In a {@link
 * LadderSetting} with field factors a<sub>k</sub> and laser offsets ν<sub>k</sub> the Hamiltonian
 * over h (Hz) is
 *
 * <ul>
 *   <li>on the diagonal: energy + Σ<sub>k</sub> a<sub>k</sub>² · (light shift by levels outside the
 *       ladder) + dν/dB · δB − Σ<sub>k below the rung</sub> ν<sub>k</sub> (+ the target shift on
 *       the last rung), with −iΓ/4π for decay when loss is asked for;
 *   <li>between rungs: Ω/4π, Ω = E0⟨d·ε⟩/ħ, times a<sub>k</sub> for every step between them. A
 *       coupling that spans two rungs leads through a level that is far off resonance and
 *       eliminated, the fine-structure partner of an intermediate level.
 * </ul>
 *
 * <p>Immutable and thread-safe.
 */
public final class Ladder {

  /**
   * One sublevel of the ladder.
   *
   * @param label name for people, such as {@code 6P3/2 F=3 mF=3}
   * @param level the level it belongs to
   * @param rung number of photons that lead to it: 0 ground, {@link #steps()} Rydberg
   * @param energyHertz energy in the rotating frame over h, Hz
   * @param decayPerSecond natural decay rate of an intermediate sublevel, 1/s; 0 on other rungs
   * @param hertzPerTesla derivative of the energy over h with the magnetic field, Hz/T
   */
  public record State(
      String label,
      Level level,
      int rung,
      double energyHertz,
      double decayPerSecond,
      double hertzPerTesla) {}

  /**
   * A coupling of two sublevels, of neighbouring rungs or across eliminated levels.
   *
   * @param lower index of the state on the lower rung
   * @param upper index of the state on the upper rung
   * @param rabiReHertz real part of the Rabi frequency over 2π at nominal power, Hz
   * @param rabiImHertz imaginary part of the Rabi frequency over 2π at nominal power, Hz
   */
  public record Coupling(int lower, int upper, double rabiReHertz, double rabiImHertz) {
    /**
     * Size of the coupling.
     *
     * @return modulus of the Rabi frequency over 2π, Hz
     */
    public double rabiHertz() {
      return Math.hypot(rabiReHertz, rabiImHertz);
    }
  }

  private final int steps;
  private final List<State> states;
  private final List<Coupling> couplings;
  private final double[][] farShift; // Hz at nominal power, [state][step]
  private final int start;
  private final int[] wanted;

  Ladder(
      int steps,
      List<State> states,
      List<Coupling> couplings,
      double[][] farShift,
      int start,
      int[] wanted) {
    this.steps = steps;
    this.states = List.copyOf(states);
    this.couplings = List.copyOf(couplings);
    this.farShift = new double[farShift.length][];
    for (int i = 0; i < farShift.length; i++) {
      this.farShift[i] = farShift[i].clone();
    }
    this.start = start;
    this.wanted = wanted.clone();
  }

  /**
   * The number of sublevels.
   *
   * @return the number of states
   */
  public int size() {
    return states.size();
  }

  /**
   * The number of lasers.
   *
   * @return number of steps
   */
  public int steps() {
    return steps;
  }

  /**
   * The sublevels.
   *
   * @return an immutable list
   */
  public List<State> states() {
    return states;
  }

  /**
   * The couplings.
   *
   * @return an immutable list
   */
  public List<Coupling> couplings() {
    return couplings;
  }

  /**
   * Index of the start sublevel.
   *
   * @return index into {@link #states()}
   */
  public int start() {
    return start;
  }

  /**
   * Indices of the wanted target: the target sublevel with each nuclear projection it can carry.
   *
   * @return a fresh array of indices into {@link #states()}
   */
  public int[] wanted() {
    return wanted.clone();
  }

  /**
   * Light shift of a sublevel by levels outside the ladder, from one beam at nominal power.
   *
   * @param state index of the state
   * @param step index of the step
   * @return the shift over h, positive upwards, Hz
   */
  public double farShiftHertz(int state, int step) {
    return farShift[state][step];
  }

  /**
   * Writes the Hamiltonian over h without loss.
   *
   * @param setting what differs from the nominal drive
   * @param re receives the real parts, row-major, length size², Hz
   * @param im receives the imaginary parts, row-major, length size², Hz
   */
  public void hamiltonianHertz(LadderSetting setting, double[] re, double[] im) {
    int n = size();
    Arrays.fill(re, 0);
    Arrays.fill(im, 0);
    for (int i = 0; i < n; i++) {
      re[i * n + i] = diagonalHertz(i, setting);
    }
    for (Coupling c : couplings) {
      double half = 0.5 * strength(c, setting);
      re[c.upper() * n + c.lower()] += half * c.rabiReHertz();
      im[c.upper() * n + c.lower()] += half * c.rabiImHertz();
      re[c.lower() * n + c.upper()] += half * c.rabiReHertz();
      im[c.lower() * n + c.upper()] -= half * c.rabiImHertz();
    }
  }

  private double diagonalHertz(int i, LadderSetting setting) {
    State s = states.get(i);
    double energy = s.energyHertz() + s.hertzPerTesla() * setting.magneticOffsetTesla();
    for (int k = 0; k < steps; k++) {
      double a = setting.fieldFactor(k);
      energy += a * a * farShift[i][k];
      if (k < s.rung()) {
        energy -= setting.laserOffsetHertz(k);
      }
    }
    return s.rung() == steps ? energy + setting.targetShiftHertz() : energy;
  }

  /** A workspace to decouple some of the states from the others. */
  Decoupling decoupling(int... populated) {
    int[] lower = couplings.stream().mapToInt(Coupling::lower).toArray();
    int[] upper = couplings.stream().mapToInt(Coupling::upper).toArray();
    return Decoupling.of(size(), populated, lower, upper);
  }

  /** Writes the Hamiltonian over h without loss, Hz, into a workspace. */
  void fill(LadderSetting setting, Decoupling out) {
    for (int i = 0; i < size(); i++) {
      out.setDiagonal(i, diagonalHertz(i, setting), 0);
    }
    for (int c = 0; c < couplings.size(); c++) {
      Coupling coupling = couplings.get(c);
      double half = 0.5 * strength(coupling, setting);
      out.setCoupling(c, half * coupling.rabiReHertz(), half * coupling.rabiImHertz());
    }
  }

  /**
   * Adds the loss terms −iΓ/4π to a Hamiltonian over h: natural decay on the intermediate rung and
   * the given rate on the Rydberg rung.
   *
   * @param rydbergDecayPerSecond total decay rate of the Rydberg level, 1/s
   * @param im imaginary parts to add to, row-major, length size², Hz
   */
  public void addLossHertz(double rydbergDecayPerSecond, double[] im) {
    int n = size();
    for (int i = 0; i < n; i++) {
      State s = states.get(i);
      double rate = s.rung() == steps ? rydbergDecayPerSecond : s.decayPerSecond();
      im[i * n + i] -= rate / (4 * Math.PI);
    }
  }

  /**
   * The same ladder with the dipole elements of one step multiplied.
   *
   * @param step index of the step
   * @param factor real factor on the reduced element
   * @return a new ladder
   */
  public Ladder withElementScaled(int step, double factor) {
    List<Coupling> scaled = new ArrayList<>();
    for (Coupling c : couplings) {
      double f = takesPhotonOf(c, step) ? factor : 1;
      scaled.add(new Coupling(c.lower(), c.upper(), f * c.rabiReHertz(), f * c.rabiImHertz()));
    }
    return new Ladder(steps, states, scaled, farShift, start, wanted);
  }

  /**
   * The same ladder with the field of one beam multiplied: couplings in proportion, light shifts by
   * its square.
   *
   * @param step index of the step
   * @param factor factor on the field, positive
   * @return a new ladder
   */
  public Ladder withFieldScaled(int step, double factor) {
    double[][] shifts = new double[farShift.length][];
    for (int i = 0; i < shifts.length; i++) {
      shifts[i] = farShift[i].clone();
      shifts[i][step] *= factor * factor;
    }
    Ladder coupled = withElementScaled(step, factor);
    return new Ladder(steps, states, coupled.couplings, shifts, start, wanted);
  }

  /**
   * The same ladder with states beside it that another one has and nothing here couples to, so that
   * both can be described in one basis.
   *
   * @param other a ladder of the same steps that has all states of this one, by their labels
   * @return a new ladder with the states of the other in its order
   * @throws IllegalArgumentException if the other lacks a state of this one
   */
  public Ladder withStatesOf(Ladder other) {
    int[] place = new int[states.size()];
    List<State> all = new ArrayList<>(other.states);
    double[][] shifts = new double[all.size()][];
    for (int i = 0; i < shifts.length; i++) {
      shifts[i] = other.farShift[i].clone();
    }
    for (int i = 0; i < place.length; i++) {
      place[i] = other.indexOf(states.get(i).label());
      all.set(place[i], states.get(i));
      shifts[place[i]] = farShift[i].clone();
    }
    List<Coupling> moved = new ArrayList<>();
    for (Coupling c : couplings) {
      moved.add(new Coupling(place[c.lower()], place[c.upper()], c.rabiReHertz(), c.rabiImHertz()));
    }
    int[] targets = Arrays.stream(wanted).map(w -> place[w]).toArray();
    return new Ladder(steps, all, moved, shifts, place[start], targets);
  }

  private int indexOf(String label) {
    for (int i = 0; i < states.size(); i++) {
      if (states.get(i).label().equals(label)) {
        return i;
      }
    }
    throw new IllegalArgumentException("no state " + label + " among " + states);
  }

  /**
   * The same ladder with the decay rate of the intermediate sublevels multiplied.
   *
   * @param factor factor, positive
   * @return a new ladder
   */
  public Ladder withIntermediateDecayScaled(double factor) {
    List<State> scaled = new ArrayList<>();
    for (State s : states) {
      scaled.add(
          new State(
              s.label(),
              s.level(),
              s.rung(),
              s.energyHertz(),
              factor * s.decayPerSecond(),
              s.hertzPerTesla()));
    }
    return new Ladder(steps, scaled, couplings, farShift, start, wanted);
  }

  /**
   * The same ladder with the far-off-resonant light shifts multiplied.
   *
   * @param factor factor
   * @return a new ladder
   */
  public Ladder withFarShiftsScaled(double factor) {
    double[][] scaled = new double[farShift.length][];
    for (int i = 0; i < scaled.length; i++) {
      scaled[i] = Arrays.stream(farShift[i]).map(x -> factor * x).toArray();
    }
    return new Ladder(steps, states, couplings, scaled, start, wanted);
  }

  private double strength(Coupling c, LadderSetting setting) {
    double product = 1;
    for (int k = states.get(c.lower()).rung(); k < states.get(c.upper()).rung(); k++) {
      product *= setting.fieldFactor(k);
    }
    return product;
  }

  /** Whether a coupling needs the light of a step. */
  private boolean takesPhotonOf(Coupling c, int step) {
    return states.get(c.lower()).rung() <= step && step < states.get(c.upper()).rung();
  }

  /**
   * Whether a state sits between start and target.
   *
   * @param state index of the state
   * @return true on every rung but the first and the last
   */
  public boolean isIntermediate(int state) {
    int rung = states.get(state).rung();
    return rung > 0 && rung < steps;
  }

  /**
   * Whether a state belongs to the wanted target.
   *
   * @param state index of the state
   * @return true if it is one of {@link #wanted()}
   */
  public boolean isWanted(int state) {
    for (int w : wanted) {
      if (w == state) {
        return true;
      }
    }
    return false;
  }
}
