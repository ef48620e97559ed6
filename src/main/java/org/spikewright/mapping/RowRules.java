package org.spikewright.mapping;

import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.spikewright.reading.Role;

/**
 * Which rows are left out, and what the others were measured for. Rows of calibration solutions and
 * drift checks hold no addition series; they are read beside it. Where no concentration of the
 * calibration solutions is mapped, their rows count as declared skips.
 *
 * @param skips rows to leave out
 * @param roles the column that names roles, if there is one
 * @param role what every row is where no column says so
 * @param extraCells what becomes of a text row with more cells than the header
 */
public record RowRules(List<Skip> skips, Optional<Roles> roles, Role role, ExtraCells extraCells) {

  /** Every row is a sample's. */
  public static final RowRules NONE =
      new RowRules(List.of(), Optional.empty(), Role.SAMPLE, ExtraCells.REFUSE);

  /** Leaves out a row whose cell under a header matches one of the patterns. */
  public record Skip(String header, List<Glob> patterns) {
    boolean matches(String text) {
      return patterns.stream().anyMatch(glob -> glob.matches(text));
    }
  }

  /** Roles by the patterns of their words, in one column. */
  public record Roles(String header, Map<Role, List<Glob>> patterns) {

    /** The first role, in the order of {@link Role}, one of whose patterns matches. */
    Optional<Role> of(String text) {
      for (Role role : Role.values()) {
        for (Glob glob : patterns.getOrDefault(role, List.of())) {
          if (glob.matches(text)) {
            return Optional.of(role);
          }
        }
      }
      return Optional.empty();
    }
  }

  /**
   * What becomes of a row of a text file that has more cells than the header. An unquoted decimal
   * comma in a comma-separated file looks like that, and shifts every cell after it.
   */
  public enum ExtraCells {
    /** The row is not used. */
    REFUSE("refuse"),
    /** The cells beyond the header do not count. */
    IGNORE("ignore");

    private final String word;

    ExtraCells(String word) {
      this.word = word;
    }

    /** The word used in mappings. */
    public String word() {
      return word;
    }
  }
}
