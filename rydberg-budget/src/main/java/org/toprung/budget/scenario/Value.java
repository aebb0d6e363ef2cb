package org.toprung.budget.scenario;

import com.fasterxml.jackson.databind.JsonNode;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.function.Function;
import java.util.function.Supplier;

/** One value of a scenario, which knows its file, line and key and refuses what it cannot be. */
final class Value {
  private final Path file;
  private final String key;
  private final JsonNode node;
  private final Place place;

  Value(Path file, String key, JsonNode node, Place place) {
    this.file = file;
    this.key = key;
    this.node = node;
    this.place = place;
  }

  /** The exception that says what was given and what is allowed. */
  ScenarioException refused(String allowed) {
    return ScenarioException.ofKey(
        file, place.line(), key, "given " + Shown.value(node) + "; allowed: " + allowed, null);
  }

  boolean isText() {
    return node.isTextual();
  }

  boolean isList() {
    return node.isArray();
  }

  boolean isNumber() {
    return node.isNumber();
  }

  boolean flag() {
    if (!node.isBoolean()) {
      throw refused("true or false");
    }
    return node.booleanValue();
  }

  String text(String allowed) {
    if (!isText()) {
      throw refused(allowed);
    }
    return node.textValue();
  }

  double number(String allowed) {
    if (!isNumber() || !(Math.abs(node.doubleValue()) <= Double.MAX_VALUE)) {
      throw refused(allowed);
    }
    return node.doubleValue();
  }

  /** The items of a list of a given length, with keys like {@code drift[2]}, counted from 1. */
  List<Value> items(int length, String allowed) {
    if (!isList() || node.size() != length) {
      throw refused(allowed);
    }
    List<Value> items = new ArrayList<>();
    for (int i = 0; i < length; i++) {
      items.add(new Value(file, key + "[" + (i + 1) + "]", node.get(i), place.item(i)));
    }
    return items;
  }

  /** Reads a text; the parser's own refusal says what is allowed. */
  <T> T parsed(Function<String, T> parser, String example) {
    String text = text("text such as \"" + example + "\"");
    return guarded(() -> parser.apply(text));
  }

  /**
   * Runs something that refuses this value by an IllegalArgumentException, and names file, line and
   * key.
   */
  <T> T guarded(Supplier<T> action) {
    try {
      return action.get();
    } catch (ScenarioException e) {
      throw e;
    } catch (IllegalArgumentException e) {
      throw ScenarioException.ofKey(file, place.line(), key, withGiven(e.getMessage()), e);
    }
  }

  /** The parser's complaint, with what stood in the file where it does not repeat that. */
  private String withGiven(String complaint) {
    boolean repeated = node.isObject() || node.isValueNode() && complaint.contains(node.asText());
    return repeated ? complaint : "given " + Shown.value(node) + "; " + complaint;
  }

  /** The value as in a message. */
  @Override
  public String toString() {
    return Shown.value(node);
  }
}
