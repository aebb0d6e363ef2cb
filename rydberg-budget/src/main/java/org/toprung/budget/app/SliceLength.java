package org.toprung.budget.app;

import org.toprung.core.quantity.Time;
import picocli.CommandLine.ITypeConverter;
import picocli.CommandLine.TypeConversionException;

/** Reads a length of slices. */
final class SliceLength implements ITypeConverter<Time> {
  @Override
  public Time convert(String text) {
    try {
      return Time.parse(text);
    } catch (IllegalArgumentException e) {
      throw new TypeConversionException(
          "given " + text + "; allowed: a time with its unit such as \"2 ns\"");
    }
  }
}
