package org.toprung.budget.scenario;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertNotEquals;

import com.fasterxml.jackson.databind.JsonNode;
import com.fasterxml.jackson.dataformat.toml.TomlMapper;
import java.io.IOException;
import java.nio.file.DirectoryStream;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;
import org.toprung.budget.ReferenceScenario;

class TomlPlacesTest {

  /** The line of what a path of keys, and of numbers from 0 for items, leads to. */
  private static int line(String text, Object... path) throws IOException {
    JsonNode node = new TomlMapper().readTree(text); // it must be TOML
    Place place = TomlPlaces.of(text);
    for (Object step : path) {
      node = step instanceof Integer item ? node.path(item) : node.path(step.toString());
      place = step instanceof Integer item ? place.item(item) : place.child(step.toString());
    }
    assertEquals(false, node.isMissingNode(), "no such value");
    return place.line();
  }

  @Test
  void findsKeysOfTablesAmongCommentsAndEmptyLines() throws IOException {
    String text =
        """
        # [bench] drift = 1

        title = "a # [bench]" # drift = 2
        [ bench ]   # the bench

          drift\t= 3
        """;
    assertEquals(3, line(text, "title"));
    assertEquals(4, line(text, "bench"));
    assertEquals(6, line(text, "bench", "drift"));
  }

  @Test
  void findsDottedAndQuotedKeys() throws IOException {
    String text =
        """
        bench.drift = 1
        bench . "line width" = 2
        'be.nch'."a\\"b\\u0041" = 3
        "" = 4
        [bench.sub."x y"]
        z = 5
        3.14 = 6
        """;
    assertEquals(1, line(text, "bench"));
    assertEquals(1, line(text, "bench", "drift"));
    assertEquals(2, line(text, "bench", "line width"));
    assertEquals(3, line(text, "be.nch", "a\"bA"));
    assertEquals(4, line(text, ""));
    assertEquals(5, line(text, "bench", "sub", "x y"));
    assertEquals(6, line(text, "bench", "sub", "x y", "z"));
    assertEquals(7, line(text, "bench", "sub", "x y", "3", "14"));
  }

  @Test
  void findsItemsOfListsOverSeveralLines() throws IOException {
    String text =
        """
        drift = [ # one per step ]
          "1 kHz",   # first
          # "2 kHz",
          [3,
           4], {a = 5, b = [6, 7]}
          ,
        ]
        after = 8
        """;
    assertEquals(1, line(text, "drift"));
    assertEquals(2, line(text, "drift", 0));
    assertEquals(4, line(text, "drift", 1));
    assertEquals(5, line(text, "drift", 1, 1));
    assertEquals(5, line(text, "drift", 2, "b", 1));
    assertEquals(8, line(text, "after"));
  }

  @Test
  void isNotFooledByStrings() throws IOException {
    String text =
        "a = \"\"\"\nb = 1\n\\\"\"\"\n[c] # \\\\\"\"\"\"\"\n"
            + "d = '''\n'e = 2' \\'''\n"
            + "f = \"\\\"[g]\\\\\"\n"
            + "h = 'C:\\'\n"
            + "i = \"\"\n"
            + "j = ''\n"
            + "k = 1979-05-27 07:32:00 # l = 1\n"
            + "m = [\"]\", '#', \"\"\"\n]\"\"\",\n3]\n"
            + "n = 1";
    assertEquals(1, line(text, "a"));
    assertEquals(5, line(text, "d"));
    assertEquals(7, line(text, "f"));
    assertEquals(8, line(text, "h"));
    assertEquals(10, line(text, "j"));
    assertEquals(11, line(text, "k"));
    assertEquals(12, line(text, "m", 2));
    assertEquals(14, line(text, "m", 3));
    assertEquals(15, line(text, "n"));
  }

  @Test
  void followsArraysOfTables() throws IOException {
    String text =
        """
        [[step]]
        to = "a"
        [step.beam]
        power = 1
        [[step]] # second
        to = "b"
        beam.power = 2
        [[step.sub]]
        x = 3
        [[step.sub]]
        x = 4
        """;
    assertEquals(1, line(text, "step"));
    assertEquals(2, line(text, "step", 0, "to"));
    assertEquals(3, line(text, "step", 0, "beam"));
    assertEquals(4, line(text, "step", 0, "beam", "power"));
    assertEquals(5, line(text, "step", 1));
    assertEquals(7, line(text, "step", 1, "beam", "power"));
    assertEquals(11, line(text, "step", 1, "sub", 1, "x"));
  }

  @Test
  void followsInlineTables() throws IOException {
    String text = "\n a = {b.c = 1, \"d}\" = {e = '}'}}\r\nf = true\r\n";
    assertEquals(2, line(text, "a", "b", "c"));
    assertEquals(2, line(text, "a", "d}", "e"));
    assertEquals(3, line(text, "f"));
  }

  @Test
  void knowsNoPlaceOfWhatIsNotThere() {
    Place root = TomlPlaces.of("a = [1]\n");
    assertEquals(Place.NO_LINE, root.child("b").line());
    assertEquals(Place.NO_LINE, root.child("a").item(1).line());
    assertEquals(Place.NO_LINE, root.child("a").child("c").child("d").line());
  }

  /** It is run after the parser; should the two ever differ, it must still come to an end. */
  @ParameterizedTest
  @ValueSource(
      strings = {
        "",
        "[",
        "[[",
        "a",
        "a =",
        "a = [",
        "a = {",
        "= 1",
        "\"",
        "'''",
        "a = \"\\",
        "}",
        "]]"
      })
  void comesToAnEndWithoutToml(String text) {
    assertEquals(1, TomlPlaces.of(text).line());
    assertEquals(1, TomlPlaces.of(text + "\n\n[x").line());
  }

  /** Everything that the parser finds in a real scenario has a place. */
  @Test
  void placesEverythingInScenarios() throws IOException {
    placesEverything(ReferenceScenario.text());
    try (DirectoryStream<Path> examples = Files.newDirectoryStream(Path.of("examples"), "*.toml")) {
      for (Path example : examples) {
        placesEverything(Files.readString(example));
      }
    }
  }

  private static void placesEverything(String text) throws IOException {
    check(new TomlMapper().readTree(text), TomlPlaces.of(text), text.lines().toList());
  }

  private static void check(JsonNode node, Place place, List<String> lines) {
    node.fieldNames()
        .forEachRemaining(
            key -> {
              Place child = place.child(key);
              assertNotEquals(Place.NO_LINE, child.line(), key);
              assertEquals(true, lines.get(child.line() - 1).contains(key), key);
              check(node.get(key), child, lines);
            });
    for (int i = 0; node.isArray() && i < node.size(); i++) {
      assertNotEquals(Place.NO_LINE, place.item(i).line());
      check(node.get(i), place.item(i), lines);
    }
  }
}
