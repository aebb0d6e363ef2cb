package org.toprung.benchmarks;

import java.util.concurrent.TimeUnit;
import org.openjdk.jmh.annotations.Benchmark;
import org.openjdk.jmh.annotations.BenchmarkMode;
import org.openjdk.jmh.annotations.Fork;
import org.openjdk.jmh.annotations.Measurement;
import org.openjdk.jmh.annotations.Mode;
import org.openjdk.jmh.annotations.OutputTimeUnit;
import org.openjdk.jmh.annotations.Scope;
import org.openjdk.jmh.annotations.State;
import org.openjdk.jmh.annotations.Warmup;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.quantity.Temperature;
import org.toprung.core.radial.NumerovMethod;
import org.toprung.core.structure.DipoleElement;
import org.toprung.core.structure.DipoleElements;
import org.toprung.core.structure.Lifetimes;

/**
 * Dipole elements at n = 60: cold, with nothing about the atom known but its catalogue, and cached.
 * Targets: 0.6 ms and 100 ns.
 */
@State(Scope.Benchmark)
@BenchmarkMode(Mode.AverageTime)
@OutputTimeUnit(TimeUnit.NANOSECONDS)
@Warmup(iterations = 3, time = 1)
@Measurement(iterations = 5, time = 1)
@Fork(1)
public class DipoleElementBenchmark {
  private final Species species = Species.RUBIDIUM_87;
  private final Level s = Level.parse("60S1/2");
  private final Level p = Level.parse("60P3/2");
  private final Level d = Level.parse("60D5/2");
  private final DipoleElements elements = DipoleElements.of(species);
  private final Lifetimes lifetimes = Lifetimes.of(species);
  private final Temperature room = Temperature.ofKelvin(300);

  /** Potentials, calibration and waves from scratch. */
  @Benchmark
  public DipoleElement cold() {
    return DipoleElements.computed(species, NumerovMethod.of(species)).reduced(s, p);
  }

  /** The same without calibration. */
  @Benchmark
  public DipoleElement coldUncalibrated() {
    return DipoleElements.computed(species, NumerovMethod.uncalibrated(species)).reduced(p, d);
  }

  /** A remembered element. */
  @Benchmark
  public DipoleElement cached() {
    return elements.reduced(s, p);
  }

  /** A remembered element, asked for with the levels in the other order. */
  @Benchmark
  public DipoleElement cachedMirrored() {
    return elements.reduced(p, s);
  }

  /** A remembered pair of rates. */
  @Benchmark
  public double cachedRates() {
    return lifetimes.spontaneousRatePerSecond(s).value()
        + lifetimes.blackbodyRatePerSecond(s, room).value();
  }
}
