package org.spikewright.decode;

import java.math.BigDecimal;
import java.time.LocalDateTime;
import org.apache.poi.ss.usermodel.DateUtil;
import org.spikewright.table.Cell;

/** Cells of stored numbers, for both kinds of workbook. */
final class NumberCells {
  /** Day number of 10000-01-01, the first day beyond the calendar of spreadsheets. */
  private static final int BEYOND_1900 = 2_958_466;

  private static final int BEYOND_1904 = BEYOND_1900 - 1_462;

  private final boolean dates1904;

  NumberCells(boolean dates1904) {
    this.dates1904 = dates1904;
  }

  /** The cell of a number written in digits; unusable when they are no finite decimal number. */
  Cell ofDigits(String digits, boolean date) {
    String raw = plainWhole(digits.strip());
    if (!isPlainDecimal(raw)) {
      return new Cell.Unusable(Shown.plain(raw, 40) + " (not a finite number)");
    }
    double value = Double.parseDouble(raw);
    if (!Double.isFinite(value)) {
      return new Cell.Unusable(Shown.plain(raw, 40) + " (a number too large to be held)");
    }
    if (value == 0 && !isZero(raw)) {
      return new Cell.Unusable(Shown.plain(raw, 40) + " (a number too small to be held)");
    }
    return date ? moment(value, raw) : new Cell.Number(value, raw);
  }

  /** Some programs store 1 as 1.0; a person sees 1, and as a name it is the same. */
  private static String plainWhole(String raw) {
    return raw.endsWith(".0") && raw.length() > 2 ? raw.substring(0, raw.length() - 2) : raw;
  }

  /** The cell of a binary number; its digits are the fewest that read back as the same number. */
  Cell ofBinary(double value, boolean date) {
    if (!Double.isFinite(value)) {
      return new Cell.Unusable(value + " (not a finite number)");
    }
    String raw = shortest(value);
    return date ? moment(value, raw) : new Cell.Number(value, raw);
  }

  private Cell moment(double value, String raw) {
    if (!(value >= 0 && value < (dates1904 ? BEYOND_1904 : BEYOND_1900))) {
      return new Cell.Unusable(raw + " (shown as a date, but no day of the calendar)");
    }
    LocalDateTime moment = DateUtil.getLocalDateTime(value, dates1904);
    return new Cell.Moment(moment, raw);
  }

  private static String shortest(double value) {
    double size = Math.abs(value);
    if (value == 0) {
      return "0";
    }
    if (!(size >= 1e-6 && size < 1e15)) {
      return Double.toString(value);
    }
    return new BigDecimal(Double.toString(value)).stripTrailingZeros().toPlainString();
  }

  /**
   * Whether a text is a decimal number in ASCII digits, with a point and an exponent if need be.
   * The platform's parser also takes {@code NaN}, {@code 1d} and {@code 0x1p3}.
   */
  static boolean isPlainDecimal(String text) {
    int at = signAt(text, 0);
    int whole = digitsFrom(text, at);
    int end = whole;
    int digits = whole - at;
    if (end < text.length() && text.charAt(end) == '.') {
      end = digitsFrom(text, end + 1);
      digits += end - whole - 1;
    }
    if (digits > 0 && end < text.length() && (text.charAt(end) | 0x20) == 'e') {
      int exponent = signAt(text, end + 1);
      end = digitsFrom(text, exponent);
      return end == text.length() && end > exponent;
    }
    return digits > 0 && end == text.length();
  }

  private static boolean isZero(String decimal) {
    for (int i = 0; i < decimal.length() && (decimal.charAt(i) | 0x20) != 'e'; i++) {
      if (decimal.charAt(i) >= '1' && decimal.charAt(i) <= '9') {
        return false;
      }
    }
    return true;
  }

  private static int signAt(String text, int at) {
    boolean sign = at < text.length() && (text.charAt(at) == '-' || text.charAt(at) == '+');
    return sign ? at + 1 : at;
  }

  private static int digitsFrom(String text, int from) {
    int at = from;
    while (at < text.length() && text.charAt(at) >= '0' && text.charAt(at) <= '9') {
      at++;
    }
    return at;
  }
}
