package org.spikewright.mapping;

import java.util.List;
import java.util.Map;
import java.util.regex.Pattern;
import org.spikewright.quantity.Measured;

/**
 * Where facts stand, in order of precedence: a column, a group of a label, the header of a column
 * in a wide layout, the title of a block, the sheet's name, the file's name, {@code [fixed]}.
 *
 * @param columns columns of the table
 * @param labels facts hidden in labels, in the order of the mapping
 * @param headers facts in the headers of columns that hold signals; empty in a long layout
 * @param titles facts in the titles of blocks of rows; empty list when there are none
 * @param sheetName facts in the sheet's name; empty list when none
 * @param fileName facts in the file's name; empty list when none
 * @param fixedNames names that hold for every row
 * @param fixedAmounts quantities that hold for every row, or for every row of an analyte; a
 *     dilution is its factor, a dry mass its fraction, both in unit 1
 * @param fixedStocks the names of fixed stocks that have one; their concentrations stand among the
 *     fixed amounts
 */
public record Places(
    Map<Fact, Column> columns,
    List<Label> labels,
    Map<Fact, Group> headers,
    List<Named> titles,
    List<Named> sheetName,
    List<Named> fileName,
    Map<Fact, String> fixedNames,
    Map<Fact, PerAnalyte<Measured>> fixedAmounts,
    PerAnalyte<String> fixedStocks) {

  /** Copies its collections. */
  public Places {
    columns = Map.copyOf(columns);
    labels = List.copyOf(labels);
    headers = Map.copyOf(headers);
    titles = List.copyOf(titles);
    sheetName = List.copyOf(sheetName);
    fileName = List.copyOf(fileName);
    fixedNames = Map.copyOf(fixedNames);
    fixedAmounts = Map.copyOf(fixedAmounts);
  }

  /**
   * A column, or several whose cells are joined by a blank (a date and a time).
   *
   * @param headers as they stand in the header
   * @param form how its cells are written
   */
  public record Column(List<String> headers, Form form) {}

  /** A named group of a pattern. */
  public record Group(String name, Form form) {}

  /**
   * Facts in a label.
   *
   * @param header the label's column
   * @param pattern must match the whole label
   * @param groups the facts
   */
  public record Label(String header, Pattern pattern, Map<Fact, Group> groups) {}

  /**
   * Facts in a name: of the file with its folders, of a sheet, or in the title of a block.
   *
   * @param pattern must match the whole name
   * @param groups the facts
   */
  public record Named(Pattern pattern, Map<Fact, Group> groups) {}

  /** Whether a fact stands in a column, a label or a name. */
  public boolean isRead(Fact fact) {
    return isInRow(fact) || isIn(fileName, fact);
  }

  /** Whether a fact stands in the table itself, its title and its sheet's name included. */
  public boolean isInRow(Fact fact) {
    return columns.containsKey(fact)
        || labels.stream().anyMatch(label -> label.groups().containsKey(fact))
        || headers.containsKey(fact)
        || isIn(titles, fact)
        || isIn(sheetName, fact);
  }

  private static boolean isIn(List<Named> names, Fact fact) {
    return names.stream().anyMatch(name -> name.groups().containsKey(fact));
  }

  /** The same with other columns. */
  Places with(Map<Fact, Column> others) {
    return new Places(
        others,
        labels,
        headers,
        titles,
        sheetName,
        fileName,
        fixedNames,
        fixedAmounts,
        fixedStocks);
  }

  /** Whether a fact stands anywhere. */
  public boolean isNamed(Fact fact) {
    return isRead(fact) || fixedNames.containsKey(fact) || fixedAmounts.containsKey(fact);
  }
}
