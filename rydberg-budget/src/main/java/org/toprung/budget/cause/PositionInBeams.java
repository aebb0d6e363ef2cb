package org.toprung.budget.cause;

import org.toprung.budget.bench.ThermalMotion;
import org.toprung.core.drive.Drive;

/**
 * Thermal position of the atom, which changes the field of all beams, and with it Rabi frequency
 * and light shifts, in the same shot. The pulse is planned for an atom in the middle of the beams,
 * so that the mean loss of field counts too.
 */
final class PositionInBeams extends Disturbance {
  private final ThermalMotion motion;

  PositionInBeams(ThermalMotion motion) {
    super(
        "Position in the beams",
        "the spread of the position (a quarter of the temperature, or twice the trap frequency)",
        "exact square-pulse response over the thermal position, all beams jointly");
    this.motion = motion;
  }

  @Override
  double error(PulseModel model, double scale) {
    Drive drive = model.drive();
    return NormalAverage.of(
            (x, y, z) -> {
              double rabi = 1;
              double detuning = model.offsetHertz();
              for (int k = 0; k < drive.steps().size(); k++) {
                double field =
                    drive
                        .steps()
                        .get(k)
                        .fieldFactorAt(
                            scale * motion.positionMetres(0) * x,
                            scale * motion.positionMetres(1) * y,
                            scale * motion.positionMetres(2) * z);
                rabi *= field;
                detuning -= (field * field - 1) * model.resonanceShiftHertz(k);
              }
              return model.twoLevelError(rabi, detuning);
            })
        - model.baseline();
  }
}
