package org.toprung.budget.report;

import java.util.ArrayList;
import java.util.List;
import javax.xml.stream.XMLStreamException;
import org.toprung.budget.report.SvgPage.Anchor;

/** Lines of text of one size across a chart, one below the other. */
final class TextBlock {
  private static final int LONGEST_TITLE = 2; // lines

  private final List<String> lines;
  private final double size;
  private final String[] style;

  private TextBlock(List<String> lines, double size, String... style) {
    this.lines = List.copyOf(lines);
    this.size = size;
    this.style = style;
  }

  /** A title that is cut where it would take the whole page. */
  static TextBlock title(String title) {
    return new TextBlock(
        Lines.wrapped(title, Look.ROOM, LONGEST_TITLE, s -> SansSerif.boldWidth(s, Look.TITLE)),
        Look.TITLE,
        "font-weight",
        "bold",
        "fill",
        Look.INK);
  }

  /** Sentences, each on lines of its own. */
  static TextBlock of(List<String> sentences, double size, String ink) {
    List<String> lines = new ArrayList<>();
    for (String sentence : sentences) {
      lines.addAll(Lines.wrapped(sentence, Look.ROOM, s -> SansSerif.width(s, size)));
    }
    return new TextBlock(lines, size, "fill", ink);
  }

  double height() {
    return lines.size() * size * Look.LEADING;
  }

  /** Draws from a height on; gives where the block ends. */
  double draw(SvgPage page, double from) throws XMLStreamException {
    double y = from;
    for (String line : lines) {
      page.text(Look.MARGIN, y + size, size, Anchor.START, line, style);
      y += size * Look.LEADING;
    }
    return y;
  }
}
