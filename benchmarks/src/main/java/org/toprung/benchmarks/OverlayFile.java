package org.toprung.benchmarks;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.file.Files;
import java.nio.file.Path;

/** An empty file of own values: laid over the catalogue it gives species that share no cache. */
final class OverlayFile {
  static final Path PATH = write();

  private OverlayFile() {}

  private static Path write() {
    try {
      Path file = Files.createTempFile("values", ".csv");
      file.toFile().deleteOnExit();
      Files.writeString(
          file, "species,quantity,level,value,uncertainty,unit,source,memory,chosen_because\n");
      return file;
    } catch (IOException e) {
      throw new UncheckedIOException(e);
    }
  }
}
