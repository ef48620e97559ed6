package org.spikewright.workbook;

import org.apache.poi.xssf.usermodel.XSSFColor;
import org.spikewright.summary.Look;

/**
 * The colours. Verdicts differ in lightness as much as in hue, so that they stay apart in grey
 * print and for every kind of colour vision; the word beside them carries the meaning.
 */
final class Palette {
  static final String INK = "20303A";
  static final String FAINT_INK = "5B6770";
  static final String LINE = "2F6073";
  static final String POINT = "20303A";
  static final String GRID = "D5DADD";
  static final String HEADER_FILL = "DDE6EA";
  static final String CHOICE_FILL = "FFF6DC";
  static final String LINK = "1F5F8B";

  private static final byte OPAQUE = (byte) 0xFF;

  private Palette() {}

  /** The fill of a cell, or white. */
  static String fill(Look look) {
    return switch (look) {
      case HEADER, HEADER_RIGHT -> HEADER_FILL;
      case CHOICE -> CHOICE_FILL;
      case REPORT -> "E1F1EC";
      case REVIEW -> "F7D998";
      case REPEAT -> "5A2A6B";
      case WAITING -> "DFE2E5";
      default -> "FFFFFF";
    };
  }

  /** The fill of a chart's part. */
  static String part(Look look) {
    return switch (look) {
      case REPORT -> "BFE0D6";
      case REVIEW -> "E2A02E";
      case REPEAT -> "5A2A6B";
      default -> "8A9199";
    };
  }

  /** The colour of text. */
  static String ink(Look look) {
    return switch (look) {
      case REPEAT -> "FFFFFF";
      case FAINT, FAINT_RIGHT -> FAINT_INK;
      default -> INK;
    };
  }

  static byte[] rgb(String hex) {
    return new byte[] {
      (byte) Integer.parseInt(hex.substring(0, 2), 16),
      (byte) Integer.parseInt(hex.substring(2, 4), 16),
      (byte) Integer.parseInt(hex.substring(4, 6), 16)
    };
  }

  static XSSFColor color(String hex) {
    byte[] rgb = rgb(hex);
    return new XSSFColor(new byte[] {OPAQUE, rgb[0], rgb[1], rgb[2]});
  }
}
