package org.spikewright.mapping;

import java.util.Collection;
import java.util.List;
import java.util.Optional;
import java.util.stream.Collectors;
import org.spikewright.mapping.MappedFile.Unmappable;
import org.spikewright.table.Row;
import org.spikewright.table.Source;

/** Looks for the header of one table below its preamble. */
final class HeaderSearch {
  /** A preamble is not longer than this. */
  private static final int ROWS_LOOKED_AT = 1000;

  private static final int NAMES_SHOWN = 40;

  private final HeaderRule rule;
  private final Collection<String> needed;
  private final String mapping;
  private long looked;
  private Optional<Header> best = Optional.empty();

  HeaderSearch(Mapping mapping) {
    this.rule = mapping.header();
    this.needed = mapping.neededHeaders();
    this.mapping = mapping.name();
  }

  /** What the search came to. */
  sealed interface Found {
    /** The header; all mapped columns are there, once. */
    record At(Header header) implements Found {}

    /** The header is there, but does not fit. */
    record Wrong(Unmappable why) implements Found {}

    /** Not yet. */
    record NotYet() implements Found {}
  }

  /** Looks at the next row. */
  Found next(Row row) {
    if (row.isBlank()) {
      return new Found.NotYet();
    }
    if (++looked > ROWS_LOOKED_AT) {
      return new Found.Wrong(notFound(row.source()));
    }
    Header header = Header.of(row);
    if (isHeader(header, row)) {
      return fitting(header);
    }
    if (rule instanceof HeaderRule.AtRow at && row.number() > at.number()) {
      return new Found.Wrong(notFound(row.source()));
    }
    if (best.isEmpty() || lacks(header) < lacks(best.get())) {
      best = Optional.of(header);
    }
    return new Found.NotYet();
  }

  private int lacks(Header header) {
    return header.missing(needed).size();
  }

  private boolean isHeader(Header header, Row row) {
    if (rule instanceof HeaderRule.HoldsCell cell) {
      return header.find(cell.words()).isPresent();
    }
    if (rule instanceof HeaderRule.AtRow at) {
      return row.number() == at.number();
    }
    return header.missing(needed).isEmpty();
  }

  private Found fitting(Header header) {
    String place = header.row().position().within();
    List<String> missing = header.missing(needed);
    if (!missing.isEmpty()) {
      return new Found.Wrong(
          new Unmappable(place, lacking(header, missing), expected(), advice(header, missing)));
    }
    List<String> doubled = header.doubled(needed);
    if (!doubled.isEmpty()) {
      return new Found.Wrong(
          new Unmappable(
              place,
              "more than one column " + quoted(doubled),
              "each mapped column once",
              "give the columns different headers in the export, or map another one"));
    }
    return new Found.At(header);
  }

  /** Why the table has no header, where its rows have come to an end. */
  Unmappable notFound(Source source) {
    String sheet = source.sheet().map(name -> "sheet " + name).orElse("the file");
    if (rule instanceof HeaderRule.HoldsCell cell) {
      return new Unmappable(
          sheet,
          "no row holds the cell '" + cell.words() + "'",
          "a header with that cell",
          "correct header under [table] in mapping '" + mapping + "'");
    }
    if (rule instanceof HeaderRule.AtRow at) {
      return new Unmappable(
          sheet,
          "nothing in row " + at.number(),
          "the header there",
          "correct header under [table] in mapping '" + mapping + "'");
    }
    if (best.isEmpty()) {
      return new Unmappable(
          sheet, "no rows", expected(), "export again, or take the file away if it is empty");
    }
    List<String> missing = best.get().missing(needed);
    return new Unmappable(
        best.get().row().position().within(),
        lacking(best.get(), missing),
        expected(),
        advice(best.get(), missing));
  }

  private static String lacking(Header header, List<String> missing) {
    String shown =
        header.names().stream()
            .limit(NAMES_SHOWN)
            .map(Said::briefly)
            .collect(Collectors.joining(", "));
    return "no column " + quoted(missing) + "; this row has: " + shown;
  }

  private String expected() {
    return "a header with " + quoted(List.copyOf(needed));
  }

  private String advice(Header header, List<String> missing) {
    String meant =
        missing.stream()
            .flatMap(
                name ->
                    Spelling.nearest(name, header.names()).stream()
                        .map(near -> "'" + near + "' for '" + name + "'"))
            .collect(Collectors.joining(", "));
    String correct = "correct the headers in mapping '" + mapping + "', or the export";
    return meant.isEmpty() ? correct : correct + "; perhaps " + meant;
  }

  private static String quoted(Collection<String> names) {
    return names.stream().map(name -> "'" + name + "'").collect(Collectors.joining(", "));
  }
}
