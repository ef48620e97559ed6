package org.spikewright.mapping;

import java.util.EnumMap;
import java.util.Map;
import java.util.Optional;
import org.spikewright.mapping.MappedFile.Unmappable;
import org.spikewright.quantity.Unit;
import org.spikewright.table.Row;

/**
 * Reads the row of units under a header: they hold for columns of quantities whose unit the mapping
 * leaves open, and must be those that it declares.
 */
final class UnitsRow {
  /** What came of it. */
  sealed interface Read {
    /** The places, their units filled in. */
    record With(Places places) implements Read {}

    /** A unit is none, or another than declared. */
    record Wrong(Unmappable why) implements Read {}
  }

  private final Notation notation;
  private final Header header;
  private final Row row;

  UnitsRow(Notation notation, Header header, Row row) {
    this.notation = notation;
    this.header = header;
    this.row = row;
  }

  /** The places with the units of this row. */
  Read over(Places places) {
    Map<Fact, Places.Column> columns = new EnumMap<>(Fact.class);
    for (Map.Entry<Fact, Places.Column> entry : places.columns().entrySet()) {
      Fact fact = entry.getKey();
      Places.Column column = entry.getValue();
      int index = header.find(column.headers().get(0)).orElseThrow();
      String said = bare(row.cell(index).shown());
      if (fact.kind() != Fact.Kind.AMOUNT && fact != Fact.SIGNAL_SD || said.isEmpty()) {
        columns.put(fact, column);
        continue;
      }
      Optional<Unit> unit = notation.unit(said);
      Optional<Unmappable> fault = fault(fact, column, index, said, unit);
      if (fault.isPresent()) {
        return new Read.Wrong(fault.get());
      }
      // A signal has whatever unit the instrument gives it; only per cent is told apart.
      boolean filled = column.form().unit().isEmpty() && unit.filter(fits(fact)).isPresent();
      Form form = filled ? new Form(unit, column.form().time()) : column.form();
      columns.put(fact, new Places.Column(column.headers(), form));
    }
    return new Read.With(places.with(columns));
  }

  private static java.util.function.Predicate<Unit> fits(Fact fact) {
    return unit -> fact.fits(unit.dimension());
  }

  private Optional<Unmappable> fault(
      Fact fact, Places.Column column, int index, String said, Optional<Unit> unit) {
    Optional<Unit> declared = column.form().unit();
    boolean ofSignal = fact == Fact.SIGNAL_SD || fact.isInSignalUnits();
    if (ofSignal && declared.isEmpty()) {
      return Optional.empty();
    }
    boolean sound =
        declared.isPresent() ? declared.equals(unit) : unit.filter(fits(fact)).isPresent();
    if (sound) {
      return Optional.empty();
    }
    return Optional.of(
        new Unmappable(
            row.at(index).within(),
            "the unit " + Said.quoted(said) + " under '" + column.headers().get(0) + "'",
            declared
                .map(mapped -> mapped + ", as the mapping says of " + fact.word())
                .orElse("a unit of " + fact.expectation()),
            declared.isPresent()
                ? "correct unit in the mapping, or leave it out: the row of units then tells it"
                : "name the unit in the mapping, or correct it in the export"));
  }

  /** Without the brackets that units often stand in. */
  private static String bare(String text) {
    String stripped = text.strip();
    boolean enclosed =
        stripped.length() > 2
            && (stripped.startsWith("(") && stripped.endsWith(")")
                || stripped.startsWith("[") && stripped.endsWith("]"));
    return enclosed ? stripped.substring(1, stripped.length() - 1).strip() : stripped;
  }
}
