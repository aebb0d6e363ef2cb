package org.toprung.budget.app;

import java.io.PrintWriter;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.function.Function;

/**
 * The files that a command was asked for: each checked when it is asked for, before any long work
 * begins, so that none takes the place of an input or of another output.
 *
 * @param <T> what the files are filled from
 */
final class Outputs<T> {
  private final List<Path> inputs;
  private final List<Output<T>> outputs = new ArrayList<>();

  /** A file, what is in it, and who fills it. */
  private record Output<T>(String option, OutputFile file, String what, Function<T, String> text) {}

  Outputs(List<Path> inputs) {
    this.inputs = List.copyOf(inputs);
  }

  /**
   * Asks for a file.
   *
   * @param option name of the option, for messages
   * @param name the path as given; null where the option was not
   * @param what is in the file, for the note that it was written
   * @param text makes the content, later
   * @throws BadOutputException if the file cannot be written, or is taken
   */
  void add(String option, String name, String what, Function<T, String> text) {
    if (name == null) {
      return;
    }
    OutputFile file = OutputFile.of(option, name);
    for (Path input : inputs) {
      if (file.isAt(input)) {
        throw refused(option, name, "which the scenario is read from");
      }
    }
    for (Output<T> other : outputs) {
      if (file.isAt(other.file().target())) {
        throw refused(option, name, "which " + other.option() + " names too");
      }
    }
    outputs.add(new Output<>(option, file, what, text));
  }

  private static BadOutputException refused(String option, String name, String why) {
    return new BadOutputException(
        option + ": given " + name + ", " + why + "; allowed: another file", null);
  }

  /** Writes all files, and a line about each. */
  void write(T content, PrintWriter out) {
    for (Output<T> output : outputs) {
      output.file().write(output.text().apply(content));
      out.println(output.what() + " written to " + output.file().target());
    }
  }
}
