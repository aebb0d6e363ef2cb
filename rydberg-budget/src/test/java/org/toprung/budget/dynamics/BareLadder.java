package org.toprung.budget.dynamics;

import org.toprung.budget.SchrodingerEquation;
import org.toprung.core.drive.Ladder;

/** The bare ladder, nothing eliminated, from the equation in {@link Ladder}'s documentation. */
public final class BareLadder {
  private BareLadder() {}

  /** The bare Hamiltonian of a ladder while a calibrated pulse is played. */
  public static SchrodingerEquation.Hamiltonian hamiltonian(
      Ladder ladder, CalibratedProgram played, boolean decays, double rydbergDecayPerSecond) {
    int n = ladder.size();
    int steps = ladder.steps();
    return (t, re, im) -> {
      double[] field = new double[steps];
      for (int k = 0; k < steps; k++) {
        field[k] = played.program().fieldFactor(k, t);
      }
      for (int i = 0; i < n; i++) {
        Ladder.State state = ladder.states().get(i);
        double energy = state.energyHertz();
        for (int k = 0; k < steps; k++) {
          energy += field[k] * field[k] * ladder.farShiftHertz(i, k);
        }
        if (state.rung() == steps) {
          energy -= played.laserOffsetHertz(t);
        }
        re[i * n + i] = energy;
        if (decays) {
          double rate = state.rung() == steps ? rydbergDecayPerSecond : state.decayPerSecond();
          im[i * n + i] = -rate / (4 * Math.PI);
        }
      }
      for (Ladder.Coupling c : ladder.couplings()) {
        double factor = 0.5;
        for (int k = ladder.states().get(c.lower()).rung();
            k < ladder.states().get(c.upper()).rung();
            k++) {
          factor *= field[k];
        }
        int up = c.upper() * n + c.lower();
        int down = c.lower() * n + c.upper();
        re[up] += factor * c.rabiReHertz();
        im[up] += factor * c.rabiImHertz();
        re[down] += factor * c.rabiReHertz();
        im[down] -= factor * c.rabiImHertz();
      }
    };
  }
}
