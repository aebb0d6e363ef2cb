package org.toprung.budget.bench;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.regex.Pattern;

/**
 * A one-sided power spectral density of noise, tabulated: frequencies in Hz, and per Hz the square
 * of what fluctuates, Hz²/Hz for the frequency of a laser and 1/Hz for relative intensity.
 *
 * <p>Between two entries it is a power law, a straight line on logarithmic axes (a straight line on
 * linear axes where an entry is zero); outside the table it is zero.
 *
 * <p>Immutable and thread-safe.
 */
public final class NoiseDensity {
  private static final Pattern NUMBER =
      Pattern.compile("[+-]?(\\d+\\.?\\d*|\\.\\d+)([eE][+-]?\\d+)?");
  private static final double LOWEST = 1e-9; // Hz
  private static final double HIGHEST = 1e15; // Hz
  private static final int LONGEST = 60; // characters of a line in a message

  private final double[] hertz;
  private final double[] perHertz;

  private NoiseDensity(double[] hertz, double[] perHertz) {
    this.hertz = hertz;
    this.perHertz = perHertz;
  }

  /**
   * A table.
   *
   * @param hertz frequencies, Hz, rising, from {@value #LOWEST} to {@value #HIGHEST}, at least two;
   *     copied
   * @param perHertz density at each, at least 0; copied
   * @return the density
   * @throws IllegalArgumentException if the table is shorter, unsorted, negative or not finite; the
   *     message names the entry, counted from 1
   */
  public static NoiseDensity of(double[] hertz, double[] perHertz) {
    if (hertz.length != perHertz.length) {
      throw new IllegalArgumentException(
          "noise density: given "
              + hertz.length
              + " frequencies and "
              + perHertz.length
              + " values; allowed: as many of each");
    }
    double[] f = hertz.clone();
    double[] s = perHertz.clone();
    for (int i = 0; i < f.length; i++) {
      String problem = problem(i == 0 ? 0 : f[i - 1], f[i], s[i]);
      if (problem != null) {
        throw new IllegalArgumentException("noise density, entry " + (i + 1) + ": " + problem);
      }
    }
    requireTwo(f.length, "noise density");
    return new NoiseDensity(f, s);
  }

  private static void requireTwo(int rows, String name) {
    if (rows < 2) {
      throw new IllegalArgumentException(
          name + ": given " + rows + " entries; allowed: at least 2");
    }
  }

  private static String problem(double before, double f, double s) {
    if (!(f >= LOWEST && f <= HIGHEST)) {
      return "given frequency "
          + f
          + " Hz; allowed: positive and finite, "
          + LOWEST
          + " to "
          + HIGHEST
          + " Hz";
    }
    if (!(f > before)) {
      return "given frequency " + f + " Hz after " + before + " Hz; allowed: rising frequencies";
    }
    if (!(s >= 0 && s < Double.POSITIVE_INFINITY)) {
      return "given density " + s + "; allowed: at least 0 and finite";
    }
    return null;
  }

  /**
   * Reads a table of two columns from a file.
   *
   * @param file text in UTF-8: on each line a frequency in Hz and the density, separated by a
   *     comma, a semicolon or blanks; empty lines and lines that begin with # are skipped
   * @return the density
   * @throws UncheckedIOException if the file cannot be read
   * @throws IllegalArgumentException if a line is no such pair, or the table is no density; the
   *     message names file and line
   */
  public static NoiseDensity read(Path file) {
    try {
      return parse(Files.readString(file, StandardCharsets.UTF_8), file.toString());
    } catch (IOException e) {
      throw new UncheckedIOException("cannot read the noise density " + file, e);
    }
  }

  /**
   * Reads a table of two columns from text.
   *
   * @param text as in {@link #read(Path)}
   * @param name what messages call it
   * @return the density
   * @throws IllegalArgumentException if a line is no pair of numbers, or the table is no density;
   *     the message names the line
   */
  public static NoiseDensity parse(String text, String name) {
    List<double[]> rows = new ArrayList<>();
    int line = 0;
    for (String raw : withoutByteOrderMark(text).split("\n", -1)) {
      line++;
      String content = raw.strip();
      if (content.isEmpty() || content.startsWith("#")) {
        continue;
      }
      double[] row = row(content, name + ", line " + line);
      String problem = problem(rows.isEmpty() ? 0 : rows.get(rows.size() - 1)[0], row[0], row[1]);
      if (problem != null) {
        throw new IllegalArgumentException(name + ", line " + line + ": " + problem);
      }
      rows.add(row);
    }
    requireTwo(rows.size(), name);
    return new NoiseDensity(
        rows.stream().mapToDouble(r -> r[0]).toArray(),
        rows.stream().mapToDouble(r -> r[1]).toArray());
  }

  private static String withoutByteOrderMark(String text) {
    return text.startsWith("\uFEFF") ? text.substring(1) : text;
  }

  /** Java's own parser takes more than people write: suffixes, hexadecimal digits. */
  private static boolean isNumber(String text) {
    return NUMBER.matcher(text).matches();
  }

  private static double[] row(String content, String where) {
    String[] parts = content.split("\\s*[,;]\\s*|\\s+");
    if (parts.length == 2 && isNumber(parts[0]) && isNumber(parts[1])) {
      return new double[] {Double.parseDouble(parts[0]), Double.parseDouble(parts[1])};
    }
    throw new IllegalArgumentException(
        where
            + ": given \""
            + (content.length() > LONGEST ? content.substring(0, LONGEST) + "..." : content)
            + "\"; allowed: a frequency in Hz and a density, two numbers");
  }

  /**
   * The density at a frequency.
   *
   * @param frequency Hz
   * @return the density; 0 outside the table
   */
  public double at(double frequency) {
    int last = hertz.length - 1;
    if (!(frequency >= hertz[0] && frequency <= hertz[last])) {
      return 0;
    }
    int i = segment(frequency);
    if (isLinear(i)) {
      double part = (frequency - hertz[i]) / (hertz[i + 1] - hertz[i]);
      return perHertz[i] + part * (perHertz[i + 1] - perHertz[i]);
    }
    // from the nearer entry and by halves, so that no factor overflows where the density does not
    double fromLow = Math.log(frequency / hertz[i]);
    double fromHigh = Math.log(frequency / hertz[i + 1]);
    boolean low = fromLow < -fromHigh;
    double half = Math.exp(0.5 * exponent(i) * (low ? fromLow : fromHigh));
    return perHertz[low ? i : i + 1] * half * half;
  }

  private int segment(double frequency) {
    int low = 0;
    int high = hertz.length - 1;
    while (high - low > 1) {
      int middle = (low + high) >>> 1;
      if (hertz[middle] <= frequency) {
        low = middle;
      } else {
        high = middle;
      }
    }
    return low;
  }

  private boolean isLinear(int i) {
    return perHertz[i] == 0 || perHertz[i + 1] == 0;
  }

  private double exponent(int i) {
    // logarithms before the differences: a quotient of densities may overflow
    return (Math.log(perHertz[i + 1]) - Math.log(perHertz[i]))
        / (Math.log(hertz[i + 1]) - Math.log(hertz[i]));
  }

  /**
   * Variance of the noise between two frequencies: the exact integral of the interpolated density.
   *
   * @param from lower frequency, Hz
   * @param to upper frequency, Hz, at least the lower
   * @return the integral
   * @throws IllegalArgumentException if the frequencies are not in order
   */
  public double power(double from, double to) {
    if (!(from <= to)) {
      throw new IllegalArgumentException(
          "frequencies from " + from + " Hz to " + to + " Hz must be in order");
    }
    double sum = 0;
    for (int i = 0; i < hertz.length - 1; i++) {
      double a = Math.max(from, hertz[i]);
      double b = Math.min(to, hertz[i + 1]);
      if (a < b) {
        sum += area(i, a, b);
      }
    }
    return sum;
  }

  private double area(int i, double a, double b) {
    if (isLinear(i)) {
      return 0.5 * (at(a) + at(b)) * (b - a);
    }
    double decades = Math.log(b / a);
    double x = (exponent(i) + 1) * decades;
    // a·S(a)·((b/a)^(x/ln(b/a)) − 1)/x·ln(b/a), without loss where x is near 0, and from the end
    // where f·S is larger, so that nothing overflows
    double top = x > 0 ? b * at(b) : a * at(a);
    double fall = x == 0 ? 1 : -Math.expm1(-Math.abs(x)) / Math.abs(x);
    return top * decades * fall;
  }

  /**
   * Root mean square of the noise over the whole table.
   *
   * @return the root of the integral
   */
  public double rms() {
    return Math.sqrt(power(lowestHertz(), highestHertz()));
  }

  /**
   * The lowest frequency.
   *
   * @return Hz
   */
  public double lowestHertz() {
    return hertz[0];
  }

  /**
   * The highest frequency.
   *
   * @return Hz
   */
  public double highestHertz() {
    return hertz[hertz.length - 1];
  }

  /**
   * The tabulated frequencies.
   *
   * @return a copy, Hz, rising
   */
  public double[] frequencies() {
    return hertz.clone();
  }

  /**
   * Multiplies the density.
   *
   * @param factor at least 0
   * @return a copy
   * @throws IllegalArgumentException if the factor is negative, or a result is not finite
   */
  public NoiseDensity scaled(double factor) {
    if (!(factor >= 0 && factor < Double.POSITIVE_INFINITY)) {
      throw new IllegalArgumentException(
          "factor " + factor + " on a noise density must be at least 0 and finite");
    }
    double[] scaled = perHertz.clone();
    for (int i = 0; i < scaled.length; i++) {
      scaled[i] *= factor;
      if (!(scaled[i] < Double.POSITIVE_INFINITY)) {
        throw new IllegalArgumentException(
            "factor " + factor + " takes the noise density " + perHertz[i] + " beyond all numbers");
      }
    }
    return new NoiseDensity(hertz, scaled);
  }
}
