package org.spikewright.summary;

/**
 * A column of a sheet.
 *
 * @param title its header; empty where the sheet is no table
 * @param width in characters, 1 to 255
 * @param kind what most of its cells hold
 */
public record ColumnPlan(String title, int width, Kind kind) {

  /** What most cells of a column hold; numbers stand at the right, and so does their header. */
  public enum Kind {
    TEXT,
    NUMBER
  }

  static ColumnPlan text(String title, int width) {
    return new ColumnPlan(title, width, Kind.TEXT);
  }

  static ColumnPlan number(String title, int width) {
    return new ColumnPlan(title, width, Kind.NUMBER);
  }
}
