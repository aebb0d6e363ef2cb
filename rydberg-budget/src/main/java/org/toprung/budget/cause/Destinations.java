package org.toprung.budget.cause;

import java.util.Comparator;
import java.util.List;
import java.util.Locale;
import java.util.StringJoiner;
import java.util.function.ToDoubleFunction;
import org.toprung.core.atom.Level;
import org.toprung.core.drive.Drive;
import org.toprung.core.drive.Scattering;
import org.toprung.core.quantity.Temperature;
import org.toprung.core.structure.Lifetimes;

/** Says in words where lost population ends up, the most likely places first. */
final class Destinations {
  private static final int MOST = 3;

  private Destinations() {}

  /** A place and its part of the whole. */
  private record Part(String place, double share) {}

  /** Where photons scattered from the start lead. */
  static String ofScattering(Drive drive) {
    Scattering scattering = drive.startScattering();
    double total = scattering.totalPerSecond();
    if (!(total > 0)) {
      return "unknown";
    }
    List<Part> parts = new java.util.ArrayList<>();
    parts.add(new Part("back in the start", scattering.toStartPerSecond() / total));
    for (Scattering.Branch branch : scattering.toOtherGround()) {
      parts.add(new Part(branch.sublevel(), branch.ratePerSecond() / total));
    }
    parts.add(
        new Part(
            "ground by way of other levels", scattering.throughOtherLevelsPerSecond() / total));
    return said(parts);
  }

  /** Where spontaneous decay of the Rydberg level leads. */
  static String ofDecay(Drive drive) {
    return ofChannels(drive, Temperature.ofKelvin(0), c -> c.spontaneousPerSecond().value(), 0);
  }

  /** Where blackbody radiation takes the Rydberg level. */
  static String ofBlackbody(Drive drive, Temperature environment) {
    double ionized =
        Lifetimes.of(drive.species())
            .blackbodyIonizationRatePerSecond(drive.target().level(), environment)
            .value();
    return ofChannels(drive, environment, c -> c.blackbodyPerSecond().value(), ionized);
  }

  private static String ofChannels(
      Drive drive,
      Temperature temperature,
      ToDoubleFunction<Lifetimes.Channel> rate,
      double ionized) {
    Level level = drive.target().level();
    List<Lifetimes.Channel> channels = Lifetimes.of(drive.species()).channels(level, temperature);
    double total = ionized + channels.stream().mapToDouble(rate).sum();
    List<Part> parts = new java.util.ArrayList<>();
    for (Lifetimes.Channel channel : channels) {
      parts.add(new Part(channel.to().toString(), rate.applyAsDouble(channel) / total));
    }
    parts.add(new Part("ionized", ionized / total));
    return said(parts);
  }

  /** The most populated unwanted sublevels of a rung of the ladder after the pulse. */
  static String ofLeak(PulseModel model, int rung) {
    List<Part> parts = new java.util.ArrayList<>();
    double total = 0;
    for (var leak : model.leaks(rung)) {
      total += leak.population();
    }
    for (var leak : model.leaks(rung)) {
      parts.add(new Part(leak.sublevel(), leak.population() / total));
    }
    return parts.isEmpty() || !(total > 0) ? "none" : said(parts);
  }

  private static String said(List<Part> parts) {
    StringJoiner text = new StringJoiner(", ");
    parts.stream()
        .filter(p -> p.share() >= 0.005)
        .sorted(Comparator.comparingDouble(Part::share).reversed())
        .limit(MOST)
        .forEach(
            p -> text.add(String.format(Locale.ROOT, "%s %.0f %%", p.place(), 100 * p.share())));
    return text.length() == 0 ? "spread over many levels" : text.toString();
  }
}
