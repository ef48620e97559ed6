package org.spikewright.quantity;

import java.math.BigDecimal;

/** How numbers are printed where a program or a person reads them back. */
public final class Numbers {
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
    if (!(size >= 1e-6 && size < 1e15)) {
      return Double.toString(value);
    }
    return new BigDecimal(Double.toString(value)).stripTrailingZeros().toPlainString();
  }
}
