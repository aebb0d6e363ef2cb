package org.toprung.budget.report;

import java.io.StringReader;
import java.util.ArrayList;
import java.util.List;
import java.util.stream.Collectors;
import javax.xml.parsers.DocumentBuilderFactory;
import org.w3c.dom.Element;
import org.w3c.dom.NodeList;
import org.xml.sax.InputSource;

/** A chart as an XML parser sees it. */
record ChartDocument(Element root) {

  /** The rectangle a text may fill at most, by the widths the chart is laid out with. */
  record Box(String text, double left, double right, double top, double bottom) {
    boolean meets(Box other) {
      return left < other.right && other.left < right && top < other.bottom && other.top < bottom;
    }

    boolean isWithin(Element page) {
      return left >= 0
          && top >= 0
          && right <= number(page, "width")
          && bottom <= number(page, "height");
    }
  }

  static ChartDocument of(String svg) {
    try {
      DocumentBuilderFactory factory = DocumentBuilderFactory.newInstance();
      factory.setNamespaceAware(true);
      return new ChartDocument(
          factory
              .newDocumentBuilder()
              .parse(new InputSource(new StringReader(svg)))
              .getDocumentElement());
    } catch (Exception e) {
      throw new AssertionError("not well-formed: " + svg, e);
    }
  }

  /** Elements of a name or class, in the order of the document. */
  List<Element> all(String nameOrClass) {
    List<Element> found = new ArrayList<>();
    NodeList nodes = root.getElementsByTagName("*");
    for (int i = 0; i < nodes.getLength(); i++) {
      Element element = (Element) nodes.item(i);
      if (element.getTagName().equals(nameOrClass)
          || element.getAttribute("class").equals(nameOrClass)) {
        found.add(element);
      }
    }
    return found;
  }

  /** All text that is drawn, lines joined by spaces. */
  String joinedText() {
    return all("text").stream().map(Element::getTextContent).collect(Collectors.joining(" "));
  }

  /** Where a label of the axis stands. */
  double xOf(String label) {
    return all("text").stream()
        .filter(t -> t.getTextContent().equals(label))
        .mapToDouble(t -> number(t, "x"))
        .findFirst()
        .orElseThrow();
  }

  List<Box> textBoxes() {
    return all("text").stream().map(ChartDocument::box).toList();
  }

  private static Box box(Element text) {
    String content = text.getTextContent();
    double size = number(text, "font-size");
    double width =
        text.getAttribute("font-weight").equals("bold")
            ? SansSerif.boldWidth(content, size)
            : SansSerif.width(content, size);
    double x = number(text, "x");
    double left =
        switch (text.getAttribute("text-anchor")) {
          case "end" -> x - width;
          case "middle" -> x - width / 2;
          default -> x;
        };
    double baseline = number(text, "y");
    return new Box(content, left, left + width, baseline - 0.95 * size, baseline + 0.25 * size);
  }

  static double number(Element element, String attribute) {
    return Double.parseDouble(element.getAttribute(attribute));
  }
}
