package org.toprung.budget.dynamics;

import java.util.Arrays;
import java.util.List;

/**
 * A pulse as a sequence of constant Hamiltonians on the states that take part in it.
 *
 * <p>The state ψ obeys i dψ/dt = 2π (H/h) ψ with H/h in Hz, written row by row into caller-owned
 * arrays of length size²: real parts, imaginary parts. Every method overwrites the whole array. H
 * may be non-Hermitian: a loss of rate Γ (1/s) is −iΓ/4π on the diagonal. The frame is one for the
 * whole pulse, so that the phase of the amplitudes at the end means something: against an atom that
 * idles in the start without light, whose phase stands still.
 *
 * <p>Success is the same quadratic form for every goal, Σ<sub>w</sub> |c + ⟨w|ψ⟩|²:
 *
 * <ul>
 *   <li>transfer: the wanted states, orthonormal, c = 0;
 *   <li>rotation and coherence: the one state the ideal pulse makes, c = 0;
 *   <li>return: ¼ |1 + e<sup>−iφ0</sup> ⟨s|ψ⟩|² for an atom that is half in an idling state, so c =
 *       ½ and the one vector ½ e<sup>iφ0</sup> |s⟩ of norm ½.
 * </ul>
 *
 * <p>Implementations are immutable and thread-safe.
 */
public interface DrivenSystem {

  /**
   * Number of states.
   *
   * @return dimension of the state vector
   */
  int size();

  /**
   * Number of lasers.
   *
   * @return steps of the ladder
   */
  int steps();

  /**
   * Number of segments.
   *
   * @return intervals of constant Hamiltonian
   */
  int segments();

  /**
   * Length of a segment.
   *
   * @param segment index from 0
   * @return its duration, s
   */
  double segmentSeconds(int segment);

  /**
   * The Hamiltonian of a segment over h: averaged over the segment, so that its exponential is the
   * propagator.
   *
   * @param segment index from 0
   * @param re receives the real parts, Hz
   * @param im receives the imaginary parts, Hz
   */
  void hamiltonianHertz(int segment, double[] re, double[] im);

  /**
   * Derivative of the Hamiltonian by the frequency of a laser: −1 on the states above its step
   * where nothing is dressed. Hermitian.
   *
   * @param step index of the laser from 0
   * @param segment index from 0
   * @param re receives the real parts, Hz per Hz
   * @param im receives the imaginary parts, Hz per Hz
   */
  void frequencyOperator(int step, int segment, double[] re, double[] im);

  /**
   * Derivative of the Hamiltonian by the relative intensity of a beam, at the nominal intensity:
   * half the coupling, and the light shift. Hermitian.
   *
   * @param step index of the beam from 0
   * @param segment index from 0
   * @param re receives the real parts, Hz per unit relative intensity
   * @param im receives the imaginary parts, Hz per unit relative intensity
   */
  void intensityOperator(int step, int segment, double[] re, double[] im);

  /**
   * Second derivative of the Hamiltonian by the relative intensities of two beams, at the nominal
   * intensities. A coupling Ω√(I<sub>j</sub>I<sub>k</sub>) has −¼ Ω for j = k, +¼ Ω otherwise. It
   * matters only where the noise-free pulse is not at its best amplitude. Hermitian.
   *
   * @param step index of a beam from 0
   * @param otherStep index of a beam from 0
   * @param segment index from 0
   * @param re receives the real parts, Hz
   * @param im receives the imaginary parts, Hz
   */
  default void intensityCurvature(int step, int otherStep, int segment, double[] re, double[] im) {
    Arrays.fill(re, 0, size() * size(), 0);
    Arrays.fill(im, 0, size() * size(), 0);
  }

  /**
   * The state at the beginning of the pulse, normalized.
   *
   * @param re receives the real parts
   * @param im receives the imaginary parts
   */
  void begin(double[] re, double[] im);

  /**
   * Number of vectors that success is measured with.
   *
   * @return at least 1; exactly 1 where {@link #idleAmplitude()} is not 0
   */
  int outcomes();

  /**
   * One of the vectors w that success is measured with.
   *
   * @param outcome index from 0
   * @param re receives the real parts
   * @param im receives the imaginary parts
   */
  void outcome(int outcome, double[] re, double[] im);

  /**
   * The constant c beside the projection.
   *
   * @return ½ for a pulse that returns to the start against an idling state, otherwise 0
   */
  double idleAmplitude();

  /**
   * Error of a final state by the goal of the pulse.
   *
   * @param re real parts of the state at the end
   * @param im imaginary parts of the state at the end
   * @return 1 − Σ |c + ⟨w|ψ⟩|²
   */
  default double error(double[] re, double[] im) {
    int n = size();
    double[] wRe = new double[n];
    double[] wIm = new double[n];
    double success = 0;
    for (int w = 0; w < outcomes(); w++) {
      outcome(w, wRe, wIm);
      double real = idleAmplitude();
      double imaginary = 0;
      for (int i = 0; i < n; i++) {
        real += wRe[i] * re[i] + wIm[i] * im[i];
        imaginary += wRe[i] * im[i] - wIm[i] * re[i];
      }
      success += real * real + imaginary * imaginary;
    }
    return 1 - success;
  }

  /**
   * Names of all atomic states, the ones that are not part of the state vector too.
   *
   * @return the labels, in the order of {@link #populations}
   */
  List<String> labels();

  /**
   * Whether the ideal pulse puts the atom there: the start and the wanted states, and the
   * intermediate state of a ladder on its resonance. What is found elsewhere at the end has leaked.
   *
   * @param label index into {@link #labels()}
   * @return true where the state belongs to the pulse
   */
  boolean takesPart(int label);

  /**
   * Populations of all atomic states.
   *
   * @param segment index of the segment that the state is in
   * @param re real parts of the state
   * @param im imaginary parts of the state
   * @param out receives a population for every label
   */
  void populations(int segment, double[] re, double[] im, double[] out);
}
