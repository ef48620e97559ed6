package org.spikewright.app;

import java.util.List;
import java.util.stream.Collectors;
import org.spikewright.mapping.MappedFile.Unmappable;
import org.spikewright.mapping.Mapping;
import org.spikewright.mapping.Rejection;
import org.spikewright.mapping.Tally;
import org.spikewright.table.DecodeFault;

/**
 * Why a file is refused as a whole.
 *
 * @param place where in the file
 * @param found what stood there
 * @param expected what should have stood there
 * @param advice what the person at the bench can do
 */
record Refusal(String place, String found, String expected, String advice) {

  static Refusal of(DecodeFault fault) {
    return new Refusal(fault.place(), fault.found(), fault.expected(), fault.advice());
  }

  static Refusal of(Unmappable fault) {
    return new Refusal(fault.place(), fault.found(), fault.expected(), fault.advice());
  }

  static Refusal unclaimed(List<Mapping> mappings) {
    String known =
        mappings.stream()
            .map(m -> m.name() + " (" + patterns(m) + ")")
            .collect(Collectors.joining("; "));
    return new Refusal(
        "the file's name",
        "no mapping that claims it",
        known.isEmpty() ? "a mapping; there is none yet" : "a name that fits one of: " + known,
        "put it into the folder of its instrument, or add its name to the files of a mapping");
  }

  static Refusal claimedByMany(List<Mapping> claimants) {
    String names =
        claimants.stream()
            .map(m -> m.name() + " (" + patterns(m) + ")")
            .collect(Collectors.joining("; "));
    return new Refusal(
        "the file's name",
        claimants.size() + " mappings that claim it: " + names,
        "one mapping for each file",
        "make the files of these mappings differ, or put the file into the folder of its instrument");
  }

  static Refusal withoutReadings(Tally tally, List<Rejection> rejections) {
    String first =
        rejections.isEmpty()
            ? "every row is one that the mapping skips"
            : "the first refused row: "
                + rejections.get(0).position().within()
                + ", "
                + RowsText.why(rejections.get(0));
    return new Refusal(
        "the file",
        "not one reading in " + tally.rows() + " rows; " + first,
        "at least one row that the mapping can use",
        "try the export and its mapping with the command try");
  }

  private static String patterns(Mapping mapping) {
    return mapping.files().stream().map(Object::toString).collect(Collectors.joining(", "));
  }

  /** In four lines, as the ledger keeps it and people read it. */
  String words() {
    return "Where:    "
        + place
        + "\nFound:    "
        + found
        + "\nExpected: "
        + expected
        + "\nTo do:    "
        + advice
        + "; then drop the file into the watched folder again";
  }

  /** The same in one line, for the log and the terminal. */
  static String oneLine(String words) {
    return words
        .lines()
        .map(line -> line.replaceFirst(": +", ": "))
        .collect(Collectors.joining("; "));
  }

  /**
   * The text beside a refused file.
   *
   * @param words as {@link #words()}
   */
  static String text(String name, String when, String words) {
    return name
        + " was refused on "
        + when
        + ".\n\n"
        + words
        + "\n\nNothing of this file was counted. Everything else goes on.\n";
  }
}
