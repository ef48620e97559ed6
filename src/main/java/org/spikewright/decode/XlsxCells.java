package org.spikewright.decode;

import java.time.DateTimeException;
import java.time.LocalDate;
import java.time.LocalDateTime;
import java.util.List;
import org.spikewright.table.Cell;

/** Makes cells of what an XLSX sheet stores for them; what is no value is never 0. */
final class XlsxCells {
  private final List<String> strings;
  private final DateStyles styles;
  private final NumberCells numbers;

  XlsxCells(List<String> strings, DateStyles styles, boolean dates1904) {
    this.strings = strings;
    this.styles = styles;
    this.numbers = new NumberCells(dates1904);
  }

  /**
   * What is stored for a cell.
   *
   * @param type the {@code t} attribute; empty means a number
   * @param style the {@code s} attribute
   * @param hasValue whether there is a {@code v} element
   * @param value its text
   * @param inline the text of the {@code is} element; empty without one
   * @param formula whether there is an {@code f} element
   */
  record Stored(
      String type, String style, boolean hasValue, String value, String inline, boolean formula) {}

  Cell of(Stored stored) {
    return switch (stored.type()) {
      case "", "n" -> number(stored);
      case "s" -> shared(stored);
      case "inlineStr" -> text(stored.inline().isEmpty() ? stored.value() : stored.inline());
      case "str" ->
          stored.hasValue() || !stored.formula()
              ? text(RichText.unescaped(stored.value()))
              : unstored();
      case "b" -> logical(stored);
      case "e" -> new Cell.Unusable("error " + Shown.plain(stored.value(), 40));
      case "d" -> isoDate(stored);
      default -> new Cell.Unusable("a cell of the unknown kind " + Shown.quoted(stored.type()));
    };
  }

  private Cell number(Stored stored) {
    if (stored.value().isBlank()) {
      if (stored.formula()) {
        return unstored();
      }
      return stored.hasValue() ? new Cell.Unusable("a number without digits") : Cell.BLANK;
    }
    return numbers.ofDigits(stored.value(), styles.isDate(stored.style()));
  }

  private Cell shared(Stored stored) {
    String digits = stored.value().strip();
    try {
      int index = Integer.parseInt(digits);
      if (index >= 0 && index < strings.size()) {
        return text(strings.get(index));
      }
    } catch (NumberFormatException e) {
      // Told below, as an index that is out of range.
    }
    return new Cell.Unusable(
        "text number " + Shown.quoted(digits) + ", which the file does not hold");
  }

  private static Cell logical(Stored stored) {
    return switch (stored.value().strip()) {
      case "1", "true" -> new Cell.Unusable("TRUE (a logical value)");
      case "0", "false" -> new Cell.Unusable("FALSE (a logical value)");
      case "" -> stored.formula() ? unstored() : new Cell.Unusable("a logical value, left empty");
      default -> new Cell.Unusable(Shown.quoted(stored.value()) + " (no logical value)");
    };
  }

  private static Cell isoDate(Stored stored) {
    String raw = stored.value().strip();
    try {
      LocalDateTime moment =
          raw.contains("T") ? LocalDateTime.parse(raw) : LocalDate.parse(raw).atStartOfDay();
      return new Cell.Moment(moment, raw);
    } catch (DateTimeException e) {
      return new Cell.Unusable(Shown.quoted(raw) + " (not a date and time)");
    }
  }

  private static Cell text(String text) {
    return text.isEmpty() ? Cell.BLANK : new Cell.Text(text);
  }

  private static Cell unstored() {
    return new Cell.Unusable("formula without a stored result");
  }
}
