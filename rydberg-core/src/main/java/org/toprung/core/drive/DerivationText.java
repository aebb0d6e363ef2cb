package org.toprung.core.drive;

import java.util.LinkedHashSet;
import java.util.Locale;
import java.util.Set;
import org.toprung.core.structure.DipoleElement;

/** Writes a {@link Derivation} down. */
final class DerivationText {
  private static final double MEGAHERTZ = 1e6;

  private final StringBuilder text = new StringBuilder();

  private DerivationText() {}

  static String of(Derivation d) {
    DerivationText out = new DerivationText();
    out.line("Coupling of %s", d.title());
    out.line("");
    out.line(
        "Light: E = √(2I/(c ε0)), I = 2P/(π w²) in the focus of a Gaussian beam; a(q) about B");
    d.lights().forEach(out::light);
    out.line("");
    out.line("Reduced dipole elements");
    d.elements().forEach(out::element);
    out.line("");
    out.line(
        "Legs: A = a(q) Σ ±(c' * c * (J' 1 J; -mJ' q mJ)), ± = (-1)^(J'-mJ'); Ω = E (e a0/h) d A");
    Set<Derivation.Leg> legs = new LinkedHashSet<>();
    for (int k = 0; k < d.lights().size(); k++) {
      int step = k;
      d.paths().forEach(p -> legs.add(p.legs().get(step)));
    }
    legs.forEach(out::leg);
    out.line("");
    boolean single = d.lights().size() == 1;
    out.line(single ? "Paths: Ω" : "Paths: Ω1 Ω2/(2Δ + iγ/2π)");
    for (Derivation.Target target : d.targets()) {
      out.line("  to %s", target.target());
      d.paths().stream().filter(p -> p.target().equals(target.target())).forEach(out::path);
      out.line("    sum: %s MHz", megahertz(target.sumHertz()));
    }
    out.line("");
    out.line(
        "Effective Rabi frequency √(Σ |sum|²) = %s MHz, uncertain by %.2g %%",
        number(d.rabiHertz() / MEGAHERTZ), 100 * d.relativeUncertainty());
    return out.text.toString();
  }

  private void light(Derivation.Light light) {
    line("  E%d = %s V/m: %s", light.step(), number(light.voltsPerMetre()), light.beam());
    line(
        "     a(-1) = %s, a(0) = %s, a(+1) = %s",
        complex(light.components().get(0)),
        complex(light.components().get(1)),
        complex(light.components().get(2)));
  }

  private void element(Derivation.Reduced reduced) {
    DipoleElement e = reduced.element();
    line(
        "  d = <%s||r||%s> = %s ± %.2g a0, %s: %s",
        reduced.upper(),
        reduced.lower(),
        number(e.valueA0()),
        e.uncertaintyA0(),
        e.origin().name().toLowerCase(Locale.ROOT),
        e.source());
  }

  private void leg(Derivation.Leg leg) {
    line("  leg %d: %s -> %s, q = %+d", leg.step(), leg.lower(), leg.upper(), leg.q());
    for (Derivation.AngularTerm t : leg.terms()) {
      line(
          "    mI = %s, mJ = %s -> %s: %s(%s * %s * %s)",
          t.mI(),
          t.lowerMj(),
          t.upperMj(),
          t.sign() > 0 ? "+" : "-",
          number(t.upperAmplitude()),
          number(t.lowerAmplitude()),
          number(t.threeJ()));
    }
    line(
        "    A = %s, Ω%d = %s MHz", complex(leg.angular()), leg.step(), megahertz(leg.rabiHertz()));
  }

  private void path(Derivation.Path path) {
    if (path.via().isEmpty()) {
      line("    straight: %s MHz", megahertz(path.contributionHertz()));
      return;
    }
    line(
        "    via %s, Δ = %s MHz, γ/2π = %s MHz: %s MHz",
        path.via(),
        number(path.detuningHertz() / MEGAHERTZ),
        number(path.decayPerSecond() / (2 * Math.PI * MEGAHERTZ)),
        megahertz(path.contributionHertz()));
  }

  private static String megahertz(Derivation.Complex hertz) {
    return complex(hertz.times(1 / MEGAHERTZ));
  }

  private static String complex(Derivation.Complex c) {
    if (c.im() == 0) {
      return number(c.re());
    }
    String im = number(c.im());
    return "("
        + number(c.re())
        + (im.startsWith("-") ? " - " + im.substring(1) : " + " + im)
        + "i)";
  }

  private static String number(double value) {
    return value == 0 ? "0" : String.format(Locale.ROOT, "%.7g", value);
  }

  private void line(String format, Object... values) {
    text.append(String.format(Locale.ROOT, format, values)).append('\n');
  }
}
