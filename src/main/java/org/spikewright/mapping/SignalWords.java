package org.spikewright.mapping;

import java.util.List;
import java.util.Optional;
import org.spikewright.reading.Signal.State;

/**
 * The declared words that stand where a signal should. They are looked at before numbers, so that a
 * number can be declared one ({@code -999}).
 *
 * @param overRange the signal was above the instrument's range
 * @param belowRange it was below
 * @param missing there is none
 */
public record SignalWords(List<Glob> overRange, List<Glob> belowRange, List<Glob> missing) {

  /** No word is declared. */
  public static final SignalWords NONE = new SignalWords(List.of(), List.of(), List.of());

  /** What a cell's text means, if it is a declared word. */
  public Optional<State> state(String text) {
    if (any(overRange, text)) {
      return Optional.of(State.OVER_RANGE);
    }
    if (any(belowRange, text)) {
      return Optional.of(State.BELOW_RANGE);
    }
    return any(missing, text) ? Optional.of(State.MISSING) : Optional.empty();
  }

  private static boolean any(List<Glob> globs, String text) {
    for (Glob glob : globs) {
      if (glob.matches(text)) {
        return true;
      }
    }
    return false;
  }
}
