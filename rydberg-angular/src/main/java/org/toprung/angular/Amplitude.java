package org.toprung.angular;

/**
 * A complex number: an element of a rotation matrix.
 *
 * @param re real part
 * @param im imaginary part
 */
public record Amplitude(double re, double im) {

  /**
   * Returns the squared modulus.
   *
   * @return re² + im²
   */
  public double squaredModulus() {
    return re * re + im * im;
  }
}
