package org.spikewright.summary;

/** What a cell is for; the writer turns it into font, fill and alignment. */
public enum Look {
  PLAIN,
  /** The sheet's title. */
  TITLE,
  /** The heading of a part of a sheet. */
  HEADING,
  /** A column's header. */
  HEADER,
  /** The header of a column of numbers. */
  HEADER_RIGHT,
  STRONG,
  /** An explanation that may be skipped. */
  FAINT,
  /** The same over or under numbers. */
  FAINT_RIGHT,
  /** Long text, broken within the column. */
  WRAPPED,
  /** A cell that the reader may change. */
  CHOICE,
  /** The verdict is report. */
  REPORT,
  /** The verdict is review. */
  REVIEW,
  /** The verdict is repeat. */
  REPEAT,
  /** Not judged yet. */
  WAITING
}
