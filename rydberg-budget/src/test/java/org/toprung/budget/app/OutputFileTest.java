package org.toprung.budget.app;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class OutputFileTest {
  @TempDir private Path folder;

  @Test
  void leavesNothingBeforeItIsWritten() throws IOException {
    OutputFile.of("--json", folder.resolve("out.json").toString());
    try (var files = Files.list(folder)) {
      assertEquals(0, files.count());
    }
  }

  @Test
  void writesThroughALinkWithoutReplacingIt() throws IOException {
    Path real = Files.writeString(folder.resolve("real.json"), "old");
    Path link = Files.createSymbolicLink(folder.resolve("link.json"), real);
    OutputFile.of("--json", link.toString()).write("new");
    assertTrue(Files.isSymbolicLink(link));
    assertEquals("new", Files.readString(real));
  }

  @Test
  void leavesNothingWhenTheFolderVanishes() throws IOException {
    Path inner = Files.createDirectory(folder.resolve("inner"));
    OutputFile file = OutputFile.of("--json", inner.resolve("out.json").toString());
    Files.delete(inner);
    BadOutputException e = assertThrows(BadOutputException.class, () -> file.write("text"));
    assertTrue(e.getMessage().startsWith("--json: "), e.getMessage());
    assertFalse(Files.exists(inner));
  }

  @Test
  void keepsTheOldFileWhenTheNewOneCannotTakeItsPlace() throws IOException {
    Path target = folder.resolve("out.json");
    OutputFile file = OutputFile.of("--json", target.toString());
    // a folder that is not empty cannot be replaced by a file
    Files.createDirectory(target);
    Files.writeString(target.resolve("kept"), "kept");
    assertThrows(BadOutputException.class, () -> file.write("text"));
    assertEquals("kept", Files.readString(target.resolve("kept")));
    try (var files = Files.list(folder)) {
      assertEquals(1, files.count(), "temporary file left behind");
    }
  }
}
