package org.spikewright.table;

/**
 * How a text file is cut into cells.
 *
 * @param separator between fields
 * @param separatorSource why it was taken: {@code as declared}, or by what it was worked out
 * @param encoding its name
 * @param encodingSource why it was taken
 */
public record TextForm(
    char separator, String separatorSource, String encoding, String encodingSource) {

  /** A separator as a person writes it. */
  public static String named(char separator) {
    return separator == '\t' ? "TAB" : String.valueOf(separator);
  }
}
