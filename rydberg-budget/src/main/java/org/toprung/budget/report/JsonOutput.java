package org.toprung.budget.report;

import com.fasterxml.jackson.core.JsonFactory;
import com.fasterxml.jackson.core.JsonGenerator;
import com.fasterxml.jackson.core.util.DefaultIndenter;
import com.fasterxml.jackson.core.util.DefaultPrettyPrinter;
import com.fasterxml.jackson.core.util.Separators;
import java.io.IOException;
import java.io.StringWriter;
import java.io.UncheckedIOException;
import java.util.List;

/** An indented JSON object that is written key by key, and never holds what is not finite. */
final class JsonOutput {
  /** Writes a part of the document. */
  interface Part {
    void write(JsonOutput out) throws IOException;
  }

  private final JsonGenerator json;

  private JsonOutput(JsonGenerator json) {
    this.json = json;
  }

  /** A whole document, ended by a line feed. */
  static String document(Part body) {
    StringWriter text = new StringWriter();
    DefaultPrettyPrinter printer =
        new DefaultPrettyPrinter(
            Separators.createDefaultInstance()
                .withObjectFieldValueSpacing(Separators.Spacing.AFTER)
                .withRootSeparator(""));
    printer.indentObjectsWith(new DefaultIndenter("  ", "\n"));
    try (JsonGenerator json = new JsonFactory().createGenerator(text)) {
      json.setPrettyPrinter(printer);
      json.writeStartObject();
      body.write(new JsonOutput(json));
      json.writeEndObject();
    } catch (IOException e) {
      throw new UncheckedIOException(e);
    }
    return text.append('\n').toString();
  }

  void object(String key, Part body) throws IOException {
    json.writeObjectFieldStart(key);
    body.write(this);
    json.writeEndObject();
  }

  /** An array of objects. */
  void objects(String key, List<Part> bodies) throws IOException {
    json.writeArrayFieldStart(key);
    for (Part body : bodies) {
      json.writeStartObject();
      body.write(this);
      json.writeEndObject();
    }
    json.writeEndArray();
  }

  void text(String key, String value) throws IOException {
    json.writeStringField(key, value);
  }

  void texts(String key, List<String> values) throws IOException {
    json.writeArrayFieldStart(key);
    for (String value : values) {
      json.writeString(value);
    }
    json.writeEndArray();
  }

  void truth(String key, boolean value) throws IOException {
    json.writeBooleanField(key, value);
  }

  void integer(String key, long value) throws IOException {
    json.writeNumberField(key, value);
  }

  void number(String key, double value) throws IOException {
    json.writeFieldName(key);
    json.writeNumber(finite(key, value));
  }

  void numbers(String key, double... values) throws IOException {
    json.writeArrayFieldStart(key);
    for (double value : values) {
      json.writeNumber(finite(key, value));
    }
    json.writeEndArray();
  }

  private static double finite(String key, double value) {
    if (!(Math.abs(value) <= Double.MAX_VALUE)) {
      throw new IllegalStateException("the value of " + key + " is " + value + ", not finite");
    }
    return value + 0.0; // no negative zero
  }
}
