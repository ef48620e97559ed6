package org.spikewright.ledger;

/**
 * Doubles as text that is exact and the same on every Java version: a plain decimal where a short
 * one is exact, else a mark and the bits in hexadecimal. {@link Double#toString} will not do,
 * because its digits changed between Java versions, and equal facts must stay equal texts for as
 * long as the ledger lives.
 */
final class ExactDouble {
  private static final double LARGEST_EXACT = 1L << 53;
  private static final int MOST_DECIMALS = 12;

  /** Marks bits. */
  private static final char BITS = '#';

  private ExactDouble() {}

  static String text(double value) {
    if (value == 0) {
      return 1 / value > 0 ? "0" : bits(value);
    }
    double scale = 1;
    for (int decimals = 0; decimals <= MOST_DECIMALS; decimals++) {
      double digits = Math.rint(value * scale);
      if (!(Math.abs(digits) < LARGEST_EXACT)) {
        break;
      }
      // Both are exact, so that their quotient is what the decimal text reads as.
      if (digits / scale == value) {
        return decimal((long) digits, decimals);
      }
      scale *= 10;
    }
    return bits(value);
  }

  static double parse(String text) {
    return text.charAt(0) == BITS
        ? Double.longBitsToDouble(Long.parseUnsignedLong(text, 1, text.length(), 16))
        : Double.parseDouble(text);
  }

  private static String bits(double value) {
    return BITS + Long.toHexString(Double.doubleToLongBits(value));
  }

  private static String decimal(long digits, int decimals) {
    if (decimals == 0) {
      return Long.toString(digits);
    }
    String all = Long.toString(Math.abs(digits));
    String padded = "0".repeat(Math.max(0, decimals + 1 - all.length())) + all;
    int point = padded.length() - decimals;
    return (digits < 0 ? "-" : "") + padded.substring(0, point) + "." + padded.substring(point);
  }
}
