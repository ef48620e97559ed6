package org.spikewright.quantity;

import java.math.BigDecimal;
import java.math.MathContext;
import java.math.RoundingMode;

/** How numbers are printed where a program or a person reads them back. */
public final class Numbers {
  private static final long MILLION = 1_000_000;

  /** Below this a number of millionths has at most 15 digits, which a double tells apart. */
  private static final double SHORT = 1e6;

  private Numbers() {}

  /**
   * The shortest decimal text that reads back as the same double, without an exponent between 1e-6
   * and 1e15: {@code 20}, {@code 0.05}, {@code 1.5E-9}.
   */
  public static String plain(double value) {
    if (value == 0) {
      return "0";
    }
    double size = Math.abs(value);
    if (size < SHORT) {
      double digits = Math.rint(value * SHORT);
      // Both are exact, so that their quotient is what the decimal text reads as.
      if (digits / SHORT == value) {
        return decimal((long) digits);
      }
    }
    if (size >= 1e-3 && size < 1e7) {
      // Here the shortest text has no exponent.
      String text = Double.toString(value);
      return text.endsWith(".0") ? text.substring(0, text.length() - 2) : text;
    }
    if (!(size >= 1e-6 && size < 1e15)) {
      return Double.toString(value);
    }
    return new BigDecimal(Double.toString(value)).stripTrailingZeros().toPlainString();
  }

  /** A number of millionths, without zeros at its end. */
  private static String decimal(long millionths) {
    long whole = Math.abs(millionths) / MILLION;
    long rest = Math.abs(millionths) % MILLION;
    StringBuilder text = new StringBuilder(16);
    text.append(millionths < 0 ? "-" : "").append(whole);
    if (rest > 0) {
      text.append('.');
      for (long place = MILLION / 10; rest > 0; place /= 10) {
        text.append((char) ('0' + rest / place));
        rest %= place;
      }
    }
    return text.toString();
  }

  /**
   * A number for people, to so many significant digits: {@code 14.2}, {@code 0.0031}, {@code
   * 1.2E-9}.
   *
   * @param significant 1 or more
   */
  public static String rounded(double value, int significant) {
    if (value == 0) {
      return "0";
    }
    return roundedLike(value, value, significant);
  }

  /**
   * A number for people, to the decimal place of the given number of significant digits of another:
   * with 0.0234 and 2, {@code 1.235}.
   *
   * @param guide not 0
   */
  public static String roundedLike(double value, double guide, int significant) {
    BigDecimal digits =
        BigDecimal.valueOf(guide).round(new MathContext(significant, RoundingMode.HALF_EVEN));
    int scale = digits.scale() + significant - digits.precision();
    BigDecimal rounded = BigDecimal.valueOf(value).setScale(scale, RoundingMode.HALF_EVEN);
    return inReach(guide) ? rounded.toPlainString() : rounded.toString();
  }

  private static boolean inReach(double value) {
    double size = Math.abs(value);
    return size >= 1e-6 && size < 1e9;
  }
}
