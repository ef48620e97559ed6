package org.spikewright.mapping;

/**
 * A pattern of file names inside the watched folder, folders parted by {@code /}. {@code *} and
 * {@code ?} stay within one folder, {@code **} spans folders, and <code>**&#47;</code> may also
 * stand for none. Case does not count.
 *
 * @param pattern as written in the mapping
 */
public record PathPattern(String pattern) {

  /** Whether the whole path matches; time is proportional to the product of both lengths. */
  public boolean matches(String path) {
    // reachable[t]: the pattern read so far can stand for the first t characters of the path.
    boolean[] reachable = new boolean[path.length() + 1];
    reachable[0] = true;
    int p = 0;
    while (p < pattern.length()) {
      if (pattern.startsWith("**/", p)) {
        reachable = afterFolders(reachable, path);
        p += 3;
      } else if (pattern.startsWith("**", p)) {
        reachable = afterStar(reachable, path, true);
        p += 2;
      } else if (pattern.charAt(p) == '*') {
        reachable = afterStar(reachable, path, false);
        p++;
      } else {
        reachable = afterOne(reachable, path, pattern.charAt(p));
        p++;
      }
    }
    return reachable[path.length()];
  }

  private static boolean[] afterFolders(boolean[] before, String path) {
    boolean[] after = before.clone();
    boolean open = before[0];
    for (int t = 1; t < after.length; t++) {
      after[t] |= open && path.charAt(t - 1) == '/';
      open |= before[t];
    }
    return after;
  }

  private static boolean[] afterStar(boolean[] before, String path, boolean acrossFolders) {
    boolean[] after = before.clone();
    for (int t = 1; t < after.length; t++) {
      after[t] |= after[t - 1] && (acrossFolders || path.charAt(t - 1) != '/');
    }
    return after;
  }

  private static boolean[] afterOne(boolean[] before, String path, char wanted) {
    boolean[] after = new boolean[before.length];
    for (int t = 1; t < after.length; t++) {
      char c = path.charAt(t - 1);
      after[t] = before[t - 1] && (wanted == '?' ? c != '/' : fold(c) == fold(wanted));
    }
    return after;
  }

  /** Both ways, because some letters have only one of the two cases; no locale takes part. */
  private static char fold(char c) {
    return Character.toLowerCase(Character.toUpperCase(c));
  }

  @Override
  public String toString() {
    return pattern;
  }
}
