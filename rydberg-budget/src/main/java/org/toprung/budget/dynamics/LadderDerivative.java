package org.toprung.budget.dynamics;

import java.util.function.Consumer;
import java.util.function.ObjDoubleConsumer;
import org.toprung.core.linear.Decoupling;

/**
 * A derivative of the effective Hamiltonian at every node of a plan, by central differences of the
 * exact decoupling. Immutable.
 */
final class LadderDerivative {
  private final LadderPlan plan;
  private final double[][] nodeRe;
  private final double[][] nodeIm;

  private LadderDerivative(LadderPlan plan) {
    this.plan = plan;
    this.nodeRe = new double[plan.nodes()][plan.size() * plan.size()];
    this.nodeIm = new double[plan.nodes()][plan.size() * plan.size()];
  }

  /** dH/dν of a laser: Hz per Hz. */
  static LadderDerivative byFrequency(LadderPlan plan, int step) {
    double change = 2e4; // Hz: rounding leaves 1e-11
    return first(plan, change, (shot, x) -> shot.laserOffset[step] = x);
  }

  /** dH/dI of a beam: Hz per unit relative intensity. */
  static LadderDerivative byIntensity(LadderPlan plan, int step) {
    return first(plan, 1e-3, (shot, x) -> shot.fieldFactor[step] = Math.sqrt(1 + x));
  }

  /** d²H/dI_j dI_k, Hz. */
  static LadderDerivative byIntensities(LadderPlan plan, int one, int two) {
    double change = 1e-2;
    LadderDerivative sum = new LadderDerivative(plan);
    double scale = 1 / (change * change);
    if (one == two) {
      ObjDoubleConsumer<ShotSetting> move = (s, x) -> s.fieldFactor[one] = Math.sqrt(1 + x);
      sum.add(scale, s -> move.accept(s, change));
      sum.add(-2 * scale, s -> move.accept(s, 0));
      sum.add(scale, s -> move.accept(s, -change));
      return sum.hermitian();
    }
    for (int a = -1; a <= 1; a += 2) {
      for (int b = -1; b <= 1; b += 2) {
        double x = a * change;
        double y = b * change;
        sum.add(
            0.25 * a * b * scale,
            s -> {
              s.fieldFactor[one] = Math.sqrt(1 + x);
              s.fieldFactor[two] = Math.sqrt(1 + y);
            });
      }
    }
    return sum.hermitian();
  }

  private static LadderDerivative first(
      LadderPlan plan, double change, ObjDoubleConsumer<ShotSetting> move) {
    LadderDerivative sum = new LadderDerivative(plan);
    sum.add(0.5 / change, s -> move.accept(s, change));
    sum.add(-0.5 / change, s -> move.accept(s, -change));
    return sum.hermitian();
  }

  private void add(double factor, Consumer<ShotSetting> change) {
    ShotSetting shot = ShotSetting.nominal(plan.terms().steps());
    change.accept(shot);
    Decoupling work = plan.workspace();
    double[] re = new double[plan.size() * plan.size()];
    double[] im = new double[re.length];
    for (int j = 0; j < nodeRe.length; j++) {
      plan.decouple(j, shot, work);
      work.effective(re, im);
      plan.scale(j, re, im);
      for (int e = 0; e < re.length; e++) {
        nodeRe[j][e] += factor * re[e];
        nodeIm[j][e] += factor * im[e];
      }
    }
  }

  /** Takes rounding off: the nominal ladder has no loss. */
  private LadderDerivative hermitian() {
    int p = plan.size();
    for (int j = 0; j < nodeRe.length; j++) {
      for (int a = 0; a < p; a++) {
        for (int b = 0; b <= a; b++) {
          double re = 0.5 * (nodeRe[j][a * p + b] + nodeRe[j][b * p + a]);
          double im = 0.5 * (nodeIm[j][a * p + b] - nodeIm[j][b * p + a]);
          nodeRe[j][a * p + b] = re;
          nodeRe[j][b * p + a] = re;
          nodeIm[j][a * p + b] = im;
          nodeIm[j][b * p + a] = -im;
        }
      }
    }
    return this;
  }

  void sample(int sample, double[] re, double[] im) {
    plan.combine(sample, nodeRe, nodeIm, re, im);
    plan.turn(sample, re, im);
  }

  void segment(int segment, double[] re, double[] im) {
    Timeline timeline = plan.timeline();
    sample(timeline.first(segment), re, im);
    if (timeline.isConstant(segment)) {
      return;
    }
    double[] otherRe = new double[re.length];
    double[] otherIm = new double[re.length];
    sample(timeline.second(segment), otherRe, otherIm);
    double w = timeline.firstWeight(segment);
    for (int e = 0; e < re.length; e++) {
      re[e] = w * re[e] + (1 - w) * otherRe[e];
      im[e] = w * im[e] + (1 - w) * otherIm[e];
    }
  }
}
