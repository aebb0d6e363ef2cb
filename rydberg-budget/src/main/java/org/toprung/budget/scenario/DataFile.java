package org.toprung.budget.scenario;

import java.util.ArrayList;
import java.util.List;
import java.util.function.Function;
import org.toprung.budget.bench.NoiseDensity;

/**
 * A file of measured data beside the scenario, named by one of its values: one entry per line;
 * empty lines and lines that begin with # are skipped. Refusals name the scenario's key and line,
 * and the data file's name and line.
 */
final class DataFile {
  private static final int LARGEST = 10_000_000; // bytes
  private static final int LONGEST = 60; // characters of a line in a message

  private final Value value;
  private final String name;
  private final String text;

  private DataFile(Value value, String name, String text) {
    this.value = value;
    this.name = name;
    this.text = text;
  }

  /**
   * The file that a value names.
   *
   * @param sources the files of the scenario
   * @param kind what the file holds, for messages
   */
  static DataFile named(Value value, Sources sources, String kind) {
    String name = value.text("the name of a file of " + kind);
    if (name.isBlank()) {
      throw value.refused("the name of a file of " + kind);
    }
    return value.guarded(
        () -> {
          try {
            return new DataFile(
                value, name, TextFile.read(sources.named(name), "text file", LARGEST));
          } catch (IllegalArgumentException e) {
            throw new IllegalArgumentException(name + ": " + e.getMessage(), e);
          }
        });
  }

  NoiseDensity density() {
    return value.guarded(() -> NoiseDensity.parse(text, name));
  }

  /** What each line says; the reader refuses a line by an IllegalArgumentException. */
  <T> List<T> lines(Function<String, T> reader) {
    return value.guarded(() -> read(reader));
  }

  private <T> List<T> read(Function<String, T> reader) {
    List<T> entries = new ArrayList<>();
    int line = 0;
    for (String raw : text.split("\n", -1)) {
      line++;
      String content = raw.strip();
      if (content.isEmpty() || content.startsWith("#")) {
        continue;
      }
      try {
        entries.add(reader.apply(content));
      } catch (IllegalArgumentException e) {
        throw new IllegalArgumentException(
            name + ", line " + line + ": given \"" + shown(content) + "\"; " + e.getMessage(), e);
      }
    }
    if (entries.isEmpty()) {
      throw new IllegalArgumentException(name + ": given no entries; allowed: at least one");
    }
    return entries;
  }

  private static String shown(String content) {
    return content.length() <= LONGEST ? content : content.substring(0, LONGEST) + "...";
  }
}
