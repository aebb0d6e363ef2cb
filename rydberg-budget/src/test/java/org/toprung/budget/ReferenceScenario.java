package org.toprung.budget;

import java.io.IOException;
import java.io.InputStream;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;

/** The reference scenario of the tests, and copies of it with something changed. */
public final class ReferenceScenario {
  private ReferenceScenario() {}

  /** The text of rubidium-reference.toml. */
  public static String text() {
    try (InputStream in = ReferenceScenario.class.getResourceAsStream("rubidium-reference.toml")) {
      return new String(in.readAllBytes(), StandardCharsets.UTF_8);
    } catch (IOException e) {
      throw new UncheckedIOException(e);
    }
  }

  /** The text with the first occurrence of something replaced; it must occur. */
  public static String with(String old, String replacement) {
    String text = text();
    int at = text.indexOf(old);
    if (at < 0) {
      throw new IllegalArgumentException("the reference scenario has no " + old);
    }
    return text.substring(0, at) + replacement + text.substring(at + old.length());
  }
}
