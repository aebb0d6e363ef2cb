package org.toprung.budget.dynamics;

import org.toprung.core.linear.Decoupling;

/** Effective Hamiltonians of a plan for one shot after another. One instance per thread. */
final class EffectiveLadder {
  private final LadderPlan plan;
  private final Decoupling work;
  private final double[][] nodeRe;
  private final double[][] nodeIm;
  private final double[] otherRe;
  private final double[] otherIm;

  EffectiveLadder(LadderPlan plan) {
    int square = plan.size() * plan.size();
    this.plan = plan;
    this.work = plan.workspace();
    this.nodeRe = new double[plan.nodes()][square];
    this.nodeIm = new double[plan.nodes()][square];
    this.otherRe = new double[square];
    this.otherIm = new double[square];
  }

  /** Decouples at every node for a shot. */
  void load(ShotSetting shot) {
    for (int j = 0; j < nodeRe.length; j++) {
      plan.decouple(j, shot, work);
      work.effective(nodeRe[j], nodeIm[j]);
      plan.scale(j, nodeRe[j], nodeIm[j]);
    }
  }

  /** The effective Hamiltonian at a sample, Hz, with the phase of the light. */
  void sample(int sample, double[] re, double[] im) {
    plan.combine(sample, nodeRe, nodeIm, re, im);
    plan.turn(sample, re, im);
  }

  /** The effective Hamiltonian of a segment, Hz. */
  void segment(int segment, double[] re, double[] im) {
    Timeline timeline = plan.timeline();
    sample(timeline.first(segment), re, im);
    if (timeline.isConstant(segment)) {
      return;
    }
    sample(timeline.second(segment), otherRe, otherIm);
    double w = timeline.firstWeight(segment);
    for (int e = 0; e < re.length; e++) {
      re[e] = w * re[e] + (1 - w) * otherRe[e];
      im[e] = w * im[e] + (1 - w) * otherIm[e];
    }
  }
}
