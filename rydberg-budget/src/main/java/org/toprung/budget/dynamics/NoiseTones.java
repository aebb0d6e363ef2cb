package org.toprung.budget.dynamics;

import java.util.ArrayList;
import java.util.List;
import java.util.random.RandomGenerator;
import org.toprung.budget.bench.NoiseDensity;

/**
 * Noise of a tabulated one-sided density as a sum of tones, drawn anew for every shot.
 *
 * <p>The table is cut into strips, each between two of its points and at most a quarter of a decade
 * wide, and the strips are gathered into at most {@value #MOST_TONES} bands of about equal width on
 * a logarithmic scale. Each band of variance P plays one tone a cos 2πft + b sin 2πft: a strip is
 * drawn with a probability proportional to its variance P<sub>s</sub>, the frequency f in it
 * uniformly in its logarithm, and a and b are Gaussian with the variance (P/P<sub>s</sub>) f S(f)
 * ln(f₂/f₁). The mean of every quadratic form of the noise is then exact, however it depends on the
 * frequency; a finer grid would only scatter less. (Sum of sinusoids: Rice, Bell Syst. Tech. J. 23,
 * 282 (1944), section 2.8; stratified and importance sampling.)
 *
 * <p>Immutable and thread-safe.
 */
final class NoiseTones {
  private static final int MOST_TONES = 100;
  private static final double STRIPS_PER_DECADE = 4;

  /** Between two frequencies, Hz, with the variance there. */
  private record Strip(double from, double to, double power) {}

  private final NoiseDensity density;
  private final List<List<Strip>> bands = new ArrayList<>();
  private final double[] bandPower;

  NoiseTones(NoiseDensity density) {
    this.density = density;
    List<Strip> strips = strips(density);
    double low = Math.max(strips.get(0).from(), 1e-3 * strips.get(0).to());
    double decades = Math.log10(density.highestHertz() / low);
    double width = strips.size() <= MOST_TONES ? 0 : decades / (MOST_TONES / 2.0);
    double end = Double.NEGATIVE_INFINITY;
    for (Strip strip : strips) {
      if (strip.from() >= end) {
        bands.add(new ArrayList<>());
        end = Math.max(strip.from(), low) * Math.pow(10, width);
      }
      bands.get(bands.size() - 1).add(strip);
    }
    this.bandPower =
        bands.stream().mapToDouble(b -> b.stream().mapToDouble(Strip::power).sum()).toArray();
  }

  private static List<Strip> strips(NoiseDensity density) {
    List<Strip> strips = new ArrayList<>();
    double[] hertz = density.frequencies();
    for (int i = 0; i + 1 < hertz.length; i++) {
      if (hertz[i] == 0) {
        strips.add(new Strip(0, hertz[1], density.power(0, hertz[1])));
        continue;
      }
      double ratio = hertz[i + 1] / hertz[i];
      int parts = (int) Math.max(1, Math.ceil(STRIPS_PER_DECADE * Math.log10(ratio)));
      for (int s = 0; s < parts; s++) {
        double from = hertz[i] * Math.pow(ratio, (double) s / parts);
        double to = s == parts - 1 ? hertz[i + 1] : hertz[i] * Math.pow(ratio, (s + 1.0) / parts);
        strips.add(new Strip(from, to, density.power(from, to)));
      }
    }
    return strips;
  }

  int count() {
    return bandPower.length;
  }

  /**
   * Draws the tones of one shot.
   *
   * @param random source
   * @param hertz receives the frequencies
   * @param cosine receives the amplitudes of the cosines; 0 where there is no noise
   * @param sine receives the amplitudes of the sines
   */
  void draw(RandomGenerator random, double[] hertz, double[] cosine, double[] sine) {
    for (int b = 0; b < bandPower.length; b++) {
      List<Strip> band = bands.get(b);
      Strip strip = band.get(0);
      if (band.size() > 1) {
        double at = random.nextDouble() * bandPower[b];
        for (Strip s : band) {
          strip = s.power() > 0 ? s : strip;
          at -= s.power();
          if (at < 0) {
            break;
          }
        }
      }
      double u = random.nextDouble();
      double f;
      double width;
      if (strip.from() == 0) {
        f = Math.max(u, 1e-15) * strip.to();
        width = strip.to();
      } else {
        double log = Math.log(strip.to() / strip.from());
        f = strip.from() * Math.exp(u * log);
        width = f * log;
      }
      f = Math.min(f, strip.to());
      double share = strip.power() > 0 ? bandPower[b] / strip.power() : 0;
      double rms = Math.sqrt(share * width * density.at(f));
      hertz[b] = f;
      cosine[b] = rms * random.nextGaussian();
      sine[b] = rms * random.nextGaussian();
    }
  }
}
