package org.toprung.core.drive;

import java.util.ArrayList;
import java.util.List;
import org.toprung.core.atom.Level;
import org.toprung.core.quantity.Length;
import org.toprung.core.quantity.PhysicalConstants;
import org.toprung.core.quantity.Power;
import org.toprung.core.structure.FarLightShift;
import org.toprung.core.structure.FarShiftSeries;

/** Takes the numbers of a {@link DriveKernel} from the description of a drive. */
final class KernelBuilder {
  private static final double SAME_FIELD = 1e-10; // relative

  private final DriveSetup setup;
  private final LadderBuilder builder;
  private final Ladder ladder;
  private final int[] wanted;
  private double lowest = -FarShiftSeries.REACH_HERTZ; // change of the detuning, Hz
  private double highest = FarShiftSeries.REACH_HERTZ;

  private KernelBuilder(DriveSetup setup) {
    this.setup = setup;
    this.builder = new LadderBuilder(setup);
    this.ladder = builder.build();
    this.wanted = ladder.wanted();
  }

  static KernelData build(DriveSetup setup, String description) {
    if (setup.steps() > 2) {
      throw new IllegalArgumentException(
          "a kernel is prepared for drives of one or two steps, given "
              + setup.steps()
              + ": the step between two intermediate levels couples them, so that every new power"
              + " needs a new elimination; resolve the drive anew instead");
    }
    if (setup.steps() == 2 && (setup.isQuadrupole(0) || setup.isQuadrupole(1))) {
      throw new IllegalArgumentException(
          "a kernel of two steps takes dipole steps: the coupling of an electric-quadrupole step"
              + " changes with the detuning; resolve the drive anew instead");
    }
    return new KernelBuilder(setup).data(description);
  }

  private KernelData data(String description) {
    List<KernelData.Step> steps = new ArrayList<>();
    for (int k = 0; k < ladder.steps(); k++) {
      double field = builder.light().fieldVoltsPerMetre(k);
      steps.add(
          new KernelData.Step(
              watts(k),
              1,
              field * field,
              strongest(k),
              builder.light().element(k).relativeUncertainty(),
              far(ladder.start(), k),
              far(wanted[0], k)));
    }
    List<KernelData.Partner> partners = new ArrayList<>();
    double detuning = 0;
    if (ladder.steps() == 2) {
      detuning = builder.frame().detuningHertz(1);
      // both lasers must keep a positive frequency
      narrow(-builder.frame().laserHertz(0));
      narrow(builder.frame().laserHertz(1));
      keepFocus(0);
      keepFocus(1);
      for (double distance : builder.partnerHertz(1)) {
        partners.add(new KernelData.Partner(distance, RotatingFrame.isNear(distance, detuning)));
      }
    } else {
      lowest = 0;
      highest = 0;
    }
    return new KernelData(
        description,
        steps,
        detuning,
        detuning + lowest,
        detuning + highest,
        builder.farShiftRelativeUncertainty(),
        builder.trapShiftHertz(),
        partners,
        wanted.length,
        direct(),
        intermediates(),
        paths());
  }

  private double watts(int step) {
    Profile profile = setup.beam(step).profile();
    return profile
        .power()
        .map(Power::watts)
        .orElseThrow(
            () ->
                new IllegalArgumentException(
                    "a kernel takes the power of each beam, but beam "
                        + (step + 1)
                        + " is given as a "
                        + profile
                        + " without one"));
  }

  /** Off the focus the field depends on the wavelength: keeps the detuning where it does not. */
  private void keepFocus(int step) {
    double laser = builder.frame().laserHertz(step);
    double probe = Math.min(FarShiftSeries.REACH_HERTZ, laser / 2);
    double change =
        Math.abs(fieldAt(step, laser + probe) / fieldAt(step, laser - probe) - 1) / probe;
    if (change > 0) {
      narrow(SAME_FIELD / change);
      narrow(-SAME_FIELD / change);
    }
  }

  private double fieldAt(int step, double laser) {
    return setup
        .beam(step)
        .fieldVoltsPerMetre(Length.ofMetres(PhysicalConstants.SPEED_OF_LIGHT / laser));
  }

  /** Keeps the change of the detuning on this side of a limit. */
  private void narrow(double limit) {
    double inside = limit * (1 - 1e-12);
    if (limit < 0) {
      lowest = Math.max(lowest, inside);
    } else {
      highest = Math.min(highest, inside);
    }
  }

  private double strongest(int step) {
    double largest = 0;
    for (Ladder.Coupling c : ladder.couplings()) {
      int lower = ladder.states().get(c.lower()).rung();
      int upper = ladder.states().get(c.upper()).rung();
      if (lower == step && upper == step + 1) {
        largest = Math.max(largest, c.rabiHertz());
      }
    }
    return largest;
  }

  private FarShiftSeries far(int state, int step) {
    ProductState s = builder.product(state);
    double[] weight = new double[s.amplitude().length];
    for (int c = 0; c < weight.length; c++) {
      weight[c] = s.amplitude()[c] * s.amplitude()[c];
    }
    int rung = ladder.states().get(state).rung();
    Level level = s.level();
    double laser = builder.frame().laserHertz(step);
    FarLightShift shifts = FarLightShift.of(setup.species());
    // across the threshold the sum over states is another one; the second laser goes the other way
    double toThreshold = shifts.thresholdHertz(level) - laser;
    narrow(step == 0 ? toThreshold : -toThreshold);
    return shifts.series(
        level,
        s.doubledMj(),
        weight,
        laser,
        builder.light().polarization(step),
        builder.inLadder(rung, step));
  }

  private List<KernelData.Link> direct() {
    List<KernelData.Link> links = new ArrayList<>();
    if (ladder.steps() == 1) {
      for (Ladder.Coupling c : ladder.couplings()) {
        int target = indexOfTarget(c.upper());
        if (c.lower() == ladder.start() && target >= 0) {
          links.add(new KernelData.Link(target, c.rabiReHertz() / 2, c.rabiImHertz() / 2));
        }
      }
    }
    return links;
  }

  private List<KernelData.Intermediate> intermediates() {
    List<KernelData.Intermediate> list = new ArrayList<>();
    for (int i = 0; i < ladder.size(); i++) {
      if (!ladder.isIntermediate(i)) {
        continue;
      }
      double re = 0;
      double im = 0;
      List<KernelData.Link> links = new ArrayList<>();
      for (Ladder.Coupling c : ladder.couplings()) {
        if (c.upper() == i && c.lower() == ladder.start()) {
          re = c.rabiReHertz() / 2;
          im = c.rabiImHertz() / 2;
        } else if (c.lower() == i && indexOfTarget(c.upper()) >= 0) {
          links.add(
              new KernelData.Link(
                  indexOfTarget(c.upper()), c.rabiReHertz() / 2, c.rabiImHertz() / 2));
        }
      }
      if (re != 0 || im != 0 || !links.isEmpty()) {
        Ladder.State s = ladder.states().get(i);
        list.add(new KernelData.Intermediate(s.energyHertz(), s.decayPerSecond(), re, im, links));
      }
    }
    return list;
  }

  private List<KernelData.Path> paths() {
    List<KernelData.Path> paths = new ArrayList<>();
    if (ladder.steps() == 2) {
      for (int t = 0; t < wanted.length; t++) {
        for (LadderBuilder.PartnerPath p : builder.partnerPaths(ladder.start(), wanted[t], 1)) {
          paths.add(new KernelData.Path(t, p.productRe() / 4, p.productIm() / 4, p.awayHertz()));
        }
      }
    }
    return paths;
  }

  private int indexOfTarget(int state) {
    for (int t = 0; t < wanted.length; t++) {
      if (wanted[t] == state) {
        return t;
      }
    }
    return -1;
  }
}
