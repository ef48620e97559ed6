package org.spikewright.intake;

/**
 * Something about the watched folder that a person should know, told when it begins and when it
 * ends, not at each look.
 *
 * @param key the same for the same thing about the same file or folder
 * @param phase whether it begins or ends here
 * @param text what was found, where, and what happens now
 */
public record Notice(String key, Phase phase, String text) {

  /** Where in its life the thing is. */
  public enum Phase {
    /** It is so from this look on, or its text has changed. */
    BEGINS,
    /** It is so no longer. */
    ENDS
  }
}
