package org.toprung.budget.response;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import org.toprung.budget.dynamics.DrivenSystem;
import org.toprung.core.linear.ComplexMatrix;
import org.toprung.core.linear.MatrixExponential;

/**
 * The noise-free course of a pulse, cut into panels so short that a perturbation seen from the
 * moving state is a polynomial of degree {@value FilonMoments#DEGREE} on each.
 *
 * <p>The error is a quadratic form of the final state ψ with projections on a few vectors v, E = E₀
 * + s·(…): where nothing is lost v spans what is <em>not</em> wanted and s = +1, so that everything
 * is small for a good pulse and no digits cancel; with loss v are the wanted vectors and s = −1. A
 * pulse that must return against an idling state has that state as one more dimension.
 *
 * <p>Holds for every node the state b = U(t,0)ψ and the row ⟨χ| = ⟨η|U(τ,t), η = Σ v⟨v|ψ(τ)⟩.
 */
final class PulsePath {
  /** Largest remainder of the interpolation, relative to the perturbation. */
  private static final double INTERPOLATION = 1e-8;

  /** max |Π(u − u_a)| / 5! for five equally spaced nodes on 0..1. */
  private static final double REMAINDER = 3.6314e0 / 1024 / 120;

  /** Decay within a panel, so that going back through it loses no digits. */
  private static final double LARGEST_LOSS = 0.5;

  private static final int MOST_PANELS = 100_000;

  /** Panels times states: what is kept for each stays below some hundred megabytes. */
  private static final long MOST_KEPT = 1_000_000;

  private static final int NODES = FilonMoments.NODES;
  private static final double[] BOOLE = {7 / 90.0, 32 / 90.0, 12 / 90.0, 32 / 90.0, 7 / 90.0};

  /** Writes the derivative of the Hamiltonian in a segment, over h. */
  interface Operator {
    void write(int segment, double[] re, double[] im);
  }

  private final DrivenSystem system;
  final boolean idles;
  final boolean lossless;
  final int n;
  final double seconds;
  final int panels;
  final int[] segment; // of a panel
  final double[] length; // of a panel, s
  final int[] lengthClass; // panels of one class are equally long
  final double[] classLength; // s
  final ComplexMatrix[] panelPropagator; // by segment
  final double sign; // s
  final double[][] vectorRe;
  final double[][] vectorIm;
  final double error;
  private final ComplexMatrix[][] forward; // by segment and node, from the panel's start
  private final ComplexMatrix[][] backward;
  private final double[][] stateRe; // by panel × node
  private final double[][] stateIm;
  private final double[][] rowRe;
  private final double[][] rowIm;

  PulsePath(DrivenSystem system, List<Operator> operators) {
    this.system = system;
    this.idles = system.idleAmplitude() != 0;
    this.n = system.size() + (idles ? 1 : 0);
    int segments = system.segments();
    ComplexMatrix[] hamiltonians = new ComplexMatrix[segments];
    boolean hermitian = true;
    for (int m = 0; m < segments; m++) {
      hamiltonians[m] = matrix(system::hamiltonianHertz, m);
      hermitian &= isHermitian(hamiltonians[m]);
    }
    this.lossless = hermitian;
    int[] count = new int[segments];
    int total = 0;
    double sum = 0;
    for (int m = 0; m < segments; m++) {
      count[m] = panelsOf(m, hamiltonians[m], operators);
      total += count[m];
      sum += system.segmentSeconds(m);
      if (total > MOST_PANELS || (long) total * n > MOST_KEPT) {
        throw new ArithmeticException(
            "the pulse of "
                + system.segments()
                + " segments turns too fast to follow: more than "
                + Math.min(MOST_PANELS, MOST_KEPT / n)
                + " panels");
      }
    }
    this.panels = total;
    this.seconds = sum;
    this.segment = new int[total];
    this.length = new double[total];
    this.lengthClass = new int[total];
    this.panelPropagator = new ComplexMatrix[segments];
    this.forward = new ComplexMatrix[segments][NODES];
    this.backward = new ComplexMatrix[segments][NODES];
    Map<Double, Integer> classes = new LinkedHashMap<>();
    MatrixExponential exponential = MatrixExponential.ofSize(n);
    int panel = 0;
    for (int m = 0; m < segments; m++) {
      double h = system.segmentSeconds(m) / count[m];
      Integer known = classes.putIfAbsent(h, classes.size());
      int index = known == null ? classes.size() - 1 : known;
      for (int i = 0; i < count[m]; i++) {
        segment[panel] = m;
        length[panel] = h;
        lengthClass[panel] = index;
        panel++;
      }
      propagators(m, hamiltonians[m], h, exponential);
    }
    this.classLength = classes.keySet().stream().mapToDouble(Double::doubleValue).toArray();
    this.stateRe = new double[total * NODES][n];
    this.stateIm = new double[total * NODES][n];
    this.rowRe = new double[total * NODES][n];
    this.rowIm = new double[total * NODES][n];
    double[][] end = runForward();
    double[][][] vectors = lossless ? complement(wanted()) : wanted();
    this.sign = lossless ? 1 : -1;
    this.vectorRe = new double[vectors.length][];
    this.vectorIm = new double[vectors.length][];
    double[] etaRe = new double[n];
    double[] etaIm = new double[n];
    double weight = 0;
    for (int v = 0; v < vectors.length; v++) {
      vectorRe[v] = vectors[v][0];
      vectorIm[v] = vectors[v][1];
      double re = overlapRe(vectorRe[v], vectorIm[v], end[0], end[1]);
      double im = overlapIm(vectorRe[v], vectorIm[v], end[0], end[1]);
      weight += re * re + im * im;
      for (int i = 0; i < n; i++) {
        etaRe[i] += re * vectorRe[v][i] - im * vectorIm[v][i];
        etaIm[i] += re * vectorIm[v][i] + im * vectorRe[v][i];
      }
    }
    this.error = lossless ? weight : 1 - weight;
    runBackward(etaRe, etaIm);
  }

  /** An operator of the system in the dimensions used here; the idling state is not touched. */
  private ComplexMatrix matrix(Operator operator, int m) {
    int s = system.size();
    double[] re = new double[s * s];
    double[] im = new double[s * s];
    operator.write(m, re, im);
    ComplexMatrix out = ComplexMatrix.zeros(n, n);
    for (int i = 0; i < s; i++) {
      for (int j = 0; j < s; j++) {
        out.set(i, j, re[i * s + j], im[i * s + j]);
      }
    }
    return out;
  }

  private static boolean isHermitian(ComplexMatrix h) {
    double limit = 1e-13 * h.norm();
    for (int i = 0; i < h.rows(); i++) {
      for (int j = 0; j <= i; j++) {
        if (Math.abs(h.re(i, j) - h.re(j, i)) > limit
            || Math.abs(h.im(i, j) + h.im(j, i)) > limit) {
          return false;
        }
      }
    }
    return true;
  }

  /**
   * The fifth derivative of the perturbation as the moving state sees it is its fifth commutator
   * with 2πH; it limits the panel.
   */
  private int panelsOf(int m, ComplexMatrix h, List<Operator> operators) {
    double duration = system.segmentSeconds(m);
    double shortest = duration;
    for (Operator operator : operators) {
      ComplexMatrix v = matrix(operator, m);
      double size = v.norm();
      if (size == 0) {
        continue;
      }
      for (int k = 0; k < NODES; k++) {
        ComplexMatrix next = h.times(v);
        next.addScaled(-1, v.times(h));
        v = next;
      }
      double slope = v.norm() / size * REMAINDER;
      shortest = Math.min(shortest, Math.pow(INTERPOLATION / slope, 1.0 / NODES) / (2 * Math.PI));
    }
    double loss = 0;
    for (int i = 0; i < n; i++) {
      loss = Math.max(loss, -2 * Math.PI * h.im(i, i) * duration);
    }
    double count = Math.max(1, Math.max(Math.ceil(duration / shortest), loss / LARGEST_LOSS));
    return (int) Math.min(Math.ceil(count), 2.0 * MOST_PANELS);
  }

  private void propagators(int m, ComplexMatrix h, double panel, MatrixExponential exponential) {
    ComplexMatrix step = ComplexMatrix.zeros(n, n);
    step.addScaled(2 * Math.PI * panel / (NODES - 1), h);
    step.scale(0, -1);
    ComplexMatrix back = ComplexMatrix.zeros(n, n);
    back.addScaled(-1, step);
    exponential.compute(step, step);
    exponential.compute(back, back);
    forward[m][0] = ComplexMatrix.identity(n);
    backward[m][0] = ComplexMatrix.identity(n);
    for (int a = 1; a < NODES; a++) {
      forward[m][a] = step.times(forward[m][a - 1]);
      backward[m][a] = back.times(backward[m][a - 1]);
    }
    panelPropagator[m] = forward[m][NODES - 1];
  }

  private double[][] runForward() {
    double[][] now = new double[2][n];
    double[] re = new double[system.size()];
    double[] im = new double[system.size()];
    system.begin(re, im);
    double share = idles ? Math.sqrt(0.5) : 1;
    for (int i = 0; i < re.length; i++) {
      now[0][i] = share * re[i];
      now[1][i] = share * im[i];
    }
    if (idles) {
      now[0][n - 1] = share;
    }
    for (int p = 0; p < panels; p++) {
      for (int a = 0; a < NODES; a++) {
        forward[segment[p]][a].multiply(
            now[0], now[1], stateRe[p * NODES + a], stateIm[p * NODES + a]);
      }
      now[0] = stateRe[p * NODES + NODES - 1].clone();
      now[1] = stateIm[p * NODES + NODES - 1].clone();
    }
    return now;
  }

  private void runBackward(double[] etaRe, double[] etaIm) {
    double[] re = etaRe;
    double[] im = Arrays.stream(etaIm).map(x -> -x).toArray();
    for (int p = panels - 1; p >= 0; p--) {
      for (int a = 0; a < NODES; a++) {
        multiplyRow(
            re, im, forward[segment[p]][NODES - 1 - a], rowRe[p * NODES + a], rowIm[p * NODES + a]);
      }
      re = rowRe[p * NODES];
      im = rowIm[p * NODES];
    }
  }

  private void multiplyRow(
      double[] re, double[] im, ComplexMatrix m, double[] outRe, double[] outIm) {
    for (int j = 0; j < n; j++) {
      double sumRe = 0;
      double sumIm = 0;
      for (int i = 0; i < n; i++) {
        sumRe += re[i] * m.re(i, j) - im[i] * m.im(i, j);
        sumIm += re[i] * m.im(i, j) + im[i] * m.re(i, j);
      }
      outRe[j] = sumRe;
      outIm[j] = sumIm;
    }
  }

  /** Wanted vectors, orthonormal; with the idling state included where there is one. */
  private double[][][] wanted() {
    int s = system.size();
    double scale = idles ? Math.sqrt(2) : 1;
    double[][][] out = new double[system.outcomes()][2][n];
    for (int w = 0; w < out.length; w++) {
      double[] re = new double[s];
      double[] im = new double[s];
      system.outcome(w, re, im);
      for (int i = 0; i < s; i++) {
        out[w][0][i] = scale * re[i];
        out[w][1][i] = scale * im[i];
      }
      if (idles) {
        out[w][0][n - 1] = scale * system.idleAmplitude();
      }
    }
    return out;
  }

  /** An orthonormal basis of what is orthogonal to a set of orthonormal vectors. */
  private double[][][] complement(double[][][] wanted) {
    List<double[][]> basis = new ArrayList<>(Arrays.asList(wanted));
    for (int missing = n - wanted.length; missing > 0; missing--) {
      double[][] best = null;
      double bestNorm = 0;
      for (int axis = 0; axis < n; axis++) {
        double[][] v = new double[2][n];
        v[0][axis] = 1;
        // twice is enough (Kahan and Parlett): the second pass removes what rounding left
        removeFrom(v, basis);
        removeFrom(v, basis);
        double norm = Math.sqrt(overlapRe(v[0], v[1], v[0], v[1]));
        if (norm > bestNorm) {
          bestNorm = norm;
          best = v;
        }
      }
      for (int i = 0; i < n; i++) {
        best[0][i] /= bestNorm;
        best[1][i] /= bestNorm;
      }
      basis.add(best);
    }
    return basis.subList(wanted.length, basis.size()).toArray(new double[0][][]);
  }

  private void removeFrom(double[][] v, List<double[][]> basis) {
    for (double[][] b : basis) {
      double re = overlapRe(b[0], b[1], v[0], v[1]);
      double im = overlapIm(b[0], b[1], v[0], v[1]);
      for (int i = 0; i < n; i++) {
        v[0][i] -= re * b[0][i] - im * b[1][i];
        v[1][i] -= re * b[1][i] + im * b[0][i];
      }
    }
  }

  private static double overlapRe(double[] aRe, double[] aIm, double[] bRe, double[] bIm) {
    double sum = 0;
    for (int i = 0; i < aRe.length; i++) {
      sum += aRe[i] * bRe[i] + aIm[i] * bIm[i];
    }
    return sum;
  }

  private static double overlapIm(double[] aRe, double[] aIm, double[] bRe, double[] bIm) {
    double sum = 0;
    for (int i = 0; i < aRe.length; i++) {
      sum += aRe[i] * bIm[i] - aIm[i] * bRe[i];
    }
    return sum;
  }

  /**
   * Mean slope of the error with a constant admixture of an operator: −2πi∫⟨χ|V|b⟩ dt is the first
   * order of ⟨η|ψ⟩, twice its real part the change of the quadratic form.
   */
  double slope(Operator operator) {
    double sum = 0;
    double[] vRe = new double[n];
    double[] vIm = new double[n];
    ComplexMatrix v = null;
    for (int p = 0; p < panels; p++) {
      if (p == 0 || segment[p] != segment[p - 1]) {
        v = matrix(operator, segment[p]);
      }
      for (int a = 0; a < NODES; a++) {
        int node = p * NODES + a;
        v.multiply(stateRe[node], stateIm[node], vRe, vIm);
        for (int i = 0; i < n; i++) {
          sum += length[p] * BOOLE[a] * (rowRe[node][i] * vIm[i] + rowIm[node][i] * vRe[i]);
        }
      }
    }
    return sign * 4 * Math.PI * sum;
  }

  /** The perturbation as seen from the moving state, at every node of every panel. */
  PerturbedPath perturbed(Operator operator) {
    PerturbedPath out = new PerturbedPath(this);
    double[] kickRe = new double[n]; // (V − v)|b⟩
    double[] kickIm = new double[n];
    double[] braRe = new double[n]; // ⟨χ|(V − v)
    double[] braIm = new double[n];
    double[] workRe = new double[n];
    double[] workIm = new double[n];
    double[] endRe = new double[n];
    double[] endIm = new double[n];
    ComplexMatrix toEnd = ComplexMatrix.identity(n); // from the panel's end
    ComplexMatrix v = null;
    double white = 0;
    for (int p = panels - 1; p >= 0; p--) {
      int m = segment[p];
      if (p == panels - 1 || m != segment[p + 1]) {
        v = matrix(operator, m);
      }
      for (int a = 0; a < NODES; a++) {
        int node = p * NODES + a;
        double[] bRe = stateRe[node];
        double[] bIm = stateIm[node];
        v.multiply(bRe, bIm, kickRe, kickIm);
        // a real number added to V turns a phase that no goal sees: take out the part along b
        double mean = overlapRe(bRe, bIm, kickRe, kickIm) / overlapRe(bRe, bIm, bRe, bIm);
        multiplyRow(rowRe[node], rowIm[node], v, braRe, braIm);
        double twice = 0;
        for (int i = 0; i < n; i++) {
          kickRe[i] -= mean * bRe[i];
          kickIm[i] -= mean * bIm[i];
          braRe[i] -= mean * rowRe[node][i];
          braIm[i] -= mean * rowIm[node][i];
          twice += braRe[i] * kickRe[i] - braIm[i] * kickIm[i];
        }
        backward[m][a].multiply(kickRe, kickIm, workRe, workIm);
        out.setColumn(node, workRe, workIm);
        multiplyRow(braRe, braIm, forward[m][a], workRe, workIm);
        out.setBra(node, workRe, workIm);
        forward[m][NODES - 1 - a].multiply(kickRe, kickIm, workRe, workIm);
        toEnd.multiply(workRe, workIm, endRe, endIm);
        white += length[p] * BOOLE[a] * (missed(endRe, endIm) - twice);
      }
      toEnd = toEnd.times(panelPropagator[m]);
    }
    out.finish(sign * 2 * Math.PI * Math.PI * white);
    return out;
  }

  /** Σ |⟨v|ψ⟩|². */
  double missed(double[] re, double[] im) {
    double sum = 0;
    for (int v = 0; v < vectorRe.length; v++) {
      double x = overlapRe(vectorRe[v], vectorIm[v], re, im);
      double y = overlapIm(vectorRe[v], vectorIm[v], re, im);
      sum += x * x + y * y;
    }
    return sum;
  }

  /** Re Σ ⟨a|v⟩⟨v|b⟩. */
  double missedTogether(double[] aRe, double[] aIm, double[] bRe, double[] bIm) {
    double sum = 0;
    for (int v = 0; v < vectorRe.length; v++) {
      sum +=
          overlapRe(vectorRe[v], vectorIm[v], aRe, aIm)
                  * overlapRe(vectorRe[v], vectorIm[v], bRe, bIm)
              + overlapIm(vectorRe[v], vectorIm[v], aRe, aIm)
                  * overlapIm(vectorRe[v], vectorIm[v], bRe, bIm);
    }
    return sum;
  }

  /** Time spent in every labelled state, s: the populations over the panels by Boole's rule. */
  double[] timeInStates() {
    double[] sum = new double[system.labels().size()];
    double[] now = new double[sum.length];
    for (int p = 0; p < panels; p++) {
      for (int a = 0; a < NODES; a++) {
        populations(p, a, now);
        for (int i = 0; i < sum.length; i++) {
          sum[i] += length[p] * BOOLE[a] * now[i];
        }
      }
    }
    return sum;
  }

  /** Populations of every labelled state at the end. */
  double[] finalPopulations() {
    double[] out = new double[system.labels().size()];
    populations(panels - 1, NODES - 1, out);
    return out;
  }

  private void populations(int panel, int node, double[] out) {
    double scale = idles ? Math.sqrt(2) : 1;
    double[] re = new double[system.size()];
    double[] im = new double[system.size()];
    for (int i = 0; i < re.length; i++) {
      re[i] = scale * stateRe[panel * NODES + node][i];
      im[i] = scale * stateIm[panel * NODES + node][i];
    }
    system.populations(segment[panel], re, im, out);
  }
}
