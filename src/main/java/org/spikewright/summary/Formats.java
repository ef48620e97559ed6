package org.spikewright.summary;

import java.util.OptionalDouble;
import java.util.regex.Matcher;
import java.util.regex.Pattern;

/** How numbers are shown. */
final class Formats {
  static final String WHOLE = "0";
  static final String GENERAL = "General";
  static final String SCIENTIFIC = "0.000E+00";

  private static final int MOST_DECIMALS = 10;
  private static final Pattern WITH_UNCERTAINTY =
      Pattern.compile("^-?\\d+(?:\\.(\\d+))?\\s*(?:±|\\+/-).*", Pattern.DOTALL);

  private Formats() {}

  /** A fixed number of decimals. */
  static String decimals(int count) {
    return count <= 0 ? WHOLE : "0." + "0".repeat(Math.min(count, MOST_DECIMALS));
  }

  /** As many decimals as show a number of this size with this many digits. */
  static String significant(double size, int digits) {
    double magnitude = Math.abs(size);
    if (magnitude == 0) {
      return WHOLE;
    }
    if (!(magnitude >= 1e-5 && magnitude < 1e9)) {
      return SCIENTIFIC;
    }
    return decimals(digits - 1 - (int) Math.floor(Math.log10(magnitude)));
  }

  /** The same, where there may be no number. */
  static String significant(OptionalDouble size, int digits) {
    return significant(size.orElse(0), digits);
  }

  /**
   * The decimals of a result: those of the text to report where it states an uncertainty, else two
   * digits of half the interval, else four digits of the result.
   */
  static String ofResult(ResultRow row) {
    Matcher reported = WITH_UNCERTAINTY.matcher(row.reported());
    if (reported.matches()) {
      return decimals(reported.group(1) == null ? 0 : reported.group(1).length());
    }
    if (row.lower95().isPresent() && row.upper95().isPresent()) {
      double half = (row.upper95().getAsDouble() - row.lower95().getAsDouble()) / 2;
      if (half > 0) {
        return significant(half, 2);
      }
    }
    return significant(row.value(), 4);
  }
}
