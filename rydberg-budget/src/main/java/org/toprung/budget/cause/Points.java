package org.toprung.budget.cause;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.function.Function;
import java.util.function.ToDoubleFunction;

/**
 * What a disturbance does at the points of a quadrature, points that do the same taken together:
 * most disturbances are even in several directions, so that few different ones are left.
 *
 * <p>Immutable and thread-safe.
 */
final class Points {
  private static final double SAME = 1e-11; // relative to the largest value

  private final double[][] values;
  private final double[] weights;

  private Points(double[][] values, double[] weights) {
    this.values = values;
    this.weights = weights;
  }

  /** What a function of several normal variables makes of them. */
  static Points of(int dimensions, Function<double[], double[]> effect) {
    List<double[]> all = new ArrayList<>();
    List<Double> weight = new ArrayList<>();
    NormalAverage.ofDimensions(dimensions)
        .forEach(
            (x, w) -> {
              all.add(effect.apply(x));
              weight.add(w);
            });
    return merged(all, weight);
  }

  /** Values with their weights. */
  static Points merged(List<double[]> all, List<Double> weight) {
    double largest = 0;
    for (double[] value : all) {
      for (double v : value) {
        largest = Math.max(largest, Math.abs(v));
      }
    }
    double grain = largest > 0 ? largest * SAME : 1;
    Map<List<Long>, Integer> known = new HashMap<>();
    List<double[]> values = new ArrayList<>();
    double[] weights = new double[all.size()];
    for (int i = 0; i < all.size(); i++) {
      List<Long> key = Arrays.stream(all.get(i)).mapToObj(v -> Math.round(v / grain)).toList();
      int index = known.computeIfAbsent(key, k -> known.size());
      if (index == values.size()) {
        values.add(all.get(i));
      }
      weights[index] += weight.get(i);
    }
    return new Points(values.toArray(double[][]::new), Arrays.copyOf(weights, values.size()));
  }

  /** Mean of a function of the values; it must not change or keep the array it is given. */
  double average(ToDoubleFunction<double[]> f) {
    double sum = 0;
    for (int i = 0; i < values.length; i++) {
      sum += weights[i] * f.applyAsDouble(values[i]);
    }
    return sum;
  }
}
