package org.toprung.budget.scenario;

import java.nio.file.Path;
import java.util.Optional;

/**
 * A scenario that was refused. The message is one line: file, key, what was given and what is
 * allowed.
 */
public final class ScenarioException extends IllegalArgumentException {
  private static final long serialVersionUID = 1L;

  /** Name of the file as the caller gave it. */
  private final String file;

  /** Dotted key, or null where no single key is to blame. */
  private final String key;

  private ScenarioException(String file, String key, String message, Throwable cause) {
    super(Shown.onOneLine(message), cause);
    this.file = file;
    this.key = key;
  }

  static ScenarioException ofFile(Path file, String problem, Throwable cause) {
    return new ScenarioException(file.toString(), null, file + ": " + problem, cause);
  }

  static ScenarioException ofKey(Path file, String key, String problem) {
    return ofKey(file, key, problem, null);
  }

  static ScenarioException ofKey(Path file, String key, String problem, Throwable cause) {
    String counted = key.startsWith("step[") ? key + " (steps count from 1)" : key;
    return new ScenarioException(
        file.toString(), key, file + ": " + counted + ": " + problem, cause);
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
   * The key that was refused, such as {@code step[1].waist}, with the steps counted from 1.
   *
   * @return the key, or nothing where the file as a whole could not be read
   */
  public Optional<String> key() {
    return Optional.ofNullable(key);
  }
}
