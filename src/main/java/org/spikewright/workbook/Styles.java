package org.spikewright.workbook;

import java.util.EnumMap;
import java.util.HashMap;
import java.util.Map;
import org.apache.poi.ss.usermodel.BorderStyle;
import org.apache.poi.ss.usermodel.CellStyle;
import org.apache.poi.ss.usermodel.FillPatternType;
import org.apache.poi.ss.usermodel.HorizontalAlignment;
import org.apache.poi.ss.usermodel.VerticalAlignment;
import org.apache.poi.xssf.usermodel.XSSFCellStyle;
import org.apache.poi.xssf.usermodel.XSSFFont;
import org.apache.poi.xssf.usermodel.XSSFWorkbook;
import org.spikewright.summary.Look;

/** The cell styles of a workbook, each made once. */
final class Styles {
  static final String DAY = "yyyy-mm-dd";
  static final String MOMENT = "yyyy-mm-dd hh:mm:ss";
  private static final String AS_TEXT = "@";

  private final XSSFWorkbook book;
  private final Map<Look, XSSFFont> fonts = new EnumMap<>(Look.class);
  private final Map<Look, Map<String, CellStyle>> styles = new EnumMap<>(Look.class);
  private final CellStyle[][] texts = new CellStyle[Look.values().length][2];
  private final CellStyle link;

  Styles(XSSFWorkbook book) {
    this.book = book;
    for (Look look : Look.values()) {
      fonts.put(look, font(look));
      styles.put(look, new HashMap<>());
      texts[look.ordinal()][0] = text(look, false);
      texts[look.ordinal()][1] = text(look, true);
    }
    this.link = linked();
  }

  /** For text; {@code quoted} keeps it text when a person edits the cell. */
  CellStyle ofText(Look look, boolean quoted) {
    return texts[look.ordinal()][quoted ? 1 : 0];
  }

  /** For a number, a date or a formula. */
  CellStyle of(Look look, String format) {
    return styles.get(look).computeIfAbsent(format, f -> make(look, f));
  }

  CellStyle ofLink() {
    return link;
  }

  private XSSFCellStyle text(Look look, boolean quoted) {
    XSSFCellStyle style = make(look, quoted ? AS_TEXT : "General");
    style.setQuotePrefixed(quoted);
    boolean right = look == Look.HEADER_RIGHT || look == Look.FAINT_RIGHT;
    style.setAlignment(right ? HorizontalAlignment.RIGHT : HorizontalAlignment.LEFT);
    if (look != Look.TITLE && look != Look.HEADING) {
      style.setIndention((short) (right ? 0 : 1));
    }
    return style;
  }

  private XSSFCellStyle make(Look look, String format) {
    XSSFCellStyle style = book.createCellStyle();
    style.setFont(fonts.get(look));
    style.setDataFormat(book.createDataFormat().getFormat(format));
    style.setVerticalAlignment(VerticalAlignment.TOP);
    boolean header = look == Look.HEADER || look == Look.HEADER_RIGHT;
    if (format.equals(DAY) || format.equals(MOMENT)) {
      style.setAlignment(HorizontalAlignment.LEFT);
      style.setIndention((short) 1);
    }
    style.setWrapText(look == Look.WRAPPED || header);
    String fill = Palette.fill(look);
    if (!fill.equals("FFFFFF")) {
      style.setFillForegroundColor(Palette.color(fill));
      style.setFillPattern(FillPatternType.SOLID_FOREGROUND);
    }
    if (header) {
      style.setBorderBottom(BorderStyle.MEDIUM);
      style.setBottomBorderColor(Palette.color(Palette.LINE));
    }
    if (look == Look.CHOICE) {
      box(style);
    }
    return style;
  }

  private static void box(XSSFCellStyle style) {
    style.setBorderTop(BorderStyle.MEDIUM);
    style.setBorderBottom(BorderStyle.MEDIUM);
    style.setBorderLeft(BorderStyle.MEDIUM);
    style.setBorderRight(BorderStyle.MEDIUM);
  }

  private XSSFFont font(Look look) {
    XSSFFont font = book.createFont();
    font.setFontName("Calibri");
    font.setFontHeightInPoints((short) size(look));
    font.setBold(isBold(look));
    font.setColor(Palette.color(Palette.ink(look)));
    return font;
  }

  private static int size(Look look) {
    return switch (look) {
      case TITLE -> 16;
      case HEADING -> 12;
      default -> 10;
    };
  }

  private static boolean isBold(Look look) {
    return switch (look) {
      case TITLE, HEADING, HEADER, HEADER_RIGHT, STRONG, REVIEW, REPEAT, CHOICE -> true;
      default -> false;
    };
  }

  private XSSFCellStyle linked() {
    XSSFCellStyle style = text(Look.PLAIN, false);
    XSSFFont font = book.createFont();
    font.setFontName("Calibri");
    font.setFontHeightInPoints((short) 10);
    font.setUnderline(XSSFFont.U_SINGLE);
    font.setColor(Palette.color(Palette.LINK));
    style.setFont(font);
    return style;
  }
}
