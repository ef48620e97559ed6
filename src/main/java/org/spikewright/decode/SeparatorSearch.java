package org.spikewright.decode;

import java.io.IOException;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import java.util.stream.Collectors;
import org.spikewright.table.HeaderCells;
import org.spikewright.table.TextForm;

/** Works out a text file's separator: the one under which one row holds all header words. */
final class SeparatorSearch {
  private static final List<Character> CANDIDATES = List.of(';', '\t', ',', '|');

  private static final int FIELDS_SHOWN = 40;

  /**
   * What was worked out.
   *
   * @param how by what
   */
  record Found(char separator, String how) {}

  private final HeaderCells header;

  private SeparatorSearch(HeaderCells header) {
    this.header =
        new HeaderCells(
            header.words().stream().map(String::strip).distinct().toList(),
            header.patterns(),
            header.rows());
  }

  /**
   * The separator.
   *
   * @throws Unreadable when none or more than one fits
   */
  static Found in(TextFile file, char quote, HeaderCells header) throws IOException {
    SeparatorSearch search = new SeparatorSearch(header);
    if (search.header.isEmpty()) {
      throw new Unreadable(
          "the file",
          "no separator declared, and no header by which to work it out",
          "a declared separator",
          "declare the separator in the mapping");
    }
    List<Trial> trials = new ArrayList<>();
    for (char candidate : CANDIDATES) {
      if (candidate != quote) {
        trials.add(search.tried(file, candidate, quote));
      }
    }
    List<Trial> fitting = trials.stream().filter(Trial::fits).toList();
    if (fitting.size() == 1) {
      return new Found(
          fitting.get(0).separator(), "worked out: line " + fitting.get(0).line() + " is a header");
    }
    throw fitting.isEmpty() ? noneFits(trials) : severalFit(fitting);
  }

  private Trial tried(TextFile file, char separator, char quote) throws IOException {
    List<String> all = header.missing(List.of());
    Trial best = new Trial(separator, 0, all, List.of(), Optional.empty());
    List<String> above = List.of();
    try (CsvRecords records = new CsvRecords(file, separator, quote)) {
      for (int row = 0; row < Limits.HEADER_ROWS && !best.fits() && records.next(); row++) {
        List<String> own = fields(records.record());
        List<String> fields = header.rows() == 1 ? own : HeaderCells.joined(above, own);
        above = own;
        List<String> missing = header.missing(fields);
        if (missing.size() < best.missing().size()) {
          best = new Trial(separator, records.line(), missing, fields, Optional.empty());
        }
      }
      return best;
    } catch (Unreadable e) {
      return new Trial(separator, best.line(), best.missing(), best.fields(), Optional.of(e));
    }
  }

  private static List<String> fields(String[] record) {
    return Arrays.stream(record).map(String::strip).toList();
  }

  private static Unreadable noneFits(List<Trial> trials) {
    if (trials.stream().allMatch(trial -> trial.stopped().isPresent())) {
      return trials.get(0).stopped().get();
    }
    return new Unreadable(
        "the file",
        "no row that holds all mapped headers, with none of the separators "
            + trials.stream().map(Trial::account).collect(Collectors.joining("; "))
            + trials.stream()
                .min(Comparator.comparingInt(trial -> trial.missing().size()))
                .filter(nearest -> nearest.line() > 0)
                .map(Trial::columns)
                .orElse(""),
        "one row among the first " + Limits.HEADER_ROWS + " that holds every mapped header",
        "compare the headers in the mapping with the file, or declare the separator");
  }

  private static Unreadable severalFit(List<Trial> fitting) {
    return new Unreadable(
        "the file",
        "a header under more than one separator: "
            + fitting.stream()
                .map(trial -> TextForm.named(trial.separator()) + " (line " + trial.line() + ")")
                .collect(Collectors.joining(", ")),
        "one separator that fits",
        "declare the separator in the mapping");
  }

  /**
   * What came of one candidate.
   *
   * @param line of the row that holds most of the words; 0 for none
   * @param missing the words that this row does not hold
   * @param fields what this row holds
   * @param stopped the fault that ended the search
   */
  private record Trial(
      char separator,
      long line,
      List<String> missing,
      List<String> fields,
      Optional<Unreadable> stopped) {

    boolean fits() {
      return missing.isEmpty();
    }

    /** The columns that the row has. */
    String columns() {
      String names =
          fields.stream().limit(FIELDS_SHOWN).map(Shown::quoted).collect(Collectors.joining(", "));
      return "; line " + line + " has " + names;
    }

    String account() {
      if (line == 0) {
        return TextForm.named(separator) + " (no header found)";
      }
      String words = missing.stream().map(Shown::quoted).collect(Collectors.joining(", "));
      return TextForm.named(separator) + " (line " + line + " lacks " + words + ")";
    }
  }
}
