package org.spikewright.analysis;

import java.util.List;
import java.util.Optional;
import org.spikewright.reading.Subject;

/**
 * The laboratory's controls.
 *
 * @param rules in the order of the file; the first that applies counts
 */
public record ControlBook(List<ControlRule> rules) {
  /** Nothing is said about controls. */
  public static final ControlBook EMPTY = new ControlBook(List.of());

  /** Copies the list. */
  public ControlBook {
    rules = List.copyOf(rules);
  }

  /** What is said about a subject. */
  public Optional<ControlRule> of(Subject subject) {
    for (ControlRule rule : rules) {
      if (rule.appliesTo(subject)) {
        return Optional.of(rule);
      }
    }
    return Optional.empty();
  }
}
