package org.toprung.core.drive;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.toprung.angular.Polarization.PI;
import static org.toprung.angular.Polarization.SIGMA_MINUS;
import static org.toprung.angular.Polarization.SIGMA_PLUS;
import static org.toprung.core.quantity.Frequency.gigahertz;
import static org.toprung.core.quantity.Length.micrometres;
import static org.toprung.core.quantity.MagneticField.gauss;
import static org.toprung.core.quantity.Power.milliwatts;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;
import org.toprung.angular.Polarization;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.atom.Sublevel;
import org.toprung.core.drive.Derivation.Complex;
import org.toprung.core.quantity.Length;
import org.toprung.core.quantity.Power;

class DerivationTest {
  private static final Beam LOWER = Beam.gaussian(milliwatts(2), micrometres(20));
  private static final Beam UPPER = Beam.gaussian(milliwatts(150), micrometres(25));

  private static Drive drive(
      double f, double m, String middle, String target, double mJ, double detuning, Beam... beams) {
    return Drive.of(Species.RUBIDIUM_87)
        .from(Sublevel.hyperfine("5S1/2", f, m))
        .step(Level.parse(middle), beams[0])
        .step(Sublevel.fine(target, mJ), beams[1])
        .detuned(gigahertz(detuning))
        .in(gauss(4))
        .resolve();
  }

  private static Drive stretched() {
    return drive(
        2,
        2,
        "6P3/2",
        "68S1/2",
        0.5,
        1.2,
        LOWER.polarized(SIGMA_PLUS).along(0, 0, 1),
        UPPER.polarized(SIGMA_MINUS).along(0, 0, -1));
  }

  private static Drive everySublevel(String middle, String target, double detuning) {
    return drive(
        2,
        0,
        middle,
        target,
        0.5,
        detuning,
        LOWER.polarized(Polarization.ellipticalDegrees(30, 20)).along(1, 0.3, 0.2),
        UPPER.polarized(Polarization.linearDegrees(70)).along(-0.5, 0.6, 0.3));
  }

  private static Drive singleStep() {
    return Drive.of(Species.CAESIUM_133)
        .from(Sublevel.hyperfine("6S1/2", 4, 3))
        .step(
            Sublevel.fine("60P3/2", 0.5),
            Beam.gaussian(milliwatts(50), micrometres(15)).polarized(PI).along(1, 0, 0))
        .in(gauss(2))
        .resolve();
  }

  static Stream<Drive> drives() {
    return Stream.of(
        stretched(),
        everySublevel("6P3/2", "70S1/2", -2.5),
        everySublevel("5P3/2", "60D3/2", 40),
        everySublevel("6P1/2", "50S1/2", 400),
        singleStep());
  }

  /**
   * Exact: the printed powers, waists, elements, amplitudes, 3j symbols, detunings and widths alone
   * give the effective Rabi frequency again, to the seven digits that are printed. Constants:
   * CODATA 2018.
   */
  @ParameterizedTest
  @MethodSource("drives")
  void canBeCheckedByHand(Drive drive) {
    ByHand hand = new ByHand(drive.derivation().text());
    double paths = hand.largestPathMegahertz;
    assertEquals(drive.rabi().hertz() * 1e-6, hand.rabiMegahertz(), 3e-6 * paths);
    assertEquals(drive.rabi().hertz() * 1e-6, hand.printedMegahertz, 1e-12 * drive.rabi().hertz());
  }

  /** Reads the text and works everything out again from the factors. */
  private static final class ByHand {
    private static final String NUMBER = "-?[0-9.]+(?:e[+-][0-9]+)?";
    private static final String COMPLEX = "(\\(?" + NUMBER + "(?: [+-] " + NUMBER + "i\\))?)";
    private static final Pattern LIGHT =
        Pattern.compile("  E(\\d) = (" + NUMBER + ") V/m: (.+) in a waist of (.+)");
    private static final Pattern COMPONENTS =
        Pattern.compile(
            " +a\\(-1\\) = " + COMPLEX + ", a\\(0\\) = " + COMPLEX + ", a\\(\\+1\\) = " + COMPLEX);
    private static final Pattern ELEMENT =
        Pattern.compile("  d = <(\\S+)\\|\\|r\\|\\|(\\S+)> = (" + NUMBER + ") ± .*");
    private static final Pattern LEG = Pattern.compile("  leg (\\d): (.+) -> (.+), q = ([+-]\\d)");
    private static final Pattern TERM =
        Pattern.compile(
            "    mI = .*: ([+-])\\((" + NUMBER + ") \\* (" + NUMBER + ") \\* (" + NUMBER + ")\\)");
    private static final Pattern TARGET = Pattern.compile("  to (.+)");
    private static final Pattern VIA =
        Pattern.compile(
            "    via (.+), Δ = ("
                + NUMBER
                + ") MHz, γ/2π = ("
                + NUMBER
                + ") MHz: "
                + COMPLEX
                + " MHz");
    private static final Pattern RESULT =
        Pattern.compile("Effective Rabi frequency .* = (" + NUMBER + ") MHz, .*");

    private final double[] field = new double[3];
    private final List<List<Complex>> light = new ArrayList<>();
    private final Map<String, Double> element = new HashMap<>();
    private final Map<String, Complex> rabi = new HashMap<>(); // MHz
    private final Map<String, Complex> sum = new LinkedHashMap<>();
    private double largestPathMegahertz;
    private double printedMegahertz;
    private String start;
    private String leg;
    private String target;

    ByHand(String text) {
      text.lines().forEach(this::read);
    }

    private void read(String line) {
      Matcher m = LIGHT.matcher(line);
      if (m.matches()) {
        double w = Length.parse(m.group(4)).metres();
        double intensity = 2 * Power.parse(m.group(3)).watts() / (Math.PI * w * w);
        int step = Integer.parseInt(m.group(1));
        field[step] = Math.sqrt(2 * intensity / (299792458 * 8.8541878128e-12));
        assertEquals(field[step], Double.parseDouble(m.group(2)), 1e-6 * field[step]);
      }
      m = COMPONENTS.matcher(line);
      if (m.matches()) {
        light.add(List.of(complex(m.group(1)), complex(m.group(2)), complex(m.group(3))));
      }
      m = ELEMENT.matcher(line);
      if (m.matches()) {
        element.put(m.group(1) + " " + m.group(2), Double.parseDouble(m.group(3)));
      }
      m = LEG.matcher(line);
      if (m.matches()) {
        int step = Integer.parseInt(m.group(1));
        int q = Integer.parseInt(m.group(4));
        leg = m.group(2) + " -> " + m.group(3);
        start = start == null ? m.group(2) : start;
        double d = element.get(m.group(3).split(" ")[0] + " " + m.group(2).split(" ")[0]);
        double dipole = 1.602176634e-19 * 5.29177210903e-11 / 6.62607015e-34;
        rabi.put(leg, light.get(step - 1).get(q + 1).times(1e-6 * field[step] * dipole * d));
        angular = 0;
      }
      m = TERM.matcher(line);
      if (m.matches()) {
        double term =
            Double.parseDouble(m.group(2))
                * Double.parseDouble(m.group(3))
                * Double.parseDouble(m.group(4));
        angular += m.group(1).equals("+") ? term : -term;
      } else if (line.startsWith("    A = ")) {
        rabi.computeIfPresent(leg, (key, value) -> value.times(angular));
      }
      m = TARGET.matcher(line);
      if (m.matches()) {
        target = m.group(1);
        sum.put(target, new Complex(0, 0));
      }
      m = VIA.matcher(line);
      if (m.matches()) {
        Complex product =
            rabi.get(start + " -> " + m.group(1)).times(rabi.get(m.group(1) + " -> " + target));
        Complex path =
            product.over(
                new Complex(2 * Double.parseDouble(m.group(2)), Double.parseDouble(m.group(3))));
        assertEquals(complex(m.group(4)).re(), path.re(), 1e-5 * path.abs(), line);
        assertEquals(complex(m.group(4)).im(), path.im(), 1e-5 * path.abs(), line);
        largestPathMegahertz = Math.max(largestPathMegahertz, path.abs());
        sum.merge(target, path, Complex::plus);
      } else if (line.startsWith("    straight: ")) {
        sum.put(target, rabi.get(start + " -> " + target));
        largestPathMegahertz = sum.get(target).abs();
      }
      m = RESULT.matcher(line);
      if (m.matches()) {
        printedMegahertz = Double.parseDouble(m.group(1));
      }
    }

    private double angular;

    private static Complex complex(String text) {
      Matcher m = Pattern.compile("\\((" + NUMBER + ") ([+-]) (" + NUMBER + ")i\\)").matcher(text);
      if (m.matches()) {
        double im = Double.parseDouble(m.group(3));
        return new Complex(Double.parseDouble(m.group(1)), m.group(2).equals("+") ? im : -im);
      }
      return new Complex(Double.parseDouble(text), 0);
    }

    double rabiMegahertz() {
      return Math.sqrt(sum.values().stream().mapToDouble(c -> c.abs() * c.abs()).sum());
    }
  }

  /** Exact: what is reported is the root of the summed squares of the sums of the paths. */
  @ParameterizedTest
  @MethodSource("drives")
  void addsUp(Drive drive) {
    Derivation d = drive.derivation();
    double square = 0;
    for (Derivation.Target target : d.targets()) {
      Complex sum = new Complex(0, 0);
      for (Derivation.Path path : d.paths()) {
        if (path.target().equals(target.target())) {
          sum = sum.plus(path.contributionHertz());
        }
      }
      assertEquals(
          0,
          Math.hypot(sum.re() - target.sumHertz().re(), sum.im() - target.sumHertz().im()),
          1e-6);
      square += sum.abs() * sum.abs();
    }
    assertEquals(d.rabiHertz(), Math.sqrt(square), 1e-9 * d.rabiHertz());
    for (Derivation.Path path : d.paths()) {
      for (Derivation.Leg leg : path.legs()) {
        double sum = leg.terms().stream().mapToDouble(Derivation.AngularTerm::value).sum();
        Complex a = d.lights().get(leg.step() - 1).components().get(leg.q() + 1);
        assertEquals(a.times(sum).abs(), leg.angular().abs(), 1e-15);
      }
    }
  }

  /**
   * Exact mathematics: from F = 2, mF = 2 by σ+ to F′ = 3, mF′ = 3 of a P3/2 level the only term is
   * 1·1·(3/2 1 1/2; −3/2 1 1/2) = 1/2 with sign +, and back down by σ− to mJ = 1/2 it is the same
   * up to sign.
   */
  @Test
  void hasOneTermBetweenStretchedStates() {
    Derivation d = stretched().derivation();
    assertEquals(1, d.paths().size());
    List<Derivation.Leg> legs = d.paths().get(0).legs();
    assertEquals(1, legs.get(0).terms().size());
    assertEquals(0.5, legs.get(0).terms().get(0).value(), 1e-14);
    assertEquals(0.5, Math.abs(legs.get(1).terms().get(0).value()), 1e-14);
  }

  /** From mF = 0 the paths through different F interfere, and the sum is less than its parts. */
  @Test
  void showsInterference() {
    Derivation d = everySublevel("6P3/2", "70S1/2", -2.5).derivation();
    boolean opposed = false;
    for (Derivation.Target target : d.targets()) {
      double parts =
          d.paths().stream()
              .filter(p -> p.target().equals(target.target()))
              .mapToDouble(p -> p.contributionHertz().abs())
              .sum();
      opposed |= target.sumHertz().abs() < 0.9 * parts;
    }
    assertTrue(opposed);
  }

  @Test
  void namesOriginAndSourceOfTheElements() {
    String text = stretched().derivation().text();
    assertTrue(text.startsWith("Coupling of Rb-87: 5S1/2 F=2 mF=2 to 68S1/2 mJ=1/2\n"), text);
    assertTrue(text.contains("measured"), text);
    assertTrue(text.contains("E1 = "), text);
    assertTrue(text.contains("2 mW in a waist of 20 um"), text);
  }

  @Test
  void refusesThreeSteps() {
    Beam beam = LOWER.polarized(SIGMA_PLUS).along(0, 0, 1);
    Drive three =
        Drive.of(Species.RUBIDIUM_87)
            .from(Sublevel.hyperfine("5S1/2", 2, 2))
            .step(Level.parse("5P3/2"), beam)
            .step(Level.parse("5D5/2"), beam)
            .step(Sublevel.fine("60F7/2", 3.5), beam)
            .detuned(gigahertz(1), gigahertz(1))
            .in(gauss(1))
            .resolve();
    String message = assertThrows(IllegalArgumentException.class, three::derivation).getMessage();
    assertTrue(message.contains("one or two steps, given 3"), message);
  }
}
