package org.toprung.core.drive;

import org.toprung.angular.SphericalComponents;
import org.toprung.angular.Wigner;

/**
 * What the light contributes to the matrix element of an absorption: the amplitude with which it
 * drives component q of a multipole operator of rank 1 or 2.
 *
 * <p>Dipole: r·ε = Σ<sub>q</sub> a<sub>q</sub> r<sub>q</sub> with the spherical components of the
 * polarization. Quadrupole: (r·k̂)(r·ε) = Σ<sub>q</sub> c<sub>q</sub> r²C²<sub>q</sub> with
 * c<sub>q</sub> = √(2/3) (−1)<sup>q</sup> Σ<sub>m</sub> ⟨1 m 1 −q−m|2 −q⟩ k̂<sub>m</sub>
 * ε<sub>−q−m</sub>, the polarization being transverse (D. F. V. James, Appl. Phys. B 66, 181
 * (1998)).
 */
record LightTensor(int rank, double[] re, double[] im) {

  static LightTensor dipole(SphericalComponents light) {
    double[] re = new double[3];
    double[] im = new double[3];
    for (int q = -1; q <= 1; q++) {
      re[q + 1] = light.re(q);
      im[q + 1] = light.im(q);
    }
    return new LightTensor(1, re, im);
  }

  /** The quadrupole part for a beam along a unit vector of the lab frame. */
  static LightTensor quadrupole(SphericalComponents light, double[] direction) {
    double root = Math.sqrt(0.5);
    // covariant components v_±1 = ∓(x ± iy)/√2, v_0 = z
    double[] kRe = {root * direction[0], direction[2], -root * direction[0]};
    double[] kIm = {-root * direction[1], 0, -root * direction[1]};
    double[] re = new double[5];
    double[] im = new double[5];
    for (int q = -2; q <= 2; q++) {
      for (int m = -1; m <= 1; m++) {
        int other = -q - m;
        if (Math.abs(other) > 1) {
          continue;
        }
        // ε_m = (−1)^m a_{−m}
        double sign = other % 2 == 0 ? 1 : -1;
        double eRe = sign * light.re(-other);
        double eIm = sign * light.im(-other);
        double factor =
            Math.sqrt(2.0 / 3)
                * (q % 2 == 0 ? 1 : -1)
                * Wigner.clebschGordanDoubled(2, 2 * m, 2, 2 * other, 4, -2 * q);
        re[q + 2] += factor * (kRe[m + 1] * eRe - kIm[m + 1] * eIm);
        im[q + 2] += factor * (kRe[m + 1] * eIm + kIm[m + 1] * eRe);
      }
    }
    return new LightTensor(2, re, im);
  }

  double re(int q) {
    return re[q + rank];
  }

  double im(int q) {
    return im[q + rank];
  }

  double power(int q) {
    return re(q) * re(q) + im(q) * im(q);
  }
}
