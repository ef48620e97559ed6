package org.spikewright.mapping;

import java.util.ArrayList;
import java.util.EnumMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.spikewright.mapping.NumberEvidence.Verdict;
import org.spikewright.mapping.NumberEvidence.Witness;
import org.spikewright.quantity.NumberGrammar;
import org.spikewright.table.Row;

/** A table below its header: what each of its rows becomes, view by view. */
final class OpenTable {
  private final Mapping mapping;
  private final Header header;
  private final FileState file;
  private final List<TableView> views;
  private final Map<Fact, List<Outside>> around;
  private final List<SheetMapper> mappers = new ArrayList<>();
  private final List<NumberEvidence> evidence = new ArrayList<>();

  /**
   * Opens a table.
   *
   * @param around what names outside of the rows say
   */
  OpenTable(
      Mapping mapping,
      Header header,
      FileState file,
      List<TableView> views,
      Map<Fact, List<Outside>> around) {
    this.mapping = mapping;
    this.header = header;
    this.file = file;
    this.views = views;
    this.around = around;
    for (TableView view : views) {
      Mapping seen = mapping.with(view.places());
      Map<Fact, List<Outside>> names = names(view);
      mappers.add(new SheetMapper(seen, header, file, names));
      evidence.add(new NumberEvidence(seen, header, names));
    }
  }

  private Map<Fact, List<Outside>> names(TableView view) {
    Map<Fact, List<Outside>> names = new EnumMap<>(Fact.class);
    view.header().forEach((fact, said) -> names.put(fact, List.of(said)));
    around.forEach(
        (fact, said) ->
            names.merge(
                fact,
                said,
                (first, second) -> {
                  List<Outside> both = new ArrayList<>(first);
                  both.addAll(second);
                  return both;
                }));
    return names;
  }

  /** The same table, its numbers read by another grammar. */
  OpenTable with(NumberGrammar numbers) {
    return new OpenTable(mapping.with(numbers), header, file, views, around);
  }

  /** The same table below a title that says something else. */
  OpenTable below(Map<Fact, List<Outside>> others) {
    return new OpenTable(mapping, header, file, views, others);
  }

  /** What the row's numbers say about the decimal mark: the first that decides, if one does. */
  Optional<Witness> evidence(Row row) {
    Optional<Witness> either = Optional.empty();
    for (NumberEvidence view : evidence) {
      Optional<Witness> witness = view.in(row);
      if (witness.isPresent() && witness.get().verdict() != Verdict.EITHER) {
        return witness;
      }
      either = either.or(() -> witness);
    }
    return either;
  }

  /** Maps a row: one fate for each reading that it should hold. */
  void map(Row row, Fates fates) {
    for (SheetMapper mapper : mappers) {
      fates.take(mapper.map(row));
    }
  }

  /** Takes what became of rows, in file order. */
  interface Fates {
    /** Takes the fate of a row, or of a cell that should hold a reading. */
    void take(SheetMapper.Fate fate);
  }
}
