package org.toprung.budget.report;

import java.io.StringWriter;
import java.util.Locale;
import javax.xml.stream.XMLOutputFactory;
import javax.xml.stream.XMLStreamException;
import javax.xml.stream.XMLStreamWriter;

/** A page of SVG 1.1 with a few shapes and text; lengths in pixels. */
final class SvgPage {
  /** How text lies at its point. */
  enum Anchor {
    START,
    MIDDLE,
    END
  }

  private static final String NAMESPACE = "http://www.w3.org/2000/svg";
  private static final int REPLACEMENT = 0xfffd;

  private final StringWriter out = new StringWriter();
  private final XMLStreamWriter xml;

  /** Begins a white page; title and description are for those who cannot see it. */
  SvgPage(double width, double height, String title, String description) throws XMLStreamException {
    xml = XMLOutputFactory.newDefaultFactory().createXMLStreamWriter(out);
    xml.writeStartDocument("UTF-8", "1.0");
    xml.writeCharacters("\n");
    xml.writeStartElement("svg");
    xml.writeDefaultNamespace(NAMESPACE);
    attributes(
        "width",
        shown(width),
        "height",
        shown(height),
        "viewBox",
        "0 0 " + shown(width) + " " + shown(height),
        "role",
        "img",
        "aria-labelledby",
        "toprung-title toprung-description",
        "font-family",
        "sans-serif");
    element("title", title, "id", "toprung-title");
    element("desc", description, "id", "toprung-description");
    rectangle(0, 0, width, height, "fill", "#ffffff");
  }

  void rectangle(double x, double y, double width, double height, String... style)
      throws XMLStreamException {
    begin("rect");
    attributes("x", shown(x), "y", shown(y), "width", shown(width), "height", shown(height));
    end(style);
  }

  /** Draws along a path of SVG commands; see {@link #to}. */
  void path(String commands, String... style) throws XMLStreamException {
    begin("path");
    attributes("d", commands);
    end(style);
  }

  /** A command of a path. */
  static String to(char command, double x, double y) {
    return command + shown(x) + " " + shown(y);
  }

  void text(double x, double y, double size, Anchor anchor, String text, String... style)
      throws XMLStreamException {
    begin("text");
    attributes("x", shown(x), "y", shown(y), "font-size", shown(size));
    attributes("text-anchor", anchor.name().toLowerCase(Locale.ROOT));
    attributes(style);
    xml.writeCharacters(clean(text));
    xml.writeEndElement();
  }

  /** Ends the page and gives its text. */
  String finish() throws XMLStreamException {
    xml.writeCharacters("\n");
    xml.writeEndElement();
    xml.writeEndDocument();
    xml.close();
    return out.append('\n').toString();
  }

  private void element(String name, String text, String... attributes) throws XMLStreamException {
    begin(name);
    attributes(attributes);
    xml.writeCharacters(clean(text));
    xml.writeEndElement();
  }

  private void begin(String name) throws XMLStreamException {
    xml.writeCharacters("\n  ");
    xml.writeStartElement(name);
  }

  private void end(String... style) throws XMLStreamException {
    attributes(style);
    xml.writeEndElement();
  }

  private void attributes(String... pairs) throws XMLStreamException {
    for (int i = 0; i < pairs.length; i += 2) {
      xml.writeAttribute(pairs[i], pairs[i + 1]);
    }
  }

  private static String shown(double length) {
    String text = String.format(Locale.ROOT, "%.2f", length + 0.0);
    return text.endsWith(".00") ? text.substring(0, text.length() - 3) : text;
  }

  /** The text with what XML cannot hold replaced. */
  private static String clean(String text) {
    return text.codePoints()
        .map(c -> isAllowed(c) ? c : REPLACEMENT)
        .collect(StringBuilder::new, StringBuilder::appendCodePoint, StringBuilder::append)
        .toString();
  }

  /** Characters of XML 1.0 without the control characters. */
  private static boolean isAllowed(int c) {
    return c >= 0x20 && c <= 0xd7ff && !Character.isISOControl(c)
        || c >= 0xe000 && c <= 0xfffd
        || c >= 0x10000;
  }
}
