package org.spikewright.quantity;

import java.util.Optional;
import java.util.OptionalDouble;

/**
 * The strict grammar of a number: an optional sign, ASCII digits with at most one decimal mark,
 * optionally grouped in threes by the thousands mark (then it does not begin with 0), an optional
 * decimal exponent. Nothing else is a number: no {@code NaN}, {@code 1d}, {@code 0x1p3}, no digits
 * of other scripts, no value that overflows.
 *
 * @param decimalMark {@code '.'} or {@code ','}
 * @param thousandsMark the grouping mark, if the source uses one; never the decimal mark
 */
public record NumberGrammar(char decimalMark, Optional<Character> thousandsMark) {

  /** Decimal point, no grouping. */
  public static final NumberGrammar POINT = new NumberGrammar('.', Optional.empty());

  /** Decimal comma, no grouping. */
  public static final NumberGrammar COMMA = new NumberGrammar(',', Optional.empty());

  /** So many digits are exact in a double, and so are the powers of ten. */
  private static final int MOST_DIGITS = 15;

  private static final double[] POWERS = new double[MOST_DIGITS + 1];

  static {
    POWERS[0] = 1;
    for (int i = 1; i < POWERS.length; i++) {
      POWERS[i] = 10 * POWERS[i - 1];
    }
  }

  /** Refuses marks that cannot be told apart: {@link IllegalArgumentException}. */
  public NumberGrammar {
    if (thousandsMark.isPresent() && thousandsMark.get() == decimalMark) {
      throw new IllegalArgumentException("decimal and thousands mark are both " + decimalMark);
    }
  }

  /**
   * Reads a number; blanks around it do not count.
   *
   * @return the nearest double, or empty when the text is not a number by this grammar or overflows
   */
  public OptionalDouble parse(String text) {
    double common = common(text);
    if (common >= 0) {
      return OptionalDouble.of(common);
    }
    String plain = normalised(text.strip());
    if (plain.isEmpty()) {
      return OptionalDouble.empty();
    }
    double value = Double.parseDouble(plain);
    return Double.isFinite(value) ? OptionalDouble.of(value) : OptionalDouble.empty();
  }

  /**
   * The number that up to 15 digits with at most one decimal mark among them write, which is what
   * nearly every cell holds; NaN for any other text. Digits and power of ten are exact, so that
   * their quotient is the nearest double.
   */
  private double common(String text) {
    int length = text.length();
    if (length == 0 || length > MOST_DIGITS + 1) {
      return Double.NaN;
    }
    long digits = 0;
    int mark = -1;
    for (int i = 0; i < length; i++) {
      char c = text.charAt(i);
      if (c >= '0' && c <= '9') {
        digits = 10 * digits + c - '0';
      } else if (c == decimalMark && mark < 0) {
        mark = i;
      } else {
        return Double.NaN;
      }
    }
    if (mark < 0) {
      return length > MOST_DIGITS ? Double.NaN : digits;
    }
    return length == 1 ? Double.NaN : digits / POWERS[length - 1 - mark];
  }

  /** The text in the grammar of {@link Double#parseDouble}, or empty when it is not a number. */
  private String normalised(String text) {
    int length = text.length();
    StringBuilder out = new StringBuilder(length);
    int i = 0;
    if (i < length && isSign(text.charAt(i))) {
      out.append(text.charAt(i) == '+' ? '+' : '-');
      i++;
    }
    int wholeStart = i;
    i = whole(text, i, out);
    int digits = i < 0 ? -1 : i - wholeStart;
    if (i >= 0 && i < length && text.charAt(i) == decimalMark) {
      out.append('.');
      int start = ++i;
      i = digits(text, i, out);
      digits += i - start;
    }
    if (i < 0 || digits <= 0) {
      return "";
    }
    if (i < length && (text.charAt(i) == 'e' || text.charAt(i) == 'E')) {
      i = exponent(text, i + 1, out);
    }
    return i == length ? out.toString() : "";
  }

  /** Copies the whole part and returns where it ends, or −1 when its grouping is wrong. */
  private int whole(String text, int from, StringBuilder out) {
    int i = digits(text, from, out);
    if (thousandsMark.isEmpty() || i >= text.length() || text.charAt(i) != thousandsMark.get()) {
      return i;
    }
    // Nobody groups 0.123; where the mark is a point elsewhere, this would be off by 1000.
    if (i == from || i - from > 3 || text.charAt(from) == '0') {
      return -1;
    }
    while (i < text.length() && text.charAt(i) == thousandsMark.get()) {
      int start = i + 1;
      i = digits(text, start, out);
      if (i - start != 3) {
        return -1;
      }
    }
    return i;
  }

  private static int exponent(String text, int from, StringBuilder out) {
    out.append('e');
    int i = from;
    if (i < text.length() && isSign(text.charAt(i))) {
      out.append(text.charAt(i) == '+' ? '+' : '-');
      i++;
    }
    int start = i;
    i = digits(text, i, out);
    return i == start ? -1 : i;
  }

  private static int digits(String text, int from, StringBuilder out) {
    int i = from;
    while (i < text.length() && text.charAt(i) >= '0' && text.charAt(i) <= '9') {
      out.append(text.charAt(i));
      i++;
    }
    return i;
  }

  private static boolean isSign(char c) {
    return c == '+' || c == '-' || c == '\u2212';
  }
}
