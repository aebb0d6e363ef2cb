package org.toprung.budget.scenario;

import java.io.IOException;
import java.io.InputStream;
import java.nio.ByteBuffer;
import java.nio.charset.CharacterCodingException;
import java.nio.charset.StandardCharsets;
import java.nio.file.AccessDeniedException;
import java.nio.file.Files;
import java.nio.file.NoSuchFileException;
import java.nio.file.Path;

/** Reads a file of UTF-8 text of bounded size, or says why it cannot. */
final class TextFile {
  private static final String BYTE_ORDER_MARK = "\uFEFF";

  private TextFile() {}

  /**
   * The text, without a byte order mark.
   *
   * @param kind what kind of file is wanted, such as "TOML file"
   * @throws IllegalArgumentException with what is wrong with the file; the caller names it
   */
  static String read(Path file, String kind, int largestBytes) {
    if (Files.isDirectory(file)) {
      throw new IllegalArgumentException(
          "cannot be read: it is a directory; allowed: a readable " + kind);
    }
    byte[] bytes;
    try (InputStream in = Files.newInputStream(file)) {
      bytes = in.readNBytes(largestBytes + 1);
    } catch (NoSuchFileException e) {
      throw new IllegalArgumentException("no such file; allowed: a readable " + kind, e);
    } catch (AccessDeniedException e) {
      throw new IllegalArgumentException(
          "cannot be read: access denied; allowed: a readable " + kind, e);
    } catch (IOException e) {
      throw new IllegalArgumentException(
          "cannot be read: " + e.getMessage() + "; allowed: a readable " + kind, e);
    }
    if (bytes.length > largestBytes) {
      throw new IllegalArgumentException(
          "is too large; allowed: a " + kind + " of up to " + largestBytes + " bytes");
    }
    try {
      return withoutByteOrderMark(
          StandardCharsets.UTF_8.newDecoder().decode(ByteBuffer.wrap(bytes)).toString());
    } catch (CharacterCodingException e) {
      throw new IllegalArgumentException("is not text; allowed: a " + kind + " in UTF-8", e);
    }
  }

  static String withoutByteOrderMark(String text) {
    return text.startsWith(BYTE_ORDER_MARK) ? text.substring(BYTE_ORDER_MARK.length()) : text;
  }
}
