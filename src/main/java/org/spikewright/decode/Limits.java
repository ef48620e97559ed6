package org.spikewright.decode;

/** How large the parts of a file may be. Beyond these a file is refused, never read in part. */
final class Limits {
  /** Characters of one record of a text file, all its lines together: bounds the heap it takes. */
  static final int RECORD_CHARS = 4 << 20;

  /** Characters of one field or cell; a spreadsheet program allows 32 767. */
  static final int FIELD_CHARS = 1 << 20;

  /** Rows among which the header is looked for when the separator is to be worked out. */
  static final int HEADER_ROWS = 200;

  /** Rows of a sheet, as the file format has it. */
  static final long SHEET_ROWS = 1_048_576;

  /** Columns of a sheet, as the file format has it: the last is XFD. */
  static final int SHEET_COLUMNS = 16_384;

  /**
   * Unpacked bytes of a sheet or of the table of strings; 500 000 rows of 9 take about 2 * 10^8.
   */
  static final long LARGE_PART_BYTES = 1L << 30;

  /** Unpacked bytes of a part that is read whole: the list of sheets, the styles. */
  static final long SMALL_PART_BYTES = 16L << 20;

  /** Bytes from which on a part's packing ratio counts. */
  static final long RATIO_FROM_BYTES = 64L << 20;

  /** Unpacked over packed size; sheets of ever the same row reach about 60, bombs 1000. */
  static final long RATIO = 200;

  /** Bytes of a packed file's directory; it is held in memory. */
  static final long DIRECTORY_BYTES = 16L << 20;

  /** Strings of a workbook's table of strings; they are held in memory. */
  static final int STRINGS = 2_000_000;

  /** Characters of all strings of that table together. */
  static final long STRINGS_CHARS = 32L << 20;

  /** Bytes of XML between two marks: bounds the heap that one name, attribute or text can take. */
  static final long XML_STEP_BYTES = 8L << 20;

  /** Elements within elements; workbooks use about 10. */
  static final int XML_DEPTH = 100;

  /** Different names of elements, attributes and prefixes; workbooks use some dozens. */
  static final int XML_NAMES = 10_000;

  /** Bytes of a workbook of the older kind, whose strings are held in memory; 65 536 x 9: 10^7. */
  static final long XLS_BYTES = 100L << 20;

  private Limits() {}
}
