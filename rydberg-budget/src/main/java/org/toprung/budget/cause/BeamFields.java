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
 * <p>What counts is where the atom is across each beam, and along it where the beam is short. These
 * are fewer numbers than there are pushes, and correlated ones: they are written as a Cholesky
 * factor of their covariance times independent normal variables, few enough for a fine rule.
 *
 * <p>Immutable and thread-safe.
 */
final class BeamFields {
  private static final double FAR = 6; // standard deviations
  private static final double FELT = 1e-4; // of the field
  private static final double NOTHING = 1e-12; // of the largest variance

  private final Drive drive;
  private final List<Push> pushes;
  private final List<Axis> axes;
  private final double[][] factor; // by axis and normal variable, m
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

  /** A direction in which the place of the atom relative to a beam matters. */
  private record Axis(int beam, double[] unit) {
    double along(Push push) {
      return push.moves(beam) ? push.x() * unit[0] + push.y() * unit[1] + push.z() * unit[2] : 0;
    }
  }

  private BeamFields(Drive drive, List<Push> pushes) {
    this.drive = drive;
    this.pushes = pushes;
    this.axes = axes();
    double[][] covariance = new double[axes.size()][axes.size()];
    for (int i = 0; i < covariance.length; i++) {
      for (int j = 0; j < covariance.length; j++) {
        for (Push push : pushes) {
          covariance[i][j] += axes.get(i).along(push) * axes.get(j).along(push);
        }
      }
    }
    this.factor = cholesky(covariance);
    this.points = Points.of(factor.length == 0 ? 0 : factor[0].length, this::fields);
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
        for (double[] axis : drive.steps().get(k).beam().across()) {
          pushes.add(new Push(k, rms * axis[0], rms * axis[1], rms * axis[2]));
        }
      }
    }
    return new BeamFields(drive, List.copyOf(pushes));
  }

  private List<Axis> axes() {
    List<Axis> found = new ArrayList<>();
    for (int k = 0; k < drive.steps().size(); k++) {
      double[] direction = drive.steps().get(k).beam().direction();
      for (double[] unit : drive.steps().get(k).beam().across()) {
        found.add(new Axis(k, unit));
      }
      Axis along = new Axis(k, direction);
      double variance = 0;
      for (Push push : pushes) {
        variance += along.along(push) * along.along(push);
      }
      if (isFelt(k, direction, FAR * Math.sqrt(variance))) {
        found.add(along);
      }
    }
    return List.copyOf(found);
  }

  private boolean isFelt(int step, double[] unit, double metres) {
    double largest = 0;
    for (double d : new double[] {-metres, metres}) {
      double field = drive.steps().get(step).fieldFactorAt(d * unit[0], d * unit[1], d * unit[2]);
      largest = Math.max(largest, Math.abs(field - 1));
    }
    return largest > FELT;
  }

  /**
   * A factor L with L·Lᵀ the covariance, of as many columns as its rank: Cholesky with complete
   * pivoting (Higham, Accuracy and Stability of Numerical Algorithms, section 10.3).
   */
  private static double[][] cholesky(double[][] covariance) {
    int n = covariance.length;
    double[][] rest = new double[n][];
    double largest = 0;
    for (int i = 0; i < n; i++) {
      rest[i] = covariance[i].clone();
      largest = Math.max(largest, rest[i][i]);
    }
    List<double[]> columns = new ArrayList<>();
    while (columns.size() < n) {
      int pivot = 0;
      for (int i = 1; i < n; i++) {
        pivot = rest[i][i] > rest[pivot][pivot] ? i : pivot;
      }
      if (!(rest[pivot][pivot] > NOTHING * largest)) {
        break;
      }
      double root = Math.sqrt(rest[pivot][pivot]);
      double[] column = new double[n];
      for (int i = 0; i < n; i++) {
        column[i] = rest[i][pivot] / root;
      }
      for (int i = 0; i < n; i++) {
        for (int j = 0; j < n; j++) {
          rest[i][j] -= column[i] * column[j];
        }
      }
      columns.add(column);
    }
    double[][] factor = new double[n][columns.size()];
    for (int i = 0; i < n; i++) {
      for (int j = 0; j < columns.size(); j++) {
        factor[i][j] = columns.get(j)[i];
      }
    }
    return factor;
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

  private double[] fields(double[] normal) {
    int beams = drive.steps().size();
    double[][] at = new double[beams][3];
    for (int i = 0; i < axes.size(); i++) {
      double metres = 0;
      for (int j = 0; j < normal.length; j++) {
        metres += factor[i][j] * normal[j];
      }
      Axis axis = axes.get(i);
      for (int a = 0; a < 3; a++) {
        at[axis.beam()][a] += metres * axis.unit()[a];
      }
    }
    double[] fields = new double[beams];
    for (int k = 0; k < beams; k++) {
      fields[k] = drive.steps().get(k).fieldFactorAt(at[k][0], at[k][1], at[k][2]);
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
