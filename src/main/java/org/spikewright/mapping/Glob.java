package org.spikewright.mapping;

/**
 * A pattern of words: {@code *} stands for any characters, {@code ?} for one. Case counts; blanks
 * around the text do not. The empty pattern is the blank cell.
 *
 * @param pattern as written in the mapping
 */
public record Glob(String pattern) {

  /** Whether the whole text matches; time is at most proportional to both lengths' product. */
  public boolean matches(String text) {
    return matchesStripped(text.strip());
  }

  private boolean matchesStripped(String text) {
    int p = 0;
    int t = 0;
    int star = -1;
    int resume = 0;
    while (t < text.length()) {
      char wanted = p < pattern.length() ? pattern.charAt(p) : '\0';
      if (p < pattern.length() && wanted == '*') {
        star = p++;
        resume = t;
      } else if (p < pattern.length() && (wanted == '?' || wanted == text.charAt(t))) {
        p++;
        t++;
      } else if (star >= 0) {
        // The last star takes one more character.
        p = star + 1;
        t = ++resume;
      } else {
        return false;
      }
    }
    while (p < pattern.length() && pattern.charAt(p) == '*') {
      p++;
    }
    return p == pattern.length();
  }

  @Override
  public String toString() {
    return pattern;
  }
}
