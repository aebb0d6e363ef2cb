package org.toprung.budget.dynamics;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import org.toprung.core.drive.Ladder;
import org.toprung.core.linear.Decoupling;

/**
 * The settings at which a ladder is decoupled for a timeline, and how the effective Hamiltonian of
 * every sample of the timeline follows from them.
 *
 * <p>Constant samples are decoupled one by one. Along what changes smoothly the effective
 * Hamiltonian is interpolated on a grid of Chebyshev nodes: in the squared field of each beam (or
 * of the beams that change alike), and in the frequency of the last laser unless it is a function
 * of the field. An element between rungs r &lt; r' is the product of the fields a<sub>k</sub> of
 * the steps between them times an analytic function of all a<sub>k</sub>² (turning the sign of a
 * field turns the sign of everything above that step), and that function is what is interpolated.
 * The grid grows until it agrees with samples decoupled directly; where it would have more nodes
 * than there are samples, or nothing is decoupled, every sample is its own node.
 *
 * <p>Immutable and thread-safe.
 */
final class LadderPlan {
  private static final int FEWEST_NODES = 3;
  private static final int MOST_NODES = 14;
  private static final int TESTS = 7;
  private static final double ROUNDING = 2e-15; // of the largest energy
  private static final double SAME_HERTZ = 1e-5;

  private final CalibratedProgram calibrated;
  private final LadderTerms terms;
  private final int[] active;
  private final Timeline timeline;
  private Decoupling.Anchor base;

  // nodes
  private final List<double[]> nodeFields = new ArrayList<>();
  private final List<Double> nodeOffset = new ArrayList<>();
  private final List<Boolean> nodeScaled = new ArrayList<>();
  private Decoupling.Anchor[] anchors;

  // per sample: the nodes and their weights
  private final int[] firstNode;
  private final double[][] weights;

  private LadderPlan(CalibratedProgram calibrated, Ladder ladder, int[] active, Timeline timeline) {
    this.calibrated = calibrated;
    this.terms = new LadderTerms(ladder);
    this.active = active;
    this.timeline = timeline;
    this.firstNode = new int[timeline.samples().size()];
    this.weights = new double[timeline.samples().size()][];
  }

  /**
   * Plans the decoupling.
   *
   * @param calibrated the program
   * @param ladder the ladder, which may differ from the one that the program was calibrated on
   * @param active indices of the active states
   * @param timeline the program cut into segments
   * @param accuracyHertz how well the effective Hamiltonian has to be known, Hz
   * @return the plan
   */
  static LadderPlan of(
      CalibratedProgram calibrated,
      Ladder ladder,
      int[] active,
      Timeline timeline,
      double accuracyHertz) {
    LadderPlan plan = new LadderPlan(calibrated, ladder, active, timeline);
    Decoupling work = plan.terms.decoupling(active);
    ShotSetting nominal = ShotSetting.nominal(plan.terms.steps());
    double[] ones = new double[plan.terms.steps()];
    Arrays.fill(ones, 1);
    plan.terms.fill(ones, calibrated.fullPowerOffsetHertz(), nominal, work);
    plan.base = work.anchor();
    plan.addConstants();
    plan.addSmooth(work, accuracyHertz);
    plan.anchors = new Decoupling.Anchor[plan.nodeFields.size()];
    for (int j = 0; j < plan.anchors.length; j++) {
      plan.terms.fill(plan.nodeFields.get(j), plan.nodeOffset.get(j), nominal, work);
      plan.anchors[j] = work.anchor(plan.base);
    }
    return plan;
  }

  private void addNode(double[] fields, double lastOffset, boolean scaled) {
    nodeFields.add(fields);
    nodeOffset.add(lastOffset);
    nodeScaled.add(scaled);
  }

  private void addConstants() {
    for (int s = 0; s < weights.length; s++) {
      Timeline.Sample sample = timeline.samples().get(s);
      if (sample.isConstant()) {
        addOwnNode(s, sample);
      }
    }
  }

  private void addOwnNode(int s, Timeline.Sample sample) {
    firstNode[s] = nodeFields.size();
    weights[s] = new double[] {1};
    addNode(sample.fields(), sample.lastOffset(), false);
  }

  private void addSmooth(Decoupling work, double accuracyHertz) {
    List<Integer> smooth = new ArrayList<>();
    for (int s = 0; s < weights.length; s++) {
      if (!timeline.samples().get(s).isConstant()) {
        smooth.add(s);
      }
    }
    if (smooth.isEmpty()) {
      return;
    }
    int before = nodeFields.size();
    for (int nodes = FEWEST_NODES; nodes <= MOST_NODES && active.length < terms.size(); nodes++) {
      Grid grid = new Grid(smooth, nodes);
      if (grid.size() >= smooth.size()) {
        break;
      }
      nodeFields.subList(before, nodeFields.size()).clear();
      nodeOffset.subList(before, nodeOffset.size()).clear();
      nodeScaled.subList(before, nodeScaled.size()).clear();
      grid.addNodes();
      for (int s : smooth) {
        firstNode[s] = before;
        weights[s] = grid.weights(timeline.samples().get(s));
      }
      if (isAccurateWhereSeparable(work, smooth, before, accuracyHertz)) {
        return;
      }
    }
    nodeFields.subList(before, nodeFields.size()).clear();
    nodeOffset.subList(before, nodeOffset.size()).clear();
    nodeScaled.subList(before, nodeScaled.size()).clear();
    for (int s : smooth) {
      addOwnNode(s, timeline.samples().get(s));
    }
  }

  /** A node of the grid may lie off the program, where the states cannot be told apart. */
  private boolean isAccurateWhereSeparable(
      Decoupling work, List<Integer> smooth, int before, double accuracyHertz) {
    try {
      return isAccurate(work, smooth, before, accuracyHertz);
    } catch (ArithmeticException notSeparable) {
      return false;
    }
  }

  private boolean isAccurate(
      Decoupling work, List<Integer> smooth, int before, double accuracyHertz) {
    int p = active.length;
    ShotSetting nominal = ShotSetting.nominal(terms.steps());
    int nodes = nodeFields.size() - before;
    double[][] re = new double[nodes][p * p];
    double[][] im = new double[nodes][p * p];
    for (int j = 0; j < nodes; j++) {
      terms.fill(nodeFields.get(before + j), nodeOffset.get(before + j), nominal, work);
      work.decouple(base);
      work.effective(re[j], im[j]);
      scale(before + j, re[j], im[j]);
    }
    double[] directRe = new double[p * p];
    double[] directIm = new double[p * p];
    double[] sumRe = new double[p * p];
    double[] sumIm = new double[p * p];
    for (int test = 0; test < TESTS; test++) {
      int s = smooth.get((int) ((test + 0.5) * smooth.size() / TESTS));
      Timeline.Sample sample = timeline.samples().get(s);
      terms.fill(sample.fields(), sample.lastOffset(), nominal, work);
      work.decouple(base);
      work.effective(directRe, directIm);
      combine(s, re, im, -before, sumRe, sumIm);
      double difference = 0;
      for (int e = 0; e < p * p; e++) {
        difference =
            Math.max(
                difference, Math.abs(sumRe[e] - directRe[e]) + Math.abs(sumIm[e] - directIm[e]));
      }
      if (!(difference <= Math.max(accuracyHertz, ROUNDING * terms.largestHertz()))) {
        return false;
      }
    }
    return true;
  }

  /** Divides the elements at a node of the grid by the fields of the steps that they span. */
  void scale(int node, double[] re, double[] im) {
    if (nodeScaled.get(node)) {
      multiply(nodeFields.get(node), true, re, im);
    }
  }

  private void multiply(double[] fields, boolean divide, double[] re, double[] im) {
    int p = active.length;
    for (int i = 0; i < p; i++) {
      for (int j = 0; j < p; j++) {
        int low = Math.min(terms.rung(active[i]), terms.rung(active[j]));
        int high = Math.max(terms.rung(active[i]), terms.rung(active[j]));
        double factor = 1;
        for (int k = low; k < high; k++) {
          // a beam that is off all the time has nothing to divide
          factor *= divide && fields[k] == 0 ? 1 : fields[k];
        }
        factor = divide ? 1 / factor : factor;
        re[i * p + j] *= factor;
        im[i * p + j] *= factor;
      }
    }
  }

  /**
   * A quantity at a sample from its values at the nodes, which have been {@link #scale}d. Without
   * the phase of the light.
   */
  void combine(int sample, double[][] re, double[][] im, double[] outRe, double[] outIm) {
    combine(sample, re, im, 0, outRe, outIm);
  }

  private void combine(
      int sample, double[][] re, double[][] im, int shift, double[] outRe, double[] outIm) {
    int from = firstNode[sample] + shift;
    double[] w = weights[sample];
    if (!nodeScaled.get(firstNode[sample])) {
      System.arraycopy(re[from], 0, outRe, 0, outRe.length);
      System.arraycopy(im[from], 0, outIm, 0, outIm.length);
      return;
    }
    Arrays.fill(outRe, 0);
    Arrays.fill(outIm, 0);
    for (int j = 0; j < w.length; j++) {
      double weight = w[j];
      double[] nodeRe = re[from + j];
      double[] nodeIm = im[from + j];
      for (int e = 0; e < outRe.length; e++) {
        outRe[e] += weight * nodeRe[e];
        outIm[e] += weight * nodeIm[e];
      }
    }
    multiply(timeline.samples().get(sample).fields(), false, outRe, outIm);
  }

  /** Gives the couplings to the last rung the phase of the light: e^(−iφ) upwards. */
  void turn(int sample, double[] re, double[] im) {
    double phase = timeline.samples().get(sample).phase();
    if (phase == 0) {
      return;
    }
    double cos = Math.cos(phase);
    double sin = -Math.sin(phase);
    int p = active.length;
    for (int i = 0; i < p; i++) {
      for (int j = 0; j < p; j++) {
        boolean up = isTop(i) && !isTop(j);
        if (up || !isTop(i) && isTop(j)) {
          double s = up ? sin : -sin;
          double r = re[i * p + j];
          re[i * p + j] = r * cos - im[i * p + j] * s;
          im[i * p + j] = r * s + im[i * p + j] * cos;
        }
      }
    }
  }

  /** Takes the phase of the light out of a state. */
  void turnBack(int sample, double[] re, double[] im) {
    double phase = timeline.samples().get(sample).phase();
    double cos = Math.cos(phase);
    double sin = Math.sin(phase);
    for (int i = 0; i < active.length; i++) {
      if (isTop(i)) {
        double r = re[i];
        re[i] = r * cos - im[i] * sin;
        im[i] = r * sin + im[i] * cos;
      }
    }
  }

  boolean isTop(int activeState) {
    return terms.rung(active[activeState]) == terms.steps();
  }

  int size() {
    return active.length;
  }

  int[] active() {
    return active;
  }

  LadderTerms terms() {
    return terms;
  }

  Timeline timeline() {
    return timeline;
  }

  int nodes() {
    return anchors.length;
  }

  Decoupling workspace() {
    return terms.decoupling(active);
  }

  /** Solves a node for a shot. */
  void decouple(int node, ShotSetting shot, Decoupling work) {
    terms.fill(nodeFields.get(node), nodeOffset.get(node), shot, work);
    work.decouple(anchors[node]);
  }

  /** Solves a sample itself, without interpolation, at nominal setting. */
  void decoupleSample(int sample, Decoupling work) {
    Timeline.Sample s = timeline.samples().get(sample);
    terms.fill(s.fields(), s.lastOffset(), ShotSetting.nominal(terms.steps()), work);
    work.decouple(base);
  }

  /** Tensor grid over what changes. */
  private final class Grid {
    private final List<int[]> groups = new ArrayList<>(); // steps whose fields change alike
    private final List<double[]> axes = new ArrayList<>(); // nodes: squared fields, then Hz
    private final double[] fixed; // fields of the other beams
    private final double detuning; // Hz above the calibrated resonance, where it follows the field
    private final boolean ownFrequency; // the frequency is an axis
    private final boolean follows;
    private final double constantOffset;

    Grid(List<Integer> smooth, int nodes) {
      Timeline.Sample one = timeline.samples().get(smooth.get(0));
      int steps = terms.steps();
      this.fixed = one.fields().clone();
      boolean[] seen = new boolean[steps];
      for (int k = 0; k < steps; k++) {
        int step = k;
        boolean changes =
            smooth.stream()
                .anyMatch(s -> timeline.samples().get(s).fields()[step] != one.fields()[step]);
        if (!changes || seen[k]) {
          continue;
        }
        List<Integer> group = new ArrayList<>(List.of(k));
        for (int other = k + 1; other < steps; other++) {
          int second = other;
          boolean alike =
              smooth.stream()
                  .map(s -> timeline.samples().get(s).fields())
                  .allMatch(f -> f[step] == f[second]);
          if (alike) {
            group.add(other);
            seen[other] = true;
          }
        }
        groups.add(group.stream().mapToInt(Integer::intValue).toArray());
        double low = Double.POSITIVE_INFINITY;
        double high = 0;
        for (int s : smooth) {
          double f = timeline.samples().get(s).fields()[k];
          low = Math.min(low, f * f);
          high = Math.max(high, f * f);
        }
        axes.add(chebyshev(low, high, nodes));
      }
      double least = Double.POSITIVE_INFINITY;
      double most = Double.NEGATIVE_INFINITY;
      double leastDetuning = Double.POSITIVE_INFINITY;
      double mostDetuning = Double.NEGATIVE_INFINITY;
      for (int s : smooth) {
        Timeline.Sample sample = timeline.samples().get(s);
        double own = sample.lastOffset() - resonance(sample.fields());
        least = Math.min(least, sample.lastOffset());
        most = Math.max(most, sample.lastOffset());
        leastDetuning = Math.min(leastDetuning, own);
        mostDetuning = Math.max(mostDetuning, own);
      }
      boolean constant = most - least < SAME_HERTZ;
      this.follows = !constant && mostDetuning - leastDetuning < SAME_HERTZ;
      this.ownFrequency = !constant && !follows;
      this.detuning = 0.5 * (leastDetuning + mostDetuning);
      this.constantOffset = 0.5 * (least + most);
      if (ownFrequency) {
        axes.add(chebyshev(least, most, nodes / 2 + 2));
      }
    }

    private double resonance(double[] fields) {
      return calibrated.resonanceHertz(fields);
    }

    private double[] chebyshev(double low, double high, int nodes) {
      double[] axis = new double[nodes];
      for (int j = 0; j < nodes; j++) {
        double c = Math.cos(Math.PI * (2 * j + 1) / (2.0 * nodes));
        axis[j] = 0.5 * (low + high) + 0.5 * (high - low) * c;
      }
      return axis;
    }

    int size() {
      int product = 1;
      for (double[] axis : axes) {
        product *= axis.length;
      }
      return product;
    }

    void addNodes() {
      int[] index = new int[axes.size()];
      for (int node = 0; node < size(); node++) {
        int rest = node;
        for (int a = 0; a < index.length; a++) {
          index[a] = rest % axes.get(a).length;
          rest /= axes.get(a).length;
        }
        double[] fields = fixed.clone();
        for (int g = 0; g < groups.size(); g++) {
          for (int k : groups.get(g)) {
            fields[k] = Math.sqrt(axes.get(g)[index[g]]);
          }
        }
        double offset = constantOffset;
        if (ownFrequency) {
          offset = axes.get(axes.size() - 1)[index[axes.size() - 1]];
        } else if (follows) {
          offset = resonance(fields) + detuning;
        }
        addNode(fields, offset, true);
      }
    }

    double[] weights(Timeline.Sample sample) {
      double[] product = {1};
      for (int a = 0; a < axes.size(); a++) {
        double at =
            a < groups.size()
                ? sample.fields()[groups.get(a)[0]] * sample.fields()[groups.get(a)[0]]
                : sample.lastOffset();
        double[] own = barycentric(axes.get(a), at);
        double[] next = new double[product.length * own.length];
        for (int j = 0; j < own.length; j++) {
          for (int i = 0; i < product.length; i++) {
            next[j * product.length + i] = own[j] * product[i];
          }
        }
        product = next;
      }
      return product;
    }

    private double[] barycentric(double[] axis, double at) {
      int n = axis.length;
      double[] w = new double[n];
      double sum = 0;
      for (int j = 0; j < n; j++) {
        double distance = at - axis[j];
        if (distance == 0) {
          Arrays.fill(w, 0);
          w[j] = 1;
          return w;
        }
        w[j] = (j % 2 == 0 ? 1 : -1) * Math.sin(Math.PI * (2 * j + 1) / (2.0 * n)) / distance;
        sum += w[j];
      }
      for (int j = 0; j < n; j++) {
        w[j] /= sum;
      }
      return w;
    }
  }
}
