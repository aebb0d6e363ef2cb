package org.toprung.budget.cause;

import org.toprung.budget.bench.Disturbance;

/**
 * Where the atom is in the beams, from its temperature and from the pointing of the beams, which
 * changes the field of all beams, and with it Rabi frequency and light shifts, in the same shot.
 *
 * <p>Length and frequency of the pulse are calibrated with the atom as it is, so that the mean loss
 * of field is part of the plan and only the spread counts: for an atom in the middle of a Gaussian
 * beam of waist w, ε = −Σ(x² − σ²)/w² over both directions across, of variance 4σ⁴/w⁴.
 */
final class PositionInBeams extends Halvable {
  private final BeamFields fields;

  PositionInBeams(BeamFields fields) {
    super(
        "Position in the beams",
        "the spread of the position (a quarter of the temperature, or twice the trap frequency) and"
            + " the pointing jitter",
        "response of the pulse over the whole beam profiles, all beams jointly, mean loss of field"
            + " calibrated out",
        new Disturbance(Disturbance.Kind.POSITION, Disturbance.COMMON));
    this.fields = fields;
  }

  @Override
  double error(PulseModel model, double scale) {
    return model.reaction().over(fields.scaled(scale)) - model.baseline();
  }
}
