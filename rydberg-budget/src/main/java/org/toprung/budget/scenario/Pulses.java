package org.toprung.budget.scenario;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.function.DoubleFunction;
import java.util.function.Function;
import java.util.stream.Collectors;
import java.util.stream.Stream;
import org.toprung.budget.pulse.Goal;
import org.toprung.budget.pulse.Pulse;
import org.toprung.core.quantity.Frequency;
import org.toprung.core.quantity.Time;

/** Reads the pulse: its kind, what that kind needs, and what any pulse may have. */
final class Pulses {
  private static final String AREA = "area_rad";
  private static final List<String> COMMON =
      List.of("offset", "rise", "fall", "shaped_step", "hold_frequency");

  /**
   * One kind of pulse.
   *
   * @param keys what it has of its own
   * @param reader makes it
   */
  private record Kind(List<String> keys, Function<Pulses, Pulse> reader) {}

  private static final Map<String, Kind> KINDS = kinds();

  static final List<String> KEYS =
      Stream.of(
              Stream.of("kind"),
              COMMON.stream(),
              KINDS.values().stream().flatMap(k -> k.keys().stream()).distinct())
          .flatMap(keys -> keys)
          .toList();

  private final Sources sources;
  private final Table table;
  private final int steps;

  private Pulses(Sources sources, Table table, int steps) {
    this.sources = sources;
    this.table = table;
    this.steps = steps;
  }

  private static Map<String, Kind> kinds() {
    Map<String, Kind> kinds = new LinkedHashMap<>();
    kinds.put("pi", new Kind(List.of(), p -> Pulse.pi()));
    kinds.put("square", ofArea(Pulse::square));
    kinds.put("gaussian", ofArea(Pulse::gaussian));
    kinds.put("blackman", ofArea(Pulse::blackman));
    kinds.put("sine-squared", ofArea(Pulse::sineSquared));
    kinds.put("bb1", ofArea(Pulse::bb1));
    kinds.put("corpse", ofArea(Pulse::corpse));
    kinds.put("ramsey", new Kind(List.of("wait", "phase_rad"), p -> p.coherence("wait")));
    kinds.put("echo", new Kind(List.of("half_wait", "phase_rad"), p -> p.coherence("half_wait")));
    kinds.put("chirp", new Kind(List.of("duration", "sweep", "smooth"), Pulses::chirp));
    kinds.put("stirap", new Kind(List.of("width", "delay", "shape"), Pulses::stirap));
    kinds.put("samples", new Kind(List.of("spacing", "file", "goal"), Pulses::samples));
    return kinds;
  }

  private static Kind ofArea(DoubleFunction<Pulse> maker) {
    return new Kind(List.of(AREA), p -> p.ofAreaOrPi(maker));
  }

  static Pulse read(Sources sources, Table table, int steps) {
    String names =
        KINDS.keySet().stream().map(k -> "\"" + k + "\"").collect(Collectors.joining(", "));
    Value name = table.required("kind", names);
    Kind kind = KINDS.get(name.text(names));
    if (kind == null) {
      throw name.refused(names);
    }
    Table own =
        table.of(
            name,
            Stream.of(Stream.of("kind"), kind.keys().stream(), COMMON.stream())
                .flatMap(keys -> keys)
                .toList());
    Pulses reader = new Pulses(sources, own, steps);
    return reader.withOptions(kind.reader().apply(reader), name);
  }

  private Pulse ofAreaOrPi(DoubleFunction<Pulse> maker) {
    return table
        .optional(AREA)
        .map(
            v -> {
              double area = v.number("a number of radians above 0");
              return v.guarded(() -> maker.apply(area));
            })
        .orElseGet(() -> maker.apply(Math.PI));
  }

  private Pulse coherence(String waitKey) {
    Value wait = table.required(waitKey, "text such as \"2 us\"");
    Time time = wait.parsed(Time::parse, "2 us");
    double phase =
        table.optional("phase_rad").map(v -> v.number("a finite number of radians")).orElse(0.0);
    return wait.guarded(
        () -> waitKey.equals("wait") ? Pulse.ramsey(time, phase) : Pulse.echo(time, phase));
  }

  private Pulse chirp() {
    Value duration = table.required("duration", "text such as \"3 us\"");
    Time time = duration.parsed(Time::parse, "3 us");
    Value sweep = table.required("sweep", "text such as \"20 MHz\", or a negative one");
    Frequency range = sweep.parsed(Frequency::parse, "20 MHz");
    boolean smooth = table.optional("smooth").map(Value::flag).orElse(false);
    if (!(time.seconds() > 0)) {
      throw duration.refused("a duration above zero");
    }
    return sweep.guarded(
        () -> smooth ? Pulse.chirpedSmoothly(time, range) : Pulse.chirped(time, range));
  }

  private Pulse stirap() {
    String allowed = "\"sine-squared\" or \"gaussian\"";
    Optional<Value> shape = table.optional("shape");
    String form = shape.map(v -> v.text(allowed)).orElse("sine-squared");
    if (!form.equals("sine-squared") && !form.equals("gaussian")) {
      throw shape.orElseThrow().refused(allowed);
    }
    Value width = table.required("width", "text such as \"2 us\"");
    Time length = width.parsed(Time::parse, "2 us");
    if (!(length.seconds() > 0)) {
      throw width.refused("a width above zero");
    }
    Value delay = table.required("delay", "text such as \"500 ns\"");
    Time later = delay.parsed(Time::parse, "500 ns");
    return delay.guarded(
        () ->
            form.equals("gaussian")
                ? Pulse.gaussianStirap(length, later)
                : Pulse.stirap(length, later));
  }

  private Pulse samples() {
    Value spacing = table.required("spacing", "text such as \"10 ns\"");
    Time slice = spacing.parsed(Time::parse, "10 ns");
    if (!(slice.seconds() > 0)) {
      throw spacing.refused("a spacing above zero");
    }
    Goal goal = goal();
    String columns = "amplitude, detuning in Hz and phase in rad";
    Value name = table.required("file", "the name of a file of " + columns);
    List<double[]> rows = DataFile.named(name, sources, columns).lines(Pulses::row);
    double[][] all = new double[3][rows.size()];
    for (int i = 0; i < rows.size(); i++) {
      for (int c = 0; c < 3; c++) {
        all[c][i] = rows.get(i)[c];
      }
    }
    return name.guarded(() -> Pulse.samples(slice, all[0], all[1], all[2], goal));
  }

  private Goal goal() {
    Map<String, Goal> goals =
        Arrays.stream(Goal.values())
            .collect(
                Collectors.toMap(
                    g -> g.name().toLowerCase(Locale.ROOT),
                    g -> g,
                    (a, b) -> a,
                    LinkedHashMap::new));
    String names =
        goals.keySet().stream().map(g -> "\"" + g + "\"").collect(Collectors.joining(", "));
    Value value = table.required("goal", names);
    Goal goal = goals.get(value.text(names));
    if (goal == null) {
      throw value.refused(names);
    }
    return goal;
  }

  private static double[] row(String line) {
    String[] columns = line.split("\\s*[,;]\\s*|\\s+");
    if (columns.length != 3) {
      throw new IllegalArgumentException(
          "allowed: three numbers, amplitude, detuning in Hz and phase in rad");
    }
    double[] row = Arrays.stream(columns).mapToDouble(Stated::number).toArray();
    if (!(row[0] >= 0 && row[0] <= 1)) {
      throw new IllegalArgumentException("allowed: an amplitude from 0 to 1");
    }
    return row;
  }

  private Pulse withOptions(Pulse plain, Value kind) {
    if (!plain.isTwoLevel() && steps != 2) {
      throw kind.refused("\"stirap\" only with two steps");
    }
    Pulse pulse = plain;
    Optional<Value> offset = table.optional("offset");
    if (offset.isPresent()) {
      pulse = pulse.offsetBy(offset.get().parsed(Frequency::parse, "10 kHz"));
    }
    pulse = withEdges(pulse);
    Optional<Value> step = table.optional("shaped_step");
    if (step.isPresent()) {
      String allowed = steps == 1 ? "1" : "a whole number from 1 to " + steps;
      double number = step.get().number(allowed);
      if (!(number >= 1 && number <= steps && number == Math.rint(number))) {
        throw step.get().refused(allowed);
      }
      Pulse before = pulse;
      pulse = step.get().guarded(() -> before.shapingStep((int) number - 1));
    }
    Optional<Value> hold = table.optional("hold_frequency");
    if (hold.map(Value::flag).orElse(false)) {
      Pulse before = pulse;
      pulse = hold.get().guarded(before::holdingFrequency);
    }
    return pulse;
  }

  private Pulse withEdges(Pulse pulse) {
    if (table.optional("rise").isEmpty() && table.optional("fall").isEmpty()) {
      return pulse;
    }
    List<Time> edges = new ArrayList<>();
    for (String key : List.of("rise", "fall")) {
      Time edge =
          table
              .required(key, "text such as \"20 ns\", for rise and fall together")
              .parsed(Time::parse, "20 ns");
      if (!(edge.seconds() >= 0)) {
        throw table.required(key, "").refused("a time of at least zero");
      }
      edges.add(edge);
    }
    return pulse.withEdges(edges.get(0), edges.get(1));
  }

  /** Refuses a pulse too long, or edges too slow for it, which only the drive tells. */
  static void requirePlayable(Table table, Pulse pulse, int steps, Frequency rabi) {
    Pulse abrupt = pulse.withEdges(Time.ofSeconds(0), Time.ofSeconds(0));
    table.required("kind", "").guarded(() -> abrupt.program(steps, rabi));
    table.optional("rise").ifPresent(v -> v.guarded(() -> pulse.program(steps, rabi)));
  }
}
