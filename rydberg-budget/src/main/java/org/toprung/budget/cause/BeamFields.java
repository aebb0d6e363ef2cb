package org.toprung.budget.cause;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.function.ToDoubleFunction;
import org.toprung.budget.bench.Bench;
import org.toprung.budget.bench.BenchValue;
import org.toprung.budget.bench.ThermalMotion;
import org.toprung.core.drive.Drive;

/**
 * The field of each beam at an atom that is not quite where it should be, because it is warm and
 * because beams move: the whole Gaussian profile, since an atom in the middle of a beam sees no
 * change of first order.
 *
 * <p>The position is a normal variable in each direction of the lab, common to all beams; pointing
 * jitter is one in each of the two directions across a beam, of that beam alone.
 *
 * <p>Immutable and thread-safe.
 */
final class BeamFields {
  private final Drive drive;
  private final List<Push> pushes;
  private final Points points; // field factors
  private final double[] meanSquare;
  private final double meanProduct;

  /** What one normal variable moves: the atom, or one beam. */
  private record Push(int step, double x, double y, double z) {
    static final int ATOM = -1;

    Push scaled(double factor) {
      return new Push(step, factor * x, factor * y, factor * z);
    }

    boolean moves(int beam) {
      return step == ATOM || step == beam;
    }
  }

  private BeamFields(Drive drive, List<Push> pushes) {
    this.drive = drive;
    this.pushes = pushes;
    this.points = Points.of(pushes.size(), this::fields);
    this.meanSquare = new double[drive.steps().size()];
    for (int k = 0; k < meanSquare.length; k++) {
      int step = k;
      meanSquare[k] = average(f -> f[step] * f[step]);
    }
    this.meanProduct = average(BeamFields::product);
  }

  static BeamFields of(Drive drive, Bench bench) {
    List<Push> pushes = new ArrayList<>();
    Optional<ThermalMotion> motion = motion(drive, bench);
    if (motion.isPresent() && motion.get().isTrapped()) {
      pushes.add(new Push(Push.ATOM, motion.get().positionMetres(0), 0, 0));
      pushes.add(new Push(Push.ATOM, 0, motion.get().positionMetres(1), 0));
      pushes.add(new Push(Push.ATOM, 0, 0, motion.get().positionMetres(2)));
    }
    for (int k = 0; k < drive.steps().size(); k++) {
      double rms = bench.value(BenchValue.POINTING, k).orElse(0);
      if (rms > 0) {
        for (double[] axis : across(drive.steps().get(k).beam().direction())) {
          pushes.add(new Push(k, rms * axis[0], rms * axis[1], rms * axis[2]));
        }
      }
    }
    return new BeamFields(drive, List.copyOf(pushes));
  }

  /** Whether nothing moves differently. */
  boolean sameAs(BeamFields other) {
    return pushes.equals(other.pushes);
  }

  /** The same with all displacements multiplied. */
  BeamFields scaled(double factor) {
    if (factor == 1) {
      return this;
    }
    return new BeamFields(drive, pushes.stream().map(p -> p.scaled(factor)).toList());
  }

  static Optional<ThermalMotion> motion(Drive drive, Bench bench) {
    return bench
        .temperature()
        .map(t -> ThermalMotion.of(drive.species().massKilograms(), t, bench.trapFrequencies()));
  }

  /** Two unit vectors across a direction. */
  private static List<double[]> across(double[] direction) {
    int least = 0;
    for (int a = 1; a < 3; a++) {
      if (Math.abs(direction[a]) < Math.abs(direction[least])) {
        least = a;
      }
    }
    double[] axis = new double[3];
    axis[least] = 1;
    double[] first = unit(cross(direction, axis));
    return List.of(first, unit(cross(direction, first)));
  }

  private static double[] cross(double[] a, double[] b) {
    return new double[] {
      a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]
    };
  }

  private static double[] unit(double[] v) {
    double length = Math.sqrt(v[0] * v[0] + v[1] * v[1] + v[2] * v[2]);
    return new double[] {v[0] / length, v[1] / length, v[2] / length};
  }

  private double[] fields(double[] normal) {
    double[] fields = new double[drive.steps().size()];
    for (int k = 0; k < fields.length; k++) {
      double x = 0;
      double y = 0;
      double z = 0;
      for (int j = 0; j < normal.length; j++) {
        Push push = pushes.get(j);
        if (push.moves(k)) {
          x += push.x() * normal[j];
          y += push.y() * normal[j];
          z += push.z() * normal[j];
        }
      }
      fields[k] = drive.steps().get(k).fieldFactorAt(x, y, z);
    }
    return fields;
  }

  /**
   * Mean of a function of the field factors of all beams over their nominal fields; it must not
   * change or keep the array it is given.
   */
  double average(ToDoubleFunction<double[]> f) {
    return points.average(f);
  }

  static double product(double[] fields) {
    double product = 1;
    for (double field : fields) {
      product *= field;
    }
    return product;
  }

  /** Mean intensity of a beam over its nominal intensity. */
  double meanIntensity(int step) {
    return meanSquare[step];
  }

  /** Mean of the product of all field factors, which the mean Rabi frequency follows. */
  double meanProduct() {
    return meanProduct;
  }
}
