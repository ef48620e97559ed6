package org.spikewright.published;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.math.BigDecimal;
import java.util.OptionalDouble;

/** How a number is held against another. */
final class Agreement {
  private Agreement() {}

  /** Equal but for a relative deviation. */
  static void isAbout(double expected, double found, double relative) {
    assertThat(found).isCloseTo(expected, within(Math.abs(expected) * relative));
  }

  /** There, and equal but for a relative deviation. */
  static void isAbout(double expected, OptionalDouble found, double relative) {
    assertThat(found).isPresent();
    isAbout(expected, found.getAsDouble(), relative);
  }

  /** Within half a unit of the last digit of a number as it stands in print. */
  static void prints(String printed, double found) {
    double lastPlace = Math.pow(10, -new BigDecimal(printed).scale());
    double expected = Double.parseDouble(printed);
    assertThat(found)
        .as("as printed: %s", printed)
        .isCloseTo(expected, within(lastPlace / 2 + 1e-12 * Math.abs(expected)));
  }
}
