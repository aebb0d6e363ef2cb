package org.toprung.budget.report;

import static org.junit.jupiter.api.Assertions.assertEquals;

import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class FiguresTest {

  @ParameterizedTest
  @CsvSource({
    "0.523, 0.0008, 0.52300 ± 0.00080",
    "0.018106882, 0.000181278, 0.01811 ± 0.00018",
    "5.977, 0.996, 6.0 ± 1.0",
    "12345, 678, 12340 ± 680",
    "0.27849, 0, 0.2785 ± 0",
  })
  void showsAValueToTheSecondDigitOfItsUncertainty(
      double value, double uncertainty, String expected) {
    assertEquals(expected, Figures.measured(value, uncertainty));
  }

  @ParameterizedTest
  @CsvSource({"0, 0", "3e-11, <1e-10", "5.874e-5, 5.9e-05"})
  void showsTwoDigitsOfAnUncertainty(double value, String expected) {
    assertEquals(expected, Figures.uncertainty(value));
  }

  @ParameterizedTest
  @CsvSource({"0.7284, 72.8 %", "-0.0002, 0.0 %", "-0.012, -1.2 %", "1, 100.0 %"})
  void showsATenthOfAPercentOfAShare(double fraction, String expected) {
    assertEquals(expected, Figures.share(fraction));
  }

  @ParameterizedTest
  @CsvSource({"0.634, +63 %", "-0.274, -27 %", "-0.002, 0 %"})
  void showsAChangeWithItsSign(double fraction, String expected) {
    assertEquals(expected, Figures.change(fraction));
  }
}
