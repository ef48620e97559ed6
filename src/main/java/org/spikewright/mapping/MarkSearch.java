package org.spikewright.mapping;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.spikewright.mapping.MappedFile.Unmappable;
import org.spikewright.mapping.NumberEvidence.Verdict;
import org.spikewright.mapping.NumberEvidence.Witness;
import org.spikewright.quantity.NumberGrammar;
import org.spikewright.table.Row;

/**
 * Works out a file's decimal mark while its rows go by. Both marks are candidates until a number
 * contradicts one. As long as all numbers are the same with either, rows go on; from the first that
 * is not, they are held back until one of the marks has fallen, and then go on in order.
 */
final class MarkSearch {
  private static final int MOST_HELD = 10_000;

  private record Held(OpenTable table, Row row) {}

  private final Mapping mapping;
  private final OpenTable.Fates fates;
  private final List<Held> held = new ArrayList<>();
  private Optional<Witness> open = Optional.empty();
  private Optional<Witness> deciding = Optional.empty();
  private Optional<NumberGrammar> decided;

  MarkSearch(Mapping mapping, OpenTable.Fates fates) {
    this.mapping = mapping;
    this.fates = fates;
    NumberGrammar declared = mapping.notation().numbers();
    this.decided =
        mapping.table().marks() == TableRules.Marks.DECLARED
            ? Optional.of(declared)
            : Optional.empty();
  }

  /** A table that is opened now, its numbers read as was worked out by then. */
  OpenTable read(OpenTable table) {
    return deciding.isPresent() ? table.with(decided.get()) : table;
  }

  /**
   * Takes the next row of a table.
   *
   * @return the table by which the next row is to be read
   */
  OpenTable take(OpenTable table, Row row) {
    if (decided.isPresent()) {
      table.map(row, fates);
      return table;
    }
    Optional<Witness> witness = table.evidence(row);
    if (witness.isPresent() && witness.get().verdict() != Verdict.EITHER) {
      return decide(witness.get(), table, row);
    }
    if (open.isEmpty()) {
      open = witness;
    }
    if (open.isEmpty()) {
      table.map(row, fates);
    } else {
      held.add(new Held(table, row));
    }
    return table;
  }

  private OpenTable decide(Witness witness, OpenTable table, Row row) {
    char mark = witness.verdict() == Verdict.POINT ? '.' : ',';
    NumberGrammar grammar = new NumberGrammar(mark, mapping.notation().numbers().thousandsMark());
    decided = Optional.of(grammar);
    deciding = Optional.of(witness);
    OpenTable last = table;
    OpenTable reading = table.with(grammar);
    for (Held one : held) {
      if (one.table() != last) {
        last = one.table();
        reading = last.with(grammar);
      }
      reading.map(one.row(), fates);
    }
    held.clear();
    OpenTable now = last == table ? reading : table.with(grammar);
    now.map(row, fates);
    return now;
  }

  /** Why the search is given up: too many rows are held back. */
  Optional<Unmappable> tooLong() {
    return held.size() < MOST_HELD ? Optional.empty() : undecided();
  }

  /** Why the numbers cannot be read, where the rows have come to an end. */
  Optional<Unmappable> undecided() {
    return decided.isPresent() ? Optional.empty() : open.map(this::undecided);
  }

  private Unmappable undecided(Witness witness) {
    return new Unmappable(
        witness.position().within(),
        Said.quoted(witness.text())
            + ", which is "
            + witness.readings()
            + "; no other number of the file tells which",
        "numbers that can be read in one way only",
        "declare decimal = \".\" or \",\" under [table] in mapping '" + mapping.name() + "'");
  }

  /** What was worked out, in words; empty where the mark is declared or makes no difference. */
  Optional<String> inWords() {
    return deciding.map(
        witness ->
            "decimal "
                + (witness.verdict() == Verdict.POINT ? "point" : "comma")
                + " (worked out: "
                + Said.quoted(witness.text())
                + " in "
                + witness.position().within()
                + ")");
  }
}
