package org.spikewright.table;

import java.text.Normalizer;
import java.util.ArrayList;
import java.util.HashSet;
import java.util.List;
import java.util.Set;
import java.util.regex.Pattern;

/**
 * What a table's header must hold, by which it is known when separator or place are not declared.
 *
 * @param words names of columns that must be there
 * @param patterns each of which the name of at least one column must match as a whole
 * @param rows how many rows make up the header: 1, or 2 whose cells are joined
 */
public record HeaderCells(List<String> words, List<Pattern> patterns, int rows) {

  /** Copies its lists. */
  public HeaderCells {
    words = List.copyOf(words);
    patterns = List.copyOf(patterns);
  }

  /** A header of one row with these names. */
  public static HeaderCells of(List<String> words) {
    return new HeaderCells(words, List.of(), 1);
  }

  /** Whether nothing is known of the header. */
  public boolean isEmpty() {
    return words.isEmpty() && patterns.isEmpty();
  }

  /** Words and patterns that a header lacks. */
  public List<String> missing(List<String> names) {
    Set<String> known = new HashSet<>();
    names.forEach(name -> known.add(fold(name)));
    List<String> missing = new ArrayList<>();
    for (String word : words) {
      if (!known.contains(fold(word))) {
        missing.add(word);
      }
    }
    for (Pattern pattern : patterns) {
      if (known.stream().noneMatch(name -> pattern.matcher(name).matches())) {
        missing.add(pattern.pattern());
      }
    }
    return missing;
  }

  /** Blanks around a name, runs of blanks or line ends in it, and its Unicode form do not count. */
  public static String fold(String name) {
    return Normalizer.normalize(name.strip().replaceAll("\\s+", " "), Normalizer.Form.NFC);
  }

  /**
   * Joins the two rows of a header to one: {@code upper / lower}. An upper cell holds for the empty
   * ones to its right, as a merged one does, unless nothing stands below it: then it is a name by
   * itself.
   */
  public static List<String> joined(List<String> upper, List<String> lower) {
    List<String> names = new ArrayList<>();
    String over = "";
    for (int i = 0; i < Math.max(upper.size(), lower.size()); i++) {
      String own = i < upper.size() ? fold(upper.get(i)) : "";
      String below = i < lower.size() ? fold(lower.get(i)) : "";
      if (!own.isEmpty()) {
        over = below.isEmpty() ? "" : own;
      }
      if (below.isEmpty()) {
        names.add(own);
      } else {
        names.add(over.isEmpty() ? below : over + " / " + below);
      }
    }
    return names;
  }
}
