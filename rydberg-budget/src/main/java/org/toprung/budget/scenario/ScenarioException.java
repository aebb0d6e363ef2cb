package org.toprung.budget.scenario;

import java.nio.file.Path;
import java.util.Optional;
import java.util.OptionalInt;

/**
 * A scenario that was refused. The message is one line, {@code FILE:LINE: KEY: …}, with what was
 * given and what is allowed; what is missing stands on no line.
 */
public final class ScenarioException extends IllegalArgumentException {
  private static final long serialVersionUID = 1L;

  /** Name of the file as the caller gave it. */
  private final String file;

  /** Line in the file from 1, or 0 where no line is to blame. */
  private final int line;

  /** Dotted key, or null where no single key is to blame. */
  private final String key;

  private ScenarioException(Path file, int line, String key, String message, Throwable cause) {
    super(Shown.onOneLine(message), cause);
    this.file = file.toString();
    this.line = line;
    this.key = key;
  }

  static ScenarioException ofFile(Path file, String problem, Throwable cause) {
    return ofLine(file, Place.NO_LINE, problem, cause);
  }

  static ScenarioException ofLine(Path file, int line, String problem, Throwable cause) {
    return new ScenarioException(file, line, null, located(file, line) + ": " + problem, cause);
  }

  static ScenarioException ofKey(Path file, int line, String key, String problem, Throwable cause) {
    String counted = key.startsWith("step[") ? key + " (steps count from 1)" : key;
    return new ScenarioException(
        file, line, key, located(file, line) + ": " + counted + ": " + problem, cause);
  }

  private static String located(Path file, int line) {
    return line == Place.NO_LINE ? file.toString() : file + ":" + line;
  }

  /**
   * The file that was refused.
   *
   * @return its name as given to {@link Scenario}
   */
  public String file() {
    return file;
  }

  /**
   * The line that was refused: that of the key, or of the item of a list, or of the header of a
   * table.
   *
   * @return the line, counted from 1, or nothing where none is to blame
   */
  public OptionalInt line() {
    return line == Place.NO_LINE ? OptionalInt.empty() : OptionalInt.of(line);
  }

  /**
   * The key that was refused, such as {@code step[1].waist}, with the steps counted from 1.
   *
   * @return the key, or nothing where the file as a whole could not be read
   */
  public Optional<String> key() {
    return Optional.ofNullable(key);
  }
}
