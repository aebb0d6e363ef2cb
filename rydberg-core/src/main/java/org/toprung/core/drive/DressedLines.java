package org.toprung.core.drive;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import org.apache.commons.math4.legacy.linear.Array2DRowRealMatrix;
import org.apache.commons.math4.legacy.linear.EigenDecomposition;
import org.toprung.core.quantity.Frequency;

/**
 * The lines that a weak first laser sees: everything above the ground rung, dressed by the other
 * lasers as strong and as near resonance as they may be.
 *
 * <p>The block of the Hamiltonian above the ground rung is diagonalized exactly. A dressed state of
 * energy E is resonant when the first laser is moved by E/h from its nominal frequency; the
 * strength of its line is its coupling to the start. With a resonant second step of Rabi frequency
 * Ω2 the line of the intermediate level splits into two, Ω2 apart; with that step detuned by δ,
 * √(Ω2² + δ²). Reference: Autler and Townes, Phys. Rev. 100, 703 (1955).
 *
 * <p>A complex Hermitian matrix A + iB is diagonalized as the real symmetric (A −B; B A), in which
 * every eigenvalue comes twice.
 */
final class DressedLines {
  private static final double SAME = 1e-9; // of the spread of the energies
  private static final double FAINT = 1e-6; // of the strongest line's Rabi frequency

  private DressedLines() {}

  static List<Drive.Line> of(Ladder ladder) {
    int n = ladder.size();
    double[] re = new double[n * n];
    double[] im = new double[n * n];
    ladder.hamiltonianHertz(LadderSetting.nominal(ladder.steps()), re, im);
    List<Integer> upper = new ArrayList<>();
    for (int i = 0; i < n; i++) {
      if (ladder.states().get(i).rung() > 0) {
        upper.add(i);
      }
    }
    int m = upper.size();
    Array2DRowRealMatrix h = new Array2DRowRealMatrix(2 * m, 2 * m);
    for (int i = 0; i < m; i++) {
      for (int j = 0; j < m; j++) {
        int at = upper.get(i) * n + upper.get(j);
        h.setEntry(i, j, re[at]);
        h.setEntry(m + i, m + j, re[at]);
        h.setEntry(i, m + j, -im[at]);
        h.setEntry(m + i, j, im[at]);
      }
    }
    EigenDecomposition eigen = new EigenDecomposition(h);
    double start = re[ladder.start() * n + ladder.start()];
    List<double[]> raw = new ArrayList<>(); // energy, squared coupling, Rydberg fraction
    for (int k = 0; k < 2 * m; k++) {
      double couplingRe = 0;
      double couplingIm = 0;
      double rydberg = 0;
      for (int i = 0; i < m; i++) {
        double a = eigen.getV().getEntry(i, k);
        double b = eigen.getV().getEntry(m + i, k);
        int at = ladder.start() * n + upper.get(i);
        couplingRe += re[at] * a - im[at] * b;
        couplingIm += re[at] * b + im[at] * a;
        if (ladder.states().get(upper.get(i)).rung() == ladder.steps()) {
          rydberg += a * a + b * b;
        }
      }
      raw.add(
          new double[] {
            eigen.getRealEigenvalue(k) - start,
            couplingRe * couplingRe + couplingIm * couplingIm,
            rydberg
          });
    }
    raw.sort(Comparator.comparingDouble(line -> line[0]));
    return merged(raw);
  }

  /** Joins the two copies of every eigenvalue, and sublevels that coincide. */
  private static List<Drive.Line> merged(List<double[]> raw) {
    double spread = raw.get(raw.size() - 1)[0] - raw.get(0)[0];
    double strongest = raw.stream().mapToDouble(line -> line[1]).max().orElse(0);
    List<Drive.Line> lines = new ArrayList<>();
    int from = 0;
    for (int k = 1; k <= raw.size(); k++) {
      if (k < raw.size() && raw.get(k)[0] - raw.get(from)[0] <= SAME * spread + 1e-6) {
        continue;
      }
      double energy = 0;
      double square = 0;
      double rydberg = 0;
      for (double[] line : raw.subList(from, k)) {
        energy += line[0] / (k - from);
        square += 0.5 * line[1];
        rydberg += line[2] / (k - from);
      }
      if (square > FAINT * FAINT * strongest) {
        lines.add(
            new Drive.Line(
                Frequency.ofHertz(energy), Frequency.ofHertz(2 * Math.sqrt(square)), rydberg));
      }
      from = k;
    }
    return List.copyOf(lines);
  }
}
