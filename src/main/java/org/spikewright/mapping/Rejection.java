package org.spikewright.mapping;

import org.spikewright.table.Position;

/**
 * A row, or a cell of it, that was not used.
 *
 * @param reason why, in short
 * @param position the cell, or the row where no single cell is to blame
 * @param column the header of the column, or the name of the fact; empty for a whole row
 * @param found what stood there
 * @param expected what should have stood there
 */
public record Rejection(
    Reason reason, Position position, String column, String found, String expected) {

  /** Why a row was not used. */
  public enum Reason {
    NOT_A_NUMBER("not a number"),
    UNIT_DOES_NOT_FIT("unit does not fit"),
    FACT_MISSING("fact missing"),
    NAME_UNKNOWN("name not known"),
    OUT_OF_BOUNDS("value out of bounds"),
    NOT_A_TIME("not a time"),
    ROLE_UNKNOWN("role not recognised"),
    LABEL_UNREADABLE("label not understood"),
    UNUSABLE_CELL("unusable cell"),
    CONTRADICTION("contradicts another row"),
    ROW_TOO_SHORT("row too short"),
    ROW_TOO_LONG("row too long");

    private final String words;

    Reason(String words) {
      this.words = words;
    }

    /** The reason in words, as shown to people. */
    public String words() {
      return words;
    }
  }
}
