package org.spikewright.mapping;

import java.util.LinkedHashSet;
import java.util.List;
import java.util.Set;
import org.spikewright.quantity.NumberGrammar;
import org.spikewright.reading.Shelf;
import org.spikewright.table.TableShape;

/**
 * What one instrument's exports mean, as the chemist wrote it down.
 *
 * @param name the mapping's name, unique in its folder
 * @param instrument the instrument's name, by default the mapping's
 * @param sha256 of the mapping file's bytes, in hexadecimal
 * @param text the mapping file's text
 * @param files which files it claims
 * @param shape how a file is cut into cells
 * @param table how the table lies in the file
 * @param notation how numbers, units and ratios are written
 * @param places where facts stand
 * @param words signals that are no numbers
 * @param rows which rows are left out, and what the others are
 * @param method what the method says
 * @param shelf the stocks and the glassware that may be named
 */
public record Mapping(
    String name,
    String instrument,
    String sha256,
    String text,
    List<PathPattern> files,
    TableShape shape,
    TableRules table,
    Notation notation,
    Places places,
    SignalWords words,
    RowRules rows,
    MethodRule method,
    Shelf shelf) {

  /**
   * Whether the mapping claims a file.
   *
   * @param relativePath inside the watched folder, folders parted by {@code /}
   */
  public boolean claims(String relativePath) {
    return files.stream().anyMatch(pattern -> pattern.matches(relativePath));
  }

  /**
   * Starts to map a file. Rows go in, readings and rejections come out at the sink.
   *
   * @param relativePath inside the watched folder, folders parted by {@code /}
   */
  public RowMapper open(String relativePath, MappedSink sink) {
    return new RowMapper(this, relativePath, sink);
  }

  /** The headers that a table must have, in the order of the mapping's parts, each once. */
  public Set<String> neededHeaders() {
    return neededHeaders(places, rows, table.layout());
  }

  /** As {@link #neededHeaders()}, of the parts alone. */
  public static Set<String> neededHeaders(Places places, RowRules rows, LayoutRule layout) {
    Set<String> headers = new LinkedHashSet<>();
    for (Fact fact : Fact.values()) {
      Places.Column column = places.columns().get(fact);
      if (column != null) {
        headers.addAll(column.headers());
      }
    }
    headers.addAll(layout.headers());
    places.labels().forEach(label -> headers.add(label.header()));
    rows.skips().forEach(skip -> headers.add(skip.header()));
    rows.roles().ifPresent(roles -> headers.add(roles.header()));
    return headers;
  }

  /** The same with other places. */
  Mapping with(Places other) {
    return new Mapping(
        name,
        instrument,
        sha256,
        text,
        files,
        shape,
        table,
        notation,
        other,
        words,
        rows,
        method,
        shelf);
  }

  /** The same with another grammar of numbers. */
  Mapping with(NumberGrammar numbers) {
    Notation other = notation.with(numbers);
    return new Mapping(
        name,
        instrument,
        sha256,
        text,
        files,
        shape,
        table,
        other,
        places,
        words,
        rows,
        method,
        shelf);
  }
}
