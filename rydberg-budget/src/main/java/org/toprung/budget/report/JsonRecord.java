package org.toprung.budget.report;

import com.fasterxml.jackson.core.JsonProcessingException;
import com.fasterxml.jackson.core.StreamReadFeature;
import com.fasterxml.jackson.databind.DeserializationFeature;
import com.fasterxml.jackson.databind.JsonNode;
import com.fasterxml.jackson.databind.json.JsonMapper;
import java.util.ArrayList;
import java.util.Iterator;
import java.util.List;
import java.util.Set;
import java.util.TreeSet;
import java.util.function.Function;

/** A JSON object that is read key by key; what is missing, odd or left over is refused by name. */
final class JsonRecord {
  private final String path;
  private final JsonNode node;
  private final Set<String> unread = new TreeSet<>();

  private JsonRecord(String path, JsonNode node) {
    this.path = path;
    this.node = node;
    if (!node.isObject()) {
      throw refused(path.isEmpty() ? "the document" : path, node, "a JSON object");
    }
    for (Iterator<String> names = node.fieldNames(); names.hasNext(); ) {
      unread.add(names.next());
    }
  }

  static JsonRecord parse(String json) {
    try {
      JsonNode tree =
          JsonMapper.builder()
              .enable(StreamReadFeature.STRICT_DUPLICATE_DETECTION)
              .enable(DeserializationFeature.FAIL_ON_TRAILING_TOKENS)
              .build()
              .readTree(json);
      return new JsonRecord("", tree);
    } catch (JsonProcessingException e) {
      String where = e.getLocation() == null ? "" : "line " + e.getLocation().getLineNr() + ": ";
      throw new IllegalArgumentException(
          where + e.getOriginalMessage() + "; allowed: valid JSON, each key once", e);
    }
  }

  String text(String key) {
    JsonNode value = take(key);
    if (!value.isTextual()) {
      throw refused(path + key, value, "text");
    }
    return value.textValue();
  }

  double number(String key) {
    return number(path + key, take(key));
  }

  private static double number(String key, JsonNode value) {
    if (!(value.isNumber() && Math.abs(value.doubleValue()) < Double.POSITIVE_INFINITY)) {
      throw refused(key, value, "a finite number");
    }
    return value.doubleValue();
  }

  int integer(String key) {
    JsonNode value = take(key);
    if (!value.canConvertToInt() || !value.isIntegralNumber()) {
      throw refused(path + key, value, "an integer");
    }
    return value.intValue();
  }

  boolean truth(String key) {
    JsonNode value = take(key);
    if (!value.isBoolean()) {
      throw refused(path + key, value, "true or false");
    }
    return value.booleanValue();
  }

  List<Double> numbers(String key) {
    List<Double> list = new ArrayList<>();
    JsonNode array = array(key);
    for (int i = 0; i < array.size(); i++) {
      list.add(number(path + key + "[" + i + "]", array.get(i)));
    }
    return list;
  }

  <T> List<T> records(String key, Function<JsonRecord, T> reader) {
    List<T> list = new ArrayList<>();
    JsonNode array = array(key);
    for (int i = 0; i < array.size(); i++) {
      list.add(read(new JsonRecord(path + key + "[" + i + "].", array.get(i)), reader));
    }
    return list;
  }

  <T> T record(String key, Function<JsonRecord, T> reader) {
    return read(new JsonRecord(path + key + ".", take(key)), reader);
  }

  private static <T> T read(JsonRecord record, Function<JsonRecord, T> reader) {
    T value = reader.apply(record);
    record.requireNothingLeft();
    return value;
  }

  void requireNothingLeft() {
    if (!unread.isEmpty()) {
      throw new IllegalArgumentException(
          "unknown key "
              + path
              + unread.iterator().next()
              + "; allowed: the keys of this version of the document");
    }
  }

  private JsonNode array(String key) {
    JsonNode value = take(key);
    if (!value.isArray()) {
      throw refused(path + key, value, "an array");
    }
    return value;
  }

  private JsonNode take(String key) {
    JsonNode value = node.get(key);
    if (value == null) {
      throw new IllegalArgumentException("missing key " + path + key);
    }
    unread.remove(key);
    return value;
  }

  private static IllegalArgumentException refused(String key, JsonNode given, String allowed) {
    String text = given.toString();
    String shown = text.length() > 60 ? text.substring(0, 60) + "..." : text;
    return new IllegalArgumentException(key + ": given " + shown + "; allowed: " + allowed);
  }
}
