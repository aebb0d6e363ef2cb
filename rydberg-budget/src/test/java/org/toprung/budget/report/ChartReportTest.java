package org.toprung.budget.report;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.StringReader;
import javax.xml.parsers.DocumentBuilderFactory;
import org.junit.jupiter.api.Test;
import org.w3c.dom.Document;
import org.w3c.dom.NodeList;
import org.xml.sax.InputSource;

class ChartReportTest {

  private static Document parsed(String svg) throws Exception {
    DocumentBuilderFactory factory = DocumentBuilderFactory.newInstance();
    // the document type lives on the network; the chart must be well-formed without it
    factory.setFeature("http://apache.org/xml/features/nonvalidating/load-external-dtd", false);
    return factory.newDocumentBuilder().parse(new InputSource(new StringReader(svg)));
  }

  @Test
  void isWellFormedSvgOfAFixedWidth() throws Exception {
    for (ReportContent content :
        new ReportContent[] {SampleReport.reference(), SampleReport.wide()}) {
      Document svg = parsed(ChartReport.render(content));
      assertEquals(
          "svg",
          svg.getDocumentElement().getLocalName() == null
              ? svg.getDocumentElement().getTagName()
              : svg.getDocumentElement().getLocalName());
      assertTrue(svg.getDocumentElement().getAttribute("viewBox").startsWith("0 0 960 "));
    }
  }

  /** One bar for the total and one for each cause on the axis; bars are recognized by colour. */
  @Test
  void drawsABarForTheTotalAndForEachLargeCause() throws Exception {
    ReportContent content = SampleReport.reference();
    Document svg = parsed(ChartReport.render(content));
    long large = content.budget().causes().stream().filter(c -> c.error() > 1e-5).count();
    assertEquals(1, shapes(svg, "181,83,60"));
    assertTrue(shapes(svg, "59,122,140") >= large);
    assertTrue(shapes(svg, "59,122,140") <= content.budget().causes().size());
  }

  private static int shapes(Document svg, String color) {
    NodeList all = svg.getElementsByTagName("*");
    int count = 0;
    for (int i = 0; i < all.getLength(); i++) {
      String style =
          all.item(i).getAttributes().getNamedItem("style") == null
              ? ""
              : all.item(i).getAttributes().getNamedItem("style").getNodeValue();
      if (style.contains(color)) {
        count++;
      }
    }
    return count;
  }
}
