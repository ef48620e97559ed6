package org.spikewright.table;

import java.util.regex.Pattern;

/** Which sheets of a workbook are meant. */
public sealed interface SheetRule {
  /** The sheet of this name; hidden ones too. */
  record Named(String name) implements SheetRule {}

  /** The sheet with this number, as a person counts the sheets that the program shows, from 1. */
  record Numbered(int number) implements SheetRule {}

  /**
   * Every sheet that the program shows and whose whole name matches.
   *
   * @param shown the pattern as the mapping has it
   */
  record Matching(Pattern pattern, String shown) implements SheetRule {}
}
