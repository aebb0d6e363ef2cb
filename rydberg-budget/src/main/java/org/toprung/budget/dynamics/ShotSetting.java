package org.toprung.budget.dynamics;

import java.util.Arrays;

/**
 * What differs from the program in one shot and stays as it is during the shot. Mutable, reused by
 * one thread.
 */
final class ShotSetting {
  final double[] fieldFactor; // on the field of each beam
  final double[] laserOffset; // Hz, added to each laser
  double magneticTesla; // added to the bias field
  double targetHertz; // shift of the target level
  boolean intermediateDecays;
  double rydbergDecayPerSecond;

  private ShotSetting(int steps) {
    this.fieldFactor = new double[steps];
    this.laserOffset = new double[steps];
    reset();
  }

  static ShotSetting nominal(int steps) {
    return new ShotSetting(steps);
  }

  void reset() {
    Arrays.fill(fieldFactor, 1);
    Arrays.fill(laserOffset, 0);
    magneticTesla = 0;
    targetHertz = 0;
    intermediateDecays = false;
    rydbergDecayPerSecond = 0;
  }
}
