package org.toprung.budget.dynamics;

import java.util.List;
import org.toprung.core.drive.Ladder;
import org.toprung.core.linear.Decoupling;

/** The numbers of a ladder in arrays, to write its Hamiltonian quickly. Immutable. */
final class LadderTerms {
  private final int n;
  private final int steps;
  private final int[] rung;
  private final double[] energy; // Hz
  private final double[] decay; // Hz: Γ/4π
  private final double[] hertzPerTesla;
  private final double[] farShift; // Hz, by state and step
  private final int[] lower;
  private final int[] upper;
  private final double[] halfRe; // Hz
  private final double[] halfIm;

  LadderTerms(Ladder ladder) {
    this.n = ladder.size();
    this.steps = ladder.steps();
    this.rung = new int[n];
    this.energy = new double[n];
    this.decay = new double[n];
    this.hertzPerTesla = new double[n];
    this.farShift = new double[n * steps];
    for (int i = 0; i < n; i++) {
      Ladder.State s = ladder.states().get(i);
      rung[i] = s.rung();
      energy[i] = s.energyHertz();
      decay[i] = s.decayPerSecond() / (4 * Math.PI);
      // the start keeps its energy: only differences matter, to an idling atom too
      hertzPerTesla[i] = s.hertzPerTesla() - ladder.states().get(ladder.start()).hertzPerTesla();
      for (int k = 0; k < steps; k++) {
        farShift[i * steps + k] = ladder.farShiftHertz(i, k);
      }
    }
    List<Ladder.Coupling> couplings = ladder.couplings();
    this.lower = couplings.stream().mapToInt(Ladder.Coupling::lower).toArray();
    this.upper = couplings.stream().mapToInt(Ladder.Coupling::upper).toArray();
    this.halfRe = couplings.stream().mapToDouble(c -> 0.5 * c.rabiReHertz()).toArray();
    this.halfIm = couplings.stream().mapToDouble(c -> 0.5 * c.rabiImHertz()).toArray();
  }

  int size() {
    return n;
  }

  int steps() {
    return steps;
  }

  int rung(int state) {
    return rung[state];
  }

  /** The largest energy by modulus, Hz: what rounding is relative to. */
  double largestHertz() {
    double largest = 0;
    for (double e : energy) {
      largest = Math.max(largest, Math.abs(e));
    }
    return largest;
  }

  Decoupling decoupling(int[] populated) {
    return Decoupling.of(n, populated, lower, upper);
  }

  /**
   * Writes the Hamiltonian over h.
   *
   * @param fields programmed field factor of each beam
   * @param lastOffset programmed offset of the last laser, Hz
   * @param shot what differs in this shot
   * @param out workspace to write to
   */
  void fill(double[] fields, double lastOffset, ShotSetting shot, Decoupling out) {
    for (int i = 0; i < n; i++) {
      double re = energy[i] + hertzPerTesla[i] * shot.magneticTesla;
      for (int k = 0; k < steps; k++) {
        double a = fields[k] * shot.fieldFactor[k];
        re += a * a * farShift[i * steps + k];
        if (k < rung[i]) {
          re -= shot.laserOffset[k];
        }
      }
      double im = shot.intermediateDecays ? -decay[i] : 0;
      if (rung[i] == steps) {
        re += shot.targetHertz - lastOffset;
        im = -shot.rydbergDecayPerSecond / (4 * Math.PI);
      }
      out.setDiagonal(i, re, im);
    }
    for (int c = 0; c < lower.length; c++) {
      double product = 1;
      for (int k = rung[lower[c]]; k < rung[upper[c]]; k++) {
        product *= fields[k] * shot.fieldFactor[k];
      }
      out.setCoupling(c, product * halfRe[c], product * halfIm[c]);
    }
  }
}
