package org.toprung.budget.scenario;

import java.io.UncheckedIOException;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.stream.Stream;
import org.toprung.budget.Budget;
import org.toprung.budget.bench.Bench;
import org.toprung.budget.pulse.Pulse;
import org.toprung.core.atom.Catalogue;
import org.toprung.core.atom.Level;
import org.toprung.core.atom.Species;
import org.toprung.core.atom.Sublevel;
import org.toprung.core.drive.Beam;
import org.toprung.core.drive.Drive;
import org.toprung.core.drive.DriveSetup;
import org.toprung.core.quantity.ElectricField;
import org.toprung.core.quantity.Frequency;
import org.toprung.core.quantity.Length;
import org.toprung.core.quantity.MagneticField;

/**
 * What a scenario file describes: a drive, a pulse and a bench.
 *
 * <pre>{@code
 * Scenario scenario = Scenario.read(Path.of("rubidium-two-photon.toml"));
 * Budget budget = scenario.budget();
 * }</pre>
 *
 * <p>Tables: {@code atom}, {@code field}, {@code start}, one to three of {@code step}, {@code
 * pulse} and, where something is known of the apparatus, {@code bench}. The last step has no
 * detuning of its own: the lasers sit on resonance with the target, light shifts compensated,
 * unless {@code pulse.offset} says otherwise. Without a {@code title} the file's name stands in.
 *
 * <p>Optional: {@code atom.values} names a file of one's own atomic values; {@code idle} names a
 * ground sublevel that is not driven, {@code trap} a beam that stays on during the pulse without
 * driving anything; in {@code field} a static {@code electric} field; in a {@code step} two waists
 * with a {@code waist_axis}, an {@code intensity} in place of power and waist, the {@code offset}
 * of the focus from the atom, and an {@code impurity} of the polarization with its {@code
 * impurity_phase_deg}.
 *
 * <p>{@code pulse.kind} is one of {@code pi}; {@code square}, {@code gaussian}, {@code blackman},
 * {@code sine-squared}, {@code bb1} and {@code corpse} (with {@code area_rad}, π if left out);
 * {@code ramsey} ({@code wait}, {@code phase_rad}); {@code echo} ({@code half_wait}, {@code
 * phase_rad}); {@code chirp} ({@code duration}, {@code sweep}, {@code smooth = true}); {@code
 * stirap} ({@code width}, {@code delay}, {@code shape} {@code sine-squared} or {@code gaussian});
 * {@code samples} ({@code spacing}, {@code goal}, and a {@code file} whose lines are amplitude,
 * detuning in Hz and phase in rad). All may have {@code offset}, {@code rise} and {@code fall}
 * together, {@code shaped_step} (from 1) and {@code hold_frequency = true}; see {@link Pulse}.
 *
 * <p>The keys of {@code bench} are those of {@link org.toprung.budget.bench.BenchValue#key()}: a
 * text with a unit, or a plain number from 0 to 0.5 for a ratio, one per step or axis in a list.
 * Either may have a standard uncertainty, {@code "6 ± 1 uK"} or {@code "0.004 +- 0.001"}. The
 * densities list one file per step or {@code "none"}; see {@link
 * org.toprung.budget.bench.NoiseDensity#parse}. Instead of a root mean square {@code
 * magnetic_noise_samples} and {@code electric_field_samples} name a file, {@code drift_samples} and
 * {@code intensity_noise_samples} one per step or {@code "none"}: on each line a deviation with its
 * unit, or a plain number for the intensity; in the list beside it such a step has 0. With {@code
 * motion_during_pulse = true} the atom flies through the beams.
 *
 * <p>Files are named relative to the scenario, in UTF-8; in each, empty lines and lines that begin
 * with # are skipped.
 *
 * <p>Immutable and thread-safe.
 */
public final class Scenario {
  private static final int MOST_STEPS = 3;
  private static final List<String> KEYS =
      List.of("title", "atom", "field", "start", "idle", "step", "trap", "pulse", "bench");
  private static final List<String> STEP_KEYS = joined(List.of("to", "detuning"), Beams.KEYS);
  private static final List<String> LAST_STEP_KEYS =
      joined(List.of("to", "mJ", "multipole"), Beams.KEYS);

  private static final List<String> TRAP_KEYS = joined(List.of("wavelength"), Beams.KEYS);

  private final Path file;
  private final List<Path> files;
  private final String title;
  private final DriveSetup setup;
  private final Drive drive;
  private final Pulse pulse;
  private final Bench bench;

  private Scenario(Path file, String text) {
    this.file = file;
    Table root = TomlFile.root(file, text).of(KEYS);
    this.title = root.optional("title").map(Scenario::title).orElseGet(() -> nameOf(file));
    Sources sources = new Sources(file);
    Species species = species(sources, root.table("atom", List.of("species", "values")));
    DriveSetup inField =
        field(root.table("field", List.of("magnetic", "electric")), Drive.of(species));
    DriveSetup started = start(root.table("start", List.of("level", "F", "mF")), species, inField);
    List<Table> steps = root.tables("step", MOST_STEPS, STEP_KEYS, LAST_STEP_KEYS);
    DriveSetup driven = steps(steps, species, started);
    DriveSetup qubit =
        root.optionalTable("idle", List.of("F", "mF"))
            .map(table -> idle(table, species, driven))
            .orElse(driven);
    this.setup =
        root.optionalTable("trap", TRAP_KEYS).map(table -> trap(table, qubit)).orElse(qubit);
    Table played = root.table("pulse", Pulses.KEYS);
    this.pulse = Pulses.read(sources, played, steps.size());
    this.bench = Benches.read(sources, root.optionalTable("bench", Benches.KEYS), steps.size());
    this.files = sources.files();
    this.drive = root.guarded("step", setup::resolve);
    Pulses.requirePlayable(played, pulse, steps.size(), drive.rabi());
  }

  /**
   * Reads a scenario file and resolves its drive.
   *
   * @param file a TOML file in UTF-8
   * @return the scenario
   * @throws ScenarioException if the file cannot be read, is not TOML, or says something unknown or
   *     impossible; the message gives file, line, key, what was given and what is allowed
   */
  public static Scenario read(Path file) {
    return new Scenario(file, TomlFile.text(file));
  }

  /**
   * Reads a scenario from text.
   *
   * @param toml the text of a scenario file
   * @param name what messages call it, and its title where it gives none
   * @return the scenario
   * @throws ScenarioException if the text is not TOML, or says something unknown or impossible
   */
  public static Scenario parse(String toml, String name) {
    return new Scenario(Path.of(name), toml);
  }

  private static List<String> joined(List<String> first, List<String> second) {
    return Stream.concat(first.stream(), second.stream()).toList();
  }

  private static String nameOf(Path file) {
    String name = String.valueOf(file.getFileName());
    return name.endsWith(".toml") ? name.substring(0, name.length() - ".toml".length()) : name;
  }

  private static String title(Value value) {
    String allowed = "one line of text";
    String text = value.text(allowed);
    if (text.isBlank() || text.codePoints().anyMatch(Shown::isControl)) {
      throw value.refused(allowed);
    }
    return text.strip();
  }

  /**
   * The species, with values of the user's own file, beside the scenario, laid over the library's.
   */
  private static Species species(Sources sources, Table atom) {
    Value name = atom.required("species", "text such as \"Rb-87\"");
    Optional<Value> values = atom.optional("values");
    if (values.isEmpty()) {
      return name.parsed(Species::parse, "Rb-87");
    }
    Path own = sources.named(values.get().text("the name of a file of values (CSV)"));
    Catalogue catalogue = values.get().guarded(() -> overlaid(own));
    return name.parsed(catalogue::species, "Rb-87");
  }

  private static Catalogue overlaid(Path own) {
    try {
      return Catalogue.bundled().with(own);
    } catch (UncheckedIOException e) {
      throw new IllegalArgumentException("the file " + own + " cannot be read", e);
    }
  }

  private static Level level(Value value, Species species) {
    Level level = value.parsed(Level::parse, "6P3/2");
    value.guarded(() -> species.requireValid(level));
    return level;
  }

  private static DriveSetup field(Table table, DriveSetup setup) {
    Value magnetic = table.required("magnetic", "text such as \"4 G\"");
    MagneticField size = magnetic.parsed(MagneticField::parse, "4 G");
    DriveSetup inField = magnetic.guarded(() -> setup.in(size));
    return table.optional("electric").map(v -> inElectricField(v, inField)).orElse(inField);
  }

  private static DriveSetup inElectricField(Value value, DriveSetup setup) {
    List<ElectricField> e =
        value.items(3, "a list of 3 texts such as \"10 V/m\", along x, y and z").stream()
            .map(v -> v.parsed(ElectricField::parse, "10 V/m"))
            .toList();
    return setup.inElectricField(e.get(0), e.get(1), e.get(2));
  }

  private static DriveSetup start(Table table, Species species, DriveSetup setup) {
    Value at = table.required("level", "text such as \"5S1/2\"");
    Sublevel start = sublevel(table, level(at, species), species);
    return at.guarded(() -> setup.from(start));
  }

  private static DriveSetup idle(Table table, Species species, DriveSetup setup) {
    Sublevel idle = sublevel(table, species.groundLevel(), species);
    return table.guarded(() -> setup.idling(idle));
  }

  private static Sublevel sublevel(Table table, Level level, Species species) {
    String number = "an integer or half-integer such as 2 or 2.5";
    Value f = table.required("F", number);
    double total = f.number(number);
    // the stretched sublevel tells whether F alone is possible
    f.guarded(() -> species.requireValid(Sublevel.hyperfine(level, total, total)));
    Value m = table.required("mF", number);
    return m.guarded(() -> Sublevel.hyperfine(level, total, m.number(number)));
  }

  private static DriveSetup trap(Table table, DriveSetup setup) {
    Value wavelength = table.required("wavelength", "text such as \"852 nm\"");
    Length vacuum = wavelength.parsed(Length::parse, "852 nm");
    if (!(vacuum.metres() > 0)) {
      throw wavelength.refused("a vacuum wavelength above zero");
    }
    return table.guarded(() -> setup.trappedBy(Beams.read(table), vacuum));
  }

  private static DriveSetup steps(List<Table> tables, Species species, DriveSetup started) {
    DriveSetup setup = started;
    List<Frequency> detunings = new ArrayList<>();
    for (Table table : tables.subList(0, tables.size() - 1)) {
      Level to = level(table.required("to", "text such as \"6P3/2\""), species);
      detunings.add(
          table
              .required("detuning", "text such as \"1.2 GHz\"")
              .parsed(Frequency::parse, "1.2 GHz"));
      DriveSetup below = setup;
      setup = table.guarded(() -> below.step(to, Beams.read(table)));
    }
    return lastStep(tables.get(tables.size() - 1), tables.size() == 1, species, setup)
        .detuned(detunings.toArray(Frequency[]::new));
  }

  private static DriveSetup lastStep(
      Table table, boolean single, Species species, DriveSetup setup) {
    Level to = level(table.required("to", "text such as \"68S1/2\""), species);
    String number = "a half-integer such as 0.5";
    Value m = table.required("mJ", number);
    Sublevel target = m.guarded(() -> Sublevel.fine(to, m.number(number)));
    boolean quadrupole =
        table.optional("multipole").map(v -> isQuadrupole(v, single)).orElse(false);
    Beam beam = Beams.read(table);
    return table.guarded(
        () -> quadrupole ? setup.quadrupoleStep(target, beam) : setup.step(target, beam));
  }

  private static boolean isQuadrupole(Value multipole, boolean single) {
    String allowed = "\"E1\" or, for a single step, \"E2\"";
    String kind = multipole.text(allowed);
    if (kind.equals("E1") || single && kind.equals("E2")) {
      return kind.equals("E2");
    }
    throw multipole.refused(allowed);
  }

  /**
   * Composes the budget of the pulse on the bench.
   *
   * @return the budget
   * @throws ScenarioException if the budget cannot be had for this drive, for want of atomic data
   *     for example, or because the pulse sweeps too fast to be followed; the message gives the
   *     file and says why
   */
  public Budget budget() {
    try {
      return Budget.of(drive, pulse).on(bench).compose();
    } catch (IllegalArgumentException | ArithmeticException e) {
      throw ScenarioException.ofFile(file, "no budget: " + e.getMessage(), e);
    }
  }

  /**
   * The files that the scenario was read from.
   *
   * @return its own file, or the name that was given with a text, and then every file that it
   *     names, each as a path relative to the same place
   */
  public List<Path> files() {
    return files;
  }

  /**
   * What the scenario is called.
   *
   * @return one line of text
   */
  public String title() {
    return title;
  }

  /**
   * The drive as described, for variations on it.
   *
   * @return the description
   */
  public DriveSetup setup() {
    return setup;
  }

  /**
   * The drive, resolved.
   *
   * @return the drive
   */
  public Drive drive() {
    return drive;
  }

  /**
   * The pulse.
   *
   * @return the pulse
   */
  public Pulse pulse() {
    return pulse;
  }

  /**
   * The disturbances; what the file does not give is not in it.
   *
   * @return the bench
   */
  public Bench bench() {
    return bench;
  }
}
