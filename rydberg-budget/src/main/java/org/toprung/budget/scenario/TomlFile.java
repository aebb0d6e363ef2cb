package org.toprung.budget.scenario;

import com.fasterxml.jackson.core.JsonProcessingException;
import com.fasterxml.jackson.databind.JsonNode;
import com.fasterxml.jackson.databind.node.ObjectNode;
import com.fasterxml.jackson.dataformat.toml.TomlMapper;
import java.nio.file.Path;

/** Turns a file into a tree of TOML values, or says on one line why it cannot. */
final class TomlFile {
  private static final int LARGEST = 1_000_000; // bytes; a scenario has about a thousand

  private TomlFile() {}

  static String text(Path file) {
    try {
      return TextFile.read(file, "TOML file", LARGEST);
    } catch (IllegalArgumentException e) {
      throw ScenarioException.ofFile(file, e.getMessage(), e);
    }
  }

  static Table root(Path file, String text) {
    String toml = TextFile.withoutByteOrderMark(text);
    return Table.root(file, tree(file, toml), TomlPlaces.of(toml));
  }

  private static ObjectNode tree(Path file, String toml) {
    try {
      JsonNode tree = new TomlMapper().readTree(toml);
      if (tree instanceof ObjectNode table) {
        return table;
      }
      throw ScenarioException.ofFile(file, "is empty; allowed: a scenario in TOML", null);
    } catch (JsonProcessingException e) {
      int line = e.getLocation() == null ? Place.NO_LINE : e.getLocation().getLineNr();
      throw ScenarioException.ofLine(
          file, line, e.getOriginalMessage() + "; allowed: valid TOML, each key once", e);
    }
  }
}
