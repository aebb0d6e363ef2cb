package org.toprung.budget.report;

import java.util.List;
import java.util.stream.Collectors;
import org.toprung.budget.report.Outline.Column;

/**
 * An outline in GitHub-flavoured Markdown: sections, lists and tables. All text is escaped, so that
 * nothing in it is taken for markup.
 */
final class MarkdownLayout {
  private static final String MARKUP = "\\`*_[]<>|&~$#@!";

  private final StringBuilder text = new StringBuilder();

  private MarkdownLayout() {}

  static String of(Outline outline) {
    return new MarkdownLayout().laidOut(outline);
  }

  private String laidOut(Outline outline) {
    line("# " + escaped(outline.title()));
    for (Outline.Section section : outline.sections()) {
      line("");
      line("## " + escaped(section.heading()));
      line("");
      List<Outline.Block> blocks = section.blocks();
      for (int i = 0; i < blocks.size(); i++) {
        if (i > 0 && (isTable(blocks.get(i)) || isTable(blocks.get(i - 1)))) {
          line("");
        }
        block(blocks.get(i));
      }
    }
    return text.toString();
  }

  private static boolean isTable(Outline.Block block) {
    return block instanceof Outline.Table;
  }

  private void block(Outline.Block block) {
    if (block instanceof Outline.Fact fact) {
      line(
          fact.label().isEmpty()
              ? "  - " + escaped(fact.value())
              : "- **" + escaped(fact.label()) + ":** " + escaped(fact.value()));
    } else if (block instanceof Outline.Sentence sentence) {
      line("- " + escaped(sentence.text()));
    } else if (block instanceof Outline.Table table) {
      row(table.columns().stream().map(Column::name).toList());
      line(
          table.columns().stream()
              .map(c -> c.isRight() ? "---:" : "---")
              .collect(Collectors.joining(" | ", "| ", " |")));
      table.rows().forEach(this::row);
    }
  }

  private void row(List<String> cells) {
    line(
        cells.stream()
            .map(MarkdownLayout::escaped)
            .collect(Collectors.joining(" | ", "| ", " |"))
            .replaceAll(" +", " "));
  }

  private void line(String line) {
    text.append(line.stripTrailing()).append('\n');
  }

  /** The text with a backslash before everything that could be markup, on one line. */
  static String escaped(String text) {
    StringBuilder out = new StringBuilder();
    for (char c : text.replaceAll("\\s+", " ").toCharArray()) {
      if (MARKUP.indexOf(c) >= 0) {
        out.append('\\');
      }
      out.append(c);
    }
    return out.toString();
  }
}
