package org.toprung.core.atom;

import java.io.BufferedReader;
import java.io.IOException;
import java.io.InputStream;
import java.io.InputStreamReader;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.HashMap;
import java.util.HashSet;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.TreeMap;
import java.util.TreeSet;
import java.util.concurrent.ConcurrentHashMap;
import java.util.stream.Collectors;

/**
 * Measured values with their sources: the files that come with the library, one for each element
 * and read when the element is first asked for, and files of the user laid over them. Reading is
 * strict: a row that is not understood, is out of range, has no source or is given twice is an
 * error that names file and line. Immutable to the outside, thread-safe.
 *
 * <p><b>Format.</b> Comma-separated, header {@code
 * species,quantity,level,value,uncertainty,unit,source,memory,chosen_because}; lines that start
 * with # are comments, a cell in double quotes may hold commas. The quantities are the names of
 * {@link Datum.Kind} in small letters. Where rows of one species give the same quantity of the same
 * level, exactly one says in {@code chosen_because} why it is the one in use. The source is a key
 * of the bibliography; a user's file may also give the citation itself, in more than one word.
 *
 * <p><b>Precedence.</b> A user's file goes before the files it is laid over, rows of an isotope go
 * before those of its element, the chosen row before others. A quantum-defect series is taken whole
 * from the source of its constant term. All rows stay visible through {@link Species#data()}, with
 * the file and line they come from.
 */
public final class Catalogue {
  private static final String HEADER =
      "species,quantity,level,value,uncertainty,unit,source,memory,chosen_because";
  private static final String BIBLIOGRAPHY_HEADER = "key,citation";
  private static final String ELEMENTS_HEADER = "element,file";

  private record Key(String species, Datum.Kind kind, String level) {
    // by hand: those of a record are slow to start
    @Override
    public boolean equals(Object other) {
      return other instanceof Key that
          && that.species.equals(species)
          && that.kind.equals(kind)
          && that.level.equals(level);
    }

    @Override
    public int hashCode() {
      return 31 * (31 * species.hashCode() + kind.hashCode()) + level.hashCode();
    }
  }

  private static final class Bundled {
    static final Catalogue CATALOGUE =
        new Catalogue(
            files(lines("elements.csv")), citations("bibliography.csv", lines("bibliography.csv")));
  }

  private final Map<String, String> elementFiles;
  private final Map<String, String> citations;

  /** Rows of the bundled files by element, filled on demand. */
  private final Map<String, Map<Key, List<Datum>>> elements;

  /** Rows of user files, the one that goes first in front. */
  private final List<Map<Key, List<Datum>>> overlays;

  private final Map<String, Species> species = new ConcurrentHashMap<>();

  private Catalogue(Map<String, String> elementFiles, Map<String, String> citations) {
    this.elementFiles = elementFiles;
    this.citations = citations;
    this.elements = new ConcurrentHashMap<>();
    this.overlays = List.of();
  }

  private Catalogue(Catalogue below, Map<Key, List<Datum>> overlay) {
    this.elementFiles = below.elementFiles;
    this.citations = below.citations;
    this.elements = below.elements;
    List<Map<Key, List<Datum>>> all = new ArrayList<>();
    all.add(overlay);
    all.addAll(below.overlays);
    this.overlays = List.copyOf(all);
  }

  /**
   * The catalogue that comes with the library.
   *
   * @return the catalogue
   */
  public static Catalogue bundled() {
    return Bundled.CATALOGUE;
  }

  /**
   * This catalogue with the rows of a file laid over it.
   *
   * @param file a file in the format of this class, UTF-8
   * @return a new catalogue; this one stays as it is
   * @throws IllegalArgumentException if a row is refused; the message begins with file and line
   * @throws UncheckedIOException if the file cannot be read
   */
  public Catalogue with(Path file) {
    try {
      return with(file.toString(), Files.readAllLines(file, StandardCharsets.UTF_8));
    } catch (IOException e) {
      throw new UncheckedIOException("cannot read " + file, e);
    }
  }

  Catalogue with(String file, List<String> lines) {
    Map<Key, List<Datum>> overlay = rows(file, lines, citations, true, new HashSet<>());
    Catalogue catalogue = new Catalogue(this, overlay);
    catalogue.requireKnown(overlay);
    return catalogue;
  }

  /**
   * The isotope of a name with the values of this catalogue.
   *
   * @param name element symbol, hyphen, mass number, for example "Rb-87"; "H" for hydrogen
   * @return the species; one instance for each name
   * @throws IllegalArgumentException if the name is not known, the message lists the known ones; or
   *     if a value that every isotope needs is missing
   */
  public Species species(String name) {
    Species known = species.get(name);
    if (known != null) {
      return known;
    }
    if (!isIsotope(name)) {
      throw Refusal.of(
          "species \"%s\" is not known; known: %s", name, String.join(", ", isotopes()));
    }
    Species made = new Species(name, this);
    Species raced = species.putIfAbsent(name, made);
    return raced == null ? made : raced;
  }

  private boolean isIsotope(String name) {
    Optional<Datum> mass = best(name, Datum.Kind.MASS, "");
    return mass.isPresent() && mass.get().species().equals(name);
  }

  /** Refuses rows that would change nothing, as those of a misspelt isotope. */
  private void requireKnown(Map<Key, List<Datum>> overlay) {
    Set<String> elementsKnown = new HashSet<>(elementFiles.keySet());
    isotopes().forEach(isotope -> elementsKnown.add(elementOf(isotope)));
    for (List<Datum> list : overlay.values()) {
      Datum datum = list.get(0);
      if (!elementsKnown.contains(datum.species()) && !isIsotope(datum.species())) {
        throw Refusal.of(
            "%s: species \"%s\" is neither an element nor an isotope with a mass; known: %s",
            datum.origin(), datum.species(), String.join(", ", isotopes()));
      }
    }
  }

  /**
   * The isotopes: whatever has a mass of its own.
   *
   * @return their names, sorted
   */
  public List<String> isotopes() {
    Set<String> found = new TreeSet<>();
    elementFiles.keySet().forEach(element -> addIsotopes(found, bundled(element)));
    overlays.forEach(rows -> addIsotopes(found, rows));
    return List.copyOf(found);
  }

  private static void addIsotopes(Set<String> found, Map<Key, List<Datum>> rows) {
    for (Key key : rows.keySet()) {
      if (key.kind() == Datum.Kind.MASS) {
        found.add(key.species());
      }
    }
  }

  /** Citations of the bibliography that no bundled row uses. */
  Set<String> unusedSources() {
    Set<String> unused = new TreeSet<>(citations.values());
    for (String element : elementFiles.keySet()) {
      bundled(element).values().forEach(list -> list.forEach(d -> unused.remove(d.source())));
    }
    return unused;
  }

  private Map<Key, List<Datum>> bundled(String element) {
    String file = elementFiles.get(element);
    return file == null
        ? Map.of()
        : elements.computeIfAbsent(
            element, e -> rows(file, lines(file), citations, false, new HashSet<>()));
  }

  /** All rows of one kind for an isotope, the one in use first. */
  List<Datum> all(String isotope, Datum.Kind kind, String level) {
    String element = elementOf(isotope);
    Key own = new Key(isotope, kind, level);
    Key shared = new Key(element, kind, level);
    List<Datum> found = new ArrayList<>();
    for (Map<Key, List<Datum>> rows : overlays) {
      collect(found, rows, own, shared);
    }
    collect(found, bundled(element), own, shared);
    return found;
  }

  private static void collect(List<Datum> found, Map<Key, List<Datum>> rows, Key own, Key shared) {
    found.addAll(rows.getOrDefault(own, List.of()));
    if (!own.equals(shared)) {
      found.addAll(rows.getOrDefault(shared, List.of()));
    }
  }

  /** The row in use. */
  Optional<Datum> best(String isotope, Datum.Kind kind, String level) {
    List<Datum> found = all(isotope, kind, level);
    return found.isEmpty() ? Optional.empty() : Optional.of(found.get(0));
  }

  /** Every row that applies to an isotope, by kind and level, the one in use first. */
  List<Datum> everything(String isotope) {
    String element = elementOf(isotope);
    Map<Datum.Kind, Set<String>> levels = new TreeMap<>();
    List<Map<Key, List<Datum>>> layers = new ArrayList<>(overlays);
    layers.add(bundled(element));
    for (Map<Key, List<Datum>> rows : layers) {
      for (Key key : rows.keySet()) {
        if (key.species().equals(isotope) || key.species().equals(element)) {
          levels.computeIfAbsent(key.kind(), k -> new TreeSet<>()).add(key.level());
        }
      }
    }
    List<Datum> found = new ArrayList<>();
    for (Map.Entry<Datum.Kind, Set<String>> entry : levels.entrySet()) {
      for (String level : entry.getValue()) {
        found.addAll(all(isotope, entry.getKey(), level));
      }
    }
    return List.copyOf(found);
  }

  private static String elementOf(String isotope) {
    int dash = isotope.indexOf('-');
    return dash < 0 ? isotope : isotope.substring(0, dash);
  }

  private interface RowReader {
    void read(String[] cells, String origin);
  }

  private static Map<String, String> files(List<String> lines) {
    Map<String, String> files = new TreeMap<>();
    forEachRow("elements.csv", lines, ELEMENTS_HEADER, (cells, o) -> files.put(cells[0], cells[1]));
    return files;
  }

  static Map<String, String> citations(String file, List<String> lines) {
    Map<String, String> citations = new HashMap<>();
    forEachRow(
        file,
        lines,
        BIBLIOGRAPHY_HEADER,
        (cells, origin) -> {
          if (cells[1].isBlank() || citations.put(cells[0], cells[1]) != null) {
            throw Refusal.of("key \"%s\" occurs twice or has no citation", cells[0]);
          }
        });
    return citations;
  }

  private static Map<Key, List<Datum>> rows(
      String file,
      List<String> lines,
      Map<String, String> citations,
      boolean citationAllowed,
      Set<String> seen) {
    Map<Key, List<Datum>> rows = new HashMap<>();
    forEachRow(
        file,
        lines,
        HEADER,
        (cells, origin) -> {
          Datum datum = datum(cells, source(cells[6], citations, citationAllowed), origin);
          if (!seen.add(cells[0] + "," + cells[1] + "," + datum.level() + "," + datum.source())) {
            throw Refusal.of(
                "%s of %s %s is given twice from the same source",
                cells[1], cells[0], datum.level());
          }
          rows.computeIfAbsent(
                  new Key(datum.species(), datum.kind(), datum.level()), k -> new ArrayList<>())
              .add(datum);
        });
    for (List<Datum> list : rows.values()) {
      requireOneChosen(list);
      if (list.size() > 1) {
        list.sort(Comparator.comparingInt(d -> d.chosenBecause().isEmpty() ? 1 : 0));
      }
    }
    return rows;
  }

  /** Later coefficients of a series follow the choice of its constant term. */
  private static void requireOneChosen(List<Datum> list) {
    Datum last = list.get(list.size() - 1);
    int chosen = 0;
    for (Datum datum : list) {
      chosen += datum.chosenBecause().isEmpty() ? 0 : 1;
    }
    int wanted = list.size() == 1 || last.kind().isHigherCoefficient() ? 0 : 1;
    if (chosen != wanted) {
      throw Refusal.of(
          "%s: %s of %s %s has %d rows, so %d of them must say why it is chosen, given %d",
          last.origin(),
          last.kind().name().toLowerCase(Locale.ROOT),
          last.species(),
          last.level(),
          list.size(),
          wanted,
          chosen);
    }
  }

  private static String source(String cell, Map<String, String> citations, boolean allowed) {
    String citation = citations.get(cell);
    if (citation != null) {
      return citation;
    }
    if (allowed && cell.strip().contains(" ")) {
      return cell.strip();
    }
    throw Refusal.of(
        "source \"%s\" is not in bibliography.csv%s",
        cell, allowed ? ", and is no citation of more than one word" : "");
  }

  private static void forEachRow(String file, List<String> lines, String header, RowReader reader) {
    int columns = header.split(",").length;
    boolean headerSeen = false;
    for (int i = 0; i < lines.size(); i++) {
      String line = lines.get(i);
      if (line.startsWith("#") || line.isBlank()) {
        continue;
      }
      String origin = file + ":" + (i + 1);
      try {
        if (!headerSeen) {
          if (!line.equals(header)) {
            throw Refusal.of("header must be \"%s\", given \"%s\"", header, line);
          }
          headerSeen = true;
          continue;
        }
        String[] cells = cells(line, columns);
        reader.read(cells, origin);
      } catch (IllegalArgumentException e) {
        throw new IllegalArgumentException(origin + ": " + e.getMessage(), e);
      }
    }
    if (!headerSeen) {
      throw Refusal.of("%s: header \"%s\" is missing", file, header);
    }
  }

  /** The cells of a row; a cell in double quotes may hold commas. */
  private static String[] cells(String line, int columns) {
    List<String> cells = new ArrayList<>(columns);
    int start = 0;
    boolean quoted = false;
    boolean wasQuoted = false;
    for (int i = 0; i <= line.length(); i++) {
      char c = i < line.length() ? line.charAt(i) : ',';
      if (c == '"') {
        quoted = !quoted;
        wasQuoted = true;
      } else if (c == ',' && !(quoted && i < line.length())) {
        String cell = line.substring(start, i);
        cells.add(wasQuoted ? cell.replace("\"", "") : cell);
        start = i + 1;
        wasQuoted = false;
      }
    }
    if (quoted) {
      throw Refusal.of("a quotation mark is not closed");
    }
    if (cells.size() != columns) {
      throw Refusal.of("row must have %d columns, given %d", columns, cells.size());
    }
    return cells.toArray(new String[0]);
  }

  private static Datum datum(String[] cells, String source, String origin) {
    boolean memory =
        switch (cells[7]) {
          case "yes" -> true;
          case "no" -> false;
          default -> throw Refusal.of("memory must be yes or no, given \"%s\"", cells[7]);
        };
    return new Datum(
        cells[0],
        kind(cells[1]),
        cells[2],
        number("value", cells[3]),
        number("uncertainty", cells[4]),
        cells[5],
        source,
        memory,
        cells[8].strip(),
        origin);
  }

  private static Datum.Kind kind(String cell) {
    try {
      return Datum.Kind.valueOf(cell.toUpperCase(Locale.ROOT));
    } catch (IllegalArgumentException e) {
      throw Refusal.of(
          "quantity \"%s\" is not known; known: %s",
          cell,
          Arrays.stream(Datum.Kind.values())
              .map(k -> k.name().toLowerCase(Locale.ROOT))
              .collect(Collectors.joining(", ")));
    }
  }

  private static double number(String name, String cell) {
    try {
      return Double.parseDouble(cell);
    } catch (NumberFormatException e) {
      throw Refusal.of("%s must be a number, given \"%s\"", name, cell);
    }
  }

  private static List<String> lines(String resource) {
    try (InputStream stream = Catalogue.class.getResourceAsStream(resource);
        BufferedReader reader =
            new BufferedReader(new InputStreamReader(stream, StandardCharsets.UTF_8))) {
      List<String> lines = new ArrayList<>();
      for (String line = reader.readLine(); line != null; line = reader.readLine()) {
        lines.add(line);
      }
      return lines;
    } catch (IOException e) {
      throw new UncheckedIOException("cannot read " + resource, e);
    }
  }
}
