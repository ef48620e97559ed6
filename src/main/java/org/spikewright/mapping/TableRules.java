package org.spikewright.mapping;

import java.util.List;

/**
 * How the table lies in a file.
 *
 * @param header how its header is found
 * @param headerRows how many rows make up the header, 1 or 2
 * @param units whether a row of units stands under the header
 * @param ends words that end the table where a cell holds one; the empty one is an empty row
 * @param tables how many tables a file or sheet has
 * @param carryDown facts whose column is filled only where they change
 * @param layout which columns hold signals
 * @param marks whether the decimal mark is declared
 */
public record TableRules(
    HeaderRule header,
    int headerRows,
    UnitsRow units,
    List<Glob> ends,
    Tables tables,
    List<Fact> carryDown,
    LayoutRule layout,
    Marks marks) {

  /** Copies its lists. */
  public TableRules {
    ends = List.copyOf(ends);
    carryDown = List.copyOf(carryDown);
  }

  /** Whether a row of units stands under the header. */
  public enum UnitsRow {
    /** None does. */
    NONE,
    /** The row below the header holds them. */
    BELOW_HEADER
  }

  /** How many tables a file or sheet has. */
  public enum Tables {
    /** One; a header that comes again is left out. */
    ONE("one"),
    /** Each header begins another, whose columns may differ. */
    ALL("all");

    private final String word;

    Tables(String word) {
      this.word = word;
    }

    /** The word used in mappings. */
    public String word() {
      return word;
    }
  }

  /** Where the decimal mark comes from. */
  public enum Marks {
    /** The mapping declares it. */
    DECLARED,
    /** Worked out from the numbers of the file. */
    WORKED_OUT
  }

  /** Whether an empty row ends the table. */
  boolean endsAtEmptyRow() {
    return ends.stream().anyMatch(glob -> glob.pattern().isEmpty());
  }
}
