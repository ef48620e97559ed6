package org.spikewright.mapping;

import java.util.List;

/** What came of a whole file. */
public sealed interface MappedFile {

  /**
   * Its rows were mapped.
   *
   * @param tally what became of them
   * @param workedOut in words, what the mapping left open and how it was taken
   */
  record Mapped(Tally tally, List<String> workedOut) implements MappedFile {}

  /**
   * The mapping does not fit the file; nothing of it is to be used.
   *
   * @param place {@code line 12}, {@code sheet Data, row 3}, or {@code the file}
   * @param found what stood there
   * @param expected what should have stood there
   * @param advice what can be done
   */
  record Unmappable(String place, String found, String expected, String advice)
      implements MappedFile {}
}
