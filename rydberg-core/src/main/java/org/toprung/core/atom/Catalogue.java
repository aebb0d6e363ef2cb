package org.toprung.core.atom;

import java.io.BufferedReader;
import java.io.IOException;
import java.io.InputStream;
import java.io.InputStreamReader;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.HashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.TreeSet;

/**
 * The rows of catalogue.csv with their sources resolved. Reading is strict: any row that is not
 * understood is an error that names file and line.
 */
final class Catalogue {
  private static final String HEADER =
      "species,quantity,level,value,uncertainty,unit,source,memory";
  private static final String BIBLIOGRAPHY_HEADER = "key,citation";

  private record Key(String species, Datum.Kind kind, String level) {}

  private final Map<Key, List<Datum>> rows;

  private Catalogue(Map<Key, List<Datum>> rows) {
    this.rows = rows;
  }

  /** The catalogue that comes with the library. */
  static Catalogue bundled() {
    return of(lines("catalogue.csv"), lines("bibliography.csv"));
  }

  static Catalogue of(List<String> catalogue, List<String> bibliography) {
    Map<String, String> sources = new HashMap<>();
    forEachRow(
        "bibliography.csv",
        bibliography,
        BIBLIOGRAPHY_HEADER,
        cells -> {
          if (sources.put(cells[0], cells[1]) != null) {
            throw Refusal.of("key \"%s\" occurs twice", cells[0]);
          }
        });
    Map<Key, List<Datum>> rows = new HashMap<>();
    Set<String> unused = new TreeSet<>(sources.keySet());
    forEachRow(
        "catalogue.csv",
        catalogue,
        HEADER,
        cells -> {
          Datum datum = datum(cells, sources);
          rows.computeIfAbsent(
                  new Key(datum.species(), datum.kind(), datum.level()), k -> new ArrayList<>())
              .add(datum);
          unused.remove(cells[6]);
        });
    if (!unused.isEmpty()) {
      throw Refusal.of("bibliography.csv: no row of catalogue.csv uses %s", unused);
    }
    rows.values().forEach(list -> list.sort(Comparator.comparingDouble(Datum::uncertainty)));
    return new Catalogue(rows);
  }

  private interface RowReader {
    void read(String[] cells);
  }

  private static void forEachRow(String file, List<String> lines, String header, RowReader reader) {
    int columns = header.split(",").length;
    boolean headerSeen = false;
    for (int i = 0; i < lines.size(); i++) {
      String line = lines.get(i);
      if (line.startsWith("#") || line.isBlank()) {
        continue;
      }
      try {
        if (!headerSeen) {
          if (!line.equals(header)) {
            throw Refusal.of("header must be \"%s\", given \"%s\"", header, line);
          }
          headerSeen = true;
          continue;
        }
        String[] cells = cells(line);
        if (cells.length != columns) {
          throw Refusal.of("row must have %d columns, given %d", columns, cells.length);
        }
        reader.read(cells);
      } catch (IllegalArgumentException e) {
        throw new IllegalArgumentException(file + ":" + (i + 1) + ": " + e.getMessage(), e);
      }
    }
    if (!headerSeen) {
      throw Refusal.of("%s: header \"%s\" is missing", file, header);
    }
  }

  /** The cells of a row; a cell in double quotes may hold commas. */
  private static String[] cells(String line) {
    List<String> cells = new ArrayList<>();
    StringBuilder cell = new StringBuilder();
    boolean quoted = false;
    for (int i = 0; i < line.length(); i++) {
      char c = line.charAt(i);
      if (c == '"') {
        quoted = !quoted;
      } else if (c == ',' && !quoted) {
        cells.add(cell.toString());
        cell.setLength(0);
      } else {
        cell.append(c);
      }
    }
    if (quoted) {
      throw Refusal.of("a quotation mark is not closed");
    }
    cells.add(cell.toString());
    return cells.toArray(new String[0]);
  }

  private static Datum datum(String[] cells, Map<String, String> sources) {
    String source = sources.get(cells[6]);
    if (source == null) {
      throw Refusal.of("source \"%s\" is not in bibliography.csv", cells[6]);
    }
    boolean memory =
        switch (cells[7]) {
          case "yes" -> true;
          case "no" -> false;
          default -> throw Refusal.of("memory must be yes or no, given \"%s\"", cells[7]);
        };
    return new Datum(
        cells[0],
        Datum.Kind.valueOf(cells[1].toUpperCase(Locale.ROOT)),
        cells[2],
        Double.parseDouble(cells[3]),
        Double.parseDouble(cells[4]),
        cells[5],
        source,
        memory);
  }

  private static List<String> lines(String resource) {
    try (InputStream stream = Catalogue.class.getResourceAsStream(resource);
        BufferedReader reader =
            new BufferedReader(new InputStreamReader(stream, StandardCharsets.UTF_8))) {
      return reader.lines().toList();
    } catch (IOException e) {
      throw new UncheckedIOException("cannot read " + resource, e);
    }
  }

  /** All rows of one kind of an isotope and of its element, isotope rows and best values first. */
  List<Datum> all(String isotope, Datum.Kind kind, String level) {
    List<Datum> found =
        new ArrayList<>(rows.getOrDefault(new Key(isotope, kind, level), List.of()));
    found.addAll(rows.getOrDefault(new Key(elementOf(isotope), kind, level), List.of()));
    return List.copyOf(found);
  }

  /** The preferred row. */
  Optional<Datum> best(String isotope, Datum.Kind kind, String level) {
    return all(isotope, kind, level).stream().findFirst();
  }

  /** Every row that applies to an isotope. */
  List<Datum> everything(String isotope) {
    return rows.values().stream()
        .flatMap(List::stream)
        .filter(d -> d.species().equals(isotope) || d.species().equals(elementOf(isotope)))
        .sorted(
            Comparator.comparing(Datum::kind)
                .thenComparing(Datum::level)
                .thenComparing(d -> d.species().equals(isotope) ? 0 : 1)
                .thenComparing(Datum::uncertainty))
        .toList();
  }

  /** The isotopes: whatever has a mass. */
  List<String> isotopes() {
    return rows.keySet().stream()
        .filter(k -> k.kind() == Datum.Kind.MASS)
        .map(Key::species)
        .sorted()
        .toList();
  }

  private static String elementOf(String isotope) {
    int dash = isotope.indexOf('-');
    return dash < 0 ? isotope : isotope.substring(0, dash);
  }
}
