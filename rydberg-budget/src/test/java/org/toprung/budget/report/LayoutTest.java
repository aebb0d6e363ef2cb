package org.toprung.budget.report;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.stream.Collectors;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.constraints.Size;
import net.jqwik.api.constraints.StringLength;
import org.junit.jupiter.api.Test;
import org.toprung.budget.report.Outline.Column;

/** One outline, as text and as Markdown. */
class LayoutTest {
  private static final List<Column> COLUMNS =
      List.of(Column.left("name"), Column.right("number"), Column.left("rest"));

  private static Outline table(List<List<String>> rows) {
    return new Outline.Writer("title").section("heading").table(COLUMNS, rows).outline();
  }

  @Test
  void alignsColumnsOfText() {
    Outline outline =
        table(List.of(List.of("a", "1.5", "x"), List.of("longer", "10.25", "word ".repeat(30))));
    List<String> lines = TextLayout.of(outline).lines().toList();
    assertEquals("  name    number  rest", lines.get(4));
    assertEquals("  a          1.5  x", lines.get(5));
    assertTrue(lines.get(6).startsWith("  longer   10.25  word word"), lines.get(6));
    assertTrue(lines.get(7).startsWith(" ".repeat(18) + "word"), lines.get(7));
  }

  @Test
  void writesOutRowsThatAreTooWideForATable() {
    String text = TextLayout.of(table(List.of(List.of("a", "9".repeat(90), "x".repeat(40)))));
    assertTrue(text.lines().allMatch(l -> l.length() <= Page.WIDTH), text);
    String kept = text.replaceAll("\\s", "");
    assertTrue(kept.contains("9".repeat(90)) && kept.contains("x".repeat(40)), text);
  }

  @Test
  void makesTablesAndListsOfMarkdown() {
    Outline outline =
        new Outline.Writer("title")
            .section("heading")
            .fact("label", "value")
            .fact("", "more")
            .table(COLUMNS, List.of(List.of("a", "1", "x|y")))
            .sentence("Said.")
            .list("nothing", List.of())
            .outline();
    assertEquals(
        """
        # title

        ## heading

        - **label:** value
          - more

        | name | number | rest |
        | --- | ---: | --- |
        | a | 1 | x\\|y |

        - Said.
        """,
        MarkdownLayout.of(outline));
  }

  /** By the specification of GFM a backslash before ASCII punctuation is that character itself. */
  @Property(tries = 200, seed = "11")
  void escapesSoThatTheTextComesBack(@ForAll @StringLength(max = 40) String text) {
    String escaped = MarkdownLayout.escaped(text);
    assertTrue(escaped.lines().count() <= 1, escaped);
    String back = escaped.replaceAll("\\\\(\\p{Punct})", "$1");
    assertEquals(text.replaceAll("\\s+", " "), back);
    String bare = escaped.replaceAll("\\\\.", "");
    assertTrue(bare.chars().noneMatch(c -> "\\`*_[]<>|&~".indexOf(c) >= 0), escaped);
  }

  /** RFC 4180: read back by its own grammar, every cell is what was written. */
  @Property(tries = 200, seed = "12")
  void quotesCellsSoThatTheyComeBack(
      @ForAll @Size(3) List<@StringLength(max = 12) String> first,
      @ForAll @Size(3) List<@StringLength(max = 12) String> second) {
    CsvTable table = new CsvTable(first);
    table.row(second);
    assertEquals(List.of(first, second), CsvText.parsed(table.toString()));
  }

  @Test
  void refusesRowsWithoutACellForEachColumn() {
    assertThrows(IllegalArgumentException.class, () -> table(List.of(List.of("a"))));
    CsvTable table = new CsvTable(List.of("a", "b"));
    assertThrows(IllegalArgumentException.class, () -> table.row(List.of("a")));
    assertThrows(IllegalStateException.class, () -> CsvTable.number("it", Double.NaN));
  }

  @Test
  void doesNotSeparateANumberFromItsPercentSign() {
    List<String> lines = Lines.wrapped("some 12 % of it", 8, String::length);
    assertEquals("some|12 % of|it", lines.stream().collect(Collectors.joining("|")));
  }
}
