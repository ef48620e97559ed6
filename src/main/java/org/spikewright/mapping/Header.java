package org.spikewright.mapping;

import java.util.ArrayList;
import java.util.Collection;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.spikewright.table.Cell;
import org.spikewright.table.HeaderCells;
import org.spikewright.table.Row;

/**
 * A header: which column bears which name.
 *
 * @param row where it stands
 * @param columns index from 0 by folded name; the first one where a name stands twice
 * @param names the names as they stand, without blanks
 * @param repeated folded names that stand more than once
 * @param width columns up to the last name
 */
record Header(
    Row row, Map<String, Integer> columns, List<String> names, List<String> repeated, int width) {

  /** Reads two rows as one header, which stands where the lower one does. */
  static Header of(Row upper, Row lower) {
    List<Cell> joined =
        HeaderCells.joined(shown(upper), shown(lower)).stream()
            .map(name -> name.isEmpty() ? Cell.BLANK : new Cell.Text(name))
            .toList();
    return of(new Row(lower.source(), lower.number(), joined));
  }

  private static List<String> shown(Row row) {
    return row.cells().stream().map(Cell::shown).toList();
  }

  /** Reads a row as a header. */
  static Header of(Row row) {
    Map<String, Integer> columns = new HashMap<>();
    List<String> names = new ArrayList<>();
    List<String> repeated = new ArrayList<>();
    int width = 0;
    for (int i = 0; i < row.cells().size(); i++) {
      String name = fold(row.cell(i).shown());
      if (!name.isEmpty()) {
        names.add(name);
        width = i + 1;
        if (columns.putIfAbsent(name, i) != null) {
          repeated.add(name);
        }
      }
    }
    return new Header(row, columns, names, repeated, width);
  }

  /** Blanks around a name, runs of blanks or line ends in it, and its Unicode form do not count. */
  static String fold(String name) {
    return HeaderCells.fold(name);
  }

  /** The column with a name, counted from 0. */
  Optional<Integer> find(String name) {
    return Optional.ofNullable(columns.get(fold(name)));
  }

  /** Those of the names that have no column. */
  List<String> missing(Collection<String> needed) {
    return needed.stream().filter(name -> !columns.containsKey(fold(name))).toList();
  }

  /** Those of the names that have more than one. */
  List<String> doubled(Collection<String> needed) {
    return needed.stream().filter(name -> repeated.contains(fold(name))).toList();
  }
}
