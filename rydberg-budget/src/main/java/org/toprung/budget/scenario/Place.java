package org.toprung.budget.scenario;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;

/**
 * Where a value of a scenario stands, and where the values within it stand: a tree of lines beside
 * the tree of values.
 */
final class Place {
  /** Line of what stands nowhere. */
  static final int NO_LINE = 0;

  private final int line;
  private final Map<String, Place> children = new HashMap<>();
  private final List<Place> items = new ArrayList<>();

  private Place(int line) {
    this.line = line;
  }

  static Place at(int line) {
    return new Place(line);
  }

  static Place nowhere() {
    return new Place(NO_LINE);
  }

  /** Line in the file, from 1, or {@link #NO_LINE}. */
  int line() {
    return line;
  }

  /** The value under a key of this table. */
  Place child(String key) {
    Place found = children.get(key);
    return found == null ? nowhere() : found;
  }

  /** An item of this list, from 0. */
  Place item(int index) {
    return index < items.size() ? items.get(index) : nowhere();
  }

  /** The value under a key, which stands where it is named first. */
  Place named(String key, int where) {
    return children.computeIfAbsent(key, k -> at(where));
  }

  Place added(int where) {
    Place item = at(where);
    items.add(item);
    return item;
  }

  /** What a further header speaks of: this table, or the last one of this array of tables. */
  Place open() {
    return items.isEmpty() ? this : items.get(items.size() - 1);
  }
}
