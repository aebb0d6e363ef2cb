package org.toprung.budget.dynamics;

import java.util.ArrayList;
import java.util.List;
import java.util.OptionalDouble;
import org.toprung.budget.pulse.PulseProgram;
import org.toprung.core.drive.Ladder;

/**
 * What edges of finite speed leave behind in the intermediate levels: the first-order non-adiabatic
 * amplitude, which is no part of the dressed states that {@link LadderSystem} works with.
 *
 * <p>An intermediate state i at E<sub>i</sub> (Hz, from the populated state j) follows j with the
 * amplitude ω<sub>i</sub>a(t), ω<sub>i</sub> = −Ω<sub>ij</sub>/2E<sub>i</sub> at full field; what
 * does not follow is c<sub>i</sub> = ∫ ω<sub>i</sub> (da/dt) ψ<sub>j</sub>(t)
 * e<sup>2πiE<sub>i</sub> t</sup> dt, E<sub>i</sub> with its light shift. For an error-function edge
 * of rise time r (10–90 %) and a state j that stays populated the integral is the Gaussian
 * |ω<sub>i</sub>|² e<sup>−(2πE<sub>i</sub>σ)²</sup>, σ = r/2.563. First order in the fields, so for
 * the states that start and target couple to directly: the error of it is of the relative order of
 * the admixture, until e<sup>−(2πEσ)²</sup> itself is as small as the higher orders. Reference:
 * Messiah, Quantum Mechanics, chapter XVII, section 13 (criterion and first-order amplitude of the
 * adiabatic approximation).
 */
public final class EdgeResidual {
  private static final int SAMPLES_PER_PERIOD = 24;
  private static final int FEWEST_SAMPLES = 400;
  private static final int MOST_SAMPLES = 240_000;

  private EdgeResidual() {}

  private static double squares(double[] re, double[] im) {
    double sum = 0;
    for (int i = 0; i < re.length; i++) {
      sum += re[i] * re[i] + im[i] * im[i];
    }
    return sum;
  }

  /**
   * Left by the program as it is played, along its noise-free course.
   *
   * @param system the pulse on its ladder
   * @return population of the intermediate levels at the end; empty where a field jumps, which is
   *     not assessed, where an intermediate level takes part in the pulse, or where the program is
   *     more than 10⁴ periods of the intermediate detuning long
   */
  public static OptionalDouble of(LadderSystem system) {
    CalibratedProgram calibrated = system.calibrated();
    PulseProgram program = calibrated.program();
    List<Follower> followers = followers(system);
    if (!system.decouplesIntermediates() || jumps(program)) {
      return OptionalDouble.empty();
    }
    double fastest = followers.stream().mapToDouble(f -> Math.abs(f.energy())).max().orElse(0);
    if (!(SAMPLES_PER_PERIOD * fastest * program.seconds() <= MOST_SAMPLES)) {
      return OptionalDouble.empty();
    }
    Course course = new Course(system);
    int states = calibrated.ladder().size();
    double[] re = new double[states];
    double[] im = new double[states];
    Energies shifts = new Energies(calibrated.ladder(), followers);
    double[] phases = new double[states];
    double[] cosine = new double[states];
    double[] sine = new double[states];
    int[] following = followers.stream().mapToInt(Follower::state).distinct().toArray();
    double[] breaks = program.breaks();
    for (int b = 0; b + 1 < breaks.length; b++) {
      double from = breaks[b];
      double length = breaks[b + 1] - from;
      if (program.isConstant(b)) {
        double[] fields = new double[program.steps()];
        for (int k = 0; k < fields.length; k++) {
          fields[k] = program.fieldFactor(k, from + 0.5 * length);
        }
        shifts.addPhases(fields, length, phases);
        continue;
      }
      int n = (int) Math.max(FEWEST_SAMPLES, Math.ceil(SAMPLES_PER_PERIOD * fastest * length));
      double[][] fields = new double[program.steps()][n + 1];
      for (int k = 0; k < fields.length; k++) {
        for (int s = 0; s <= n; s++) {
          // strictly between the breaks
          double x = Math.min(1 - 1e-9, Math.max(1e-9, (double) s / n));
          fields[k][s] = program.fieldFactor(k, from + x * length);
        }
      }
      double[] middle = new double[program.steps()];
      for (int s = 0; s < n; s++) {
        for (int k = 0; k < middle.length; k++) {
          middle[k] = 0.5 * (fields[k][s] + fields[k][s + 1]);
        }
        shifts.addPhases(middle, 0.5 * length / n, phases);
        double t = from + (s + 0.5) * length / n;
        double[] psi = course.at(t);
        for (int state : following) {
          cosine[state] = Math.cos(phases[state]);
          sine[state] = Math.sin(phases[state]);
        }
        // the coupling to the target carries the phase of the light
        double phase = program.phaseRadians(t);
        double lightRe = Math.cos(phase);
        double lightIm = Math.sin(phase);
        for (Follower f : followers) {
          double rise = fields[f.step()][s + 1] - fields[f.step()][s];
          if (rise == 0) {
            continue;
          }
          double pRe = psi[f.activeIndex()];
          double pIm = psi[psi.length / 2 + f.activeIndex()];
          double cos = cosine[f.state()];
          double sin = sine[f.state()];
          if (!f.fromStart()) {
            cos = cosine[f.state()] * lightRe - sine[f.state()] * lightIm;
            sin = cosine[f.state()] * lightIm + sine[f.state()] * lightRe;
          }
          double aRe = f.re() * pRe - f.im() * pIm;
          double aIm = f.re() * pIm + f.im() * pRe;
          re[f.state()] += rise * (aRe * cos - aIm * sin);
          im[f.state()] += rise * (aRe * sin + aIm * cos);
        }
        shifts.addPhases(middle, 0.5 * length / n, phases);
      }
    }
    return OptionalDouble.of(squares(re, im));
  }

  /** Whether a field is not zero at the ends, or not the same on both sides of a break. */
  private static boolean jumps(PulseProgram program) {
    double[] breaks = program.breaks();
    for (int k = 0; k < program.steps(); k++) {
      double last = 0;
      for (int b = 0; b + 1 < breaks.length; b++) {
        double small = 1e-7 * (breaks[b + 1] - breaks[b]);
        if (Math.abs(program.fieldFactor(k, breaks[b] + small) - last) > 1e-3) {
          return true;
        }
        last = program.fieldFactor(k, breaks[b + 1] - small);
      }
      if (last > 1e-3) {
        return true;
      }
    }
    return false;
  }

  /** An intermediate state that follows the start or a wanted state through one beam. */
  private record Follower(
      int state,
      int activeIndex,
      int step,
      boolean fromStart,
      double energy,
      double re,
      double im) {}

  private static List<Follower> followers(LadderSystem system) {
    Ladder ladder = system.calibrated().ladder();
    int[] active = system.plan().active();
    List<Follower> found = new ArrayList<>();
    for (Ladder.Coupling c : ladder.couplings()) {
      boolean up = c.lower() == ladder.start() && ladder.isIntermediate(c.upper());
      boolean down = ladder.isWanted(c.upper()) && ladder.isIntermediate(c.lower());
      int span = ladder.states().get(c.upper()).rung() - ladder.states().get(c.lower()).rung();
      if (!(up || down) || span != 1) {
        continue;
      }
      int state = up ? c.upper() : c.lower();
      int populated = up ? c.lower() : c.upper();
      // on resonance the target has the energy of the start
      double energy = ladder.states().get(state).energyHertz();
      // ⟨i|H|j⟩: as given for a step up, conjugate for a step down
      double re = -0.5 * c.rabiReHertz() / energy;
      double im = (up ? -0.5 : 0.5) * c.rabiImHertz() / energy;
      int index = 0;
      while (active[index] != populated) {
        index++;
      }
      int step = ladder.states().get(c.lower()).rung();
      found.add(new Follower(state, index, step, up, energy, re, im));
    }
    return found;
  }

  /** Energies of the intermediate states with their light shifts, to second order. */
  private static final class Energies {
    private final Ladder ladder;
    private final List<Follower> followers;

    Energies(Ladder ladder, List<Follower> followers) {
      this.ladder = ladder;
      this.followers = followers;
    }

    /** Adds 2πEt to the phase of every state. */
    void addPhases(double[] fields, double seconds, double[] phases) {
      double turn = 2 * Math.PI * seconds;
      for (int i = 0; i < phases.length; i++) {
        double energy = ladder.states().get(i).energyHertz();
        for (int k = 0; k < fields.length; k++) {
          energy += fields[k] * fields[k] * ladder.farShiftHertz(i, k);
        }
        phases[i] += turn * energy;
      }
      for (Follower f : followers) {
        // |Ω/2|²/E, ω being −Ω/2E
        double square = f.re() * f.re() + f.im() * f.im();
        double shift = square * f.energy() * fields[f.step()] * fields[f.step()];
        phases[f.state()] += turn * shift;
      }
    }
  }

  /** The noise-free state over time, linear between the ends of the segments. */
  private static final class Course {
    private final double[] times;
    private final double[][] states; // real parts, then imaginary parts
    private int at;

    Course(LadderSystem system) {
      int p = system.size();
      int segments = system.segments();
      this.times = new double[segments + 1];
      this.states = new double[segments + 1][2 * p];
      double[] re = new double[p];
      double[] im = new double[p];
      double[] hRe = new double[p * p];
      double[] hIm = new double[p * p];
      system.begin(re, im);
      Propagation propagation = new Propagation(p);
      store(0, re, im);
      for (int m = 0; m < segments; m++) {
        system.hamiltonianHertz(m, hRe, hIm);
        propagation.advance(hRe, hIm, system.segmentSeconds(m), re, im);
        times[m + 1] = times[m] + system.segmentSeconds(m);
        store(m + 1, re, im);
      }
    }

    private void store(int index, double[] re, double[] im) {
      System.arraycopy(re, 0, states[index], 0, re.length);
      System.arraycopy(im, 0, states[index], re.length, im.length);
    }

    /** At rising times. */
    double[] at(double t) {
      while (at + 2 < times.length && times[at + 1] < t) {
        at++;
      }
      double x = (t - times[at]) / (times[at + 1] - times[at]);
      double[] state = new double[states[at].length];
      for (int i = 0; i < state.length; i++) {
        state[i] = (1 - x) * states[at][i] + x * states[at + 1][i];
      }
      return state;
    }
  }
}
