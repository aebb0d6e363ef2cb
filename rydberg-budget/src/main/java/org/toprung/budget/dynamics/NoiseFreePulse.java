package org.toprung.budget.dynamics;

import org.toprung.core.drive.Ladder;
import org.toprung.core.drive.LadderSetting;
import org.toprung.core.linear.ComplexMatrix;
import org.toprung.core.linear.MatrixExponential;

/**
 * Outcome of a pulse on the full ladder without noise and without loss.
 *
 * @param missed probability of any outcome that the other two do not count: the atom stayed in the
 *     start, or sits in the intermediate level
 * @param otherRydberg probability of another sublevel of the Rydberg level
 * @param otherGround probability of another sublevel of the ground level
 */
public record NoiseFreePulse(double missed, double otherRydberg, double otherGround) {

  /**
   * Propagates a pulse.
   *
   * @param ladder the ladder
   * @param setting nominal setting of the pulse, with its frequency offset
   * @param seconds duration, s
   * @return where the atom ends
   */
  public static NoiseFreePulse of(Ladder ladder, LadderSetting setting, double seconds) {
    int n = ladder.size();
    PulseFrame frame = PulseFrame.of(ladder, setting);
    double[] re = new double[n * n];
    double[] im = new double[n * n];
    ladder.hamiltonianHertz(setting, re, im);
    ComplexMatrix propagator =
        Evolution.propagator(MatrixExponential.ofSize(n), n, re, im, seconds);
    double[] beginRe = new double[n];
    double[] beginIm = new double[n];
    frame.begin(beginRe, beginIm);
    double[] endRe = new double[n];
    double[] endIm = new double[n];
    propagator.multiply(beginRe, beginIm, endRe, endIm);
    double wanted = frame.probability(PulseFrame.Outcome.WANTED, endRe, endIm);
    double rydberg = frame.probability(PulseFrame.Outcome.OTHER_RYDBERG, endRe, endIm);
    double ground = frame.probability(PulseFrame.Outcome.OTHER_GROUND, endRe, endIm);
    return new NoiseFreePulse(Math.max(0, 1 - wanted - rydberg - ground), rydberg, ground);
  }
}
