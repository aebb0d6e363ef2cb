package org.toprung.budget.app;

import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.AtomicMoveNotSupportedException;
import java.nio.file.Files;
import java.nio.file.InvalidPathException;
import java.nio.file.Path;
import java.nio.file.StandardCopyOption;
import java.nio.file.StandardOpenOption;

/**
 * A file to be written in one piece: either it is there whole, or what was there before is
 * untouched.
 *
 * <p>Text goes to a temporary file in the same folder, which then takes the place of the target.
 * That this can work is tried when the object is made, before any long work begins.
 */
final class OutputFile {
  private static final String ALLOWED = "; allowed: a file in an existing, writable folder";

  private final String option;
  private final Path target;

  private OutputFile(String option, Path target) {
    this.option = option;
    this.target = target;
  }

  /**
   * Checks that a file can be written.
   *
   * @param option name of the option that asked for it, for messages
   * @param name the path as given
   * @return the file, not written yet
   * @throws BadOutputException if it cannot be written
   */
  static OutputFile of(String option, String name) {
    try {
      Path given = Path.of(name);
      // a link is followed, so that the file it points to is replaced and not the link
      Path target = Files.exists(given) ? given.toRealPath() : given.toAbsolutePath().normalize();
      OutputFile file = new OutputFile(option, target);
      file.requireWritable(name);
      return file;
    } catch (IOException | InvalidPathException e) {
      throw refused(option, name, "cannot be used", e);
    }
  }

  private void requireWritable(String given) {
    Path folder = target.getParent();
    if (Files.isDirectory(target) || folder == null) {
      throw refused(option, given, "is a directory", null);
    }
    if (!Files.isDirectory(folder)) {
      throw refused(option, given, "has no folder to be in: " + folder, null);
    }
    if (Files.exists(target) && !Files.isRegularFile(target)) {
      throw refused(option, given, "is not a regular file", null);
    }
    if (Files.exists(target) && !Files.isWritable(target)) {
      throw refused(option, given, "is write-protected", null);
    }
    try {
      Path probe = temporary();
      Files.write(probe, new byte[0], StandardOpenOption.CREATE_NEW);
      Files.delete(probe);
    } catch (IOException e) {
      throw refused(option, given, "cannot be written: no file can be created in its folder", e);
    }
  }

  private static BadOutputException refused(
      String option, String given, String why, Throwable cause) {
    return new BadOutputException(option + ": given " + given + ", which " + why + ALLOWED, cause);
  }

  private Path temporary() {
    String name = "." + target.getFileName() + "." + ProcessHandle.current().pid() + ".tmp";
    return target.resolveSibling(name);
  }

  /** Whether a path leads to this very file. */
  boolean isAt(Path other) {
    try {
      Path there = Files.exists(other) ? other.toRealPath() : other.toAbsolutePath().normalize();
      return there.equals(target);
    } catch (IOException e) {
      return false;
    }
  }

  /** The file that is written. */
  Path target() {
    return target;
  }

  /**
   * Writes the whole file.
   *
   * @param text the content, written in UTF-8
   * @throws BadOutputException if that fails; nothing half-written is left
   */
  void write(String text) {
    Path temporary = temporary();
    try {
      try {
        Files.writeString(temporary, text, StandardCharsets.UTF_8, StandardOpenOption.CREATE_NEW);
        moveInPlace(temporary);
      } finally {
        Files.deleteIfExists(temporary);
      }
    } catch (IOException e) {
      throw new BadOutputException(
          option + ": " + target + " could not be written: " + e.getMessage(), e);
    }
  }

  private void moveInPlace(Path temporary) throws IOException {
    try {
      Files.move(
          temporary, target, StandardCopyOption.ATOMIC_MOVE, StandardCopyOption.REPLACE_EXISTING);
    } catch (AtomicMoveNotSupportedException e) {
      Files.move(temporary, target, StandardCopyOption.REPLACE_EXISTING);
    }
  }
}
