package org.spikewright.mapping;

import java.util.Collection;
import java.util.Comparator;
import java.util.Locale;
import java.util.Optional;

/** Finds what was probably meant. */
public final class Spelling {
  private Spelling() {}

  /**
   * The candidate that is fewest edits away, if it is near enough to be worth asking about: at most
   * a third of the word, and at least one edit is always allowed. Case counts half.
   */
  public static Optional<String> nearest(String word, Collection<String> candidates) {
    int most = Math.max(1, word.length() / 3) * 2;
    return candidates.stream()
        .filter(candidate -> distance(word, candidate) <= most)
        .min(
            Comparator.<String>comparingInt(candidate -> distance(word, candidate))
                .thenComparing(Comparator.naturalOrder()));
  }

  /**
   * Twice the number of letters to insert, drop, replace or swap with their neighbour; a letter of
   * the other case costs one.
   */
  static int distance(String a, String b) {
    int[][] cost = new int[a.length() + 1][b.length() + 1];
    for (int i = 0; i <= a.length(); i++) {
      for (int j = 0; j <= b.length(); j++) {
        cost[i][j] = i == 0 || j == 0 ? 2 * (i + j) : cheapest(cost, a, b, i, j);
      }
    }
    return cost[a.length()][b.length()];
  }

  private static int cheapest(int[][] cost, String a, String b, int i, int j) {
    int replace = cost[i - 1][j - 1] + replacing(a.charAt(i - 1), b.charAt(j - 1));
    int best = Math.min(replace, 2 + Math.min(cost[i - 1][j], cost[i][j - 1]));
    boolean swapped =
        i > 1 && j > 1 && a.charAt(i - 1) == b.charAt(j - 2) && a.charAt(i - 2) == b.charAt(j - 1);
    return swapped ? Math.min(best, cost[i - 2][j - 2] + 2) : best;
  }

  private static int replacing(char a, char b) {
    if (a == b) {
      return 0;
    }
    return fold(a).equals(fold(b)) ? 1 : 2;
  }

  private static String fold(char c) {
    return String.valueOf(c).toLowerCase(Locale.ROOT);
  }
}
