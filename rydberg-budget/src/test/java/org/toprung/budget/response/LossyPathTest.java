package org.toprung.budget.response;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.toprung.core.quantity.Frequency.kilohertz;

import java.lang.reflect.Proxy;
import java.util.List;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;
import org.toprung.budget.SchrodingerEquation;
import org.toprung.budget.dynamics.DrivenSystem;
import org.toprung.budget.dynamics.TwoLevelSystem;
import org.toprung.budget.pulse.Pulse;

/** Perturbation of a system that loses atoms, which no longer keeps the norm of its state. */
class LossyPathTest {
  private static final double RABI = 1e6; // Hz
  private static final double OFFSET = 1e5; // Hz
  private static final double LOSS = 1e6; // 1/s, of the target: a quarter is lost in a pulse

  private static DrivenSystem lossy() {
    TwoLevelSystem system =
        TwoLevelSystem.of(Pulse.pi().offsetBy(kilohertz(100)), 1, RABI, new double[1]);
    return (DrivenSystem)
        Proxy.newProxyInstance(
            LossyPathTest.class.getClassLoader(),
            new Class<?>[] {DrivenSystem.class},
            (proxy, method, args) -> {
              Object result = method.invoke(system, args);
              if (method.getName().equals("hamiltonianHertz")) {
                ((double[]) args[2])[3] = -LOSS / (4 * Math.PI);
              }
              return result;
            });
  }

  private static double missed(double tone, double hertz, double phase) {
    SchrodingerEquation.Hamiltonian h =
        (t, re, im) -> {
          re[1] = 0.5 * RABI;
          re[2] = 0.5 * RABI;
          re[3] = -OFFSET - tone * Math.cos(2 * Math.PI * hertz * t + phase);
          im[3] = -LOSS / (4 * Math.PI);
        };
    double[] psi =
        SchrodingerEquation.solve(h, new double[] {0, 0.5 / RABI}, new double[] {1, 0, 0, 0});
    return 1 - psi[1] * psi[1] - psi[3] * psi[3];
  }

  /** Validation: a weak tone of every phase in the equation of motion. */
  @ParameterizedTest
  @ValueSource(doubles = {0, 3e5, 1.9e6})
  void filterIsWhatAWeakToneDoes(double hertz) {
    DrivenSystem system = lossy();
    PulsePath.Operator operator = (m, re, im) -> system.frequencyOperator(0, m, re, im);
    PulsePath path = new PulsePath(system, List.of(operator));
    assertFalse(path.lossless);
    double still = missed(0, 0, 0);
    assertEquals(still, path.error, 1e-9);
    double tone = 5e3;
    double change = 0;
    for (int p = 0; p < 4; p++) {
      change += (missed(tone, hertz, 0.5 * Math.PI * (p + 0.3)) - still) / 4;
    }
    double expected = change / (0.5 * tone * tone) * RABI * RABI;
    double found = path.perturbed(operator).filter(hertz) * RABI * RABI;
    assertEquals(expected, found, 1e-3 * Math.abs(expected) + 1e-5);
  }

  /** Validation: the slope by a difference. */
  @ParameterizedTest
  @ValueSource(doubles = 2e3)
  void slopeIsTheDerivative(double step) {
    DrivenSystem system = lossy();
    PulsePath.Operator operator = (m, re, im) -> system.frequencyOperator(0, m, re, im);
    double slope = new PulsePath(system, List.of(operator)).slope(operator);
    double expected = (missed(step, 0, 0) - missed(-step, 0, 0)) / (2 * step);
    assertEquals(expected * RABI, slope * RABI, 1e-4);
  }
}
