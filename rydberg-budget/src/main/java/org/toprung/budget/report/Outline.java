package org.toprung.budget.report;

import java.util.ArrayList;
import java.util.List;

/**
 * What a report says, in order, whatever it is written in.
 *
 * @param title one line
 * @param sections the sections
 */
record Outline(String title, List<Section> sections) {

  /** A heading and what stands below it. */
  record Section(String heading, List<Block> blocks) {
    Section {
      blocks = List.copyOf(blocks);
    }
  }

  /** A piece of a section. */
  sealed interface Block permits Fact, Table, Sentence {}

  /** A named value; without a label it goes on with the one above. */
  record Fact(String label, String value) implements Block {}

  /** An item of a list. */
  record Sentence(String text) implements Block {}

  /** Rows of cells. The last column may be long. */
  record Table(List<Column> columns, List<List<String>> rows) implements Block {
    Table {
      columns = List.copyOf(columns);
      rows = rows.stream().map(List::copyOf).toList();
      for (List<String> row : rows) {
        if (row.size() != columns.size()) {
          throw new IllegalArgumentException(row + " has not one cell for each of " + columns);
        }
      }
    }
  }

  /** What a column is called and on which side its cells stand. */
  record Column(String name, boolean isRight) {
    static Column left(String name) {
      return new Column(name, false);
    }

    static Column right(String name) {
      return new Column(name, true);
    }
  }

  Outline {
    sections = List.copyOf(sections);
  }

  /** Collects sections. */
  static final class Writer {
    private final String title;
    private final List<Section> sections = new ArrayList<>();
    private final List<Block> blocks = new ArrayList<>();
    private String heading;

    Writer(String title) {
      this.title = title;
    }

    /** Begins a section. */
    Writer section(String newHeading) {
      close();
      heading = newHeading;
      return this;
    }

    Writer fact(String label, String value) {
      return add(new Fact(label, value));
    }

    Writer sentence(String text) {
      return add(new Sentence(text));
    }

    /** A table; nothing where it has no rows. */
    Writer table(List<Column> columns, List<List<String>> rows) {
      return rows.isEmpty() ? this : add(new Table(columns, rows));
    }

    /** A section of sentences; nothing where there are none. */
    Writer list(String newHeading, List<String> sentences) {
      if (!sentences.isEmpty()) {
        section(newHeading);
        sentences.forEach(this::sentence);
      }
      return this;
    }

    private Writer add(Block block) {
      blocks.add(block);
      return this;
    }

    private void close() {
      if (heading != null) {
        sections.add(new Section(heading, blocks));
      }
      blocks.clear();
    }

    Outline outline() {
      close();
      heading = null;
      return new Outline(title, sections);
    }
  }
}
