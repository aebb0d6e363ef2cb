package org.toprung.budget.scenario;

import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;

/** The files that a scenario is read from: its own, and those that it names. Not thread-safe. */
final class Sources {
  private final Path scenario;
  private final List<Path> files = new ArrayList<>();

  Sources(Path scenario) {
    this.scenario = scenario;
    files.add(scenario);
  }

  /** A file that the scenario names, relative to itself. */
  Path named(String name) {
    Path file = scenario.resolveSibling(name);
    files.add(file);
    return file;
  }

  /** All of them, the scenario first. */
  List<Path> files() {
    return List.copyOf(files);
  }
}
