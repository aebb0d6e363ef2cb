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
import org.toprung.angular.SignedRoot;
import org.toprung.angular.Wigner;

/** Single symbols over fixed lists of random valid arguments. */
@BenchmarkMode(Mode.AverageTime)
@OutputTimeUnit(TimeUnit.NANOSECONDS)
@Fork(1)
@Warmup(iterations = 3, time = 1)
@Measurement(iterations = 3, time = 1)
@State(Scope.Thread)
public class WignerBenchmark {

  /** Largest doubled angular momentum of the lists. */
  @Param({"10", "60", "200"})
  public int largestDoubled;

  private int[][] threeJ;
  private int[][] sixJ;
  private int[][] nineJ;
  private int next;

  /** Draws the argument lists. */
  @Setup
  public void drawArguments() {
    threeJ = WignerArguments.threeJ(largestDoubled, 20261201L);
    sixJ = WignerArguments.sixJ(largestDoubled, 20261202L);
    nineJ = WignerArguments.nineJ(largestDoubled, 20261204L);
  }

  private int[] row(int[][] rows) {
    return rows[next++ & rows.length - 1];
  }

  /** Reading a row: part of every other figure. */
  @Benchmark
  public int[] readingTheList() {
    return row(threeJ);
  }

  /** 3j symbol. */
  @Benchmark
  public double threeJ() {
    int[] a = row(threeJ);
    return Wigner.threeJDoubled(a[0], a[1], a[2], a[3], a[4], a[5]);
  }

  /** 6j symbol. */
  @Benchmark
  public double sixJ() {
    int[] a = row(sixJ);
    return Wigner.sixJDoubled(a[0], a[1], a[2], a[3], a[4], a[5]);
  }

  /** 9j symbol. */
  @Benchmark
  public double nineJ() {
    int[] a = row(nineJ);
    return Wigner.nineJDoubled(a[0], a[1], a[2], a[3], a[4], a[5], a[6], a[7], a[8]);
  }

  /** 3j symbol in exact form. */
  @Benchmark
  public SignedRoot exactThreeJ() {
    int[] a = row(threeJ);
    return Wigner.exactThreeJDoubled(a[0], a[1], a[2], a[3], a[4], a[5]);
  }

  /** 6j symbol in exact form. */
  @Benchmark
  public SignedRoot exactSixJ() {
    int[] a = row(sixJ);
    return Wigner.exactSixJDoubled(a[0], a[1], a[2], a[3], a[4], a[5]);
  }
}
