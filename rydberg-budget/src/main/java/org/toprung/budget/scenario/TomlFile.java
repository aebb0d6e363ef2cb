package org.toprung.budget.scenario;

import com.fasterxml.jackson.core.JsonProcessingException;
import com.fasterxml.jackson.databind.JsonNode;
import com.fasterxml.jackson.databind.node.ObjectNode;
import com.fasterxml.jackson.dataformat.toml.TomlMapper;
import java.io.IOException;
import java.io.InputStream;
import java.nio.ByteBuffer;
import java.nio.charset.CharacterCodingException;
import java.nio.charset.StandardCharsets;
import java.nio.file.AccessDeniedException;
import java.nio.file.Files;
import java.nio.file.NoSuchFileException;
import java.nio.file.Path;

/** Turns a file into a tree of TOML values, or says on one line why it cannot. */
final class TomlFile {
  private static final int LARGEST = 1_000_000; // bytes; a scenario has about a thousand

  private TomlFile() {}

  static String text(Path file) {
    if (Files.isDirectory(file)) {
      throw ScenarioException.ofFile(
          file, "cannot be read: it is a directory; allowed: a TOML file", null);
    }
    byte[] bytes;
    try (InputStream in = Files.newInputStream(file)) {
      bytes = in.readNBytes(LARGEST + 1);
    } catch (NoSuchFileException e) {
      throw ScenarioException.ofFile(file, "no such file; allowed: a readable TOML file", e);
    } catch (AccessDeniedException e) {
      throw ScenarioException.ofFile(
          file, "cannot be read: access denied; allowed: a readable TOML file", e);
    } catch (IOException e) {
      throw ScenarioException.ofFile(
          file, "cannot be read: " + e.getMessage() + "; allowed: a readable TOML file", e);
    }
    if (bytes.length > LARGEST) {
      throw ScenarioException.ofFile(
          file, "is too large for a scenario; allowed: up to " + LARGEST + " bytes", null);
    }
    try {
      return StandardCharsets.UTF_8.newDecoder().decode(ByteBuffer.wrap(bytes)).toString();
    } catch (CharacterCodingException e) {
      throw ScenarioException.ofFile(file, "is not text; allowed: TOML in UTF-8", e);
    }
  }

  static ObjectNode tree(Path file, String text) {
    try {
      JsonNode tree = new TomlMapper().readTree(withoutByteOrderMark(text));
      if (tree instanceof ObjectNode table) {
        return table;
      }
      throw ScenarioException.ofFile(file, "is empty; allowed: a scenario in TOML", null);
    } catch (JsonProcessingException e) {
      String where = e.getLocation() == null ? "" : "line " + e.getLocation().getLineNr() + ": ";
      throw ScenarioException.ofFile(
          file, where + e.getOriginalMessage() + "; allowed: valid TOML, each key once", e);
    }
  }

  private static String withoutByteOrderMark(String text) {
    return text.startsWith("\uFEFF") ? text.substring(1) : text;
  }
}
