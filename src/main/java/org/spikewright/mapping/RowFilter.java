package org.spikewright.mapping;

import java.util.EnumMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.stream.Collectors;
import org.spikewright.mapping.Rejection.Reason;
import org.spikewright.reading.Role;
import org.spikewright.table.Row;

/** Tells which rows of a table are left out and what the others were measured for. */
final class RowFilter {
  /** What a row is. */
  sealed interface Kind {
    /** To be mapped. */
    record Measured(Role role) implements Kind {}

    /** Left out by the mapping's own words. */
    record LeftOut() implements Kind {}

    /** Not to be told. */
    record Unclear(Trouble trouble) implements Kind {}
  }

  private record BoundSkip(RowRules.Skip rule, int column) {}

  private static final Kind LEFT_OUT = new Kind.LeftOut();
  private static final Map<Role, Kind> MEASURED = new EnumMap<>(Role.class);

  static {
    for (Role role : Role.values()) {
      MEASURED.put(role, new Kind.Measured(role));
    }
  }

  private final RowRules rules;
  private final List<BoundSkip> skips;
  private final Optional<Integer> roleColumn;
  private final int width;

  RowFilter(RowRules rules, Header header) {
    this.rules = rules;
    this.skips =
        rules.skips().stream()
            .map(skip -> new BoundSkip(skip, header.find(skip.header()).orElseThrow()))
            .toList();
    this.roleColumn = rules.roles().map(roles -> header.find(roles.header()).orElseThrow());
    this.width = header.width();
  }

  /** What the row is. Skips go first, so that a footer of any length can be left out. */
  Kind kind(Row row) {
    for (BoundSkip skip : skips) {
      if (skip.rule().matches(row.cell(skip.column()).shown())) {
        return LEFT_OUT;
      }
    }
    Optional<Trouble> tooLong = tooLong(row);
    return tooLong.isPresent() ? new Kind.Unclear(tooLong.get()) : role(row);
  }

  /** Only text files: in a spreadsheet no cell can shift the others. */
  private Optional<Trouble> tooLong(Row row) {
    if (row.cells().size() <= width
        || row.source().sheet().isPresent()
        || rules.extraCells() == RowRules.ExtraCells.IGNORE) {
      return Optional.empty();
    }
    for (int i = width; i < row.cells().size(); i++) {
      if (!row.cell(i).isBlank()) {
        return Optional.of(
            new Trouble(
                Reason.ROW_TOO_LONG,
                i,
                "",
                row.cells().size()
                    + " cells, the one beyond the header "
                    + Said.quoted(row.cell(i).shown()),
                "at most "
                    + width
                    + " cells, like the header; is a decimal comma not in quotes?"
                    + " (extra_cells = \"ignore\" under [table] lets such rows pass)"));
      }
    }
    return Optional.empty();
  }

  private Kind role(Row row) {
    if (roleColumn.isEmpty()) {
      return MEASURED.get(rules.role());
    }
    RowRules.Roles roles = rules.roles().get();
    String text = row.cell(roleColumn.get()).shown();
    Optional<Role> role = roles.of(text);
    if (role.isEmpty()) {
      return new Kind.Unclear(
          new Trouble(
              Reason.ROLE_UNKNOWN,
              roleColumn.get(),
              roles.header(),
              Said.quoted(text),
              "one of " + words(roles)));
    }
    return MEASURED.get(role.get());
  }

  private static String words(RowRules.Roles roles) {
    return roles.patterns().values().stream()
        .flatMap(List::stream)
        .map(glob -> "'" + glob + "'")
        .sorted()
        .collect(Collectors.joining(", "));
  }
}
