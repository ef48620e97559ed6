package org.spikewright.app;

import java.util.ArrayList;
import java.util.List;
import org.spikewright.ledger.Arrived;
import org.spikewright.ledger.LedgerView;
import org.spikewright.mapping.Rejection;
import org.spikewright.summary.RefusedRow;
import org.spikewright.table.Position;

/** The text beside a file of which some rows, or samples, could not be used. */
final class RowsText {
  /** Beyond this many rows the text points to the workbook. */
  private static final int MOST = 1000;

  private RowsText() {}

  /** Whether a delivery needs such a text. */
  static boolean isDue(Arrived arrived) {
    return arrived.tally().rejections() > 0 || !arrived.reason().isEmpty();
  }

  /** Its lines, from what the ledger holds, so that they can be written again after a crash. */
  static List<String> lines(Arrived arrived, LedgerView ledger) {
    List<String> lines = new ArrayList<>();
    lines.add(
        arrived.name()
            + " was read: "
            + arrived.tally().rows()
            + " rows, "
            + arrived.tally().readings()
            + " readings, "
            + arrived.tally().rejections()
            + " rows not used, "
            + arrived.tally().skipped()
            + " skipped as the mapping says"
            + arrived.tally().besideSamples()
            + ".");
    lines.add("What was usable counts. To mend a row, correct it in the export and drop the file");
    lines.add("again: readings that are known already are not counted twice.");
    if (!arrived.reason().isEmpty()) {
      lines.add("");
      lines.add(arrived.reason());
    }
    lines.add("");
    int shown = 0;
    for (RefusedRow row : ledger.refused(arrived.labDay(), arrived.number())) {
      if (row.arrival() == arrived.number() && shown++ < MOST) {
        lines.add(line(row));
      }
    }
    if (shown > MOST) {
      lines.add("and " + (shown - MOST) + " more: see the sheet Refused rows of the summary.");
    }
    return lines;
  }

  private static String line(RefusedRow row) {
    String place = row.column() > 0 ? cell(row) : row(row);
    return place
        + ": "
        + row.reason()
        + "; found "
        + orNothing(row.found())
        + (row.header().isEmpty() ? "" : " under " + row.header())
        + "; expected "
        + row.expected();
  }

  private static String cell(RefusedRow row) {
    return row.sheet().isEmpty()
        ? "line " + row.row() + ", column " + row.column()
        : "sheet " + row.sheet() + ", cell " + Position.letters(row.column()) + row.row();
  }

  private static String row(RefusedRow row) {
    return row.sheet().isEmpty()
        ? "line " + row.row()
        : "sheet " + row.sheet() + ", row " + row.row();
  }

  /** A refused row in words, without its place. */
  static String why(Rejection rejection) {
    return rejection.reason().words()
        + "; found "
        + orNothing(rejection.found())
        + (rejection.column().isEmpty() ? "" : " under " + rejection.column())
        + "; expected "
        + rejection.expected();
  }

  private static String orNothing(String found) {
    return found.isEmpty() ? "nothing" : found;
  }
}
