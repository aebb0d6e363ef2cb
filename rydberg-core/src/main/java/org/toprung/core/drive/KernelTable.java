package org.toprung.core.drive;

import java.util.Objects;

/**
 * What a {@link DriveKernel} answers for many points, owned by the caller and overwritten by each
 * batch. One instance serves one thread at a time.
 */
public final class KernelTable {
  final KernelResult point;

  private final double[] rabi;
  private final double[] startShift;
  private final double[] targetShift;
  private final double[] scattering;
  private final double[] offset;
  private int size;

  KernelTable(int capacity, KernelResult point) {
    this.point = point;
    this.rabi = new double[capacity];
    this.startShift = new double[capacity];
    this.targetShift = new double[capacity];
    this.scattering = new double[capacity];
    this.offset = new double[capacity];
  }

  void clear() {
    size = 0;
  }

  void append() {
    rabi[size] = point.rabiHertz();
    startShift[size] = point.startLightShiftHertz();
    targetShift[size] = point.targetLightShiftHertz();
    scattering[size] = point.scatteringPerSecond();
    offset[size] = point.frequencyOffsetHertz();
    size++;
  }

  /**
   * The largest batch it can take.
   *
   * @return number of points
   */
  public int capacity() {
    return rabi.length;
  }

  /**
   * The number of points of the last batch; of a batch that was refused, the points before the one
   * that was at fault.
   *
   * @return number of points
   */
  public int size() {
    return size;
  }

  /**
   * Effective Rabi frequency over 2π.
   *
   * @param index number of the point, from 0
   * @return the modulus, Hz
   * @throws IndexOutOfBoundsException if there is no such point
   */
  public double rabiHertz(int index) {
    return rabi[Objects.checkIndex(index, size)];
  }

  /**
   * Light shift of the start by all beams.
   *
   * @param index number of the point, from 0
   * @return the move of its energy over h, Hz, positive upwards
   * @throws IndexOutOfBoundsException if there is no such point
   */
  public double startLightShiftHertz(int index) {
    return startShift[Objects.checkIndex(index, size)];
  }

  /**
   * Light shift of the target by all beams.
   *
   * @param index number of the point, from 0
   * @return the move of its energy over h, Hz, positive upwards
   * @throws IndexOutOfBoundsException if there is no such point
   */
  public double targetLightShiftHertz(int index) {
    return targetShift[Objects.checkIndex(index, size)];
  }

  /**
   * Rate at which an atom scatters that spends equal times in start and target.
   *
   * @param index number of the point, from 0
   * @return the rate, 1/s
   * @throws IndexOutOfBoundsException if there is no such point
   */
  public double scatteringPerSecond(int index) {
    return scattering[Objects.checkIndex(index, size)];
  }

  /**
   * What to add to the last laser's frequency to sit on the light-shifted resonance.
   *
   * @param index number of the point, from 0
   * @return the offset, Hz
   * @throws IndexOutOfBoundsException if there is no such point
   */
  public double frequencyOffsetHertz(int index) {
    return offset[Objects.checkIndex(index, size)];
  }

  /**
   * Length of a square π pulse.
   *
   * @param index number of the point, from 0
   * @return 1/(2 · Rabi frequency), s
   * @throws IndexOutOfBoundsException if there is no such point
   */
  public double piPulseSeconds(int index) {
    return 1 / (2 * rabiHertz(index));
  }
}
