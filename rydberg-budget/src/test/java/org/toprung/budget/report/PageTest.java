package org.toprung.budget.report;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.constraints.CharRange;
import net.jqwik.api.constraints.Chars;
import net.jqwik.api.constraints.StringLength;
import org.junit.jupiter.api.Test;

class PageTest {

  /** Nothing is lost by wrapping, and nothing is wider than the page. */
  @Property(seed = "5", tries = 200)
  void wrapsWithoutLosingText(
      @ForAll @StringLength(max = 400) @CharRange(from = 'a', to = 'd') @Chars(' ')
          String sentence) {
    Page page = new Page();
    page.bullet(sentence);
    String text = page.toString();
    assertTrue(text.lines().allMatch(line -> line.length() <= Page.WIDTH), text);
    String kept = text.replaceAll("\\s", "").substring(1);
    assertEquals(sentence.replaceAll("\\s", ""), kept);
  }

  @Test
  void goesOnBelowTheBeginningOfAValue() {
    Page page = new Page();
    page.value("name", "word ".repeat(30));
    assertTrue(
        page.toString().lines().skip(1).allMatch(l -> l.startsWith(" ".repeat(28) + "word")));
  }
}
