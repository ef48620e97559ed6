package org.spikewright.mapping;

import java.util.List;
import java.util.Map;
import java.util.regex.Pattern;
import org.spikewright.quantity.Measured;

/**
 * Where facts stand, in order of precedence: a column, a group of a label, a group of the file's
 * name, {@code [fixed]}.
 *
 * @param columns columns of the table
 * @param labels facts hidden in labels, in the order of the mapping
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
    List<FileName> fileName,
    Map<Fact, String> fixedNames,
    Map<Fact, PerAnalyte<Measured>> fixedAmounts,
    PerAnalyte<String> fixedStocks) {

  /** Copies its collections. */
  public Places {
    columns = Map.copyOf(columns);
    labels = List.copyOf(labels);
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
   * Facts in the file's name.
   *
   * @param pattern must match the whole name with its folders
   * @param groups the facts
   */
  public record FileName(Pattern pattern, Map<Fact, Group> groups) {}

  /** Whether a fact stands in a column, a label or the file's name. */
  public boolean isRead(Fact fact) {
    return isInRow(fact) || fileName.stream().anyMatch(name -> name.groups().containsKey(fact));
  }

  /** Whether a fact stands in a column or a label. */
  public boolean isInRow(Fact fact) {
    return columns.containsKey(fact)
        || labels.stream().anyMatch(label -> label.groups().containsKey(fact));
  }

  /** Whether a fact stands anywhere. */
  public boolean isNamed(Fact fact) {
    return isRead(fact) || fixedNames.containsKey(fact) || fixedAmounts.containsKey(fact);
  }
}
