package org.spikewright.mapping;

import java.util.ArrayList;
import java.util.EnumMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.regex.Matcher;
import org.spikewright.mapping.Rejection.Reason;
import org.spikewright.table.Cell;
import org.spikewright.table.Row;

/** Finds facts in the rows of one table, each at the first of its places that is not blank. */
final class RowLookup {
  /** A label longer than this is not matched: a pattern may take long on it. */
  private static final int LONGEST_LABEL = 256;

  /** Where a fact may stand in this table. */
  private sealed interface Place {
    String words();
  }

  private record InColumn(int[] indexes, Form form, String header) implements Place {
    @Override
    public String words() {
      return "column '" + header + "'";
    }
  }

  private record InLabel(int label, String group, Form form, String words) implements Place {}

  /** Outside of the row: the same for every row of this table. */
  private record Around(Optional<Given> given, String words) implements Place {}

  private final Map<Fact, List<Place>> places = new EnumMap<>(Fact.class);
  private final List<Places.Label> labels;
  private final int[] labelColumns;
  private final List<Optional<Matcher>> matches = new ArrayList<>();
  private Row row;
  private boolean besideSamples;

  /** Binds the mapping's places to the columns of a header that has them all. */
  RowLookup(Places rules, Header header, Map<Fact, List<Outside>> around) {
    labels = rules.labels();
    labelColumns =
        labels.stream().mapToInt(label -> header.find(label.header()).orElseThrow()).toArray();
    for (Fact fact : Fact.values()) {
      List<Place> found = new ArrayList<>();
      Places.Column column = rules.columns().get(fact);
      if (column != null) {
        found.add(inColumn(column, header));
      }
      for (int i = 0; i < labels.size(); i++) {
        Places.Group group = labels.get(i).groups().get(fact);
        if (group != null) {
          found.add(
              new InLabel(i, group.name(), group.form(), "label '" + labels.get(i).header() + "'"));
        }
      }
      for (Outside outside : around.getOrDefault(fact, List.of())) {
        found.add(new Around(outside.given(fact, found.size()), outside.words()));
      }
      places.put(fact, List.copyOf(found));
    }
  }

  private static Place inColumn(Places.Column column, Header header) {
    int[] indexes =
        column.headers().stream().mapToInt(name -> header.find(name).orElseThrow()).toArray();
    return new InColumn(indexes, column.form(), String.join("' and '", column.headers()));
  }

  /**
   * Takes a row of a drift check or a calibration solution: a label that does not match the pattern
   * of samples' labels is a name as it stands.
   */
  void beginBesideSamples(Row next) {
    begin(next);
    besideSamples = true;
  }

  /** Takes the next row and matches its labels; returns what is wrong with them. */
  List<Trouble> begin(Row next) {
    row = next;
    besideSamples = false;
    matches.clear();
    List<Trouble> troubles = List.of();
    for (int i = 0; i < labels.size(); i++) {
      String label = next.cell(labelColumns[i]).shown().strip();
      Matcher matcher = labels.get(i).pattern().matcher(label);
      boolean fits = label.length() <= LONGEST_LABEL && matcher.matches();
      matches.add(fits ? Optional.of(matcher) : Optional.empty());
      if (!fits) {
        troubles = new ArrayList<>(troubles);
        troubles.add(unreadable(i, label));
      }
    }
    return troubles;
  }

  private Trouble unreadable(int i, String label) {
    return new Trouble(
        Reason.LABEL_UNREADABLE,
        labelColumns[i],
        labels.get(i).header(),
        Said.quoted(label),
        "a label that matches " + labels.get(i).pattern().pattern());
  }

  /** The fact in this row, if a column, a label or the file's name gives it. */
  Optional<Given> find(Fact fact) {
    List<Place> candidates = places.get(fact);
    for (int i = 0; i < candidates.size(); i++) {
      Optional<Given> given = at(candidates.get(i), i);
      if (given.isPresent()) {
        return given;
      }
    }
    return besideSamples && fact == Fact.SAMPLE ? wholeLabel() : Optional.empty();
  }

  private Optional<Given> wholeLabel() {
    for (int i = 0; i < labels.size(); i++) {
      Cell cell = row.cell(labelColumns[i]);
      if (matches.get(i).isEmpty() && !cell.isBlank()) {
        return Optional.of(
            new Given(List.of(cell), Form.PLAIN, labelColumns[i], 0, labels.get(i).header()));
      }
    }
    return Optional.empty();
  }

  private Optional<Given> at(Place place, int ordinal) {
    if (place instanceof InColumn column) {
      return inColumn(column, ordinal);
    }
    if (place instanceof Around around) {
      return around.given();
    }
    InLabel label = (InLabel) place;
    return matches
        .get(label.label())
        .map(matcher -> matcher.group(label.group()))
        .filter(text -> !text.isBlank())
        .map(
            text ->
                new Given(
                    List.of(new Cell.Text(text)),
                    label.form(),
                    labelColumns[label.label()],
                    ordinal,
                    labels.get(label.label()).header()));
  }

  private Optional<Given> inColumn(InColumn column, int ordinal) {
    List<Cell> cells;
    boolean blank;
    if (column.indexes().length == 1) {
      Cell cell = row.cell(column.indexes()[0]);
      cells = List.of(cell);
      blank = cell.isBlank();
    } else {
      cells = new ArrayList<>();
      for (int index : column.indexes()) {
        cells.add(row.cell(index));
      }
      blank = cells.stream().allMatch(Cell::isBlank);
    }
    return blank
        ? Optional.empty()
        : Optional.of(
            new Given(cells, column.form(), column.indexes()[0], ordinal, column.header()));
  }

  /** What to say where none of the places gives the fact. */
  Trouble missing(Fact fact, String what, boolean fixedToo) {
    List<Place> candidates = places.get(fact);
    int index = -1;
    StringBuilder looked = new StringBuilder();
    for (Place place : candidates) {
      looked.append(looked.isEmpty() ? "in " : ", ").append(place.words());
      if (index < 0 && place instanceof InColumn column) {
        index = column.indexes()[0];
      }
    }
    looked.append(fixedToo ? (looked.isEmpty() ? "in " : ", ") + "[fixed]" : "");
    boolean ended = index >= row.cells().size() && row.source().sheet().isEmpty();
    return new Trouble(
        ended ? Reason.ROW_TOO_SHORT : Reason.FACT_MISSING,
        ended ? -1 : index,
        fact.word(),
        (ended ? "a row of " + row.cells().size() + " cells; nothing " : "nothing ") + looked,
        what);
  }
}
