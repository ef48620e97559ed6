package org.spikewright.mapping;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import org.spikewright.table.Cell;
import org.spikewright.table.Position;
import org.spikewright.table.Row;

/** Fills the columns of a table in which a cell is written only where it changes. */
final class CarryDown {
  private record Above(Cell cell, Position position) {}

  private final int[] columns;
  private final Map<Integer, Above> above = new HashMap<>();

  /** For a table with a header that has the columns of the facts to be carried down. */
  CarryDown(Mapping mapping, Header header) {
    this.columns =
        mapping.table().carryDown().stream()
            .flatMap(fact -> mapping.places().columns().get(fact).headers().stream())
            .mapToInt(name -> header.find(name).orElseThrow())
            .toArray();
  }

  /** The row with what holds on from above; cells stay where they stand. */
  Row filled(Row row) {
    if (columns.length == 0) {
      return row;
    }
    Map<Integer, Position> borrowed = new HashMap<>();
    List<Cell> cells = new ArrayList<>(row.cells());
    for (int column : columns) {
      Above known = above.get(column);
      if (!row.cell(column).isBlank()) {
        above.put(column, new Above(row.cell(column), row.at(column)));
      } else if (known != null) {
        while (cells.size() <= column) {
          cells.add(Cell.BLANK);
        }
        cells.set(column, known.cell());
        borrowed.put(column, known.position());
      }
    }
    return borrowed.isEmpty() ? row : new Row(row.source(), row.number(), cells, borrowed);
  }
}
