package org.spikewright.mapping;

import java.util.ArrayList;
import java.util.EnumMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import org.spikewright.mapping.MappedFile.Unmappable;

/**
 * A table as seen from one of its columns of signals: there every row is one reading. A long table
 * has one view, a wide one as many as a row has readings; what follows knows long rows only, and
 * every cell stays where it stands.
 *
 * @param places where facts stand, the signal in this view's column
 * @param header what the header of that column says, by fact
 */
record TableView(Places places, Map<Fact, Outside> header) {
  private static final Pattern GROUP = Pattern.compile("\\{([a-zA-Z][a-zA-Z0-9]*)\\}");

  /** What became of the search for the columns of signals. */
  sealed interface Views {
    /** All were found, at least one. */
    record Found(List<TableView> views) implements Views {}

    /** The header does not fit. */
    record Wrong(Unmappable why) implements Views {}
  }

  /** The views of a table with a header that holds all that the mapping needs. */
  static Views of(Mapping mapping, Header header) {
    LayoutRule layout = mapping.table().layout();
    if (!layout.isWide()) {
      return new Views.Found(List.of(new TableView(mapping.places(), Map.of())));
    }
    List<TableView> views = new ArrayList<>();
    List<String> names =
        layout.headers().isEmpty() ? matching(layout.pattern().get(), header) : layout.headers();
    List<String> doubled = header.doubled(names);
    if (!doubled.isEmpty()) {
      return wrong(header, "more than one column '" + doubled.get(0) + "'", "each column once");
    }
    for (String name : names) {
      Wide wide = new Wide(mapping, layout, name, views.size() + 1);
      Optional<String> lacking =
          wide.besides().values().stream()
              .flatMap(column -> header.missing(column.headers()).stream())
              .findFirst();
      if (lacking.isPresent()) {
        return wrong(
            header,
            "no column '" + lacking.get() + "' beside '" + name + "'",
            "the columns that [layout] names beside each column of signals");
      }
      views.add(wide.view());
    }
    return new Views.Found(views);
  }

  /** The names of the columns that match, in the order of the table. */
  static List<String> matching(Pattern pattern, Header header) {
    return header.names().stream().filter(name -> pattern.matcher(name).matches()).toList();
  }

  private static Views wrong(Header header, String found, String expected) {
    return new Views.Wrong(
        new Unmappable(
            header.row().position().within(),
            found,
            expected,
            "correct [layout] in the mapping, or the export"));
  }

  /** One column of signals of a wide table. */
  private record Wide(Mapping mapping, LayoutRule layout, String name, int ordinal) {
    TableView view() {
      Map<Fact, Places.Column> columns = new EnumMap<>(Fact.class);
      columns.putAll(mapping.places().columns());
      columns.put(Fact.SIGNAL, new Places.Column(List.of(name), Form.PLAIN));
      columns.putAll(besides());
      return new TableView(mapping.places().with(columns), told());
    }

    Map<Fact, Places.Column> besides() {
      Map<Fact, Places.Column> columns = new EnumMap<>(Fact.class);
      layout
          .beside()
          .forEach(
              (fact, beside) ->
                  columns.put(
                      fact, new Places.Column(List.of(filled(beside.template())), beside.form())));
      return columns;
    }

    private Map<Fact, Outside> told() {
      Map<Fact, Outside> told = new EnumMap<>(Fact.class);
      String words = "header '" + Said.briefly(name) + "'";
      if (layout.pattern().isEmpty()) {
        Fact fact = layout.kind().told().get(0);
        String text = fact == Fact.REPLICATE ? Integer.toString(ordinal) : name;
        told.put(fact, new Outside(text, Form.PLAIN, words));
        return told;
      }
      Matcher matcher = matcher();
      mapping
          .places()
          .headers()
          .forEach(
              (fact, group) -> {
                String text = matcher.group(group.name());
                told.put(fact, new Outside(text == null ? "" : text, group.form(), words));
              });
      return told;
    }

    private String filled(String template) {
      if (layout.pattern().isEmpty()) {
        return template.replace("{header}", name);
      }
      Matcher matcher = matcher();
      return GROUP
          .matcher(template)
          .replaceAll(
              group -> {
                String name = group.group(1);
                String text = name.equals("header") ? this.name : matcher.group(name);
                return Matcher.quoteReplacement(text == null ? "" : text);
              });
    }

    private Matcher matcher() {
      Matcher matcher = layout.pattern().get().matcher(Header.fold(name));
      if (!matcher.matches()) {
        throw new IllegalStateException(name + " matched before");
      }
      return matcher;
    }
  }
}
