package org.toprung.budget.scenario;

import com.fasterxml.jackson.databind.JsonNode;
import com.fasterxml.jackson.databind.node.ObjectNode;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Iterator;
import java.util.List;
import java.util.Optional;
import java.util.function.Supplier;

/** One table of a scenario. It refuses keys that nobody would read. */
final class Table {
  private final Path file;
  private final String path; // empty for the root
  private final ObjectNode node;
  private final Place place;

  private Table(Path file, String path, ObjectNode node, Place place) {
    this.file = file;
    this.path = path;
    this.node = node;
    this.place = place;
  }

  static Table root(Path file, ObjectNode node, Place place) {
    return new Table(file, "", node, place);
  }

  /** This table, if it has no other keys than these. */
  Table of(List<String> allowed) {
    return of("unknown key; allowed: ", allowed);
  }

  private Table of(String complaint, List<String> allowed) {
    for (Iterator<String> names = node.fieldNames(); names.hasNext(); ) {
      String name = names.next();
      if (!allowed.contains(name)) {
        throw ScenarioException.ofKey(
            file,
            place.child(name).line(),
            keyOf(name),
            complaint + String.join(", ", allowed),
            null);
      }
    }
    return this;
  }

  /** This table, if it has no other keys than those that go with one of its values. */
  Table of(Value kind, List<String> allowed) {
    return of("no key of a " + path + " of kind " + kind + "; allowed: ", allowed);
  }

  private String keyOf(String name) {
    return path.isEmpty() ? name : path + "." + name;
  }

  Value required(String name, String allowed) {
    return optional(name).orElseThrow(() -> missing(name, allowed));
  }

  Optional<Value> optional(String name) {
    return Optional.ofNullable(node.get(name)).map(n -> value(name, n));
  }

  private Value value(String name, JsonNode found) {
    return new Value(file, keyOf(name), found, place.child(name));
  }

  Table table(String name, List<String> allowed) {
    return optionalTable(name, allowed)
        .orElseThrow(
            () ->
                missing(
                    name, "a table [" + name + "] with the keys " + String.join(", ", allowed)));
  }

  Optional<Table> optionalTable(String name, List<String> allowed) {
    JsonNode found = node.get(name);
    if (found == null) {
      return Optional.empty();
    }
    if (found instanceof ObjectNode table) {
      return Optional.of(new Table(file, keyOf(name), table, place.child(name)).of(allowed));
    }
    throw value(name, found).refused("one table [" + name + "]");
  }

  /** The tables of an array of tables; the last one has keys of its own. */
  List<Table> tables(String name, int most, List<String> allowed, List<String> allowedInLast) {
    String rule = "1 to " + most + " tables [[" + name + "]]";
    JsonNode found = node.get(name);
    if (found == null) {
      throw missing(name, rule);
    }
    if (!found.isArray()) {
      throw value(name, found).refused(rule);
    }
    int count = found.size();
    Place places = place.child(name);
    if (count < 1 || count > most) {
      int line = count > most ? places.item(most).line() : places.line();
      throw ScenarioException.ofKey(
          file, line, keyOf(name), "given " + count + " of them; allowed: " + rule, null);
    }
    List<Table> tables = new ArrayList<>();
    for (int i = 0; i < count; i++) {
      String itemKey = keyOf(name) + "[" + (i + 1) + "]";
      if (!(found.get(i) instanceof ObjectNode item)) {
        throw new Value(file, itemKey, found.get(i), places.item(i))
            .refused("a table [[" + name + "]]");
      }
      tables.add(
          new Table(file, itemKey, item, places.item(i))
              .of(i == count - 1 ? allowedInLast : allowed));
    }
    return tables;
  }

  /** The exception that says that a key is not there, which stands on no line. */
  ScenarioException missing(String name, String allowed) {
    return ScenarioException.ofKey(
        file, Place.NO_LINE, keyOf(name), "is missing; allowed: " + allowed, null);
  }

  /** Runs something that refuses the table as a whole, and names file, line and table. */
  <T> T guarded(Supplier<T> action) {
    return new Value(file, path, node, place).guarded(action);
  }

  /** Runs something that refuses what some tables say together, and names file and tables. */
  <T> T guarded(String names, Supplier<T> action) {
    try {
      return action.get();
    } catch (IllegalArgumentException e) {
      throw ScenarioException.ofKey(
          file, place.child(names).line(), keyOf(names), e.getMessage(), e);
    }
  }
}
