package org.spikewright.mapping;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.spikewright.mapping.MappedFile.Unmappable;
import org.spikewright.mapping.TableRules.Tables;
import org.spikewright.table.Cell;
import org.spikewright.table.HeaderCells;
import org.spikewright.table.Row;
import org.spikewright.table.Source;

/**
 * Walks down one sheet or text file: the preamble, the header, a row of units, the rows of the
 * table to its end, and the next table where there are several. Rows of the table go on; titles,
 * headers that come again, and what stands behind the end count as skipped.
 */
final class SheetWalk {
  private static final SheetMapper.Fate SKIPPED = new SheetMapper.Fate.Skipped();

  private final Mapping mapping;
  private final TableRules rules;
  private final FileState file;
  private final MarkSearch marks;
  private final OpenTable.Fates fates;
  private final Source source;
  private final Surroundings names;
  private final List<String> headersMet = new ArrayList<>();
  private HeaderSearch search;
  private Optional<Header> awaitingUnits = Optional.empty();
  private Optional<OpenTable> table = Optional.empty();
  private CarryDown carry;
  private final List<HeaderRow> headerRows = new ArrayList<>();
  private boolean ended;
  private long last;

  SheetWalk(
      Mapping mapping, FileState file, MarkSearch marks, OpenTable.Fates fates, Source source) {
    this.mapping = mapping;
    this.rules = mapping.table();
    this.file = file;
    this.marks = marks;
    this.fates = fates;
    this.source = source;
    this.names = new Surroundings(mapping.places(), source, file.fromFileName());
    this.search = new HeaderSearch(mapping);
  }

  /** Takes the next row; the fault that refuses the file, where it does. */
  Optional<Unmappable> take(Row row) {
    boolean gap = source.sheet().isPresent() && row.number() > last + 1;
    if (table.isPresent() && rules.endsAtEmptyRow() && (gap || row.isBlank())) {
      end();
    }
    last = row.number();
    if (row.isBlank()) {
      return Optional.empty();
    }
    if (awaitingUnits.isPresent()) {
      return units(awaitingUnits.get(), row);
    }
    return table.isPresent() ? inTable(row) : outside(row);
  }

  /** Why there is no table, where the rows have come to an end. */
  Optional<Unmappable> finish() {
    return headersMet.isEmpty() ? Optional.of(search.notFound(source)) : Optional.empty();
  }

  /** Where headers were met, in words. */
  List<String> headersMet() {
    return headersMet;
  }

  private Optional<Unmappable> outside(Row row) {
    boolean isTitle = names.takeTitle(row);
    if (!ended || rules.tables() == Tables.ALL) {
      HeaderSearch.Found found = search.next(row);
      if (found instanceof HeaderSearch.Found.At at) {
        return open(at.header(), row);
      }
      if (found instanceof HeaderSearch.Found.Wrong wrong && !isTitle) {
        return Optional.of(wrong.why());
      }
    }
    if (ended) {
      fates.take(SKIPPED);
    }
    return Optional.empty();
  }

  private Optional<Unmappable> inTable(Row row) {
    if (isEnd(row)) {
      end();
      fates.take(SKIPPED);
      return Optional.empty();
    }
    if (rules.tables() == Tables.ALL && search.mayBegin(row)) {
      HeaderSearch.Found found = search.next(row);
      if (found instanceof HeaderSearch.Found.At at) {
        return open(at.header(), row);
      }
    }
    if (names.takeTitle(row)) {
      table = table.map(open -> open.below(names.around()));
      fates.take(SKIPPED);
      return Optional.empty();
    }
    if (isHeaderAgain(row)) {
      fates.take(SKIPPED);
      return Optional.empty();
    }
    table = Optional.of(marks.take(table.get(), carry.filled(row)));
    return marks.tooLong();
  }

  private Optional<Unmappable> open(Header header, Row row) {
    headersMet.add(header.row().position().within());
    headerRows.clear();
    headerRows.add(HeaderRow.of(row));
    search.above().map(HeaderRow::of).ifPresent(headerRows::add);
    search = HeaderSearch.again(mapping);
    ended = false;
    table = Optional.empty();
    if (rules.units() == TableRules.UnitsRow.BELOW_HEADER) {
      awaitingUnits = Optional.of(header);
      return Optional.empty();
    }
    TableView.Views views = TableView.of(mapping, header);
    return views instanceof TableView.Views.Found found
        ? open(header, found.views())
        : Optional.of(((TableView.Views.Wrong) views).why());
  }

  private Optional<Unmappable> units(Header header, Row row) {
    awaitingUnits = Optional.empty();
    headerRows.add(HeaderRow.of(row));
    TableView.Views views = TableView.of(mapping, header);
    if (views instanceof TableView.Views.Wrong wrong) {
      return Optional.of(wrong.why());
    }
    UnitsRow units = new UnitsRow(mapping.notation(), header, row);
    List<TableView> seen = new ArrayList<>();
    for (TableView view : ((TableView.Views.Found) views).views()) {
      UnitsRow.Read read = units.over(view.places());
      if (read instanceof UnitsRow.Read.Wrong wrong) {
        return Optional.of(wrong.why());
      }
      seen.add(new TableView(((UnitsRow.Read.With) read).places(), view.header()));
    }
    return open(header, seen);
  }

  private Optional<Unmappable> open(Header header, List<TableView> views) {
    carry = new CarryDown(mapping, header);
    table = Optional.of(marks.read(new OpenTable(mapping, header, file, views, names.around())));
    return Optional.empty();
  }

  private void end() {
    table = Optional.empty();
    ended = true;
    names.forgetTitle();
  }

  private boolean isEnd(Row row) {
    if (rules.ends().isEmpty()) {
      return false;
    }
    for (Cell cell : row.cells()) {
      if (!cell.isBlank() && rules.ends().stream().anyMatch(end -> end.matches(cell.shown()))) {
        return true;
      }
    }
    return false;
  }

  private boolean isHeaderAgain(Row row) {
    for (HeaderRow header : headerRows) {
      if (header.isSame(row)) {
        return true;
      }
    }
    return false;
  }

  /**
   * A row of the header as it stands in the file.
   *
   * @param index of its first cell that is not blank, from 0
   * @param first what stands there: most rows differ in it
   */
  private record HeaderRow(int index, String first, List<String> names) {
    static HeaderRow of(Row row) {
      List<String> names = names(row);
      int index = 0;
      while (names.get(index).isEmpty()) {
        index++;
      }
      return new HeaderRow(index, row.cell(index).shown(), names);
    }

    boolean isSame(Row row) {
      return row.cell(index) instanceof Cell.Text text
          && text.text().equals(first)
          && names(row).equals(names);
    }

    private static List<String> names(Row row) {
      List<String> names = new ArrayList<>();
      for (Cell cell : row.cells()) {
        names.add(HeaderCells.fold(cell.shown()));
      }
      while (!names.isEmpty() && names.get(names.size() - 1).isEmpty()) {
        names.remove(names.size() - 1);
      }
      return names;
    }
  }
}
