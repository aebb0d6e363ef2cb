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
import org.openjdk.jmh.annotations.State;
import org.openjdk.jmh.annotations.Warmup;
import org.toprung.core.atom.Catalogue;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.quantity.Temperature;
import org.toprung.core.radial.CoulombMethod;
import org.toprung.core.radial.NumerovMethod;
import org.toprung.core.radial.QuasiclassicalMethod;
import org.toprung.core.radial.Wavefunction;
import org.toprung.core.structure.Lifetimes;

/**
 * Wavefunctions, single integrals and lifetimes, each from scratch: the method or the species is
 * new for every call, so that no cache helps. Targets: an element at n = 60 in 0.6 ms, a 300 K
 * lifetime of 60S in 60 ms.
 */
@State(Scope.Benchmark)
@BenchmarkMode(Mode.AverageTime)
@OutputTimeUnit(TimeUnit.MICROSECONDS)
@Warmup(iterations = 3, time = 1)
@Measurement(iterations = 5, time = 1)
@Fork(1)
public class AtomBenchmark {
  /** Principal quantum number. */
  @Param({"60", "100"})
  public int n;

  private final Species species = Species.RUBIDIUM_87;
  private final Temperature room = Temperature.ofKelvin(300);

  /**
   * A wave by Numerov, with the table of its potential.
   *
   * @return the wave
   */
  @Benchmark
  public Wavefunction numerovWave() {
    return NumerovMethod.uncalibrated(species).wavefunction(Level.of(n, 0, 1));
  }

  /**
   * A Coulomb wave.
   *
   * @return the wave
   */
  @Benchmark
  public Wavefunction coulombWave() {
    return CoulombMethod.of(species).wavefunction(Level.of(n, 0, 1));
  }

  /**
   * The integral nS-nP3/2 by Numerov, calibration included.
   *
   * @return the integral in a0
   */
  @Benchmark
  public double numerovElement() {
    return NumerovMethod.of(species).dipole(Level.of(n, 0, 1), Level.of(n, 1, 3)).correctedA0();
  }

  /**
   * The integral nS-nP3/2 by the quasi-classical formula.
   *
   * @return the integral in a0
   */
  @Benchmark
  public double quasiclassicalElement() {
    return QuasiclassicalMethod.of(species)
        .dipole(Level.of(n, 0, 1), Level.of(n, 1, 3))
        .correctedA0();
  }

  /**
   * The lifetime of nS at 300 K with a catalogue, elements and waves of its own.
   *
   * @return the lifetime in s
   */
  @Benchmark
  public double coldLifetime() {
    Species own = Catalogue.bundled().with(OverlayFile.PATH).species("Rb-87");
    return Lifetimes.of(own).lifetimeSeconds(Level.of(n, 0, 1), room).value();
  }

  /**
   * The remembered lifetime of nS at 300 K.
   *
   * @return the lifetime in s
   */
  @Benchmark
  public double warmLifetime() {
    return Lifetimes.of(species).lifetimeSeconds(Level.of(n, 0, 1), room).value();
  }
}
