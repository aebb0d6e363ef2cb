package org.toprung.benchmarks;

import java.util.concurrent.TimeUnit;
import org.openjdk.jmh.annotations.Benchmark;
import org.openjdk.jmh.annotations.BenchmarkMode;
import org.openjdk.jmh.annotations.Fork;
import org.openjdk.jmh.annotations.Measurement;
import org.openjdk.jmh.annotations.Mode;
import org.openjdk.jmh.annotations.OutputTimeUnit;
import org.openjdk.jmh.annotations.Param;
import org.openjdk.jmh.annotations.Scope;
import org.openjdk.jmh.annotations.Setup;
import org.openjdk.jmh.annotations.State;
import org.openjdk.jmh.annotations.Warmup;
import org.toprung.angular.Rotation;
import org.toprung.angular.ThreeJFamily;
import org.toprung.angular.Wigner;

/**
 * Whole families of 3j symbols in one sweep, against the same symbols one by one; the time is that
 * of a whole family of about largestDoubled/3 symbols. Elements of rotations over the same list.
 */
@BenchmarkMode(Mode.AverageTime)
@OutputTimeUnit(TimeUnit.NANOSECONDS)
@Fork(1)
@Warmup(iterations = 3, time = 1)
@Measurement(iterations = 3, time = 1)
@State(Scope.Thread)
public class WignerFamilyBenchmark {

  /** Largest doubled angular momentum of the list. */
  @Param({"10", "60", "200"})
  public int largestDoubled;

  private int[][] rows;
  private int next;
  private double[] symbols;

  /** Draws the argument list. */
  @Setup
  public void drawArguments() {
    rows = WignerArguments.threeJ(largestDoubled, 20261203L);
    symbols = new double[2 * largestDoubled + 1];
  }

  private int[] row() {
    return rows[next++ & rows.length - 1];
  }

  /** All symbols of a running j1. */
  @Benchmark
  public double[] sweepOverJ1() {
    int[] a = row();
    ThreeJFamily.overJ1Doubled(a[1], a[2], a[4], a[5], symbols);
    return symbols;
  }

  /** The same, one by one. */
  @Benchmark
  public double[] singlesOverJ1() {
    int[] a = row();
    int lowest = ThreeJFamily.lowestJ1Doubled(a[1], a[2], a[4], a[5]);
    for (int t = lowest; t <= a[1] + a[2]; t += 2) {
      symbols[(t - lowest) / 2] = Wigner.threeJDoubled(t, a[1], a[2], a[3], a[4], a[5]);
    }
    return symbols;
  }

  /** All symbols of a running m2. */
  @Benchmark
  public double[] sweepOverM2() {
    int[] a = row();
    ThreeJFamily.overM2Doubled(a[0], a[1], a[2], a[3], symbols);
    return symbols;
  }

  /** Element of a rotation by one radian about y. */
  @Benchmark
  public double smallD() {
    int[] a = row();
    return Rotation.smallDDoubled(a[0], a[3], -a[3], 1.0);
  }
}
