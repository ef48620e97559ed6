package org.spikewright.table;

import java.time.LocalDateTime;

/** What stands in one cell. */
public sealed interface Cell {
  /** Nothing: an empty field, a missing cell, blanks only. Never read as 0. */
  record Blank() implements Cell {}

  /** Text as it stands, not trimmed. */
  record Text(String text) implements Cell {}

  /**
   * A number that the file stores as a number.
   *
   * @param value finite
   * @param raw the digits as stored
   */
  record Number(double value, String raw) implements Cell {}

  /**
   * A number that the sheet formats as a date or time.
   *
   * @param value local to wherever the instrument stood
   * @param raw the digits as stored
   */
  record Moment(LocalDateTime value, String raw) implements Cell {}

  /**
   * Something that is no value: an error, a formula without a stored result, a number out of range.
   */
  record Unusable(String found) implements Cell {}

  /** The one blank. */
  Cell BLANK = new Blank();

  /** What a person would say stands there; empty for a blank. */
  default String shown() {
    if (this instanceof Text text) {
      return text.text();
    }
    if (this instanceof Number number) {
      return number.raw();
    }
    if (this instanceof Moment moment) {
      return moment.value().toString();
    }
    return this instanceof Unusable unusable ? unusable.found() : "";
  }

  /** Whether nothing but blanks stands here. */
  default boolean isBlank() {
    return this instanceof Blank || this instanceof Text text && text.text().isBlank();
  }
}
