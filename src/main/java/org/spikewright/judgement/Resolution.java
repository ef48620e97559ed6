package org.spikewright.judgement;

import java.util.List;
import org.spikewright.reading.Signal;
import org.spikewright.series.Flask;

/**
 * How finely the instrument shows its readings. Data on a rounded display are often exactly
 * collinear, so that scatter below the display's own rounding must not be believed.
 */
final class Resolution {
  private Resolution() {}

  /**
   * The standard deviation that rounding alone gives a reading: its last decimal place over √12
   * (JCGM 100:2008, F.2.2.1), the finest place shown in the series (over the internal standard
   * where there is one), times the largest volume factor. 0 when it cannot be told.
   */
  static double of(List<Flask> flasks) {
    double finest = Double.POSITIVE_INFINITY;
    double factor = 0;
    for (Flask flask : flasks) {
      factor = Math.max(factor, flask.volumeFactor());
      for (var recorded : flask.readings()) {
        if (recorded.reading().signal() instanceof Signal.Value value) {
          finest = Math.min(finest, lastPlace(value.text()) / value.standard().orElse(1));
        }
      }
    }
    return Double.isFinite(finest) ? finest * factor / Math.sqrt(12) : 0;
  }

  /** The size of one unit in the last place of a number as shown: {@code 0.01} for 12.34. */
  private static double lastPlace(String text) {
    int places = 0;
    boolean decimals = false;
    int i = 0;
    for (; i < text.length() && text.charAt(i) != 'e' && text.charAt(i) != 'E'; i++) {
      char c = text.charAt(i);
      if (c == '.' || c == ',') {
        decimals = true;
        places = 0;
      } else if (decimals && c >= '0' && c <= '9') {
        places++;
      }
    }
    return Math.pow(10, exponent(text, i) - places);
  }

  private static int exponent(String text, int e) {
    if (e >= text.length()) {
      return 0;
    }
    try {
      return Integer.parseInt(text.substring(e + 1).strip().replace('\u2212', '-'));
    } catch (NumberFormatException notAnExponent) {
      return 0;
    }
  }
}
