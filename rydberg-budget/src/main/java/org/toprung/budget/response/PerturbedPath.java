package org.toprung.budget.response;

import java.util.Arrays;
import org.toprung.core.linear.ComplexMatrix;

/**
 * Second-order response of the error to one perturbation V·x(t) of a Hamiltonian (over h).
 *
 * <p>With the first-order state −2πi∫U(τ,t)V b x dt and the second-order state, the mean error for
 * noise x of one-sided density S is E₀ + ∫ S(f) F(f) df,
 *
 * <p>F(f) = (2π)² s · ½ Σ<sub>±f</sub> [ Σ<sub>v</sub> |⟨v|y⟩|² − 2 Re N ],
 *
 * <p>y = ∫ U(τ,t) V b(t) e<sup>∓2πift</sup> dt, N = ∫dt ∫<sub>t′&lt;t</sub> dt′ ⟨χ(t)|V U(t,t′)
 * V|b(t′)⟩ e<sup>±2πif(t−t′)</sup>. Both are run through the panels in one sweep: y is carried
 * along in the frame of each panel's start, so that decaying states need no inverse of a long
 * propagator.
 *
 * <p>Filled by {@link PulsePath} before anybody else sees it, not changed afterwards.
 */
final class PerturbedPath {
  private static final int NODES = FilonMoments.NODES;
  private static final double FACTOR = 4 * Math.PI * Math.PI;

  private final PulsePath path;
  private final int n;
  private final double[] columnRe; // [panel × node × state]
  private final double[] columnIm;
  private final double[] braRe;
  private final double[] braIm;
  private final double[][] within; // by class of equally long panels: Σ Re ⟨bra a|column b⟩
  private double white;

  PerturbedPath(PulsePath path) {
    this.path = path;
    this.n = path.n;
    int size = path.panels * NODES * n;
    this.columnRe = new double[size];
    this.columnIm = new double[size];
    this.braRe = new double[size];
    this.braIm = new double[size];
    this.within = new double[path.classLength.length][NODES * NODES];
  }

  void setColumn(int node, double[] re, double[] im) {
    System.arraycopy(re, 0, columnRe, node * n, n);
    System.arraycopy(im, 0, columnIm, node * n, n);
  }

  void setBra(int node, double[] re, double[] im) {
    System.arraycopy(re, 0, braRe, node * n, n);
    System.arraycopy(im, 0, braIm, node * n, n);
  }

  void finish(double whiteResponse) {
    this.white = whiteResponse;
    for (int p = 0; p < path.panels; p++) {
      addWithin(p, this, within[path.lengthClass[p]]);
    }
  }

  private void addWithin(int panel, PerturbedPath earlier, double[] sum) {
    for (int a = 0; a < NODES; a++) {
      int bra = (panel * NODES + a) * n;
      for (int b = 0; b < NODES; b++) {
        int column = (panel * NODES + b) * n;
        double product = 0;
        for (int i = 0; i < n; i++) {
          product +=
              braRe[bra + i] * earlier.columnRe[column + i]
                  - braIm[bra + i] * earlier.columnIm[column + i];
        }
        sum[a * NODES + b] += product;
      }
    }
  }

  /** ∫ F(f) df over all f ≥ 0, from the time domain. */
  double white() {
    return white;
  }

  /** F(f). */
  double filter(double hertz) {
    int classes = path.classLength.length;
    FilonMoments[] moments = new FilonMoments[classes];
    double nested = 0;
    for (int c = 0; c < classes; c++) {
      double h = path.classLength[c];
      moments[c] = new FilonMoments();
      moments[c].compute(2 * Math.PI * hertz * h);
      for (int i = 0; i < NODES * NODES; i++) {
        nested += h * h * moments[c].ordered[i] * within[c][i];
      }
    }
    double[] re = new double[n];
    double[] im = new double[n];
    double missed = 0;
    for (int side = 1; side >= -1; side -= 2) {
      Arrays.fill(re, 0);
      Arrays.fill(im, 0);
      nested += 0.5 * sweep(hertz, side, moments, re, im, this);
      missed += 0.5 * path.missed(re, im);
    }
    return FACTOR * path.sign * (missed - 2 * nested);
  }

  /** Half the second derivative of E by two static perturbations, taken together. */
  double together(PerturbedPath other) {
    FilonMoments[] moments = new FilonMoments[path.classLength.length];
    for (int c = 0; c < moments.length; c++) {
      moments[c] = new FilonMoments();
      moments[c].compute(0);
    }
    double[][] mine = new double[2][n];
    double[][] theirs = new double[2][n];
    double nested =
        0.5
            * (sweep(0, 1, moments, mine[0], mine[1], other)
                + other.sweep(0, 1, moments, theirs[0], theirs[1], this));
    double[] products = new double[NODES * NODES];
    for (int p = 0; p < path.panels; p++) {
      Arrays.fill(products, 0);
      addWithin(p, other, products);
      other.addWithin(p, this, products);
      double h = path.length[p];
      for (int i = 0; i < products.length; i++) {
        nested += 0.5 * h * h * moments[path.lengthClass[p]].ordered[i] * products[i];
      }
    }
    double missed = path.missedTogether(mine[0], mine[1], theirs[0], theirs[1]);
    return FACTOR * path.sign * (missed - 2 * nested);
  }

  /**
   * Carries y of this perturbation to the end and returns Re of what the later perturbation makes
   * of it between different panels.
   */
  private double sweep(
      double hertz,
      int side,
      FilonMoments[] moments,
      double[] re,
      double[] im,
      PerturbedPath later) {
    double[] workRe = new double[n];
    double[] workIm = new double[n];
    double nested = 0;
    for (int p = 0; p < path.panels; p++) {
      FilonMoments m = moments[path.lengthClass[p]];
      double h = path.length[p];
      double theta = 2 * Math.PI * hertz * h * side;
      for (int i = 0; i < n; i++) {
        double rowRe = 0;
        double rowIm = 0;
        double addRe = 0;
        double addIm = 0;
        for (int a = 0; a < NODES; a++) {
          int k = (p * NODES + a) * n + i;
          double cos = m.re[a];
          double sin = side * m.im[a];
          rowRe += cos * later.braRe[k] - sin * later.braIm[k];
          rowIm += cos * later.braIm[k] + sin * later.braRe[k];
          addRe += cos * columnRe[k] + sin * columnIm[k];
          addIm += cos * columnIm[k] - sin * columnRe[k];
        }
        nested += h * (rowRe * re[i] - rowIm * im[i]);
        workRe[i] = re[i] + h * addRe;
        workIm[i] = im[i] + h * addIm;
      }
      ComplexMatrix u = path.panelPropagator[path.segment[p]];
      u.multiply(workRe, workIm, re, im);
      double cos = Math.cos(theta);
      double sin = Math.sin(theta);
      for (int i = 0; i < n; i++) {
        double x = re[i];
        re[i] = cos * x - sin * im[i];
        im[i] = cos * im[i] + sin * x;
      }
    }
    return nested;
  }
}
